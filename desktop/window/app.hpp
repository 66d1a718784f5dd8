// The window's conduct: one sheet, one selection, one thing being typed into. What the sheet shows comes from
// core/page; what happens to it goes there as edits and commands.
#pragma once

#include <map>
#include <string>

#include "core/page/session.hpp"
#include "desktop/window/backend.hpp"
#include "desktop/window/field_view.hpp"
#include "desktop/window/file_prompt.hpp"
#include "desktop/window/layout.hpp"
#include "desktop/window/list_popup.hpp"
#include "desktop/window/question.hpp"
#include "desktop/window/sheet_view.hpp"
#include "desktop/window/top_bar.hpp"

namespace heatledger::window {

class App final : public Listener {
 public:
  explicit App(Backend& backend);

  /// Opens a file, or names the file that a new sheet will be saved to when there is none yet.
  void open(const std::string& path);
  /// Selects a cell by id, for pictures.
  void select(const std::string& cell);
  /// A line for each cell that can be pointed at: id, x, y, width, height [pixels], tabs between.
  std::string cell_places();
  /// Draws, sleeps, listens, until the window is closed.
  void run();
  /// Draws one frame.
  void draw();

  void on_key(const KeyPress& press) override;
  void on_character(char32_t code) override;
  void on_mouse_down(Point at, int clicks, bool shift) override;
  void on_mouse_move(Point at, bool held) override;
  void on_mouse_up(Point at) override;
  void on_scroll(Point at, float lines) override;
  void on_drop(const std::string& path) override;
  void on_close_asked() override;

 private:
  /// What waits for an answer about unsaved changes.
  enum class Pending : std::uint8_t { None, Close, New, Open };

  // app.cpp: frame, layout, files
  const Layout& layout();
  Rect paper() const;
  Rect margin_area() const;
  Point content_origin() const;
  float content_width() const;
  void scroll_to(const PlacedCell* placed);
  void clamp_scroll();
  void page_changed();
  void update_bar();
  void say(std::string text, bool problem = false);
  void say(const Error& error);
  bool save(const std::string& path);
  bool save_or_ask();
  void load(const std::string& path);
  void new_sheet();
  void guard(Pending what, const std::string& path = {});
  void go_on();
  void write_report(const std::string& path);
  void write_tables(const std::string& path);
  void write_comparison(const std::string& other);
  void start_prompt(FilePrompt::Purpose purpose);
  void finish_prompt(FilePrompt::Outcome outcome);
  void answer_question(const std::string& answer);
  void draw_message(Canvas& canvas);
  void draw_scroll_bars(Canvas& canvas);

  // editing.cpp: cells
  const PlacedCell* selected_cell();
  void select_cell(const PlacedCell* placed);
  void activate(const PlacedCell& placed);
  void start_edit(const PlacedCell& placed, std::string text, bool select_all);
  void start_choice(const PlacedCell& placed);
  bool finish_edit();
  void cancel_edit();
  void edit_cell(const std::string& cell, const std::string& text);
  void toggle_fold(const PlacedCell& placed);
  void refresh_suggestions();
  void take_suggestion(const ListItem& item);
  void edit_key(const KeyPress& press);
  void browse_key(const KeyPress& press);
  bool shortcut(const KeyPress& press);
  void run_command(const std::string& id);
  void copy_cell();
  void paste_into_cell();
  Rect edit_box();

  Backend& backend_;
  Fonts fonts_;
  page::Session session_;
  Layout layout_;
  bool layout_stale_ = true;
  float laid_out_width_ = 0, zoom_ = 1;

  std::string path_, saved_at_, title_;
  std::string selected_, hovered_, editing_, choosing_;
  page::Margin margin_;
  bool margin_stale_ = true;
  float scroll_ = 0, margin_scroll_ = 0, margin_height_ = 0, drag_from_ = -1, drag_scroll_ = 0;
  bool selecting_text_ = false;

  TextField field_;
  FieldView field_view_;
  ListPopup list_;
  bool suggestions_wanted_ = false;
  TopBar bar_;
  FilePrompt prompt_;
  Question question_;
  Pending pending_ = Pending::None;
  std::string pending_path_;

  std::string message_;
  bool message_is_problem_ = false;
  bool dirty_ = true, closing_ = false, caret_on_ = true;
};

}  // namespace heatledger::window
