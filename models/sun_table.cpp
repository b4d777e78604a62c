#include "models/sun_table.h"

#include <sstream>
#include <stdexcept>
#include <vector>

#include "fem/units.h"

namespace focalframe::models {

SunShape sun_of_table(const std::string& text) {
  std::vector<double> angle, radiance;
  std::istringstream entries(text);
  for (std::string entry; std::getline(entries, entry, ',');) {
    std::istringstream in(entry);
    double a = 0, r = 0;
    std::string unit, rest;
    if (!(in >> a >> unit >> r) || in >> rest || (unit != "mrad" && unit != "deg"))
      throw std::invalid_argument("\"" + entry + "\" is not an angle with mrad or deg and a radiance");
    angle.push_back(a * (unit == "mrad" ? mrad : deg));
    radiance.push_back(r);
  }
  return table_sun(angle, radiance);
}

}  // namespace focalframe::models
