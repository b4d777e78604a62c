#include "cli/table_sketch.h"

#include <algorithm>
#include <cmath>
#include <cstdio>
#include <vector>

#include "cli/report/chart.h"
#include "fem/units.h"

namespace focalframe::cli {
namespace {

constexpr int columns = 61, lines = 15;
constexpr double moment_scale = 4;

struct Sample {
  double pitch, values[3];  // Ca, Cs, Cm scaled
};

std::vector<Sample> samples_of(const loads::CoefficientTable& table) {
  std::vector<Sample> out;
  const double from = std::max(table.pitch_min, table.rows.front().pitch), to = table.rows.back().pitch;
  for (int i = 0; i < columns; ++i) {
    const double pitch = from + (to - from) * i / (columns - 1);
    if (const auto c = loads::coefficients_at(table, pitch))
      out.push_back({pitch, {c->Ca, c->Cs, moment_scale * c->Cm}});
    else
      out.push_back({pitch, {0, 0, 0}});
  }
  return out;
}

std::string ruler(double from, double to) {
  std::string text(columns + 4, ' ');
  for (int i = 0; i < columns; i += 10) {
    char number[16];
    std::snprintf(number, sizeof number, "%.0f", (from + (to - from) * i / (columns - 1)) / deg);
    text.replace(static_cast<std::size_t>(i), std::char_traits<char>::length(number), number);
  }
  return text.substr(0, text.find_last_not_of(' ') + 1);
}

}  // namespace

std::string table_sketch(const loads::CoefficientTable& table) {
  if (table.rows.size() < 2) return {};
  const std::vector<Sample> samples = samples_of(table);
  double most = 0.1, least = -0.1;
  for (const Sample& s : samples)
    for (double v : s.values) most = std::max(most, v), least = std::min(least, v);
  const auto level = [&](double v) {
    return static_cast<int>(std::lround((most - v) / (most - least) * (lines - 1)));
  };
  std::vector<std::string> canvas(lines, std::string(columns, ' '));
  canvas[static_cast<std::size_t>(level(0))] = std::string(columns, '.');
  const char letters[3] = {'m', 's', 'a'};  // Ca last: it is the one to see where they meet
  for (std::size_t k = 0; k < 3; ++k)
    for (std::size_t i = 0; i < samples.size(); ++i)
      canvas[static_cast<std::size_t>(level(samples[i].values[2 - k]))][i] = letters[k];
  std::string out = "Sketch over pitch: a = Ca, s = Cs, m = 4 x Cm, dots = 0\n";
  for (int line = 0; line < lines; ++line) {
    char scale[16] = "       ";
    if (line == 0 || line == lines - 1 || line == level(0))
      std::snprintf(scale, sizeof scale, "%6.2f ",
                    line == level(0) ? 0.0 : most - (most - least) * line / (lines - 1));
    std::string row = scale + canvas[static_cast<std::size_t>(line)];
    out += row.substr(0, row.find_last_not_of(' ') + 1) + "\n";
  }
  out += "       " + ruler(samples.front().pitch, samples.back().pitch) + " deg\n";
  return out +
         "Wind from the left; the mirror by pitch: 0 \")\" hollow to the wind, 90 \"U\" face up,\n"
         "180 \"(\" back to the wind, below 0 face down.\n";
}

std::string table_svg(const loads::CoefficientTable& table) {
  LineChart chart;
  chart.title = table.name + " (best values)";
  chart.across = "pitch, deg";
  chart.upright = "coefficient";
  chart.step_across = 30;
  Series Ca{"Ca", {}}, Cs{"Cs", {}}, Cm{"Cm", {}};
  for (const loads::CoefficientRow& row : table.rows) {
    Ca.points.push_back({row.pitch / deg, row.best.Ca});
    Cs.points.push_back({row.pitch / deg, row.best.Cs});
    Cm.points.push_back({row.pitch / deg, row.best.Cm});
  }
  chart.series = {Ca, Cs, Cm};
  chart.limits = {{0, ""}};
  return draw(chart).file();
}

}  // namespace focalframe::cli
