#include "display.hpp"

#include <fcntl.h>
#include <gtest/gtest.h>
#include <sys/wait.h>
#include <unistd.h>

#include <chrono>
#include <csignal>
#include <cstdlib>
#include <sstream>
#include <thread>

#include "../cli/run.hpp"

namespace heatledger::test {
namespace {

pid_t start(const std::vector<std::string>& command, const std::map<std::string, std::string>& environment) {
  const pid_t child = ::fork();
  if (child != 0) return child;
  for (const auto& [name, value] : environment) ::setenv(name.c_str(), value.c_str(), 1);
  std::vector<char*> arguments;
  for (const std::string& part : command) arguments.push_back(const_cast<char*>(part.c_str()));
  arguments.push_back(nullptr);
  ::execvp(arguments[0], arguments.data());
  ::_exit(127);
}

void stop(pid_t& process) {
  if (process <= 0) return;
  ::kill(process, SIGTERM);
  int status = 0;
  ::waitpid(process, &status, 0);
  process = -1;
}

std::map<std::string, std::string> environment(const std::string& display) {
  return {{"DISPLAY", display}, {"LIBGL_ALWAYS_SOFTWARE", "1"}, {"XDG_SESSION_TYPE", "x11"}};
}

/// The number of the display that a new server has chosen; empty when it did not start.
std::string start_server(pid_t& server) {
  int ends[2];
  if (::pipe(ends) != 0) std::abort();
  ::fcntl(ends[0], F_SETFD, FD_CLOEXEC);
  server = start(
      {"Xvfb", "-displayfd", std::to_string(ends[1]), "-screen", "0", "1500x1100x24", "-nolisten", "tcp"},
      {});
  ::close(ends[1]);
  // The server writes its number once it listens.
  char c = 0;
  std::string number;
  while (::read(ends[0], &c, 1) == 1 && c != '\n') number += c;
  ::close(ends[0]);
  return number;
}

bool answers(const std::string& display) {
  return run({"env", "DISPLAY=" + display, "xdotool", "getmouselocation"}).status == 0;
}

}  // namespace

Display::Display() {
  // Another server that ends in the same moment may take the socket of the number that was just free with it.
  for (int attempt = 0; attempt < 5; ++attempt) {
    name_ = ":" + start_server(server_);
    if (answers(name_)) return;
    stop(server_);
  }
  ADD_FAILURE() << "no Xvfb that answers could be started";
}

Display::~Display() {
  stop(server_);
}

Window::Window(const Display& display, std::vector<std::string> arguments) : display_(display.name()) {
  arguments.insert(arguments.begin(), HEATLEDGER_WINDOW);
  program_ = start(arguments, environment(display_));
  EXPECT_TRUE(wait_for([this] {
    std::istringstream found(tool({"xdotool", "search", "--onlyvisible", "--class", "heatledger"}));
    return static_cast<bool>(found >> id_);
  })) << "no window came up";
  tool({"xdotool", "windowfocus", "--sync", id_});
}

Window::~Window() {
  stop(program_);
}

std::string Window::tool(std::vector<std::string> command, const std::string& input) {
  command.insert(command.begin(), {"env", "DISPLAY=" + display_});
  return run(command, input).out;
}

void Window::keys(const std::vector<std::string>& names) {
  for (const std::string& name : names) {
    tool({"xdotool", "keydown", name});
    std::this_thread::sleep_for(std::chrono::milliseconds(60));
    tool({"xdotool", "keyup", name});
  }
}

void Window::type(const std::string& text) {
  tool({"xdotool", "type", "--delay", "40", text});
}

void Window::click(const Place& place, int times) {
  tool({"xdotool", "mousemove", "--window", id_, std::to_string(place.x + place.width / 2),
        std::to_string(place.y + place.height / 2)});
  tool({"xdotool", "click", "--repeat", std::to_string(times), "--delay", "120", "1"});
}

void Window::set_clipboard(const std::string& text) {
  // xclip stays behind to hand the text out; its output must not hold the pipe open.
  tool({"sh", "-c", "xclip -selection clipboard -i > /dev/null 2>&1"}, text);
}

std::string Window::clipboard() {
  return tool({"xclip", "-selection", "clipboard", "-o"});
}

std::string Window::title() {
  std::string text = tool({"xdotool", "getwindowname", id_});
  while (!text.empty() && text.back() == '\n') text.pop_back();
  return text;
}

bool Window::wait_for(const std::function<bool()>& condition) {
  const auto until = std::chrono::steady_clock::now() + std::chrono::seconds(10);
  while (!condition()) {
    if (std::chrono::steady_clock::now() > until) return false;
    std::this_thread::sleep_for(std::chrono::milliseconds(100));
  }
  return true;
}

bool Window::running() {
  if (program_ <= 0) return false;
  int status = 0;
  if (::waitpid(program_, &status, WNOHANG) == 0) return true;
  program_ = -1;
  return false;
}

long Window::processor_ticks() const {
  // Fields 14 and 15 of the kernel's record: user and system time. The name in field 2 holds no blank here.
  std::istringstream fields(read_whole("/proc/" + std::to_string(program_) + "/stat"));
  std::string field;
  long ticks = 0;
  for (int i = 1; i <= 15 && fields >> field; ++i) {
    if (i >= 14) ticks += std::atol(field.c_str());
  }
  return ticks;
}

std::map<std::string, Place> cell_places(const Display& display, const std::string& sheet) {
  const Ran ran = run(
      {"env", "DISPLAY=" + display.name(), "LIBGL_ALWAYS_SOFTWARE=1", HEATLEDGER_WINDOW, "--cells", sheet});
  EXPECT_EQ(ran.status, 0) << ran.err;
  std::map<std::string, Place> places;
  std::istringstream lines(ran.out);
  for (std::string line; std::getline(lines, line);) {
    std::istringstream fields(line);
    std::string id;
    Place place;
    std::getline(fields, id, '\t');
    fields >> place.x >> place.y >> place.width >> place.height;
    places[id] = place;
  }
  return places;
}

}  // namespace heatledger::test
