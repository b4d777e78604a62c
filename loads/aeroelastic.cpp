#include "loads/aeroelastic.h"

#include <cmath>
#include <limits>
#include <numbers>

namespace focalframe::loads {

double scruton_number(const BluffBody& body) {
  return 2 * body.log_decrement * body.mass_per_length / (body.density * body.width * body.width);
}

double vortex_speed(const BluffBody& body, double strouhal) { return body.width * body.frequency / strouhal; }

double vortex_amplitude(const BluffBody& body, const VortexFactors& factors) {
  return body.width * factors.mode_shape * factors.correlation * factors.lateral_force /
         (factors.strouhal * factors.strouhal * scruton_number(body));
}

double cantilever_correlation(const CorrelationLength& in) {
  const double share = in.correlated / in.slenderness;
  return 3 * share * (1 - share + share * share / 3);
}

double galloping_speed(const BluffBody& body, double galloping_factor) {
  return 2 * scruton_number(body) * body.frequency * body.width / galloping_factor;
}

double divergence_speed(const TwistingSection& section, double stiffness_per_length) {
  if (section.moment_slope <= 0) return std::numeric_limits<double>::infinity();
  return std::sqrt(2 * stiffness_per_length /
                   (section.density * section.width * section.width * section.moment_slope));
}

double divergence_speed(const TwistingSection& section, const TorqueTube& tube) {
  // Lowest mode of GJ theta'' + K theta = 0, theta(0) = 0, theta'(L) = 0: as a spring of GJ (pi / 2L)^2.
  const double wave = std::numbers::pi / (2 * tube.length);
  return divergence_speed(section, tube.torsional_stiffness * wave * wave);
}

double end_twist(const TwistingSection& section, const TorqueTube& tube, const TwistLoad& load) {
  const double L = tube.length, GJ = tube.torsional_stiffness;
  const double K = load.pressure * section.width * section.width * section.moment_slope;
  const double x = L * std::sqrt(std::abs(K) / GJ);
  if (x < 1e-4) return load.torque_per_length * L * L / (2 * GJ);
  if (K < 0) return load.torque_per_length / K * (1 / std::cosh(x) - 1);
  if (x >= std::numbers::pi / 2) return std::numeric_limits<double>::quiet_NaN();
  return load.torque_per_length / K * (1 / std::cos(x) - 1);
}

}  // namespace focalframe::loads
