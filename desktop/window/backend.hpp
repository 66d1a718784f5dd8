// The platform under the window: one .cpp for each, chosen by CMake.
#pragma once

#include <memory>
#include <string>

#include "core/base/result.hpp"
#include "desktop/window/events.hpp"

namespace heatledger::window {

enum class Pointer : std::uint8_t { Arrow, Hand, Text };

struct BackendOptions {
  int width = 1280, height = 900;  ///< [pixels]
  float scale = 0;                 ///< pixels per point; 0: as the display says
  bool visible = true;
};

class Backend {
 public:
  virtual ~Backend() = default;

  /// Pixels per point; changes when the window moves to another display.
  virtual float scale() const = 0;
  virtual Point size() const = 0;  ///< of the drawing area [points]

  /// Sleeps until something happens, at most `seconds` (negative: as long as it takes), and tells the
  /// listener all of it.
  virtual void wait(Listener& listener, double seconds) = 0;
  /// Starts a frame; false while there is nothing to draw on (window minimised).
  virtual bool begin_frame() = 0;
  virtual void end_frame() = 0;
  /// The fonts were made anew: their texture is uploaded before the next frame.
  virtual void fonts_changed() = 0;

  virtual void set_title(const std::string& title) = 0;
  virtual void set_pointer(Pointer pointer) = 0;
  virtual std::string clipboard() = 0;
  virtual void set_clipboard(const std::string& text) = 0;
  /// The frame drawn last as PNG bytes. @errors window.no_picture
  virtual Result<std::string> picture() = 0;
};

/// @errors window.no_display: no display, or no OpenGL 3.0 on it
Result<std::unique_ptr<Backend>> make_backend(const BackendOptions& options);

}  // namespace heatledger::window
