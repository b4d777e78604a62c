#include "models/torque_box.h"

#include <Eigen/Geometry>
#include <algorithm>
#include <array>
#include <cmath>

#include "models/catalogue.h"
#include "models/profile.h"

namespace focalframe::models {
namespace {

using fem::Vec3;

struct Station {
  double x = 0;               // from the module's start [m]
  std::array<int, 4> node{};  // one per corner; all the same at an end plate
  std::array<Vec3, 4> arm{};  // node -> corner
};

class BoxBuilder {
 public:
  BoxBuilder(const TroughDesign& design, const TroughLayout& layout, BodyMaker& make, int module)
      : tube_(design.tube), at_(layout), make_(make), module_(module) {
    chord_ = make_.section(section_of(tube_.chords));
    web_ = make_.section(section_of(tube_.webs));
    chord_material_ = make_.material(tube_.chords);
    web_material_ = make_.material(tube_.webs);
  }

  std::vector<int> run(int start, int end, const Vec3& to_tube) {
    std::vector<int> hubs;
    Station last = end_plate(0, start, to_tube);
    const auto go = [&](const Station& next) {
      add_panel(last, next);
      last = next;
      ++panel_;
    };
    for (std::size_t r = 0; r < at_.rib_x.size(); ++r) {
      if (r > 0)
        for (int p = 1; p < tube_.panels_per_bay; ++p)
          go(frame(at_.rib_x[r - 1] + (at_.rib_x[r] - at_.rib_x[r - 1]) * p / tube_.panels_per_bay));
      const Station station = frame(at_.rib_x[r]);
      hubs.push_back(add_hub(station, static_cast<int>(r)));
      go(station);
    }
    go(end_plate(at_.module_length, end, to_tube));
    return hubs;
  }

 private:
  // Corners anticlockwise seen from the row's far end, from +y +z.
  Vec3 corner(int c) const {
    const double y = tube_.profile.width / 2, z = tube_.profile.depth / 2;
    return {0, c == 0 || c == 3 ? y : -y, c < 2 ? z : -z};
  }

  Vec3 centre(double x) const { return {module_ * at_.module_length + x, 0, -at_.tube_to_vertex}; }

  Station end_plate(double x, int node, const Vec3& to_tube) const {
    Station s{x, {node, node, node, node}, {}};
    for (int c = 0; c < 4; ++c) s.arm[static_cast<std::size_t>(c)] = to_tube + corner(c);
    return s;
  }

  Station frame(double x) {
    Station s{x, {}, {}};
    const std::string where = " of the box of module " + std::to_string(module_ + 1) + " at " +
                              std::to_string(std::lround(x * 1000)) + " mm";
    for (int c = 0; c < 4; ++c) {
      s.node[static_cast<std::size_t>(c)] =
          make_.node(centre(x) + corner(c), "chord " + std::to_string(c + 1) + where);
      s.arm[static_cast<std::size_t>(c)] = Vec3::Zero();
    }
    for (int c = 0; c < 4; ++c)
      bar(s, c, s, (c + 1) % 4, true, "frame side " + std::to_string(c + 1) + where);
    return s;
  }

  int add_hub(const Station& s, int rib) {
    const int hub = make_.node(
        centre(s.x), "tube of module " + std::to_string(module_ + 1) + " at rib " + std::to_string(rib + 1));
    const fem::Section& web = make_.out.body.sections[static_cast<std::size_t>(web_)];
    const double E = make_.out.body.materials[static_cast<std::size_t>(web_material_)].E;
    const double half = corner(0).norm();
    for (int c = 0; c < 4; ++c) {
      fem::Spring tie;
      tie.node = hub;  // acts where the chord is
      tie.other = s.node[static_cast<std::size_t>(c)];
      const double in_plane = E * web.A / half, along = 12 * E * std::min(web.Iy, web.Iz) / std::pow(half, 3);
      tie.stiffness << along, in_plane, in_plane, 0, 0, 0;
      tie.name = place_name("hub of rib", rib, module_);
      make_.out.body.springs.push_back(tie);
    }
    return hub;
  }

  void bar(const Station& a, int ca, const Station& b, int cb, bool lacing, const std::string& name) {
    const std::size_t i = static_cast<std::size_t>(ca), j = static_cast<std::size_t>(cb);
    const Vec3 from = make_.at(a.node[i]) + a.arm[i], to = make_.at(b.node[j]) + b.arm[j];
    const Vec3 along = to - from;
    // An angle as a chord turns its heel outwards; lacing stands its depth in the plane of its face.
    const std::array<Vec3, 4> inwards{-Vec3::UnitZ(), Vec3::UnitY(), Vec3::UnitZ(), -Vec3::UnitY()};
    const Vec3 outwards = corner(ca) + corner(cb);
    const ProfileInput& profile = lacing ? tube_.webs : tube_.chords;
    const Vec3 up = rolled_up(profile, along, lacing ? Vec3(outwards.cross(along)) : inwards[i]);
    fem::Member& m =
        make_.member(a.node[i], b.node[j], lacing ? web_ : chord_, lacing ? web_material_ : chord_material_,
                     up, name, lacing ? "box web" : "box chord");
    m.offset_from = a.arm[i];
    m.offset_to = b.arm[j];
    make_.out.buckling.push_back({make_.last_member(), along.norm(), along.norm(), 0, profile.shape});
  }

  void add_panel(const Station& a, const Station& b) {
    const std::string where = place_name(", panel", panel_, module_);
    for (int c = 0; c < 4; ++c) bar(a, c, b, c, false, "box chord " + std::to_string(c + 1) + where);
    for (int face = 0; face < 4; ++face) {
      const int next = (face + 1) % 4;
      const std::string name = "box diagonal, face " + std::to_string(face + 1) + where;
      // Diagonals of neighbouring faces meet at the same chord: chords 1, 3 and 2, 4 in turn.
      const bool from_face = face % 2 == panel_ % 2;
      bar(a, from_face ? face : next, b, from_face ? next : face, true, name);
      if (tube_.bracing == "cross")
        bar(a, from_face ? next : face, b, from_face ? face : next, true, name + "b");
    }
  }

  const TubeInput& tube_;
  const TroughLayout& at_;
  BodyMaker& make_;
  int module_ = 0, panel_ = 0;
  int chord_ = 0, web_ = 0, chord_material_ = 0, web_material_ = 0;
};

}  // namespace

double lattice_box_torsion(double depth, double width, double panel, double web_area, double E,
                           bool crossed) {
  double flexibility = 0;
  for (double side : {depth, width, depth, width})
    flexibility += std::pow(std::hypot(side, panel), 3) / web_area;
  return 4 * depth * depth * width * width * E * panel * (crossed ? 2 : 1) / flexibility;
}

double lattice_box_torsion(const TroughDesign& design, const TroughLayout& layout) {
  const TubeInput& tube = design.tube;
  if (tube.profile.shape != "lattice-box" || layout.rib_x.size() < 2) return not_given;
  const double panel = (layout.rib_x[1] - layout.rib_x[0]) / tube.panels_per_bay;
  return lattice_box_torsion(tube.profile.depth, tube.profile.width, panel, section_of(tube.webs).A,
                             material_of(tube.webs.material, profile_thickness(tube.webs)).E,
                             tube.bracing == "cross");
}

std::vector<int> add_torque_box(const TroughDesign& design, const TroughLayout& layout, BodyMaker& make,
                                int module, int start, int end, const Vec3& to_tube) {
  return BoxBuilder(design, layout, make, module).run(start, end, to_tube);
}

}  // namespace focalframe::models
