#include "cli/prescan.h"

#include <catch2/catch.hpp>
#include <string>

#include "cli/read_file.h"
#include "cli/xml.h"

using namespace focalframe::cli;
using namespace std::string_literals;

namespace {

struct Damage {
  const char* name;
  std::string text;
  int line;
  const char* said;
};

}  // namespace

TEST_CASE("sound files pass the pre-scan", "[prescan]") {
  const std::string sound[] = {
      "<a/>",
      "<?xml version=\"1.0\" encoding=\"UTF-8\"?>\n<!-- remark -->\n<a b='c'>\n  <d/>\n</a>\n<!-- end -->\n",
      "<a b=\"&amp; &lt; &gt; &quot; &apos; &#176; &#xB0;\"/>", "<a b = \"c\"\n   d='e' ></a >",
      "<a b=\"µm ² é\"/>"};
  for (const std::string& text : sound) {
    INFO(text);
    CHECK(prescan(text, "f.xml").empty());
    CHECK(parse_xml(text, "f.xml").root.name == "a");
  }
}

TEST_CASE("damage that an XML library takes without a word is found, with its line", "[prescan]") {
  const Damage cases[] = {
      {"root closed too early", "<a>\n<b/>\n</a>\n<limits/>\n</a>", 3, "would be dropped"},
      {"two roots", "<a/>\n<b/>", 1, "would be dropped"},
      {"text after the root", "<a/>\nhello", 1, "would be dropped"},
      {"stray close tag after the root", "<a></a>\n</b>", 1, "would be dropped"},
      {"no space between attributes", "<a>\n<b c=\"1\"d=\"2\"/></a>", 2, "No space"},
      {"< in a value", "<a b=\"1 < 2\"/>", 1, "< inside a value"},
      {"& in a value", "<a b=\"this & that\"/>", 1, "&"},
      {"unknown entity", "<a b=\"&amp;&foo;\"/>", 1, "&"},
      {"reference to zero", "<a b=\"x&#0;y\"/>", 1, "&"},
      {"reference to a control character", "<a b=\"&#x1;\"/>", 1, "&"},
      {"huge reference", "<a b=\"&#99999999999;\"/>", 1, "&"},
      {"document type", "<!DOCTYPE a [<!ENTITY e \"x\">]>\n<a/>", 1, "document type"},
      {"Latin-1 bytes", "<a\nb=\"\xB0\"/>", 2, "another encoding"},
      {"overlong UTF-8", "<a b=\"\xC0\xAF\"/>", 1, "another encoding"},
      {"surrogate in UTF-8", "<a b=\"\xED\xA0\x80\"/>", 1, "another encoding"},
      {"text between elements", "<a>\n<b/>12 mm<c/></a>", 2, "between the elements"},
      {"zero byte", "<a b=\"\0\"/>"s, 1, "no text file"},
      {"control character", "<a>\n\x01</a>", 2, "control character"},
      {"doubled attribute", "<a>\n<b c=\"1\"\n c=\"2\"/></a>", 3, "twice"},
      {"quotation mark missing", "<a>\n<b c=\"1 mm d=\"2\"/></a>", 2, "quotation mark is missing"},
      {"quotation mark missing at the end", "<a>\n<b c=\"1 mm/>\n<d e=\"2\"/></a>", 2,
       "quotation mark is missing"},
      {"typographic quotation marks", "<a>\n<b c=“1 mm”/></a>", 2, "straight quotation marks"},
      {"value without quotation marks", "<a b=1/>", 1, "straight quotation marks"},
      {"attribute without a value", "<a b/>", 1, "no value"},
      {"wrong close tag", "<a>\n<b>\n</c></a>", 3, "<b> of line 2"},
      {"element never closed", "<a>\n<b>\n", 2, "The file ends"},
      {"element closed by its parent", "<a>\n<b>\n</a>", 3, "still open"},
      {"tag never closed", "<a>\n<b c=\"1\"\n", 2, "never closed"},
      {"remark never closed", "<a>\n<!-- x\n<b/></a>", 2, "taken for a remark"},
      {"remark that swallows elements", "<a>\n<!-- x\n<limits/>\n<!-- y --></a>", 2, "taken for a remark"},
      {"CDATA", "<a><![CDATA[x]]></a>", 1, "between the elements"},
      {"declaration inside", "<a><?xml version=\"1.0\"?></a>", 1, "very first"},
      {"wrong declared encoding", "<?xml version=\"1.0\" encoding=\"ISO-8859-1\"?><a b=\"é\"/>", 1,
       "iso-8859-1"},
      {"no element", "<!-- nothing -->\n", 1, "no element"},
      {"not XML at all", "name,value\n1,2\n", 1, "not a design file"},
      {"nested too deep",
       [] {
         std::string text;
         for (int i = 0; i < 60; ++i) text += "<a>";
         return text;
       }(),
       1, "nested deeper"},
  };
  for (const Damage& c : cases) {
    INFO(c.name);
    const auto messages = prescan(c.text, "f.xml");
    REQUIRE_FALSE(messages.empty());
    CHECK(messages.front().line == c.line);
    CHECK_THAT(messages.front().text, Catch::Contains(c.said));
    CHECK(parse_xml(c.text, "f.xml").root.name.empty());
  }
}

TEST_CASE("several independent slips are said in one go", "[prescan]") {
  const auto messages = prescan("<a>\n<b c=\"&x;\"/>\ntext\n<d e=\"1\" e=\"2\"/></a>", "f.xml");
  REQUIRE(messages.size() == 3);
  CHECK(messages[0].line == 2);
  CHECK(messages[1].line == 3);
  CHECK(messages[2].line == 4);
}

TEST_CASE("a broken quotation mark names the tag and what it swallowed", "[prescan]") {
  const auto messages = prescan("<a>\n<mirror thickness=\"1.2 mm material=\"aluminium\"/></a>", "f.xml");
  REQUIRE(messages.size() == 1);
  CHECK(messages[0].head == "<mirror> cannot be read");
  CHECK(messages[0].likely == "thickness=\"1.2 mm\" material=");
}

TEST_CASE("lines count the same for every kind of line end", "[prescan]") {
  for (const char* end : {"\n", "\r\n", "\r"}) {
    const std::string e = end;
    const std::string text =
        with_plain_line_ends("\xEF\xBB\xBF<a>" + e + "<b" + e + "c=\"1\"/>" + e + "</a>");
    const XmlFile file = parse_xml(text, "f.xml");
    REQUIRE(file.messages.empty());
    CHECK(file.root.children.at(0).line == 2);
    CHECK(file.root.children.at(0).attributes.at(0).line == 3);
  }
}

TEST_CASE("no single damaged byte of a design makes the reader fail", "[prescan]") {
  const std::string sound = "<?xml version=\"1.0\"?>\n<a b=\"1 mm\">\n<!-- x --><c d='2'/>\n</a>\n";
  const std::string bytes = "<>\"'&=/!-?\0 a\xC3"s;
  for (std::size_t i = 0; i < sound.size(); ++i)
    for (const char byte : bytes) {
      std::string text = sound;
      text[i] = byte;
      CHECK_NOTHROW(parse_xml(text, "f.xml"));
      text = sound;
      text.insert(i, 1, byte);
      CHECK_NOTHROW(parse_xml(text, "f.xml"));
    }
  for (std::size_t i = 0; i <= sound.size(); ++i) CHECK_NOTHROW(parse_xml(sound.substr(0, i), "f.xml"));
}
