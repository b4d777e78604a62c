#pragma once

/// What a user says about a dish, beyond what it shares with a trough: plain values, SI, in the words of the
/// design file. Conventions as in models/design.h: NaN, 0 for counts and empty text mean "not given".

#include <string>
#include <vector>

#include "models/design.h"

namespace focalframe::models {

struct HubInput {
  std::string kind = "plate";   ///< one or two discs | "ring": a hoop held by the cradle
  double diameter = not_given;  ///< ribs begin here [m]
  int plates = 2;               ///< plate: a disc behind the ribs, or one on each side of them
  ProfileInput profile;         ///< ring: its section; plate: thickness and material
};

struct DishRibsInput {
  int count = 0;
  std::string kind;                                           ///< "truss" | "plate" | "tube"
  double depth_at_hub = not_given, depth_at_rim = not_given;  ///< truss, plate [m]
  int panels = 0;                                             ///< truss: bays between hub and rim
  int elements = 12;                                          ///< beam elements along one rib, at least
  ProfileInput profile;       ///< tube: its section; plate: thickness; material
  ProfileInput chords, webs;  ///< truss; material of the ribs when left out
};

struct RingInput {
  double radius = not_given;  ///< [m]
  std::string at = "front";   ///< | "back": which chord of a truss it ties
  ProfileInput profile;
};

/// Pairs of crossing diagonals between two rings.
struct BracingInput {
  std::string from, to;          ///< "hub" or "ring 1", "ring 2", ...
  std::string in = "every bay";  ///< | "every second bay"
  ProfileInput profile;
};

struct SurfaceInput {
  std::string kind = "sheet";    ///< | "mesh" | "petals"
  double solidity = 1;           ///< solid share of a mesh [-]
  double mass = not_given;       ///< [kg/m^2]; or
  double thickness = not_given;  ///< [m] with a material
  std::string material;
  std::string fixed_to = "ribs and rings";  ///< | "ribs"
  double pad_height = 0;                    ///< back of the skin above the ribs [m]
  double hole = 0;                          ///< diameter of the opening at the vertex [m]
};

struct LegsInput {
  int count = 0;
  std::string stand_on = "hub";  ///< | "ring N"
  ProfileInput profile;
};

/// Receiver of a solar dish, feed of an antenna.
struct FeedInput {
  double mass = not_given;  ///< [kg]
  std::string centre_word = "focus";
  double centre_of_mass = not_given;  ///< instead: beyond the focus, away from the dish [m]
  double blocks = 0;                  ///< diameter of its shadow, also what the wind strikes [m]
  double aperture = not_given;        ///< solar: diameter of the round opening in the focal plane [m]
  LegsInput legs;
  ProfileInput boom;  ///< instead of legs: one mast from the hub
};

struct DishWeightInput {
  double mass = not_given, behind_axis = not_given;  ///< [kg], [m]
};

struct ElevationAxisInput {
  double bearing_spread = not_given;  ///< between the two bearings [m]
  double friction = 0;                ///< torque of both bearings [N m]
  ProfileInput cradle;                ///< between hub and axis; rigid when left out
};

/// A pin by its place with the dish looking at the horizon, from the elevation axis [m].
struct PinInput {
  double below = not_given, front = not_given;
};

struct ActuatorInput {
  double stiffness = not_given;                      ///< rod, lugs and oil or screw together [N/m]
  double push = not_given, hold = not_given;         ///< rated force moving, at rest [N]
  double shortest = not_given, longest = not_given;  ///< pin to pin [m]
  double rod_diameter = not_given;                   ///< for buckling at full stroke [m]
  double friction = 0;                               ///< back-driving needs more than this [N]
  double play = 0;                                   ///< along the rod, full width [m]
  PinInput dish_pin, stand_pin;
};

struct SlewingDriveInput {
  double moving_torque = not_given, holding_torque = not_given;  ///< [N m]
  double stiffness = not_given;                                  ///< [N m/rad]
  double play = 0;                                               ///< full width [rad]
  double mass = 0;                                               ///< [kg]
};

struct YokeInput {
  ProfileInput profile;
  double height = not_given;  ///< azimuth bearing to elevation axis [m]
  double mass = 0;            ///< gear, motors, on the azimuth bearing [kg]
};

struct AzimuthInput {
  double moving_torque = not_given, holding_torque = not_given;    ///< [N m]
  double twist_stiffness = not_given, tilt_stiffness = not_given;  ///< drive; bearing [N m/rad]
  double play = 0;                                                 ///< full width [rad]
  double tilt = 0;  ///< of the azimuth axis from the vertical towards the back: polar mount [rad]
};

struct PedestalInput {
  std::string kind = "post";  ///< | "legs": a truss base
  ProfileInput profile;
  int legs = 3;                    ///< kind legs
  double foot_radius = not_given;  ///< kind legs: feet on this circle [m]
  double mass = 0;                 ///< of the head [kg]
  FootingInput footing;            ///< of each foot
};

struct RadioInput {
  bool given = false;
  double set_true = not_given;          ///< elevation [rad]
  std::string set_true_word;            ///< "unloaded"
  double frequency = not_given;         ///< [Hz]
  double surface_as_built = not_given;  ///< rms half path error before any load [m]
  double edge_taper = 10;               ///< illumination at the rim below the middle [dB]
};

struct DishLimitsInput {
  double gain_loss = not_given;  ///< [dB]
  double pointing = not_given;   ///< [beamwidths]
  double aim = not_given;        ///< solar: turn of the focus seen from the vertex [rad]
};

struct DishInput {
  HubInput hub;
  DishRibsInput ribs;
  std::vector<RingInput> rings;
  std::vector<BracingInput> bracing;
  SurfaceInput surface;
  FeedInput feed;
  DishWeightInput counterweight;
  ElevationAxisInput axis;
  ActuatorInput actuator;
  SlewingDriveInput slewing;
  YokeInput yoke;
  AzimuthInput azimuth;
  PedestalInput pedestal;
  std::string mesh_relief = "none";  ///< | "solidity": force times the solid share
  std::string learned = "gravity";   ///< what the pointing table takes out: "gravity" | "none"
  RadioInput radio;
  DishLimitsInput limits;
};

/// A dish shares parabola (aperture = diameter), axis height and offset, turning range, site, winds,
/// operation, optics and limits with a trough; its own parts lie in `dish`.
struct DishDesign : TroughDesign {
  DishInput dish;
};

}  // namespace focalframe::models
