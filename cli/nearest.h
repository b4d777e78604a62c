#pragma once

/// Which known word a misspelt one was probably meant to be.

#include <string>
#include <string_view>
#include <vector>

namespace focalframe::cli {

/// Edits (insert, delete, replace, swap of neighbours) that turn one word into the other; letter case counts
/// a little less than an edit.
double edit_distance(std::string_view a, std::string_view b);

/// The nearest of `known`, or empty when none is near enough to be worth naming.
std::string nearest_name(std::string_view word, const std::vector<std::string>& known);

/// A single digit 1 to 4 at the end becomes the Roman number that terrain classes are written with: "EN 2" is
/// "EN II".
std::string with_roman_digit(std::string word);

/// "a b c" / "a, b or c".
std::string joined(const std::vector<std::string>& words, std::string_view between = " ");
std::string joined_or(const std::vector<std::string>& words);

}  // namespace focalframe::cli
