// The report: one HTML file that prints as the sheet on A4 and Letter. No script, no outside reference; every
// text goes through escaped().
#include <algorithm>

#include "core/page/markup.hpp"
#include "core/page/print_view.hpp"
#include "core/page/role_names.hpp"
#include "core/page/writers.hpp"

namespace heatledger::page {
namespace {

constexpr std::string_view kStyle =
    "@page{margin:16mm 14mm}"
    "body{font:10pt/1.4 system-ui,'Segoe UI','DejaVu "
    "Sans',sans-serif;color:#23262d;background:#fff;margin:1.5rem auto;"
    "max-width:184mm;font-variant-numeric:tabular-nums}"
    "h1{font-size:15pt;margin:0}h2{font-size:9pt;letter-spacing:.08em;text-transform:uppercase;color:#62656c;"
    "display:flex;gap:.8em;align-items:baseline;margin:1.6em 0 .5em;break-after:avoid}"
    "h2 .rule{flex:1;border-top:.5pt solid #c9c7bc}h2 "
    ".aside{letter-spacing:0;text-transform:none;font-weight:400}"
    "table{border-collapse:collapse;width:100%;margin:.2em 0 "
    ".6em}table+table{margin-top:1.2em}td,th{padding:.22em "
    ".5em;vertical-align:baseline}"
    "th{font-weight:400;color:#62656c;font-size:8.5pt;text-align:left;border-bottom:.5pt solid #b9b7ac}"
    ".left{text-align:left}.right{text-align:right}.centre{text-align:center}td.right{white-space:nowrap}"
    "tr{break-inside:avoid}.spine{border-right:1.2pt solid #23262d}"
    ".ledger .body td{border-top:.5pt solid #dddbd0}.ledger .detail "
    "td{font-size:8.5pt;padding-top:0;padding-bottom:0}"
    ".ledger .detail td:first-child{padding-left:1.6em}.ledger .subtotal td{border-top:1pt solid "
    "#23262d;font-weight:600}"
    ".ledger .result td{background:#efeee2;font-weight:600}.ledger .correction "
    "td{font-size:9pt;padding-top:.05em;padding-bottom:.05em}"
    ".form{border:.5pt solid #b9b7ac}.form td{border:.5pt solid #dddbd0}.banner "
    "td{padding-left:0;padding-right:0}"
    ".boxes{display:flex;flex-wrap:wrap;border:.5pt solid #b9b7ac;margin:.2em 0 .6em}.box{flex:1 1 "
    "10em;padding:.5em .8em;"
    "border-right:.5pt solid #dddbd0;break-inside:avoid}.box:last-child{border-right:0}.box "
    ".what{font-size:8.5pt}"
    ".box .figure{font-size:13pt;font-weight:600}"
    ".quiet{color:#62656c}.strong{font-weight:600}.broken{color:#98401a}.formed{color:#145a70}.caution{color:"
    "#8a3b00}"
    ".good{color:#22602c}.typed{color:#2438a8}.state{font-size:.8em;vertical-align:-.2em}"
    ".note{margin:.25em 0;font-size:9pt}.note.caution,.note.disagreement,.note.error{border-left:2.5pt solid "
    "#a8741a;"
    "padding-left:.7em;color:#23262d}.note.error{border-color:#98401a}"
    ".equation{font-size:12.5pt}figure{margin:.4em "
    "0;break-inside:avoid}svg{max-width:100%;height:auto;font-family:inherit}"
    ".working{break-inside:avoid;margin:0 0 1em}.working h3{font-size:10pt;margin:0}.working ol{margin:.2em "
    "0;padding-left:1.6em}"
    "@media print{body{margin:0;max-width:none}}";

/// A plain figure needs no class.
const char* class_of(Tone tone) {
  return tone == Tone::Plain ? "" : spelled(tone);
}

/// The equation with its state marks, "(l)" after a species, set lower and smaller.
std::string equation_markup(const std::string& text) {
  std::string out;
  std::size_t at = 0;
  while (at < text.size()) {
    const std::size_t open = text.find('(', at);
    const std::size_t close = open == std::string::npos ? open : text.find(')', open);
    if (close == std::string::npos) break;
    const bool state = open > 0 && text[open - 1] != ' ' && open + 1 < close && text[open + 1] >= 'a' &&
                       text[open + 1] <= 'z';
    out += escaped(std::string_view(text).substr(at, open - at));
    const std::string inside = escaped(std::string_view(text).substr(open, close + 1 - open));
    out += state ? "<span class=\"state\">" + inside + "</span>" : inside;
    at = close + 1;
  }
  return out + escaped(std::string_view(text).substr(at));
}

std::string cell_classes(const Cell& cell, const Column& last) {
  std::string classes = spelled(last.align);
  if (cell.span > 1) classes = "left";
  const std::string tone = class_of(cell.tone);
  if (!tone.empty()) classes += " " + tone;
  if (cell.origin == Origin::Typed && cell.kind == CellKind::Number) classes += " typed";
  if (cell.kind == CellKind::Equation) classes += " equation";
  if (last.spine_after) classes += " spine";
  return classes;
}

class HtmlWriter {
 public:
  std::string write(const Page& page, const std::vector<Margin>& workings) {
    out_ =
        "<!DOCTYPE html>\n<html lang=\"en\"><head><meta charset=\"utf-8\"><meta name=\"viewport\" "
        "content=\"width=device-width\"><title>" +
        escaped(page.title) + "</title><style>" + std::string(kStyle) + std::string(ink_style()) +
        "</style></head><body>\n";
    for (const Block& block : page.blocks) {
      std::visit([this](const auto& any) { add(any); }, block);
      out_ += '\n';
    }
    add_workings(workings);
    out_ += "</body></html>\n";
    return std::move(out_);
  }

 private:
  void add(const Heading& heading) {
    out_ += "<h2>" + escaped(heading.text) + "<span class=\"rule\"></span>";
    if (!heading.aside.empty()) out_ += "<span class=\"aside\">" + escaped(heading.aside) + "</span>";
    out_ += "</h2>";
  }

  void add(const Note& note) {
    out_ += "<p class=\"note " + std::string(spelled(note.kind)) + "\">" + escaped(note.text) + "</p>";
  }

  void add(const Drawing& drawing) { out_ += "<figure>" + svg_element(drawing) + "</figure>"; }

  void add(const Table& table) {
    if (table.look == TableLook::Boxes) return add_boxes(table);
    out_ += "<table class=\"" + std::string(spelled(table.look)) + "\">";
    const bool headed = std::any_of(table.columns.begin(), table.columns.end(),
                                    [](const Column& column) { return !column.heading.empty(); });
    if (headed) {
      out_ += "<thead><tr>";
      for (const Column& column : table.columns) {
        out_ += "<th class=\"" + std::string(spelled(column.align)) + (column.spine_after ? " spine" : "") +
                "\">" + escaped(column.heading) + "</th>";
      }
      out_ += "</tr></thead>";
    }
    out_ += "<tbody>";
    for (const Row& row : table.rows) add_row(table, row);
    out_ += "</tbody></table>";
  }

  void add_row(const Table& table, const Row& row) {
    out_ += "<tr class=\"" + std::string(spelled(row.role)) + "\">";
    std::size_t at = 0;
    for (const Cell& cell : row.cells) {
      const auto span = static_cast<std::size_t>(std::max(cell.span, 1));
      const std::size_t last = std::min(at + span, table.columns.size()) - 1;
      out_ += "<td class=\"" + cell_classes(cell, table.columns[last]) + "\"";
      if (span > 1) out_ += " colspan=\"" + std::to_string(span) + "\"";
      out_ += ">";
      if (cell.id == "header.title") {
        out_ += "<h1>" + escaped(cell.text) + "</h1>";
      } else {
        out_ += cell.kind == CellKind::Equation ? equation_markup(cell.text) : escaped(cell.text);
      }
      out_ += "</td>";
      at = last + 1;
      if (at >= table.columns.size()) break;
    }
    out_ += "</tr>";
  }

  /// Each row a box: what, figure, unit, ±.
  void add_boxes(const Table& table) {
    out_ += "<div class=\"boxes\">";
    for (const Row& row : table.rows) {
      out_ += "<div class=\"box\">";
      for (std::size_t i = 0; i < row.cells.size(); ++i) {
        const std::string classes = i == 0 ? "what quiet" : i == 1 ? "figure" : class_of(row.cells[i].tone);
        out_ += (i == 0 ? "<div class=\"" : "<span class=\"") + classes + "\">" + escaped(row.cells[i].text) +
                (i == 0 ? "</div>" : "</span> ");
      }
      out_ += "</div>";
    }
    out_ += "</div>";
  }

  void add_workings(const std::vector<Margin>& workings) {
    if (workings.empty()) return;
    out_ += "<h2>Workings<span class=\"rule\"></span></h2>\n";
    for (const Margin& margin : workings) {
      out_ += "<div class=\"working\"><h3>" + escaped(margin.value) + " <span class=\"quiet\">" +
              escaped(margin.subject) + "</span></h3><ol>";
      for (const std::string& step : margin.steps) out_ += "<li>" + escaped(step) + "</li>";
      out_ += "</ol>";
      for (const std::string& source : margin.sources)
        out_ += "<p class=\"note quiet\">" + escaped(source) + "</p>";
      out_ += "</div>\n";
    }
  }

  std::string out_;
};

}  // namespace

std::string write_html(const Page& page, const std::vector<Margin>& workings) {
  return HtmlWriter().write(print_view(page), workings);
}

}  // namespace heatledger::page
