#include "cli/frame_results.h"

#include <Eigen/Geometry>
#include <algorithm>
#include <cmath>
#include <exception>

#include "fem/assembly.h"
#include "fem/member_loads.h"
#include "fem/near_mechanism.h"

namespace focalframe::cli {
namespace {

// Stations looked at besides the places where the moments are greatest.
constexpr double stations[] = {0, 0.25, 0.5, 0.75, 1};

double balance_of(const fem::Frame& frame, const fem::LoadCase& load, const fem::Response& response) {
  const Eigen::MatrixXd applied = fem::assemble_loads(frame, {load});
  fem::Vec3 force = fem::Vec3::Zero(), moment = fem::Vec3::Zero();
  double force_size = 0, moment_size = 0;
  for (Eigen::Index n = 0; n < response.reaction.rows(); ++n) {
    const fem::Vec3 place = frame.nodes[static_cast<std::size_t>(n)].at;
    const Eigen::Matrix<double, 6, 1> outside = applied.col(0).segment<6>(6 * n),
                                      held = response.reaction.row(n).transpose();
    for (const auto& part : {outside, held}) {
      const fem::Vec3 f = part.head<3>(), m = part.tail<3>() + place.cross(f);
      force += f;
      moment += m;
      force_size += f.norm();
      moment_size += m.norm();
    }
  }
  const double of_force = force_size > 0 ? force.norm() / force_size : 0;
  const double of_moment = moment_size > 0 ? moment.norm() / moment_size : 0;
  return std::max(of_force, of_moment);
}

MemberStress stress_of(const fem::Frame& frame, const fem::LoadCase& load, const fem::Response& response,
                       int member, const fem::Extremes& extremes) {
  const fem::Section& section =
      frame.sections[static_cast<std::size_t>(frame.members[static_cast<std::size_t>(member)].section)];
  MemberStress worst;
  if (!(section.Wy > 0 && section.Wz > 0)) return worst;
  std::vector<double> places(std::begin(stations), std::end(stations));
  for (const fem::Extreme& e : {extremes.most_My, extremes.least_My, extremes.most_Mz, extremes.least_Mz})
    if (std::isfinite(e.at)) places.push_back(e.at);
  for (const double at : places) {
    fem::Resultants r = fem::resultants_at(frame, load, response, member, at);
    if (!(section.Wt > 0)) r.T = 0;
    const double stress = fem::von_mises_bound(section, r);
    if (!(stress <= worst.stress)) worst = {stress, at};
  }
  return worst;
}

// Greatest stress and share of yield over the pieces, with the forces of the bent shape.
void stress_when_bent(const fem::InsideBuckling& inside, const fem::Response& response,
                      FrameSecondOrder& out) {
  const fem::Frame& frame = inside.divided.frame;
  const std::vector<fem::LoadCase> own = fem::loads_by_member(frame, inside.load);
  for (std::size_t m = 0; m < inside.divided.pieces.size(); ++m)
    for (const int piece : inside.divided.pieces[m]) {
      const auto p = static_cast<std::size_t>(piece);
      const double stress =
          stress_of(frame, own[p], response, piece, fem::extremes(frame, own[p], response, piece)).stress;
      if (std::isnan(stress)) continue;
      const double yield = frame.materials[static_cast<std::size_t>(frame.members[p].material)].yield;
      if (!(stress <= out.stress)) out.stress = stress, out.member = static_cast<int>(m);
      if (yield > 0 && !(stress / yield <= out.used)) out.used = stress / yield;
    }
}

void add_second_order(FrameCase& one) {
  if (one.buckling.modes.empty() || one.buckling.modes.front().factor >= 10) return;
  FrameSecondOrder& out = one.second_order;
  out.asked = true;
  const auto greatest = [](const fem::Response& r) {
    return r.displacement.leftCols<3>().rowwise().norm().maxCoeff();
  };
  try {
    const fem::Frame& frame = one.buckling.divided.frame;
    const fem::SecondOrder bent = fem::second_order(frame, one.buckling.load);
    out.stable = true;
    out.first = greatest(fem::StaticSolver(frame).solve(one.buckling.load));
    out.second = greatest(bent.response);
    stress_when_bent(one.buckling, bent.response, out);
  } catch (const fem::Unstable&) {
    out.stable = false;
  }
}

void add_buckling(FrameResults& results, const FrameFile& file, const std::vector<fem::LoadCase>& loads,
                  int count) {
  for (std::size_t i = 0; i < loads.size(); ++i) try {
      results.cases[i].buckling = fem::buckling_inside(frame_in_case(file, i), loads[i], count, 1e6);
      add_second_order(results.cases[i]);
    } catch (const std::exception& error) {
      results.remarks.push_back("case " + loads[i].name + ": buckling was not computed: " + error.what());
    }
}

void add_modes(FrameResults& results, const FrameFile& file, int count) {
  if (!file.has_mass) {
    results.remarks.push_back("no frequencies: the frame has no mass");
    return;
  }
  try {
    results.modes = fem::modes_inside(file.frame, count);
  } catch (const std::exception& error) {
    results.remarks.push_back(std::string("frequencies were not computed: ") + error.what());
  }
}

void note_missing_moduli(FrameResults& results, const fem::Frame& frame) {
  const bool no_moduli = std::any_of(frame.sections.begin(), frame.sections.end(),
                                     [](const fem::Section& s) { return !(s.Wy > 0 && s.Wz > 0); });
  const bool no_torsion =
      std::any_of(frame.sections.begin(), frame.sections.end(),
                  [](const fem::Section& s) { return s.Wy > 0 && s.Wz > 0 && !(s.Wt > 0); });
  if (no_moduli)
    results.remarks.push_back("no stresses where a section of shape properties has no Wy and Wz");
  if (no_torsion) results.remarks.push_back("stresses of sections of shape properties leave torsion out");
}

}  // namespace

FrameResults compute_frame(const FrameFile& file, int mode_count, int buckling_count) {
  std::vector<fem::LoadCase> loads = file.cases;
  if (loads.empty()) loads.emplace_back().name = "no load";
  FrameResults results;
  results.mass = fem::total_mass(file.frame).mass;
  const fem::StaticSolver solver(file.frame);
  results.condition_estimate = solver.condition_estimate();
  results.smallest_pivot_ratio = solver.smallest_pivot_ratio();
  if (results.smallest_pivot_ratio < 1e-7)
    if (const auto near = fem::near_mechanism(file.frame)) {
      std::string text = near->what();
      if (text.ends_with('.')) text.pop_back();
      results.remarks.push_back("nearly a mechanism: " + text);
    }
  std::vector<fem::Response> responses = solver.solve(loads);
  for (std::size_t i = 0; i < file.movements.size(); ++i)
    if (!file.movements[i].empty()) responses[i] = fem::StaticSolver(frame_in_case(file, i)).solve(loads[i]);
  for (std::size_t i = 0; i < loads.size(); ++i) {
    FrameCase one;
    one.name = loads[i].name;
    one.balance = balance_of(file.frame, loads[i], responses[i]);
    const std::vector<fem::LoadCase> own = fem::loads_by_member(file.frame, loads[i]);
    for (int m = 0; m < static_cast<int>(file.frame.members.size()); ++m) {
      const fem::LoadCase& load = own[static_cast<std::size_t>(m)];
      one.extremes.push_back(fem::extremes(file.frame, load, responses[i], m));
      one.stresses.push_back(stress_of(file.frame, load, responses[i], m, one.extremes.back()));
    }
    one.response = std::move(responses[i]);
    results.cases.push_back(std::move(one));
  }
  note_missing_moduli(results, file.frame);
  if (buckling_count > 0 && !file.cases.empty()) add_buckling(results, file, loads, buckling_count);
  if (mode_count > 0) add_modes(results, file, mode_count);
  return results;
}

}  // namespace focalframe::cli
