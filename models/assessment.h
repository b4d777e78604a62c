#pragma once

/// What a check of a trough finds. Plain values, SI; everything a report prints is in here.

#include <array>
#include <string>
#include <vector>

#include "loads/wind.h"
#include "models/action_loads.h"
#include "models/optical_maps.h"
#include "models/optics_check.h"
#include "models/optics_study.h"
#include "models/rigging.h"
#include "models/row_torsion.h"
#include "models/row_trace.h"
#include "models/schema.h"
#include "models/states.h"
#include "models/strength_check.h"
#include "models/wind_chain.h"

namespace focalframe::models {

enum class Question { focus, together, drive, ground };  ///< the four questions of the summary
enum class Answer { yes, no, not_judged };
enum class Verdict { holds, does_not_hold, holds_as_far_as_judged };

struct Criterion {
  Question question = Question::focus;
  std::string key;   ///< short word: "intercept", "slope", "moving-torque" ...
  std::string name;  ///< as printed
  Quantity quantity = Quantity::none;
  double value = not_given;
  double limit = not_given;  ///< NaN = reported, not judged
  bool at_least = false;     ///< true: value must not fall below the limit
  std::string decided_in;    ///< governing state in words
  std::string note;          ///< averaging, pattern, member ...
  bool judged() const { return limit == limit; }
  bool met() const { return !judged() || (at_least ? value >= limit : value <= limit); }
  double used() const { return at_least ? limit / value : value / limit; }  ///< share of the limit
};

/// Optics of one elevation under one wind (or none).
struct OpticalRow {
  State state;
  bool calm = false;  ///< weight only
  Spread spread = Spread::linear;
  OpticalResult result;
  RowTrace trace;    ///< only when AssessOptions asks for rays
  std::string also;  ///< what else acts: "hottest frame", "friction +"; empty = nothing
};

/// Numbers that show the calculation is sound.
struct Proof {
  double wind_force = not_given;        ///< sum of the nodal wind forces in the governing state [N]
  double q_area_c = not_given;          ///< q A C of the same state [N]
  double load_error = not_given;        ///< greatest relative difference of forces and moment, any state [-]
  double balance = not_given;           ///< loads and reactions add up to this share of the loads [-]
  double residual = not_given;          ///< of the factorised system [-]
  double condition = not_given;         ///< estimate, scaled stiffness [-]
  double slope_change = not_given;      ///< of the residual slope with halved elements [-]
  double intercept_change = not_given;  ///< of the governing intercept with halved elements [-]
};

/// Other actions at one elevation, as numbers for the report.
struct ActionRow {
  double elevation = not_given;
  ActionAmounts amounts;
};

/// How the stated wind became what a kind of state is loaded with.
struct WindUse {
  StateKind kind = StateKind::operate;
  loads::WindAtHeight at_axis;
  double size_factor = not_given;
};

struct GuessFinding {
  std::string element, attribute;  ///< the guessed input
  double value = not_given, flips_at = not_given;
  Quantity quantity = Quantity::none;
  std::string text;  ///< "workshop-slope 3.0 mrad; at 2.6 the light would be enough"
};

/// A change that was tried by running the whole check again.
struct Cure {
  std::vector<std::string> changes;
  bool meets_all = false;
  int missed = 0;
  double intercept = not_given, moving_torque = not_given, mass = not_given, mass_change = not_given;
  double mirror_lost = 0;  ///< [m^2]
  std::vector<Criterion> still_missed;
};

struct Assessment {
  std::string name, table, table_title, table_confidence, table_source, zone, rule;
  double aperture = not_given, length = not_given, focal_length = not_given, rim_angle = not_given;
  double axis_to_vertex = not_given, mirror_area = not_given;
  double mass = not_given, mass_per_area = not_given;  ///< of what turns [kg], [kg/m^2]
  double stand_mass = not_given;
  double centre_below_axis =
      not_given;  ///< centre of gravity from the rotation axis along z, > 0 behind it [m]
  double weight_torque =
      not_given;  ///< of the weight about the axis with the trough facing the horizon [N m]
  double balancing_counterweight =
      not_given;                    ///< each, at the present lever, that would balance the row [kg]
  double tube_torsion = not_given;  ///< GJ of the torque tube; of a lattice box by its shear flow [N m^2]
  double undeformed = not_given;    ///< intercept of the perfect trough [-]
  double beam_rms = not_given;      ///< [rad]
  int freedoms = 0;

  Verdict verdict = Verdict::holds_as_far_as_judged;
  std::vector<Criterion> criteria;
  std::array<Answer, 4> answers{};
  int limits_judged = 0, limits_missed = 0;
  std::vector<std::string> not_judged;
  int guesses = 0;
  std::vector<GuessFinding> deciding_guesses;

  std::vector<OpticalRow> optics;
  int worst_light = -1;  ///< index into optics
  OpticsStudy study;     ///< of that row
  ApertureMaps maps;     ///< of that row, when asked for; else empty
  ReceiverMap receiver_map;
  Rigging rigging;  ///< when asked for
  StrengthResult strength;
  std::vector<WindUse> winds;
  std::vector<WindChainRow>
      wind_loads;                  ///< every asked state: gust and upper coefficients; OPERATE: mean as well
  std::vector<ActionRow> actions;  ///< empty without snow, water, ice and earthquake
  RowDynamics dynamics;            ///< only when EN Annex B was asked for
  double optics_pressure_factor = 1;  ///< on the mean velocity pressure, for the averaging asked for [-]
  std::string optics_averaging = "10 min mean";
  double receiver_expansion = not_given,
         receiver_drop = not_given;     ///< at the row's end, post drop there [m]
  double divergence_speed = not_given;  ///< of the state that comes nearest to it [m/s]
  State divergence_state;
  double row_moment_coefficient =
      not_given;  ///< greatest effective |Cm| about the axis on gust q, cs and zone in [-]
  double rated_moment_coefficient = not_given;  ///< moving rating / (gust q W^2 L) at operate [-]
  Proof proof;
  std::vector<Violation> remarks;  ///< plausibility: WARN and NOTE
  std::vector<std::string> cautions;
  std::vector<std::string> not_checked;
  std::vector<Cure> cures;
};

Answer answer_of(const std::vector<Criterion>& criteria, Question question);

}  // namespace focalframe::models
