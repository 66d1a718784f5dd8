// One line of text being edited: caret, selection, words, its own undo. Knows nothing of fonts or windows.
#pragma once

#include <functional>
#include <string>
#include <string_view>
#include <vector>

#include "desktop/window/events.hpp"

namespace heatledger::window {

class TextField {
 public:
  /// Where cut and copied text goes and comes from.
  struct Clipboard {
    std::function<std::string()> get;
    std::function<void(const std::string&)> set;
  };

  explicit TextField(Clipboard clipboard = {}) : clipboard_(std::move(clipboard)) {}

  /// Starts anew; the caret stands at the end, or everything is selected.
  void start(std::string text, bool select_all);
  const std::string& text() const { return text_; }
  /// Byte offsets; caret() is where typing goes, anchor() the other end of the selection.
  std::size_t caret() const { return caret_; }
  std::size_t anchor() const { return anchor_; }
  bool has_selection() const { return caret_ != anchor_; }

  /// @return whether the key belonged to the field
  bool key(const KeyPress& press);
  void character(char32_t code);
  void insert(std::string_view text);
  /// Replaces everything, as one step that can be undone.
  void replace(std::string text);
  void put_caret(std::size_t offset, bool extend);
  void select_word(std::size_t offset);
  void select_all();

 private:
  struct Memory {
    std::string text;
    std::size_t caret = 0;
  };

  void remember(bool typing);
  void erase_selection();
  void erase(std::size_t from, std::size_t to);
  void move(std::size_t to, bool extend);
  std::size_t before(std::size_t at) const;
  std::size_t after(std::size_t at) const;
  std::size_t word_before(std::size_t at) const;
  std::size_t word_after(std::size_t at) const;

  Clipboard clipboard_;
  std::string text_;
  std::size_t caret_ = 0, anchor_ = 0;
  std::vector<Memory> past_, future_;
  bool typing_ = false;  ///< the last step was typing, which joins into one
};

/// One line: tabs, line ends and other control characters become blanks, blanks at both ends go.
std::string one_line(std::string_view text);

}  // namespace heatledger::window
