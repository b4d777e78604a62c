#include "cli/report/csv.h"

#include <cmath>
#include <vector>

#include "cli/report_units.h"
#include "models/quantity.h"

namespace focalframe::cli {
namespace {

using models::Assessment;

std::string quoted(const std::string& text) {
  if (text.find_first_of(",\"\n") == std::string::npos) return text;
  std::string out = "\"";
  for (char c : text) out += c == '"' ? std::string("\"\"") : std::string(1, c);
  return out + "\"";
}

// A number that was not computed leaves its field empty.
std::string number(double value) { return std::isfinite(value) ? text_of("%.9g", value) : ""; }

class Table {
 public:
  explicit Table(const std::vector<std::string>& columns) { add(columns); }
  void add(const std::vector<std::string>& fields) {
    for (std::size_t i = 0; i < fields.size(); ++i) text_ += (i ? "," : "") + quoted(fields[i]);
    text_ += "\r\n";
  }
  const std::string& text() const { return text_; }

 private:
  std::string text_;
};

std::string limits(const Assessment& a) {
  const char* questions[] = {"focus", "together", "drive", "ground"};
  Table t({"question", "key", "name", "value_SI", "limit_SI", "limit_is", "result", "decided_in", "note"});
  for (const models::Criterion& c : a.criteria)
    t.add({questions[static_cast<int>(c.question)], c.key, c.name, number(c.value), number(c.limit),
           c.at_least ? "least" : "most",
           !c.judged() ? "not judged"
           : c.met()   ? "met"
                       : "missed",
           c.decided_in, c.note});
  return t.text();
}

std::string light(const Assessment& a) {
  Table t({"state", "elevation_rad", "wind_from_rad", "pattern", "intercept", "intercept_row_mean_aim",
           "twist_rad", "slope_rad", "slope_before_fit_rad", "slope_along_rad", "focal_change_m",
           "receiver_shift_m", "rim_deflection_m", "loss"});
  for (const models::OpticalRow& row : a.optics) {
    const auto& r = row.result;
    t.add({row.calm ? "OPERATE, calm" : models::place_text(row.state), number(row.state.elevation),
           row.calm ? "" : number(row.state.wind_from), row.calm ? "none" : models::spread_text(row.spread),
           number(r.intercept), number(r.intercept_row_mean), number(r.worst_twist), number(r.slope),
           number(r.slope_before), number(r.slope_along), number(r.focal_change), number(r.receiver_shift),
           number(r.rim_deflection), number(r.attribution.loss)});
  }
  return t.text();
}

std::string stress(const Assessment& a) {
  Table t({"group", "member", "stress_Pa", "allowed_Pa", "used", "state", "pattern"});
  for (const auto& [group, use] : a.strength.groups)
    t.add({group, use.part, number(use.stress), use.allowed > 0 ? number(use.allowed) : "",
           use.allowed > 0 ? number(use.used) : "", models::place_text(use.state),
           models::spread_text(use.spread)});
  return t.text();
}

std::string buckling(const Assessment& a) {
  Table t({"group", "member", "used", "compression_N", "resistance_N", "state", "pattern"});
  for (const auto& [group, use] : a.strength.buckling)
    t.add({group, use.part, number(use.used), number(use.compression), number(use.resistance),
           models::place_text(use.state), models::spread_text(use.spread)});
  return t.text();
}

std::string drive(const Assessment& a) {
  Table t({"elevation_rad", "moving_torque_N_m"});
  for (const auto& [elevation, torque] : a.strength.moving_torque) t.add({number(elevation), number(torque)});
  return t.text();
}

std::string ground(const Assessment& a) {
  const char* names[6] = {"FX_N", "FY_N", "FZ_N", "MX_N_m", "MY_N_m", "MZ_N_m"};
  Table t({"envelope", "pylon", "state", "FX_N", "FY_N", "FZ_N", "MX_N_m", "MY_N_m", "MZ_N_m"});
  const auto add = [&](const std::string& envelope, const models::FootReaction& foot) {
    std::vector<std::string> fields{envelope, std::to_string(foot.stand + 1), models::place_text(foot.state)};
    for (double v : foot.value) fields.push_back(number(v));
    t.add(fields);
  };
  for (std::size_t i = 0; i < 6; ++i) {
    add(std::string("greatest ") + names[i], a.strength.greatest[i]);
    add(std::string("least ") + names[i], a.strength.least[i]);
  }
  return t.text();
}

std::string changes(const Assessment& a) {
  Table t({"change", "meets_all", "intercept", "moving_torque_N_m", "mass_change_kg"});
  for (const models::Cure& cure : a.cures) {
    std::string words;
    for (const std::string& c : cure.changes) words += (words.empty() ? "" : " + ") + c;
    t.add({words, cure.meets_all ? "yes" : "no", number(cure.intercept), number(cure.moving_torque),
           number(cure.mass_change)});
  }
  return t.text();
}

}  // namespace

std::map<std::string, std::string> csv_tables(const Assessment& a) {
  return {{"limits.csv", limits(a)},     {"light.csv", light(a)}, {"stress.csv", stress(a)},
          {"buckling.csv", buckling(a)}, {"drive.csv", drive(a)}, {"ground.csv", ground(a)},
          {"changes.csv", changes(a)}};
}

}  // namespace focalframe::cli
