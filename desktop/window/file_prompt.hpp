// Asks for a file inside the window: a path to type, the folder's entries to choose from. No outside dialog.
#pragma once

#include <functional>
#include <string>

#include "desktop/window/field_view.hpp"
#include "desktop/window/list_popup.hpp"
#include "desktop/window/text_field.hpp"

namespace heatledger::window {

class FilePrompt {
 public:
  enum class Purpose : std::uint8_t { Open, Save, Report, Tables, Compare };
  enum class Outcome : std::uint8_t { Waiting, Cancelled, Chosen };

  explicit FilePrompt(TextField::Clipboard clipboard) : field_(std::move(clipboard)) {}

  /// @param path  what stands in the field at first
  void start(Purpose purpose, const std::string& path);
  bool active() const { return active_; }
  Purpose purpose() const { return purpose_; }
  /// The path chosen; for a file to write, with its ending, and agreed to where it would replace another.
  const std::string& path() const { return chosen_; }

  Outcome key(const KeyPress& press);
  void character(char32_t code);
  Outcome mouse_down(const Fonts& fonts, Point at, int clicks);
  void mouse_move(Point at) { list_.point_at(at); }
  void scroll(float lines) { list_.scroll(lines); }
  void cancel() { active_ = false; }
  /// Keeps the prompt open with a complaint under the field.
  void complain(std::string text);

  void draw(Canvas& canvas, Rect bounds, bool caret_on);

 private:
  void refresh();
  Outcome accept();
  Outcome take(const ListItem& item);

  TextField field_;
  FieldView view_;
  ListPopup list_;
  bool active_ = false;
  Purpose purpose_ = Purpose::Open;
  std::string complaint_, chosen_, replaces_, listed_;
};

}  // namespace heatledger::window
