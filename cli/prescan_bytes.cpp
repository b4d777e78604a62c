#include "cli/prescan_bytes.h"

#include <algorithm>
#include <cctype>
#include <charconv>

namespace focalframe::cli {
namespace {

// Length of the valid UTF-8 sequence at the front of `text`; 0 when there is none (overlong forms,
// surrogates and values above U+10FFFF included).
std::size_t sequence_length(std::string_view text) {
  const auto byte = [&](std::size_t i) { return i < text.size() ? static_cast<unsigned char>(text[i]) : 0u; };
  const auto follows = [&](std::size_t i) { return (byte(i) & 0xC0u) == 0x80u; };
  const unsigned first = byte(0);
  if (first < 0x80) return 1;
  if (first >= 0xC2 && first <= 0xDF) return follows(1) ? 2 : 0;
  if (first >= 0xE0 && first <= 0xEF) {
    if (!follows(1) || !follows(2)) return 0;
    if ((first == 0xE0 && byte(1) < 0xA0) || (first == 0xED && byte(1) > 0x9F)) return 0;
    return 3;
  }
  if (first >= 0xF0 && first <= 0xF4) {
    if (!follows(1) || !follows(2) || !follows(3)) return 0;
    if ((first == 0xF0 && byte(1) < 0x90) || (first == 0xF4 && byte(1) > 0x8F)) return 0;
    return 4;
  }
  return 0;
}

std::string lower(std::string_view text) {
  std::string result(text);
  for (char& c : result) c = static_cast<char>(std::tolower(static_cast<unsigned char>(c)));
  return result;
}

}  // namespace

BadByte find_bad_byte(std::string_view text) {
  if (text.starts_with("\xFF\xFE") || text.starts_with("\xFE\xFF"))
    return {0, "", "The file is in UTF-16; only UTF-8 is read.", "Save it as UTF-8"};
  int line = 1;
  for (std::size_t i = 0; i < text.size();) {
    const unsigned char c = static_cast<unsigned char>(text[i]);
    if (c == '\n') ++line;
    if (c == 0)
      return {line, "a zero byte", "This is no text file, or it was damaged on its way here.",
              "Copy it again from where it came"};
    if ((c < 0x20 && c != '\n' && c != '\t') || c == 0x7f)
      return {line, "a control character", "A control character that no text holds stands in this line.",
              "Delete it, or copy the file again"};
    const std::size_t length = sequence_length(text.substr(i));
    if (length == 0)
      return {line, "a letter that is not UTF-8",
              "A letter in this line is stored in another encoding, so what it says is not sure.",
              "Save the file as UTF-8"};
    i += length;
  }
  return {};
}

std::string encoding_problem(std::string_view declaration, std::string_view text) {
  const std::size_t at = declaration.find("encoding");
  if (at == std::string_view::npos) return "";
  const std::size_t open = declaration.find_first_of("\"'", at);
  if (open == std::string_view::npos) return "The declaration's encoding has no value.";
  const std::size_t close = declaration.find(declaration[open], open + 1);
  if (close == std::string_view::npos) return "The declaration's encoding has no closing quotation mark.";
  const std::string name = lower(declaration.substr(open + 1, close - open - 1));
  const bool ascii =
      std::all_of(text.begin(), text.end(), [](char c) { return static_cast<unsigned char>(c) < 0x80; });
  if (name == "utf-8" || name == "utf8" || ascii) return "";
  return "The declaration says " + name + ", the letters in the file are UTF-8.";
}

bool is_entity(std::string_view text) {
  for (const char* name : {"&amp;", "&lt;", "&gt;", "&quot;", "&apos;"})
    if (text.starts_with(name)) return true;
  const std::size_t end = text.find(';');
  if (!text.starts_with("&#") || end == std::string_view::npos) return false;
  const bool hex = text.starts_with("&#x");
  const std::string_view digits = text.substr(hex ? 3 : 2, end - (hex ? 3 : 2));
  unsigned code = 0;
  const auto [stop, error] =
      std::from_chars(digits.data(), digits.data() + digits.size(), code, hex ? 16 : 10);
  if (error != std::errc() || stop != digits.data() + digits.size() || digits.empty()) return false;
  return code > 0x1F && code != 0x7F && code <= 0x10FFFF && !(code >= 0xD800 && code <= 0xDFFF);
}

}  // namespace focalframe::cli
