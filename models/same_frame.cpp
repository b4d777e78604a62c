#include "models/same_frame.h"

#include <algorithm>
#include <array>
#include <cmath>
#include <string>

#include "models/schema.h"

namespace focalframe::models {
namespace {

// First words of the element paths that shape the frame or its unit load cases.
constexpr std::array<const char*, 18> shaping = {
    "parabola", "row",        "torque-tube",    "ribs",     "purlins",     "end-plates",
    "mirror",   "receiver",   "counterweights", "pylons",   "snow",        "water",
    "ice",      "earthquake", "temperature",    "erection", "maintenance", "bare-members"};

bool shapes_frame(const std::string& element, const std::string& attribute) {
  if (element == "drive") return attribute == "stiffness" || attribute == "mass" || attribute == "friction";
  const std::string first = element.substr(0, element.find('/'));
  return std::find(shaping.begin(), shaping.end(), first) != shaping.end();
}

bool equal(double a, double b) { return a == b || (std::isnan(a) && std::isnan(b)); }

bool equal(const Slot& a, const Slot& b) {
  return std::visit(
      [&](auto* left) {
        auto* right = std::get<decltype(left)>(b);
        if constexpr (std::is_same_v<decltype(left), double*>)
          return equal(*left, *right);
        else
          return *left == *right;
      },
      a);
}

}  // namespace

bool same_frame(const TroughDesign& a, const TroughDesign& b) {
  TroughDesign left = a, right = b;
  for (const Element& element : trough_schema())
    for (const Field& field : element.fields) {
      if (element.repeats || !shapes_frame(element.path, field.name)) continue;
      if (!equal(field.slot(left), field.slot(right))) return false;
      if (field.word_slot && *field.word_slot(left) != *field.word_slot(right)) return false;
    }
  return true;
}

}  // namespace focalframe::models
