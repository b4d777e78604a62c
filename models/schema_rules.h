#pragma once

/// Collects broken rules; shared by the files models/rules_*.cpp, which hold the rules themselves.

#include <string>
#include <utility>
#include <vector>

#include "models/schema.h"

namespace focalframe::models {

class RuleBook {
 public:
  explicit RuleBook(const TroughDesign& design) : d(design) {}

  const TroughDesign& d;

  Violation& stop(std::string element, std::string attribute, std::string text) {
    return add(Violation::Level::stop, std::move(element), std::move(attribute), std::move(text));
  }
  Violation& warn(std::string element, std::string attribute, std::string text) {
    return add(Violation::Level::warn, std::move(element), std::move(attribute), std::move(text));
  }
  Violation& note(std::string element, std::string attribute, std::string text) {
    return add(Violation::Level::note, std::move(element), std::move(attribute), std::move(text));
  }
  /// The attribute is not there though it is needed.
  Violation& missing(std::string element, std::string attribute, std::string text) {
    Violation& v = stop(std::move(element), std::move(attribute), std::move(text));
    v.missing = true;
    return v;
  }
  /// A STOP already names this field: other rules about it would only repeat the trouble.
  bool reported(const std::string& element, const std::string& attribute) const;

  std::vector<Violation> violations;

 private:
  Violation& add(Violation::Level level, std::string element, std::string attribute, std::string text);
};

void check_fields(RuleBook& book);    ///< required ones, words, ranges
void check_profiles(RuleBook& book);  ///< sizes a shape needs, walls
void check_shape(RuleBook& book);     ///< parabola, row, tube, purlins, mirror, receiver
void check_parts(RuleBook& book);     ///< what each kind of rib and torque tube needs and has not
void check_ground(RuleBook& book);    ///< pylons, drive, poses
void check_weather(RuleBook& book);   ///< site, winds, anemometer, year
void check_run(RuleBook& book);       ///< year, turning by hand, trigger
void check_actions(RuleBook& book);   ///< temperature, snow, earthquake, erection, maintenance
void check_optics(RuleBook& book);    ///< optics, limits, accepted exceptions

/// Only the averaging times winds are known by.
void check_averaging(RuleBook& book, const std::string& path, double averaging,
                     const char* attribute = "averaging");

}  // namespace focalframe::models
