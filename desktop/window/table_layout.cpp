#include "desktop/window/table_layout.hpp"

#include <algorithm>
#include <cmath>

namespace heatledger::window {
namespace {

constexpr float kPad = 7;           // left and right of a cell's text
constexpr float kHeadingRoom = 74;  // of a column's heading before it takes a second line
constexpr float kIndent = 15;       // of the fold mark, and of detail lines under it

std::string_view shown_text(const page::Cell& cell) {
  return cell.text.empty() ? cell.hint : cell.text;
}
bool shows_hint(const page::Cell& cell) {
  return cell.text.empty() && cell.editable;
}

/// What the role of a row asks of its cells.
struct RowStyle {
  Type type = Type::Body;
  float pad = 4;  // above and below the text
  bool strong = false;
};

RowStyle style_of(page::RowRole role, page::TableLook look) {
  const bool ledger = look == page::TableLook::Ledger;
  switch (role) {
    case page::RowRole::Body:
      return {ledger ? Type::Body : Type::Detail, ledger ? 4.0f : 3.0f, false};
    case page::RowRole::Detail:
      return {Type::Detail, 0, false};
    case page::RowRole::Subtotal:
      return {Type::Body, 4, true};
    case page::RowRole::Result:
      return {Type::Body, 4, true};
    case page::RowRole::Correction:
      return {Type::Detail, 1, false};
  }
  return {};
}

Type type_of(const page::Cell& cell, const page::Row& row, page::TableLook look) {
  if (look == page::TableLook::Banner) {
    if (cell.kind == page::CellKind::Equation) return Type::Equation;
    if (row.role == page::RowRole::Result && cell.tone == page::Tone::Strong) return Type::Title;
    if (cell.tone == page::Tone::Strong) return Type::Strong;
    return Type::Detail;
  }
  if (cell.kind == page::CellKind::Button) return Type::Small;
  if (look == page::TableLook::Form) return Type::Small;
  const RowStyle style = style_of(row.role, look);
  if (cell.tone == page::Tone::Quiet) return Type::Small;
  if (cell.tone == page::Tone::Strong || style.strong) return Type::Strong;
  return style.type;
}

Colour colour_of_cell(const page::Cell& cell) {
  if (shows_hint(cell)) return ink::kHint;
  if (cell.kind == page::CellKind::Button) return ink::kText;
  if (cell.tone == page::Tone::Plain && cell.origin == page::Origin::Typed &&
      (cell.kind == page::CellKind::Number || cell.kind == page::CellKind::Choice)) {
    return ink::kTyped;
  }
  return colour_of(cell.tone);
}

float cell_text_width(const Fonts& fonts, const page::Cell& cell, Type type) {
  if (cell.kind == page::CellKind::Equation && !cell.text.empty())
    return equation_width(fonts, type, cell.text);
  float width = text_width(fonts, type, shown_text(cell));
  if (cell.kind == page::CellKind::Choice) width += 14;  // the mark that it opens
  if (cell.kind == page::CellKind::Button) width += 20;  // its frame
  return width;
}

float widest_word(const Fonts& fonts, Type type, std::string_view text) {
  float widest = 0;
  while (!text.empty()) {
    const std::size_t end = std::min(text.find(' '), text.size());
    widest = std::max(widest, text_width(fonts, type, text.substr(0, end)));
    text.remove_prefix(std::min(end + 1, text.size()));
  }
  return widest;
}

/// Widths of the columns of a table: shares first, then content; what is left over goes to the columns of
/// words.
std::vector<float> column_widths(const page::Table& table, const Fonts& fonts, float width) {
  const std::size_t count = table.columns.size();
  std::vector<float> natural(count, 0);
  for (std::size_t i = 0; i < count; ++i) {
    // A heading may take two lines, but it is not broken into single words for the sake of a narrow figure.
    const float whole = text_width(fonts, Type::Small, table.columns[i].heading);
    natural[i] =
        std::max(std::min(whole, kHeadingRoom), widest_word(fonts, Type::Small, table.columns[i].heading)) +
        2 * kPad + 1;
  }
  bool folds = false;
  for (const page::Row& row : table.rows) folds = folds || !row.fold_id.empty();
  for (const page::Row& row : table.rows) {
    std::size_t column = 0;
    for (const page::Cell& cell : row.cells) {
      if (cell.span == 1 && column < count) {
        float wanted = cell_text_width(fonts, cell, type_of(cell, row, table.look)) + 2 * kPad;
        if (column == 0 && folds) wanted += kIndent;
        natural[column] = std::max(natural[column], wanted);
      }
      column += static_cast<std::size_t>(std::max(cell.span, 1));
    }
  }
  float total = 0, flexible = 0;
  for (std::size_t i = 0; i < count; ++i) {
    if (table.columns[i].width > 0)
      natural[i] = std::max(static_cast<float>(table.columns[i].width) * width, 20.0f);
    total += natural[i];
    if (table.columns[i].align == page::Align::Left && table.columns[i].width <= 0) flexible += natural[i];
  }
  const float rest = width - total;
  if (flexible <= 0) {
    // Figures only: all columns stretch or shrink alike.
    for (float& one : natural) one *= width / std::max(total, 1.0f);
    return natural;
  }
  if (rest >= 0) {
    for (std::size_t i = 0; i < count; ++i) {
      if (table.columns[i].align == page::Align::Left && table.columns[i].width <= 0)
        natural[i] += rest * natural[i] / flexible;
    }
    return natural;
  }
  // Too wide: columns of words give way, the widest first, and break their lines.
  const auto words = [&](std::size_t i) {
    return table.columns[i].align == page::Align::Left && table.columns[i].width <= 0;
  };
  float low = 0, high = width;
  for (int step = 0; step < 24; ++step) {
    const float limit = (low + high) / 2;
    float sum = 0;
    for (std::size_t i = 0; i < count; ++i) sum += words(i) ? std::min(natural[i], limit) : natural[i];
    (sum > width ? high : low) = limit;
  }
  for (std::size_t i = 0; i < count; ++i) {
    if (words(i)) natural[i] = std::max(std::min(natural[i], low), 40.0f);
  }
  return natural;
}

PlacedCell place_cell(const page::Cell& cell, const page::Row& row, const Fonts& fonts, page::TableLook look,
                      page::Align align, float width) {
  PlacedCell placed;
  placed.cell = &cell;
  placed.row = &row;
  placed.type = type_of(cell, row, look);
  placed.colour = colour_of_cell(cell);
  placed.align = align;
  placed.hint = shows_hint(cell);
  if (cell.kind == page::CellKind::Equation && !cell.text.empty() &&
      equation_width(fonts, placed.type, cell.text) <= width) {
    placed.lines.lines = {cell.text};
    placed.lines.width = equation_width(fonts, placed.type, cell.text);
  } else {
    placed.lines = wrap(fonts, placed.type,
                        placed.hint ? std::string_view(cell.hint) : std::string_view(cell.text), width);
  }
  return placed;
}

/// Ledger and list: columns under headings.
class Grid {
 public:
  Grid(const page::Table& table, const Fonts& fonts, Rect place, Layout& layout)
      : table_(table), fonts_(fonts), place_(place), layout_(layout), y_(place.y) {
    widths_ = column_widths(table, fonts, place.width);
    float x = place.x;
    for (const float width : widths_) {
      lefts_.push_back(x);
      x += width;
    }
    lefts_.push_back(x);
    for (const page::Row& row : table.rows) {
      folds_ = folds_ || !row.fold_id.empty();
      for (const page::Cell& cell : row.cells)
        ruled_rows_ = ruled_rows_ || cell.editable || cell.kind == page::CellKind::Number;
    }
  }

  float build() {
    add_headings();
    const float rows_begin = place_.y;
    for (std::size_t i = 0; i < table_.rows.size(); ++i) {
      add_row(table_.rows[i], i + 1 < table_.rows.size() ? &table_.rows[i + 1] : nullptr);
    }
    for (std::size_t i = 0; i < table_.columns.size(); ++i) {
      if (table_.columns[i].spine_after && spine_end_ > rows_begin) {
        layout_.fills.push_back({{lefts_[i + 1] - 1, rows_begin, 2, spine_end_ - rows_begin}, ink::kText});
      }
    }
    return y_;
  }

 private:
  void rule(float y, float thickness, Colour colour) {
    layout_.fills.push_back({{place_.x, y, place_.width, thickness}, colour});
  }

  void add_headings() {
    std::vector<Wrapped> wrapped;
    std::size_t most = 0;
    for (std::size_t i = 0; i < table_.columns.size(); ++i) {
      wrapped.push_back(wrap(fonts_, Type::Small, table_.columns[i].heading, widths_[i] - 2 * kPad));
      if (!table_.columns[i].heading.empty()) most = std::max(most, wrapped.back().lines.size());
    }
    if (most == 0) return;
    const float step = line_height(Type::Small), height = step * static_cast<float>(most);
    y_ += 3;
    for (std::size_t i = 0; i < table_.columns.size(); ++i) {
      PlacedText text;
      const float own = step * static_cast<float>(wrapped[i].lines.size());
      text.area = {lefts_[i] + kPad, y_ + height - own, widths_[i] - 2 * kPad, own};
      text.lines = std::move(wrapped[i]);
      text.type = Type::Small;
      text.colour = ink::kQuiet;
      text.align = table_.columns[i].align;
      layout_.texts.push_back(std::move(text));
    }
    y_ += height + 4;
    rule(y_, 1, ink::kEdge);
    y_ += 1;
  }

  void add_row(const page::Row& row, const page::Row* next) {
    const RowStyle style = style_of(row.role, table_.look);
    const bool first_sum = row.role == page::RowRole::Subtotal && !summed_;
    if (first_sum) {
      rule(y_ - 1, 2, ink::kText);
      y_ += 1;
    }
    const float top = y_;
    const std::size_t first = layout_.cells.size();
    float tallest = line_height(style.type);
    std::size_t column = 0;
    for (const page::Cell& cell : row.cells) {
      if (column >= table_.columns.size()) break;
      const std::size_t last =
          std::min(column + static_cast<std::size_t>(std::max(cell.span, 1)), table_.columns.size());
      float left = lefts_[column] + kPad;
      if (column == 0 && folds_ && (row.role == page::RowRole::Body || row.role == page::RowRole::Detail))
        left += kIndent;
      const float right = lefts_[last] - kPad;
      const page::Align align =
          cell.kind == page::CellKind::Button ? page::Align::Right : table_.columns[column].align;
      PlacedCell placed = place_cell(cell, row, fonts_, table_.look, align, right - left);
      placed.fold_mark = column == 0 && !row.fold_id.empty();
      placed.area = {lefts_[column], top, lefts_[last] - lefts_[column], 0};
      placed.text = {left, top + style.pad, right - left,
                     line_height(placed.type) * static_cast<float>(placed.lines.lines.size())};
      tallest = std::max(tallest, placed.text.height);
      layout_.cells.push_back(std::move(placed));
      column = last;
    }
    const float height = std::ceil(tallest + 2 * style.pad);
    for (std::size_t i = first; i < layout_.cells.size(); ++i) {
      PlacedCell& placed = layout_.cells[i];
      placed.area.height = height;
      // One line stands in the middle of a row of one line and on the first line of a taller one.
      if (placed.lines.lines.size() <= 1)
        placed.text = {placed.text.x, top + style.pad, placed.text.width, line_height(style.type)};
    }
    if (row.role == page::RowRole::Result)
      layout_.fills.push_back({{place_.x, top, place_.width, height}, ink::kBand});
    y_ += height;
    // The spine parts broken from formed down to their sums; what follows is one figure.
    if (first_sum || (!summed_ && (row.role == page::RowRole::Body || row.role == page::RowRole::Detail)))
      spine_end_ = y_;
    summed_ = summed_ || first_sum;
    const bool before_detail = next != nullptr && next->role == page::RowRole::Detail;
    const bool ruled = (row.role == page::RowRole::Body && ruled_rows_) ||
                       row.role == page::RowRole::Result ||
                       (row.role == page::RowRole::Detail && !before_detail);
    if (ruled && !(row.role == page::RowRole::Body && before_detail)) {
      rule(y_, 1, ink::kFaint);
      y_ += 1;
    }
  }

  const page::Table& table_;
  const Fonts& fonts_;
  Rect place_;
  Layout& layout_;
  float y_;
  std::vector<float> widths_, lefts_;
  bool folds_ = false;
  bool summed_ = false;      ///< the first sum has been passed
  bool ruled_rows_ = false;  ///< rows are parted by rules: not so in a list of plain sentences
  float spine_end_ = 0;
};

/// Name and value side by side in thin boxes; buttons stand free.
float lay_out_form(const page::Table& table, const Fonts& fonts, Rect place, Layout& layout) {
  const std::vector<float> widths = column_widths(table, fonts, place.width);
  const float height = line_height(Type::Small) + 7;
  float y = place.y;
  for (const page::Row& row : table.rows) {
    bool buttons = true;
    for (const page::Cell& cell : row.cells)
      buttons = buttons && (cell.kind == page::CellKind::Button || cell.text.empty());
    float x = place.x;
    std::size_t column = 0;
    for (const page::Cell& cell : row.cells) {
      if (column >= widths.size()) break;
      float width = 0;
      for (int i = 0; i < std::max(cell.span, 1) && column < widths.size(); ++i) width += widths[column++];
      if (buttons) width = cell.text.empty() ? 0 : cell_text_width(fonts, cell, Type::Small) + 2;
      PlacedCell placed = place_cell(cell, row, fonts, table.look, page::Align::Left, width - 2 * kPad);
      if (placed.lines.lines.size() > 1) placed.lines.lines.resize(1);
      placed.area = {x, y, width, height};
      placed.text = {x + kPad, y + 3, width - 2 * kPad, line_height(Type::Small)};
      const bool blank = cell.text.empty() && !cell.editable;
      if (!buttons && !blank) layout.frames.push_back({{x, y, width + 1, height + 1}, ink::kEdge});
      if (width > 0) layout.cells.push_back(std::move(placed));
      x += width + (buttons && width > 0 ? 8 : 0);
    }
    y += height + (buttons ? 4 : 0);
  }
  return y + 1;
}

/// The figures that go on: a box each, what it is above, the figure large, unit and ± beside it.
float lay_out_boxes(const page::Table& table, const Fonts& fonts, Rect place, Layout& layout) {
  constexpr std::size_t kMost = 4;
  const std::size_t count = table.rows.size();
  if (count == 0) return place.y;
  const std::size_t across = std::min(count, kMost);
  const float width = std::floor(place.width / static_cast<float>(across));
  float y = place.y;
  for (std::size_t first = 0; first < count; first += across) {
    const std::size_t last = std::min(first + across, count);
    float height = 0;
    for (std::size_t i = first; i < last; ++i) {
      const page::Row& row = table.rows[i];
      const float left = place.x + width * static_cast<float>(i - first) + 12;
      const float inner = width - 24;
      float line = y + 9, x = left;
      for (std::size_t k = 0; k < row.cells.size(); ++k) {
        const page::Cell& cell = row.cells[k];
        if (cell.text.empty()) continue;
        const bool what = k == 0;
        PlacedCell placed = place_cell(cell, row, fonts, table.look, page::Align::Left, inner);
        placed.type = what                                            ? Type::Small
                      : k == 1 && cell.kind == page::CellKind::Number ? Type::Value
                      : cell.tone == page::Tone::Quiet                ? Type::Small
                                                                      : Type::Body;
        if (what) {
          placed.lines = wrap(fonts, placed.type, cell.text, inner);
          placed.text = {left, line, inner,
                         line_height(placed.type) * static_cast<float>(placed.lines.lines.size())};
          placed.area = placed.text;
          line = placed.text.bottom() + 2;
          height = std::max(height, placed.text.bottom() - y);
        } else {
          float own = text_width(fonts, placed.type, cell.text);
          if (x > left && x + own > left + inner) {
            x = left;
            line += line_height(Type::Value);
          }
          placed.lines = wrap(fonts, placed.type, cell.text, inner);
          own = placed.lines.width;
          const float own_height = line_height(placed.type) * static_cast<float>(placed.lines.lines.size());
          // Unit and ± stand on the base line of the large figure.
          const float lower = placed.type == Type::Value      ? 0
                              : placed.lines.lines.size() > 1 ? 0
                              : placed.type == Type::Body     ? 4.5f
                                                              : 6;
          placed.text = {x, line + lower, own + 1, own_height};
          placed.area = {x - 4, line - 1, own + 8, std::max(line_height(Type::Value), own_height)};
          x += own + 5;
          height = std::max(height, placed.text.bottom() - y);
        }
        layout.cells.push_back(std::move(placed));
      }
    }
    height += 9;
    for (std::size_t i = first; i < last; ++i) {
      const bool end = i + 1 == first + across;
      const float x = place.x + width * static_cast<float>(i - first);
      const Rect box{x, y, (end ? place.x + place.width - x : width + 1), height};
      layout.fills.push_back({box, ink::kBox});
      layout.frames.push_back({box, ink::kEdge});
    }
    y += height - 1;
  }
  return y + 1;
}

/// Title lines; an equation stands in a box of its own.
float lay_out_banner(const page::Table& table, const Fonts& fonts, Rect place, Layout& layout) {
  const std::vector<float> widths = column_widths(table, fonts, place.width);
  float y = place.y;
  for (const page::Row& row : table.rows) {
    const bool equation = !row.cells.empty() && row.cells.front().kind == page::CellKind::Equation;
    const float pad = equation ? 9.0f : 1.0f, side = equation ? 12.0f : 0.0f;
    float x = place.x, tallest = 0;
    std::size_t column = 0;
    const std::size_t begin = layout.cells.size();
    for (const page::Cell& cell : row.cells) {
      if (column >= widths.size()) break;
      float width = 0;
      const page::Align align = table.columns[column].align;
      for (int i = 0; i < std::max(cell.span, 1) && column < widths.size(); ++i) width += widths[column++];
      if (column < widths.size() && row.cells.size() == 1) width = place.width;
      PlacedCell placed = place_cell(cell, row, fonts, table.look, align, width - 2 * side);
      if (cell.kind == page::CellKind::Button) placed.align = page::Align::Left;
      placed.area = {x, y, width, 0};
      placed.text = {
          x + side, y + pad, width - 2 * side,
          line_height(placed.type) * static_cast<float>(std::max<std::size_t>(1, placed.lines.lines.size()))};
      if (cell.kind == page::CellKind::Button) placed.text.x += kPad;
      tallest = std::max(tallest, placed.text.height);
      layout.cells.push_back(std::move(placed));
      x += width;
    }
    const float height = tallest + 2 * pad;
    for (std::size_t i = begin; i < layout.cells.size(); ++i) {
      layout.cells[i].area.height = height;
      layout.cells[i].text.y = y + (height - layout.cells[i].text.height) / 2;
    }
    if (equation) {
      layout.fills.push_back({{place.x, y, place.width, height}, ink::kBox});
      layout.frames.push_back({{place.x, y, place.width, height}, ink::kEdge});
    }
    y += height + (equation ? 6 : 0);
  }
  return y;
}

}  // namespace

float natural_form_width(const page::Table& form, const Fonts& fonts) {
  std::vector<float> natural(form.columns.size(), 0);
  for (const page::Row& row : form.rows) {
    std::size_t column = 0;
    for (const page::Cell& cell : row.cells) {
      if (column >= natural.size()) break;
      // An empty value still needs room to be seen and clicked.
      natural[column] = std::max({natural[column], cell_text_width(fonts, cell, Type::Small) + 2 * kPad,
                                  cell.editable ? 84.0f : 0.0f});
      column += static_cast<std::size_t>(std::max(cell.span, 1));
    }
  }
  float total = 0;
  for (const float width : natural) total += width;
  return total;
}

float lay_out_table(const page::Table& table, const Fonts& fonts, Rect place, Layout& layout) {
  switch (table.look) {
    case page::TableLook::Form:
      return lay_out_form(table, fonts, place, layout);
    case page::TableLook::Boxes:
      return lay_out_boxes(table, fonts, place, layout);
    case page::TableLook::Banner:
      return lay_out_banner(table, fonts, place, layout);
    case page::TableLook::Ledger:
    case page::TableLook::List:
      return Grid(table, fonts, place, layout).build();
  }
  return place.y;
}

}  // namespace heatledger::window
