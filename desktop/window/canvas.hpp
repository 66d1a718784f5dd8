// Draws in points on the frame under way: text, rules, fills. The only part besides the backend that knows
// Dear ImGui.
#pragma once

#include <string>
#include <string_view>
#include <vector>

#include "core/page/page.hpp"
#include "desktop/window/events.hpp"
#include "desktop/window/fonts.hpp"

struct ImDrawList;

namespace heatledger::window {

using Colour = std::uint32_t;  ///< as ImGui packs it

/// Ink on paper. Broken, formed and typed carry meaning and are always doubled by position, sign or mark.
namespace ink {
constexpr Colour rgb(unsigned r, unsigned g, unsigned b) {
  return 0xFF000000u | b << 16 | g << 8 | r;
}
inline constexpr Colour kDesk = rgb(232, 230, 221), kPaper = rgb(252, 251, 247), kEdge = rgb(190, 184, 160);
inline constexpr Colour kText = rgb(32, 33, 36), kQuiet = rgb(104, 108, 116), kFaint = rgb(214, 212, 202),
                        kHint = rgb(150, 148, 138);
inline constexpr Colour kBroken = rgb(156, 68, 18), kFormed = rgb(20, 92, 114), kTyped = rgb(30, 58, 152);
inline constexpr Colour kCaution = rgb(138, 84, 0), kGood = rgb(36, 104, 46), kError = rgb(158, 26, 26);
inline constexpr Colour kBand = rgb(240, 238, 226), kBox = rgb(255, 255, 255);
inline constexpr Colour kSelected = rgb(253, 243, 205), kSelectedEdge = rgb(214, 160, 26),
                        kHover = rgb(246, 243, 230);
inline constexpr Colour kBar = rgb(44, 46, 53), kBarText = rgb(232, 232, 232), kBarQuiet = rgb(170, 172, 178),
                        kBarHover = rgb(66, 69, 78);
inline constexpr Colour kSelection = rgb(180, 205, 250);
}  // namespace ink

Colour colour_of(page::Tone tone);
Colour colour_of(page::Ink ink);

/// Text broken into lines no wider than asked.
struct Wrapped {
  std::vector<std::string_view> lines;  ///< point into the text that was wrapped
  float width = 0;                      ///< of the widest line [points]
};

float text_width(const Fonts& fonts, Type type, std::string_view text);
/// Distance from line to line [points].
float line_height(Type type);
Wrapped wrap(const Fonts& fonts, Type type, std::string_view text, float width);
/// Byte offset of the character boundary nearest to `x` points from the start of the text.
std::size_t offset_at(const Fonts& fonts, Type type, std::string_view text, float x);

class Canvas {
 public:
  /// Draws on the frame under way.
  explicit Canvas(const Fonts& fonts);

  const Fonts& fonts() const { return fonts_; }

  void fill(Rect area, Colour colour, float corner = 0);
  void frame(Rect area, Colour colour, float width = 1, float corner = 0);
  void line(Point from, Point to, Colour colour, float width = 1);
  void polyline(const std::vector<Point>& points, Colour colour, float width, bool dashed);
  void polygon(const std::vector<Point>& corners, Colour colour);
  void arrow_head(Point from, Point to, Colour colour, float size);
  /// One line of text with its top left corner at `at`.
  void text(Point at, Type type, Colour colour, std::string_view text);
  /// One line inside `area`, which has the height of a line or more, centred upright.
  void text_in(Rect area, Type type, Colour colour, page::Align align, std::string_view text);
  /// Lines from the top of `area` on.
  void lines_in(Rect area, Type type, Colour colour, page::Align align, const Wrapped& wrapped);
  /// Capitals with space between them, for headings. @return width
  float spaced_capitals(Point at, Colour colour, std::string_view text);
  /// An equation: phases such as (l) are set smaller and lower.
  void equation(Point at, Type type, Colour colour, std::string_view text);

  void clip(Rect area);
  void unclip();
  bool visible(Rect area) const;

 private:
  const Fonts& fonts_;
  ImDrawList* list_;
  std::vector<Rect> clips_;
};

/// Width of an equation as Canvas::equation sets it [points].
float equation_width(const Fonts& fonts, Type type, std::string_view text);

}  // namespace heatledger::window
