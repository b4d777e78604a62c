#include "fem/text.h"

#include <array>
#include <cstdio>
#include <stdexcept>

#include "fem/frame.h"

namespace focalframe::fem {

std::string number(double value) {
  std::array<char, 32> text{};
  std::snprintf(text.data(), text.size(), "%g", value);
  return text.data();
}

std::string node_words(const Frame& frame, int node) {
  const bool known = node >= 0 && node < static_cast<int>(frame.nodes.size());
  const std::string name = known ? frame.nodes[static_cast<std::size_t>(node)].name : "";
  return name.empty() ? "node number " + std::to_string(node) : "node '" + name + "'";
}

std::string member_words(const Frame& frame, int member) {
  const bool known = member >= 0 && member < static_cast<int>(frame.members.size());
  const std::string name = known ? frame.members[static_cast<std::size_t>(member)].name : "";
  return name.empty() ? "member number " + std::to_string(member) : "member '" + name + "'";
}

const char* dof_name(int dof) {
  static constexpr std::array<const char*, 6> names{"ux", "uy", "uz", "rx", "ry", "rz"};
  return names.at(static_cast<std::size_t>(dof));
}

const char* dof_words(int dof) {
  static constexpr std::array<const char*, 6> words{"moves along x", "moves along y", "moves along z",
                                                    "turns about x", "turns about y", "turns about z"};
  return words.at(static_cast<std::size_t>(dof));
}

void require(bool condition, const std::string& message) {
  if (!condition) throw std::invalid_argument(message);
}

}  // namespace focalframe::fem
