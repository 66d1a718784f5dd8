// Draws a TextField in a box: caret, selection, and as much of a long text as fits around the caret.
#pragma once

#include "desktop/window/canvas.hpp"
#include "desktop/window/text_field.hpp"

namespace heatledger::window {

class FieldView {
 public:
  void draw(Canvas& canvas, const TextField& field, Rect box, Type type, bool caret_on,
            std::string_view hint = {});
  /// Byte offset under a point of the box drawn last.
  std::size_t offset_at_point(const Fonts& fonts, const TextField& field, Point at) const;
  const Rect& box() const { return box_; }
  void reset() { scroll_ = 0; }

 private:
  Rect box_;
  Type type_ = Type::Body;
  float scroll_ = 0;  ///< points of text left of the box
};

}  // namespace heatledger::window
