#pragma once

/// Short notation for the table in models/schema.cpp; nothing else uses it.

#include <functional>
#include <string>
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
               const std::vector<std::string>& material_names);

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
                                 const std::vector<std::string>& material_names) {
  const auto part = part_;
  const auto size = [&](const char* name, double ProfileInput::*value, std::string help) {
    add_slot(
        name, Quantity::length,
        [part, member, value](TroughDesign& d) -> Slot { return &((part(d).*member).*value); },
        std::move(help))
        .above(0, 3);
  };
  add_slot(
      "shape", Quantity::none, [part, member](TroughDesign& d) -> Slot { return &(part(d).*member).shape; },
      "shape of the section")
      .required()
      .words(shapes);
  size("outside-diameter", &ProfileInput::outside_diameter, "round-tube and round-bar: as sold, outside");
  size("side", &ProfileInput::side, "square-tube: outside");
  size("depth", &ProfileInput::depth, "rectangular-tube and flat: upright size");
  size("width", &ProfileInput::width, "rectangular-tube: level size");
  size("wall", &ProfileInput::wall, "tubes: wall thickness");
  size("thickness", &ProfileInput::thickness, "flat: thickness");
  add_slot(
      "material", Quantity::none,
      [part, member](TroughDesign& d) -> Slot { return &(part(d).*member).material; },
      "name in the catalogue of materials")
      .required()
      .words(material_names);
}

}  // namespace focalframe::models
