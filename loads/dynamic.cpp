#include "loads/dynamic.h"

#include <algorithm>
#include <cmath>
#include <numbers>
#include <stdexcept>

#include "loads/number_text.h"

namespace focalframe::loads {

namespace {

constexpr double averaging = 600;  // s, the period the peak belongs to
constexpr double least_crossing = 0.08, least_peak = 3;

void require_positive(const char* what, double value) {
  if (!(value > 0))
    throw std::invalid_argument(std::string(what) + " must be > 0, found " + number_text(value));
}

}  // namespace

double spectral_density(double f) { return 6.8 * f / std::pow(1 + 10.2 * f, 5.0 / 3); }

double aerodynamic_admittance(double eta) {
  // The closed form loses all digits near 0; its series is 1 - 2 eta / 3 + eta^2 / 3.
  if (eta < 1e-3) return 1 - 2 * eta / 3 + eta * eta / 3;
  return 1 / eta - (1 - std::exp(-2 * eta)) / (2 * eta * eta);
}

double air_damping(const AirDamping& in) {
  require_positive("frequency", in.frequency);
  require_positive("mass per length", in.mass_per_length);
  return in.force_coefficient * in.density * in.width * in.mean_speed /
         (2 * in.frequency * in.mass_per_length);
}

DynamicFactors dynamic_factors(const DynamicInput& in) {
  require_positive("mean speed", in.mean_speed);
  require_positive("turbulence intensity", in.turbulence);
  require_positive("length scale", in.length_scale);
  require_positive("frequency", in.frequency);
  require_positive("logarithmic decrement", in.log_decrement);
  if (!(in.width >= 0 && in.height >= 0)) throw std::invalid_argument("gathered lengths must be >= 0");

  DynamicFactors out;
  const auto push = [&out](const char* what, double value, const char* unit, const std::string& how) {
    out.chain.push_back({what, value, unit, how});
    return value;
  };
  const double L = in.length_scale, Iv = in.turbulence;
  out.background2 = push("background B^2", 1 / (1 + 0.9 * std::pow((in.width + in.height) / L, 0.63)), "-",
                         "1 / (1 + 0.9 ((b + h) / L)^0.63), b + h = " + number_text(in.width + in.height) +
                             " m, L = " + number_text(L) + " m (EN 1991-1-4, B.2)");
  const double f = push("f_L", in.frequency * L / in.mean_speed, "-",
                        "n L / v_m = " + number_text(in.frequency) + " Hz x " + number_text(L) + " m / " +
                            number_text(in.mean_speed) + " m/s");
  const double S = push("spectral density S_L", spectral_density(f), "-", "6.8 f_L / (1 + 10.2 f_L)^(5/3)");
  const auto admittance = [&](const char* what, double length) {
    const double eta = 4.6 * length * f / L;
    return push(what, aerodynamic_admittance(eta), "-",
                "1/eta - (1 - exp(-2 eta)) / (2 eta^2), eta = 4.6 x " + number_text(length) +
                    " m x f_L / L = " + number_text(eta));
  };
  const double Rh = admittance("admittance R_h", in.height), Rb = admittance("admittance R_b", in.width);
  const double pi = std::numbers::pi;
  out.resonance2 = push("resonance R^2", pi * pi * S * Rh * Rb / (2 * in.log_decrement), "-",
                        "pi^2 S_L R_h R_b / (2 delta), delta = " + number_text(in.log_decrement));
  const double both = out.background2 + out.resonance2;
  out.crossing =
      push("up-crossing frequency", std::max(least_crossing, in.frequency * std::sqrt(out.resonance2 / both)),
           "Hz", "n sqrt(R^2 / (B^2 + R^2)), at least 0.08 Hz");
  const double root = std::sqrt(2 * std::log(out.crossing * averaging));
  out.peak = push("peak factor k_p", std::max(least_peak, root + 0.6 / root), "-",
                  "sqrt(2 ln(nu 600 s)) + 0.6 / that root, at least 3");
  const double B = std::sqrt(out.background2);
  out.size = push("size factor c_s", (1 + 7 * Iv * B) / (1 + 7 * Iv), "-",
                  "(1 + 7 Iv B) / (1 + 7 Iv), Iv = " + number_text(Iv));
  out.dynamic = push("dynamic factor c_d", (1 + 2 * out.peak * Iv * std::sqrt(both)) / (1 + 7 * Iv * B), "-",
                     "(1 + 2 k_p Iv sqrt(B^2 + R^2)) / (1 + 7 Iv B) (EN 1991-1-4, 6.3)");
  return out;
}

}  // namespace focalframe::loads
