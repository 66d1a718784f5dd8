// The dark bar over the sheet: the file and its state on the left, what can be done on the right.
#pragma once

#include <string>
#include <vector>

#include "desktop/window/canvas.hpp"

namespace heatledger::window {

class TopBar {
 public:
  static constexpr float kHeight = 36;

  struct Button {
    std::string id, text, key;
    bool enabled = true;
  };

  void set(std::string file, std::string state, std::vector<Button> buttons);
  void draw(Canvas& canvas, float width);
  /// Id of the enabled button under the point; empty when there is none.
  std::string hit(Point at) const;
  void point_at(Point at) { pointer_ = at; }

 private:
  std::string file_, state_;
  std::vector<Button> buttons_;
  std::vector<Rect> places_;
  Point pointer_{-1, -1};
};

}  // namespace heatledger::window
