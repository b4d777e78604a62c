#include "loads/table_conventions.h"

#include <cmath>
#include <numbers>
#include <stdexcept>

#include "loads/number_text.h"
#include "loads/pose.h"

namespace focalframe::loads {

namespace {

// p = offset + sign * angle.
struct AngleMap {
  double offset, sign;
};
AngleMap angle_map(const TableConventions& c) {
  const bool face_on = c.zero == AngleZero::face_on;
  const bool fits = face_on ? c.sense == AngleSense::upwards || c.sense == AngleSense::downwards
                            : c.sense == AngleSense::leeward || c.sense == AngleSense::windward;
  if (!fits)
    throw std::invalid_argument(
        "an angle that is zero face-on grows upwards or downwards, one that is zero at the "
        "zenith leeward or windward");
  const bool forward = c.sense == AngleSense::upwards || c.sense == AngleSense::leeward;
  return {face_on ? 0 : std::numbers::pi / 2, forward ? 1.0 : -1.0};
}

double force_scale(const TableConventions& c) { return c.area_ratio * c.pressure_ratio; }

}  // namespace

double to_pitch(double angle, const TableConventions& conventions) {
  const AngleMap map = angle_map(conventions);
  return wrap_angle(map.offset + map.sign * angle);
}

Coefficients to_coefficients(const AuthorRow& row, const TableConventions& conventions) {
  const double p = to_pitch(row.angle, conventions), scale = force_scale(conventions);
  const double first = row.first * conventions.first_sign * scale;
  const double second = row.second * conventions.second_sign * scale;
  Coefficients c{first, second, row.moment * conventions.moment_sign * scale * conventions.length_ratio};
  if (conventions.wind_axes) {
    c.Ca = first * std::cos(p) - second * std::sin(p);
    c.Cs = first * std::sin(p) + second * std::cos(p);
  }
  if (conventions.about_axis) c.Cm -= conventions.axis_behind * c.Cs;
  return c;
}

AuthorRow to_author(double pitch, const Coefficients& c, const TableConventions& conventions) {
  const AngleMap map = angle_map(conventions);
  const double scale = force_scale(conventions);
  AuthorRow row{wrap_angle(map.sign * (pitch - map.offset)), c.Ca, c.Cs, c.Cm};
  if (conventions.about_axis) row.moment += conventions.axis_behind * c.Cs;
  if (conventions.wind_axes) {
    row.first = c.Ca * std::cos(pitch) + c.Cs * std::sin(pitch);
    row.second = -c.Ca * std::sin(pitch) + c.Cs * std::cos(pitch);
  }
  row.first *= conventions.first_sign / scale;
  row.second *= conventions.second_sign / scale;
  row.moment *= conventions.moment_sign / (scale * conventions.length_ratio);
  return row;
}

std::vector<std::string> describe(const TableConventions& c) {
  // Adding 0 turns -0 into 0.
  const auto degrees = [&](double pitch) {
    return to_author(pitch, {}, c).angle * 180 / std::numbers::pi + 0.0;
  };
  const double at0 = degrees(0), at90 = degrees(std::numbers::pi / 2), at180 = degrees(std::numbers::pi);
  std::vector<std::string> lines{
      "wind ->    )    angle " + number_text(at0, 4) + " deg: the hollow face meets the wind",
      "wind ->   \\_/   angle " + number_text(at90, 4) + " deg: the face looks up",
      "wind ->   (     angle " + number_text(at180, 4) + " deg: the back meets the wind"};
  const auto sign = [](double s, const std::string& plus, const std::string& minus) {
    return s > 0 ? plus : minus;
  };
  if (c.wind_axes) {
    lines.push_back("first force > 0 acts " + sign(c.first_sign, "downwind", "upwind") +
                    ", second > 0 acts " + sign(c.second_sign, "up", "down"));
  } else {
    lines.push_back("first force > 0 pushes " +
                    sign(c.first_sign, "from the hollow to the back", "from the back to the hollow") +
                    ", second > 0 acts in the aperture plane, " + sign(c.second_sign, "downwind", "upwind") +
                    " when the face looks up");
  }
  std::string about =
      c.about_axis ? "the axis, " + number_text(c.axis_behind, 4) + " W behind the vertex" : "the vertex";
  lines.push_back(
      "moment about " + about + ", > 0 turns the face " +
      sign(c.moment_sign, "from the wind over the zenith to lee", "from lee over the zenith to the wind"));
  if (c.area_ratio != 1 || c.length_ratio != 1 || c.pressure_ratio != 1)
    lines.push_back("reference area " + number_text(c.area_ratio, 4) + " of the aperture, length " +
                    number_text(c.length_ratio, 4) + " of its width, velocity pressure " +
                    number_text(c.pressure_ratio, 4) + " of that at axis height");
  return lines;
}

}  // namespace focalframe::loads
