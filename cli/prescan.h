#pragma once

/// A look at the raw text of an XML file before the XML library sees it.
///
/// The library takes damaged text without a word: a second root element, text after a stray close tag, a `<`
/// inside a value, unknown entities, and then drops what does not fit. A dropped <limits> would mean that
/// nothing is judged, so everything of this kind is found here first and has a line.

#include <string>
#include <string_view>
#include <vector>

#include "cli/messages.h"

namespace focalframe::cli {

/// Everything that damages the file, in the order of lines; empty when the text is fit to be parsed. After
/// damage that makes the rest unreadable (a broken quotation mark, a wrong close tag) the scan stops.
/// `text` must have plain line ends.
std::vector<Message> prescan(std::string_view text, const std::string& file);

}  // namespace focalframe::cli
