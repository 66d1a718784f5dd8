// A short list under a field: completions of a name, the choices of a cell, files of a folder.
#pragma once

#include <optional>
#include <string>
#include <vector>

#include "desktop/window/canvas.hpp"

namespace heatledger::window {

struct ListItem {
  std::string text, remark;  ///< remark: quiet, at the right
};

class ListPopup {
 public:
  void show(std::vector<ListItem> items, int selected);
  void hide() { items_.clear(); }
  bool open() const { return !items_.empty(); }
  const std::vector<ListItem>& items() const { return items_; }
  /// Index of the item marked, -1 when none is.
  int selected() const { return selected_; }
  const ListItem* chosen() const;

  /// Moves the mark, around the ends; from none to the first or last.
  void move(int by);
  /// Marks the next item that begins with the letter.
  void jump(char32_t letter);
  void point_at(Point at);
  /// Index of the item under the point.
  std::optional<int> hit(Point at) const;
  bool contains(Point at) const { return open() && area_.contains(at); }
  void scroll(float lines);

  /// Under `anchor`, or above it where there is no room below inside `bounds`.
  void draw(Canvas& canvas, Rect anchor, Rect bounds);

 private:
  void keep_selected_in_view();

  std::vector<ListItem> items_;
  int selected_ = -1, first_ = 0, shown_ = 0;
  Rect area_;
};

}  // namespace heatledger::window
