#include "models/schema.h"

#include <algorithm>
#include <cmath>

#include "fem/units.h"
#include "models/catalogue.h"
#include "models/schema_maker.h"

namespace focalframe::models {
namespace {

using Table = std::vector<Element>;
using Q = Quantity;

const std::vector<std::string> all_shapes{"round-tube", "square-tube", "rectangular-tube", "round-bar",
                                          "flat",       "angle",       "channel",          "properties"};
const std::vector<std::string> tube_shapes{"round-tube", "square-tube", "rectangular-tube", "lattice-box",
                                           "properties"};
// Posts are hinged about a level axis, which must be one of the section's own.
const std::vector<std::string> post_shapes{"round-tube", "square-tube", "rectangular-tube", "round-bar",
                                           "flat",       "channel",     "properties"};

// A default is a number people rarely know and that matters little, or the state of a part that is simply not
// there (no play, no pads); everything that decides a verdict has none.
std::vector<std::string> material_names() {
  std::vector<std::string> names;
  for (const CatalogueMaterial& m : materials()) names.push_back(m.name);
  return names;
}

std::vector<std::string> fluid_names() {
  std::vector<std::string> names;
  for (const CatalogueFluid& f : fluids()) names.push_back(f.name);
  return names;
}

void add_shape(Table& table) {
  ElementMaker<ParabolaInput> parabola(
      table, "parabola", true, [](TroughDesign& d) -> ParabolaInput& { return d.parabola; },
      "the shape that has to stay true");
  parabola.add("aperture", Q::length, &ParabolaInput::aperture, "full width across the trough, rim to rim")
      .required()
      .between(0.1, 20);
  parabola
      .add("focal-length", Q::length, &ParabolaInput::focal_length, "vertex to focus; or give depth instead")
      .above(0, 20);
  parabola
      .add("depth", Q::length, &ParabolaInput::depth,
           "straight edge over the rims to the vertex; f = aperture^2 / (16 depth)")
      .above(0, 20);

  ElementMaker<RowInput> row(
      table, "row", true, [](TroughDesign& d) -> RowInput& { return d.row; },
      "modules on one drive and where the axes lie");
  row.add("modules", Q::count, &RowInput::modules, "modules in the row, each between two pylons")
      .required()
      .between(1, 200);
  row.add("module-length", Q::length, &RowInput::module_length, "pylon to pylon").required().between(0.3, 60);
  row.text("coupling", &RowInput::coupling, "torque-only: bending is free between modules")
      .words({"torque-only", "continuous"})
      .preset("torque-only");
  row.add("drive-after-module", Q::count, &RowInput::drive_after_module, "0 = at the row's first end")
      .between(-1, 200)
      .preset("half the modules");
  row.add("row-azimuth", Q::angle, &RowInput::row_azimuth,
          "bearing of the row's direction, from north, for wind records")
      .between(-360 * deg, 360 * deg);
  row.add("axis-height", Q::length, &RowInput::axis_height, "rotation axis above the ground")
      .required()
      .between(0.1, 100);
  row.number_or_word(
         "axis-to-vertex", Q::length, &RowInput::axis_to_vertex, "balanced", &RowInput::axis_word,
         "rotation axis behind the mirror's vertex line, or balanced: through the centre of gravity")
      .required()
      .between(-5, 5);
  row.add("tube-to-vertex", Q::length, &RowInput::tube_to_vertex,
          "tube centre behind the vertex; or give tube-to-mirror")
      .between(0, 5);
  row.add("tube-to-mirror", Q::length, &RowInput::tube_to_mirror,
          "gap from tube skin to mirror at the vertex")
      .between(0, 5);
  row.add("end-gap", Q::length, &RowInput::end_gap, "first rib from the pylon's centre line")
      .between(0, 10)
      .preset("module length / 50");
}

void add_structure(Table& table) {
  ElementMaker<TubeInput> tube(
      table, "torque-tube", true, [](TroughDesign& d) -> TubeInput& { return d.tube; },
      "carries the ribs and the twist");
  tube.profile(&TubeInput::profile, tube_shapes, material_names(), false);
  tube.add("panels-per-bay", Q::count, &TubeInput::panels_per_bay, "lattice-box: panels between two ribs")
      .between(1, 20)
      .preset("1");
  tube.text("bracing", &TubeInput::bracing, "lattice-box: one diagonal per panel of a face, or two crossed")
      .words({"zigzag", "cross"})
      .preset("zigzag");
  ElementMaker<TubeInput> box_chords(
      table, "torque-tube/chords", false, [](TroughDesign& d) -> TubeInput& { return d.tube; },
      "lattice-box: the four bars along the row");
  box_chords.profile(&TubeInput::chords, all_shapes, material_names());
  ElementMaker<TubeInput> box_webs(
      table, "torque-tube/webs", false, [](TroughDesign& d) -> TubeInput& { return d.tube; },
      "lattice-box: diagonals of its faces and sides of its frames");
  box_webs.profile(&TubeInput::webs, all_shapes, material_names());

  ElementMaker<RibsInput> ribs(
      table, "ribs", true, [](TroughDesign& d) -> RibsInput& { return d.ribs; },
      "arms from the tube to the rims, in pairs");
  ribs.text("kind", &RibsInput::kind, "plate on edge, bar bent along the mirror, or truss")
      .words({"plate", "bent", "truss"})
      .preset("plate");
  ribs.add("per-module", Q::count, &RibsInput::per_module, "pairs of arms in one module")
      .required()
      .between(2, 60);
  ribs.add("thickness", Q::length, &RibsInput::thickness, "plate: of the plate").above(0, 0.1);
  ribs.add("depth-at-tube", Q::length, &RibsInput::depth_at_tube,
           "plate: depth of the arm at the tube; truss: between the chords' centre lines")
      .above(0, 2);
  ribs.add("depth-at-tip", Q::length, &RibsInput::depth_at_tip, "likewise at the rim").above(0, 2);
  ribs.text("lower-edge", &RibsInput::lower_edge, "plate and truss: it follows the mirror, or runs straight")
      .words({"follows", "straight"})
      .preset("follows");
  ribs.text("material", &RibsInput::material, "plate: name in the catalogue of materials")
      .words(material_names());
  ribs.add("panels", Q::count, &RibsInput::panels, "truss: panels of one arm").between(1, 40);
  ribs.add("hub-mass", Q::mass, &RibsInput::hub_mass, "plates and pads where one rib meets the tube")
      .between(0, 2000)
      .preset("0 kg");
  ribs.add("elements", Q::count, &RibsInput::elements, "straight pieces an arm is computed with, at least")
      .between(4, 60)
      .preset("10");
  ElementMaker<RibsInput> bar(
      table, "ribs/bar", false, [](TroughDesign& d) -> RibsInput& { return d.ribs; },
      "bent: the bar along the mirror");
  bar.profile(&RibsInput::bar, all_shapes, material_names());
  ElementMaker<RibsInput> chords(
      table, "ribs/chords", false, [](TroughDesign& d) -> RibsInput& { return d.ribs; },
      "truss: upper and lower chord");
  chords.profile(&RibsInput::chords, all_shapes, material_names());
  ElementMaker<RibsInput> webs(
      table, "ribs/webs", false, [](TroughDesign& d) -> RibsInput& { return d.ribs; },
      "truss: posts and diagonals");
  webs.profile(&RibsInput::webs, all_shapes, material_names());

  ElementMaker<PurlinsInput> purlins(
      table, "purlins", false, [](TroughDesign& d) -> PurlinsInput& { return d.purlins; },
      "run along the row from rib to rib");
  purlins.add("count", Q::count, &PurlinsInput::count, "both sides together, so an even number")
      .required()
      .between(0, 60);
  purlins.profile(&PurlinsInput::profile, all_shapes, material_names());

  ElementMaker<EndPlatesInput> plates(
      table, "end-plates", false, [](TroughDesign& d) -> EndPlatesInput& { return d.end_plates; },
      "between tube end and bearing, two per module");
  plates.add("diameter", Q::length, &EndPlatesInput::diameter, "only for the mass, when that is not given")
      .above(0, 5);
  plates.add("thickness", Q::length, &EndPlatesInput::thickness, "only for the mass, when that is not given")
      .above(0, 0.2);
  plates.add("mass", Q::mass, &EndPlatesInput::mass, "of one end plate with its shaft").between(0, 2000);
  plates
      .add("twist-stiffness", Q::twist_stiffness, &EndPlatesInput::twist_stiffness,
           "of the joint between two modules; rigid when left out")
      .above(0, 1e12)
      .preset("rigid");
  plates
      .add("bending-stiffness", Q::twist_stiffness, &EndPlatesInput::bending_stiffness,
           "of the joint, coupling continuous only; rigid when left out")
      .above(0, 1e12)
      .preset("rigid");
  plates.add("play", Q::angle, &EndPlatesInput::play, "full width of the play in each joint between modules")
      .between(0, 10 * deg)
      .preset("0 mrad");
  plates
      .add("torque-capacity", Q::torque, &EndPlatesInput::torque_capacity,
           "design torque of the joint between two modules; left out = not judged")
      .above(0, 1e9);
}

void add_carried(Table& table) {
  ElementMaker<MirrorInput> mirror(
      table, "mirror", true, [](TroughDesign& d) -> MirrorInput& { return d.mirror; }, "the reflecting skin");
  mirror.text("kind", &MirrorInput::kind, "continuous sheet, or facets on pads")
      .words({"sheet", "facets"})
      .preset("sheet");
  mirror.add("thickness", Q::length, &MirrorInput::thickness, "of sheet or glass").above(0, 0.05);
  mirror.text("material", &MirrorInput::material, "name in the catalogue of materials")
      .words(material_names());
  mirror.add("mass", Q::area_density, &MirrorInput::mass, "of the skin, instead of thickness times density")
      .above(0, 100);
  mirror.text("fixed-to", &MirrorInput::fixed_to, "what carries the skin")
      .words({"ribs", "purlins"})
      .preset("ribs");
  mirror
      .add("pad-height", Q::length, &MirrorInput::pad_height,
           "facets: back of the mirror above what it stands on")
      .between(0, 1)
      .preset("0 mm");
  mirror.add("pad-mass", Q::area_density, &MirrorInput::pad_mass, "facets: pads and brackets")
      .between(0, 50)
      .preset("0 kg/m2");
  mirror
      .add("sheet-braces-ribs", Q::none, &MirrorInput::sheet_braces_ribs,
           "yes: the riveted sheet holds the ribs sideways")
      .words({"no", "yes"})
      .preset("no");
  mirror
      .add("facets-across", Q::count, &MirrorInput::facets_across,
           "facets: panels from rim to rim, even; each needs two lines of supports")
      .between(0, 40)
      .preset("one on each side");
  mirror.add("pad-pitch", Q::length, &MirrorInput::pad_pitch, "facets on purlins: pads along the row")
      .above(0, 5);
  mirror
      .add("bending-stiffness", Q::torque, &MirrorInput::bending_stiffness,
           "of the skin per width, E t3 / 12 (1 - nu2), for sandwich or corrugated skins")
      .above(0, 1e6);

  ElementMaker<ReceiverInput> receiver(
      table, "receiver", true, [](TroughDesign& d) -> ReceiverInput& { return d.receiver; },
      "the tube in the focus");
  receiver.add("outside-diameter", Q::length, &ReceiverInput::outside_diameter, "of the absorbing tube")
      .required()
      .between(5 * mm, 1);
  receiver.add("wall", Q::length, &ReceiverInput::wall, "of the absorbing tube").required().above(0, 0.1);
  receiver.text("material", &ReceiverInput::material, "name in the catalogue of materials")
      .required()
      .words(material_names());
  receiver.text("filled-with", &ReceiverInput::filled_with, "what runs in it")
      .required()
      .words(fluid_names());
  receiver.add("fill-density", Q::density, &ReceiverInput::fill_density, "overrides the word's density")
      .between(0.01, 20000);
  receiver
      .text("catches", &ReceiverInput::catches,
            "what the light must meet: the absorbing tube, or a flat strip in the focus (secondary, cells)")
      .words({"tube", "strip"})
      .preset("tube");
  receiver.add("strip-width", Q::length, &ReceiverInput::strip_width, "catches strip only: its full width")
      .above(0, 2);

  ElementMaker<SleeveInput> sleeve(
      table, "receiver/sleeve", false, [](TroughDesign& d) -> SleeveInput& { return d.receiver.sleeve; },
      "glass around the receiver");
  sleeve.add("outside-diameter", Q::length, &SleeveInput::outside_diameter, "outside").required().above(0, 1);
  sleeve.add("wall", Q::length, &SleeveInput::wall, "of the glass").required().above(0, 0.05);
  sleeve.text("material", &SleeveInput::material, "name in the catalogue of materials")
      .required()
      .words(material_names());

  ElementMaker<PostsInput> posts(
      table, "receiver/posts", true, [](TroughDesign& d) -> PostsInput& { return d.receiver.posts; },
      "hold the receiver, hinged along the row");
  posts.add("per-module", Q::count, &PostsInput::per_module, "posts in one module").required().between(1, 60);
  posts.profile(&PostsInput::profile, post_shapes, material_names());
  posts.text("stand-on", &PostsInput::stand_on, "what the posts stand on").words({"tube"}).preset("tube");

  ElementMaker<CounterweightsInput> weights(
      table, "counterweights", false,
      [](TroughDesign& d) -> CounterweightsInput& { return d.counterweights; },
      "masses that balance the row");
  weights.add("per-module", Q::count, &CounterweightsInput::per_module, "masses in one module")
      .required()
      .between(1, 60);
  weights.add("mass", Q::mass, &CounterweightsInput::mass, "each").required().above(0, 20000);
  weights
      .add("behind-tube", Q::length, &CounterweightsInput::behind_tube,
           "centre of mass behind the tube's centre")
      .required()
      .between(-5, 10);
}

void add_ground(Table& table) {
  ElementMaker<PylonsInput> pylons(
      table, "pylons", true, [](TroughDesign& d) -> PylonsInput& { return d.pylons; },
      "what the row stands on");
  pylons.text("at", &PylonsInput::at, "one at each end and between modules")
      .words({"every joint"})
      .preset("every joint");
  pylons.profile(&PylonsInput::profile, all_shapes, material_names());
  pylons.add("head-mass", Q::mass, &PylonsInput::head_mass, "bearing and head plate, each")
      .between(0, 20000)
      .preset("0 kg");

  ElementMaker<FootingInput> footing(
      table, "pylons/footing", true, [](TroughDesign& d) -> FootingInput& { return d.pylons.footing; },
      "springs of the ground under one pylon; write rigid for none");
  footing.add("sideways", Q::stiffness, &FootingInput::sideways, "across the row").required().above(0, 1e13);
  footing.add("along-row", Q::stiffness, &FootingInput::along_row, "along the row").required().above(0, 1e13);
  footing.add("upright", Q::stiffness, &FootingInput::upright, "vertical").required().above(0, 1e13);
  footing.add("rocking", Q::twist_stiffness, &FootingInput::rocking, "about both level directions")
      .required()
      .above(0, 1e13);
  footing
      .add("twisting", Q::twist_stiffness, &FootingInput::twisting,
           "about the vertical; as rocking when left out")
      .above(0, 1e13)
      .preset("as rocking");
  footing
      .add("overturning-capacity", Q::torque, &FootingInput::overturning_capacity,
           "design moment about the row's direction at ground; left out = not judged")
      .above(0, 1e10);
  footing
      .add("uplift-capacity", Q::force, &FootingInput::uplift_capacity,
           "design pull upwards; left out = not judged")
      .above(0, 1e9);

  ElementMaker<DriveInput> drive(
      table, "drive", true, [](TroughDesign& d) -> DriveInput& { return d.drive; },
      "turns the row and holds it");
  drive
      .add("moving-torque", Q::torque, &DriveInput::moving_torque,
           "rated while it turns; left out = not judged")
      .above(0, 1e8);
  drive.add("holding-torque", Q::torque, &DriveInput::holding_torque, "rated at rest; left out = not judged")
      .above(0, 1e8);
  drive
      .add("stiffness", Q::twist_stiffness, &DriveInput::stiffness, "of gear and lever between row and pylon")
      .required()
      .above(0, 1e13);
  drive.add("play", Q::angle, &DriveInput::play, "full width of the backlash")
      .between(0, 10 * deg)
      .preset("0 mrad");
  drive.add("turns-from", Q::angle, &DriveInput::turns_from, "least elevation it can reach")
      .between(-360 * deg, 360 * deg);
  drive.add("turns-to", Q::angle, &DriveInput::turns_to, "greatest elevation it can reach")
      .between(-360 * deg, 360 * deg);
  drive.add("mass", Q::mass, &DriveInput::mass, "on the drive pylon's head").between(0, 50000).preset("0 kg");
  drive.add("friction", Q::torque, &DriveInput::friction, "torque of all bearings of the row together")
      .between(0, 1e7)
      .preset("0 N m");

  ElementMaker<SensorInput> sensor(
      table, "sensor", false, [](TroughDesign& d) -> SensorInput& { return d.sensor; },
      "what the controller believes");
  sensor.text("kind", &SensorInput::kind, "what measures the angle")
      .words({"inclinometer", "encoder", "sun"})
      .preset("inclinometer");
  sensor.text("at", &SensorInput::at, "where it sits")
      .words({"tube beside the drive"})
      .preset("tube beside the drive");
  sensor
      .add("module", Q::count, &SensorInput::module,
           "inclinometer or sun sensor on this module, counted from the row's first end")
      .between(0, 200)
      .preset("beside the drive");
  sensor.text("correction", &SensorInput::correction, "what the tracker takes out")
      .words({"sensor", "none", "row-mean"})
      .preset("sensor");
}

void add_site(Table& table) {
  ElementMaker<SiteInput> site(
      table, "site", true, [](TroughDesign& d) -> SiteInput& { return d.site; }, "where it stands");
  site.add("altitude", Q::length, &SiteInput::altitude, "above sea level; for the air's density")
      .between(-430, 5500);
  site.text("terrain", &SiteInput::terrain, "EN 1991-1-4 0 (sea) to IV (town), ASCE 7 exposure, or power law")
      .required()
      .words({"EN 0", "EN I", "EN II", "EN III", "EN IV", "ASCE B", "ASCE C", "ASCE D", "power law"});
  site.add("orography", Q::ratio, &SiteInput::orography, "factor of hills on the speed")
      .between(0.5, 3)
      .preset("1");
  site.add("power-exponent", Q::ratio, &SiteInput::power_exponent, "terrain power law only")
      .between(0.01, 0.6);
  site.add("turbulence", Q::ratio, &SiteInput::turbulence, "terrain power law only: intensity at the axis")
      .between(0.01, 0.6);
  site.add("air-density", Q::density, &SiteInput::air_density, "instead of altitude, temperature, pressure")
      .between(0.6, 1.5);
  site.add("temperature", Q::temperature, &SiteInput::temperature, "of the air, for its density")
      .between(213.15, 343.15);
  site.add("pressure", Q::pressure, &SiteInput::pressure, "of the air, for its density").between(45e3, 110e3);
  site.add("asce-edition", Q::count, &SiteInput::asce_edition, "ASCE 7: 10, 16 or 22")
      .between(10, 22)
      .preset("16");

  ElementMaker<WindInput> wind(
      table, "wind", true, [](TroughDesign& d) -> WindInput& { return d.wind; },
      "coefficients, and the winds that are asked about");
  wind.text("table", &WindInput::table, "name of a shipped table or path of your own").required();
  wind.text("zone", &WindInput::zone, "place of the row in its field")
      .required()
      .words({"isolated", "edge", "second-row", "interior"});
  wind.number_or_word("dynamic-factor", Q::ratio, &WindInput::dynamic_factor, "EN Annex B",
                      &WindInput::dynamic_word,
                      "cd on drive and foundation, or EN Annex B: from the row's first torsional frequency")
      .between(1, 4)
      .preset("1");
  wind.add("damping", Q::ratio, &WindInput::damping,
           "dynamic-factor EN Annex B only: logarithmic decrement of the structure")
      .between(0.005, 1)
      .preset("0.05");
  wind.text("map", &WindInput::map,
            "level of the stated speeds; an ultimate map holds the wind factor already")
      .words({"service", "ultimate"});
  wind.add("altitude-in-speed", Q::none, &WindInput::altitude_in_speed,
           "yes: the map or an altitude factor has reduced the speeds for thin air already")
      .words({"no", "yes"})
      .preset("no");
  wind.add("faces-open-ground", Q::none, &WindInput::faces_open_ground, "yes: no row stands upwind")
      .words({"no", "yes"})
      .preset("no");
  wind.add("size-factor", Q::none, &WindInput::size_factor,
           "EN 1991-1-4 size factor for drive and foundation")
      .words({"yes", "no"})
      .preset("yes");
  wind.add("moment-slope", Q::per_angle, &WindInput::moment_slope,
           "overrides the slope of the moment coefficient")
      .between(-6, 6);

  const auto state = [&](const char* path, bool required, WindStateInput WindInput::*member,
                         const char* help) {
    ElementMaker<WindStateInput> made(
        table, path, required, [member](TroughDesign& d) -> WindStateInput& { return d.wind.*member; }, help);
    made.element().presence = [member](TroughDesign& d) { return &(d.wind.*member).given; };
    made.add("speed", Q::speed, &WindStateInput::speed, "of the wind").above(0, 120);
    made.add("averaging", Q::time, &WindStateInput::averaging, "3 s, 1 min, 10 min or 1 h").between(3, 3600);
    made.add("height", Q::length, &WindStateInput::height, "above ground at which the speed holds")
        .between(0.5, 200);
    made.add("pressure", Q::pressure, &WindStateInput::pressure,
             "velocity pressure at the axis, instead of speed")
        .above(0, 10e3);
    made.text("over", &WindStateInput::over,
              "ground the speed holds over: open country (maps, weather stations) or the site itself")
        .words({"open country", "site"})
        .preset("open country");
    made.add("return-period", Q::ratio, &WindStateInput::return_period,
             "years wanted, when the speed stated is that of 50 years (EN 1991-1-4, 4.2)")
        .between(2, 10000);
  };
  state("wind/operate", true, &WindInput::operate, "while it works: the light is judged in this wind");
  state("wind/turning", false, &WindInput::turning,
        "on the way to stow; 1.2 times the operate wind when left out");
  state("wind/stow", false, &WindInput::stow, "parked");
  state("wind/stuck", false, &WindInput::stuck, "caught in any pose without power");
  state("wind/unfinished", false, &WindInput::unfinished, "while it is being built; needs <erection>");

  ElementMaker<YearInput> year(
      table, "wind/year", false, [](TroughDesign& d) -> YearInput& { return d.wind.year; },
      "how often the wind blows how strongly");
  year.element().presence = [](TroughDesign& d) { return &d.wind.year.given; };
  year.add("weibull-scale", Q::speed, &YearInput::weibull_scale,
           "scale of a Weibull distribution; or give a record")
      .above(0, 40);
  year.add("weibull-shape", Q::ratio, &YearInput::weibull_shape, "shape of a Weibull distribution")
      .between(0.8, 6);
  year.add("averaging", Q::time, &YearInput::averaging, "of the record").required().between(3, 3600);
  year.add("height", Q::length, &YearInput::height, "of the record").required().between(0.5, 200);
  year.text("record", &YearInput::record,
            "path of an hourly record, beside the design: speed, direction, beam");
  year.text("hours", &YearInput::hours, "hours the record counts").required().words({"daylight", "all"});
}

void add_actions(Table& table) {
  ElementMaker<BareMembersInput> bare(
      table, "bare-members", false, [](TroughDesign& d) -> BareMembersInput& { return d.bare_members; },
      "drag coefficients of what the coefficient table leaves out");
  bare.add("tube", Q::ratio, &BareMembersInput::tube, "torque tube, on its width")
      .between(0, 3)
      .preset("1.2 round, 2.2 square");
  bare.add("ribs", Q::ratio, &BareMembersInput::ribs,
           "ribs, on their thickness across the row and their depth along it")
      .between(0, 3)
      .preset("2");
  bare.add("receiver", Q::ratio, &BareMembersInput::receiver, "receiver, on its outer diameter")
      .between(0, 3)
      .preset("1.2");
  bare.add("posts", Q::ratio, &BareMembersInput::posts,
           "receiver posts, on their width, in wind along the row")
      .between(0, 3)
      .preset("1.2 round, 2.2 square");
  bare.add("pylons", Q::ratio, &BareMembersInput::pylons, "pylons, on their width")
      .between(0, 3)
      .preset("1.2 round, 2.2 square");
  bare.text("shielding", &BareMembersInput::shielding,
            "how far the mirror hides tube and ribs: mirror = as much as it stands across the wind")
      .words({"mirror", "none", "all"})
      .preset("mirror");
  bare.text("back", &BareMembersInput::back, "back of the mirror, for friction of wind along the row")
      .words({"smooth", "rough", "ribbed"})
      .preset("ribbed");

  ElementMaker<SnowInput> snow(
      table, "snow", false, [](TroughDesign& d) -> SnowInput& { return d.snow; },
      "on the mirror, by attitude");
  snow.add("on-ground", Q::pressure, &SnowInput::on_ground, "characteristic load on level ground")
      .required()
      .above(0, 20e3);
  snow.text("back", &SnowInput::back, "what the mirror's back does with snow when it is turned down")
      .words({"sheds", "holds"})
      .preset("sheds");

  ElementMaker<WaterInput> water(
      table, "water", false, [](TroughDesign& d) -> WaterInput& { return d.water; },
      "rain standing in the mirror");
  water.text("drains", &WaterInput::drains, "blocked: a mirror that faces up holds water up to its lower rim")
      .required()
      .words({"open", "blocked"});

  ElementMaker<IceInput> ice(
      table, "ice", false, [](TroughDesign& d) -> IceInput& { return d.ice; }, "glaze on mirror and members");
  ice.add("thickness", Q::length, &IceInput::thickness, "on every surface").required().above(0, 0.2);
  ice.add("wind-share", Q::ratio, &IceInput::wind_share, "share of the velocity pressure that comes with it")
      .between(0, 1)
      .preset("0.4");

  ElementMaker<TemperatureInput> temperature(
      table, "temperature", false, [](TroughDesign& d) -> TemperatureInput& { return d.temperature; },
      "of frame and receiver");
  temperature
      .add("set-at", Q::temperature, &TemperatureInput::set_at, "frame when mirrors and joints were set")
      .required()
      .between(233.15, 333.15);
  temperature.add("least", Q::temperature, &TemperatureInput::least, "coldest frame")
      .required()
      .between(203.15, 333.15);
  temperature.add("most", Q::temperature, &TemperatureInput::most, "hottest frame")
      .required()
      .between(253.15, 373.15);
  temperature
      .add("across-frame", Q::temperature, &TemperatureInput::across_frame,
           "tube and ribs warmer on the mirror's side, a difference in K")
      .between(0, 100)
      .preset("0 K");
  temperature
      .add("across-receiver", Q::temperature, &TemperatureInput::across_receiver,
           "receiver warmer on its lit side, a difference in K")
      .between(0, 200)
      .preset("0 K");
  temperature
      .add("receiver", Q::temperature, &TemperatureInput::receiver_at,
           "hottest mean of the receiver, for its expansion")
      .between(253.15, 873.15);

  ElementMaker<EarthquakeInput> quake(
      table, "earthquake", false, [](TroughDesign& d) -> EarthquakeInput& { return d.earthquake; },
      "as a level force on every mass");
  quake.text("code", &EarthquakeInput::code, "what the acceleration is computed by")
      .words({"EN 1998", "ASCE 7"})
      .preset("EN 1998");
  quake
      .add("ground-acceleration", Q::acceleration, &EarthquakeInput::ground_acceleration,
           "EN 1998: a_g with the importance factor")
      .above(0, 15);
  quake.text("ground", &EarthquakeInput::ground, "EN 1998: type of ground")
      .words({"A", "B", "C", "D", "E"})
      .preset("B");
  quake.add("behaviour", Q::ratio, &EarthquakeInput::behaviour, "EN 1998: q").between(1, 8).preset("1.5");
  quake.add("s-ds", Q::ratio, &EarthquakeInput::s_ds, "ASCE 7: design acceleration at 0.2 s over g")
      .above(0, 5);
  quake.add("s-d1", Q::ratio, &EarthquakeInput::s_d1, "ASCE 7: design acceleration at 1 s over g")
      .above(0, 3);
  quake.add("response", Q::ratio, &EarthquakeInput::response, "ASCE 7: R").between(1, 8).preset("1.25");
  quake.add("importance", Q::ratio, &EarthquakeInput::importance, "ASCE 7: I_e").between(0.5, 2).preset("1");
  quake.add("period", Q::time, &EarthquakeInput::period, "of the first mode; the worst of all when left out")
      .above(0, 10);

  ElementMaker<MaintenanceInput> person(
      table, "maintenance", false, [](TroughDesign& d) -> MaintenanceInput& { return d.maintenance; },
      "a load where people and vehicles touch: a rib's tip, the tube, the receiver");
  person.add("load", Q::force, &MaintenanceInput::load, "person with tools, ladder, washer; acts downwards")
      .required()
      .above(0, 50e3);
  person.add("at", Q::angle, &MaintenanceInput::at, "elevation of the service pose")
      .required()
      .between(-180 * deg, 280 * deg);

  ElementMaker<ErectionInput> erection(
      table, "erection", false, [](TroughDesign& d) -> ErectionInput& { return d.erection; },
      "the row as it is left overnight while it is being built; needs <wind><unfinished/>");
  erection.add("at", Q::angle, &ErectionInput::at, "elevation it is left in")
      .required()
      .between(-180 * deg, 280 * deg);
  erection.text("mirrors", &ErectionInput::mirrors, "mirrors that are on")
      .words({"none", "one side", "all"})
      .preset("none");
}

void add_run(Table& table) {
  ElementMaker<OperationInput> operation(
      table, "operation", true, [](TroughDesign& d) -> OperationInput& { return d.operation; },
      "how it is run; elevation 0 deg faces the horizon, 90 deg the sky");
  operation.add("track-from", Q::angle, &OperationInput::track_from, "first elevation with light")
      .required()
      .between(-100 * deg, 280 * deg);
  operation.add("track-to", Q::angle, &OperationInput::track_to, "last elevation with light")
      .required()
      .between(-100 * deg, 280 * deg);
  operation.add("stow-at", Q::angle, &OperationInput::stow_at, "elevation it is parked at")
      .required()
      .between(-180 * deg, 280 * deg);
  operation
      .add("stow-within", Q::angle, &OperationInput::stow_within, "how exactly it is parked, plus or minus")
      .required()
      .between(0, 45 * deg);
  operation.add("turning-rate", Q::turning_rate, &OperationInput::turning_rate, "speed on the way to stow")
      .above(0, 100 * deg);
  operation.text("turned-by", &OperationInput::turned_by, "what turns it to stow")
      .words({"drive", "hand"})
      .preset("drive");
  operation.add("notice", Q::time, &OperationInput::notice, "by hand: until someone has noticed and is there")
      .between(0, 86400);
  operation.add("push", Q::force, &OperationInput::push, "by hand: force on the crank or lever")
      .above(0, 5000);
  operation.add("crank", Q::length, &OperationInput::crank, "by hand: length of the crank or lever")
      .above(0, 5);
  operation
      .add("gear", Q::ratio, &OperationInput::gear,
           "by hand: torque on the row over torque on the crank, losses in")
      .above(0, 1e5)
      .preset("1");

  ElementMaker<AnemometerInput> meter(
      table, "operation/anemometer", false,
      [](TroughDesign& d) -> AnemometerInput& { return d.operation.anemometer; },
      "what the stow trigger is read from");
  meter.add("height", Q::length, &AnemometerInput::height, "above ground").required().between(0.5, 200);
  meter.add("averaging", Q::time, &AnemometerInput::averaging, "3 s, 1 min, 10 min or 1 h")
      .required()
      .between(3, 3600);
  meter.add("tolerance", Q::speed, &AnemometerInput::tolerance, "of its reading")
      .between(0, 10)
      .preset("0 m/s");
  meter.text("place", &AnemometerInput::place, "free of wakes, or among the rows where it reads low")
      .words({"free", "among-rows"})
      .preset("free");

  ElementMaker<TriggerInput> trigger(
      table, "operation/trigger", false, [](TroughDesign& d) -> TriggerInput& { return d.operation.trigger; },
      "steps from the row's limit to the stow trigger that you settle yourself");
  trigger.text("from", &TriggerInput::from, "stow for safety only, or as soon as the light falls short")
      .words({"safety", "light"})
      .preset("safety");
  trigger
      .add("height-factor", Q::ratio, &TriggerInput::height_factor, "gust at the meter over gust at the axis")
      .between(0.5, 3);
  trigger.add("shelter", Q::ratio, &TriggerInput::shelter, "meter's reading over the free wind")
      .between(0.3, 1.2);
  trigger.add("gust-factor", Q::ratio, &TriggerInput::gust_factor, "3 s gust over the meter's mean")
      .between(1, 4);
  trigger.add("growth", Q::ratio, &TriggerInput::growth, "of the wind while it turns to stow").between(1, 4);
  trigger.add("second", Q::ratio, &TriggerInput::second, "instantaneous trigger over the gust it bears")
      .between(0.3, 1);
  trigger.add("resume", Q::ratio, &TriggerInput::resume, "resume speed over the trigger").between(0.2, 1);
  trigger.add("dwell", Q::time, &TriggerInput::dwell, "below the resume speed before it resumes")
      .between(0, 86400);

  ElementMaker<OpticsInput> optics(
      table, "optics", true, [](TroughDesign& d) -> OpticsInput& { return d.optics; },
      "how good the mirror is before any load; all widths rms");
  optics
      .number_or_word("set-true", Q::angle, &OpticsInput::set_true, "unloaded", &OpticsInput::set_true_word,
                      "elevation at which the panels are set on the loaded frame, or unloaded")
      .required()
      .between(-180 * deg, 280 * deg);
  optics.add("sun", Q::angle, &OpticsInput::sun, "of the sun's disc as a Gaussian")
      .between(0, 20 * mrad)
      .preset("2.6 mrad");
  optics.text("sun-shape", &OpticsInput::sun_shape, "how the sun's disc is described")
      .words({"gaussian", "pillbox", "buie", "table"})
      .preset("gaussian");
  optics.text("sun-table", &OpticsInput::sun_table,
              "sun-shape table only: angle from the sun's centre and radiance, such as 0 mrad 1, 4 mrad 0.9");
  optics.add("circumsolar-ratio", Q::ratio, &OpticsInput::circumsolar_ratio, "sun-shape buie only")
      .between(0, 0.8);
  optics
      .add("workshop-slope", Q::angle, &OpticsInput::workshop_slope,
           "of the mirror normal, across the trough")
      .required()
      .between(0, 50 * mrad);
  optics.add("mirror-scatter", Q::angle, &OpticsInput::mirror_scatter, "of the reflected ray")
      .between(0, 50 * mrad)
      .preset("0 mrad");
  optics.add("tracking", Q::angle, &OpticsInput::tracking, "of the aim, without play and twist")
      .between(0, 50 * mrad)
      .preset("0 mrad");
  optics.add("incidence", Q::angle, &OpticsInput::incidence, "angle along the row the light is judged at")
      .between(0, 75 * deg)
      .preset("0 deg");
  optics
      .add("wind-averaging", Q::time, &OpticsInput::wind_averaging,
           "mean wind the light is judged in: 10 min, 1 min or 3 s (gust)")
      .between(3, 3600)
      .preset("10 min");
}

void add_limits(Table& table) {
  ElementMaker<LimitsInput> limits(
      table, "limits", false, [](TroughDesign& d) -> LimitsInput& { return d.limits; },
      "what is asked; a line left out is reported, not judged");
  limits
      .add("intercept", Q::ratio, &LimitsInput::intercept,
           "least light caught by the receiver, mean of the row")
      .between(0.2, 1);
  limits.add("lost-to-frame", Q::ratio, &LimitsInput::lost_to_frame, "most light lost to the bent frame")
      .between(0, 0.8);
  limits.add("slope", Q::angle, &LimitsInput::slope, "residual slope of the mirror, rms").above(0, 50 * mrad);
  limits.add("twist", Q::angle, &LimitsInput::twist, "greatest twist of a module against the sensor")
      .above(0, 200 * mrad);
  limits
      .add("receiver-shift", Q::length, &LimitsInput::receiver_shift, "receiver away from the mirror's axis")
      .above(0, 1);
  limits
      .add("re-aim", Q::time, &LimitsInput::re_aim,
           "turned by hand: least time the light stays above its limit while the sun moves on")
      .above(0, 86400);
  limits.text("strength", &LimitsInput::strength,
              "combinations of actions: EN 1990, ASCE 7, a shipped set's name or a path of your own");
  limits
      .add("strength-factor", Q::ratio, &LimitsInput::strength_factor,
           "instead: plain factor on yield, loads unfactored")
      .between(1, 5);

  // Repeated: the reader adds an entry for each one and then fills the last. Without any there is only a
  // scratch entry, so that looking never changes a design.
  const auto last = [](TroughDesign& d) -> AcceptInput& {
    thread_local AcceptInput none;
    if (!d.accepted.empty()) return d.accepted.back();
    none = {};
    return none;
  };
  ElementMaker<AcceptInput> accept(table, "accept", false, last, "a rule that is broken on purpose");
  accept.element().repeats = true;
  accept.text("rule", &AcceptInput::rule, "the word in brackets of the message").required();
  accept.text("because", &AcceptInput::because, "printed beside the number and on the report's first page")
      .required();
}

bool differs(const Slot& a, const Slot& b) {
  return std::visit(
      [&](auto* x) {
        using Pointer = decltype(x);
        const auto* y = std::get<Pointer>(b);
        if constexpr (std::is_same_v<Pointer, double*>)
          return !(std::abs(*x - *y) <= 1e-12 * std::abs(*y) || *x == *y ||
                   (std::isnan(*x) && std::isnan(*y)));
        else
          return *x != *y;
      },
      a);
}

}  // namespace

const std::vector<Element>& trough_schema() {
  static const Table table = [] {
    Table made;
    add_shape(made);
    add_structure(made);
    add_carried(made);
    add_ground(made);
    add_site(made);
    add_actions(made);
    add_run(made);
    add_limits(made);
    return made;
  }();
  return table;
}

const Element* find_element(const std::string& path) {
  const auto& table = trough_schema();
  const auto at = std::find_if(table.begin(), table.end(), [&](const Element& e) { return e.path == path; });
  return at == table.end() ? nullptr : &*at;
}

const Field* find_field(const Element& element, const std::string& attribute) {
  const auto at = std::find_if(element.fields.begin(), element.fields.end(),
                               [&](const Field& f) { return f.name == attribute; });
  return at == element.fields.end() ? nullptr : &*at;
}

const std::vector<std::string>& basis_words() {
  static const std::vector<std::string> words{"measured", "drawing", "catalogue", "agreed", "guess"};
  return words;
}

bool is_given(const Field& field, const TroughDesign& design) {
  static TroughDesign empty;
  // Slots point into a design that can be written to; nothing is written here.
  TroughDesign& writable = const_cast<TroughDesign&>(design);
  if (field.word_slot && !field.word_slot(writable)->empty()) return true;
  return differs(field.slot(writable), field.slot(empty));
}

bool is_given(const Element& element, const TroughDesign& design) {
  if (element.repeats) return !design.accepted.empty();
  return std::any_of(element.fields.begin(), element.fields.end(),
                     [&](const Field& f) { return is_given(f, design); });
}

double focal_length(const ParabolaInput& parabola) {
  if (!std::isnan(parabola.focal_length)) return parabola.focal_length;
  return parabola.aperture * parabola.aperture / (16 * parabola.depth);
}

double rim_angle(double aperture, double focal_length) {
  return 2 * std::atan(aperture / (4 * focal_length));
}

double largest_size(const ProfileInput& profile) {
  double largest = not_given;
  for (const double size : {profile.outside_diameter, profile.side, profile.depth, profile.width})
    largest = std::fmax(largest, size);
  return largest;
}

}  // namespace focalframe::models
