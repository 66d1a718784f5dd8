#include <cmath>

#include "core/base/number_text.hpp"
#include "core/page/markup.hpp"
#include "core/page/writers.hpp"

namespace heatledger::page {
namespace {

std::string points(const std::vector<double>& xy) {
  std::string out;
  for (std::size_t i = 0; i + 1 < xy.size(); i += 2) {
    if (i > 0) out += ' ';
    out += coordinate(xy[i]) + "," + coordinate(xy[i + 1]);
  }
  return out;
}

/// Head of an arrow whose last stretch runs from (x0, y0) to (x1, y1).
std::string arrow_head(double x0, double y0, double x1, double y1, const std::string& ink) {
  const double length = std::sqrt((x1 - x0) * (x1 - x0) + (y1 - y0) * (y1 - y0));
  if (length <= 0) return {};
  constexpr double kLong = 7, kHalfWide = 3.5;
  const double ux = (x1 - x0) / length, uy = (y1 - y0) / length;
  const double bx = x1 - kLong * ux, by = y1 - kLong * uy;
  return "<polygon class=\"fill " + ink + "\" points=\"" +
         points(
             {x1, y1, bx - kHalfWide * uy, by + kHalfWide * ux, bx + kHalfWide * uy, by - kHalfWide * ux}) +
         "\"/>";
}

std::string_view anchor_word(Align align) {
  switch (align) {
    case Align::Left:
      return "start";
    case Align::Centre:
      return "middle";
    case Align::Right:
      return "end";
  }
  return "start";
}

}  // namespace

std::string escaped(std::string_view text) {
  std::string out;
  out.reserve(text.size() + 16);
  for (const char c : text) {
    switch (c) {
      case '&':
        out += "&amp;";
        break;
      case '<':
        out += "&lt;";
        break;
      case '>':
        out += "&gt;";
        break;
      case '"':
        out += "&quot;";
        break;
      case '\'':
        out += "&#39;";
        break;
      default:
        if (static_cast<unsigned char>(c) >= 0x20 || c == '\n' || c == '\t') out += c;
    }
  }
  return out;
}

std::string ink_class(Ink ink) {
  switch (ink) {
    case Ink::Axis:
      return "ink-axis";
    case Ink::Grid:
      return "ink-grid";
    case Ink::Text:
      return "ink-text";
    case Ink::QuietText:
      return "ink-quiet";
    case Ink::Broken:
      return "ink-broken";
    case Ink::Formed:
      return "ink-formed";
    case Ink::Typed:
      return "ink-typed";
    case Ink::Plain:
      return "ink-plain";
    case Ink::Accent:
      return "ink-accent";
    case Ink::Band:
      return "ink-band";
  }
  return {};
}

std::string coordinate(double value) {
  // Rounded to hundredths first: a point moves by less than a printer's dot.
  return machine_number(std::round(value * 100) / 100, 8);
}

std::string_view ink_style() {
  return ".line{fill:none;stroke:currentColor}.fill{fill:currentColor;stroke:none}svg text{fill:currentColor}"
         ".ink-axis{color:#6b6b66}.ink-grid{color:#d9d7cd}.ink-text,.ink-plain{color:#23262d}.ink-quiet{"
         "color:#62656c}"
         ".ink-broken{color:#98401a}.ink-formed{color:#145a70}.ink-typed{color:#2438a8}.ink-accent{color:#"
         "8a5a00}"
         ".ink-band{color:#efeee2}";
}

std::string svg_element(const Drawing& drawing) {
  std::string out = "<svg xmlns=\"http://www.w3.org/2000/svg\" viewBox=\"0 0 " + coordinate(drawing.width) +
                    " " + coordinate(drawing.height) + "\" width=\"" + coordinate(drawing.width) +
                    "pt\" height=\"" + coordinate(drawing.height) + "pt\" role=\"img\">";
  out += "<title>" + escaped(drawing.title) + "</title>";
  for (const Fill& fill : drawing.fills) {
    if (fill.ink == Ink::Band) out += "<polygon class=\"fill ink-band\" points=\"" + points(fill.xy) + "\"/>";
  }
  for (const Stroke& stroke : drawing.strokes) {
    const std::string ink = ink_class(stroke.ink);
    out += "<polyline class=\"line " + ink + "\" stroke-width=\"" + coordinate(stroke.width) + "\"";
    if (stroke.dashed) out += " stroke-dasharray=\"3 2\"";
    out += " points=\"" + points(stroke.xy) + "\"/>";
    const std::size_t n = stroke.xy.size();
    if (stroke.arrow && n >= 4) {
      out += arrow_head(stroke.xy[n - 4], stroke.xy[n - 3], stroke.xy[n - 2], stroke.xy[n - 1], ink);
    }
  }
  for (const Fill& fill : drawing.fills) {
    if (fill.ink != Ink::Band) {
      out += "<polygon class=\"fill " + ink_class(fill.ink) + "\" points=\"" + points(fill.xy) + "\"/>";
    }
  }
  for (const Words& words : drawing.words) {
    out += "<text class=\"" + ink_class(words.ink) + "\" x=\"" + coordinate(words.x) + "\" y=\"" +
           coordinate(words.y) + "\" font-size=\"" + coordinate(words.size) + "\" text-anchor=\"" +
           std::string(anchor_word(words.anchor)) + "\">" + escaped(words.text) + "</text>";
  }
  return out + "</svg>";
}

std::string write_svg(const Drawing& drawing) {
  std::string out = svg_element(drawing);
  const std::size_t title = out.find("<title>");
  out.insert(title, "<style>svg{font-family:sans-serif}" + std::string(ink_style()) + "</style>");
  return "<?xml version=\"1.0\" encoding=\"UTF-8\"?>\n" + out + "\n";
}

}  // namespace heatledger::page
