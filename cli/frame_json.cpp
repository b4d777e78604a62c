#include "cli/frame_json.h"

#include <nlohmann/json.hpp>

namespace focalframe::cli {
namespace {

using Json = nlohmann::ordered_json;

template <class Row>
Json row_of(const Row& row) {
  Json list = Json::array();
  for (Eigen::Index i = 0; i < row.size(); ++i) list.push_back(row[i]);
  return list;
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
                       {"greatest_stress_pa", one.stresses[m].stress},
                       {"greatest_stress_at", one.stresses[m].at}});
  for (const fem::Mode& mode : results.modes) frequencies.push_back(mode.frequency);
  for (const fem::BucklingMode& mode : one.buckling) factors.push_back(mode.factor);
  return {{"name", one.name},
          {"nodes", nodes},
          {"reactions", reactions},
          {"members", members},
          {"frequencies_hz", frequencies},
          {"buckling_factors", factors},
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
                         {"remarks", results.remarks},
                         {"cases", cases}};
  // Names come from files that passed the UTF-8 check; "replace" only guards against a surprise.
  return document.dump(1, ' ', false, Json::error_handler_t::replace) + "\n";
}

}  // namespace focalframe::cli
