#include "cli/quantity.h"

#include <catch2/catch.hpp>
#include <cmath>
#include <numbers>

#include "cli/unit.h"

using namespace focalframe::cli;

namespace {

struct Accepted {
  const char* text;
  Quantity quantity;
  double si;
};

constexpr double deg = std::numbers::pi / 180;

}  // namespace

TEST_CASE("values are read with units as people write them", "[quantity]") {
  const Accepted cases[] = {
      {"2.4 m", Quantity::length, 2.4},
      {"2.4m", Quantity::length, 2.4},
      {"  139.7 mm ", Quantity::length, 0.1397},
      {"+3 cm", Quantity::length, 0.03},
      {"-5 mm", Quantity::length, -0.005},
      {"\u22125 mm", Quantity::length, -0.005},  // true minus
      {"2.4\u00a0m", Quantity::length, 2.4},     // no-break space
      {"2.4\u202fm", Quantity::length, 2.4},     // narrow no-break space
      {"1e3 mm", Quantity::length, 1.0},
      {".5 m", Quantity::length, 0.5},
      {"7 ft 10 in", Quantity::length, 94 * 0.0254},
      {"-7 ft 10 in", Quantity::length, -94 * 0.0254},
      {"1 1/2 in", Quantity::length, 1.5 * 0.0254},
      {"1-1/2 in", Quantity::length, 1.5 * 0.0254},
      {"3/8 in", Quantity::length, 0.375 * 0.0254},
      {"1½ in", Quantity::length, 1.5 * 0.0254},
      {"6 ft 3 1/2 in", Quantity::length, 75.5 * 0.0254},
      {"90 deg", Quantity::angle, 90 * deg},
      {"90°", Quantity::angle, 90 * deg},
      {"-95°", Quantity::angle, -95 * deg},
      {"3 mrad", Quantity::angle, 3e-3},
      {"14 kg", Quantity::mass, 14},
      {"30 lbm", Quantity::mass, 30 * 0.45359237},
      {"1.6 kg/m2", Quantity::area_density, 1.6},
      {"1.6 kg/m²", Quantity::area_density, 1.6},
      {"7850 kg/m3", Quantity::density, 7850},
      {"7.85 g/cm^3", Quantity::density, 7850},
      {"133 N", Quantity::force, 133},
      {"30 lbf", Quantity::force, 30 * 0.45359237 * 9.80665},
      {"3.5 kN m", Quantity::torque, 3500},
      {"3.5kNm", Quantity::torque, 3500},
      {"3.5 kN*m", Quantity::torque, 3500},
      {"3.5 kN·m", Quantity::torque, 3500},
      {"12 Nm", Quantity::torque, 12},
      {"10600 lbf in", Quantity::torque, 10600 * 0.45359237 * 9.80665 * 0.0254},
      {"796 lbf ft", Quantity::torque, 796 * 0.45359237 * 9.80665 * 0.3048},
      {"355 MPa", Quantity::pressure, 355e6},
      {"355 N/mm2", Quantity::pressure, 355e6},
      {"355 N/mm²", Quantity::pressure, 355e6},
      {"1013 hPa", Quantity::pressure, 101300},
      {"8 kN/mm", Quantity::stiffness, 8e6},
      {"2 MN/m", Quantity::stiffness, 2e6},
      {"1.5 MN m/rad", Quantity::twist_stiffness, 1.5e6},
      {"20 kNm/deg", Quantity::twist_stiffness, 20e3 / deg},
      {"10 m/s", Quantity::speed, 10},
      {"36 km/h", Quantity::speed, 10},
      {"20 mph", Quantity::speed, 20 * 0.44704},
      {"10 kn", Quantity::speed, 10 * 1852.0 / 3600},
      {"0.75 deg/s", Quantity::turning_rate, 0.75 * deg},
      {"45 deg/min", Quantity::turning_rate, 0.75 * deg},
      {"10 min", Quantity::time, 600},
      {"5 min 40 s", Quantity::time, 340},
      {"1 h", Quantity::time, 3600},
      {"20 degC", Quantity::temperature, 293.15},
      {"-20 °C", Quantity::temperature, 253.15},
      {"68 degF", Quantity::temperature, 293.15},
      {"300 K", Quantity::temperature, 300},
      {"1.57 1/rad", Quantity::per_angle, 1.57},
      {"1.57 /rad", Quantity::per_angle, 1.57},
      {"12e-6 1/K", Quantity::expansion, 12e-6},
      {"0.97", Quantity::ratio, 0.97},
      {"95 %", Quantity::ratio, 0.95},
      {"95%", Quantity::ratio, 0.95},
      {"12", Quantity::count, 12},
      {"-1", Quantity::count, -1},
      {"10 in2", Quantity::area, 10 * 0.0254 * 0.0254},
      {"100 in4", Quantity::area_moment, 100 * std::pow(0.0254, 4)},
      {"27.2 cm^4", Quantity::area_moment, 27.2e-8},
      {"54 cm3", Quantity::section_modulus, 54e-6},
      {"0.5 kN/m", Quantity::line_load, 500},
      {"9.80665 m/s^2", Quantity::acceleration, 9.80665},
      {"9.80665 m/s2", Quantity::acceleration, 9.80665},
  };
  for (const Accepted& c : cases) {
    INFO(c.text);
    const ParsedQuantity parsed = parse_quantity(c.text, c.quantity);
    CHECK(parsed.problem == "");
    CHECK(parsed.value == Approx(c.si).epsilon(1e-12).margin(1e-15));
  }
}

TEST_CASE("the word rigid is a stiffness without end, and nothing else", "[quantity]") {
  CHECK(std::isinf(parse_quantity("rigid", Quantity::stiffness).value));
  CHECK(std::isinf(parse_quantity("rigid", Quantity::twist_stiffness).value));
  CHECK_FALSE(parse_quantity("rigid", Quantity::length).ok());
}

namespace {

struct Refused {
  const char* text;
  Quantity quantity;
  const char* problem;                   // part of what is said
  std::vector<std::string> suggestions;  // all of them, in order
};

}  // namespace

TEST_CASE("values that mean two things or nothing are refused with what they may mean", "[quantity]") {
  const Refused cases[] = {
      {"2,4 m", Quantity::length, "decimal mark is a point", {"2.4 m"}},
      {"2.400,5 m", Quantity::length, "decimal mark is a point", {"2400.5 m"}},
      {"2,400.5 mm", Quantity::length, "decimal mark is a point", {"2400.5 mm"}},
      {"1,200 mm", Quantity::length, "part thousands", {"1.200 mm", "1200 mm"}},
      {"1.200.000 Pa", Quantity::pressure, "without marks", {"1200000 Pa"}},
      {"2 400 mm", Quantity::length, "without spaces", {"2400 mm"}},
      {"30 lb", Quantity::mass, "30 lbm = 13.61 kg, 30 lbf = 133.4 N. A mass is wanted", {"30 lbm"}},
      {"30 lbs", Quantity::force, "can be a mass or a force", {"30 lbf"}},
      {"100 ft lb", Quantity::torque, "can be a mass or a force", {"100 ft lbf"}},
      {"100 ft-lb", Quantity::torque, "can be a mass or a force", {"100 ft-lbf"}},
      {"2 t", Quantity::mass, "1000 kg (metric), 907 kg (short)", {"2000 kg", "1814 kg"}},
      {"2 tons", Quantity::mass, "1016 kg (long)", {"2000 kg", "1814 kg"}},
      {"16 ga", Quantity::length, "gauge number", {}},
      {"16 gauge", Quantity::length, "gauge number", {}},
      {"6 inch pipe", Quantity::length, "168.3 mm outside", {"168.3 mm"}},
      {"DN 150", Quantity::length, "168.3 mm outside", {"168.3 mm"}},
      {"1 1/2 inch pipe", Quantity::length, "nominal pipe size", {"48.3 mm"}},
      {"1.5 mN m", Quantity::torque, "thousandth of a newton", {"1.5 MN m", "1.5 kN m"}},
      {"1.5 mN m/rad", Quantity::twist_stiffness, "thousandth of a newton", {"1.5 MN m/rad", "1.5 kN m/rad"}},
      {"94\"", Quantity::length, "Marks for feet and inches", {"94 in"}},
      {"7'10\"", Quantity::length, "Marks for feet and inches", {"7 ft 10 in"}},
      {"NaN m", Quantity::length, "not a number to work with", {}},
      {"inf", Quantity::stiffness, "not a number to work with", {"rigid"}},
      {"-inf m", Quantity::length, "not a number to work with", {}},
      {"0x10 mm", Quantity::length, "decimal digits", {}},
      {"", Quantity::length, "empty", {}},
      {"   ", Quantity::length, "empty", {}},
      {"wide", Quantity::length, "No number", {}},
      {"about 3 mm", Quantity::length, "No number", {"3 mm"}},
      {"1e999 m", Quantity::length, "No number", {}},
      {"3 mmm", Quantity::length, "not a unit known here", {"3 mm"}},
      {"3 MM", Quantity::length, "not a unit known here", {"3 mm"}},
      {"3 mm thick", Quantity::length, "not a unit known here", {"3 mm"}},
      {"3 kg", Quantity::length, "\"kg\" is a mass. A length is wanted", {}},
      {"30 kg", Quantity::force, "\"kg\" is a mass", {"294.2 N"}},
      {"3.5 kn m", Quantity::torque, "does not fit here", {"3.5 kN m"}},
      {"1.5 MN m", Quantity::twist_stiffness, "\"MN m\" is a moment", {"1.5 MN m/rad"}},
      {"90", Quantity::angle, "An angle needs its unit: deg, mrad or rad", {"90 deg", "90 mrad", "90 rad"}},
      {"3.5", Quantity::count, "whole number", {"4"}},
      {"5 m", Quantity::count, "whole number", {"5"}},
      {"5 m", Quantity::ratio, "plain number or per cent", {}},
      {"10 in 7 ft", Quantity::length, "smaller than the one before", {}},
      {"5 m 3", Quantity::length, "needs its unit", {}},
      {"0/0 in", Quantity::length, "not a unit", {}},
  };
  for (const Refused& c : cases) {
    INFO(c.text);
    const ParsedQuantity parsed = parse_quantity(c.text, c.quantity);
    CHECK_FALSE(parsed.ok());
    CHECK(std::isnan(parsed.value));
    CHECK_THAT(parsed.problem, Catch::Contains(c.problem));
    CHECK(parsed.suggestions == c.suggestions);
  }
}

TEST_CASE("an angle in a unit is a dimension of its own, so N m and N m/rad are told apart",
          "[quantity][unit]") {
  CHECK(parse_unit("N m")->dimension != parse_unit("N m/rad")->dimension);
  CHECK(parse_unit("N m/deg")->dimension == parse_unit("MN m/rad")->dimension);
  CHECK_FALSE(parse_unit("m/"));
  CHECK_FALSE(parse_unit("/"));
  CHECK_FALSE(parse_unit(""));
  CHECK_FALSE(parse_unit("m//s"));
  CHECK_FALSE(parse_unit("degC/m"));
}

TEST_CASE("values are written in units of customary size", "[quantity]") {
  CHECK(quantity_text(0.06985, Quantity::length) == "69.85 mm");
  CHECK(quantity_text(2.4, Quantity::length) == "2.4 m");
  CHECK(quantity_text(4.0, Quantity::length, 0.06985) == "4000 mm");
  CHECK(quantity_text(3500, Quantity::torque) == "3.5 kN m");
  CHECK(quantity_text(235e6, Quantity::pressure) == "235 MPa");
  CHECK(quantity_text(std::numeric_limits<double>::infinity(), Quantity::stiffness) == "rigid");
  CHECK(quantity_text(std::nan(""), Quantity::length) == "not given");
  CHECK(number_text(12345.0) == "12345");
}
