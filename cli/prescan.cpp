#include "cli/prescan.h"

#include <algorithm>
#include <cctype>
#include <charconv>
#include <set>
#include <utility>

#include "cli/prescan_bytes.h"

namespace focalframe::cli {
namespace {

constexpr std::size_t deepest = 40;
constexpr const char* typographic_marks[] = {"“", "”", "„", "«", "»", "‘", "’"};

bool is_space(char c) { return c == ' ' || c == '\t' || c == '\n'; }
bool is_name(char c) {
  return std::isalnum(static_cast<unsigned char>(c)) || c == '-' || c == '_' || c == ':' || c == '.' ||
         static_cast<unsigned char>(c) >= 0x80;
}

struct Open {
  std::string name;
  int line;
};

class Scan {
 public:
  Scan(std::string_view text, const std::string& file) : text_(text), file_(file) {}

  std::vector<Message> run() {
    while (at_ < text_.size() && !stopped_) {
      if (text_[at_] != '<') {
        read_text();
      } else if (starts("<!--")) {
        read_comment();
      } else if (starts("<?")) {
        read_declaration();
      } else if (starts("<!")) {
        read_bang();
      } else if (starts("</")) {
        read_close();
      } else {
        read_tag();
      }
    }
    if (!stopped_) at_end();
    return std::move(messages_);
  }

 private:
  bool starts(std::string_view mark) const { return text_.substr(at_).starts_with(mark); }

  int line_of(std::size_t place) const {
    return 1 + static_cast<int>(
                   std::count(text_.begin(), text_.begin() + static_cast<std::ptrdiff_t>(place), '\n'));
  }

  Message& say(std::size_t place, std::string head, std::string text) {
    messages_.push_back({.file = file_,
                         .line = line_of(place),
                         .head = std::move(head),
                         .rule = {},
                         .text = std::move(text),
                         .likely = {},
                         .advice = {}});
    return messages_.back();
  }

  // As say(), and nothing after this place can be trusted.
  Message& stop(std::size_t place, std::string head, std::string text) {
    stopped_ = true;
    return say(place, std::move(head), std::move(text));
  }

  void skip_space() {
    while (at_ < text_.size() && is_space(text_[at_])) ++at_;
  }

  std::string read_name() {
    const std::size_t start = at_;
    while (at_ < text_.size() && is_name(text_[at_])) ++at_;
    return std::string(text_.substr(start, at_ - start));
  }

  void read_text() {
    const std::size_t end = std::min(text_.find('<', at_), text_.size());
    std::size_t first = at_;
    while (first < end && is_space(text_[first])) ++first;
    if (first < end) {
      std::string found(text_.substr(first, std::min<std::size_t>(40, end - first)));
      found = found.substr(0, found.find('\n'));
      if (open_.empty() && !root_seen_ && root_line_ == 0)
        stop(first, found,
             "The file does not begin with an element: this is not a design file, or its first line is "
             "damaged.");
      else
        say(first, found,
            "Text stands between the elements, where nothing would read it. Put remarks into <!-- --> and "
            "values into an element.");
    }
    at_ = end;
  }

  void read_comment() {
    const std::size_t start = at_, end = text_.find("-->", at_ + 4);
    if (end == std::string_view::npos) {
      stop(start, "<!-- is never closed", "Everything after this line would be taken for a remark.").advice =
          "Close the remark with -->";
      return;
    }
    const std::string_view inside = text_.substr(start + 4, end - start - 4);
    if (const std::size_t next = inside.find("<!--"); next != std::string_view::npos)
      say(start, "<!-- is not closed before the next remark",
          "Everything from here to line " + std::to_string(line_of(end)) +
              " would be taken for a remark, elements too; the next remark begins in line " +
              std::to_string(line_of(start + 4 + next)) + ".")
          .advice = "Close the first remark with -->";
    at_ = end + 3;
  }

  void read_declaration() {
    const std::size_t start = at_, end = text_.find("?>", at_);
    const std::string_view whole = text_.substr(start, end == std::string_view::npos ? 40 : end - start + 2);
    if (end == std::string_view::npos) {
      stop(start, "<? is never closed", "The declaration that begins here has no ?> at its end.");
      return;
    }
    const bool first =
        whole.starts_with("<?xml ") || whole.starts_with("<?xml\n") || whole.starts_with("<?xml\t");
    if (!first || start != 0)
      say(start, std::string(whole),
          "Only <?xml ... ?> may stand here, once, as the very first thing in the file.");
    else if (auto problem = encoding_problem(whole, text_); !problem.empty())
      say(start, std::string(whole), problem).advice = "Save the file as UTF-8 and write encoding=\"UTF-8\"";
    at_ = end + 2;
  }

  void read_bang() {
    const bool doctype = starts("<!DOCTYPE") || starts("<!ENTITY");
    if (doctype)
      stop(at_, "<!DOCTYPE ...>",
           "A design has no document type of its own: entities could hide or change values.")
          .advice = "Delete it";
    else if (starts("<![CDATA["))
      stop(at_, "<![CDATA[", "Text stands between the elements, where nothing would read it.");
    else
      stop(at_, std::string(text_.substr(at_, 20)),
           "A tag cannot begin like this; a remark begins with <!--.");
  }

  void read_close() {
    const std::size_t start = at_;
    at_ += 2;
    const std::string name = read_name();
    skip_space();
    if (at_ >= text_.size() || text_[at_] != '>' || name.empty()) {
      stop(start, "</" + name, "The close tag that begins here is broken: > is missing.");
      return;
    }
    ++at_;
    if (open_.empty()) {
      stop(start, "</" + name + ">", "This closes nothing: no element is open here.").advice =
          "Delete it, or look for the place where its element was closed too early";
    } else if (open_.back().name != name) {
      wrong_close(start, name);
    } else {
      open_.pop_back();
      if (open_.empty()) root_closed(start, name);
    }
  }

  void wrong_close(std::size_t start, const std::string& name) {
    const Open& innermost = open_.back();
    const bool outer = std::any_of(open_.begin(), open_.end(), [&](const Open& o) { return o.name == name; });
    Message& message = stop(
        start, "</" + name + ">",
        outer ? "<" + innermost.name + "> of line " + std::to_string(innermost.line) + " is still open here."
              : "The element open here is <" + innermost.name + "> of line " +
                    std::to_string(innermost.line) + ". Nothing after this line was read.");
    if (outer)
      message.advice = "Write </" + innermost.name + "> before it, or end the tag of line " +
                       std::to_string(innermost.line) + " with />";
    else
      message.likely = "</" + innermost.name + ">";
  }

  // The one root is closed: nothing but remarks and white space may follow.
  void root_closed(std::size_t start, const std::string& name) {
    root_seen_ = true;
    std::size_t place = at_;
    while (place < text_.size()) {
      if (is_space(text_[place])) {
        ++place;
      } else if (text_.substr(place).starts_with("<!--")) {
        const std::size_t end = text_.find("-->", place + 4);
        if (end == std::string_view::npos) {
          at_ = place;
          read_comment();
          return;
        }
        place = end + 3;
      } else {
        break;
      }
    }
    if (place >= text_.size()) {
      at_ = text_.size();
      return;
    }
    std::string next(text_.substr(place, 40));
    next = next.substr(0, next.find_first_of(" \n/>", 1));
    if (next.starts_with("<") && next != "<") next += ">";
    stop(start, "</" + name + "> closes the design here",
         "What follows from line " + std::to_string(line_of(place)) + " on, beginning with " + next +
             ", would be dropped without a word.")
        .advice = "Move </" + name + "> to the end of the file";
  }

  void read_tag() {
    tag_ = at_;
    ++at_;
    const std::string name = read_name();
    if (name.empty()) {
      stop(tag_, std::string(text_.substr(tag_, 20)), "A tag must begin with a name right after <.").advice =
          "A < that is meant as text is written &lt;";
      return;
    }
    if (open_.empty() && root_line_ == 0) root_line_ = line_of(tag_);
    std::set<std::string> seen;
    while (!stopped_) {
      const std::size_t before = at_;
      skip_space();
      if (at_ >= text_.size()) {
        stop(tag_, "<" + name + "> cannot be read", "The tag that begins here is never closed with >.");
      } else if (text_[at_] == '>') {
        ++at_;
        open_.push_back({name, line_of(tag_)});
        if (open_.size() > deepest)
          stop(tag_, "<" + name + ">", "Elements are nested deeper than any design needs.");
        return;
      } else if (starts("/>")) {
        at_ += 2;
        if (open_.empty()) root_closed(tag_, name);
        return;
      } else {
        read_attribute(name, before == at_, seen);
      }
    }
  }

  void broken_tag(const std::string& element, const std::string& why, std::string advice = {},
                  std::string likely = {}) {
    Message& m = stop(tag_, "<" + element + "> cannot be read",
                      why + " Nothing after this line was read, so more may follow.");
    m.advice = std::move(advice);
    m.likely = std::move(likely);
  }

  void read_attribute(const std::string& element, bool no_space, std::set<std::string>& seen) {
    const std::size_t start = at_;
    const std::string name = read_name();
    if (name.empty()) {
      broken_tag(
          element, "The tag that begins here is broken at \"" + std::string(text_.substr(start, 1)) + "\".",
          text_[start] == '<' ? "Look for a missing > or /> before line " + std::to_string(line_of(start))
                              : "");
      return;
    }
    skip_space();
    if (at_ >= text_.size() || text_[at_] != '=') {
      broken_tag(element, "\"" + name + "\" has no value: attributes are written name=\"value\".");
      return;
    }
    ++at_;
    skip_space();
    const char quote = at_ < text_.size() ? text_[at_] : '\0';
    if (quote != '"' && quote != '\'') {
      unquoted(element, name);
      return;
    }
    const std::size_t open = ++at_, close = text_.find(quote, open);
    if (close == std::string_view::npos ||
        text_.substr(open, close - open).find('\n') != std::string_view::npos) {
      broken_tag(element, "The tag that begins here is broken: a quotation mark is missing or doubled.",
                 "Look at: " + std::string(text_.substr(
                                   start, std::min(text_.find('\n', start), text_.size()) - start)));
      return;
    }
    at_ = close + 1;
    const std::string value(text_.substr(open, close - open));
    if (at_ < text_.size() && is_name(text_[at_]) && swallowed_attribute(element, name, value)) return;
    if (no_space)
      say(start, element + " " + name + "=\"" + value + "\"",
          "No space stands before this attribute, so it may belong to the value before it.")
          .advice = "Put a space before it";
    if (!seen.insert(name).second)
      say(start, element + " " + name + "=\"" + value + "\"",
          "<" + element + "> has \"" + name + "\" twice; only one of them can count.")
          .advice = "Keep the right one and delete the other";
    check_value(start, element, name, value);
  }

  void unquoted(const std::string& element, const std::string& name) {
    std::size_t end = at_;
    bool typographic = false;
    for (const char* mark : typographic_marks) typographic = typographic || starts(mark);
    while (end < text_.size() && text_[end] != '\n' && text_[end] != '>' && text_[end] != '/' &&
           (!is_space(text_[end]) || (typographic && closing_mark_follows(end))))
      ++end;
    std::string value(text_.substr(at_, end - at_));
    for (const char* mark : typographic_marks)
      for (std::size_t at = value.find(mark); at != std::string::npos; at = value.find(mark))
        value.erase(at, std::string_view(mark).size());
    broken_tag(element, "The value of \"" + name + "\" does not stand in straight quotation marks.", {},
               value.empty() ? "" : name + "=\"" + value + "\"");
  }

  // A typographic value may hold spaces up to its closing mark.
  bool closing_mark_follows(std::size_t place) const {
    const std::size_t next = std::min(text_.find_first_of("=<>\n", place), text_.size());
    const std::string_view rest = text_.substr(place, next - place);
    return std::any_of(std::begin(typographic_marks), std::end(typographic_marks),
                       [&](const char* mark) { return rest.find(mark) != std::string_view::npos; });
  }

  // `thickness="1.2 mm material="aluminium"`: the value before ran into the next attribute's name.
  bool swallowed_attribute(const std::string& element, const std::string& name, const std::string& value) {
    const std::size_t equals = value.find_last_not_of(" \t");
    if (equals == std::string::npos || value[equals] != '=') return false;
    std::size_t begin = equals;
    while (begin > 0 && is_name(value[begin - 1])) --begin;
    if (begin == equals || begin == 0) return false;
    std::string kept = value.substr(0, begin);
    while (!kept.empty() && is_space(kept.back())) kept.pop_back();
    const std::string next = value.substr(begin, equals - begin + 1);
    broken_tag(element, "The tag that begins here is broken: a quotation mark is missing or doubled.",
               "Look at: " + name + "=\"" + value, name + "=\"" + kept + "\" " + next);
    return true;
  }

  void check_value(std::size_t start, const std::string& element, const std::string& name,
                   const std::string& value) {
    const std::string head = element + " " + name + "=\"" + value + "\"";
    if (value.find('<') != std::string::npos)
      say(start, head, "A < inside a value is not read as text.").advice =
          "Write &lt; if it is meant, or look for a missing quotation mark";
    for (std::size_t at = value.find('&'); at != std::string::npos; at = value.find('&', at + 1))
      if (!is_entity(std::string_view(value).substr(at))) {
        say(start, head,
            "An & begins a sign such as &amp; or &lt;; this one is none of the five that exist, and the text "
            "would change without a word.")
            .advice = "Write &amp; for the sign itself";
        return;
      }
  }

  void at_end() {
    if (!open_.empty())
      say(place_of_line(open_.back().line), "<" + open_.back().name + "> is never closed",
          "The file ends while this element is open.")
          .advice = "Write </" + open_.back().name + "> where it ends, or end its tag with />";
    else if (root_line_ == 0)
      say(0, "", "The file holds no element: a design begins with <collector name=\"...\" kind=\"trough\">.");
  }

  std::size_t place_of_line(int line) const {
    std::size_t place = 0;
    for (int i = 1; i < line; ++i) place = text_.find('\n', place) + 1;
    return place;
  }

  std::string_view text_;
  const std::string& file_;
  std::size_t at_ = 0, tag_ = 0;
  int root_line_ = 0;
  bool root_seen_ = false, stopped_ = false;
  std::vector<Open> open_;
  std::vector<Message> messages_;
};

}  // namespace

std::vector<Message> prescan(std::string_view text, const std::string& file) {
  if (const BadByte bad = find_bad_byte(text); !bad.problem.empty())
    return {{.file = file,
             .line = bad.line,
             .head = bad.head,
             .rule = {},
             .text = bad.problem,
             .likely = {},
             .advice = bad.advice}};
  return Scan(text, file).run();
}

}  // namespace focalframe::cli
