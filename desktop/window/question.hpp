// A question that needs an answer before the sheet goes: what to do with changes that are not saved.
#pragma once

#include <string>
#include <utility>
#include <vector>

#include "desktop/window/canvas.hpp"

namespace heatledger::window {

class Question {
 public:
  struct Answer {
    std::string id, text;  ///< text begins with the letter that chooses it
  };

  void ask(std::string text, std::vector<Answer> answers);
  bool active() const { return active_; }
  void close() { active_ = false; }

  /// Id of the answer given by the key; empty while it is open. Escape gives the last answer.
  std::string key(const KeyPress& press);
  std::string character(char32_t code);
  std::string mouse_down(Point at);
  void mouse_move(Point at);
  void draw(Canvas& canvas, Rect bounds);

 private:
  std::string text_;
  std::vector<Answer> answers_;
  std::vector<Rect> places_;
  std::size_t marked_ = 0;
  bool active_ = false;
};

}  // namespace heatledger::window
