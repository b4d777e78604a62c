#pragma once

/// What a check of a dish finds. Plain values, SI; everything a report prints is in here.

#include <string>
#include <vector>

#include "models/assessment.h"
#include "models/dish_limits.h"
#include "models/dish_optics_check.h"
#include "models/dish_strength.h"

namespace focalframe::models {

/// Optics of one elevation under one wind (or none).
struct DishOpticalRow {
  DishState state;
  bool calm = false;  ///< weight only
  Spread spread = Spread::linear;
  DishOptical result;
};

/// What the weight does at one elevation, against the set-true pose.
struct GravityPoint {
  double elevation = not_given;
  double surface = not_given;                          ///< residual slope [rad] or half path rms [m]
  Eigen::Vector2d pointing = Eigen::Vector2d::Zero();  ///< about x and y [rad]
  double focus_along = not_given;                      ///< receiver or feed off the best focus [m]
};

/// How the weight's error goes over elevation and what a pointing table can do about it.
struct GravityMap {
  std::vector<GravityPoint> points;
  double worst = not_given;          ///< greatest surface error while tracking, set true as the design says
  double best_set = not_given;       ///< elevation at which setting it true leaves the least of that [rad]
  double worst_at_best = not_given;  ///< what is left then
  /// Up and down pointing by weight as a + b cos e + c sin e [rad], and the rms that these terms leave.
  double offset = not_given, sag_cos = not_given, sag_sin = not_given, left_over = not_given;
};

/// Snow, ice water or rain in the parked dish.
struct DishBowl {
  double water = not_given;              ///< held with blocked drains at the stow pose [m^3]
  double water_force = not_given;        ///< its weight [N]
  double water_stress_used = not_given;  ///< greatest share of yield under weight and water, unfactored [-]
  std::string water_part;
};

struct DishAssessment {
  Assessment
      common;  ///< name, table, winds, criteria, verdict, guesses, proof, remarks; trough parts stay empty
  bool radio = false, slewing = false;
  double diameter = not_given, focal_length = not_given, rim_angle = not_given;
  double surface_area = not_given;
  double mass_per_area = not_given;  ///< reflector with feed, without counterweight, per aperture [kg/m^2]
  double counterweight = 0;          ///< [kg]
  double yoke_mass = not_given, base_mass = not_given;
  double centre_behind_axis = not_given;  ///< along z, > 0 behind the elevation axis [m]
  double weight_torque = not_given;       ///< about the elevation axis with the dish facing the horizon [N m]
  double frequency = not_given;           ///< lowest, at the stow pose [Hz]
  double beamwidth = not_given, built_db = not_given, wavelength = not_given;
  std::vector<DishOpticalRow> optics;
  int worst = -1;  ///< index into optics: least light or greatest loss
  GravityMap gravity;
  DishBowl bowl;
  DishStrengthResult strength;
  std::vector<DishLimit>
      parking;               ///< greatest gusts at rest by elevation and direction; empty = not asked for
  StowSearch stow;           ///< from it
  double residual_side = 0;  ///< greatest in-plane coefficient left to the hub force, any state [-]
};

}  // namespace focalframe::models
