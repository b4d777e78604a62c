#include "cli/report/page.h"

#include "cli/escaped.h"
#include "cli/report/assets.h"

namespace focalframe::cli {
std::string html_table(const std::vector<std::string>& columns,
                       const std::vector<std::vector<std::string>>& rows,
                       const std::set<std::size_t>& flagged) {
  std::string out = "<div class=\"wide\"><table><thead><tr>";
  std::vector<bool> flush;
  for (const std::string& column : columns) {
    flush.push_back(!column.empty() && column[0] == '>');
    out += flush.back() ? "<th class=\"right\">" + escaped(column.substr(1)) : "<th>" + escaped(column);
    out += "</th>";
  }
  out += "</tr></thead><tbody>\n";
  for (std::size_t r = 0; r < rows.size(); ++r) {
    const auto& row = rows[r];
    out += flagged.count(r) ? "<tr class=\"no\">" : "<tr>";
    for (std::size_t i = 0; i < row.size(); ++i)
      out += (i < flush.size() && flush[i] ? "<td class=\"right\">" : "<td>") + escaped(row[i]) + "</td>";
    out += "</tr>\n";
  }
  return out + "</tbody></table></div>\n";
}

std::string html_paragraph(const std::string& text) { return "<p>" + escaped(text) + "</p>\n"; }

std::string html_list(const std::vector<std::string>& items) {
  std::string out = "<ul>\n";
  for (const std::string& item : items) out += "<li>" + escaped(item) + "</li>\n";
  return out + "</ul>\n";
}

std::string html_figure(const Figure& figure) {
  return "<figure id=\"figure-" + figure.key + "\">" + figure.drawing.inside_page() + "<figcaption><b>" +
         escaped(figure.title) + ".</b> " + escaped(figure.caption) + "</figcaption></figure>\n";
}

std::string html_folded(const std::string& summary, const std::string& body) {
  return "<details><summary>" + escaped(summary) + "</summary>\n" + body + "</details>\n";
}

std::string to_html(const Page& page) {
  std::string out =
      "<!DOCTYPE html>\n<html lang=\"en\"><head><meta charset=\"utf-8\">\n"
      "<meta name=\"viewport\" content=\"width=device-width,initial-scale=1\">\n"
      "<meta name=\"color-scheme\" content=\"light dark\">\n<link rel=\"icon\" href=\"data:,\">\n<title>" +
      escaped(page.title) + "</title>\n<style>" + asset("colours.css") + asset("drawing.css") +
      asset("page.css") + "</style></head><body>\n<header><h1>" + escaped(page.title) +
      "</h1>\n<p class=\"sub\">" + escaped(page.subtitle) + "</p>\n<p class=\"verdict " +
      (page.holds ? "yes" : "no") + "\">" + escaped(page.verdict) + "</p>\n<nav>";
  for (const Section& s : page.sections) out += "<a href=\"#" + s.id + "\">" + escaped(s.title) + "</a>";
  out += "</nav></header>\n<main>\n";
  for (const Section& s : page.sections)
    out += "<section id=\"" + s.id + "\"><h2>" + escaped(s.title) + "</h2>\n" + s.body + "</section>\n";
  out += "</main>\n<footer><p class=\"sub\">" + escaped(page.foot) + "</p></footer>\n";
  if (!page.script.empty()) out += page.script;
  return out + "</body></html>\n";
}

}  // namespace focalframe::cli
