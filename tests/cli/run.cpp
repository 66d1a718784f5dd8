#include "run.hpp"

#include <fcntl.h>
#include <gtest/gtest.h>
#include <poll.h>
#include <sys/wait.h>
#include <unistd.h>

#include <array>
#include <csignal>
#include <cstdlib>
#include <filesystem>
#include <fstream>
#include <iterator>

namespace heatledger::test {
namespace {

struct Pipe {
  int read = -1, write = -1;
  Pipe() {
    int ends[2];
    if (::pipe2(ends, O_CLOEXEC) != 0) std::abort();
    read = ends[0];
    write = ends[1];
  }
};

/// Feeds and empties the pipes at once: a program that answers while it reads must not stand still.
void exchange(int in, const std::string& input, int out, int err, Ran& ran) {
  std::size_t fed = 0;
  if (input.empty()) {
    ::close(in);
    in = -1;
  } else {
    ::fcntl(in, F_SETFL, O_NONBLOCK);
  }
  std::array<char, 65536> chunk;
  while (out >= 0 || err >= 0) {
    std::array<pollfd, 3> watched{{{out, POLLIN, 0}, {err, POLLIN, 0}, {in, POLLOUT, 0}}};
    if (::poll(watched.data(), watched.size(), -1) < 0) break;
    const auto take = [&](int& file, const pollfd& state, std::string& into) {
      if (file < 0 || (state.revents & (POLLIN | POLLHUP)) == 0) return;
      const ssize_t got = ::read(file, chunk.data(), chunk.size());
      if (got > 0) {
        into.append(chunk.data(), static_cast<std::size_t>(got));
      } else {
        ::close(file);
        file = -1;
      }
    };
    take(out, watched[0], ran.out);
    take(err, watched[1], ran.err);
    if (in >= 0 && (watched[2].revents & (POLLOUT | POLLERR)) != 0) {
      const ssize_t written = ::write(in, input.data() + fed, input.size() - fed);
      if (written > 0) fed += static_cast<std::size_t>(written);
      if (written <= 0 || fed == input.size()) {
        ::close(in);
        in = -1;
      }
    }
  }
  if (in >= 0) ::close(in);
}

}  // namespace

Ran run(const std::vector<std::string>& command, const std::string& input, const std::string& folder) {
  std::signal(SIGPIPE, SIG_IGN);  // a program may end before it has read everything
  Pipe in, out, err;
  const pid_t child = ::fork();
  if (child == 0) {
    std::signal(SIGPIPE, SIG_DFL);
    ::dup2(in.read, STDIN_FILENO);
    ::dup2(out.write, STDOUT_FILENO);
    ::dup2(err.write, STDERR_FILENO);
    if (!folder.empty() && ::chdir(folder.c_str()) != 0) ::_exit(127);
    std::vector<char*> arguments;
    for (const std::string& part : command) arguments.push_back(const_cast<char*>(part.c_str()));
    arguments.push_back(nullptr);
    ::execvp(arguments[0], arguments.data());
    ::_exit(127);
  }
  ::close(in.read);
  ::close(out.write);
  ::close(err.write);
  Ran ran;
  exchange(in.write, input, out.read, err.read, ran);
  int status = 0;
  ::waitpid(child, &status, 0);
  ran.status = WIFEXITED(status) ? WEXITSTATUS(status) : 128 + WTERMSIG(status);
  return ran;
}

Ran heatledger(const std::vector<std::string>& arguments, const std::string& input) {
  std::vector<std::string> command{HEATLEDGER_PROGRAM};
  command.insert(command.end(), arguments.begin(), arguments.end());
  return run(command, input);
}

TemporaryFolder::TemporaryFolder() {
  std::string pattern = (std::filesystem::temp_directory_path() / "heatledger-test-XXXXXX").string();
  if (::mkdtemp(pattern.data()) == nullptr) std::abort();
  path_ = pattern;
}

TemporaryFolder::~TemporaryFolder() {
  std::error_code problem;
  std::filesystem::remove_all(path_, problem);
}

std::string read_whole(const std::string& path) {
  std::ifstream in(path, std::ios::binary);
  EXPECT_TRUE(in.good()) << path << " cannot be read";
  return {std::istreambuf_iterator<char>(in), std::istreambuf_iterator<char>()};
}

void write_whole(const std::string& path, const std::string& text) {
  std::ofstream out(path, std::ios::binary);
  out << text;
}

}  // namespace heatledger::test
