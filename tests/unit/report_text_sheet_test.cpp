// Wrapping and column grids, by their rules.
#include "catch.hpp"
#include "report/text_sheet.hpp"

using namespace bandwright;
using Lines = std::vector<std::string>;

TEST_CASE("width counts characters, not bytes") {
  CHECK(text_width("4.7 kΩ") == 6);
  CHECK(text_width("±5 µF") == 5);
  CHECK(text_width("") == 0);
}

TEST_CASE("wrapping breaks at spaces and leaves long words whole") {
  CHECK(wrap("one two three", 7) == Lines{"one two", "three"});
  CHECK(wrap("unbreakable word", 5) == Lines{"unbreakable", "word"});
  CHECK(wrap("", 5) == Lines{""});
  CHECK(wrap("ΩΩΩ ΩΩΩ", 7) == Lines{"ΩΩΩ ΩΩΩ"});
}

TEST_CASE("a number keeps its unit, where there is room for both") {
  CHECK(wrap("from 12.5 kHz on", 11) == Lines{"from", "12.5 kHz on"});
  CHECK(wrap("12 units", 4) == Lines{"12", "units"});
  CHECK(wrap("12.5 kHz", 7) == Lines{"12.5", "kHz"});
  CHECK(wrap("C3 V", 3) == Lines{"C3", "V"});
}

TEST_CASE("columns align on either side and empty ones are left out") {
  TextGrid grid{{{"a", false}, {"empty", false}, {"n", true}}, {}, {0}};
  grid.add({"first", "", "1"});
  grid.add({"b", "", "1000"});
  const auto lines = grid.lines(80);
  CHECK(lines.headings == Lines{"a         n"});
  CHECK(lines.body == Lines{"first     1", "b      1000"});
}

TEST_CASE("the flexible column gives way on a narrow page") {
  TextGrid grid{{{"", false}, {"", false}}, {}, {1}};
  grid.add({"key", "a text that is rather long for the page"});
  for (const auto& line : grid.lines(25).body) CHECK(text_width(line) <= 25);
  CHECK(grid.lines(25).body.size() > 1);
  CHECK(grid.lines(80).body.size() == 1);
}

TEST_CASE("columns keep their longest word while another can give way") {
  TextGrid grid{{{"", false}, {"", false}}, {}, {0, 1}};
  grid.add({"collector-emitter voltage", "a text of several short words"});
  CHECK(grid.lines(40).body == Lines{"collector-emitter  a text of several", "voltage            short words"});
}

TEST_CASE("dispensable columns are left out where wrapping is not enough, first one first") {
  TextGrid grid{{{"text", false}, {"one", true}, {"two", true}}, {}, {0}, {2, 1}};
  grid.add({"words to be wrapped", "1.000", "2.000"});
  CHECK(grid.lines(80).body == Lines{"words to be wrapped  1.000  2.000"});
  CHECK(grid.lines(22).headings == Lines{"text        one    two"});
  CHECK(grid.lines(21).headings == Lines{"text              one"});
  CHECK(grid.lines(14).headings == Lines{"text"});
}

TEST_CASE("a grid without rows prints nothing") {
  const TextGrid grid{{{"a", false}}, {}, {0}};
  CHECK(grid.lines(80).headings.empty());
  CHECK(grid.lines(80).body.empty());
}

TEST_CASE("headings are wrapped as paragraphs are") {
  const std::string first(50, 'a'), second(50, 'b');
  TextSheet sheet{{false, 60}};
  sheet.heading(join({first, second}, " "));
  CHECK(sheet.text() == join({first, second, ""}, "\n"));
}

TEST_CASE("space is never doubled") {
  TextSheet sheet{{}};
  sheet.paragraph("x");
  sheet.space();
  sheet.space();
  sheet.heading("y");
  CHECK(sheet.text() == "x\n\ny\n");
}
