#pragma once

/// Short notation for the table in models/schema.cpp; nothing else uses it.

#include <algorithm>
#include <functional>
#include <string>
#include <tuple>
#include <utility>
#include <vector>

#include "models/schema.h"

namespace focalframe::models {

/// Adds properties to the field just made.
class FieldMaker {
 public:
  explicit FieldMaker(Field& field) : field_(field) {}
  FieldMaker& required() { return field_.required = true, *this; }
  FieldMaker& preset(std::string text) { return field_.default_text = std::move(text), *this; }
  FieldMaker& between(double least, double most) { return field_.least = least, field_.most = most, *this; }
  FieldMaker& above(double least, double most) { return field_.above_least = true, between(least, most); }
  FieldMaker& words(std::vector<std::string> words) { return field_.words = std::move(words), *this; }

 private:
  Field& field_;
};

/// Collects the fields of one element whose values live in a `Part` of the design.
template <class Part>
class ElementMaker {
 public:
  ElementMaker(std::vector<Element>& table, std::string path, bool required,
               std::function<Part&(TroughDesign&)> part, std::string help)
      : table_(table), index_(table.size()), part_(std::move(part)) {
    table_.push_back({std::move(path), required, false, {}, std::move(help), {}});
  }

  Element& element() { return table_[index_]; }

  template <class Value>
  FieldMaker add(std::string name, Quantity quantity, Value Part::*member, std::string help) {
    const auto part = part_;
    return add_slot(
        std::move(name), quantity, [part, member](TroughDesign& d) -> Slot { return &(part(d).*member); },
        std::move(help));
  }

  /// Free text, or one of some words.
  FieldMaker text(std::string name, std::string Part::*member, std::string help) {
    return add(std::move(name), Quantity::none, member, std::move(help));
  }

  /// A number, or a word that goes into `word_member`.
  FieldMaker number_or_word(std::string name, Quantity quantity, double Part::*member, std::string word,
                            std::string Part::*word_member, std::string help) {
    FieldMaker made = add(std::move(name), quantity, member, std::move(help));
    const auto part = part_;
    element().fields.back().words = {std::move(word)};
    element().fields.back().word_slot = [part, word_member](TroughDesign& d) {
      return &(part(d).*word_member);
    };
    return made;
  }

  /// The attributes of a profile: shape, its sizes, material.
  void profile(ProfileInput Part::*member, const std::vector<std::string>& shapes,
               const std::vector<std::string>& material_names, bool material_needed = true);

  FieldMaker add_slot(std::string name, Quantity quantity, std::function<Slot(TroughDesign&)> slot,
                      std::string help) {
    Field field;
    field.name = std::move(name);
    field.quantity = quantity;
    field.slot = std::move(slot);
    field.help = std::move(help);
    element().fields.push_back(std::move(field));
    return FieldMaker(element().fields.back());
  }

 private:
  std::vector<Element>& table_;
  std::size_t index_;
  std::function<Part&(TroughDesign&)> part_;
};

template <class Part>
void ElementMaker<Part>::profile(ProfileInput Part::*member, const std::vector<std::string>& shapes,
                                 const std::vector<std::string>& material_names, bool material_needed) {
  const auto part = part_;
  const auto value = [&](const char* name, Quantity quantity, double ProfileInput::*size, std::string help) {
    return add_slot(
        name, quantity, [part, member, size](TroughDesign& d) -> Slot { return &((part(d).*member).*size); },
        std::move(help));
  };
  const auto text = [&](const char* name, std::string ProfileInput::*word, std::string help) {
    return add_slot(
        name, Quantity::none,
        [part, member, word](TroughDesign& d) -> Slot { return &((part(d).*member).*word); },
        std::move(help));
  };
  const auto has = [&](const char* shape) {
    return std::find(shapes.begin(), shapes.end(), shape) != shapes.end();
  };
  using P = ProfileInput;
  text("shape", &P::shape, "shape of the section").required().words(shapes);
  for (const auto& [name, size, help] :
       {std::tuple{"outside-diameter", &P::outside_diameter, "round-tube and round-bar: as sold, outside"},
        std::tuple{"side", &P::side, "square-tube: outside"},
        std::tuple{"depth", &P::depth, "upright size; angle: upright leg; channel: along its web"},
        std::tuple{"width", &P::width, "level size; angle: other leg; channel: its flanges"},
        std::tuple{"wall", &P::wall, "tubes: wall thickness"}})
    value(name, Quantity::length, size, help).above(0, 3);
  value("thickness", Quantity::length, &P::thickness, "flat, angle; properties: for the yield stress")
      .above(0, 3);
  if (has("channel")) {
    value("web", Quantity::length, &P::web, "channel: thickness of its web").above(0, 0.1);
    value("flange", Quantity::length, &P::flange, "channel: thickness of its flanges").above(0, 0.1);
  }
  if (has("angle")) {
    value("root-radius", Quantity::length, &P::root_radius, "angle: between the legs; sharp when left out")
        .above(0, 0.1);
    value("toe-radius", Quantity::length, &P::toe_radius, "angle: at the legs' tips; sharp when left out")
        .above(0, 0.1);
    value("turned", Quantity::angle, &P::turned,
          "about the member's axis, from where its depth stands upright")
        .between(-3.1416 * 2, 3.1416 * 2)
        .preset("0 deg");
  }
  const char* const corners = "tube with corners; cold-formed rule of EN 10219-2 when left out";
  value("outer-radius", Quantity::length, &P::outer_radius, corners).above(0, 0.2);
  value("inner-radius", Quantity::length, &P::inner_radius, corners).above(0, 0.2);
  value("area", Quantity::area, &P::area, "properties").above(0, 1);
  value("Iy", Quantity::area_moment, &P::Iy, "properties: bending that moves it along its depth").above(0, 1);
  value("Iz", Quantity::area_moment, &P::Iz, "properties: bending sideways").above(0, 1);
  value("J", Quantity::area_moment, &P::J, "properties: torsion constant").above(0, 1);
  value("shear-area-y", Quantity::area, &P::shear_area_y, "properties: rigid in shear when left out")
      .above(0, 1);
  value("shear-area-z", Quantity::area, &P::shear_area_z, "properties: rigid in shear when left out")
      .above(0, 1);
  value("Wy", Quantity::section_modulus, &P::Wy, "properties: for stresses").above(0, 1);
  value("Wz", Quantity::section_modulus, &P::Wz, "properties: for stresses").above(0, 1);
  value("Wt", Quantity::section_modulus, &P::Wt, "properties: for stresses from torsion").above(0, 1);
  FieldMaker material = text("material", &P::material, "name in the catalogue of materials");
  material.words(material_names);
  if (material_needed) material.required();
}

}  // namespace focalframe::models
