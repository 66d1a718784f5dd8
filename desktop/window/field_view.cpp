#include "desktop/window/field_view.hpp"

#include <algorithm>

namespace heatledger::window {
namespace {

constexpr float kPad = 6;

}  // namespace

void FieldView::draw(Canvas& canvas, const TextField& field, Rect box, Type type, bool caret_on,
                     std::string_view hint) {
  box_ = box;
  type_ = type;
  const Fonts& fonts = canvas.fonts();
  const std::string_view text = field.text();
  const auto x_of = [&](std::size_t offset) { return text_width(fonts, type, text.substr(0, offset)); };
  const float inner = box.width - 2 * kPad, caret = x_of(field.caret());
  scroll_ = std::clamp(scroll_, std::max(0.0f, caret - inner + 1), caret);
  scroll_ = std::min(scroll_, std::max(0.0f, x_of(text.size()) - inner + 1));

  canvas.fill(box, ink::kBox);
  canvas.frame(box, ink::kSelectedEdge, 2);
  const Rect inside{box.x + kPad, box.y + 2, inner, box.height - 4};
  canvas.clip(inside);
  const float left = inside.x - scroll_, line = line_height(type);
  const float top = box.y + (box.height - line) / 2;
  if (field.has_selection()) {
    const float from = x_of(std::min(field.caret(), field.anchor())),
                to = x_of(std::max(field.caret(), field.anchor()));
    canvas.fill({left + from, top, to - from, line}, ink::kSelection);
  }
  const Rect line_box{left, top, inner + scroll_, line};
  if (text.empty()) {
    canvas.text_in(line_box, type, ink::kHint, page::Align::Left, hint);
  } else {
    canvas.text_in(line_box, type, ink::kTyped, page::Align::Left, text);
  }
  if (caret_on) canvas.fill({left + caret, top + 1, 1.5f, line - 2}, ink::kText);
  canvas.unclip();
}

std::size_t FieldView::offset_at_point(const Fonts& fonts, const TextField& field, Point at) const {
  return offset_at(fonts, type_, field.text(), at.x - box_.x - kPad + scroll_);
}

}  // namespace heatledger::window
