// GLFW and OpenGL 3. Keys and characters come through callbacks of our own and go straight to the listener in
// order: the state that Dear ImGui polls once a frame would lose presses shorter than a frame.
#include <GLFW/glfw3.h>
#include <imgui/backends/imgui_impl_opengl3.h>
#include <imgui/imgui.h>
#include <stb/stb_image_write.h>

#include <algorithm>
#include <array>
#include <cmath>
#include <vector>

#include "desktop/window/backend.hpp"

namespace heatledger::window {
namespace {

std::string last_glfw_error() {
  const char* text = nullptr;
  glfwGetError(&text);
  return text != nullptr ? text : "no reason given";
}

Key key_of(int glfw_key) {
  switch (glfw_key) {
    case GLFW_KEY_LEFT:
      return Key::Left;
    case GLFW_KEY_RIGHT:
      return Key::Right;
    case GLFW_KEY_UP:
      return Key::Up;
    case GLFW_KEY_DOWN:
      return Key::Down;
    case GLFW_KEY_HOME:
      return Key::Home;
    case GLFW_KEY_END:
      return Key::End;
    case GLFW_KEY_PAGE_UP:
      return Key::PageUp;
    case GLFW_KEY_PAGE_DOWN:
      return Key::PageDown;
    case GLFW_KEY_TAB:
      return Key::Tab;
    case GLFW_KEY_ENTER:
    case GLFW_KEY_KP_ENTER:
      return Key::Enter;
    case GLFW_KEY_ESCAPE:
      return Key::Escape;
    case GLFW_KEY_BACKSPACE:
      return Key::Backspace;
    case GLFW_KEY_DELETE:
      return Key::Delete;
    case GLFW_KEY_F1:
      return Key::F1;
    case GLFW_KEY_F2:
      return Key::F2;
    default:
      return Key::Other;
  }
}

/// The letter that stands on the key in the user's own layout, so that Ctrl+Z is where it is printed.
char letter_of(int glfw_key, int scancode) {
  if (glfw_key == GLFW_KEY_KP_ADD) return '+';
  if (glfw_key == GLFW_KEY_KP_SUBTRACT) return '-';
  const char* name = glfwGetKeyName(glfw_key, scancode);
  if (name != nullptr && name[0] != '\0' && name[1] == '\0') {
    const char c = name[0];
    if (c >= 'A' && c <= 'Z') return static_cast<char>(c - 'A' + 'a');
    if (c == '=') return '+';  // the unshifted key that carries +
    return c;
  }
  if (glfw_key >= GLFW_KEY_A && glfw_key <= GLFW_KEY_Z) return static_cast<char>('a' + glfw_key - GLFW_KEY_A);
  return 0;
}

class GlfwBackend final : public Backend {
 public:
  ~GlfwBackend() override {
    if (ImGui::GetCurrentContext() != nullptr) {
      if (renderer_) ImGui_ImplOpenGL3_Shutdown();
      ImGui::DestroyContext();
    }
    for (GLFWcursor* cursor : cursors_) {
      if (cursor != nullptr) glfwDestroyCursor(cursor);
    }
    if (window_ != nullptr) glfwDestroyWindow(window_);
    glfwTerminate();
  }

  Status open(const BackendOptions& options) {
    const auto failed = [](const char* what) {
      return Error{"window.no_display", std::string(what) + ": " + last_glfw_error() + ".", "",
                   "The command line (heatledger work SHEET) and the page in a browser need no display."};
    };
    if (glfwInit() != GLFW_TRUE) return failed("The display cannot be opened");
    glfwWindowHint(GLFW_CONTEXT_VERSION_MAJOR, 3);
    glfwWindowHint(GLFW_CONTEXT_VERSION_MINOR, 0);
    glfwWindowHint(GLFW_VISIBLE, options.visible ? GLFW_TRUE : GLFW_FALSE);
    glfwWindowHintString(GLFW_X11_CLASS_NAME, "heatledger");
    glfwWindowHintString(GLFW_X11_INSTANCE_NAME, "heatledger");
    window_ = glfwCreateWindow(options.width, options.height, "Heatledger", nullptr, nullptr);
    if (window_ == nullptr) return failed("No window with OpenGL 3.0 can be opened");
    asked_scale_ = options.scale;
    glfwMakeContextCurrent(window_);
    glfwSwapInterval(1);
    glfwSetWindowUserPointer(window_, this);
    install_callbacks();
    cursors_ = {glfwCreateStandardCursor(GLFW_ARROW_CURSOR), glfwCreateStandardCursor(GLFW_HAND_CURSOR),
                glfwCreateStandardCursor(GLFW_IBEAM_CURSOR)};
    ImGui::CreateContext();
    ImGui::GetIO().IniFilename = nullptr;  // nothing of the window is kept on disk
    renderer_ = ImGui_ImplOpenGL3_Init("#version 130");
    return renderer_ ? success() : Status(failed("OpenGL cannot be started"));
  }

  float scale() const override {
    if (asked_scale_ > 0) return asked_scale_;
    float x = 1, y = 1;
    glfwGetWindowContentScale(window_, &x, &y);
    return std::clamp(x, 0.5f, 4.0f);
  }

  Point size() const override {
    int width = 0, height = 0;
    glfwGetFramebufferSize(window_, &width, &height);
    return {static_cast<float>(width) / scale(), static_cast<float>(height) / scale()};
  }

  void wait(Listener& listener, double seconds) override {
    listener_ = &listener;
    if (seconds < 0) {
      glfwWaitEvents();
    } else if (seconds == 0) {
      glfwPollEvents();
    } else {
      glfwWaitEventsTimeout(seconds);
    }
    listener_ = nullptr;
  }

  bool begin_frame() override {
    int width = 0, height = 0;
    glfwGetFramebufferSize(window_, &width, &height);
    if (width == 0 || height == 0) return false;
    ImGuiIO& io = ImGui::GetIO();
    io.DisplaySize = ImVec2(static_cast<float>(width), static_cast<float>(height));
    io.DeltaTime = 1.0f / 60;
    ImGui_ImplOpenGL3_NewFrame();
    ImGui::NewFrame();
    return true;
  }

  void end_frame() override {
    ImGui::Render();
    int width = 0, height = 0;
    glfwGetFramebufferSize(window_, &width, &height);
    glViewport(0, 0, width, height);
    ImGui_ImplOpenGL3_RenderDrawData(ImGui::GetDrawData());
    read_picture_if_wanted(width, height);
    glfwSwapBuffers(window_);
  }

  void fonts_changed() override {
    ImGui_ImplOpenGL3_DestroyFontsTexture();
    ImGui_ImplOpenGL3_CreateFontsTexture();
  }

  void set_title(const std::string& title) override { glfwSetWindowTitle(window_, title.c_str()); }
  void set_pointer(Pointer pointer) override {
    glfwSetCursor(window_, cursors_[static_cast<std::size_t>(pointer)]);
  }

  std::string clipboard() override {
    const char* text = glfwGetClipboardString(window_);
    return text != nullptr ? text : "";
  }
  void set_clipboard(const std::string& text) override { glfwSetClipboardString(window_, text.c_str()); }

  Result<std::string> picture() override {
    // The buffer that was swapped away may be gone, so the frame is drawn again and read before the swap.
    picture_wanted_ = true;
    end_frame_again();
    if (picture_.empty()) return Error{"window.no_picture", "The window could not be read back.", "", ""};
    return std::move(picture_);
  }

 private:
  void end_frame_again() {
    int width = 0, height = 0;
    glfwGetFramebufferSize(window_, &width, &height);
    glViewport(0, 0, width, height);
    ImGui_ImplOpenGL3_RenderDrawData(ImGui::GetDrawData());
    read_picture_if_wanted(width, height);
  }

  void read_picture_if_wanted(int width, int height) {
    if (!std::exchange(picture_wanted_, false)) return;
    std::vector<unsigned char> pixels(static_cast<std::size_t>(width) * static_cast<std::size_t>(height) * 3);
    glPixelStorei(GL_PACK_ALIGNMENT, 1);
    glReadPixels(0, 0, width, height, GL_RGB, GL_UNSIGNED_BYTE, pixels.data());
    stbi_flip_vertically_on_write(1);
    picture_.clear();
    stbi_write_png_to_func(
        [](void* out, void* data, int length) {
          static_cast<std::string*>(out)->append(static_cast<const char*>(data),
                                                 static_cast<std::size_t>(length));
        },
        &picture_, width, height, 3, pixels.data(), width * 3);
  }

  static GlfwBackend& self(GLFWwindow* window) {
    return *static_cast<GlfwBackend*>(glfwGetWindowUserPointer(window));
  }

  /// Window coordinates to points: on some platforms a window unit is more than one pixel.
  Point point(double x, double y) const {
    int units = 0, pixels = 0, unused = 0;
    glfwGetWindowSize(window_, &units, &unused);
    glfwGetFramebufferSize(window_, &pixels, &unused);
    const double ratio = units > 0 ? static_cast<double>(pixels) / units : 1;
    return {static_cast<float>(x * ratio / scale()), static_cast<float>(y * ratio / scale())};
  }

  void install_callbacks() {
    glfwSetKeyCallback(window_, [](GLFWwindow* window, int key, int scancode, int action, int mods) {
      if (action == GLFW_RELEASE || self(window).listener_ == nullptr) return;
      KeyPress press;
      press.key = key_of(key);
      press.letter = letter_of(key, scancode);
      press.shift = (mods & GLFW_MOD_SHIFT) != 0;
      press.control = (mods & (GLFW_MOD_CONTROL | GLFW_MOD_SUPER)) != 0;
      press.alt = (mods & GLFW_MOD_ALT) != 0;
      self(window).listener_->on_key(press);
    });
    glfwSetCharCallback(window_, [](GLFWwindow* window, unsigned code) {
      if (self(window).listener_ != nullptr)
        self(window).listener_->on_character(static_cast<char32_t>(code));
    });
    glfwSetMouseButtonCallback(window_, [](GLFWwindow* window, int button, int action, int mods) {
      if (button == GLFW_MOUSE_BUTTON_LEFT)
        self(window).mouse_button(action == GLFW_PRESS, (mods & GLFW_MOD_SHIFT) != 0);
    });
    glfwSetCursorPosCallback(window_, [](GLFWwindow* window, double x, double y) {
      GlfwBackend& me = self(window);
      if (me.listener_ != nullptr) me.listener_->on_mouse_move(me.point(x, y), me.held_);
    });
    glfwSetScrollCallback(window_, [](GLFWwindow* window, double, double lines) {
      GlfwBackend& me = self(window);
      if (me.listener_ != nullptr) me.listener_->on_scroll(me.pointer_position(), static_cast<float>(lines));
    });
    glfwSetDropCallback(window_, [](GLFWwindow* window, int count, const char** paths) {
      if (count > 0 && self(window).listener_ != nullptr) self(window).listener_->on_drop(paths[0]);
    });
    glfwSetWindowCloseCallback(window_, [](GLFWwindow* window) {
      glfwSetWindowShouldClose(window, GLFW_FALSE);  // the sheet decides
      if (self(window).listener_ != nullptr) self(window).listener_->on_close_asked();
    });
  }

  Point pointer_position() const {
    double x = 0, y = 0;
    glfwGetCursorPos(window_, &x, &y);
    return point(x, y);
  }

  void mouse_button(bool down, bool shift) {
    held_ = down;
    if (listener_ == nullptr) return;
    const Point at = pointer_position();
    if (!down) return listener_->on_mouse_up(at);
    const double now = glfwGetTime();
    const bool again = now - pressed_at_ < 0.4 && std::hypot(at.x - pressed_.x, at.y - pressed_.y) < 4;
    clicks_ = again ? clicks_ + 1 : 1;
    pressed_at_ = now;
    pressed_ = at;
    listener_->on_mouse_down(at, clicks_, shift);
  }

  GLFWwindow* window_ = nullptr;
  Listener* listener_ = nullptr;
  std::array<GLFWcursor*, 3> cursors_{};
  float asked_scale_ = 0;
  bool renderer_ = false, held_ = false, picture_wanted_ = false;
  int clicks_ = 0;
  double pressed_at_ = -1;
  Point pressed_;
  std::string picture_;
};

}  // namespace

Result<std::unique_ptr<Backend>> make_backend(const BackendOptions& options) {
  auto backend = std::make_unique<GlfwBackend>();
  if (const Status status = backend->open(options); !status.ok()) return status.error();
  return std::unique_ptr<Backend>(std::move(backend));
}

}  // namespace heatledger::window
