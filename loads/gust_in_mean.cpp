#include "loads/gust_in_mean.h"

#include <algorithm>
#include <array>
#include <cmath>

namespace focalframe::loads {
namespace {

constexpr std::array<double, 4> periods = {3, 60, 600, 3600};

const std::array<double, 4>& factors(Exposure3s exposure) {
  static constexpr std::array<double, 4> in_land = {1, 1.49, 1.66, 1.75}, off_land = {1, 1.36, 1.52, 1.60},
                                         off_sea = {1, 1.23, 1.38, 1.45};
  return exposure == Exposure3s::in_land ? in_land : exposure == Exposure3s::off_land ? off_land : off_sea;
}

constexpr std::array<double, 13> force_from = {0,    0.3,  1.6,  3.4,  5.5,  8.0, 10.8,
                                               13.9, 17.2, 20.8, 24.5, 28.5, 32.7};

}  // namespace

std::string exposure_name(Exposure3s exposure) {
  return exposure == Exposure3s::in_land    ? "in-land"
         : exposure == Exposure3s::off_land ? "off-land"
                                            : "off-sea";
}

Exposure3s exposure_of(const Site& site) {
  switch (site.terrain) {
    case Terrain::en_0:
    case Terrain::asce_d:
      return Exposure3s::off_sea;
    case Terrain::en_1:
      return Exposure3s::off_land;
    case Terrain::power_law:
      return site.power_exponent < 0.12   ? Exposure3s::off_sea
             : site.power_exponent < 0.15 ? Exposure3s::off_land
                                          : Exposure3s::in_land;
    default:
      return Exposure3s::in_land;
  }
}

double gust_in_mean(Exposure3s exposure, double period) {
  const std::array<double, 4>& g = factors(exposure);
  const double t = std::clamp(period, periods.front(), periods.back());
  for (std::size_t i = 1; i < periods.size(); ++i)
    if (t <= periods[i])
      return g[i - 1] +
             (g[i] - g[i - 1]) * std::log(t / periods[i - 1]) / std::log(periods[i] / periods[i - 1]);
  return g.back();
}

int beaufort(double mean_speed) {
  int force = 0;
  while (force < 12 && mean_speed >= force_from[static_cast<std::size_t>(force + 1)]) ++force;
  return force;
}

double beaufort_from(int force) { return force_from[static_cast<std::size_t>(std::clamp(force, 0, 12))]; }

std::string beaufort_signs(int force) {
  static constexpr std::array<const char*, 13> signs = {
      "smoke rises straight up",
      "smoke drifts",
      "wind felt on the face, leaves rustle",
      "leaves and twigs in constant motion, light flags stand out",
      "dust and paper fly up, small branches move",
      "small trees in leaf begin to sway",
      "large branches move, wires whistle, umbrellas are hard to hold",
      "whole trees move, walking against it is hard",
      "twigs break off, walking is very hard",
      "slates and chimney pots come off",
      "trees are uprooted",
      "widespread damage",
      "hurricane"};
  return signs[static_cast<std::size_t>(std::clamp(force, 0, 12))];
}

}  // namespace focalframe::loads
