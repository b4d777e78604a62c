#include "cli/nearest.h"

#include <algorithm>
#include <cctype>

namespace focalframe::cli {
namespace {

char lower(char c) { return static_cast<char>(std::tolower(static_cast<unsigned char>(c))); }

double replace_cost(char a, char b) { return a == b ? 0 : lower(a) == lower(b) ? 0.2 : 1; }

}  // namespace

double edit_distance(std::string_view a, std::string_view b) {
  // Words of a design file are short; anything long is no misspelling of them.
  if (a.size() > 60 || b.size() > 60) return 60;
  std::vector<std::vector<double>> d(a.size() + 1, std::vector<double>(b.size() + 1));
  for (std::size_t i = 0; i <= a.size(); ++i) d[i][0] = static_cast<double>(i);
  for (std::size_t j = 0; j <= b.size(); ++j) d[0][j] = static_cast<double>(j);
  for (std::size_t i = 1; i <= a.size(); ++i)
    for (std::size_t j = 1; j <= b.size(); ++j) {
      d[i][j] =
          std::min({d[i - 1][j] + 1, d[i][j - 1] + 1, d[i - 1][j - 1] + replace_cost(a[i - 1], b[j - 1])});
      if (i > 1 && j > 1 && a[i - 1] == b[j - 2] && a[i - 2] == b[j - 1] && a[i - 1] != a[i - 2])
        d[i][j] = std::min(d[i][j], d[i - 2][j - 2] + 1);
    }
  return d[a.size()][b.size()];
}

std::string nearest_name(std::string_view word, const std::vector<std::string>& known) {
  std::string best;
  // One letter says nothing, so only its case may differ.
  double least = word.size() < 2 ? 0.5 : std::max(1.0, 0.4 * static_cast<double>(word.size())) + 1e-9;
  for (const std::string& name : known) {
    const double distance = edit_distance(word, name);
    if (distance < least) {
      least = distance;
      best = name;
    }
  }
  return best;
}

std::string with_roman_digit(std::string word) {
  const char* roman[] = {"I", "II", "III", "IV"};
  if (word.empty() || word.back() < '1' || word.back() > '4') return word;
  const auto number = static_cast<std::size_t>(word.back() - '1');
  word.pop_back();
  return word + roman[number];
}

std::string joined(const std::vector<std::string>& words, std::string_view between) {
  std::string result;
  for (const std::string& word : words) {
    if (!result.empty()) result += between;
    result += word;
  }
  return result;
}

std::string joined_or(const std::vector<std::string>& words) {
  std::string result;
  for (std::size_t i = 0; i < words.size(); ++i) {
    if (i > 0) result += i + 1 == words.size() ? " or " : ", ";
    result += words[i];
  }
  return result;
}

}  // namespace focalframe::cli
