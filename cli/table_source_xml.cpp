#include <algorithm>

#include "cli/nearest.h"
#include "cli/table_source.h"
#include "cli/xml.h"

namespace focalframe::cli {

namespace {

// Attribute of an element -> key.
struct Place {
  const char *element, *attribute, *key;
};
constexpr Place places[] = {
    {"coefficients", "name", "name"},
    {"coefficients", "collector", "collector"},
    {"coefficients", "kind", "kind"},
    {"coefficients", "format", "format"},
    {"title", "text", "title"},
    {"source", "text", "source"},
    {"confidence", "level", "confidence"},
    {"confidence", "because", "confidence-reason"},
    {"conventions", "pitch-zero", "pitch-zero"},
    {"conventions", "pitch-grows", "pitch-grows"},
    {"conventions", "axes", "axes"},
    {"conventions", "moment-about", "moment-about"},
    {"conventions", "axis-behind-vertex", "axis-behind-vertex"},
    {"conventions", "reversed", "reversed"},
    {"conventions", "stations-from", "stations-from"},
    {"reference", "speed", "reference-speed"},
    {"reference", "height", "reference-height"},
    {"reference", "area", "reference-area"},
    {"reference", "length", "reference-length"},
    {"reference", "area-ratio", "area-ratio"},
    {"reference", "length-ratio", "length-ratio"},
    {"reference", "pressure-ratio", "pressure-ratio"},
    {"includes", "what", "includes"},
    {"uncertainty", "relative", "uncertainty"},
    {"uncertainty", "text", "uncertainty-note"},
    {"validity", "focal-ratio", "focal-ratio"},
    {"validity", "axis-height-ratio", "axis-height-ratio"},
    {"validity", "yaw", "yaw"},
    {"zone", "name", "zone"},
};

class Reader {
 public:
  Reader(const std::string& file, std::vector<Message>& messages) : file_(file), messages_(messages) {}

  TableSource read(const XmlElement& root) {
    if (root.name != "coefficients") {
      stop(root.line, "<" + root.name + ">",
           "A coefficient table has the root element <coefficients name=... collector=... kind=...>.");
      return {};
    }
    attributes(root);
    for (const XmlElement& e : root.children) child(e);
    return source_;
  }

 private:
  void stop(int line, const std::string& head, const std::string& text, const std::string& likely = "") {
    Message message;
    message.file = file_;
    message.line = line;
    message.head = head;
    message.text = text;
    message.likely = likely;
    messages_.push_back(std::move(message));
  }

  void unknown(int line, const std::string& element, const std::string& word,
               const std::vector<std::string>& known) {
    stop(line, element + " " + word,
         "<" + element + "> has no \"" + word + "\". It knows: " + joined(known) + ".",
         nearest_name(word, known));
  }

  void attributes(const XmlElement& e) {
    for (const XmlAttribute& a : e.attributes) {
      const Place* place = std::find_if(std::begin(places), std::end(places), [&](const Place& p) {
        return e.name == p.element && a.name == p.attribute;
      });
      if (place == std::end(places)) {
        std::vector<std::string> known;
        for (const Place& p : places)
          if (e.name == p.element) known.emplace_back(p.attribute);
        unknown(a.line, e.name, a.name, known);
      } else if (source_.keys.count(place->key)) {
        stop(a.line, e.name + " " + a.name,
             "This stands twice in the table; which of the two is meant cannot be known.");
      } else {
        source_.keys[place->key] = {a.value, a.line};
      }
    }
  }

  // Elements with one list or text of their own.
  SourceText only(const XmlElement& e, const std::string& attribute, bool pitch = false) {
    const XmlAttribute* found = e.find(attribute);
    for (const XmlAttribute& a : e.attributes)
      if (a.name != attribute && !(pitch && a.name == "pitch")) unknown(a.line, e.name, a.name, {attribute});
    return {found ? found->value : "", e.line};
  }

  void child(const XmlElement& e) {
    if (e.name == "row") return row(e);
    if (e.name == "caution") return source_.cautions.push_back(only(e, "text").text);
    if (e.name == "profile") {
      const XmlAttribute* pitch = e.find("pitch");
      return source_.profiles.push_back({{pitch ? pitch->value : "", e.line}, only(e, "net", true).text});
    }
    if (e.name == "stations") {
      source_.stations = only(e, "at");
      return;
    }
    std::vector<std::string> known{"row", "caution", "stations", "profile"};
    for (const Place& p : places)
      if (known.back() != p.element && std::string(p.element) != "coefficients")
        known.emplace_back(p.element);
    if (std::find(known.begin(), known.end(), e.name) == known.end())
      return unknown(e.line, "coefficients", e.name, known);
    attributes(e);
  }

  void row(const XmlElement& e) {
    SourceRow r;
    r.line = e.line;
    const auto& known = table_columns();
    for (const XmlAttribute& a : e.attributes) {
      if (a.name == "pitch")
        r.pitch = {a.value, a.line};
      else if (std::find(known.begin(), known.end(), a.name) == known.end())
        unknown(a.line, "row", a.name, known);
      else
        r.cells[a.name] = a.value;
    }
    source_.rows.push_back(r);
  }

  const std::string& file_;
  std::vector<Message>& messages_;
  TableSource source_;
};

}  // namespace

const std::vector<std::string>& table_keys() {
  static const std::vector<std::string> keys = [] {
    std::vector<std::string> all;
    for (const Place& p : places) all.emplace_back(p.key);
    return all;
  }();
  return keys;
}

const std::vector<std::string>& table_columns() {
  static const std::vector<std::string> columns{"Ca",       "Cs",       "Cm",       "Cfx",       "Cfz",
                                                "upper-Ca", "upper-Cs", "upper-Cm", "upper-Cfx", "upper-Cfz"};
  return columns;
}

TableSource read_xml_source(const std::string& text, const std::string& file,
                            std::vector<Message>& messages) {
  const XmlFile xml = parse_xml(text, file);
  messages.insert(messages.end(), xml.messages.begin(), xml.messages.end());
  return has_stop(xml.messages) ? TableSource{} : Reader(file, messages).read(xml.root);
}

}  // namespace focalframe::cli
