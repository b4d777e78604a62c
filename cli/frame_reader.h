#pragma once

/// The reader behind cli/frame_file.h: one object per file, spread over frame_file.cpp (order, ids, the
/// whole), frame_parts.cpp (what the frame is made of) and frame_loads.cpp.

#include <map>
#include <optional>
#include <string>
#include <vector>

#include "cli/frame_element.h"
#include "cli/frame_file.h"

namespace focalframe::cli {

class FrameReader {
 public:
  explicit FrameReader(const DesignFile& design) : file_(design.path) {}
  FrameFile run(const XmlElement& root);

 private:
  using Ids = std::map<std::string, int>;

  Message& say(int line, std::string head, std::string text, Level level = Level::stop);
  const XmlElement* find_frame(const XmlElement& root);
  void unknown(const XmlElement& xml);
  void read(const XmlElement& xml);

  void enter_id(const FrameElementReader& element, Ids& ids, int index);
  int find_id(const FrameElementReader& element, const std::string& attribute, const Ids& ids,
              const std::string& what);
  std::optional<double> positive(const FrameElementReader& element, const std::string& attribute,
                                 bool zero = false);
  void warn_outside(const FrameElementReader& element, const std::string& attribute, double value,
                    double least, double most, const std::string& usual);
  /// Three lengths "x", "y", "z"; 0 where missing.
  static fem::Vec3 place(const FrameElementReader& element);

  void read_material(const FrameElementReader& element);
  void read_section(const FrameElementReader& element);
  void read_node(const FrameElementReader& element);
  void read_member(const FrameElementReader& element);
  void turn_to_principal_axes(fem::Member& member) const;
  void read_offset(const FrameElementReader& element);
  void read_end_spring(const FrameElementReader& element);
  /// Member of an element with "member" and "end"; nullptr when either is wrong or the end was named before.
  fem::Member* find_end(const FrameElementReader& element, bool& at_from);
  void read_joint(const FrameElementReader& element);
  void read_support(const FrameElementReader& element);
  void read_spring(const FrameElementReader& element);
  void read_mass(const FrameElementReader& element);

  std::size_t load_case(const FrameElementReader& element);
  /// Values of the attributes in SI, 0 where missing; complains when all are.
  fem::Vec6 six(const FrameElementReader& element, const std::vector<std::string>& words);
  void read_load(const FrameElementReader& element);
  void read_member_load(const FrameElementReader& element);
  void read_point_load(const FrameElementReader& element);
  /// Fraction of a member's length; complains and returns 0 when it lies outside.
  double fraction(const FrameElementReader& element, const std::string& attribute, int member);
  void read_temperature(const FrameElementReader& element);
  void read_support_movement(const FrameElementReader& element);
  void read_gravity(const FrameElementReader& element);

  void check_whole();
  void check_mass();
  static std::string sentence(const std::string& text);

  const std::string& file_;
  FrameFile out_;
  Ids materials_, sections_, nodes_, members_, joints_, springs_, masses_;
  std::vector<double> tilts_;  ///< of each section
  std::map<std::string, int> lines_;
  std::map<int, int> own_ground_;  ///< node -> ground node of its turned support
  int gravity_line_ = 0;
};

}  // namespace focalframe::cli
