#include "desktop/window/canvas.hpp"

#include <imgui/imgui.h>
#include <imgui/imgui_internal.h>

#include <algorithm>
#include <cfloat>
#include <cmath>

namespace heatledger::window {
namespace {

constexpr float kLine = 1.45f;         // distance of lines over the em
constexpr float kHeightOfEm = 1.164f;  // ascent + descent of the typeface over the em
constexpr float kLetterSpace = 1.2f;   // [points], between capitals of headings

ImVec2 pixels(Point p, float scale) {
  return {p.x * scale, p.y * scale};
}

float pixel_width(const ImFont* font, std::string_view text) {
  return font->CalcTextSizeA(font->FontSize, FLT_MAX, 0, text.data(), text.data() + text.size()).x;
}

/// A run of an equation that is set in one size.
struct Run {
  std::string_view text;
  bool phase = false;
};

bool is_phase(std::string_view inside) {
  return inside == "g" || inside == "l" || inside == "s" || inside == "diss" || inside.substr(0, 2) == "aq";
}

std::vector<Run> equation_runs(std::string_view text) {
  std::vector<Run> runs;
  std::size_t from = 0;
  for (std::size_t at = 0; at < text.size(); ++at) {
    if (text[at] != '(' || at == 0 || text[at - 1] == ' ') continue;
    const std::size_t close = text.find(')', at);
    if (close == std::string_view::npos || !is_phase(text.substr(at + 1, close - at - 1))) continue;
    if (at > from) runs.push_back({text.substr(from, at - from), false});
    runs.push_back({text.substr(at, close + 1 - at), true});
    from = close + 1;
    at = close;
  }
  if (from < text.size()) runs.push_back({text.substr(from), false});
  return runs;
}

bool is_break(char c) {
  return c == ' ';
}

}  // namespace

Colour colour_of(page::Tone tone) {
  switch (tone) {
    case page::Tone::Plain:
    case page::Tone::Strong:
      return ink::kText;
    case page::Tone::Quiet:
      return ink::kQuiet;
    case page::Tone::Broken:
      return ink::kBroken;
    case page::Tone::Formed:
      return ink::kFormed;
    case page::Tone::Caution:
      return ink::kCaution;
    case page::Tone::Good:
      return ink::kGood;
  }
  return ink::kText;
}

Colour colour_of(page::Ink role) {
  switch (role) {
    case page::Ink::Axis:
      return ink::kEdge;
    case page::Ink::Grid:
      return ink::kFaint;
    case page::Ink::Text:
    case page::Ink::Plain:
      return ink::kText;
    case page::Ink::QuietText:
      return ink::kQuiet;
    case page::Ink::Broken:
      return ink::kBroken;
    case page::Ink::Formed:
      return ink::kFormed;
    case page::Ink::Typed:
      return ink::kTyped;
    case page::Ink::Accent:
      return ink::kSelectedEdge;
    case page::Ink::Band:
      return ink::kBand;
  }
  return ink::kText;
}

float text_width(const Fonts& fonts, Type type, std::string_view text) {
  return pixel_width(fonts.font(type), text) / fonts.scale();
}

float line_height(Type type) {
  return std::ceil(Fonts::size(type) * kLine);
}

Wrapped wrap(const Fonts& fonts, Type type, std::string_view text, float width) {
  Wrapped wrapped;
  const ImFont* font = fonts.font(type);
  const float limit = std::max(width, 1.0f) * fonts.scale() + 0.5f;
  const auto finish = [&](std::string_view line) {
    while (!line.empty() && is_break(line.back())) line.remove_suffix(1);
    wrapped.width = std::max(wrapped.width, pixel_width(font, line) / fonts.scale());
    wrapped.lines.push_back(line);
  };
  while (true) {
    const std::size_t end = text.find('\n');
    std::string_view rest = text.substr(0, end);
    do {
      if (pixel_width(font, rest) <= limit) {
        finish(rest);
        rest = {};
        break;
      }
      // The longest run of whole words that fits; a single word that does not fit is broken where it must be.
      std::size_t fits = 0, hard = 0;
      float sum = 0;
      for (std::size_t at = 0; at < rest.size();) {
        unsigned code = 0;
        const int length = ImTextCharFromUtf8(&code, rest.data() + at, rest.data() + rest.size());
        sum += font->GetCharAdvance(static_cast<ImWchar>(code));
        if (sum > limit) break;
        if (is_break(rest[at])) fits = at + 1;
        at += static_cast<std::size_t>(std::max(length, 1));
        hard = at;
        if (at < rest.size() && is_break(rest[at])) fits = at + 1;
      }
      std::size_t cut = fits > 0 ? fits : std::max<std::size_t>(hard, 1);
      while (cut < rest.size() && (static_cast<unsigned char>(rest[cut]) & 0xC0) == 0x80) ++cut;
      finish(rest.substr(0, cut));
      rest.remove_prefix(std::min(cut, rest.size()));
      while (!rest.empty() && is_break(rest.front())) rest.remove_prefix(1);
    } while (!rest.empty());
    if (end == std::string_view::npos) break;
    text.remove_prefix(end + 1);
  }
  return wrapped;
}

std::size_t offset_at(const Fonts& fonts, Type type, std::string_view text, float x) {
  const ImFont* font = fonts.font(type);
  float sum = 0;
  for (std::size_t at = 0; at < text.size();) {
    unsigned code = 0;
    const int length = ImTextCharFromUtf8(&code, text.data() + at, text.data() + text.size());
    const float advance = font->GetCharAdvance(static_cast<ImWchar>(code));
    if (x * fonts.scale() < sum + advance / 2) return at;
    sum += advance;
    at += static_cast<std::size_t>(std::max(length, 1));
  }
  return text.size();
}

float equation_width(const Fonts& fonts, Type type, std::string_view text) {
  float width = 0;
  for (const Run& run : equation_runs(text))
    width += text_width(fonts, run.phase ? Type::Detail : type, run.text);
  return width;
}

Canvas::Canvas(const Fonts& fonts) : fonts_(fonts), list_(ImGui::GetBackgroundDrawList()) {}

void Canvas::fill(Rect area, Colour colour, float corner) {
  const float s = fonts_.scale();
  list_->AddRectFilled({std::round(area.x * s), std::round(area.y * s)},
                       {std::round(area.right() * s), std::round(area.bottom() * s)}, colour, corner * s);
}

void Canvas::frame(Rect area, Colour colour, float width, float corner) {
  const float s = fonts_.scale();
  const float pen = std::max(1.0f, std::round(width * s));
  // Half a pixel inwards: an outline of whole pixels, drawn sharp.
  list_->AddRect(
      {std::round(area.x * s) + 0.5f * (pen - 1), std::round(area.y * s) + 0.5f * (pen - 1)},
      {std::round(area.right() * s) - 0.5f * (pen - 1), std::round(area.bottom() * s) - 0.5f * (pen - 1)},
      colour, corner * s, 0, pen);
}

void Canvas::line(Point from, Point to, Colour colour, float width) {
  const float s = fonts_.scale();
  const float pen = std::max(1.0f, std::round(width * s));
  if (from.y == to.y || from.x == to.x) {
    // Rules of the sheet are filled boxes: always whole pixels.
    const float x = std::round(std::min(from.x, to.x) * s), y = std::round(std::min(from.y, to.y) * s);
    const float right = from.y == to.y ? std::round(std::max(from.x, to.x) * s) : x + pen;
    const float bottom = from.y == to.y ? y + pen : std::round(std::max(from.y, to.y) * s);
    list_->AddRectFilled({x, y}, {right, bottom}, colour);
    return;
  }
  list_->AddLine(pixels(from, s), pixels(to, s), colour, pen);
}

void Canvas::polyline(const std::vector<Point>& points, Colour colour, float width, bool dashed) {
  const float s = fonts_.scale();
  if (!dashed) {
    std::vector<ImVec2> path;
    for (const Point& p : points) path.push_back(pixels(p, s));
    list_->AddPolyline(path.data(), static_cast<int>(path.size()), colour, 0, width * s);
    return;
  }
  constexpr float kDash = 4, kGap = 3;
  float along = 0;
  for (std::size_t i = 1; i < points.size(); ++i) {
    const float dx = points[i].x - points[i - 1].x, dy = points[i].y - points[i - 1].y;
    const float length = std::hypot(dx, dy);
    for (float at = 0; at < length;) {
      const float phase = std::fmod(along, kDash + kGap);
      const bool drawn = phase < kDash;
      const float step = std::max(0.05f, std::min(length - at, drawn ? kDash - phase : kDash + kGap - phase));
      if (drawn) {
        const Point a{points[i - 1].x + dx * at / length, points[i - 1].y + dy * at / length};
        const Point b{points[i - 1].x + dx * (at + step) / length,
                      points[i - 1].y + dy * (at + step) / length};
        list_->AddLine(pixels(a, s), pixels(b, s), colour, width * s);
      }
      at += step;
      along += step;
    }
  }
}

void Canvas::polygon(const std::vector<Point>& corners, Colour colour) {
  std::vector<ImVec2> path;
  for (const Point& p : corners) path.push_back(pixels(p, fonts_.scale()));
  list_->AddConvexPolyFilled(path.data(), static_cast<int>(path.size()), colour);
}

void Canvas::arrow_head(Point from, Point to, Colour colour, float size) {
  const float dx = to.x - from.x, dy = to.y - from.y;
  const float length = std::hypot(dx, dy);
  if (length <= 0) return;
  const float ux = dx / length * size, uy = dy / length * size;
  polygon(
      {to, {to.x - ux - uy * 0.5f, to.y - uy + ux * 0.5f}, {to.x - ux + uy * 0.5f, to.y - uy - ux * 0.5f}},
      colour);
}

void Canvas::text(Point at, Type type, Colour colour, std::string_view text) {
  if (text.empty()) return;
  ImFont* font = fonts_.font(type);
  const float s = fonts_.scale();
  list_->AddText(font, font->FontSize, {std::round(at.x * s), std::round(at.y * s)}, colour, text.data(),
                 text.data() + text.size());
}

void Canvas::text_in(Rect area, Type type, Colour colour, page::Align align, std::string_view text) {
  const float width = align == page::Align::Left ? 0 : text_width(fonts_, type, text);
  const float x = align == page::Align::Left    ? area.x
                  : align == page::Align::Right ? area.right() - width
                                                : area.x + (area.width - width) / 2;
  this->text({x, area.y + (area.height - Fonts::size(type) * kHeightOfEm) / 2}, type, colour, text);
}

void Canvas::lines_in(Rect area, Type type, Colour colour, page::Align align, const Wrapped& wrapped) {
  const float step = line_height(type);
  for (std::size_t i = 0; i < wrapped.lines.size(); ++i) {
    text_in({area.x, area.y + step * static_cast<float>(i), area.width, step}, type, colour, align,
            wrapped.lines[i]);
  }
}

float Canvas::spaced_capitals(Point at, Colour colour, std::string_view text) {
  const float begin = at.x;
  for (std::size_t i = 0; i < text.size();) {
    unsigned code = 0;
    const auto length = static_cast<std::size_t>(
        std::max(1, ImTextCharFromUtf8(&code, text.data() + i, text.data() + text.size())));
    char capital = text[i];
    if (capital >= 'a' && capital <= 'z') capital = static_cast<char>(capital - 'a' + 'A');
    const std::string_view glyph = length == 1 ? std::string_view(&capital, 1) : text.substr(i, length);
    this->text(at, Type::Heading, colour, glyph);
    at.x += text_width(fonts_, Type::Heading, glyph) + kLetterSpace;
    i += length;
  }
  return at.x - begin;
}

void Canvas::equation(Point at, Type type, Colour colour, std::string_view text) {
  for (const Run& run : equation_runs(text)) {
    const Type used = run.phase ? Type::Detail : type;
    const float lower = run.phase ? Fonts::size(type) * 0.42f : 0;
    this->text({at.x, at.y + lower}, used, run.phase ? ink::kQuiet : colour, run.text);
    at.x += text_width(fonts_, used, run.text);
  }
}

void Canvas::clip(Rect area) {
  const float s = fonts_.scale();
  list_->PushClipRect({std::floor(area.x * s), std::floor(area.y * s)},
                      {std::ceil(area.right() * s), std::ceil(area.bottom() * s)}, true);
  clips_.push_back(area);
}

void Canvas::unclip() {
  list_->PopClipRect();
  clips_.pop_back();
}

bool Canvas::visible(Rect area) const {
  if (clips_.empty()) return true;
  const Rect& window = clips_.back();
  return area.bottom() >= window.y && area.y <= window.bottom();
}

}  // namespace heatledger::window
