#include "cli/report/view.h"

#include <algorithm>
#include <cmath>
#include <map>

#include "cli/escaped.h"
#include "cli/report/assets.h"
#include "cli/report_units.h"
#include "fem/units.h"

namespace focalframe::cli {
namespace {

using models::Portrait;

// A list of whole numbers: lengths in mm to one place after the point would double the page for nothing.
class Numbers {
 public:
  void add(double value) { text_ += text_of("%s%.0f", text_.empty() ? "" : ",", value == 0 ? 0.0 : value); }
  void add(const fem::Vec3& v, double unit) {
    for (int i = 0; i < 3; ++i) add(v[i] / unit);
  }
  std::string list() const { return "[" + text_ + "]"; }

 private:
  std::string text_;
};

std::string quoted(const std::string& text) {
  std::string out = "\"";
  for (char c : escaped(text)) out += c == '\\' || c == '\n' ? ' ' : c;  // shown as HTML, never read back
  return out + "\"";
}

// Words numbered in order of appearance.
class Words {
 public:
  std::size_t number(const std::string& word) {
    const auto [at, fresh] = numbers_.emplace(word, numbers_.size());
    if (fresh) list_ += (list_.empty() ? "" : ",") + quoted(word);
    return at->second;
  }
  std::string list() const { return "[" + list_ + "]"; }

 private:
  std::map<std::string, std::size_t> numbers_;
  std::string list_;
};

std::string wind_words(const models::PortraitState& state) {
  if (state.calm) return "calm, weight only";
  const std::size_t comma = state.words.find(", ");
  const std::string side = comma == std::string::npos ? state.words : state.words.substr(comma + 2);
  return side.rfind("from", 0) == 0 ? "wind " + side : "wind on the " + side;
}

std::string state_json(const models::PortraitState& s) {
  Numbers moves, mirror, forces;
  for (const fem::Vec3& v : s.moves) moves.add(v, 1e-6);
  for (const fem::Vec3& v : s.mirror) mirror.add(v, 1e-6);
  for (const models::MemberForces& f : s.forces) {
    for (double v : {f.axial, f.shear, f.torsion, f.bending}) forces.add(v);
    forces.add(f.stress / MPa);
  }
  return text_of("{\"elevation\":%.6f,\"kind\":\"%s\",\"pose\":\"%s %.2f\",", s.state.elevation,
                 models::state_text(s.state.kind).c_str(), models::state_text(s.state.kind).c_str(),
                 s.state.elevation / deg) +
         "\"wind\":" + quoted(wind_words(s)) + ",\"words\":" + quoted(s.words) +
         ",\"moves\":" + moves.list() + ",\"mirror\":" + mirror.list() + ",\"forces\":" + forces.list() + "}";
}

std::string data_json(const Portrait& p, std::size_t first) {
  Numbers points, turns, mirror, module;
  for (const auto& point : p.points) {
    points.add(point.at, mm);
    turns.add(point.turns ? 1 : 0);
  }
  for (const fem::Vec3& v : p.mirror) mirror.add(v, mm);
  for (int m : p.module_of_station) module.add(m);
  Words groups, names;
  std::string bars;
  for (const auto& m : p.members)
    bars += text_of("%s[%d,%d,%.1f,%zu,%zu,%.0f]", bars.empty() ? "" : ",", m.from, m.to, m.size / mm,
                    groups.number(m.group), names.number(m.name), m.yield / MPa);
  std::string states;
  for (const auto& s : p.states) states += (states.empty() ? "" : ",\n") + state_json(s);
  return text_of(
             "{\"axisHeight\":%.4f,\"axisToVertex\":%.4f,\"width\":%.4f,\"length\":%.4f,\"scale\":%.0f,"
             "\"first\":%zu,\"stations\":%d,\"rows\":%d,\n",
             p.axis_height, p.axis_to_vertex, p.width, p.length, drawn_scale(p, first), first, p.stations,
             p.rows) +
         "\"points\":" + points.list() + ",\n\"turns\":" + turns.list() + ",\n\"mirror\":" + mirror.list() +
         ",\n\"module\":" + module.list() + ",\n\"bars\":[" + bars + "],\n\"groups\":" + groups.list() +
         ",\n\"names\":" + names.list() + ",\n\"states\":[" + states + "]}";
}

}  // namespace

double drawn_scale(const Portrait& p, std::size_t state) {
  double most = 0;
  for (const fem::Vec3& v : p.states[state].moves) most = std::max(most, v.norm());
  if (most <= 0) return 1;
  const double raw = 0.1 * p.width / most, decade = std::pow(10.0, std::floor(std::log10(raw)));
  for (double m : {5.0, 2.0, 1.0})
    if (m * decade <= raw) return std::max(1.0, m * decade);
  return 1;
}

std::string view_html(const Portrait& p, std::size_t first) {
  return R"(<div class="view" id="view"><div class="bar">
<label>pose <input type="range" data-name="pose" min="0" max="0" step="1" value="0"><output data-of="pose"></output></label>
<label>wind <select data-name="wind"></select></label>
<label>motion <select data-name="scale"></select></label>
<label>colour <select data-name="colour"><option value="part">by part</option><option value="stress">by stress over yield</option></select></label>
<label><input type="checkbox" data-name="mirror" checked> mirror</label>
<label><input type="checkbox" data-name="still" checked> at rest</label>
</div><canvas aria-label="the frame, to be turned"></canvas><div class="said" role="status"></div></div>
<noscript><p>The turning view needs scripts. The drawings below show the same frame.</p></noscript>
<script type="application/json" id="view-data">)" +
         data_json(p, first) + "</script>\n";
}

std::string view_script() {
  return "<script>/* three.js r111, copyright 2010-2017 three.js authors, MIT licence */\n" +
         asset("three.min.js") + "</script>\n<script>\n" + asset("view.js") + "</script>\n";
}

}  // namespace focalframe::cli
