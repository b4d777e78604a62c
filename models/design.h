#pragma once

/// What a user says about a collector: plain values, SI, in the words of the design file.
///
/// One struct per element of the file, one member per attribute. NaN, 0 for counts, and empty text mean "not
/// given"; defaults that are not NaN are the ones a user gets by leaving the attribute out, and every one of
/// them is listed in models/schema.cpp with the reason for it. Nothing here is computed.

#include <limits>
#include <map>
#include <string>
#include <vector>

#include "loads/combination.h"

namespace focalframe::models {

inline constexpr double not_given = std::numeric_limits<double>::quiet_NaN();

/// How a value is known: "measured", "drawing", "catalogue", "agreed", "guess"; empty = not said.
using Basis = std::string;

/// A profile, by shape word: round-tube (outside-diameter, wall), square-tube (side, wall), rectangular-tube
/// (depth, width, wall; depth stands upright), round-bar (outside-diameter), flat (depth, thickness), angle
/// (depth = upright leg, width = the other one, thickness), channel (depth along the web, width of the
/// flanges, web, flange), properties (depth and the values below).
struct ProfileInput {
  std::string shape, material;
  double outside_diameter = not_given, side = not_given, depth = not_given, width = not_given;  ///< [m]
  double wall = not_given, thickness = not_given, web = not_given, flange = not_given;          ///< [m]
  double outer_radius = not_given, inner_radius = not_given;  ///< corners of tubes [m]; NaN = EN 10219-2
  double root_radius = not_given, toe_radius = not_given;     ///< of an angle [m]; NaN = sharp
  double area = not_given, Iy = not_given, Iz = not_given, J = not_given;  ///< [m^2], [m^4]
  double shear_area_y = not_given, shear_area_z = not_given;               ///< [m^2]; NaN = rigid
  double Wy = not_given, Wz = not_given, Wt = not_given;                   ///< [m^3]
  double turned = 0;  ///< about the member's own axis, from where its depth stands upright [rad]
};

struct ParabolaInput {
  double aperture = not_given;                         ///< full width across the trough [m]
  double focal_length = not_given, depth = not_given;  ///< one of them, or both if they agree [m]
};

struct RowInput {
  int modules = 0;                       ///< between two neighbouring pylons each
  double module_length = not_given;      ///< pylon to pylon [m]
  std::string coupling = "torque-only";  ///< | "continuous"
  int drive_after_module = -1;           ///< 0 = at the row's first end; -1 = the middle
  double row_azimuth = not_given;        ///< bearing of +X [rad]
  double axis_height = not_given;        ///< rotation axis above ground [m]
  double axis_to_vertex = not_given;     ///< rotation axis below (behind) the mirror vertex [m]
  std::string axis_word;  ///< "balanced": through the centre of gravity; then axis_to_vertex is NaN
  double tube_to_vertex = not_given;  ///< tube centre below the vertex [m]
  double tube_to_mirror = not_given;  ///< instead: gap between tube skin and mirror at the vertex [m]
  double end_gap = not_given;  ///< first rib from the pylon centre line [m]; default module length / 50
};

/// Shape "lattice-box": depth and width between the chords' centre lines; chords, webs and the three words.
struct TubeInput {
  ProfileInput profile;
  ProfileInput chords, webs;
  int panels_per_bay = 1;          ///< lattice panels between two ribs
  std::string bracing = "zigzag";  ///< one diagonal in every panel of a face | "cross": two
};

/// Kind "plate": thickness, depths, material; "bent": a bar along the mirror; "truss": depths between the
/// chords' centre lines, chords, webs, panels.
struct RibsInput {
  std::string kind = "plate";
  int per_module = 0;  ///< each rib is a pair of arms
  double thickness = not_given, depth_at_tube = not_given, depth_at_tip = not_given;  ///< [m]
  std::string lower_edge = "follows";  ///< the mirror, with a straight taper | "straight"
  std::string material;
  ProfileInput bar, chords, webs;
  int panels = 0;       ///< of one arm of a truss
  double hub_mass = 0;  ///< plates and pads where a rib meets the tube, each rib [kg]
  int elements = 10;    ///< beam elements along one arm, at least
};

struct PurlinsInput {
  int count = 0;  ///< over both sides together, even
  ProfileInput profile;
};

struct EndPlatesInput {
  double diameter = not_given, thickness = not_given;  ///< [m], only for the mass when mass is not given
  double mass = not_given;                             ///< each [kg]
  double twist_stiffness = not_given;    ///< of the joint between two modules [N m/rad]; NaN = rigid
  double bending_stiffness = not_given;  ///< of the joint, coupling "continuous" only [N m/rad]; NaN = rigid
  double play = 0;                       ///< full width of the play in each joint between modules [rad]
  double torque_capacity = not_given;    ///< design torque the joint between two modules can pass [N m]
};

struct MirrorInput {
  std::string kind = "sheet";    ///< | "facets"
  double thickness = not_given;  ///< [m]
  std::string material;
  double mass = not_given;        ///< instead of thickness x density [kg/m^2]
  std::string fixed_to = "ribs";  ///< | "purlins"
  double pad_height = 0;          ///< facets: mirror back above what it stands on [m]
  double pad_mass = 0;            ///< facets: pads and brackets [kg/m^2]
  bool sheet_braces_ribs = false;
  int facets_across = 0;                 ///< facets: panels from rim to rim, even; 0 = one on each side
  double pad_pitch = not_given;          ///< facets: pads along the row [m]
  double bending_stiffness = not_given;  ///< of the skin per width, instead of thickness, material [N m]
};

struct SleeveInput {
  double outside_diameter = not_given, wall = not_given;  ///< [m]
  std::string material;
};

struct PostsInput {
  int per_module = 0;
  ProfileInput profile;
  std::string stand_on = "tube";
};

struct ReceiverInput {
  double outside_diameter = not_given, wall = not_given;  ///< [m]
  std::string material;
  std::string filled_with;          ///< water | oil | salt | nothing
  double fill_density = not_given;  ///< overrides the word [kg/m^3]
  std::string catches = "tube";     ///< what the light must meet: | "strip"
  double strip_width = not_given;   ///< of a flat target in the focus that faces the mirror [m]
  SleeveInput sleeve;
  PostsInput posts;
};

struct CounterweightsInput {
  int per_module = 0;
  double mass = not_given;         ///< each [kg]
  double behind_tube = not_given;  ///< centre of mass behind the tube's centre, away from the mirror [m]
};

struct FootingInput {
  double sideways = not_given, along_row = not_given, upright = not_given;  ///< [N/m]; infinity = rigid
  double rocking = not_given;               ///< about both horizontal axes [N m/rad]; infinity = rigid
  double twisting = not_given;              ///< about the vertical [N m/rad]; NaN = as rocking
  double overturning_capacity = not_given;  ///< design moment about the row's direction at ground [N m]
  double uplift_capacity = not_given;       ///< design vertical pull [N]
};

struct PylonsInput {
  std::string at = "every joint";
  ProfileInput profile;
  double head_mass = 0;  ///< bearing and head plate, each [kg]
  FootingInput footing;
};

struct DriveInput {
  double moving_torque = not_given, holding_torque = not_given;  ///< rated [N m]
  double stiffness = not_given;                                  ///< [N m/rad]; infinity = rigid
  double play = 0;                                               ///< full width [rad]
  double turns_from = not_given, turns_to = not_given;           ///< elevation range [rad]
  double mass = 0;                                               ///< on the drive pylon's head [kg]
  double friction = 0;                                           ///< torque of all bearings of the row [N m]
};

struct SensorInput {
  std::string kind = "inclinometer";  ///< | "encoder" | "sun"
  std::string at = "tube beside the drive";
  int module = 0;  ///< sits on this module instead, counted from the row's first end; 0 = none named
  std::string correction = "sensor";  ///< | "none" | "row-mean"
};

struct SiteInput {
  double altitude = not_given;  ///< [m]
  std::string terrain;          ///< "EN 0" .. "EN IV", "ASCE B|C|D", "power law"
  double orography = 1.0;
  double power_exponent = not_given, turbulence = not_given;
  double air_density = not_given, temperature = not_given, pressure = not_given;
  int asce_edition = 16;
};

/// One stated wind; averaging in seconds.
struct WindStateInput {
  bool given = false;
  double speed = not_given, averaging = not_given, height = not_given, pressure = not_given;
  std::string over = "open country";  ///< | "site": measured over the site's own ground
  double return_period = not_given;   ///< the stated speed is that of 50 years, this one is wanted [years]
};

struct YearInput {
  bool given = false;
  std::string record;  ///< path of an hourly record, instead of a Weibull distribution
  double weibull_scale = not_given, weibull_shape = not_given, averaging = not_given, height = not_given;
  std::string hours;  ///< "daylight" | "all"
};

struct WindInput {
  std::string table;  ///< name of a shipped table or path of a user's
  std::string zone;   ///< no default
  WindStateInput operate, turning, stow, stuck, unfinished;
  YearInput year;
  double dynamic_factor = 1.0;
  std::string
      dynamic_word;       ///< "EN Annex B": from the first torsional frequency; then the number is not used
  double damping = 0.05;  ///< logarithmic decrement of the structure, for EN Annex B [-]
  std::string map;        ///< "service" | "ultimate": level of the stated speeds; empty = not said
  bool altitude_in_speed = false;   ///< the stated speeds are already reduced for the site's altitude
  bool faces_open_ground = false;   ///< no row stands upwind
  bool along_row = true;            ///< UNFINISHED also in wind along the row
  bool size_factor = true;          ///< EN size factor for drive and foundation
  double moment_slope = not_given;  ///< overrides dCm/dp of the table [1/rad]
};

/// Drag of what the mirror does not hide; NaN = by the shape of the profile.
struct BareMembersInput {
  double tube = not_given, ribs = 2.0, receiver = 1.2, posts = not_given, pylons = not_given;  ///< [-]
  std::string shielding = "mirror";  ///< | "none" | "all": how far the mirror shelters tube and ribs
  std::string back = "ribbed";       ///< | "smooth" | "rough": back of the mirror in wind along the row
};

struct SnowInput {
  double on_ground = not_given;  ///< characteristic load on level ground [Pa]
  std::string back = "sheds";    ///< | "holds"
};

struct WaterInput {
  std::string drains;  ///< "open" | "blocked": then a face-up mirror holds water up to its lower rim
};

struct IceInput {
  double thickness = not_given;  ///< [m]
  double wind_share = 0.4;       ///< of the state's velocity pressure that blows on the iced collector [-]
};

struct TemperatureInput {
  double set_at = not_given, least = not_given, most = not_given;  ///< of the frame [K]
  double across_frame = 0;         ///< mirror side of tube and ribs warmer than their back by [K]
  double across_receiver = 0;      ///< sunlit side of the receiver warmer than its other side by [K]
  double receiver_at = not_given;  ///< hottest mean temperature of the receiver [K]
};

struct EarthquakeInput {
  std::string code = "EN 1998";               ///< | "ASCE 7"
  double ground_acceleration = not_given;     ///< EN: a_g, importance included [m/s^2]
  std::string ground = "B";                   ///< EN: A .. E
  double behaviour = 1.5;                     ///< EN: q [-]
  double s_ds = not_given, s_d1 = not_given;  ///< ASCE [-]
  double response = 1.25, importance = 1;     ///< ASCE: R, I_e [-]
  double period = not_given;                  ///< of the first mode [s]; NaN: the worst of all periods
};

struct MaintenanceInput {
  double load = not_given;  ///< a person with tools, a ladder, a washer [N]
  double at = not_given;    ///< elevation of the service pose [rad]
};

struct ErectionInput {
  double at = not_given;         ///< elevation in which the unfinished row is left [rad]
  std::string mirrors = "none";  ///< | "one side" | "all"
};

struct AnemometerInput {
  double height = not_given, averaging = not_given, tolerance = 0;
  std::string place = "free";  ///< | "among-rows"
};

/// Steps from the row's limit to the trigger that the user settles himself; NaN = models/trigger.h chooses.
struct TriggerInput {
  std::string from = "safety";  ///< | "light": stow already when the light falls below its limit
  double height_factor = not_given, shelter = not_given, gust_factor = not_given;  ///< [-]
  double growth = not_given;  ///< of the wind while it turns, > 1 [-]
  double second = not_given;  ///< instantaneous trigger over the gust that the row bears [-]
  double resume = not_given;  ///< resume speed over the trigger [-]
  double dwell = not_given;   ///< below it before it resumes [s]
};

struct OperationInput {
  double track_from = not_given, track_to = not_given;  ///< elevation [rad]
  double stow_at = not_given, stow_within = not_given;  ///< [rad]
  double turning_rate = not_given;                      ///< [rad/s]
  std::string turned_by = "drive";                      ///< | "hand"
  double notice = not_given;  ///< by hand: from the wind rising to someone at the crank [s]
  double push = not_given, crank = not_given, gear = 1;  ///< by hand [N], [m], crank turns per row turn [-]
  AnemometerInput anemometer;
  TriggerInput trigger;
};

struct OpticsInput {
  double set_true = not_given;         ///< elevation at which the panels are set on the loaded frame [rad]
  std::string set_true_word;           ///< "unloaded"; then set_true is NaN
  double sun = 2.6e-3;                 ///< rms of a Gaussian sun [rad]
  std::string sun_shape = "gaussian";  ///< | "pillbox" | "buie" | "table"
  std::string sun_table;               ///< "0 mrad 1, 4 mrad 0.9, ...": angle from the middle, radiance
  double circumsolar_ratio = not_given;
  double workshop_slope = not_given;  ///< rms of the mirror normal, transverse [rad]
  double mirror_scatter = 0;          ///< rms of the reflected ray [rad]
  double tracking = 0;                ///< rms of the collector's aim [rad]
  double incidence = 0;               ///< longitudinal incidence angle the light is judged at [rad]
  double wind_averaging = 600;        ///< mean wind the light is judged in [s]
};

/// NaN or empty = reported, not judged.
struct LimitsInput {
  double intercept = not_given;       ///< least light caught, row mean [-]
  double lost_to_frame = not_given;   ///< most light lost to the bent frame, against undeformed [-]
  double slope = not_given;           ///< residual slope rms [rad]
  double twist = not_given;           ///< greatest module twist against the sensor [rad]
  double receiver_shift = not_given;  ///< [m]
  double re_aim = not_given;          ///< shortest time between two turns by hand [s]
  std::string strength;  ///< set of combinations: "EN 1990", "ASCE 7", a shipped name, a path; "" ; or
  double strength_factor = not_given;  ///< plain factor on yield, unfactored actions [-]
};

struct AcceptInput {
  std::string rule, because;
};

struct TroughDesign {
  std::string name;
  ParabolaInput parabola;
  RowInput row;
  TubeInput tube;
  RibsInput ribs;
  PurlinsInput purlins;
  EndPlatesInput end_plates;
  MirrorInput mirror;
  ReceiverInput receiver;
  CounterweightsInput counterweights;
  PylonsInput pylons;
  DriveInput drive;
  SensorInput sensor;
  SiteInput site;
  WindInput wind;
  BareMembersInput bare_members;
  SnowInput snow;
  WaterInput water;
  IceInput ice;
  TemperatureInput temperature;
  EarthquakeInput earthquake;
  MaintenanceInput maintenance;
  ErectionInput erection;
  OperationInput operation;
  OpticsInput optics;
  LimitsInput limits;
  std::vector<AcceptInput> accepted;
  loads::CombinationSet combinations;  ///< what limits.strength names; empty when it names none

  std::map<std::string, Basis> basis;  ///< element path ("receiver/posts") -> how it is known
};

}  // namespace focalframe::models
