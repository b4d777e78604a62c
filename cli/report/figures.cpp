#include "cli/report/figures.h"

#include <algorithm>
#include <cmath>
#include <map>

#include "cli/report/chart.h"
#include "cli/report_units.h"
#include "fem/units.h"

namespace focalframe::cli {
namespace {

using models::Assessment;
using models::Criterion;
using models::Quantity;

const models::OpticalRow* worst_light(const Assessment& a) {
  return a.worst_light < 0 ? nullptr : &a.optics[static_cast<std::size_t>(a.worst_light)];
}

// Share of what the limit allows. Of light that is the loss: 95 % caught where 97 % is asked is far over.
double share_used(const Criterion& c) {
  if (c.quantity == Quantity::ratio && c.at_least) return (1 - c.value) / (1 - c.limit);
  return c.used();
}

const Criterion* criterion(const Assessment& a, const std::string& key) {
  for (const Criterion& c : a.criteria)
    if (c.key == key) return &c;
  return nullptr;
}

// "face" or "back", "from +Y" or "from -Y": the end of the state's words.
bool strikes_face(const models::State& state) {
  const std::string words = models::place_text(state);
  return words.find("face") != std::string::npos || words.find("+Y") != std::string::npos;
}

std::vector<Point> in_order(const std::map<double, double>& values) {
  std::vector<Point> points;
  for (const auto& [x, y] : values) points.push_back({x, y});
  return points;
}

}  // namespace

Figure limits_figure(const Assessment& a) {
  BarChart chart;
  chart.title = "Use of every limit";
  chart.across = "share of the limit, %";
  chart.limit = 100;
  chart.limit_name = "limit";
  for (const Criterion& c : a.criteria) {
    if (!c.judged()) continue;
    const ShownPair pair = shown_pair(c);
    const double used = 100 * share_used(c);
    chart.bars.push_back({c.name, pair.value + (c.at_least ? ", at least " : " of ") + pair.limit,
                          std::min(used, 250.0), !c.met(), true});
  }
  std::stable_sort(chart.bars.begin(), chart.bars.end(), [](const Bar& x, const Bar& y) {
    return x.over != y.over ? x.over : x.length > y.length;
  });
  return {
      "limits", "How much of each limit is used",
      "A bar past the upright line misses its limit. For light the bar is the loss against the loss allowed. "
      "Bars end at 250 %.",
      draw(chart)};
}

Figure light_figure(const Assessment& a) {
  std::map<double, double> calm, face, back;
  for (const models::OpticalRow& row : a.optics) {
    auto& to = row.calm ? calm : strikes_face(row.state) ? face : back;
    const double at = row.state.elevation / deg, light = 100 * row.result.intercept;
    const auto have = to.find(at);
    if (have == to.end() || have->second > light) to[at] = light;
  }
  LineChart chart;
  chart.title = "Light caught over elevation";
  chart.across = "elevation, deg (0 horizon, 90 zenith)";
  chart.upright = "light caught, %";
  chart.step_across = 15;
  chart.series = {
      {"calm", in_order(calm)}, {"wind on the face", in_order(face)}, {"wind on the back", in_order(back)}};
  if (const Criterion* c = criterion(a, "intercept"); c && c->judged())
    chart.limits.push_back({100 * c->limit, text_of("at least %.4g %%", 100 * c->limit)});
  return {"light", "Light caught at each elevation while tracking",
          "Intercept factor of the row at the 10 min mean of the OPERATE wind, the less favourable pressure "
          "pattern. "
          "Calm: weight alone.",
          draw(chart)};
}

Figure loss_figure(const Assessment& a) {
  BarChart chart;
  chart.title = "What each part of the deformation costs";
  chart.across = "points of light";
  const models::OpticalRow* row = worst_light(a);
  if (row) {
    std::vector<models::PartLoss> parts = row->result.attribution.parts;
    std::stable_sort(parts.begin(), parts.end(),
                     [](const auto& x, const auto& y) { return x.alone > y.alone; });
    for (const models::PartLoss& p : parts)
      chart.bars.push_back({p.name,
                            text_of("%.2f alone; mending it wins %.2f", 100 * p.alone, 100 * p.mended),
                            std::max(0.0, 100 * p.alone), false, true});
    chart.bars.push_back({"all together", text_of("%.2f lost", 100 * row->result.attribution.loss),
                          100 * row->result.attribution.loss, false, false});
  }
  return {"loss", "Where the light goes in the worst state",
          row ? "State: " + models::place_text(row->state) +
                    ". Parts can cancel or add up: the bars need not sum to the total; the difference is " +
                    text_of("%+.2f points.", 100 * row->result.attribution.interaction)
              : "",
          draw(chart)};
}

Figure twist_figure(const Assessment& a) {
  LineChart chart;
  chart.title = "Twist along the row";
  chart.across = "module";
  chart.upright = "twist against the sensor, mrad";
  chart.step_across = 1;
  const models::OpticalRow* row = worst_light(a);
  Series twist{"twist", {}};
  if (row)
    for (std::size_t m = 0; m < row->result.module_twist.size(); ++m)
      twist.points.push_back({static_cast<double>(m + 1), row->result.module_twist[m] / mrad});
  chart.series = {twist};
  if (const Criterion* c = criterion(a, "twist"); c && c->judged())
    chart.limits = {{c->limit / mrad, "limit"}, {-c->limit / mrad, "limit"}};
  else
    chart.limits = {{0, "sensor"}};
  return {
      "twist", "Twist along the row in the worst state for light",
      row ? "Mean rotation of each module less what the sensor reads. " + models::place_text(row->state) + "."
          : "",
      draw(chart)};
}

Figure use_figure(const Assessment& a) {
  BarChart chart;
  chart.title = "Use of strength by member group";
  chart.across = "share of the allowed stress, %";
  chart.limit = 100;
  chart.limit_name = "allowed";
  for (const auto& [group, use] : a.strength.groups) {
    const bool known = use.allowed > 0;
    chart.bars.push_back({group,
                          known ? text_of("%.0f of %.0f MPa", use.stress / MPa, use.allowed / MPa)
                                : text_of("%.0f MPa, yield not known", use.stress / MPa),
                          known ? std::min(250.0, 100 * use.used) : 0, use.used > 1, known});
  }
  std::stable_sort(chart.bars.begin(), chart.bars.end(),
                   [](const Bar& x, const Bar& y) { return x.length > y.length; });
  return {"strength", "Most stressed member of each group",
          "Upper bound of the equivalent stress at the member's ends under factored actions. " + a.rule + ".",
          draw(chart)};
}

Figure torque_figure(const Assessment& a) {
  LineChart chart;
  chart.title = "Drive torque over elevation";
  chart.across = "elevation, deg";
  chart.upright = "drive torque, kN m";
  chart.step_across = 30;
  chart.from_zero = true;
  Series moving{"tracking and turning", {}};
  for (const auto& [elevation, torque] : a.strength.moving_torque)
    moving.points.push_back({elevation / deg, torque / kN});
  chart.series = {moving};
  if (const Criterion* c = criterion(a, "moving-torque"); c && c->judged())
    chart.limits.push_back({c->limit / kN, "moving rating"});
  return {"torque", "What the drive must bring at each elevation",
          "Greatest of both winds at the OPERATE and TURNING gust, bearings' friction included; unfactored.",
          draw(chart)};
}

std::vector<Figure> figures_of(const Assessment& a) {
  std::vector<Figure> out{limits_figure(a)};
  if (!a.optics.empty()) {
    out.push_back(light_figure(a));
    out.push_back(loss_figure(a));
    if (a.optics.front().result.module_twist.size() > 1) out.push_back(twist_figure(a));
  }
  out.push_back(use_figure(a));
  if (a.strength.moving_torque.size() > 1) out.push_back(torque_figure(a));
  return out;
}

}  // namespace focalframe::cli
