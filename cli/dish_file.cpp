#include "cli/dish_file.h"

#include <algorithm>
#include <cmath>
#include <cstdlib>
#include <map>

#include "cli/combination_file.h"
#include "cli/nearest.h"
#include "cli/trough_reader.h"
#include "models/schema_dish.h"

namespace focalframe::cli {
namespace {

std::string written(const std::string& attribute, const std::string& value) {
  return attribute + "=\"" + value + "\"";
}

class Reader {
 public:
  explicit Reader(const DesignFile& file) : file_(file) {}

  DishFile run() {
    out_.design.name = file_.name;
    read_children(file_.root, "");
    const bool broken = has_stop(out_.messages);
    for (const models::Violation& v : models::validate_dish(out_.design))
      // What is missing may have been reported as something that could not be read.
      if (!(broken && v.missing)) say_rule(v);
    sort_by_line(out_.messages);
    return std::move(out_);
  }

 private:
  Message& say(int line, std::string head, std::string text) {
    Message m;
    m.file = file_.path;
    m.line = line;
    m.head = std::move(head);
    m.text = std::move(text);
    out_.messages.push_back(std::move(m));
    return out_.messages.back();
  }

  void read_children(const XmlElement& xml, const std::string& path) {
    for (const XmlElement& child : xml.children) {
      const std::string full = path.empty() ? child.name : path + "/" + child.name;
      if (const models::Element* element = models::find_dish_element(full))
        read_element(child, *element);
      else
        unknown_element(child, path);
    }
  }

  void unknown_element(const XmlElement& child, const std::string& path) {
    std::vector<std::string> known;
    for (const models::Element& e : models::dish_schema()) {
      const std::size_t slash = e.path.rfind('/');
      if ((slash == std::string::npos ? "" : e.path.substr(0, slash)) == path) known.push_back(leaf(e.path));
    }
    Message& m = say(
        child.line, "<" + child.name + ">",
        "<" + (path.empty() ? "collector" : leaf(path)) + "> of a dish has no <" + child.name + ">. " +
            (known.empty() ? "It holds no elements, only attributes." : "It knows: " + joined(known) + "."));
    if (const std::string near = nearest_name(child.name, known); !near.empty()) m.likely = "<" + near + ">";
  }

  void read_element(const XmlElement& xml, const models::Element& element) {
    std::string place = element.path;
    if (element.repeats) {
      const std::size_t before = models::entries(element.path, out_.design);
      models::keep_entries(element.path, out_.design, before + 1);
      if (before > 0) place += "#" + std::to_string(before + 1);
    } else if (out_.lines.count(place)) {
      say(xml.line, "<" + xml.name + ">",
          "A second <" + xml.name + ">; the first stands in line " + std::to_string(out_.lines[place]) +
              ". Only one of them can count.")
          .advice = "Keep the right one and delete the other";
      return;
    }
    out_.lines[place] = xml.line;
    if (element.presence) *element.presence(out_.design) = true;
    for (const XmlAttribute& a : xml.attributes) read_attribute(element, place, a);
    read_children(xml, element.path);
  }

  void read_attribute(const models::Element& element, const std::string& place, const XmlAttribute& a) {
    const std::string head = leaf(element.path) + " " + written(a.name, a.value);
    if (a.name == "basis") {
      const auto& words = models::basis_words();
      if (std::find(words.begin(), words.end(), a.value) != words.end())
        out_.design.basis[element.path] = a.value;
      else
        say(a.line, head, "How a value is known is one of: " + joined(words) + ".");
      return;
    }
    if (read_own(place, head, a)) return;
    const models::Field* field = models::find_field(element, a.name);
    if (!field) {
      std::vector<std::string> known;
      for (const models::Field& f : element.fields) known.push_back(f.name);
      Message& m = say(
          a.line, head,
          "<" + leaf(element.path) + "> has no \"" + a.name + "\". It knows: " + joined(known) + " basis.");
      if (const std::string near = nearest_name(a.name, known); !near.empty())
        m.likely = written(near, a.value);
      return;
    }
    out_.lines[place + "/" + a.name] = a.line;
    raw_[place + "/" + a.name] = a.value;
    const Unread unread = set_field(element, *field, a.value, out_.design);
    if (unread.problem.empty()) return;
    Message& m = say(a.line, head, unread.problem);
    if (!unread.suggestions.empty()) m.likely = written(a.name, unread.suggestions.front());
  }

  // Decibels, beamwidths and radio frequencies are quantities of dishes only: a number and one of a few
  // units.
  struct OwnUnits {
    double& value;
    std::map<std::string, double> units;
  };
  std::map<std::string, OwnUnits> own_units() {
    models::RadioInput& radio = out_.design.dish.radio;
    models::DishLimitsInput& limits = out_.design.dish.limits;
    const std::map<std::string, double> decibel{{"dB", 1}};
    return {{"radio/frequency", {radio.frequency, {{"kHz", 1e3}, {"MHz", 1e6}, {"GHz", 1e9}}}},
            {"radio/edge-taper", {radio.edge_taper, decibel}},
            {"limits/gain-loss", {limits.gain_loss, decibel}},
            {"limits/pointing", {limits.pointing, {{"beamwidth", 1}, {"beamwidths", 1}}}}};
  }

  bool read_own(const std::string& place, const std::string& head, const XmlAttribute& a) {
    const auto all = own_units();
    const auto at = all.find(place + "/" + a.name);
    if (at == all.end()) return false;
    out_.lines[at->first] = a.line;
    const auto [number, unit] = split_number(a.value);
    const auto factor = at->second.units.find(unit);
    char* end = nullptr;
    const double read = std::strtod(number.c_str(), &end);
    if (factor != at->second.units.end() && !number.empty() && *end == 0 && std::isfinite(read) && read > 0) {
      at->second.value = read * factor->second;
      return true;
    }
    std::vector<std::string> names;
    for (const auto& [name, size] : at->second.units) names.push_back(name);
    say(a.line, head, "A number above 0 with its unit is wanted here: " + joined(names, ", ") + ".");
    return true;
  }

  void say_rule(const models::Violation& v) {
    int line = 0;
    for (const std::string& key :
         {v.element + "/" + v.attribute, v.element, v.element.substr(0, v.element.rfind('/'))})
      if (const auto at = out_.lines.find(key); line == 0 && at != out_.lines.end()) line = at->second;
    std::string head = v.head;
    if (head.empty()) {
      const std::string name = v.element.substr(0, v.element.find('#'));
      const auto raw = raw_.find(v.element + "/" + v.attribute);
      head = v.attribute.empty() ? "<" + leaf(name) + ">" + (v.missing ? " is missing" : "")
             : raw != raw_.end() ? leaf(name) + " " + written(v.attribute, raw->second)
                                 : leaf(name) + (v.missing ? " without " : " ") + v.attribute;
    }
    Message& m = say(line, head, v.text);
    m.level = v.level == models::Violation::Level::stop   ? Level::stop
              : v.level == models::Violation::Level::warn ? Level::warn
                                                          : Level::note;
    m.rule = v.rule;
    m.likely = v.likely;
    m.advice = v.advice;
    m.no_solution = v.no_solution;
  }

  const DesignFile& file_;
  DishFile out_;
  std::map<std::string, std::string> raw_;
};

}  // namespace

DishFile read_dish(const DesignFile& design) {
  DishFile dish = Reader(design).run();
  const auto strength = dish.lines.find("limits/strength");
  resolve_combinations(dish.design, design.path, strength == dish.lines.end() ? 0 : strength->second,
                       dish.messages);
  return dish;
}

std::vector<std::string> dish_attributes_with_own_units() {
  return {"radio/frequency", "radio/edge-taper", "limits/gain-loss", "limits/pointing"};
}

}  // namespace focalframe::cli
