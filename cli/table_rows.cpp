#include <algorithm>
#include <cmath>
#include <numbers>

#include "cli/nearest.h"
#include "cli/quantity.h"
#include "cli/table_reader.h"
#include "fem/units.h"

namespace focalframe::cli {

namespace {

// A coefficient beyond these is a slip of area, pressure or decimal point.
constexpr double implausible = 5, impossible = 20;
constexpr double wide_gap = 30 * deg, same_angle = 1e-6;

std::string row_head(const SourceRow& row) { return "row pitch=\"" + row.pitch.text + "\""; }

std::optional<loads::AuthorRow> read_cells(TableReader& in, const SourceRow& row, double angle,
                                           const std::string& prefix,
                                           const std::vector<std::string>& columns) {
  loads::AuthorRow author{.angle = angle};
  double* const targets[] = {&author.first, &author.second, &author.moment};
  for (std::size_t i = 0; i < columns.size(); ++i) {
    const std::string name = prefix + columns[i];
    const auto cell = row.cells.find(name);
    if (cell == row.cells.end()) {
      in.say(Level::stop, row.line, row_head(row),
             "\"" + name + "\" is missing. With axes=\"" + in.text("axes") + "\" a row has " +
                 joined(columns) +
                 (prefix.empty() ? "." : ", and all three or none of them with upper- before."));
      return std::nullopt;
    }
    const auto value = in.number(cell->second, row.line, name);
    if (!value) return std::nullopt;
    if (std::abs(*value) > implausible)
      in.say(
          std::abs(*value) > impossible ? Level::stop : Level::warn, row.line,
          name + "=\"" + cell->second + "\"",
          "Coefficients of reflectors stay below about 3. Is the reference area or the decimal point right?");
    *targets[i] = *value;
  }
  return author;
}

// Ascending pitch; the pose with the back to the wind stands at both ends of a table that has negative rows.
void put_in_order(TableReader& in, std::vector<loads::CoefficientRow>& rows) {
  for (auto& row : rows)
    if (std::abs(row.pitch) < same_angle) row.pitch = 0;
  const auto by_pitch = [](const auto& a, const auto& b) { return a.pitch < b.pitch; };
  const auto same = [](const auto& a, const auto& b) { return b.pitch - a.pitch < same_angle; };
  std::sort(rows.begin(), rows.end(), by_pitch);
  const auto repeated = std::adjacent_find(rows.begin(), rows.end(), same);
  if (repeated != rows.end() && repeated->pitch < std::numbers::pi - same_angle)
    in.say(Level::stop, in.source().rows.front().line, "two rows for one pose",
           "Two angles of this table are the same pose, a full turn apart.");
  rows.erase(std::unique(rows.begin(), rows.end(), same), rows.end());
  if (rows.size() > 1 && rows.front().pitch < 0 && rows.back().pitch > std::numbers::pi - same_angle)
    rows.insert(rows.begin(), {-std::numbers::pi, rows.back().best, rows.back().upper});
}

std::string degrees(double angle) { return number_text(angle / deg) + " deg"; }

}  // namespace

void read_rows(TableReader& in, ReadTable& result) {
  const auto& c = result.conventions;
  const std::vector<std::string> columns = force_columns(c);
  double last = loads::unstated, direction = 0;
  for (const SourceRow& row : in.source().rows) {
    const auto angle = in.angle(row.pitch, "row pitch");
    if (!angle) continue;
    const double step = *angle - last;
    if (step == 0 || step * direction < 0)
      in.say(Level::stop, row.line, row_head(row),
             "Rows must follow each other in one direction, each pitch once.");
    if (!std::isnan(step) && direction == 0) direction = step;
    last = *angle;
    const auto best = read_cells(in, row, *angle, "", columns);
    const bool has_upper = std::any_of(row.cells.begin(), row.cells.end(),
                                       [](const auto& cell) { return cell.first.starts_with("upper-"); });
    const auto upper = has_upper ? read_cells(in, row, *angle, "upper-", columns) : best;
    if (!best || !upper) continue;
    result.table.rows.push_back(
        {loads::to_pitch(*angle, c), loads::to_coefficients(*best, c), loads::to_coefficients(*upper, c)});
  }
  if (in.source().rows.empty())
    in.say(Level::stop, 0, "no rows", "A table without rows holds no coefficients.");
  put_in_order(in, result.table.rows);
}

void read_profiles(TableReader& in, ReadTable& result) {
  const TableSource& source = in.source();
  if (source.profiles.empty()) return;
  auto& t = result.table;
  t.stations = in.numbers(source.stations.text, source.stations.line, "stations");
  const bool inside =
      std::all_of(t.stations.begin(), t.stations.end(), [](double s) { return std::abs(s) <= 0.5; });
  if (t.stations.size() < 2 || !inside || !std::is_sorted(t.stations.begin(), t.stations.end())) {
    in.say(Level::stop, source.stations.line, "stations",
           "At least two ascending places s/W between -0.5 and 0.5 are wanted.");
    return;
  }
  const bool from_upwind =
      in.word("stations-from", {"fixed-rim", "upwind-rim"}, TableReader::Need::required,
              "fixed-rim: -0.5 is the rim that is upwind when the face looks up; upwind-rim: the rim that "
              "is upwind in each pose.") == "upwind-rim";
  for (const SourceProfile& given : source.profiles) {
    const auto angle = in.angle(given.pitch, "profile pitch");
    std::vector<double> net = in.numbers(given.values, given.pitch.line, "profile");
    if (!angle) continue;
    if (net.size() != t.stations.size())
      in.say(Level::stop, given.pitch.line, "profile pitch=\"" + given.pitch.text + "\"",
             std::to_string(net.size()) + " values for " + std::to_string(t.stations.size()) + " stations.");
    const double pitch = loads::to_pitch(*angle, result.conventions);
    if (from_upwind && pitch < 0) std::reverse(net.begin(), net.end());
    t.profiles.push_back({pitch, net});
  }
  std::sort(t.profiles.begin(), t.profiles.end(),
            [](const auto& a, const auto& b) { return a.pitch < b.pitch; });
}

void judge(TableReader& in, ReadTable& result) {
  auto& t = result.table;
  const bool symmetric = t.rows.front().pitch >= 0;
  t.pitch_min = symmetric ? -t.rows.back().pitch : t.rows.front().pitch;
  t.pitch_max = t.rows.back().pitch;
  for (std::size_t i = 1; i < t.rows.size(); ++i)
    if (t.rows[i].pitch - t.rows[i - 1].pitch > wide_gap + same_angle)
      in.say(Level::warn, 0,
             "no row between pitch " + degrees(t.rows[i - 1].pitch) + " and " + degrees(t.rows[i].pitch),
             "Straight lines are drawn across gaps; coefficients turn quickly near edge-on.");
  const double covered = t.pitch_max - t.rows.front().pitch;
  if (t.rows.size() > 3 && covered < 2 * std::numbers::pi * deg)
    in.say(Level::warn, in.source().rows.front().line, "pitches over " + degrees(covered) + " in all",
           "The whole table covers a few degrees only. Are these radians?");
  for (const auto& row : t.rows) {
    const double drag = row.best.Ca * std::cos(row.pitch) + row.best.Cs * std::sin(row.pitch);
    if (drag <= 0)
      in.say(Level::warn, 0, "drag " + number_text(drag) + " at pitch " + degrees(row.pitch),
             "The wind would pull the reflector towards itself. A sign or the zero of the angle is probably "
             "not as declared.");
  }
}

}  // namespace focalframe::cli
