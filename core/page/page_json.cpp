// The one JSON encoding of the page contract. Written straight into a string: a page of twenty reactions
// holds some thousand cells, and an edit must be answered within a frame.
#include "core/page/page_json.hpp"

#include "core/base/number_text.hpp"
#include "core/file/json.hpp"
#include "core/page/role_names.hpp"
#include "core/page/writers.hpp"

namespace heatledger::page {
namespace {

/// Appends one object; members that hold their default are left out.
class Object {
 public:
  explicit Object(std::string& out) : out_(out) { out_ += '{'; }
  ~Object() { out_ += '}'; }
  Object(const Object&) = delete;
  Object& operator=(const Object&) = delete;

  void key(const char* key) {
    if (!first_) out_ += ',';
    first_ = false;
    out_ += '"';
    out_ += key;
    out_ += "\":";
  }
  void text(const char* k, const std::string& value) {
    key(k);
    file::append_json_string(out_, value);
  }
  void text_unless_empty(const char* k, const std::string& value) {
    if (!value.empty()) text(k, value);
  }
  void flag(const char* k, bool value) {
    if (!value) return;
    key(k);
    out_ += "true";
  }
  void number(const char* k, double value) {
    key(k);
    out_ += machine_number(value);
  }
  template <typename Enum>
  void word(const char* k, Enum value, Enum usual) {
    if (value == usual) return;
    key(k);
    out_ += '"';
    out_ += spelled(value);
    out_ += '"';
  }

 private:
  std::string& out_;
  bool first_ = true;
};

template <typename Items, typename Write>
void list(std::string& out, const Items& items, Write write) {
  out += '[';
  bool first = true;
  for (const auto& item : items) {
    if (!first) out += ',';
    first = false;
    write(item);
  }
  out += ']';
}

void append_texts(std::string& out, const std::vector<std::string>& texts) {
  list(out, texts, [&](const std::string& text) { file::append_json_string(out, text); });
}

void append_points(std::string& out, const std::vector<double>& xy) {
  list(out, xy, [&](double value) { out += machine_number(value, 6); });
}

void append_cell(std::string& out, const Cell& cell) {
  Object object(out);
  object.text_unless_empty("id", cell.id);
  object.text_unless_empty("text", cell.text);
  object.text_unless_empty("edit_text", cell.edit_text);
  object.text_unless_empty("hint", cell.hint);
  if (!cell.choices.empty()) {
    object.key("choices");
    append_texts(out, cell.choices);
  }
  object.word("kind", cell.kind, CellKind::Label);
  object.word("tone", cell.tone, Tone::Plain);
  object.word("origin", cell.origin, Origin::None);
  object.flag("editable", cell.editable);
  object.flag("has_working", cell.has_working);
  if (cell.span != 1) object.number("span", cell.span);
}

void append_column(std::string& out, const Column& column) {
  Object object(out);
  object.text("id", column.id);
  object.text_unless_empty("heading", column.heading);
  object.word("align", column.align, Align::Left);
  if (column.width != 0) object.number("width", column.width);
  object.flag("spine_after", column.spine_after);
}

void append_row(std::string& out, const Row& row) {
  Object object(out);
  object.text("id", row.id);
  object.word("role", row.role, RowRole::Body);
  object.text_unless_empty("fold_id", row.fold_id);
  object.flag("open", row.open);
  object.flag("screen_only", row.screen_only);
  object.key("cells");
  list(out, row.cells, [&](const Cell& cell) { append_cell(out, cell); });
}

void append(std::string& out, const Table& table) {
  Object object(out);
  object.text("block", "table");
  object.text("id", table.id);
  object.word("look", table.look, TableLook::List);
  object.key("columns");
  list(out, table.columns, [&](const Column& column) { append_column(out, column); });
  object.key("rows");
  list(out, table.rows, [&](const Row& row) { append_row(out, row); });
}

void append(std::string& out, const Drawing& drawing) {
  Object object(out);
  object.text("block", "drawing");
  object.text("id", drawing.id);
  object.text_unless_empty("title", drawing.title);
  object.number("width", drawing.width);
  object.number("height", drawing.height);
  object.key("fills");
  list(out, drawing.fills, [&](const Fill& fill) {
    Object one(out);
    one.key("xy");
    append_points(out, fill.xy);
    one.word("ink", fill.ink, Ink::Band);
  });
  object.key("strokes");
  list(out, drawing.strokes, [&](const Stroke& stroke) {
    Object one(out);
    one.key("xy");
    append_points(out, stroke.xy);
    one.word("ink", stroke.ink, Ink::Plain);
    if (stroke.width != 1) one.number("width", stroke.width);
    one.flag("dashed", stroke.dashed);
    one.flag("arrow", stroke.arrow);
  });
  object.key("words");
  list(out, drawing.words, [&](const Words& words) {
    Object one(out);
    one.number("x", words.x);
    one.number("y", words.y);
    one.text("text", words.text);
    one.word("ink", words.ink, Ink::Text);
    one.word("anchor", words.anchor, Align::Left);
    if (words.size != 11) one.number("size", words.size);
  });
}

void append(std::string& out, const Note& note) {
  Object object(out);
  object.text("block", "note");
  object.text_unless_empty("id", note.id);
  object.word("kind", note.kind, NoteKind::Info);
  object.text("text", note.text);
  if (!note.cells.empty()) {
    object.key("cells");
    append_texts(out, note.cells);
  }
}

void append(std::string& out, const Heading& heading) {
  Object object(out);
  object.text("block", "heading");
  object.text("id", heading.id);
  object.text("text", heading.text);
  object.text_unless_empty("aside", heading.aside);
  if (heading.level != 2) object.number("level", heading.level);
}

void append_block(std::string& out, const Block& block) {
  std::visit([&](const auto& any) { append(out, any); }, block);
}

void append_commands(std::string& out, const std::vector<Command>& commands) {
  list(out, commands, [&](const Command& command) {
    Object object(out);
    object.text("id", command.id);
    object.text("text", command.text);
    object.text_unless_empty("key", command.key);
    if (!command.enabled) {
      object.key("enabled");
      out += "false";
    }
  });
}

}  // namespace

std::string write_json(const Page& page) {
  std::string out;
  out.reserve(4096 + 1024 * page.blocks.size());
  {
    Object object(out);
    object.text("title", page.title);
    object.number("revision", static_cast<double>(page.revision));
    object.key("blocks");
    list(out, page.blocks, [&](const Block& block) { append_block(out, block); });
    object.key("commands");
    append_commands(out, page.commands);
  }
  return out;
}

std::string write_changes(const Page& page, std::uint64_t since, bool same_order) {
  std::string out;
  out.reserve(16384);
  {
    Object object(out);
    object.text("title", page.title);
    object.number("since", static_cast<double>(since));
    object.number("revision", static_cast<double>(page.revision));
    if (!same_order) {
      object.key("order");
      list(out, page.blocks, [&](const Block& block) { file::append_json_string(out, block_id(block)); });
    }
    std::vector<const Block*> changed;
    for (std::size_t i = 0; i < page.blocks.size(); ++i) {
      if (page.changed[i] > since) changed.push_back(&page.blocks[i]);
    }
    object.key("blocks");
    list(out, changed, [&](const Block* block) { append_block(out, *block); });
    object.key("commands");
    append_commands(out, page.commands);
  }
  return out;
}

std::string write_json(const Margin& margin) {
  std::string out;
  {
    Object object(out);
    object.text("cell", margin.cell);
    object.text_unless_empty("value", margin.value);
    object.text_unless_empty("subject", margin.subject);
    object.key("steps");
    append_texts(out, margin.steps);
    object.key("sources");
    append_texts(out, margin.sources);
    object.key("sections");
    list(out, margin.sections, [&](const Margin::Section& section) {
      Object one(out);
      one.text("heading", section.heading);
      one.key("notes");
      list(out, section.notes, [&](const Note& note) {
        Object entry(out);
        entry.word("kind", note.kind, NoteKind::Info);
        entry.text("text", note.text);
        if (!note.cells.empty()) {
          entry.key("cells");
          append_texts(out, note.cells);
        }
      });
    });
  }
  return out;
}

}  // namespace heatledger::page
