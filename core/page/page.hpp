// What a face shows: blocks of cells and drawings with every text final. A face draws these and sends back
// edits; it adds no rows, rounds no numbers and knows no chemistry. Ids of cells, edits and commands:
// page/README.md.
#pragma once

#include <cstdint>
#include <optional>
#include <string>
#include <variant>
#include <vector>

namespace heatledger::page {

/// A Choice is edited with one of its choices, a Button is pressed by an edit with any text.
enum class CellKind : std::uint8_t { Label, Number, Text, Equation, Choice, Button };
/// Ink. Meaning is always doubled by position, sign or mark.
enum class Tone : std::uint8_t { Plain, Quiet, Strong, Broken, Formed, Caution, Good };
/// Where a figure comes from.
enum class Origin : std::uint8_t { None, Typed, Published, Estimated, Derived };
enum class Align : std::uint8_t { Left, Right, Centre };

struct Cell {
  std::string id;                    ///< stable: "r1.row.0.broken"; empty for cells that nobody can point at
  std::string text;                  ///< final text, UTF-8; figures carry true minus and thin spaces
  std::string edit_text;             ///< what stands in the editor when editing starts (raw as typed)
  std::string hint;                  ///< placeholder of an empty editable cell, or a tip
  std::vector<std::string> choices;  ///< of a Choice: the texts; `text` is the one chosen
  CellKind kind = CellKind::Label;
  Tone tone = Tone::Plain;
  Origin origin = Origin::None;
  bool editable = false;
  bool has_working = false;
  int span = 1;  ///< columns taken
  bool operator==(const Cell&) const = default;
};

struct Column {
  std::string id, heading;
  Align align = Align::Left;
  double width = 0;          ///< share of the table width; 0: as wide as its content
  bool spine_after = false;  ///< the rule between broken and formed stands to the right of this column
  bool operator==(const Column&) const = default;
};

enum class RowRole : std::uint8_t { Body, Detail, Subtotal, Result, Correction };

struct Row {
  std::string id;
  RowRole role = RowRole::Body;
  std::string fold_id;  ///< set on a row that unfolds; the edit {fold_id, "open"|"closed"} changes it
  bool open = false;
  bool screen_only = false;  ///< buttons and choices of view: a printed sheet leaves the row out
  std::vector<Cell> cells;   ///< spans add up to the number of columns
  bool operator==(const Row&) const = default;
};

enum class TableLook : std::uint8_t { Ledger, Form, Boxes, List, Banner };

struct Table {
  std::string id;
  TableLook look = TableLook::List;
  std::vector<Column> columns;
  std::vector<Row> rows;
  bool operator==(const Table&) const = default;
};

/// Role of a stroke or fill; a face maps roles to ink.
enum class Ink : std::uint8_t { Axis, Grid, Text, QuietText, Broken, Formed, Typed, Plain, Accent, Band };

struct Stroke {
  std::vector<double> xy;  ///< x0, y0, x1, y1, …: a line or polyline
  Ink ink = Ink::Plain;
  double width = 1;
  bool dashed = false;
  bool arrow = false;  ///< head at the last point
  bool operator==(const Stroke&) const = default;
};
struct Fill {
  std::vector<double> xy;  ///< corners of a polygon
  Ink ink = Ink::Band;
  bool operator==(const Fill&) const = default;
};
struct Words {
  double x = 0, y = 0;  ///< of the anchor, on the base line
  std::string text;
  Ink ink = Ink::Text;
  Align anchor = Align::Left;
  double size = 11;
  bool operator==(const Words&) const = default;
};

/// Coordinates in points (1/72 inch), origin at the top left, y downwards.
struct Drawing {
  std::string id, title;
  double width = 0, height = 0;
  std::vector<Fill> fills;
  std::vector<Stroke> strokes;
  std::vector<Words> words;
  bool operator==(const Drawing&) const = default;
};

enum class NoteKind : std::uint8_t { Info, Assumption, Caution, Disagreement, Error };

struct Note {
  std::string id;
  NoteKind kind = NoteKind::Info;
  std::string text;
  std::vector<std::string> cells;  ///< ids of the cells it belongs to
  bool operator==(const Note&) const = default;
};

struct Heading {
  std::string id, text, aside;  ///< aside: quiet text at the right end of the rule
  int level = 2;                ///< 1 the sheet's title, 2 a section
  bool operator==(const Heading&) const = default;
};

using Block = std::variant<Heading, Table, Drawing, Note>;

/// Id of a block, unique on its page.
const std::string& block_id(const Block& block);

/// What a face can offer besides cells. Run with a request {"do": id, ...}.
struct Command {
  std::string id, text, key;  ///< key: "Ctrl+Z"; empty when it has none
  bool enabled = true;
  bool operator==(const Command&) const = default;
};

struct Page {
  std::string title;  ///< for the window's title bar
  std::vector<Block> blocks;
  std::vector<Command> commands;
  /// Counts up with every change; `changed[i]` is the revision that last changed blocks[i], so that a face
  /// draws again only what an edit reached.
  std::uint64_t revision = 0;
  std::vector<std::uint64_t> changed;
};

/// The margin of the sheet: all about one cell.
struct Margin {
  std::string cell;
  std::string value, subject;      ///< "808 kJ/mol", "nitro group, nitrobenzene"
  std::vector<std::string> steps;  ///< numbered lines with the figures put in
  std::vector<std::string> sources;
  struct Section {
    std::string heading;
    std::vector<Note> notes;
  };
  std::vector<Section> sections;  ///< "Why the routes differ", "Cautions", …
};

}  // namespace heatledger::page
