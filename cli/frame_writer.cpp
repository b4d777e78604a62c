#include "cli/frame_writer.h"

#include <array>
#include <cstdio>
#include <map>
#include <set>

#include "cli/escaped.h"
#include "cli/frame_words.h"
#include "fem/beam.h"

namespace focalframe::cli {
namespace {

std::string digits(double value) {
  std::array<char, 32> buffer{};
  // The shortest of 15 to 17 digits that reads back to the same number.
  for (int precision = 15; precision <= 17; ++precision) {
    std::snprintf(buffer.data(), buffer.size(), "%.*g", precision, value);
    if (std::stod(buffer.data()) == value) break;
  }
  return buffer.data();
}

class Writer {
 public:
  Writer(const fem::Frame& frame, const std::vector<fem::LoadCase>& cases) : frame_(frame), cases_(cases) {}

  std::string run() {
    name_all();
    for (std::size_t i = 0; i < frame_.materials.size(); ++i) material(i);
    for (std::size_t i = 0; i < frame_.sections.size(); ++i) section(i);
    for (std::size_t i = 0; i < frame_.nodes.size(); ++i) node(i);
    for (std::size_t i = 0; i < frame_.members.size(); ++i) member(i);
    for (std::size_t i = 0; i < frame_.joints.size(); ++i) joint(i);
    for (const fem::Support& s : frame_.supports) support(s);
    for (std::size_t i = 0; i < frame_.springs.size(); ++i) spring(i);
    for (std::size_t i = 0; i < frame_.masses.size(); ++i) mass(i);
    for (const fem::LoadCase& load : cases_) load_case(load);
    return std::move(text_);
  }

 private:
  using Names = std::vector<std::string>;

  template <class Things>
  static Names unique(const Things& things, const std::string& kind) {
    Names names;
    std::set<std::string> taken;
    for (const auto& thing : things) {
      const std::string base = thing.name.empty() ? kind : thing.name;
      std::string name = base;
      for (int k = 2; !taken.insert(name).second; ++k) name = base + " #" + std::to_string(k);
      names.push_back(name);
    }
    return names;
  }

  void name_all() {
    nodes_ = unique(frame_.nodes, "node");
    members_ = unique(frame_.members, "member");
    joints_ = unique(frame_.joints, "joint");
    springs_ = unique(frame_.springs, "spring");
    masses_ = unique(frame_.masses, "mass");
  }

  void open(const char* element) { text_ += std::string("    <") + element; }
  void word(const std::string& name, const std::string& value) {
    if (!value.empty()) text_ += " " + name + "=\"" + escaped(value) + "\"";
  }
  void number(const std::string& name, double value, const char* unit) {
    if (value != 0) must(name, value, unit);
  }
  void must(const std::string& name, double value, const char* unit) {
    text_ += " " + name + "=\"" + digits(value) + " " + unit + "\"";
  }
  void close() { text_ += "/>\n"; }
  void place(const fem::Vec3& at, bool all) {
    const char* names[] = {"x", "y", "z"};
    for (int i = 0; i < 3; ++i) all ? must(names[i], at[i], "m") : number(names[i], at[i], "m");
  }
  void direction(const std::string& name, const fem::Vec3& v) {
    word(name, digits(v.x()) + " " + digits(v.y()) + " " + digits(v.z()));
  }
  void axes(const fem::Mat3& columns) {
    if (columns == fem::Mat3::Identity()) return;
    direction("x-axis", columns.col(0));
    direction("up", columns.col(2));
  }
  void freedoms(const std::string& name, const fem::Six& six) {
    std::string list;
    for (std::size_t i = 0; i < 6; ++i)
      if (six[i]) list += (list.empty() ? "" : " ") + freedom_words()[i];
    word(name, list);
  }
  void forces(const fem::Vec3& force, const fem::Vec3& moment) {
    const char* axis[] = {"x", "y", "z"};
    for (int i = 0; i < 3; ++i) number(std::string("f") + axis[i], force[i], "N");
    for (int i = 0; i < 3; ++i) number(std::string("m") + axis[i], moment[i], "N m");
  }

  // The same content is written once; `ids` takes the id that members name.
  void once(const char* element, const std::string& base, const std::string& content, Names& ids) {
    const auto [at, fresh] = written_.insert({std::string(element) + content, ""});
    if (fresh) {
      at->second = base;
      for (int k = 2; !taken_.insert(element + at->second).second; ++k)
        at->second = base + " #" + std::to_string(k);
      open(element);
      word("id", at->second);
      text_ += content + "/>\n";
    }
    ids.push_back(at->second);
  }

  // What `write` adds to the text, taken out of it again.
  template <class Write>
  std::string apart(Write write) {
    const std::size_t before = text_.size();
    write();
    std::string content = text_.substr(before);
    text_.resize(before);
    return content;
  }

  void material(std::size_t i) {
    const fem::Material& m = frame_.materials[i];
    const std::string content = apart([&] {
      must("E", m.E, "Pa");
      must("G", m.G, "Pa");
      number("density", m.density, "kg/m3");
      number("yield", m.yield, "Pa");
      number("expansion", m.expansion, "1/K");
    });
    once("material", m.name.empty() ? "material" : m.name, content, materials_);
  }

  void section(std::size_t i) {
    const fem::Section& s = frame_.sections[i];
    const std::string content = apart([&] {
      word("shape", "properties");
      must("area", s.A, "m2");
      must("Iy", s.Iy, "m4");
      must("Iz", s.Iz, "m4");
      must("J", s.J, "m4");
      number("shear-area-y", s.shear_area_y, "m2");
      number("shear-area-z", s.shear_area_z, "m2");
      number("Wy", s.Wy, "m3");
      number("Wz", s.Wz, "m3");
      number("Wt", s.Wt, "m3");
      number("peak-shear-y", s.peak_shear_y, "m2");
      number("peak-shear-z", s.peak_shear_z, "m2");
      if (s.round) word("round", "yes");
    });
    once("section", s.name.empty() ? "section" : s.name, content, sections_);
  }

  void node(std::size_t i) {
    open("node");
    word("id", nodes_[i]);
    place(frame_.nodes[i].at, true);
    close();
  }

  const std::string& node_name(int node) const { return nodes_[static_cast<std::size_t>(node)]; }

  void member(std::size_t i) {
    const fem::Member& m = frame_.members[i];
    open("member");
    word("id", members_[i]);
    word("from", node_name(m.from));
    word("to", node_name(m.to));
    word("section", sections_[static_cast<std::size_t>(m.section)]);
    word("material", materials_[static_cast<std::size_t>(m.material)]);
    direction("up", m.up);
    freedoms("release-from", m.release_from);
    freedoms("release-to", m.release_to);
    word("group", m.group);
    close();
    offset(members_[i], "from", m.offset_from);
    offset(members_[i], "to", m.offset_to);
    end_spring(members_[i], "from", m.spring_from);
    end_spring(members_[i], "to", m.spring_to);
  }

  void offset(const std::string& member, const char* end, const fem::Vec3& arm) {
    if (arm.isZero(0)) return;
    open("offset");
    word("member", member);
    word("end", end);
    place(arm, false);
    close();
  }

  void end_spring(const std::string& member, const char* end, const std::array<double, 6>& k) {
    if (k == std::array<double, 6>{}) return;
    open("end-spring");
    word("member", member);
    word("end", end);
    for (std::size_t i = 0; i < 6; ++i) number(freedom_words()[i], k[i], i < 3 ? "N/m" : "N m/rad");
    close();
  }

  void joint(std::size_t i) {
    const fem::Joint& j = frame_.joints[i];
    open("joint");
    word("id", joints_[i]);
    word("node", node_name(j.node));
    word("other", node_name(j.other));
    freedoms("hold", j.held);
    axes(j.axes);
    close();
  }

  void support(const fem::Support& s) {
    if (s.fix == fem::Six{}) return;
    open("support");
    word("node", node_name(s.node));
    freedoms("fix", s.fix);
    close();
    if (s.imposed.isZero(0)) return;
    for (const fem::LoadCase& load : cases_) {
      open("support-movement");
      word("case", load.name);
      word("node", node_name(s.node));
      for (int i = 0; i < 6; ++i)
        number(freedom_words()[static_cast<std::size_t>(i)], s.imposed[i], i < 3 ? "m" : "rad");
      close();
    }
  }

  void spring(std::size_t i) {
    const fem::Spring& s = frame_.springs[i];
    open("spring");
    word("id", springs_[i]);
    word("node", node_name(s.node));
    if (s.other >= 0) word("other", node_name(s.other));
    axes(s.axes);
    for (int k = 0; k < 6; ++k)
      must(freedom_words()[static_cast<std::size_t>(k)], s.stiffness[k], k < 3 ? "N/m" : "N m/rad");
    close();
  }

  void mass(std::size_t i) {
    const fem::PointMass& m = frame_.masses[i];
    open("mass");
    word("id", masses_[i]);
    word("node", node_name(m.node));
    must("value", m.mass, "kg");
    place(m.offset, false);
    const char* axis[] = {"x", "y", "z"};
    for (int a = 0; a < 3; ++a)
      for (int b = a; b < 3; ++b) number(std::string("I") + axis[a] + axis[b], m.inertia(a, b), "kg m2");
    word("group", m.group);
    close();
  }

  void on_member(const char* element, const fem::LoadCase& load, int member) {
    open(element);
    word("case", load.name);
    word("member", members_[static_cast<std::size_t>(member)]);
  }

  void load_case(const fem::LoadCase& load) {
    if (!load.gravity.isZero(0)) {
      open("gravity");
      word("case", load.name);
      must("value", load.gravity.norm(), "m/s2");
      direction("direction", load.gravity / load.gravity.norm());
      close();
    }
    for (const fem::NodeLoad& n : load.nodes) {
      if (n.force.isZero(0) && n.moment.isZero(0)) continue;
      open("load");
      word("case", load.name);
      word("node", node_name(n.node));
      forces(n.force, n.moment);
      close();
    }
    for (const fem::LineLoad& l : load.lines) line_load(load, l);
    for (const fem::MemberPointLoad& p : load.points) {
      on_member("point-load", load, p.member);
      must("at", p.at * fem::member_length(frame_, p.member), "m");
      forces(p.force, p.moment);
      if (p.member_axes) word("axes", "member");
      close();
    }
    for (const fem::MemberTemperature& t : load.temperatures) {
      on_member("temperature", load, t.member);
      must("change", t.uniform, "K");
      number("gradient-y", t.gradient_y, "K/m");
      number("gradient-z", t.gradient_z, "K/m");
      close();
    }
  }

  void line_load(const fem::LoadCase& load, const fem::LineLoad& l) {
    if (l.at_from.isZero(0) && l.at_to.isZero(0)) return;
    on_member("member-load", load, l.member);
    const double length = fem::member_length(frame_, l.member);
    if (l.from > 0) must("from", l.from * length, "m");
    if (l.to < 1) must("to", l.to * length, "m");
    const char* axis[] = {"fx", "fy", "fz"};
    for (int i = 0; i < 3; ++i) {
      number(axis[i], l.at_from[i], "N/m");
      if (l.at_to[i] != l.at_from[i]) must(std::string(axis[i]) + "-to", l.at_to[i], "N/m");
    }
    if (l.member_axes) word("axes", "member");
    close();
  }

  const fem::Frame& frame_;
  const std::vector<fem::LoadCase>& cases_;
  std::string text_;
  Names materials_, sections_, nodes_, members_, joints_, springs_, masses_;
  std::map<std::string, std::string> written_;
  std::set<std::string> taken_;
};

// "--" may not stand in an XML comment.
std::string comment(std::string text) {
  for (std::size_t at = text.find("--"); at != std::string::npos; at = text.find("--"))
    text.replace(at, 2, "- ");
  return "<!-- " + text + " -->\n";
}

}  // namespace

std::string frame_design_text(const std::string& name, const std::vector<std::string>& remarks,
                              const fem::Frame& frame, const std::vector<fem::LoadCase>& cases) {
  std::string text = "<?xml version=\"1.0\" encoding=\"UTF-8\"?>\n";
  for (const std::string& remark : remarks) text += comment(remark);
  return text + "<collector name=\"" + escaped(name) + "\" kind=\"frame\" format=\"1\">\n  <frame>\n" +
         Writer(frame, cases).run() + "  </frame>\n</collector>\n";
}

}  // namespace focalframe::cli
