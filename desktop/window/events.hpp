// Events as the window's parts see them: in order, none lost, positions in points (pixels divided by the
// scale).
#pragma once

#include <cstdint>
#include <string>

namespace heatledger::window {

struct Point {
  float x = 0, y = 0;
};

struct Rect {
  float x = 0, y = 0, width = 0, height = 0;

  float right() const { return x + width; }
  float bottom() const { return y + height; }
  bool contains(Point p) const { return p.x >= x && p.x < right() && p.y >= y && p.y < bottom(); }
};

enum class Key : std::uint8_t {
  None,
  Left,
  Right,
  Up,
  Down,
  Home,
  End,
  PageUp,
  PageDown,
  Tab,
  Enter,
  Escape,
  Backspace,
  Delete,
  F1,
  F2,
  Other
};

/// A key going down, or repeating. Text arrives apart, as characters.
struct KeyPress {
  Key key = Key::None;
  char letter =
      0;  ///< 'a' to 'z', '0' to '9', '+', '-' by the keyboard's own layout, for Ctrl combinations; else 0
  bool shift = false, control = false, alt = false;
};

/// What a backend tells.
class Listener {
 public:
  virtual ~Listener() = default;
  virtual void on_key(const KeyPress& press) = 0;
  virtual void on_character(char32_t code) = 0;
  virtual void on_mouse_down(Point at, int clicks, bool shift) = 0;
  virtual void on_mouse_move(Point at, bool held) = 0;
  virtual void on_mouse_up(Point at) = 0;
  virtual void on_scroll(Point at, float lines) = 0;
  virtual void on_drop(const std::string& path) = 0;
  virtual void on_close_asked() = 0;
};

}  // namespace heatledger::window
