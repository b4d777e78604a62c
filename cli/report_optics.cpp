#include "cli/report_optics.h"

#include <cmath>

#include "cli/messages.h"
#include "cli/report_units.h"
#include "fem/units.h"

namespace focalframe::cli {
namespace {

using models::Assessment;
using models::Attribution;
using models::OpticsStudy;

std::string section(const std::string& title) { return "\n" + title + "\n"; }

std::string place(const models::OpticalRow& row) {
  return models::place_text(row.state) + (row.calm ? ", calm" : "");
}

double points(double share) { return 100 * share; }

const char* meaning(const std::string& part) {
  if (part == "tilt") return "the row's mean rotation the aim leaves";
  if (part == "twist") return "modules and sections against that";
  if (part == "receiver") return "out of the focus the tube carries along";
  if (part == "focus") return "change of focal length";
  if (part == "ribs") return "all other shape of the frame";
  if (part == "panel") return "the mirror's own bending";
  return "";
}

std::string losses(const OpticsStudy& s, const Attribution& all) {
  std::string out =
      "  part       alone  if mended   beam rms\n"
      "            points     points       mrad\n";
  out += text_of("  %-9s %7.2f                       sun, mirror and aim without any bending\n", "noise",
                 points(1 - s.perfect));
  double sum = 0;
  for (const models::PartLoss& p : all.parts) {
    double rms = NAN;
    for (const models::BudgetLine& line : s.budget.lines)
      if (line.name == p.name && line.nature == models::ErrorNature::systematic) rms = line.rms;
    sum += p.alone;
    out += text_of("  %-9s %7.2f %10.2f %10.2f   %s\n", p.name.c_str(), points(p.alone), points(p.mended),
                   rms / mrad, meaning(p.name));
  }
  out += text_of("  lost to bending %.2f points = %.2f of the parts alone %+.2f of their interaction\n",
                 points(all.loss), points(sum), points(all.interaction));
  return out;
}

std::string causes(const OpticsStudy& s) {
  const Attribution& c = s.causes;
  std::string out = text_of(
      "  weight alone costs %.2f points (repeatable: rigging and counterweights), wind alone %.2f,\n"
      "  together %.2f (interaction %+.2f)\n",
      points(c.parts[0].alone), points(c.parts[1].alone), points(c.loss), points(c.interaction));
  std::string parts = "of the weight alone:";
  for (const models::PartLoss& p : s.by_weight.parts)
    parts += text_of(" %s %.2f,", p.name.c_str(), points(p.alone));
  parts.back() = '.';
  return out + wrapped(parts, 2);
}

std::string modules(const OpticsStudy& s) {
  std::string out = "  module   light   lost";
  for (const models::PartLoss& p : s.modules.front().parts) out += text_of(" %8s", p.name.c_str());
  out += "   interaction\n";
  for (std::size_t i = 0; i < s.modules.size(); ++i) {
    const Attribution& m = s.modules[i];
    out += text_of("  %6zu  %6.2f %6.2f", i + 1, points(m.intercept), points(m.loss));
    for (const models::PartLoss& p : m.parts) out += text_of(" %8.2f", points(p.alone));
    out += text_of(" %+13.2f\n", points(m.interaction));
  }
  return out;
}

std::string aims(const OpticsStudy& s) {
  const models::AimChoices& a = s.aims;
  std::string out = "  light by what the tracker turns back (reading of the sensor in this state)\n";
  const auto line = [&](const char* name, double caught, double reading, const char* note) {
    out += text_of("    %-28s %6.2f %%   %+7.2f mrad   %s\n", name, points(caught), reading / mrad, note);
  };
  line("nothing", a.none, 0, "correction none");
  line("encoder at the drive", a.encoder, a.readings.encoder, "blind to pylons and tube");
  line("inclinometer on the row", a.inclinometer, a.readings.inclinometer, "where it sits");
  line("sun sensor on a module", a.sun, a.readings.sun, "mean optical error there");
  line("the row's mean twist", a.row_mean, a.readings.row_mean, "correction row-mean");
  return out;
}

std::string budget(const OpticsStudy& s) {
  std::string out = section("Error budget of that state (1-D rms across the trough)");
  out += "  line               stated     as beam\n";
  const auto row = [&](const models::BudgetLine& line) {
    const bool normal = line.of == models::ErrorOf::normal;
    return text_of("  %-16s %5.2f mrad %5.2f mrad   %s\n", line.name.c_str(), line.rms / mrad,
                   models::beam_rms(line) / mrad,
                   normal ? "of the mirror's normal: counts twice" : "of the beam");
  };
  for (const auto& line : s.budget.lines)
    if (line.nature == models::ErrorNature::random) out += row(line);
  out += text_of("  %-16s            %5.2f mrad   root of squares; the sun is in it once\n",
                 "random together", s.budget.random / mrad);
  out += "  systematic, from this frame; carried ray by ray, never added in squares to the above:\n";
  for (const auto& line : s.budget.lines)
    if (line.nature == models::ErrorNature::systematic) out += row(line);
  out += "  tracking means aim noise only: play, friction and twist are modelled or bounded apart.\n";
  return out;
}

std::string bounds(const OpticsStudy& s) {
  std::string out;
  const models::PlayBound& p = s.play;
  if (p.farthest > 0)
    out += wrapped(
        text_of(
            "Play and friction, a bound not in the light above: half of the drive's play %.2f mrad, half of "
            "each joint's %.2f mrad on the way out, bearing friction %.2f mrad at most; a module may lie "
            "%.2f mrad off. All to the worse side the light would be %.2f %%. In this wind the drive's "
            "torque %s.",
            p.drive / mrad, p.joint / mrad, p.friction_twist / mrad, p.farthest / mrad, points(p.intercept),
            p.reverses() ? "changes its sign against weight alone, so the play is crossed"
                         : "keeps the sign it has from weight alone, so the play stays to one side"),
        2);
  out +=
      s.re_aim_angle > 0
          ? wrapped(
                text_of("Standing still, the light stays above %.1f %% for %.1f min while the sun moves on "
                        "at 15 deg an hour (aim exact at first; aimed ahead of the sun, twice as long).",
                        points(s.re_aim_least), s.re_aim_time / 60),
                2)
          : wrapped(text_of("Standing still: the light is below the %.1f %% asked for even when just aimed.",
                            points(s.re_aim_least)),
                    2);
  out += wrapped(
      text_of("Not in the light: end loss %.2f %% at the stated incidence; the receiver's shadow on the "
              "mirror %.1f %% of the aperture; posts in front of %.1f %% of the receiver; what a glass "
              "sleeve reflects and bends; shadows of other rows.",
              points(s.end_loss), points(s.shade_receiver), points(s.behind_posts)),
      2);
  return out;
}

std::string shape(const OpticsStudy& s) {
  const models::TroughShape& f = s.fit;
  return text_of(
             "  best-fit parabola of module %d (least squares on heights, area weighted, panels in):\n"
             "    vertex %+.2f mm across, %+.2f mm along the axis; tilt %+.2f mrad; focal length %+.2f mm;\n"
             "    rank %d of 3, condition %.1f\n",
             s.module + 1, f.vertex_v / mm, f.vertex_w / mm, f.tilt / mrad, f.focal_change / mm, f.rank,
             f.condition) +
         text_of(
             "    slope of the normal, rms: across (1-D) %.2f mrad before, %.2f after the fit; along %.2f;\n"
             "    radial (root of across2 + along2) %.2f after; focus deviation FDx %.1f mm before\n"
             "    focal shift, least squares on the miss: %+.2f mm across, %+.2f mm along the axis\n",
             f.slope_rms / mrad, f.slope_rms_after / mrad, f.longitudinal_slope_rms / mrad,
             s.slope_radial / mrad, f.focus_deviation / mm, f.focal_line_v / mm, f.focal_line_w / mm);
}

std::string rigging(const Assessment& a) {
  const models::Rigging& r = a.rigging;
  if (std::isnan(r.best.least)) return {};
  const std::string now =
      std::isnan(r.now.set_true) ? "unloaded" : text_of("at %.0f deg", r.now.set_true / deg);
  return wrapped(
      text_of("Rigging, weight alone, worst pose of the tracking range: set true %s the light is %.2f %% "
              "(mean %.2f); the best place to set it is %.0f deg with %.2f %% (mean %.2f).",
              now.c_str(), points(r.now.least), points(r.now.mean), r.best.set_true / deg,
              points(r.best.least), points(r.best.mean)),
      2);
}

}  // namespace

std::string optics_study_text(const Assessment& a) {
  if (!a.study.made || a.worst_light < 0) return {};
  const models::OpticalRow& row = a.optics[static_cast<std::size_t>(a.worst_light)];
  std::string out = section("What costs light, " + place(row) + " (least light)");
  out += losses(a.study, row.result.attribution);
  if (!row.calm) out += causes(a.study);
  out += modules(a.study) + aims(a.study) + wrapped(a.study.panel_method, 2) + shape(a.study);
  return out + budget(a.study) + bounds(a.study) + rigging(a);
}

std::string trace_text(const Assessment& a) {
  std::string out;
  int differing = 0, count = 0;
  for (const models::OpticalRow& row : a.optics) {
    const models::RowTrace& t = row.trace;
    if (t.traced.rays == 0) continue;
    if (count++ == 0)
      out = section(text_of("Ray trace of the bent row, %lld rays a state, fixed seed",
                            static_cast<long long>(t.traced.rays))) +
            "  state                      pattern       analytic   traced   99.9 % interval\n";
    differing += t.agrees ? 0 : 1;
    out += text_of("  %-26.26s %-12s %8.3f %% %7.3f %%  %.3f to %.3f  %s\n", place(row).c_str(),
                   row.calm ? "weight only" : models::spread_text(row.spread).c_str(), points(t.analytic),
                   points(t.traced.intercept), points(t.low), points(t.high), t.agrees ? "agree" : "DIFFER");
  }
  if (count > 0)
    out += differing == 0 ? text_of("  all %d states agree\n", count)
                          : text_of("  %d of %d states differ: trust neither before the cause is known\n",
                                    differing, count);
  return out;
}

}  // namespace focalframe::cli
