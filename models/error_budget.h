#pragma once

/// Who may spend how many milliradians: errors stated in many ways, brought to one.
///
/// The one way is the 1-D rms of the reflected beam. A slope error of the mirror's normal counts twice; an
/// error stated radially (in a plane, as the distance from the centre) is sqrt 2 times its 1-D value.

#include <limits>
#include <span>
#include <string>
#include <vector>

#include "models/intercept.h"

namespace focalframe::models {

enum class ErrorOf { normal, beam };       ///< what turns by the angle
enum class ErrorMeasure { line, radial };  ///< 1-D rms, or rms distance in the plane
enum class ErrorNature { random, systematic };

struct BudgetLine {
  std::string name;
  double rms = std::numeric_limits<double>::quiet_NaN();  ///< as stated [rad]
  ErrorOf of = ErrorOf::normal;
  ErrorMeasure measure = ErrorMeasure::line;
  ErrorNature nature = ErrorNature::random;
};

/// 1-D rms of the beam that this line makes [rad].
double beam_rms(const BudgetLine& line);

struct ErrorBudget {
  std::vector<BudgetLine> lines;
  double random = std::numeric_limits<double>::quiet_NaN();  ///< random lines added in squares [rad]
  double systematic =
      std::numeric_limits<double>::quiet_NaN();  ///< rms of the others, were they independent [rad]
};

/// Random errors add in squares. Systematic ones belong in the miss of every ray; their sum in squares is
/// given for comparison only and never mixed with the random ones.
ErrorBudget add_up(std::vector<BudgetLine> lines);

/// The random lines behind an intercept: sun once, slope, scatter, tracking.
std::vector<BudgetLine> budget_lines(const BeamError& error);

/// Greatest common aim error that keeps at least `least` of the light, on top of the misses given [rad]; 0
/// when even none keeps it. Both signs are tried, the worse counts. `aim_lever`: the aim's part of the miss
/// per sample or per row [m/rad] (MissTerms::aim). For a mirror without a drive this is how far the sun may
/// move on before it is turned again, one degree in four minutes.
double aim_tolerance(const TroughIntercept& intercept, std::span<const double> miss,
                     std::span<const double> aim_lever, std::span<const double> weight, double least);

}  // namespace focalframe::models
