#include "cli/report/page.h"

#include "cli/escaped.h"

namespace focalframe::cli {
namespace {

const char* page_style() {
  return R"css(
*{box-sizing:border-box}
html{background:var(--paper);color:var(--ink);font:16px/1.5 system-ui,"Liberation Sans",sans-serif;-webkit-text-size-adjust:100%}
body{margin:0 auto;max-width:60rem;padding:1.2rem 1rem 4rem}
h1{font-size:1.7rem;line-height:1.2;margin:.2rem 0} h2{font-size:1.25rem;margin:2.4rem 0 .6rem;padding-top:.5rem;border-top:3px solid var(--ink)}
h3{font-size:1rem;margin:1.4rem 0 .4rem} p{margin:.5rem 0;max-width:46rem} .sub{color:var(--soft)}
.verdict{font-size:1.15rem;font-weight:650;border:2px solid;border-left-width:.9rem;padding:.55rem .8rem;margin:1rem 0}
.verdict.no{border-color:var(--bad)} .verdict.yes{border-color:var(--good)}
nav{font-size:.9rem;display:flex;flex-wrap:wrap;gap:.2rem .9rem;margin:.8rem 0} a{color:var(--one)}
.wide{overflow-x:auto} table{border-collapse:collapse;font-size:.88rem;margin:.5rem 0;min-width:50%}
th{text-align:left;font-weight:600;border-bottom:1.5px solid var(--ink);padding:.2rem .6rem .2rem 0;vertical-align:bottom}
td{border-bottom:1px solid var(--rule);padding:.22rem .6rem .22rem 0;vertical-align:top}
.right{text-align:right;white-space:nowrap;font-variant-numeric:tabular-nums} tr.no td{font-weight:650;color:var(--bad)}
figure{margin:1.1rem 0;break-inside:avoid} figure svg{width:100%;height:auto;max-width:42rem;display:block}
figcaption{font-size:.86rem;color:var(--soft);max-width:42rem} figcaption b{color:var(--ink)}
details{margin:.6rem 0} summary{cursor:pointer;font-weight:600} pre{font-size:.74rem;line-height:1.35;overflow-x:auto;background:var(--wash);padding:.7rem}
.sign{display:grid;grid-template-columns:repeat(auto-fit,minmax(10rem,1fr));gap:1.6rem;margin-top:2rem} .sign div{border-top:1px solid var(--ink);font-size:.85rem;color:var(--soft)}
.view{border:1px solid var(--rule);margin:.6rem 0} .view canvas{display:block;width:100%;touch-action:none}
.view .bar{display:flex;flex-wrap:wrap;gap:.5rem 1.2rem;padding:.5rem .7rem;background:var(--wash);font-size:.88rem;align-items:center}
.view label{display:flex;gap:.4rem;align-items:center} .view output{font-variant-numeric:tabular-nums}
.view .said{padding:.5rem .7rem;font-size:.88rem;min-height:3.2rem}
@page{size:A4;margin:16mm 14mm} @media print{body{max-width:none;padding:0;} html{font-size:11.5px} nav,.view{display:none} h2{break-after:avoid} pre{white-space:pre-wrap} tr{break-inside:avoid} a{color:inherit;text-decoration:none}}
@media (max-width:34rem){html{font-size:15px} body{padding:.8rem .7rem 3rem} h1{font-size:1.4rem}}
)css";
}

}  // namespace

std::string html_table(const std::vector<std::string>& columns,
                       const std::vector<std::vector<std::string>>& rows) {
  std::string out = "<div class=\"wide\"><table><thead><tr>";
  std::vector<bool> flush;
  for (const std::string& column : columns) {
    flush.push_back(!column.empty() && column[0] == '>');
    out += flush.back() ? "<th class=\"right\">" + escaped(column.substr(1)) : "<th>" + escaped(column);
    out += "</th>";
  }
  out += "</tr></thead><tbody>\n";
  for (const auto& row : rows) {
    out += "<tr>";
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
      escaped(page.title) + "</title>\n<style>" + colour_properties() + drawing_style() + page_style() +
      "</style></head><body>\n<header><h1>" + escaped(page.title) + "</h1>\n<p class=\"sub\">" +
      escaped(page.subtitle) + "</p>\n<p class=\"verdict " + (page.holds ? "yes" : "no") + "\">" +
      escaped(page.verdict) + "</p>\n<nav>";
  for (const Section& s : page.sections) out += "<a href=\"#" + s.id + "\">" + escaped(s.title) + "</a>";
  out += "</nav></header>\n<main>\n";
  for (const Section& s : page.sections)
    out += "<section id=\"" + s.id + "\"><h2>" + escaped(s.title) + "</h2>\n" + s.body + "</section>\n";
  out += "</main>\n<footer><p class=\"sub\">" + escaped(page.foot) + "</p></footer>\n";
  if (!page.script.empty()) out += page.script;
  return out + "</body></html>\n";
}

}  // namespace focalframe::cli
