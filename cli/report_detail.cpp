#include "cli/report_detail.h"

#include <cmath>

#include "cli/messages.h"
#include "cli/report_actions.h"
#include "cli/report_optics.h"
#include "cli/report_units.h"
#include "fem/units.h"
#include "models/quantity.h"

namespace focalframe::cli {
namespace {

using models::Assessment;
using models::Quantity;

std::string section(const char* title) { return std::string("\n") + title + "\n"; }

std::string geometry(const Assessment& a) {
  std::string out = section("The row");
  out += text_of("  aperture %.3f m, length %.2f m, focal length %.3f m, rim angle %.1f deg\n", a.aperture,
                 a.length, a.focal_length, a.rim_angle / deg);
  out +=
      text_of("  mirror %.2f m2 (flat aperture between the end ribs: what coefficients are multiplied by)\n",
              a.mirror_area);
  if (std::isfinite(a.tube_torsion))
    out += text_of("  torsional stiffness of the torque tube GJ %.3g kN m2\n", a.tube_torsion / 1e3);
  out += text_of("  what turns %.0f kg, pylons and heads %.0f kg\n", a.mass, a.stand_mass);
  out += text_of("  rotation axis %.0f mm %s the mirror vertex; centre of gravity %.0f mm %s the axis\n",
                 std::abs(a.axis_to_vertex) / mm, a.axis_to_vertex >= 0 ? "behind" : "in front of",
                 std::abs(a.centre_below_axis) / mm, a.centre_below_axis >= 0 ? "behind" : "in front of");
  out += text_of("  weight turns the row with %s when it faces the horizon\n",
                 shown(a.weight_torque, Quantity::torque).c_str());
  if (std::isfinite(a.balancing_counterweight))
    out += text_of("  counterweights of %.1f kg each at the present lever would balance it\n",
                   a.balancing_counterweight);
  out += text_of("  light caught by the perfect trough %.2f %%, spread of the beam %.2f mrad rms (1-D)\n",
                 100 * a.undeformed, a.beam_rms / mrad);
  out +=
      "  Elevation: 0 deg looks at the horizon on the +Y side, 90 deg at the zenith, above 90 deg\n"
      "  it leans to -Y. \"face\": the wind strikes the concave side; \"back\": the convex side.\n";
  return out;
}

std::string winds(const Assessment& a) {
  std::string out = wind_chain_text(a);
  out += text_of("  zone %s; greatest moment of the row about its axis %.3f q W2 L on the gust (cs in)\n",
                 a.zone.c_str(), a.row_moment_coefficient);
  if (std::isfinite(a.rated_moment_coefficient))
    out += text_of("  the drive's moving rating is worth %.3f q W2 L at the OPERATE gust\n",
                   a.rated_moment_coefficient);
  out += worked_wind_text(a);
  if (std::isfinite(a.divergence_speed))
    out += text_of("  the row would wind itself up at a mean wind of %.1f m/s (%s)\n", a.divergence_speed,
                   models::place_text(a.divergence_state).c_str());
  return out;
}

std::string optics(const Assessment& a) {
  std::string out = section("Light, pose by pose (OPERATE; twist against the sensor)");
  out += "  judged in the " + a.optics_averaging + " wind, actions unfactored\n";
  out +=
      "  deg wind    pattern       light  row-mean   twist  slope  focus  recvr    rim\n"
      "                                %     aim, %    mrad   mrad     mm     mm     mm\n";
  for (const models::OpticalRow& row : a.optics) {
    const auto& r = row.result;
    const std::string place = models::place_text(row.state);
    const std::string face = row.calm ? "calm" : place.substr(place.find(", ") + 2);
    out += text_of("  %3.0f %-7s %-12s %6.2f    %6.2f  %6.2f %6.2f %6.2f %6.2f %6.2f\n",
                   row.state.elevation / deg, face.c_str(),
                   row.calm ? "weight only" : models::spread_text(row.spread).c_str(), 100 * r.intercept,
                   100 * r.intercept_row_mean, r.worst_twist / mrad, r.slope / mrad, r.focal_change / mm,
                   r.receiver_shift / mm, r.rim_deflection / mm);
    if (!row.also.empty()) out.insert(out.size() - 1, "  " + row.also);
  }
  if (a.worst_light >= 0) {
    const auto& r = a.optics[static_cast<std::size_t>(a.worst_light)].result;
    std::string modules = "least light, module by module:";
    for (std::size_t i = 0; i < r.module_intercept.size(); ++i)
      modules += text_of(" %.1f%% (%+.1f mrad)", 100 * r.module_intercept[i], r.module_twist[i] / mrad);
    out += wrapped(modules, 2);
  }
  out +=
      "  slope: rms of the mirror normal across the trough, every section's tilt, focus out; worst module;\n"
      "  focus: change of the best-fit focal length; recvr: receiver from the moved focus;\n"
      "  rim: mirror at the rib tips along its normal, against the tube.\n";
  return out;
}

std::string loads_text(const Assessment& a) {
  std::string out = section("Stress, worst of each group");
  out += wrapped(a.rule, 2);
  for (const auto& [group, use] : a.strength.groups)
    out +=
        text_of("  %-15s %6.0f of %4.0f MPa  %s\n", group.c_str(), use.stress / MPa, use.allowed / MPa,
                models::place_text(use.state).c_str()) +
        wrapped(use.part + "; " + use.combination + "; " + models::spread_text(use.spread) + " pattern", 18);
  if (!a.strength.buckling.empty())
    out += section("Buckling of members, worst of each group") +
           wrapped(
               "EN 1993-1-1 6.3.1 curves (aluminium EN 1999-1-1 class B), plates on edge also sideways by "
               "6.3.2; end moments amplified and added linearly; 100 % = at the limit",
               2);
  for (const auto& [group, use] : a.strength.buckling)
    out += text_of("  %-13s %4.0f %% %8s of %-8s %-20s %s\n", group.c_str(), 100 * use.used,
                   shown(use.compression, Quantity::force).c_str(),
                   shown(use.resistance, Quantity::force).c_str(), models::place_text(use.state).c_str(),
                   use.part.c_str());
  out += section("Drive torque while tracking and turning, greatest of both winds");
  for (const auto& [elevation, torque] : a.strength.moving_torque)
    out += text_of("  %4.0f deg  %9s\n", elevation / deg, shown(torque, Quantity::torque).c_str());
  out += section("Ground loads on one pylon foot, unfactored (what the ground puts on the foot)");
  const char* names[6] = {"force along the row",  "force across it (+Y)", "force upwards",
                          "moment about the row", "moment about +Y",      "moment about the vertical"};
  for (std::size_t i = 0; i < 6; ++i) {
    const auto &most = a.strength.greatest[i], &least = a.strength.least[i];
    const Quantity q = i < 3 ? Quantity::force : Quantity::torque;
    out +=
        text_of("  %-26s %11s (pylon %d, %s)\n  %-26s %11s (pylon %d, %s)\n", names[i],
                shown(most.value[i], q).c_str(), most.stand + 1, models::place_text(most.state).c_str(), "",
                shown(least.value[i], q).c_str(), least.stand + 1, models::place_text(least.state).c_str());
  }
  return out;
}

std::string findings(const Assessment& a) {
  std::string out;
  if (!a.cures.empty()) {
    out += section("Every change tried, each one re-run");
    for (const models::Cure& cure : a.cures) {
      std::string changes;
      for (const std::string& c : cure.changes) changes += (changes.empty() ? "" : " + ") + c;
      std::string rest;
      for (const auto& c : cure.still_missed) rest += (rest.empty() ? "; still missed: " : ", ") + c.name;
      out += wrapped(changes +
                         text_of(": light %.2f %%, moving %s, %+.0f kg", 100 * cure.intercept,
                                 shown(cure.moving_torque, Quantity::torque).c_str(), cure.mass_change) +
                         (cure.meets_all ? ", meets all limits" : rest),
                     2);
    }
  }
  if (!a.deciding_guesses.empty()) {
    out += section("Guesses that decide");
    for (const auto& g : a.deciding_guesses) out += wrapped(g.text, 2);
  }
  out += section("Proof");
  out += text_of("  wind force %.1f N, q A C %.1f N; greatest difference of forces and moment %.0e\n",
                 a.proof.wind_force, a.proof.q_area_c, a.proof.load_error);
  out += text_of("  loads and reactions balance to %.0e; residual %.0e; condition about %.0e; %d freedoms\n",
                 a.proof.balance, a.proof.residual, a.proof.condition, a.freedoms);
  out += text_of("  half-size rib elements change the slope by %.3f %% and the light by %.4f points\n",
                 100 * a.proof.slope_change, 100 * a.proof.intercept_change);
  return out + closing_text(a);
}

}  // namespace

std::string wind_chain_text(const Assessment& a) {
  std::string out = section("The wind, step by step");
  for (const models::WindUse& use : a.winds) {
    out += "  " + models::state_text(use.kind) + "\n";
    for (const loads::ChainStep& step : use.at_axis.chain)
      out += text_of("    %-34.34s %10.4g %s\n", step.what.c_str(), step.value, step.unit.c_str()) +
             wrapped(step.how, 8);
    out += text_of("    %-34s %10.4g %-6s for drive torque and the drive pylon\n", "size factor cs",
                   use.size_factor, "-");
  }
  out += wrapped("coefficients: " + a.table + ", " + a.table_title, 2);
  out += wrapped("confidence " + a.table_confidence + "; source: " + a.table_source, 4);
  return out;
}

std::string closing_text(const Assessment& a) {
  std::string out;
  out += section("Not judged");
  for (const std::string& n : a.not_judged) out += wrapped(n, 2);
  out += section("Not part of this check");
  for (const std::string& n : a.not_checked) out += wrapped(n, 2);
  out += section("Cautions");
  for (const std::string& c : a.cautions) out += wrapped(c, 2);
  out += wrapped(
      "This is a screening aid. It does not replace design by a competent person or the approval required "
      "where you build.",
      2);
  return out;
}

std::string detail_text(const Assessment& a) {
  return geometry(a) + winds(a) + wind_loads_text(a) + other_actions_text(a) + optics(a) +
         optics_study_text(a) + loads_text(a) + findings(a);
}

}  // namespace focalframe::cli
