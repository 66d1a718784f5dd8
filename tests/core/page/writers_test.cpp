#include "core/page/writers.hpp"

#include <gtest/gtest.h>

#include "core/base/utf8.hpp"
#include "core/file/json.hpp"
#include "core/page/cells.hpp"
#include "core/page/print_view.hpp"
#include "tests/core/page/page_reader.hpp"

namespace heatledger::page {
namespace {

constexpr const char* kHostile = "<script>alert(\"1\")</script> & 'x'";

/// A page with one of everything, hostile texts in all of them.
Page hostile_page() {
  Page page;
  page.title = kHostile;
  page.blocks.push_back(heading_block("h", kHostile, kHostile));
  Table table;
  table.id = "t";
  table.columns = {column("a", kHostile), column("b", "B", Align::Right)};
  Row row = row_of("row");
  row.cells = {typed_cell("c", kHostile, kHostile, CellKind::Equation),
               figure_cell("n", "\u22121\u2009234.5")};
  table.rows.push_back(row);
  page.blocks.push_back(table);
  page.blocks.push_back(note_block("note", NoteKind::Caution, kHostile));
  Drawing drawing;
  drawing.id = "d";
  drawing.title = kHostile;
  drawing.width = drawing.height = 100;
  Words words;
  words.text = kHostile;
  drawing.words.push_back(words);
  Stroke stroke;
  stroke.xy = {0, 0, 50, 50};
  stroke.arrow = true;
  drawing.strokes.push_back(stroke);
  page.blocks.push_back(drawing);
  page.changed.assign(page.blocks.size(), 1);
  return page;
}

std::size_t count(const std::string& text, const std::string& piece) {
  std::size_t times = 0;
  for (std::size_t at = 0; (at = text.find(piece, at)) != std::string::npos; at += piece.size()) ++times;
  return times;
}

TEST(Html, EscapesEverythingAndAsksForNothing) {
  Margin margin;
  margin.value = margin.subject = kHostile;
  margin.steps = margin.sources = {kHostile};
  const std::string html = write_html(hostile_page(), {margin});
  EXPECT_EQ(html.find("<script"), std::string::npos);
  EXPECT_EQ(html.find("alert(\""), std::string::npos);
  EXPECT_GE(count(html, "&lt;script&gt;"), 9U);
  for (const char* outside : {"http://", "https://", "src=", "url(", "@import", "<link"}) {
    std::size_t allowed = 0;
    // The namespace of SVG is a name, not an address that is fetched.
    if (std::string(outside) == "http://") allowed = count(html, "xmlns=\"http://www.w3.org/2000/svg\"");
    EXPECT_EQ(count(html, outside), allowed) << outside;
  }
}

TEST(Html, ElementsAreClosed) {
  const std::string html = write_html(hostile_page(), {});
  for (const char* element : {"table", "tr", "td", "svg", "figure", "body", "html", "h2", "p"}) {
    const std::string open = std::string("<") + element;
    EXPECT_EQ(count(html, open + ">") + count(html, open + " "),
              count(html, std::string("</") + element + ">"))
        << element;
  }
}

TEST(Svg, EscapesItsTexts) {
  const Page page = hostile_page();
  const std::string svg = write_svg(std::get<Drawing>(page.blocks[3]));
  EXPECT_EQ(svg.find("<script"), std::string::npos);
  EXPECT_EQ(count(svg, "&lt;script&gt;"), 2U);
  EXPECT_NE(svg.find("<polyline"), std::string::npos);
}

TEST(Markdown, KeepsTextAsTextAndFiguresInTheirColumns) {
  Page page;
  Table table;
  table.id = "t";
  table.columns = {column("a", "Name"), column("b", "kJ|mol", Align::Right)};
  Row row = row_of("row");
  row.cells = {typed_cell("c", "*a* | <b>", ""), figure_cell("d", "\u22121.5")};
  table.rows.push_back(row);
  page.blocks.push_back(heading_block("h", "Part_1"));
  page.blocks.push_back(table);
  page.blocks.push_back(note_block("n", NoteKind::Caution, "Measure #1."));
  EXPECT_EQ(write_markdown(page),
            "## Part\\_1\n\n| Name | kJ\\|mol |\n| --- | ---: |\n| \\*a\\* \\| \\<b\\> | \u22121.5 |\n\n"
            "> Caution: Measure \\#1.\n");
}

TEST(Csv, QuotesFieldsAndWritesPlainFigures) {
  const std::string csv = write_csv(hostile_page());
  EXPECT_EQ(csv,
            "\"<script>alert(\"\"1\"\")</script> & 'x'\",B\r\n"
            "\"<script>alert(\"\"1\"\")</script> & 'x'\",-1234.5\r\n");
}

TEST(Csv, DoesNotLetATextRunAsAFormula) {
  Page page;
  Table table;
  table.id = "t";
  table.columns = {column("a", "")};
  Row row = row_of("row");
  row.cells = {typed_cell("c", "=HYPERLINK(1)", "")};
  table.rows.push_back(row);
  page.blocks.push_back(table);
  EXPECT_EQ(write_csv(page), "'=HYPERLINK(1)\r\n");
}

TEST(Csv, KeepsColumnsUnderTheirHeadings) {
  Session session;
  ASSERT_TRUE(session.edit("r1.equation", "H2(g) + Cl2(g) -> 2 HCl(g)").ok());
  const std::string csv = write_csv(session.page());
  const std::size_t head = csv.find("Species,");
  ASSERT_NE(head, std::string::npos);
  const std::size_t commas = 7;  // between the eight columns of a ledger
  std::size_t line = csv.find("\r\n", head) + 2;
  while (csv.compare(line, 2, "\r\n") != 0) {
    const std::size_t end = csv.find("\r\n", line);
    const std::string text = csv.substr(line, end - line);
    if (text.find('"') == std::string::npos) {
      EXPECT_EQ(count(text, ","), commas) << text;
    }
    line = end + 2;
  }
}

TEST(Text, LinesUpColumnsByDisplayWidth) {
  Session session;
  ASSERT_TRUE(session.edit("r1.equation", "CH4(g) + 2 O2(g) -> CO2(g) + 2 H2O(g)").ok());
  const std::string text = write_text(session.page(), 100);
  // The spine stands in one column from the first species to the sums.
  std::size_t spine = 0, lines = 0;
  for (std::size_t at = 0; at < text.size();) {
    const std::size_t end = text.find('\n', at);
    const std::string line = text.substr(at, end - at);
    const std::size_t mark = line.find("\u2502");
    if (mark != std::string::npos) {
      const std::size_t here = utf8::display_width(line.substr(0, mark));
      if (spine == 0) spine = here;
      EXPECT_EQ(here, spine) << line;
      ++lines;
    }
    at = end + 1;
  }
  EXPECT_GE(lines, 6U);
}

TEST(Text, LeavesOutWhatIsForTheScreenOnly) {
  Session session;
  const std::string text = write_text(session.page(), 80);
  EXPECT_EQ(text.find("Add a reaction"), std::string::npos);
  EXPECT_EQ(text.find("Bond values of this sheet"), std::string::npos);
  EXPECT_EQ(text.find("Also show"), std::string::npos);
  EXPECT_NE(text.find("Conventions"), std::string::npos);
}

TEST(PageJson, ReadsBackWithEveryText) {
  const Page page = hostile_page();
  const Result<file::Json> json = file::read_json(write_json(page));
  ASSERT_TRUE(json.ok());
  const std::vector<file::Json>& blocks = json->find("blocks")->items();
  ASSERT_EQ(blocks.size(), 4U);
  EXPECT_EQ(blocks[0].string_or("aside", ""), kHostile);
  const file::Json& cell = blocks[1].find("rows")->items()[0].find("cells")->items()[0];
  EXPECT_EQ(cell.string_or("text", ""), kHostile);
  EXPECT_EQ(cell.string_or("kind", ""), "equation");
  EXPECT_EQ(cell.string_or("origin", ""), "typed");
  EXPECT_TRUE(cell.find("editable")->is_true());
  EXPECT_EQ(blocks[3].find("strokes")->items()[0].find("xy")->items().size(), 4U);
}

}  // namespace
}  // namespace heatledger::page
