#include "desktop/window/drawing_view.hpp"

#include <algorithm>
#include <cstddef>

namespace heatledger::window {
namespace {

std::vector<Point> placed(const std::vector<double>& xy, Rect area, float scale) {
  std::vector<Point> points;
  for (std::size_t i = 0; i + 1 < xy.size(); i += 2) {
    points.push_back(
        {area.x + static_cast<float>(xy[i]) * scale, area.y + static_cast<float>(xy[i + 1]) * scale});
  }
  return points;
}

}  // namespace

void draw_drawing(Canvas& canvas, const page::Drawing& drawing, Rect area, float scale) {
  for (const page::Fill& fill : drawing.fills)
    canvas.polygon(placed(fill.xy, area, scale), colour_of(fill.ink));
  for (const page::Stroke& stroke : drawing.strokes) {
    std::vector<Point> points = placed(stroke.xy, area, scale);
    if (points.size() < 2) continue;
    const auto width = std::max(1.0f, static_cast<float>(stroke.width) * scale);
    if (stroke.arrow) {
      const Point tip = points.back(), from = points[points.size() - 2];
      canvas.arrow_head(from, tip, colour_of(stroke.ink), 8 * scale);
    }
    canvas.polyline(points, colour_of(stroke.ink), width, stroke.dashed);
  }
  for (const page::Words& words : drawing.words) {
    const Type type = words.size >= 13 ? Type::Detail : words.size >= 12 ? Type::Small : Type::Label;
    const float width = text_width(canvas.fonts(), type, words.text);
    const float x = area.x + static_cast<float>(words.x) * scale;
    const float left = words.anchor == page::Align::Left    ? x
                       : words.anchor == page::Align::Right ? x - width
                                                            : x - width / 2;
    // The anchor stands on the base line; the typeface rises 0.928 em above it.
    canvas.text({left, area.y + static_cast<float>(words.y) * scale - 0.928f * Fonts::size(type)}, type,
                colour_of(words.ink), words.text);
  }
}

}  // namespace heatledger::window
