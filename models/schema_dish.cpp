#include "models/schema_dish.h"

#include <algorithm>
#include <cmath>

#include "fem/units.h"
#include "models/catalogue.h"
#include "models/schema_maker.h"

namespace focalframe::models {
namespace {

using Table = std::vector<Element>;
using Q = Quantity;
using D = TroughDesign;

// Every design a dish's table is used on is a DishDesign; the table itself speaks of what both kinds share.
DishInput& of(D& d) { return static_cast<DishDesign&>(d).dish; }

const std::vector<std::string> shapes{"round-tube", "square-tube", "rectangular-tube", "round-bar", "flat"};

std::vector<std::string> material_names() {
  std::vector<std::string> names;
  for (const CatalogueMaterial& m : materials()) names.push_back(m.name);
  return names;
}

// A profile whose shape or material may be left out: the part has another kind, or takes the material of the
// part it belongs to.
template <class Part>
void loose_profile(ElementMaker<Part>& made, ProfileInput Part::*member, bool shape_required) {
  made.profile(member, shapes, material_names());
  for (Field& f : made.element().fields)
    if (f.name == "material" || (f.name == "shape" && !shape_required)) f.required = false;
}

Field& field_named(Element& element, const std::string& name) {
  return *std::find_if(element.fields.begin(), element.fields.end(),
                       [&](const Field& f) { return f.name == name; });
}

// What a trough has and a dish does not.
void leave_out(Element& element, const std::vector<std::string>& names) {
  std::erase_if(element.fields,
                [&](const Field& f) { return std::find(names.begin(), names.end(), f.name) != names.end(); });
}

// An element that means the same in both kinds.
Element& share(Table& table, const std::string& path) {
  table.push_back(*find_element(path));
  return table.back();
}

template <class Entry>
void repeat(ElementMaker<Entry>& made, std::vector<Entry> DishInput::*) {
  made.element().repeats = true;
}

// The last entry of a list; a scratch entry while there is none, so that looking never changes a design.
template <class Entry>
std::function<Entry&(D&)> last(std::vector<Entry> DishInput::*list) {
  return [list](D& d) -> Entry& {
    thread_local Entry none;
    if (!(of(d).*list).empty()) return (of(d).*list).back();
    none = {};
    return none;
  };
}

void add_shape(Table& table) {
  ElementMaker<ParabolaInput> parabola(
      table, "parabola", true, [](D& d) -> ParabolaInput& { return d.parabola; },
      "the shape that has to stay true");
  parabola.add("diameter", Q::length, &ParabolaInput::aperture, "rim to rim").required().between(0.3, 100);
  parabola
      .add("focal-length", Q::length, &ParabolaInput::focal_length, "vertex to focus; or give depth instead")
      .above(0, 100);
  parabola
      .add("depth", Q::length, &ParabolaInput::depth,
           "straight edge over the rim to the vertex; f = diameter^2 / (16 depth)")
      .above(0, 100);
}

void add_structure(Table& table) {
  ElementMaker<HubInput> hub(
      table, "hub", true, [](D& d) -> HubInput& { return of(d).hub; }, "where the ribs begin");
  hub.text("kind", &HubInput::kind, "plate: discs that hold the ribs; ring: a hoop held by the cradle")
      .words({"plate", "ring"})
      .preset("plate");
  hub.add("diameter", Q::length, &HubInput::diameter, "of the circle the ribs begin on")
      .required()
      .above(0, 50);
  hub.add("plates", Q::count, &HubInput::plates, "plate: 2 = the ribs are held between two discs, 1 = on one")
      .between(1, 2)
      .preset("2");
  loose_profile(hub, &HubInput::profile, false);
  field_named(hub.element(), "thickness").help = "plate: of each disc; flat: thickness";

  ElementMaker<DishRibsInput> ribs(
      table, "ribs", true, [](D& d) -> DishRibsInput& { return of(d).ribs; },
      "radial arms from the hub to the rim");
  ribs.add("count", Q::count, &DishRibsInput::count, "all around").required().between(3, 96);
  ribs.text("kind", &DishRibsInput::kind, "truss of two chords, plate on edge, or bent tube")
      .required()
      .words({"truss", "plate", "tube"});
  ribs.add("depth-at-hub", Q::length, &DishRibsInput::depth_at_hub, "truss and plate").above(0, 10);
  ribs.add("depth-at-rim", Q::length, &DishRibsInput::depth_at_rim, "truss and plate").above(0, 10);
  ribs.add("panels", Q::count, &DishRibsInput::panels, "truss: bays between hub and rim").between(2, 24);
  ribs.add("elements", Q::count, &DishRibsInput::elements, "straight pieces a rib is computed with, at least")
      .between(4, 60)
      .preset("12");
  loose_profile(ribs, &DishRibsInput::profile, false);
  field_named(ribs.element(), "thickness").help = "plate: of the plate";

  ElementMaker<DishRibsInput> chords(
      table, "ribs/chords", false, [](D& d) -> DishRibsInput& { return of(d).ribs; },
      "truss: top and bottom chord; material as the ribs when left out");
  loose_profile(chords, &DishRibsInput::chords, true);
  ElementMaker<DishRibsInput> webs(
      table, "ribs/webs", false, [](D& d) -> DishRibsInput& { return of(d).ribs; },
      "truss: posts and diagonals between the chords; material as the ribs when left out");
  loose_profile(webs, &DishRibsInput::webs, true);

  ElementMaker<RingInput> ring(table, "ring", false, last(&DishInput::rings),
                               "hoop from rib to rib; ring 1 is the first one written");
  repeat(ring, &DishInput::rings);
  ring.add("radius", Q::length, &RingInput::radius, "from the optical axis").required().above(0, 50);
  ring.text("at", &RingInput::at, "truss ribs: which chord it ties").words({"front", "back"}).preset("front");
  ring.profile(&RingInput::profile, shapes, material_names());

  ElementMaker<BracingInput> bracing(table, "bracing", false, last(&DishInput::bracing),
                                     "crossing diagonals in the bays between two rings");
  repeat(bracing, &DishInput::bracing);
  bracing.text("from", &BracingInput::from, "hub, or ring 1, ring 2, ...").required();
  bracing.text("to", &BracingInput::to, "ring 1, ring 2, ...").required();
  bracing.text("in", &BracingInput::in, "which bays")
      .words({"every bay", "every second bay"})
      .preset("every bay");
  bracing.profile(&BracingInput::profile, shapes, material_names());
}

// A solar dish says <receiver>, an antenna <feed>; both fill the same part.
void add_feed(Table& table, const std::string& word, bool solar) {
  const auto part = [](D& d) -> FeedInput& { return of(d).feed; };
  ElementMaker<FeedInput> feed(table, word, false, part,
                               solar ? "what the light is caught by" : "what stands in the focus");
  feed.add("mass", Q::mass, &FeedInput::mass, "with everything that hangs on it").required().above(0, 20000);
  feed.number_or_word("centre-of-mass", Q::length, &FeedInput::centre_of_mass, "focus",
                      &FeedInput::centre_word, "distance beyond the focus, away from the dish, or focus")
      .between(-20, 20);
  feed.add("blocks", Q::length, &FeedInput::blocks, "diameter of its shadow, which also meets the wind")
      .between(0, 20)
      .preset("0 mm");
  if (solar)
    feed.add("aperture", Q::length, &FeedInput::aperture, "diameter of the round opening in the focal plane")
        .above(0, 10);
  ElementMaker<FeedInput> legs(table, word + "/legs", false, part, "1 to 6 legs up to the focus");
  legs.add_slot(
          "count", Q::count, [](D& d) -> Slot { return &of(d).feed.legs.count; }, "legs")
      .required()
      .between(1, 6);
  legs.add_slot(
          "stand-on", Q::none, [](D& d) -> Slot { return &of(d).feed.legs.stand_on; },
          "hub, or ring 1, ring 2, ...")
      .preset("hub");
  ElementMaker<LegsInput> of_legs(
      table, word + "/legs", false, [](D& d) -> LegsInput& { return of(d).feed.legs; }, "");
  of_legs.profile(&LegsInput::profile, shapes, material_names());
  std::vector<Field> sizes = std::move(table.back().fields);
  table.pop_back();
  table.back().fields.insert(table.back().fields.end(), sizes.begin(), sizes.end());
  ElementMaker<FeedInput> boom(table, word + "/boom", false, part, "instead of legs: one mast from the hub");
  boom.profile(&FeedInput::boom, shapes, material_names());
}

void add_carried(Table& table) {
  ElementMaker<SurfaceInput> surface(
      table, "surface", true, [](D& d) -> SurfaceInput& { return of(d).surface; }, "the reflecting skin");
  surface.text("kind", &SurfaceInput::kind, "one sheet, petals on pads, or mesh")
      .words({"sheet", "petals", "mesh"})
      .preset("sheet");
  surface.add("solidity", Q::ratio, &SurfaceInput::solidity, "solid share of a mesh; 1 = solid sheet")
      .above(0, 1)
      .preset("1");
  surface
      .add("mass", Q::area_density, &SurfaceInput::mass, "of the skin with pads; or thickness and material")
      .above(0, 100);
  surface.add("thickness", Q::length, &SurfaceInput::thickness, "of sheet or glass").above(0, 0.1);
  surface.text("material", &SurfaceInput::material, "name in the catalogue of materials")
      .words(material_names());
  surface.text("fixed-to", &SurfaceInput::fixed_to, "what carries the skin")
      .words({"ribs and rings", "ribs"})
      .preset("ribs and rings");
  surface.add("pad-height", Q::length, &SurfaceInput::pad_height, "back of the skin above the ribs")
      .between(0, 1)
      .preset("0 mm");
  surface.add("hole", Q::length, &SurfaceInput::hole, "diameter of the opening at the vertex")
      .between(0, 20)
      .preset("0 mm");
  add_feed(table, "receiver", true);
  add_feed(table, "feed", false);
  ElementMaker<DishWeightInput> weight(
      table, "counterweight", false, [](D& d) -> DishWeightInput& { return of(d).counterweight; },
      "balances the dish about the elevation axis");
  weight.add("mass", Q::mass, &DishWeightInput::mass, "all of it").required().above(0, 1e6);
  weight
      .add("behind-axis", Q::length, &DishWeightInput::behind_axis,
           "centre of mass behind the elevation axis")
      .required()
      .between(-5, 20);
}

void add_axis(Table& table) {
  ElementMaker<ElevationAxisInput> axis(
      table, "elevation-axis", true, [](D& d) -> ElevationAxisInput& { return of(d).axis; },
      "the dish turns up and down about it, in two bearings");
  axis.add_slot(
          "axis-to-vertex", Q::length, [](D& d) -> Slot { return &d.row.axis_to_vertex; },
          "axis behind the mirror's vertex")
      .required()
      .between(-10, 20);
  axis.add_slot(
          "height", Q::length, [](D& d) -> Slot { return &d.row.axis_height; }, "above the ground")
      .required()
      .between(0.1, 100);
  axis.add("bearing-spread", Q::length, &ElevationAxisInput::bearing_spread, "between the two bearings")
      .required()
      .above(0, 50);
  axis.add_slot(
          "turns-from", Q::angle, [](D& d) -> Slot { return &d.drive.turns_from; },
          "least elevation it can reach")
      .required()
      .between(-180 * deg, 180 * deg);
  axis.add_slot(
          "turns-to", Q::angle, [](D& d) -> Slot { return &d.drive.turns_to; },
          "greatest elevation it can reach")
      .required()
      .between(-180 * deg, 270 * deg);
  axis.add("friction", Q::torque, &ElevationAxisInput::friction, "torque of both bearings together")
      .between(0, 1e6)
      .preset("0 N m");
  ElementMaker<ElevationAxisInput> cradle(
      table, "elevation-axis/cradle", false, [](D& d) -> ElevationAxisInput& { return of(d).axis; },
      "frame between hub, axis and actuator; rigid when left out");
  cradle.profile(&ElevationAxisInput::cradle, shapes, material_names());

  ElementMaker<ActuatorInput> rod(
      table, "actuator", false, [](D& d) -> ActuatorInput& { return of(d).actuator; },
      "linear drive between what turns with the elevation and the yoke; or give slewing-drive");
  rod.add("stiffness", Q::stiffness, &ActuatorInput::stiffness, "rod, lugs and oil or screw in one")
      .required()
      .above(0, 1e11);
  rod.add("push", Q::force, &ActuatorInput::push, "rated while it moves; left out = not judged")
      .above(0, 1e8);
  rod.add("hold", Q::force, &ActuatorInput::hold, "rated at rest; left out = not judged").above(0, 1e8);
  rod.add("shortest", Q::length, &ActuatorInput::shortest, "pin to pin").required().above(0, 50);
  rod.add("longest", Q::length, &ActuatorInput::longest, "pin to pin").required().above(0, 50);
  rod.add("rod-diameter", Q::length, &ActuatorInput::rod_diameter,
          "of the steel rod, for its buckling at full stroke; left out = not judged")
      .above(0, 1);
  rod.add("friction", Q::force, &ActuatorInput::friction,
          "force it takes to back-drive the unit at rest, by itself; 0 = it runs back freely")
      .between(0, 1e8)
      .preset("0 N");
  rod.add("play", Q::length, &ActuatorInput::play, "along the rod, full width")
      .between(0, 0.1)
      .preset("0 mm");
  const auto pin = [&](const char* path, PinInput ActuatorInput::*member, const char* help) {
    ElementMaker<PinInput> made(
        table, path, true, [member](D& d) -> PinInput& { return of(d).actuator.*member; }, help);
    made.add("below", Q::length, &PinInput::below, "below the elevation axis, dish looking at the horizon")
        .required()
        .between(-20, 50);
    made.add("front", Q::length, &PinInput::front, "in front of it, on the mirror's side")
        .required()
        .between(-20, 20);
  };
  pin("actuator/dish-pin", &ActuatorInput::dish_pin, "pin on what turns with the elevation");
  pin("actuator/stand-pin", &ActuatorInput::stand_pin, "pin on the yoke");

  ElementMaker<SlewingDriveInput> slew(
      table, "slewing-drive", false, [](D& d) -> SlewingDriveInput& { return of(d).slewing; },
      "worm gear on the elevation axis, instead of an actuator");
  slew.add("stiffness", Q::twist_stiffness, &SlewingDriveInput::stiffness, "about the elevation axis")
      .required()
      .above(0, 1e12);
  slew.add("moving-torque", Q::torque, &SlewingDriveInput::moving_torque, "rated; left out = not judged")
      .above(0, 1e8);
  slew.add("holding-torque", Q::torque, &SlewingDriveInput::holding_torque, "rated; left out = not judged")
      .above(0, 1e8);
  slew.add("play", Q::angle, &SlewingDriveInput::play, "full width").between(0, 10 * deg).preset("0 deg");
  slew.add("mass", Q::mass, &SlewingDriveInput::mass, "of the drive").between(0, 50000).preset("0 kg");
}

void add_stand(Table& table) {
  ElementMaker<YokeInput> yoke(
      table, "yoke", true, [](D& d) -> YokeInput& { return of(d).yoke; },
      "turns with the azimuth and carries the elevation bearings");
  yoke.profile(&YokeInput::profile, shapes, material_names());
  yoke.add("height", Q::length, &YokeInput::height, "azimuth bearing to elevation axis")
      .required()
      .above(0, 20);
  yoke.add("mass", Q::mass, &YokeInput::mass, "gear and motors on the azimuth bearing")
      .between(0, 1e5)
      .preset("0 kg");
  ElementMaker<AzimuthInput> azimuth(
      table, "azimuth", true, [](D& d) -> AzimuthInput& { return of(d).azimuth; },
      "azimuth bearing and drive");
  azimuth.add("moving-torque", Q::torque, &AzimuthInput::moving_torque, "rated; left out = not judged")
      .above(0, 1e8);
  azimuth.add("holding-torque", Q::torque, &AzimuthInput::holding_torque, "rated; left out = not judged")
      .above(0, 1e8);
  azimuth.add("twist-stiffness", Q::twist_stiffness, &AzimuthInput::twist_stiffness, "of the azimuth drive")
      .required()
      .above(0, 1e12);
  azimuth
      .add("tilt-stiffness", Q::twist_stiffness, &AzimuthInput::tilt_stiffness, "of the bearing, both ways")
      .required()
      .above(0, 1e12);
  azimuth.add("play", Q::angle, &AzimuthInput::play, "full width").between(0, 10 * deg).preset("0 deg");
  azimuth
      .add("tilt", Q::angle, &AzimuthInput::tilt,
           "polar mount: lean of this axis from the vertical, 90 deg less the latitude")
      .between(0, 90 * deg)
      .preset("0 deg");
  ElementMaker<PedestalInput> pedestal(
      table, "pedestal", true, [](D& d) -> PedestalInput& { return of(d).pedestal; }, "what it stands on");
  pedestal.text("kind", &PedestalInput::kind, "one post, or a base of legs")
      .words({"post", "legs"})
      .preset("post");
  pedestal.profile(&PedestalInput::profile, shapes, material_names());
  pedestal.add("legs", Q::count, &PedestalInput::legs, "kind legs: how many").between(3, 8).preset("3");
  pedestal.add("foot-radius", Q::length, &PedestalInput::foot_radius, "kind legs: feet on this circle")
      .above(0, 50);
  pedestal.add("mass", Q::mass, &PedestalInput::mass, "of its head").between(0, 1e5).preset("0 kg");
  ElementMaker<FootingInput> footing(
      table, "pedestal/footing", true, [](D& d) -> FootingInput& { return of(d).pedestal.footing; },
      "springs of the ground under each foot; write rigid for none");
  footing.add("sideways", Q::stiffness, &FootingInput::sideways, "both level directions")
      .required()
      .above(0, 1e13);
  footing.add("upright", Q::stiffness, &FootingInput::upright, "vertical").required().above(0, 1e13);
  footing.add("rocking", Q::twist_stiffness, &FootingInput::rocking, "about both level directions")
      .required()
      .above(0, 1e13);
  footing.add("twisting", Q::twist_stiffness, &FootingInput::twisting, "about the vertical")
      .above(0, 1e13)
      .preset("as rocking");
  footing
      .add("overturning-capacity", Q::torque, &FootingInput::overturning_capacity,
           "design moment at ground, any direction; left out = not judged")
      .above(0, 1e10);
  footing
      .add("uplift-capacity", Q::force, &FootingInput::uplift_capacity,
           "design pull upwards on one foot; left out = not judged")
      .above(0, 1e9);
}

void add_run(Table& table) {
  share(table, "site");
  ElementMaker<DishInput> relief(
      table, "wind", true, [](D& d) -> DishInput& { return of(d); }, "");
  relief
      .text("mesh-relief", &DishInput::mesh_relief,
            "none: a mesh is loaded like a solid dish; solidity: forces times its solid share")
      .words({"none", "solidity"})
      .preset("none");
  Field extra = table.back().fields.front();
  table.pop_back();
  Element& wind = share(table, "wind");
  leave_out(wind, {"faces-open-ground", "map", "altitude-in-speed", "damping"});
  Field& dynamic = field_named(wind, "dynamic-factor");  // a number: a row's first frequency is not a dish's
  dynamic.words.clear();
  dynamic.word_slot = nullptr;
  dynamic.help = "cd on drive and foundation";
  wind.fields.push_back(extra);
  for (const char* path : {"wind/operate", "wind/turning", "wind/stow", "wind/stuck", "wind/year"})
    share(table, path);
  Element& run = share(table, "operation");
  field_named(run, "stow-within").required = false;
  field_named(run, "stow-within").default_text = "0 deg";
  ElementMaker<DishInput> learned(
      table, "operation", true, [](D& d) -> DishInput& { return of(d); }, "");
  learned
      .text("learned", &DishInput::learned,
            "gravity: the controller's pointing table takes out what the weight does at each elevation")
      .words({"gravity", "none"})
      .preset("gravity");
  extra = table.back().fields.front();
  table.pop_back();
  table.back().fields.push_back(extra);
  share(table, "operation/anemometer");
}

void add_asked(Table& table) {
  Element& optics = share(table, "optics");
  optics.required = false;
  leave_out(optics, {"incidence", "wind-averaging"});
  field_named(optics, "workshop-slope").help = "of the mirror normal, in each of two directions";
  ElementMaker<RadioInput> radio(
      table, "radio", false, [](D& d) -> RadioInput& { return of(d).radio; },
      "an antenna instead of a solar dish");
  radio.element().presence = [](D& d) { return &of(d).radio.given; };
  radio
      .number_or_word("set-true", Q::angle, &RadioInput::set_true, "unloaded", &RadioInput::set_true_word,
                      "elevation at which the surface is set on the loaded frame, or unloaded")
      .required()
      .between(-180 * deg, 180 * deg);
  radio
      .add("surface-as-built", Q::length, &RadioInput::surface_as_built,
           "rms half path error before any load")
      .required()
      .between(0, 0.1);
  Element& limits = share(table, "limits");
  leave_out(limits, {"twist"});
  std::vector<Field> fields = limits.fields;
  ElementMaker<DishLimitsInput> more(
      table, "limits", false, [](D& d) -> DishLimitsInput& { return of(d).limits; }, "");
  more.add("aim", Q::angle, &DishLimitsInput::aim, "solar: error of the aim the drive cannot learn")
      .above(0, 0.2);
  fields.insert(fields.end(), table.back().fields.begin(), table.back().fields.end());
  table.pop_back();
  table.back().fields = std::move(fields);
  share(table, "accept");
}

}  // namespace

const std::vector<Element>& dish_schema() {
  static const Table table = [] {
    Table made;
    add_shape(made);
    add_structure(made);
    add_carried(made);
    add_axis(made);
    add_stand(made);
    add_run(made);
    add_asked(made);
    return made;
  }();
  return table;
}

std::size_t entries(const std::string& path, const DishDesign& d) {
  return path == "ring" ? d.dish.rings.size() : path == "bracing" ? d.dish.bracing.size() : d.accepted.size();
}

void keep_entries(const std::string& path, DishDesign& d, std::size_t n) {
  if (path == "ring") d.dish.rings.resize(n);
  if (path == "bracing") d.dish.bracing.resize(n);
  if (path == "accept") d.accepted.resize(n);
}

const Element* find_dish_element(const std::string& path) {
  const auto& table = dish_schema();
  const auto at = std::find_if(table.begin(), table.end(), [&](const Element& e) { return e.path == path; });
  return at == table.end() ? nullptr : &*at;
}

bool is_given_in_dish(const Field& field, const DishDesign& design) {
  static DishDesign empty;
  DishDesign& writable = const_cast<DishDesign&>(design);  // slots are only read here
  if (field.word_slot && !field.word_slot(writable)->empty()) return true;
  return std::visit(
      [&](auto* x) {
        const auto* y = std::get<decltype(x)>(field.slot(empty));
        if constexpr (std::is_same_v<decltype(x), double*>)
          return !(*x == *y || (std::isnan(*x) && std::isnan(*y)));
        else
          return *x != *y;
      },
      field.slot(writable));
}

}  // namespace focalframe::models
