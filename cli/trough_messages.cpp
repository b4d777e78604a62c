#include "cli/trough_messages.h"

#include <algorithm>
#include <cmath>
#include <set>

#include "cli/nearest.h"
#include "cli/trough_fixes.h"
#include "fem/units.h"

namespace focalframe::cli {
namespace {

using models::Element;
using models::Field;
using models::Violation;

std::string written(const std::string& attribute, const std::string& value) {
  return attribute + "=" + (value.find('"') == std::string::npos ? "\"" + value + "\"" : "'" + value + "'");
}

Message at_line(const std::string& file, int line, std::string head, std::string text) {
  Message m;
  m.file = file;
  m.line = line;
  m.head = std::move(head);
  m.text = std::move(text);
  return m;
}

// What each possible unit would mean, where that helps to choose.
std::string consequences(const Unread& unread, const TroughText& text) {
  const std::vector<std::string>& units =
      common_units(models::find_field(*models::find_element(unread.element), unread.attribute)->quantity);
  std::string say;
  if (unread.element == "parabola") {
    const models::ParabolaInput& p = text.design.parabola;
    const bool aperture = unread.attribute == "aperture";
    const std::string other = !std::isnan(p.focal_length) ? "focal-length" : "depth";
    const auto known = text.raw.find(aperture ? "parabola/" + other : "parabola/aperture");
    if (known == text.raw.end()) return "";
    std::vector<std::string> shapes;
    for (const std::string& unit : units) {
      models::TroughDesign trial = text.design;
      const Element& element = *models::find_element("parabola");
      if (!set_field(element, *models::find_field(element, unread.attribute), unread.raw + " " + unit, trial)
               .problem.empty())
        continue;
      const double f = models::focal_length(trial.parabola), w = trial.parabola.aperture;
      if (!(f / w >= 0.15 && f / w <= 1.5)) continue;
      shapes.push_back(unread.raw + " " + unit + (shapes.empty() ? " gives a rim angle of " : " ") +
                       number_text(std::round(models::rim_angle(w, f) / deg * 10) / 10) + " deg");
    }
    if (shapes.empty()) return "";
    say = " With " + leaf(known->first) + " " + known->second + ", " + joined(shapes, ", ") +
          (shapes.size() < units.size() ? ", the others no usable shape." : ".");
  } else if (models::find_field(*models::find_element(unread.element), unread.attribute)->quantity ==
             Quantity::speed) {
    std::vector<std::string> speeds;
    for (const std::string& unit : units) {
      const ParsedQuantity parsed = parse_quantity(unread.raw + " " + unit, Quantity::speed);
      if (parsed.ok() && unit != "m/s")
        speeds.push_back(unread.raw + " " + unit + " is " + number_text(parsed.value) + " m/s");
    }
    say = speeds.empty() ? "" : " " + joined(speeds, ", ") + ".";
  }
  return say;
}

Message unread_message(const Unread& unread, const TroughText& text, const std::string& file) {
  Message m = at_line(file, unread.line, leaf(unread.element) + " " + written(unread.attribute, unread.raw),
                      unread.problem);
  const Field& field = *models::find_field(*models::find_element(unread.element), unread.attribute);
  if (unread.bare) m.text += consequences(unread, text);
  std::vector<std::string> passing =
      passing_values(unread.element, unread.attribute, unread.suggestions, text.design);
  const bool first_is_likely =
      !unread.bare || field.quantity == Quantity::length || field.quantity == Quantity::angle;
  if (passing.size() == 1 || (passing.size() > 1 && unread.bare && first_is_likely)) {
    m.likely = written(unread.attribute, passing.front());
  } else if (passing.size() > 1) {
    for (std::string& value : passing) value = written(unread.attribute, value);
    m.advice = "One of: " + joined(passing, " | ");
  }
  return m;
}

std::vector<std::string> names_of(const Element& element) {
  std::vector<std::string> names;
  for (const Field& f : element.fields) names.push_back(f.name);
  names.push_back("basis");
  return names;
}

// The known name an unknown attribute was meant to be, when that one is not there already.
std::string meant_name(const Unknown& unknown, const TroughText& text) {
  std::vector<std::string> absent;
  for (const std::string& name : names_of(*models::find_element(unknown.element)))
    if (!text.raw.count(unknown.element + "/" + name)) absent.push_back(name);
  return nearest_name(unknown.attribute, absent);
}

Message unknown_message(const Unknown& unknown, const std::string& meant, const TroughText& text,
                        const std::string& file) {
  const Element& element = *models::find_element(unknown.element);
  const std::string name = leaf(unknown.element);
  const Field* field = meant.empty() ? nullptr : models::find_field(element, meant);
  std::string say = "<" + name + "> has no \"" + unknown.attribute + "\"";
  if (field && field->required) say += ", and its \"" + meant + "\" is missing";
  say += ". It knows: " + joined(names_of(element)) + ".";
  Message m = at_line(file, unknown.line, name + " " + written(unknown.attribute, unknown.raw), say);
  if (meant == "basis" ||
      (field && !passing_values(unknown.element, meant, {unknown.raw}, text.design).empty())) {
    m.likely = written(meant, unknown.raw);
  } else if (meant.empty()) {
    std::vector<std::string> owners;
    for (const Element& e : models::trough_schema())
      if (models::find_field(e, unknown.attribute)) owners.push_back("<" + leaf(e.path) + ">");
    if (!owners.empty() && owners.size() <= 4)
      m.advice = "\"" + unknown.attribute + "\" belongs to " + joined_or(owners);
  }
  return m;
}

std::string head_of(const Violation& v, const TroughText& text) {
  if (!v.head.empty()) return v.head;
  const std::string name = leaf(v.element);
  if (v.attribute.empty()) return "<" + name + ">" + (v.missing ? " is missing" : "");
  std::string head = name;
  for (std::size_t at = 0; at < v.attribute.size();) {
    const std::size_t end = std::min(v.attribute.find(' ', at), v.attribute.size());
    const std::string attribute = v.attribute.substr(at, end - at);
    if (const auto raw = text.raw.find(v.element + "/" + attribute); raw != text.raw.end())
      head += " " + written(attribute, raw->second);
    at = end + 1;
  }
  if (!v.missing) return head;
  for (const std::string& other : v.involves)
    if (const auto raw = text.raw.find(other); raw != text.raw.end() && other.starts_with(v.element + "/")) {
      head += " " + written(leaf(other), raw->second);
      break;
    }
  return head + " without " + v.attribute;
}

int line_of(const Violation& v, const Lines& lines) {
  const std::string first = v.attribute.substr(0, v.attribute.find(' '));
  for (const std::string& key :
       {v.element + "/" + first, v.element, v.element.substr(0, v.element.rfind('/'))})
    if (const auto at = lines.find(key); at != lines.end()) return at->second;
  return 0;
}

// Fields that are in trouble already; rules about them would repeat it.
std::set<std::string> troubled_fields(const TroughText& text) {
  std::set<std::string> keys;
  for (const Unread& u : text.unread) keys.insert(u.element + "/" + u.attribute);
  return keys;
}

bool about(const Violation& v, const std::set<std::string>& keys) {
  if (keys.count(v.element + "/" + v.attribute)) return true;
  return std::any_of(v.involves.begin(), v.involves.end(),
                     [&](const std::string& k) { return keys.count(k) > 0; });
}

// A rule across fields that looks at a field another message already doubts for itself.
bool follows_another(const Violation& v, const std::vector<Violation>& all) {
  return std::any_of(all.begin(), all.end(), [&](const Violation& other) {
    const std::string place = other.element + "/" + other.attribute;
    return !other.missing && other.involves.empty() && other.level <= v.level &&
           std::find(v.involves.begin(), v.involves.end(), place) != v.involves.end();
  });
}

}  // namespace

Message rule_message(const Violation& v, const TroughText& text, const std::string& file) {
  Message m = at_line(file, line_of(v, text.lines), head_of(v, text), v.text);
  m.level = v.level == Violation::Level::stop   ? Level::stop
            : v.level == Violation::Level::warn ? Level::warn
                                                : Level::note;
  m.rule = v.rule;
  m.advice = v.advice;
  m.no_solution = v.no_solution;
  const std::vector<std::string> fixes = passing_fixes(v, text);
  // With a speed every unit is as likely as the next one; elsewhere the first that passes is the usual slip.
  const bool open_choice = fixes.size() > 1 && fixes.front().find("speed=") != std::string::npos;
  if (open_choice)
    m.advice = "One of: " + joined(fixes, " | ");
  else if (!fixes.empty())
    m.likely = fixes.front();
  for (const models::AcceptInput& accept : text.design.accepted)
    if (!v.rule.empty() && accept.rule == v.rule && m.level != Level::note) {
      m.level = Level::note;
      m.likely.clear();
      m.advice = "Accepted because: " + accept.because;
    }
  return m;
}

std::vector<Message> trough_messages(TroughText& text, const std::string& file) {
  std::vector<Message> messages = text.messages;
  std::vector<std::string> meant;
  for (const Unknown& u : text.unknown) {
    meant.push_back(meant_name(u, text));
    messages.push_back(unknown_message(u, meant.back(), text, file));
  }
  for (const Unread& u : text.unread) messages.push_back(unread_message(u, text, file));
  std::set<std::string> troubled = troubled_fields(text);
  for (std::size_t i = 0; i < text.unknown.size(); ++i)
    troubled.insert(text.unknown[i].element + "/" + meant[i]);
  // An element that is there under a wrong name or twice has been reported; its absence would repeat that.
  const bool lost_element = !text.messages.empty();
  const std::vector<Violation> violations = models::validate(text.design);
  for (const Violation& v : violations) {
    if (about(v, troubled) || follows_another(v, violations)) continue;
    if (v.missing && v.attribute.empty() && (lost_element || text.lines.count(v.element))) {
      const bool bad_content = std::any_of(text.unread.begin(), text.unread.end(),
                                           [&](const Unread& u) { return u.element == v.element; }) ||
                               std::any_of(text.unknown.begin(), text.unknown.end(),
                                           [&](const Unknown& u) { return u.element == v.element; });
      if (lost_element || bad_content) continue;
    }
    messages.push_back(rule_message(v, text, file));
  }
  return messages;
}

}  // namespace focalframe::cli
