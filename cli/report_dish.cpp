#include "cli/report_dish.h"

#include <algorithm>
#include <cmath>

#include "cli/messages.h"
#include "cli/report_detail.h"
#include "cli/report_text.h"
#include "cli/report_units.h"
#include "fem/units.h"

namespace focalframe::cli {
namespace {

using models::DishAssessment;
using models::DishForce;
using models::DishOpticalRow;
using models::Quantity;

std::string section(const char* title) { return std::string("\n") + title + "\n"; }

const DishOpticalRow* worst_of(const DishAssessment& a) {
  return a.worst < 0 ? nullptr : &a.optics[static_cast<std::size_t>(a.worst)];
}

// Where the loss comes from, and what the weight does over the elevations.
std::string after_focus(const DishAssessment& a) {
  const DishOpticalRow* worst = worst_of(a);
  if (!worst) return {};
  const auto& r = worst->result;
  std::string out;
  if (a.radio)
    out += text_of("  of that: surface %.2f dB (as built %.2f), focus %.2f, pointing %.2f\n", r.surface_db,
                   a.built_db, r.defocus_db, r.pointing_db);
  else
    out += text_of("  the perfect dish catches %.1f %%; weight and wind cost %.1f points\n",
                   100 * a.common.undeformed, 100 * (a.common.undeformed - r.intercept));
  const auto turn = [](const Eigen::Vector2d& v) { return v.norm() / mrad; };
  const auto& p = r.pointing;
  out += text_of("  beam turned there %.2f mrad: ground %.2f, bearing %.2f, drive %.2f, dish %.2f\n",
                 turn(p.total()), turn(p.base), turn(p.bearing), turn(p.drive), turn(p.dish));
  if (std::isfinite(a.gravity.best_set))
    out += text_of("  weight alone, %.0f to %.0f deg: up to %s; set true at %.0f deg: %s\n",
                   a.gravity.points.front().elevation / deg, a.gravity.points.back().elevation / deg,
                   shown(a.gravity.worst, a.radio ? Quantity::length : Quantity::angle, 1).c_str(),
                   a.gravity.best_set / deg,
                   shown(a.gravity.worst_at_best, a.radio ? Quantity::length : Quantity::angle, 1).c_str());
  return out;
}

std::string geometry(const DishAssessment& a) {
  std::string out = section("The dish");
  out += text_of("  diameter %.3f m, focal length %.3f m (f/D %.3f), rim angle %.1f deg\n", a.diameter,
                 a.focal_length, a.focal_length / a.diameter, a.rim_angle / deg);
  out += text_of("  aperture %.2f m2 (what coefficients are multiplied by), skin on %.2f m2 of it\n",
                 a.common.mirror_area, a.surface_area);
  out += text_of(
      "  what turns with the elevation %.0f kg, of it counterweight %.0f kg; yoke %.0f kg, base %.0f kg\n",
      a.common.mass, a.counterweight, a.yoke_mass, a.base_mass);
  out += text_of("  centre of gravity %.0f mm %s the elevation axis: %s facing the horizon\n",
                 std::abs(a.centre_behind_axis) / mm, a.centre_behind_axis >= 0 ? "behind" : "in front of",
                 shown(a.weight_torque, Quantity::torque).c_str());
  out += text_of("  lowest frequency at the stow pose %.2f Hz\n", a.frequency);
  if (a.radio)
    out += text_of("  wavelength %.1f mm, beam %.2f mrad (%.3f deg) wide at half power\n", a.wavelength / mm,
                   a.beamwidth / mrad, a.beamwidth / deg);
  else
    out += text_of("  perfect dish catches %.2f %%, spread of the beam %.2f mrad rms (1-D)\n",
                   100 * a.common.undeformed, a.common.beam_rms / mrad);
  return out +
         "  Elevation: 0 deg looks at the horizon, 90 deg at the zenith. Wind: degrees clockwise from\n"
         "  where the dish faces; \"face\" strikes the hollow side, \"back\" the back, \"side\" edge-on.\n";
}

std::string optics(const DishAssessment& a) {
  std::string out = section(a.radio ? "Gain, pose by pose (OPERATE, 10 min mean)"
                                    : "Light, pose by pose (OPERATE, 10 min mean)");
  out += a.radio ? "  state                     pattern       lost  surface  aim off  h.path  focus across\n"
                   "                                            dB       dB     mrad      mm     mm     mm\n"
                 : "  state                     pattern      light    slope  aim off          focus across\n"
                   "                                             %     mrad     mrad             mm     mm\n";
  for (const DishOpticalRow& row : a.optics) {
    const auto& r = row.result;
    const std::string place = row.calm ? text_of("%.0f deg, calm", row.state.state.elevation / deg)
                                       : models::place_text(row.state).substr(8);
    const std::string pattern = row.calm ? "weight only" : models::spread_text(row.spread);
    out += a.radio ? text_of("  %-25s %-11s %6.3f   %6.3f   %6.2f  %6.3f %6.2f %6.2f\n", place.c_str(),
                             pattern.c_str(), r.gain_loss, r.surface_db, r.aim_error / mrad, r.half_path / mm,
                             r.focus_along / mm, r.focus_across / mm)
                   : text_of("  %-25s %-11s %6.2f   %6.2f   %6.2f         %6.2f %6.2f\n", place.c_str(),
                             pattern.c_str(), 100 * r.intercept, r.slope / mrad, r.aim_error / mrad,
                             r.focus_along / mm, r.focus_across / mm);
  }
  return out +
         "  aim off: what the drive cannot learn, half the play in; focus, across: receiver or feed from\n"
         "  the best-fit focus along and across the axis; all against the set-true pose, hub motion out.\n";
}

std::string gravity(const DishAssessment& a) {
  std::string out = section("What the weight does (against the set-true pose)");
  out +=
      a.radio ? "  elevation   half path   beam up   focus\n" : "  elevation       slope   beam up   focus\n";
  for (const models::GravityPoint& p : a.gravity.points)
    out += text_of("  %5.1f deg %8.3f %s %6.2f mrad %5.2f mm\n", p.elevation / deg,
                   a.radio ? p.surface / mm : p.surface / mrad, a.radio ? "mm  " : "mrad",
                   p.pointing.x() / mrad, p.focus_along / mm);
  out += text_of("  set true at %.0f deg it stays below %.3f %s instead of %.3f\n", a.gravity.best_set / deg,
                 a.gravity.worst_at_best / (a.radio ? mm : mrad), a.radio ? "mm" : "mrad",
                 a.gravity.worst / (a.radio ? mm : mrad));
  if (std::isfinite(a.gravity.left_over))
    out += text_of("  pointing table: up %+.3f %+.3f cos e %+.3f sin e mrad; leaves %.4f mrad rms\n",
                   a.gravity.offset / mrad, a.gravity.sag_cos / mrad, a.gravity.sag_sin / mrad,
                   a.gravity.left_over / mrad);
  if (std::isfinite(a.bowl.water))
    out += text_of("  rain with blocked drains at stow: %.0f litres, %s; %.0f %% of yield at %s\n",
                   1000 * a.bowl.water, shown(a.bowl.water_force, Quantity::force).c_str(),
                   100 * a.bowl.water_stress_used, a.bowl.water_part.c_str());
  return out;
}

std::string drive(const DishAssessment& a) {
  std::string out = section(a.slewing ? "Elevation drive: torque over elevation" : "Actuator over elevation");
  const Quantity q = a.slewing ? Quantity::torque : Quantity::force;
  out += a.slewing
             ? "  elevation     weight     moving    holding  back-driving\n"
             : "  elevation   length    arm     weight     moving    holding  back-driving  Euler load\n";
  for (const auto& [elevation, at] : a.strength.drive) {
    out += text_of("  %5.1f deg", elevation / deg);
    if (!a.slewing) out += text_of("  %6.0f mm %5.0f mm", at.length / mm, std::abs(at.arm) / mm);
    out += text_of(" %10s %10s %10s %10s", shown(at.weight, q).c_str(), shown(at.moving, q).c_str(),
                   shown(at.holding, q).c_str(), shown(at.back_driving, q).c_str());
    if (!a.slewing) out += text_of(" %10s", shown(at.buckling, q).c_str());
    out += "\n";
  }
  out +=
      "  weight: push (or torque upwards) that the weight alone asks for; moving: with bearing friction;\n"
      "  back-driving: what a unit that does not lock itself has to hold by its brake.\n";
  return out;
}

// Greatest gust by elevation and direction, then where to park.
std::string parking(const DishAssessment& a) {
  if (a.parking.empty()) return {};
  std::string out = section("How much wind it takes at rest (3 s gust at the axis, m/s)");
  out += "  wind from, deg     0    45    90   135   180   225   270   315  what gives first\n";
  for (std::size_t i = 0; i + 7 < a.parking.size(); i += 8) {
    out += text_of("  looks at %3.0f deg", a.parking[i].elevation / deg);
    std::size_t weakest = i;
    for (std::size_t k = i; k < i + 8; ++k) {
      out += std::isfinite(a.parking[k].gust) ? text_of(" %5.1f", a.parking[k].gust) : "  >100";
      if (a.parking[k].gust < a.parking[weakest].gust) weakest = k;
    }
    out += "  " + a.parking[weakest].governs + "\n";
  }
  const auto pose = [](const char* what, const models::DishStowPose& p) {
    return text_of("  %s %.0f deg, %s: %.1f m/s, then: %s\n", what, p.elevation / deg, p.azimuth.c_str(),
                   p.gust, p.governs.c_str());
  };
  return out + pose("asked to park at", a.stow.asked) +
         pose("best with the wind from anywhere:", a.stow.any) +
         pose("best with the azimuth turned to the wind:", a.stow.turned);
}

std::string force_line(const char* name, const DishForce& f, Quantity q) {
  return text_of("  %-32s %11s  %s\n", name, shown(f.value, q).c_str(), models::place_text(f.state).c_str());
}

std::string loads_text(const DishAssessment& a) {
  std::string out = section("Stress and buckling, worst of each group");
  out += wrapped(a.common.rule, 2);
  for (const auto& [group, use] : a.strength.stress)
    out += text_of("  %-13s %6.0f of %4.0f MPa  %-24s %s\n", group.c_str(), use.value / MPa,
                   use.allowed / MPa, models::place_text(use.state).c_str(), use.part.c_str());
  for (const auto& [group, use] : a.strength.buckling)
    if (!use.part.empty())
      out += text_of("  %-13s %8s of %8s pushed  %-24s %s\n", group.c_str(),
                     shown(use.value, Quantity::force).c_str(), shown(use.allowed, Quantity::force).c_str(),
                     models::place_text(use.state).c_str(), use.part.c_str());
  out += section("Mount, unfactored, 3 s gust with size factor");
  out += force_line("elevation bearing, radial", a.strength.bearing, Quantity::force) +
         force_line("azimuth torque, moving", a.strength.azimuth_moving, Quantity::torque) +
         force_line("azimuth torque, holding", a.strength.azimuth_holding, Quantity::torque);
  out += section("Ground reactions at ground level under the axis (what the ground puts on the base)");
  const char* names[6] = {"along the elevation axis (X)",
                          "to where it faces (Y)",
                          "upwards (Z)",
                          "moment about X",
                          "moment about Y",
                          "moment about Z"};
  for (std::size_t i = 0; i < 6; ++i) {
    const Quantity q = i < 3 ? Quantity::force : Quantity::torque;
    out += force_line(names[i], a.strength.greatest[i], q) + force_line("", a.strength.least[i], q);
  }
  return out + force_line("overturning, any direction", a.strength.overturning, Quantity::torque) +
         force_line("greatest pull on one foot", a.strength.uplift, Quantity::force);
}

std::string proof(const DishAssessment& a) {
  const models::Proof& p = a.common.proof;
  std::string out = section("Proof");
  out += text_of("  wind force %.1f N, q A C %.1f N; greatest difference of forces and moment %.0e\n",
                 p.wind_force, p.q_area_c, p.load_error);
  out += text_of("  loads and reactions balance to %.0e; residual %.0e; condition about %.0e; %d freedoms\n",
                 p.balance, p.residual, p.condition, a.common.freedoms);
  out += text_of("  half-size rib pieces change the slope by %.3f %% and the %s by %.4f %s\n",
                 100 * p.slope_change, a.radio ? "loss" : "light",
                 a.radio ? p.intercept_change : 100 * p.intercept_change, a.radio ? "dB" : "points");
  return out +
         text_of("  in-plane force put on the hub beside the pressures: up to %.3f q A\n", a.residual_side);
}

}  // namespace

std::string dish_summary_text(const DishAssessment& a, const std::string& hash) {
  const std::string head = text_of("%.22s: %s %.3g m, dish %.0f kg, %.1f kg/m2, %.1f Hz",
                                   a.common.name.c_str(), a.radio ? "antenna" : "solar dish", a.diameter,
                                   a.common.mass - a.counterweight, a.mass_per_area, a.frequency);
  std::string out = text_of("%-65s input %.8s\n", head.c_str(), hash.c_str()) + verdict_line(a.common);
  out += questions_text(a.common, after_focus(a)) + wind_line(a.common);
  out += text_of("Proof %s = q A C to %.0e, balance %.0e; half-size pieces: slope %.2g %%\n",
                 shown(a.common.proof.wind_force, Quantity::force).c_str(), a.common.proof.load_error,
                 a.common.proof.balance, std::abs(100 * a.common.proof.slope_change));
  return out + text_of("CAUTION %s: %s confidence. A licensed engineer signs.\n", a.common.table.c_str(),
                       a.common.table_confidence.c_str());
}

std::string dish_parking_text(const DishAssessment& a) { return parking(a); }

std::string dish_detail_text(const DishAssessment& a) {
  return geometry(a) + wind_chain_text(a.common) + optics(a) + gravity(a) + drive(a) + parking(a) +
         loads_text(a) + proof(a) + closing_text(a.common);
}

}  // namespace focalframe::cli
