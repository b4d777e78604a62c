#include "cli/stow_words.h"

#include "cli/report_units.h"
#include "cli/stow_text.h"
#include "fem/units.h"

namespace focalframe::cli {

using models::LimitKey;

namespace {

struct Words {
  char letter;
  const char *meaning, *phrase;
};

Words words(LimitKey key) {
  switch (key) {
    case LimitKey::intercept:
      return {'L', "light", "light falls short"};
    case LimitKey::lost_to_frame:
      return {'F', "frame's share", "the frame costs too much light"};
    case LimitKey::slope:
      return {'S', "slope", "slope too great"};
    case LimitKey::twist:
      return {'T', "twist", "module twisted too far"};
    case LimitKey::receiver_shift:
      return {'R', "receiver", "receiver out of the focus"};
    case LimitKey::member:
      return {'Y', "yield", "a member yields"};
    case LimitKey::moving_torque:
      return {'M', "moving", "drive cannot move"};
    case LimitKey::holding_torque:
      return {'H', "holding", "drive slips"};
    case LimitKey::joint_torque:
      return {'J', "joint", "a joint slips"};
    case LimitKey::overturning:
      return {'O', "overturning", "foot overturns"};
    case LimitKey::uplift:
      return {'U', "uplift", "foot pulls out"};
    case LimitKey::wind_up:
      return {'D', "winds up", "row winds itself up"};
  }
  return {'?', "", ""};
}

}  // namespace

char limit_letter(LimitKey key) { return words(key).letter; }
std::string letter_meaning(LimitKey key) { return words(key).meaning; }
std::string limit_short(LimitKey key) { return words(key).phrase; }

std::string pose_words(const models::State& state) {
  const std::string place = models::place_text(state);  // "STOW -90 deg, face"
  return place.substr(place.find(' ') + 1);
}

std::string limit_phrase(const models::CriterionLimit& c, const models::TroughDesign& d) {
  switch (c.key) {
    case LimitKey::intercept:
      return text_of("light below %.3g %%", 100 * d.limits.intercept);
    case LimitKey::slope:
      return text_of("slope above %.3g mrad", d.limits.slope / mrad);
    case LimitKey::twist:
      return text_of("twist above %.3g mrad", d.limits.twist / mrad);
    case LimitKey::receiver_shift:
      return text_of("receiver off by %.3g mm", d.limits.receiver_shift / mm);
    case LimitKey::moving_torque:
      return d.operation.turned_by == "hand" ? "crank cannot move" : "drive cannot move";
    case LimitKey::member:
      return c.part + " yields";
    case LimitKey::joint_torque:
      return c.part + " slips";
    case LimitKey::overturning:
      return c.part + " overturns";
    case LimitKey::uplift:
      return c.part + " pulls out";
    default:
      return words(c.key).phrase;
  }
}

}  // namespace focalframe::cli
