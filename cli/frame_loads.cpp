#include <algorithm>
#include <cmath>

#include "cli/frame_reader.h"
#include "cli/nearest.h"
#include "cli/quantity.h"
#include "fem/beam.h"

namespace focalframe::cli {

std::size_t FrameReader::load_case(const FrameElementReader& element) {
  const std::string name = element.text("case");
  for (std::size_t i = 0; i < out_.cases.size(); ++i)
    if (out_.cases[i].name == name) return i;
  out_.cases.emplace_back().name = name;
  out_.movements.emplace_back();
  return out_.cases.size() - 1;
}

fem::Vec6 FrameReader::six(const FrameElementReader& element, const std::vector<std::string>& words) {
  fem::Vec6 values = fem::Vec6::Zero();
  bool any = false;
  for (std::size_t i = 0; i < words.size(); ++i) {
    values[static_cast<Eigen::Index>(i)] = element.number(words[i]).value_or(0);
    any = any || element.has(words[i]);
  }
  if (!any)
    element.say("", std::string(element.name().ends_with("load") ? "A load" : "This") +
                        " needs at least one of: " + joined(words) + ".");
  return values;
}

void FrameReader::read_load(const FrameElementReader& element) {
  const int node = find_id(element, "node", nodes_, "node");
  const fem::Vec6 v = six(element, {"fx", "fy", "fz", "mx", "my", "mz"});
  out_.cases[load_case(element)].nodes.push_back({node, v.head<3>(), v.tail<3>()});
}

double FrameReader::fraction(const FrameElementReader& element, const std::string& attribute, int member) {
  const auto distance = element.number(attribute);
  if (!distance || member < 0) return 0;
  const fem::Member& m = out_.frame.members[static_cast<std::size_t>(member)];
  if (m.from < 0 || m.to < 0) return 0;
  const double length = fem::member_length(out_.frame, member);
  if (!(length > 0)) return 0;  // said by the check of the whole
  if (*distance < -1e-9 * length || *distance > length * (1 + 1e-9)) {
    element.say(attribute, "This lies outside the member, which is " +
                               quantity_text(length, Quantity::length) + " long (0 m is its start).");
    return 0;
  }
  return std::min(1.0, std::max(0.0, *distance / length));
}

void FrameReader::read_member_load(const FrameElementReader& element) {
  fem::LineLoad load;
  load.member = find_id(element, "member", members_, "member");
  const fem::Vec6 v = six(element, {"fx", "fy", "fz", "fx-to", "fy-to", "fz-to"});
  load.at_from = v.head<3>();
  load.at_to = v.head<3>();
  const char* words[] = {"fx-to", "fy-to", "fz-to"};
  for (int i = 0; i < 3; ++i)
    if (element.has(words[i])) load.at_to[i] = v[3 + i];
  if (element.has("from")) load.from = fraction(element, "from", load.member);
  if (element.has("to")) load.to = fraction(element, "to", load.member);
  if (!(load.from < load.to) && element.has("from") != element.has("to"))
    element.say(element.has("to") ? "to" : "from", "Nothing of the member is left between from and to.");
  else if (!(load.from < load.to))
    element.say("to", "\"to\" must lie behind \"from\", seen from the member's start.");
  load.member_axes = element.word("axes", {"frame", "member"}) == "member";
  out_.cases[load_case(element)].lines.push_back(load);
}

void FrameReader::read_point_load(const FrameElementReader& element) {
  fem::MemberPointLoad load;
  load.member = find_id(element, "member", members_, "member");
  const fem::Vec6 v = six(element, {"fx", "fy", "fz", "mx", "my", "mz"});
  load.force = v.head<3>();
  load.moment = v.tail<3>();
  load.at = fraction(element, "at", load.member);
  load.member_axes = element.word("axes", {"frame", "member"}) == "member";
  out_.cases[load_case(element)].points.push_back(load);
}

void FrameReader::read_temperature(const FrameElementReader& element) {
  const int only = element.has("member") ? find_id(element, "member", members_, "member") : -1;
  const fem::Vec6 v = six(element, {"change", "gradient-y", "gradient-z"});
  const std::size_t at = load_case(element);
  std::string without;
  for (int m = 0; m < static_cast<int>(out_.frame.members.size()); ++m) {
    if (element.has("member") && m != only) continue;
    out_.cases[at].temperatures.push_back({m, v[0], v[1], v[2]});
    const int material = out_.frame.members[static_cast<std::size_t>(m)].material;
    if (material >= 0 && !(out_.frame.materials[static_cast<std::size_t>(material)].expansion != 0))
      without = out_.frame.materials[static_cast<std::size_t>(material)].name;
  }
  if (!without.empty())
    element.say("", "Material \"" + without + "\" has no \"expansion\", so a temperature does nothing to it.")
        .advice = "Add to the material, for steel: expansion=\"12e-6 1/K\"";
}

void FrameReader::read_support_movement(const FrameElementReader& element) {
  const int node = find_id(element, "node", nodes_, "node");
  const fem::Vec6 v = six(element, freedom_words());
  const std::size_t at = load_case(element);
  if (node < 0) return;
  if (own_ground_.count(node)) {
    element.say("",
                "The support of this node has its own axes; a movement is known for supports in frame "
                "axes only.");
    return;
  }
  for (int d = 0; d < 6; ++d) {
    const std::string& word = freedom_words()[static_cast<std::size_t>(d)];
    if (!element.has(word)) continue;
    bool held = false;
    for (const fem::Support& s : out_.frame.supports)
      held = held || (s.node == node && s.fix[static_cast<std::size_t>(d)]);
    if (!held)
      element.say(word, "No support holds " + word + " of this node, so nothing can move it.").advice =
          "Name it in the fix of its <support>";
  }
  out_.movements[at].push_back({node, v});
}

void FrameReader::read_gravity(const FrameElementReader& element) {
  const double value = element.number("value").value_or(0);
  if (std::abs(value) > 0 && (std::abs(value) < 0.5 || std::abs(value) > 100))
    warn_outside(element, "value", std::abs(value), 0.5, 100, "On the ground this is 9.80665 m/s2.");
  if (const auto direction = element.direction("direction"))
    out_.cases[load_case(element)].gravity += value * direction->normalized();
  gravity_line_ = element.line();
}

fem::Frame frame_in_case(const FrameFile& file, std::size_t at) {
  fem::Frame frame = file.frame;
  for (const SupportMovement& movement : file.movements.at(at))
    for (fem::Support& s : frame.supports)
      for (int d = 0; d < 6; ++d)
        if (s.node == movement.node && s.fix[static_cast<std::size_t>(d)]) s.imposed[d] += movement.by[d];
  return frame;
}

}  // namespace focalframe::cli
