#include "cli/combination_file.h"

#include <algorithm>
#include <cmath>
#include <filesystem>
#include <set>

#include "cli/embedded.h"
#include "cli/nearest.h"
#include "cli/read_file.h"
#include "cli/table_source.h"
#include "cli/xml.h"

namespace focalframe::cli {
namespace {

using loads::Combination;
using loads::CombinationSet;

template <class Value>
struct Word {
  const char* word;
  Value value;
};
constexpr Word<loads::Purpose> purposes[] = {{"strength", loads::Purpose::strength},
                                             {"equilibrium", loads::Purpose::equilibrium},
                                             {"service", loads::Purpose::service},
                                             {"accidental", loads::Purpose::accidental},
                                             {"seismic", loads::Purpose::seismic}};
constexpr Word<loads::StateGroup> groups[] = {{"any", loads::StateGroup::any},
                                              {"extreme-wind", loads::StateGroup::extreme_wind},
                                              {"stuck", loads::StateGroup::stuck}};
constexpr Word<loads::Action> actions[] = {{"wind", loads::Action::wind},
                                           {"snow", loads::Action::snow},
                                           {"temperature", loads::Action::temperature},
                                           {"imposed", loads::Action::imposed},
                                           {"ice", loads::Action::ice},
                                           {"wind-on-ice", loads::Action::wind_on_ice},
                                           {"seismic", loads::Action::seismic}};
constexpr Word<double Combination::*> factors[] = {{"permanent", &Combination::permanent},
                                                   {"wind", &Combination::wind},
                                                   {"snow", &Combination::snow},
                                                   {"temperature", &Combination::temperature},
                                                   {"imposed", &Combination::imposed},
                                                   {"ice", &Combination::ice},
                                                   {"wind-on-ice", &Combination::wind_on_ice},
                                                   {"seismic", &Combination::seismic}};
constexpr double greatest_factor = 5;

class Reader {
 public:
  Reader(const std::string& file, std::vector<Message>& messages) : file_(file), messages_(messages) {}

  std::optional<CombinationSet> read(const XmlElement& root) {
    if (root.name != "combinations") {
      stop(root.line, "<" + root.name + ">",
           "A set of combinations has the root element <combinations name=... edition=... wind-map=...>.");
      return std::nullopt;
    }
    check_names(root, {"name", "edition", "wind-map", "on-yield", "format"});
    set_.name = text(root, "name", true);
    set_.edition = text(root, "edition", true);
    set_.ultimate_wind_map = word(root, "wind-map", maps(), "service") == "ultimate";
    if (!root.find("wind-map"))
      stop(root.line, "combinations without wind-map",
           "Whether the stated speed holds the wind factor already: service or ultimate.",
           "wind-map=\"service\"");
    if (root.find("on-yield")) set_.on_yield = number(root, "on-yield", 1);
    for (const XmlElement& e : root.children) child(e);
    if (set_.source.empty())
      stop(root.line, "combinations without <source>", "Say where the factors come from.",
           "<source text=\"...\"/>");
    if (set_.title.empty()) set_.title = set_.name;
    judge(root.line);
    if (stopped_) return std::nullopt;
    return set_;
  }

 private:
  static std::vector<std::string> maps() { return {"service", "ultimate"}; }

  Message& say(Level level, int line, const std::string& head, const std::string& words,
               const std::string& likely = {}) {
    Message m;
    m.level = level;
    m.file = file_;
    m.line = line;
    m.head = head;
    m.text = words;
    m.likely = likely;
    messages_.push_back(m);
    return messages_.back();
  }
  void stop(int line, const std::string& head, const std::string& words, const std::string& likely = {}) {
    stopped_ = true;
    say(Level::stop, line, head, words, likely);
  }

  void check_names(const XmlElement& e, const std::vector<std::string>& known) {
    for (const XmlAttribute& a : e.attributes)
      if (std::find(known.begin(), known.end(), a.name) == known.end() && !a.name.starts_with("xmlns") &&
          !a.name.starts_with("xsi:"))
        stop(a.line, e.name + " " + a.name,
             "<" + e.name + "> has no \"" + a.name + "\". It knows: " + joined(known) + ".",
             nearest_name(a.name, known));
  }

  std::string text(const XmlElement& e, const char* name, bool required) {
    const XmlAttribute* a = e.find(name);
    if (a && !a->value.empty()) return a->value;
    if (required) stop(e.line, e.name + " without " + name, "<" + e.name + "> needs \"" + name + "\".");
    return {};
  }

  std::string word(const XmlElement& e, const char* name, const std::vector<std::string>& allowed,
                   const std::string& otherwise) {
    const XmlAttribute* a = e.find(name);
    if (!a) return otherwise;
    if (std::find(allowed.begin(), allowed.end(), a->value) != allowed.end()) return a->value;
    const std::string near = nearest_name(a->value, allowed);
    stop(a->line, e.name + " " + name + "=\"" + a->value + "\"", "Allowed is " + joined_or(allowed) + ".",
         near.empty() ? "" : std::string(name) + "=\"" + near + "\"");
    return otherwise;
  }

  template <class Value, std::size_t n>
  Value choice(const XmlElement& e, const char* name, const Word<Value> (&words)[n]) {
    std::vector<std::string> allowed;
    for (const Word<Value>& w : words) allowed.push_back(w.word);
    const std::string found = word(e, name, allowed, words[0].word);
    for (const Word<Value>& w : words)
      if (found == w.word) return w.value;
    return words[0].value;
  }

  double number(const XmlElement& e, const char* name, double most) {
    const XmlAttribute& a = *e.find(name);
    char* end = nullptr;
    const double value = std::strtod(a.value.c_str(), &end);
    if (a.value.empty() || *end != '\0' || !std::isfinite(value) || value < 0 || value > most) {
      char range[48];
      std::snprintf(range, sizeof range, "0 to %g", most);
      stop(a.line, e.name + " " + name + "=\"" + a.value + "\"",
           std::string("A plain number with a decimal point is wanted, ") + range + ".");
      return 0;
    }
    return value;
  }

  void child(const XmlElement& e) {
    if (e.name == "title" || e.name == "source") {
      check_names(e, {"text"});
      (e.name == "title" ? set_.title : set_.source) = text(e, "text", true);
    } else if (e.name == "combination") {
      combination(e);
    } else {
      stop(e.line, "<" + e.name + ">", "<combinations> knows: title, source, combination.",
           nearest_name(e.name, {"title", "source", "combination"}));
    }
  }

  void combination(const XmlElement& e) {
    std::vector<std::string> known{"name", "for", "states", "leading"};
    for (const auto& f : factors) known.push_back(f.word);
    check_names(e, known);
    Combination c;
    c.name = text(e, "name", true);
    text(e, "for", true);
    c.purpose = choice(e, "for", purposes);
    c.states = choice(e, "states", groups);
    c.leading = choice(e, "leading", actions);
    for (const auto& f : factors)
      if (e.find(f.word)) c.*f.value = number(e, f.word, greatest_factor);
    if (!e.find("permanent"))
      stop(e.line, "combination without permanent", "The weight always acts: give its factor.",
           "permanent=\"1\"");
    if (!names_.insert(c.name).second)
      stop(e.line, "combination name=\"" + c.name + "\"", "This name stands twice in the set.");
    if (e.find("leading") && loads::factor_of(c, c.leading) == 0)
      stop(e.line, "combination leading=\"" + loads::action_word(c.leading) + "\"",
           "The leading action has no factor in this combination.");
    set_.combinations.push_back(c);
  }

  void judge(int line) {
    const double wind = loads::greatest_wind_factor(set_);
    if (wind == 0)
      stop(line, "combinations",
           "No combination for strength has a wind factor: wind would never be judged.");
    if (set_.ultimate_wind_map && wind > 1)
      stop(line, "combinations wind-map=\"ultimate\"",
           "An ultimate map's speed holds the wind factor; a factor above 1 would count it twice.",
           "wind-map=\"service\"");
    const bool uplift =
        std::any_of(set_.combinations.begin(), set_.combinations.end(), [](const Combination& c) {
          return c.purpose == loads::Purpose::strength && c.wind > 0 && c.permanent <= 1;
        });
    if (!uplift)
      say(Level::warn, line, "combinations",
          "No combination for strength has the weight at 1 or less with wind: where weight helps, the check "
          "is "
          "unsafe.");
  }

  const std::string& file_;
  std::vector<Message>& messages_;
  CombinationSet set_;
  std::set<std::string> names_;
  bool stopped_ = false;
};

}  // namespace

std::optional<CombinationSet> read_combinations_text(const std::string& text, const std::string& file_name,
                                                     std::vector<Message>& messages) {
  XmlFile xml = parse_xml(text, file_name);
  const bool broken = has_stop(xml.messages);
  messages.insert(messages.end(), xml.messages.begin(), xml.messages.end());
  if (broken) return std::nullopt;
  return Reader(file_name, messages).read(xml.root);
}

std::string set_name(const models::TroughDesign& design) {
  const std::string& asked = design.limits.strength;
  if (asked == "EN 1990") return design.site.altitude > 1000 ? "en-1990-high" : "en-1990";
  if (asked == "ASCE 7") return "asce-7-" + std::to_string(design.site.asce_edition) + "-strength";
  return asked;
}

void resolve_combinations(models::TroughDesign& design, const std::string& design_path, int line,
                          std::vector<Message>& messages) {
  if (design.limits.strength.empty()) return;
  const std::string name = set_name(design);
  std::vector<std::string> names{"EN 1990", "ASCE 7"};
  const auto take = [&](const std::string& text, const std::string& file) {
    if (const auto set = read_combinations_text(text, file, messages)) design.combinations = *set;
  };
  for (const EmbeddedText& shipped : shipped_combinations()) {
    if (shipped.name == name) return take(shipped.text, shipped.name);
    names.push_back(shipped.name);
  }
  namespace fs = std::filesystem;
  const fs::path path =
      fs::path(name).is_absolute() ? fs::path(name) : fs::path(design_path).parent_path() / name;
  std::error_code ignored;
  if (fs::is_regular_file(path, ignored)) {
    const FileText file = read_file(path.string(), "combinations");
    if (file.ok) return take(file.text, path.string());
    messages.push_back(file.message);
    return;
  }
  Message m;
  m.file = design_path;
  m.line = line;
  m.head = "limits strength=\"" + design.limits.strength + "\"";
  m.text = "No shipped set of combinations and no file beside the design has this name. Shipped: " +
           joined(names, ", ") + ".";
  if (const std::string near = nearest_name(design.limits.strength, names); !near.empty())
    m.likely = "strength=\"" + near + "\"";
  messages.push_back(m);
}

}  // namespace focalframe::cli
