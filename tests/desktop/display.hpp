// A display of its own for a test (Xvfb), the window on it, and a hand on keyboard and mouse (xdotool,
// xclip).
#pragma once

#include <sys/types.h>

#include <functional>
#include <map>
#include <string>
#include <vector>

namespace heatledger::test {

class Display {
 public:
  Display();
  ~Display();
  Display(const Display&) = delete;
  Display& operator=(const Display&) = delete;
  const std::string& name() const { return name_; }

 private:
  pid_t server_ = -1;
  std::string name_;
};

struct Place {
  int x = 0, y = 0, width = 0, height = 0;
};

class Window {
 public:
  Window(const Display& display, std::vector<std::string> arguments);
  ~Window();
  Window(const Window&) = delete;
  Window& operator=(const Window&) = delete;

  /// Presses keys one after the other, each held for a while as a finger does: "Tab", "ctrl+s", "Return".
  void keys(const std::vector<std::string>& names);
  void type(const std::string& text);
  void click(const Place& place, int times = 1);
  void set_clipboard(const std::string& text);
  std::string clipboard();
  std::string title();
  /// Waits until the condition holds, at most ten seconds. @return whether it did
  static bool wait_for(const std::function<bool()>& condition);
  bool running();
  /// Processor time of the program so far [clock ticks, 10 ms].
  long processor_ticks() const;

 private:
  std::string tool(std::vector<std::string> command, const std::string& input = {});

  std::string display_, id_;
  pid_t program_ = -1;
};

/// Where the cells of a sheet stand in a window of the default size, by id.
std::map<std::string, Place> cell_places(const Display& display, const std::string& sheet);

}  // namespace heatledger::test
