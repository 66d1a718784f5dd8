// App's hands: keys, mouse, the cell being edited.
#include <algorithm>
#include <cmath>
#include <utility>

#include "desktop/window/app.hpp"

namespace heatledger::window {
namespace {

constexpr std::size_t kMostSuggestions = 10;

bool takes_text(const page::Cell& cell) {
  return cell.editable && cell.kind != page::CellKind::Choice && cell.kind != page::CellKind::Button;
}

/// Cells whose text ends in a species name that the library can complete.
bool completes(const page::Cell& cell) {
  return cell.kind == page::CellKind::Equation;
}

}  // namespace

// --- the cell selected and the cell edited
// --------------------------------------------------------------------------

const PlacedCell* App::selected_cell() {
  return layout().find(selected_);
}

void App::select_cell(const PlacedCell* placed) {
  if (placed == nullptr || placed->cell->id == selected_) return;
  selected_ = placed->cell->id;
  margin_stale_ = true;
  dirty_ = true;
  scroll_to(placed);
}

Rect App::edit_box() {
  const PlacedCell* placed = layout().find(editing_.empty() ? choosing_ : editing_);
  if (placed == nullptr) return {};
  const Point origin = content_origin();
  Rect box = {placed->area.x + origin.x, placed->area.y + origin.y, placed->area.width, placed->area.height};
  if (editing_.empty()) return box;
  // A narrow cell lends its editor room: to the left for figures, to the right for words.
  // An equation takes the whole line.
  const bool whole = placed->cell->kind == page::CellKind::Equation;
  const float wanted = whole ? content_width() : std::min(std::max(box.width, 110.0f), content_width());
  if (placed->align == page::Align::Right) box.x = std::max(origin.x, box.right() - wanted);
  box.width = wanted;
  if (box.right() > origin.x + content_width()) box.x = origin.x + content_width() - wanted;
  const float height = std::max(box.height, line_height(placed->type) + 6);
  box.y -= (height - box.height) / 2;
  box.height = height;
  return box;
}

void App::activate(const PlacedCell& placed) {
  const page::Cell& cell = *placed.cell;
  if (takes_text(cell)) return start_edit(placed, cell.edit_text, true);
  if (cell.editable && cell.kind == page::CellKind::Choice) return start_choice(placed);
  if (cell.editable && cell.kind == page::CellKind::Button) return edit_cell(cell.id, cell.text);
  if (!placed.row->fold_id.empty()) toggle_fold(placed);
}

void App::start_edit(const PlacedCell& placed, std::string text, bool select_all) {
  editing_ = placed.cell->id;
  choosing_.clear();
  field_.start(std::move(text), select_all);
  field_view_.reset();
  list_.hide();
  suggestions_wanted_ = completes(*placed.cell);
  caret_on_ = true;
  message_.clear();
  dirty_ = true;
}

void App::start_choice(const PlacedCell& placed) {
  choosing_ = placed.cell->id;
  std::vector<ListItem> items;
  int chosen = -1;
  for (const std::string& choice : placed.cell->choices) {
    if (choice == placed.cell->text) chosen = static_cast<int>(items.size());
    items.push_back({choice, ""});
  }
  list_.show(std::move(items), chosen);
  dirty_ = true;
}

void App::edit_cell(const std::string& cell, const std::string& text) {
  message_.clear();
  if (const Status status = session_.edit(cell, text); !status.ok()) say(status.error());
  page_changed();
}

bool App::finish_edit() {
  if (editing_.empty()) return true;
  const std::string cell = std::exchange(editing_, {});
  list_.hide();
  const PlacedCell* placed = layout().find(cell);
  const bool same = placed != nullptr && placed->cell->edit_text == field_.text();
  if (!same) edit_cell(cell, one_line(field_.text()));
  dirty_ = true;
  return true;
}

void App::cancel_edit() {
  editing_.clear();
  choosing_.clear();
  list_.hide();
  dirty_ = true;
}

void App::toggle_fold(const PlacedCell& placed) {
  // The page that holds the row is about to be replaced.
  const std::string fold = placed.row->fold_id;
  const bool open = placed.row->open;
  edit_cell(fold, open ? "closed" : "open");
}

void App::refresh_suggestions() {
  list_.hide();
  if (!suggestions_wanted_ || editing_.empty()) return;
  // Completion belongs to the name at the end of what is typed.
  if (field_.caret() != field_.text().size() || field_.text().empty() || field_.text().back() == ' ') return;
  std::vector<ListItem> items;
  for (page::Session::Suggestion& suggestion : session_.suggest(field_.text(), kMostSuggestions)) {
    if (suggestion.insert != field_.text())
      items.push_back({std::move(suggestion.insert), std::move(suggestion.remark)});
  }
  list_.show(std::move(items), -1);
}

void App::take_suggestion(const ListItem& item) {
  field_.replace(item.text);
  list_.hide();
  dirty_ = true;
}

void App::copy_cell() {
  const PlacedCell* placed = selected_cell();
  if (placed != nullptr)
    backend_.set_clipboard(placed->cell->editable && !placed->cell->edit_text.empty()
                               ? placed->cell->edit_text
                               : placed->cell->text);
}

void App::paste_into_cell() {
  const PlacedCell* placed = selected_cell();
  if (placed == nullptr || !takes_text(*placed->cell)) return;
  const std::string cell = placed->cell->id;
  edit_cell(cell, one_line(backend_.clipboard()));
}

// --- keys
// -----------------------------------------------------------------------------------------------------------

void App::on_key(const KeyPress& press) {
  dirty_ = true;
  if (question_.active()) return answer_question(question_.key(press));
  if (prompt_.active()) return finish_prompt(prompt_.key(press));
  if (!editing_.empty()) return edit_key(press);
  if (!choosing_.empty()) {
    switch (press.key) {
      case Key::Up:
        list_.move(-1);
        break;
      case Key::Down:
        list_.move(1);
        break;
      case Key::Home:
        list_.move(-1 - list_.selected());
        break;
      case Key::Escape:
        cancel_edit();
        break;
      case Key::Enter:
      case Key::Tab:
        if (const ListItem* item = list_.chosen()) {
          const std::string cell = choosing_, text = item->text;
          cancel_edit();
          edit_cell(cell, text);
        } else {
          cancel_edit();
        }
        break;
      default:
        break;
    }
    return;
  }
  if (!shortcut(press)) browse_key(press);
}

void App::edit_key(const KeyPress& press) {
  switch (press.key) {
    case Key::Escape:
      list_.open() ? list_.hide() : cancel_edit();
      return;
    case Key::Up:
    case Key::Down:
      if (list_.open()) return list_.move(press.key == Key::Up ? -1 : 1);
      finish_edit();
      select_cell(neighbour(layout(), selected_, press.key == Key::Up ? Direction::Up : Direction::Down));
      return;
    case Key::Enter:
      if (const ListItem* item = list_.chosen()) return take_suggestion(ListItem(*item));
      finish_edit();
      return;
    case Key::Tab: {
      if (const ListItem* item = list_.chosen()) return take_suggestion(ListItem(*item));
      const std::string cell = editing_;
      finish_edit();
      select_cell(next_entry(layout(), cell, press.shift));
      return;
    }
    default:
      break;
  }
  const std::string before = field_.text();
  if (!field_.key(press)) {
    const bool of_sheet = press.control && (press.letter == 's' || press.letter == 'o' ||
                                            press.letter == 'n' || press.letter == 'p');
    if (of_sheet) {
      finish_edit();
      shortcut(press);
    }
    return;
  }
  if (field_.text() != before) refresh_suggestions();
}

bool App::shortcut(const KeyPress& press) {
  if (!press.control || press.alt) return false;
  switch (press.letter) {
    case 's':
      if (press.shift) {
        start_prompt(FilePrompt::Purpose::Save);
      } else {
        save_or_ask();
      }
      return true;
    case 'o':
      run_command("open");
      return true;
    case 'n':
      run_command("new");
      return true;
    case 'p':
      run_command("report");
      return true;
    case 't':
      run_command("tables");
      return true;
    case 'q':
    case 'w':
      guard(Pending::Close);
      return true;
    case 'c':
      copy_cell();
      return true;
    case 'v':
      paste_into_cell();
      return true;
    case 'z':
      run_command(press.shift ? "page:redo" : "page:undo");
      return true;
    case 'y':
      run_command("page:redo");
      return true;
    case '+':
      zoom_ = std::min(3.0f, zoom_ * 1.1f);
      break;
    case '-':
      zoom_ = std::max(0.5f, zoom_ / 1.1f);
      break;
    case '0':
      zoom_ = 1;
      break;
    default:
      return false;
  }
  layout_stale_ = true;
  return true;
}

void App::run_command(const std::string& id) {
  if (id == "new") return guard(Pending::New);
  if (id == "open") return guard(Pending::Open);
  if (id == "save") {
    save_or_ask();
    return;
  }
  if (id == "report") return start_prompt(FilePrompt::Purpose::Report);
  if (id == "compare") return start_prompt(FilePrompt::Purpose::Compare);
  if (id == "tables") return start_prompt(FilePrompt::Purpose::Tables);
  constexpr std::string_view kPage = "page:";
  if (id.compare(0, kPage.size(), kPage) != 0) return;
  finish_edit();
  message_.clear();
  if (const Status status = session_.command(id.substr(kPage.size()), {}); !status.ok()) say(status.error());
  page_changed();
}

void App::browse_key(const KeyPress& press) {
  const float page_height = backend_.size().y - TopBar::kHeight - 80;
  const PlacedCell* placed = selected_cell();
  switch (press.key) {
    case Key::Left:
    case Key::Right: {
      const Direction direction = press.key == Key::Left ? Direction::Left : Direction::Right;
      const PlacedCell* next = neighbour(layout(), selected_, direction);
      // At the end of a line the arrows open and close its bond lines.
      if (next == nullptr && placed != nullptr && !placed->row->fold_id.empty() &&
          placed->row->open == (direction == Direction::Left)) {
        return toggle_fold(*placed);
      }
      return select_cell(next);
    }
    case Key::Up:
      return select_cell(neighbour(layout(), selected_, Direction::Up));
    case Key::Down:
      return select_cell(neighbour(layout(), selected_, Direction::Down));
    case Key::Tab:
      return select_cell(next_entry(layout(), selected_, press.shift));
    case Key::PageDown:
      scroll_ += page_height;
      return clamp_scroll();
    case Key::PageUp:
      scroll_ -= page_height;
      return clamp_scroll();
    case Key::Home:
      scroll_ = 0;
      return;
    case Key::End:
      scroll_ = layout().height;
      return clamp_scroll();
    case Key::Enter:
    case Key::F2:
      if (placed != nullptr) activate(*placed);
      return;
    case Key::Backspace:
    case Key::Delete:
      if (placed != nullptr && takes_text(*placed->cell) && !placed->cell->edit_text.empty())
        edit_cell(selected_, "");
      return;
    case Key::Escape:
      if (message_.empty()) {
        selected_.clear();
        margin_stale_ = true;
      }
      message_.clear();
      return;
    default:
      return;
  }
}

void App::on_character(char32_t code) {
  dirty_ = true;
  caret_on_ = true;
  if (question_.active()) return answer_question(question_.character(code));
  if (prompt_.active()) return prompt_.character(code);
  if (!choosing_.empty()) return list_.jump(code);
  if (editing_.empty()) {
    const PlacedCell* placed = selected_cell();
    if (placed == nullptr) return;
    if (code == ' ' && !takes_text(*placed->cell)) return activate(*placed);
    if (!takes_text(*placed->cell)) return;
    start_edit(*placed, "", false);
  }
  field_.character(code);
  refresh_suggestions();
}

// --- mouse
// ----------------------------------------------------------------------------------------------------------

void App::on_mouse_down(Point at, int clicks, bool shift) {
  dirty_ = true;
  if (question_.active()) return answer_question(question_.mouse_down(at));
  if (prompt_.active()) return finish_prompt(prompt_.mouse_down(fonts_, at, clicks));
  if (list_.open()) {
    if (const std::optional<int> index = list_.hit(at)) {
      const ListItem item = list_.items()[static_cast<std::size_t>(*index)];
      if (!editing_.empty()) return take_suggestion(item);
      const std::string cell = choosing_;
      cancel_edit();
      return edit_cell(cell, item.text);
    }
    if (!choosing_.empty()) cancel_edit();
  }
  if (at.y < TopBar::kHeight) {
    const std::string button = bar_.hit(at);
    if (!button.empty()) run_command(button);
    return;
  }
  if (!editing_.empty()) {
    if (field_view_.box().contains(at)) {
      field_.put_caret(field_view_.offset_at_point(fonts_, field_, at), shift);
      if (clicks == 2) field_.select_word(field_.caret());
      if (clicks > 2) field_.select_all();
      selecting_text_ = clicks == 1;
      list_.hide();
      return;
    }
    finish_edit();
  }
  if (at.x > backend_.size().x - 14) {
    drag_from_ = at.y;
    drag_scroll_ = scroll_;
    return;
  }
  const Point origin = content_origin();
  const PlacedCell* placed = cell_at(layout(), {at.x - origin.x, at.y - origin.y});
  if (placed == nullptr) return;
  const bool on_mark = placed->fold_mark && at.x - origin.x < placed->text.x;
  if (on_mark) return toggle_fold(*placed);
  if (!can_select(*placed)) {
    if (!placed->row->fold_id.empty() && clicks == 2) toggle_fold(*placed);
    return;
  }
  const bool again = placed->cell->id == selected_;
  select_cell(placed);
  placed = selected_cell();
  if (placed == nullptr) return;
  const page::Cell& cell = *placed->cell;
  const bool at_once = cell.editable && (cell.kind == page::CellKind::Choice ||
                                         cell.kind == page::CellKind::Button || cell.text.empty());
  if (at_once || clicks == 2 || (again && takes_text(cell))) activate(*placed);
}

void App::on_mouse_move(Point at, bool held) {
  bar_.point_at(at);
  if (at.y < TopBar::kHeight + 30) dirty_ = true;
  if (question_.active()) {
    question_.mouse_move(at);
    dirty_ = true;
    return;
  }
  if (prompt_.active()) {
    prompt_.mouse_move(at);
    dirty_ = true;
    return;
  }
  if (held && drag_from_ >= 0) {
    const float track = backend_.size().y - TopBar::kHeight;
    scroll_ = drag_scroll_ + (at.y - drag_from_) * (layout().height + 70) / std::max(track, 1.0f);
    clamp_scroll();
    dirty_ = true;
    return;
  }
  if (held && selecting_text_ && !editing_.empty()) {
    field_.put_caret(field_view_.offset_at_point(fonts_, field_, at), true);
    dirty_ = true;
    return;
  }
  if (list_.contains(at)) {
    list_.point_at(at);
    dirty_ = true;
    return;
  }
  const Point origin = content_origin();
  const PlacedCell* placed =
      at.y < TopBar::kHeight ? nullptr : cell_at(layout(), {at.x - origin.x, at.y - origin.y});
  const bool named = placed != nullptr && can_select(*placed);
  const std::string hovered = named ? placed->cell->id : std::string();
  Pointer pointer = Pointer::Arrow;
  if (named) pointer = takes_text(*placed->cell) ? Pointer::Text : Pointer::Hand;
  if (at.y < TopBar::kHeight && !bar_.hit(at).empty()) pointer = Pointer::Hand;
  backend_.set_pointer(pointer);
  if (hovered != hovered_) {
    hovered_ = hovered;
    dirty_ = true;
  }
}

void App::on_mouse_up(Point) {
  selecting_text_ = false;
  if (drag_from_ >= 0) dirty_ = true;
  drag_from_ = -1;
}

void App::on_scroll(Point at, float lines) {
  dirty_ = true;
  if (prompt_.active()) return prompt_.scroll(lines);
  if (list_.contains(at)) return list_.scroll(lines);
  if (at.x > margin_area().x) {
    const float hidden = std::max(0.0f, margin_height_ - margin_area().height);
    margin_scroll_ = std::clamp(margin_scroll_ - lines * 48, 0.0f, hidden);
    return;
  }
  scroll_ -= lines * 60;
  layout();
  clamp_scroll();
}

void App::on_drop(const std::string& path) {
  guard(Pending::Open, path);
}

void App::on_close_asked() {
  guard(Pending::Close);
}

}  // namespace heatledger::window
