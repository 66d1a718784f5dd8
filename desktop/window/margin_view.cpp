#include "desktop/window/margin_view.hpp"

namespace heatledger::window {
namespace {

/// Writes down the margin, remembering where it is.
class Pen {
 public:
  Pen(Canvas& canvas, Rect area, float scroll) : canvas_(canvas), area_(area), y_(area.y - scroll) {}

  float y() const { return y_; }
  void space(float points) { y_ += points; }

  void heading(std::string_view text) {
    canvas_.spaced_capitals({area_.x, y_}, ink::kQuiet, text);
    y_ += line_height(Type::Heading) + 4;
  }

  void paragraph(Type type, Colour colour, std::string_view text, float indent = 0) {
    if (text.empty()) return;
    const float width = area_.width - indent;
    const Wrapped lines = wrap(canvas_.fonts(), type, text, width);
    const float height = line_height(type) * static_cast<float>(lines.lines.size());
    canvas_.lines_in({area_.x + indent, y_, width, height}, type, colour, page::Align::Left, lines);
    y_ += height;
  }

  void step(std::size_t number, std::string_view text) {
    const float top = y_;
    paragraph(Type::Detail, ink::kText, text, 20);
    canvas_.text_in({area_.x, top, 18, line_height(Type::Detail)}, Type::Detail, ink::kQuiet,
                    page::Align::Left, std::to_string(number) + ".");
  }

  void rule() {
    y_ += 12;
    canvas_.line({area_.x, y_}, {area_.right(), y_}, ink::kEdge);
    y_ += 13;
  }

  void note(const page::Note& note) {
    const bool loud = note.kind == page::NoteKind::Caution || note.kind == page::NoteKind::Disagreement ||
                      note.kind == page::NoteKind::Error;
    const float top = y_;
    const Colour colour = note.kind == page::NoteKind::Error ? ink::kError
                          : loud                             ? ink::kCaution
                                                             : ink::kText;
    paragraph(Type::Detail, colour, note.text, loud ? 12 : 0);
    if (loud) canvas_.fill({area_.x, top, 3, y_ - top}, colour);
    y_ += 8;
  }

 private:
  Canvas& canvas_;
  Rect area_;
  float y_;
};

}  // namespace

float draw_margin(Canvas& canvas, const page::Margin& margin, Rect area, float scroll) {
  Pen pen(canvas, area, scroll);
  const float begin = pen.y();
  pen.heading("Working");
  if (margin.cell.empty()) {
    pen.paragraph(Type::Detail, ink::kQuiet,
                  "Select a figure to see how it comes about: arrows or the mouse. Enter or F2 edits a cell, "
                  "Tab goes to the next entry.");
    return pen.y() - begin;
  }
  pen.space(2);
  pen.paragraph(Type::Value, ink::kText, margin.value);
  pen.paragraph(Type::Detail, ink::kText, margin.subject);
  pen.space(8);
  for (std::size_t i = 0; i < margin.steps.size(); ++i) pen.step(i + 1, margin.steps[i]);
  if (!margin.steps.empty()) pen.space(8);
  for (const std::string& source : margin.sources) pen.paragraph(Type::Small, ink::kQuiet, source);
  for (const page::Margin::Section& section : margin.sections) {
    pen.rule();
    pen.heading(section.heading);
    for (const page::Note& note : section.notes) pen.note(note);
  }
  return pen.y() - begin;
}

}  // namespace heatledger::window
