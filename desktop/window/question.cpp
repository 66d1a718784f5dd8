#include "desktop/window/question.hpp"

#include <algorithm>

namespace heatledger::window {

void Question::ask(std::string text, std::vector<Answer> answers) {
  text_ = std::move(text);
  answers_ = std::move(answers);
  places_.clear();
  marked_ = 0;
  active_ = true;
}

std::string Question::key(const KeyPress& press) {
  const std::size_t count = answers_.size();
  switch (press.key) {
    case Key::Left:
      marked_ = (marked_ + count - 1) % count;
      return {};
    case Key::Right:
    case Key::Tab:
      marked_ = (marked_ + (press.shift ? count - 1 : 1)) % count;
      return {};
    case Key::Enter:
      return answers_[marked_].id;
    case Key::Escape:
      return answers_.back().id;
    default:
      return {};
  }
}

std::string Question::character(char32_t code) {
  const auto lower = [](char32_t c) { return c >= 'A' && c <= 'Z' ? c - 'A' + 'a' : c; };
  for (const Answer& answer : answers_) {
    if (lower(static_cast<unsigned char>(answer.text[0])) == lower(code)) return answer.id;
  }
  return {};
}

std::string Question::mouse_down(Point at) {
  for (std::size_t i = 0; i < places_.size(); ++i) {
    if (places_[i].contains(at)) return answers_[i].id;
  }
  return {};
}

void Question::mouse_move(Point at) {
  for (std::size_t i = 0; i < places_.size(); ++i) {
    if (places_[i].contains(at)) marked_ = i;
  }
}

void Question::draw(Canvas& canvas, Rect bounds) {
  canvas.fill(bounds, 0x30202224u);
  const float width = std::min(560.0f, bounds.width - 40);
  const Wrapped lines = wrap(canvas.fonts(), Type::Body, text_, width - 44);
  const float text_height = line_height(Type::Body) * static_cast<float>(lines.lines.size());
  const Rect panel{bounds.x + (bounds.width - width) / 2, bounds.y + 80, width, text_height + 82};
  canvas.fill({panel.x + 4, panel.y + 4, panel.width, panel.height}, 0x28000000u);
  canvas.fill(panel, ink::kPaper);
  canvas.frame(panel, ink::kEdge);
  canvas.lines_in({panel.x + 22, panel.y + 16, panel.width - 44, text_height}, Type::Body, ink::kText,
                  page::Align::Left, lines);
  float x = panel.x + 22;
  places_.clear();
  for (std::size_t i = 0; i < answers_.size(); ++i) {
    const Rect button{x, panel.bottom() - 46, text_width(canvas.fonts(), Type::Detail, answers_[i].text) + 26,
                      28};
    canvas.fill(button, i == marked_ ? ink::kBar : ink::kBox, 3);
    canvas.frame(button, i == marked_ ? ink::kBar : ink::kEdge, 1, 3);
    canvas.text_in(button, Type::Detail, i == marked_ ? ink::kBarText : ink::kText, page::Align::Centre,
                   answers_[i].text);
    // The letter that chooses it is underlined.
    const float text_left = button.x + 13;
    const float letter = text_width(canvas.fonts(), Type::Detail, answers_[i].text.substr(0, 1));
    canvas.line({text_left, button.y + 21}, {text_left + letter, button.y + 21},
                i == marked_ ? ink::kBarText : ink::kText);
    places_.push_back(button);
    x = button.right() + 8;
  }
}

}  // namespace heatledger::window
