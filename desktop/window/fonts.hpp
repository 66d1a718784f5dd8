// The typefaces of the window, embedded at build time, and the sizes that the sheet uses.
#pragma once

#include <array>
#include <cstdint>

struct ImFont;

namespace heatledger::window {

/// A kind of text on the sheet: typeface and size.
enum class Type : std::uint8_t {
  Body,
  Detail,
  Small,
  Label,
  Strong,
  SmallStrong,
  Heading,
  Equation,
  Value,
  Title
};
constexpr std::size_t kTypes = 10;

class Fonts {
 public:
  /// Makes the fonts for a scale [pixels per point] in the current ImGui context.
  void load(float scale);
  float scale() const { return scale_; }
  ImFont* font(Type type) const { return fonts_[static_cast<std::size_t>(type)]; }
  /// Size of the em [points].
  static float size(Type type);

 private:
  float scale_ = 0;
  std::array<ImFont*, kTypes> fonts_{};
};

}  // namespace heatledger::window
