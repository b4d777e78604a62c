#include "cli/frame_json.h"

#include <nlohmann/json.hpp>

#include "fem/shape_parts.h"

namespace focalframe::cli {
namespace {

using Json = nlohmann::ordered_json;

template <class Row>
Json row_of(const Row& row) {
  Json list = Json::array();
  for (Eigen::Index i = 0; i < row.size(); ++i) list.push_back(row[i]);
  return list;
}

std::string words_of(const fem::Frame& frame, const Eigen::MatrixXd& shape) {
  return fem::shape_words(frame, fem::shape_parts(frame, shape), {"along x", "along y", "along z"});
}

Json modes_json(const fem::InsideModes& inside) {
  Json modes = Json::array();
  for (const fem::Mode& mode : inside.modes)
    modes.push_back({{"frequency_hz", mode.frequency},
                     {"residual_ratio", mode.residual},
                     {"effective_mass_kg", row_of(mode.effective_mass)},
                     {"moves", words_of(inside.divided.frame, mode.shape)}});
  Json out = {{"list", modes},
              {"most_pieces_of_a_member", inside.most_pieces},
              {"discretisation_error_ratio", inside.error}};
  if (!inside.modes.empty()) {
    out["counted"] = inside.modes.front().counted;
    out["count_below_hz"] = inside.modes.front().count_at;
  }
  return out;
}

Json buckling_json(const FrameCase& one) {
  Json modes = Json::array();
  for (const fem::BucklingMode& mode : one.buckling.modes)
    modes.push_back({{"factor_ratio", mode.factor},
                     {"residual_ratio", mode.residual},
                     {"moves", words_of(one.buckling.divided.frame, mode.shape)}});
  Json out = {{"list", modes},
              {"most_pieces_of_a_member", one.buckling.most_pieces},
              {"discretisation_error_ratio", one.buckling.error}};
  if (!one.buckling.modes.empty()) {
    out["counted"] = one.buckling.modes.front().counted;
    out["count_below_ratio"] = one.buckling.modes.front().count_at;
  }
  const FrameSecondOrder& bent = one.second_order;
  if (bent.asked)
    out["second_order"] = {{"stable", bent.stable},
                           {"greatest_displacement_first_order_m", bent.first},
                           {"greatest_displacement_m", bent.second},
                           {"greatest_stress_pa", bent.stress},
                           {"share_of_yield_ratio", bent.used}};
  return out;
}

Json extreme_json(const fem::Extreme& e) { return {{"at", e.at}, {"value", e.value}}; }

Json extremes_json(const fem::Extremes& e) {
  return {{"most_my_n_m", extreme_json(e.most_My)},        {"least_my_n_m", extreme_json(e.least_My)},
          {"most_mz_n_m", extreme_json(e.most_Mz)},        {"least_mz_n_m", extreme_json(e.least_Mz)},
          {"most_deflection_y_m", extreme_json(e.most_y)}, {"least_deflection_y_m", extreme_json(e.least_y)},
          {"most_deflection_z_m", extreme_json(e.most_z)}, {"least_deflection_z_m", extreme_json(e.least_z)}};
}

Json case_json(const FrameFile& file, const FrameCase& one, const FrameResults& results) {
  Json nodes = Json::array(), reactions = Json::array(), members = Json::array(), frequencies = Json::array(),
       factors = Json::array();
  std::vector<bool> held(file.frame.nodes.size(), false);
  for (const fem::Support& s : file.frame.supports) held[static_cast<std::size_t>(s.node)] = true;
  for (const fem::Spring& s : file.frame.springs) held[static_cast<std::size_t>(s.node)] = true;
  for (std::size_t n = 0; n < file.frame.nodes.size(); ++n) {
    const auto row = static_cast<Eigen::Index>(n);
    nodes.push_back({{"id", file.frame.nodes[n].name}, {"u", row_of(one.response.displacement.row(row))}});
    if (held[n])
      reactions.push_back({{"id", file.frame.nodes[n].name}, {"r", row_of(one.response.reaction.row(row))}});
  }
  for (std::size_t m = 0; m < file.frame.members.size(); ++m)
    members.push_back({{"id", file.frame.members[m].name},
                       {"end_force", row_of(one.response.end_force.row(static_cast<Eigen::Index>(m)))},
                       {"extremes", extremes_json(one.extremes[m])},
                       {"greatest_stress_pa", one.stresses[m].stress},
                       {"greatest_stress_at", one.stresses[m].at}});
  for (const fem::Mode& mode : results.modes.modes) frequencies.push_back(mode.frequency);
  for (const fem::BucklingMode& mode : one.buckling.modes) factors.push_back(mode.factor);
  return {{"name", one.name},
          {"nodes", nodes},
          {"reactions", reactions},
          {"members", members},
          {"frequencies_hz", frequencies},
          {"buckling_factors", factors},
          {"buckling", buckling_json(one)},
          {"residual", one.response.residual},
          {"balance", one.balance}};
}

}  // namespace

std::string frame_json(const std::string& name, const std::string& hash, const FrameFile& file,
                       const FrameResults& results) {
  Json cases = Json::array();
  for (const FrameCase& one : results.cases) cases.push_back(case_json(file, one, results));
  const Json document = {{"schema", "focalframe-frame"},
                         {"schema_version", 1},
                         {"program_version", FOCALFRAME_VERSION},
                         {"name", name},
                         {"input_hash", hash},
                         {"mass_kg", results.mass},
                         {"condition_estimate", results.condition_estimate},
                         {"smallest_pivot_ratio", results.smallest_pivot_ratio},
                         {"modes", modes_json(results.modes)},
                         {"remarks", results.remarks},
                         {"cases", cases}};
  // Names come from files that passed the UTF-8 check; "replace" only guards against a surprise.
  return document.dump(1, ' ', false, Json::error_handler_t::replace) + "\n";
}

}  // namespace focalframe::cli
