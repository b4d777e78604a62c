#pragma once

/// One element of a <frame>, with its attributes read by kind and everything odd about them said.

#include <optional>
#include <string>
#include <vector>

#include "cli/frame_words.h"
#include "cli/xml.h"
#include "fem/frame.h"

namespace focalframe::cli {

class FrameElementReader {
 public:
  /// Complains at once about unknown attributes and missing required ones.
  FrameElementReader(const XmlElement& xml, const FrameElement& words, const std::string& file,
                     std::vector<Message>& messages);

  bool has(const std::string& attribute) const;
  /// Text as written; empty when missing.
  std::string text(const std::string& attribute) const;
  /// Value in SI; nullopt when missing or complained about.
  std::optional<double> number(const std::string& attribute) const;
  /// Flags for a list of freedoms such as "ux uy"; all false when missing.
  fem::Six freedoms(const std::string& attribute) const;
  /// Three plain numbers that are not all zero.
  std::optional<fem::Vec3> direction(const std::string& attribute) const;
  /// One of `allowed`; empty when missing or complained about.
  std::string word(const std::string& attribute, const std::vector<std::string>& allowed) const;
  /// Axes (columns) from "x-axis" and "up"; the frame's own when neither is there.
  fem::Mat3 axes() const;

  /// `attribute` empty: about the element as a whole.
  Message& say(const std::string& attribute, std::string text, Level level = Level::stop) const;
  int line() const { return xml_.line; }
  const std::string& name() const { return xml_.name; }

 private:
  std::string head(const std::string& attribute) const;
  void check_names();

  const XmlElement& xml_;
  const FrameElement& words_;
  const std::string& file_;
  std::vector<Message>& messages_;
};

}  // namespace focalframe::cli
