#include "fem/inside.h"

#include <algorithm>
#include <cmath>
#include <numbers>
#include <numeric>

#include "fem/beam.h"
#include "fem/diagram.h"
#include "fem/member_loads.h"

namespace focalframe::fem {
namespace {

/// How far one member's own waves turn over its length at the highest value wanted [rad].
struct Turn {
  double bending = 0;  ///< error of one piece: turn^4 / 800
  double twist = 0;    ///< torsion, stretching, lateral-torsional: turn^2 / 24
};

double error_of(const Turn& turn, int pieces) {
  return std::pow(turn.bending / pieces, 4) / 800 + std::pow(turn.twist / pieces, 2) / 24;
}

int pieces_for(const Turn& turn, double error, int most) {
  int pieces = 1;
  while (pieces < most && error_of(turn, pieces) > error) ++pieces;
  return pieces;
}

/// Pieces of all members: equal error everywhere, at most so many in total.
std::vector<int> pieces_for(const std::vector<Turn>& turns, const InsideLimits& limits) {
  const int most = std::max(limits.most_members, static_cast<int>(turns.size()));
  std::vector<int> pieces(turns.size(), 1);
  for (double error = limits.error; error < 1e6; error *= 1.5) {
    for (std::size_t m = 0; m < turns.size(); ++m)
      pieces[m] = pieces_for(turns[m], error, limits.most_pieces);
    if (std::accumulate(pieces.begin(), pieces.end(), 0) <= most) break;
  }
  return pieces;
}

std::vector<int> first_pieces(const Frame& frame, const InsideLimits& limits) {
  const auto members = static_cast<int>(frame.members.size());
  return std::vector<int>(frame.members.size(),
                          limits.first_pieces * members <= limits.most_members ? limits.first_pieces : 1);
}

double largest_error(const std::vector<Turn>& turns, const std::vector<int>& pieces) {
  double error = 0;
  for (std::size_t m = 0; m < turns.size(); ++m) error = std::max(error, error_of(turns[m], pieces[m]));
  return error;
}

std::vector<Turn> vibration_turns(const Frame& frame, double frequency) {
  const double omega = 2 * std::numbers::pi * frequency;
  std::vector<Turn> turns;
  for (int m = 0; m < static_cast<int>(frame.members.size()); ++m) {
    const Member& member = frame.members[static_cast<std::size_t>(m)];
    const Section& s = frame.sections[static_cast<std::size_t>(member.section)];
    const Material& material = frame.materials[static_cast<std::size_t>(member.material)];
    const double length = member_length(frame, m), weak = std::min(s.Iy, s.Iz);
    Turn turn;
    turn.bending = std::pow(omega * omega * material.density * s.A / (material.E * weak), 0.25) * length;
    const double spin = (s.Iy + s.Iz) / s.J / material.G, along = 1 / material.E;
    turn.twist = omega * std::sqrt(material.density * std::max(spin, along)) * length;
    turns.push_back(turn);
  }
  return turns;
}

std::vector<Turn> buckling_turns(const Frame& frame, const LoadCase& load, const Response& response,
                                 double factor) {
  std::vector<Turn> turns;
  const std::vector<LoadCase> own = loads_by_member(frame, load);
  for (int m = 0; m < static_cast<int>(frame.members.size()); ++m) {
    const Member& member = frame.members[static_cast<std::size_t>(m)];
    const Section& s = frame.sections[static_cast<std::size_t>(member.section)];
    const Material& material = frame.materials[static_cast<std::size_t>(member.material)];
    double thrust = 0, moment = 0;
    for (const double xi : {0.0, 0.5, 1.0}) {
      const Resultants r = resultants_at(frame, own[static_cast<std::size_t>(m)], response, m, xi);
      thrust = std::max(thrust, -r.N);
      moment = std::max({moment, std::abs(r.My), std::abs(r.Mz)});
    }
    const double length = member_length(frame, m), weak = material.E * std::min(s.Iy, s.Iz);
    Turn turn;
    turn.bending = std::sqrt(factor * thrust / weak) * length;
    turn.twist = factor * moment / std::sqrt(weak * material.G * s.J) * length;
    turns.push_back(turn);
  }
  return turns;
}

}  // namespace

InsideModes modes_inside(const Frame& frame, int count, const InsideLimits& limits) {
  InsideModes out;
  std::vector<int> pieces = first_pieces(frame, limits);
  out.divided = divide(frame, pieces);
  out.modes = natural_modes(out.divided.frame, count);
  if (out.modes.empty()) return out;
  const std::vector<int> coarse = pieces;
  pieces = pieces_for(vibration_turns(frame, out.modes.back().frequency), limits);
  if (pieces != coarse) {
    out.divided = divide(frame, pieces);
    out.modes = natural_modes(out.divided.frame, count);
  }
  out.most_pieces = *std::max_element(pieces.begin(), pieces.end());
  if (!out.modes.empty())
    out.error = largest_error(vibration_turns(frame, out.modes.back().frequency), pieces);
  return out;
}

InsideBuckling buckling_inside(const Frame& frame, const LoadCase& load, int count, double greatest_factor,
                               const InsideLimits& limits) {
  InsideBuckling out;
  std::vector<int> pieces = first_pieces(frame, limits);
  const auto solve = [&] {
    out.divided = divide(frame, pieces);
    out.load = divide(out.divided, load);
    out.modes = buckling_modes(out.divided.frame, out.load, count, {}, greatest_factor);
  };
  solve();
  if (out.modes.empty()) return out;
  const Response response = StaticSolver(frame).solve(load);
  const std::vector<int> coarse = pieces;
  pieces = pieces_for(buckling_turns(frame, load, response, out.modes.back().factor), limits);
  if (pieces != coarse) solve();
  out.most_pieces = *std::max_element(pieces.begin(), pieces.end());
  if (!out.modes.empty())
    out.error = largest_error(buckling_turns(frame, load, response, out.modes.back().factor), pieces);
  return out;
}

}  // namespace focalframe::fem
