#include <string>

#include "cli/draft.h"
#include "cli/draft_xml.h"
#include "cli/escaped.h"
#include "models/schema.h"

namespace focalframe::cli {
namespace {

using models::TroughDesign;

std::string head(const std::string& name, const char* kind) {
  return "<?xml version=\"1.0\" encoding=\"UTF-8\"?>\n"
         "<!-- A design to start from: sizes by rule of thumb, to be replaced by your own. Every number "
         "carries\n"
         "     its unit. basis = measured | drawing | catalogue | agreed | guess says how a value is known. "
         "-->\n"
         "<collector name=\"" +
         escaped(name) + "\" kind=\"" + kind + "\" format=\"1\">\n";
}

std::string tag(const char* path, const TroughDesign& d, const std::vector<std::string>& also = {}) {
  const std::string name(path);
  std::vector<std::string> shown;
  if (!also.empty()) {
    for (const models::Field& f : models::find_element(name)->fields)
      if (models::is_given(f, d)) shown.push_back(f.name);
    shown.insert(shown.end(), also.begin(), also.end());
  }
  const std::size_t slash = name.rfind('/');
  const std::string indent = slash == std::string::npos ? "  " : "    ";
  return indent + "<" + name.substr(slash == std::string::npos ? 0 : slash + 1) +
         attributes_text(name, d, shown);
}

std::string closed(const char* path, const TroughDesign& d, const std::vector<std::string>& also = {}) {
  return tag(path, d, also) + "/>\n";
}

}  // namespace

std::string trough_text(const TroughDesign& d, const std::string& name) {
  std::string t = head(name, "trough");
  t += "\n  <!-- 1  The shape that has to stay true. With a tape: depth=\"450 mm\" instead of focal-length. "
       "-->\n";
  t += closed("parabola", d) + closed("row", d, {"coupling", "drive-after-module"});
  t += "\n  <!-- 2  What holds the shape -->\n";
  t +=
      closed("torque-tube", d) + closed("ribs", d, {"kind"}) + closed("purlins", d) + closed("end-plates", d);
  t += "\n  <!-- 3  What it carries -->\n";
  t += closed("mirror", d, {"kind", "sheet-braces-ribs"}) + tag("receiver", d) + ">\n" +
       closed("receiver/sleeve", d) + closed("receiver/posts", d, {"stand-on"}) + "  </receiver>\n";
  t += closed("counterweights", d);
  t += "\n  <!-- 4  What it stands on, and what turns it. Footing: springs of the ground, or the word rigid. "
       "-->\n";
  t += tag("pylons", d, {"at"}) + ">\n" + closed("pylons/footing", d) + "  </pylons>\n" + closed("drive", d) +
       closed("sensor", d, {"kind", "at", "correction"});
  t += "\n  <!-- 5  Where it is. averaging: 3 s (gust), 1 min, 10 min or 1 h, as your record or client means "
       "it. -->\n";
  t += closed("site", d) + tag("wind", d) + ">\n" + closed("wind/operate", d) + closed("wind/stow", d) +
       closed("wind/stuck", d) + "  </wind>\n";
  t += "\n  <!-- 6  How it is run (elevation 0 deg faces the horizon, 90 deg the sky), and how good the "
       "mirror is\n"
       "          before any load -->\n";
  t += tag("operation", d) + ">\n" + closed("operation/anemometer", d) + "  </operation>\n" +
       closed("optics", d, {"sun"});
  t += "\n  <!-- 7  What is asked of it. A line left out is reported but not judged. -->\n";
  return t + closed("limits", d) + "</collector>\n";
}

std::string every_field_text(const TroughDesign& design, const std::string& name) {
  std::string t = head(name, "trough");
  std::string open;  // element whose children are being written
  const auto& table = models::trough_schema();
  for (std::size_t i = 0; i < table.size(); ++i) {
    const models::Element& element = table[i];
    const std::size_t slash = element.path.rfind('/');
    const std::string parent = slash == std::string::npos ? "" : element.path.substr(0, slash);
    if (!open.empty() && parent != open) t += "  </" + open + ">\n", open.clear();
    const std::string indent = parent.empty() ? "  " : "    ";
    t += "\n" + indent + "<!-- " + element.path.substr(slash == std::string::npos ? 0 : slash + 1) + ": " +
         element.help + (element.required ? "" : " (may be left out)") + "\n";
    std::string shown;
    for (const models::Field& f : element.fields) {
      t += indent + "     " + f.name +
           (f.required               ? ""
            : f.default_text.empty() ? " (may be left out)"
                                     : " (" + f.default_text + " when left out)") +
           ": " + f.help + "\n";
      const bool standard = !f.default_text.empty() && !field_text(f, design).empty();
      if (models::is_given(f, design) || standard)
        shown += " " + f.name + "=\"" + escaped(field_text(f, design)) + "\"";
    }
    t += indent + "-->\n";
    if (element.repeats || !models::is_given(element, design)) continue;
    if (const auto basis = design.basis.find(element.path); basis != design.basis.end())
      shown += " basis=\"" + basis->second + "\"";
    const bool holds = i + 1 < table.size() && table[i + 1].path.starts_with(element.path + "/");
    t += indent + "<" + element.path.substr(slash == std::string::npos ? 0 : slash + 1) + shown +
         (holds ? ">\n" : "/>\n");
    if (holds) open = element.path;
  }
  if (!open.empty()) t += "  </" + open + ">\n";
  return t + "</collector>\n";
}

std::string frame_starter_text(const std::string& name) {
  return "<?xml version=\"1.0\" encoding=\"UTF-8\"?>\n"
         "<!-- A bracket to start from: a post with an arm and a brace, weight and a pull at the tip. -->\n"
         "<collector name=\"" +
         escaped(name) + R"(" kind="frame" format="1">
  <frame>
    <!-- What members are made of. Without density they have no mass. -->
    <material id="steel" E="210 GPa" G="81 GPa" density="7850 kg/m3" yield="235 MPa"/>

    <!-- Cross-sections: round-tube, square-tube, rectangular-tube, round-bar, flat, angle, channel (open:
         weak in torsion) or properties. -->
    <section id="post"  shape="square-tube" side="80 mm" wall="4 mm"/>
    <section id="brace" shape="round-tube" outside-diameter="33.7 mm" wall="2.6 mm"/>

    <!-- Points, each with three shifts ux uy uz and three rotations rx ry rz. Here z is up. -->
    <node id="foot" x="0 m" y="0 m" z="0 m"/>
    <node id="knee" x="0 m" y="0 m" z="0.9 m"/>
    <node id="head" x="0 m" y="0 m" z="1.5 m"/>
    <node id="tip"  x="1.2 m" y="0 m" z="1.5 m"/>

    <!-- Members run from one node to another: local x along them, local z the part of `up` normal to it,
         y = z x x. Iy is about local y. A pinned end lets go of its bending: release-from="ry rz". -->
    <member id="lower" from="foot" to="knee" section="post" material="steel" up="1 0 0"/>
    <member id="upper" from="knee" to="head" section="post" material="steel" up="1 0 0"/>
    <member id="arm"   from="head" to="tip"  section="post" material="steel" up="0 0 1"/>
    <member id="brace" from="knee" to="tip"  section="brace" material="steel" up="0 0 1" release-from="ry rz" release-to="ry rz"/>

    <!-- What holds it: fixed freedoms, or springs to the ground such as
         <spring node="foot" rx="3 MN m/rad"/>. Also: offset (rigid arm at a member's end), end-spring
         (a bolted joint that gives), joint (hinge between two nodes in one place), x-axis on supports
         and springs (their own axes). -->
    <support node="foot" fix="ux uy uz rx ry rz"/>

    <!-- What acts on it, in named cases. Also: point-load, temperature, support-movement; a member-load may
         begin, end and grow (from, to, fy-to). -->
    <mass node="tip" value="25 kg"/>
    <gravity case="weight" value="9.80665 m/s2" direction="0 0 -1"/>
    <load case="pull" node="tip" fx="200 N" fy="150 N"/>
    <member-load case="pull" member="lower" fy="60 N/m"/>
  </frame>
</collector>
)";
}

}  // namespace focalframe::cli
