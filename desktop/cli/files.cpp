#include "desktop/cli/files.hpp"

#include <fcntl.h>
#include <sys/stat.h>
#include <unistd.h>

#include <array>
#include <cerrno>
#include <climits>
#include <cstdio>
#include <cstdlib>
#include <cstring>

namespace heatledger::cli {
namespace {

Error cannot(const char* code, const char* what, const std::string& path) {
  return {code, std::string(what) + ": " + std::strerror(errno) + ".", path,
          "Check the path and its permissions."};
}

bool write_all(int file, std::string_view text) {
  while (!text.empty()) {
    const ssize_t written = ::write(file, text.data(), text.size());
    if (written < 0 && errno == EINTR) continue;
    if (written <= 0) return false;
    text.remove_prefix(static_cast<std::size_t>(written));
  }
  return true;
}

/// The file that a link points to, so that saving through a link keeps the link.
std::string followed(const std::string& path) {
  std::array<char, PATH_MAX> real{};
  return ::realpath(path.c_str(), real.data()) != nullptr ? std::string(real.data()) : path;
}

}  // namespace

Result<std::string> read_file(const std::string& path) {
  const bool standard = path == "-";
  const int file = standard ? STDIN_FILENO : ::open(path.c_str(), O_RDONLY | O_CLOEXEC);
  if (file < 0) return cannot("file.cannot_read", "The file cannot be read", path);
  std::string text;
  std::array<char, 65536> chunk;
  ssize_t got = 0;
  while ((got = ::read(file, chunk.data(), chunk.size())) != 0) {
    if (got < 0 && errno == EINTR) continue;
    if (got < 0) break;
    text.append(chunk.data(), static_cast<std::size_t>(got));
  }
  const int reason = errno;
  if (!standard) ::close(file);
  if (got < 0) {
    errno = reason;
    return cannot("file.cannot_read", "The file cannot be read", path);
  }
  return text;
}

Status write_file(const std::string& path, std::string_view text) {
  if (path == "-") {
    std::fflush(stdout);
    if (write_all(STDOUT_FILENO, text)) return success();
    return cannot("file.cannot_write", "Standard output cannot be written", path);
  }
  const std::string target = followed(path);
  struct stat old {};
  const bool replaces = ::stat(target.c_str(), &old) == 0;
  if (replaces && !S_ISREG(old.st_mode)) {
    // A device or a pipe is written as it stands: there is nothing to replace.
    const int file = ::open(target.c_str(), O_WRONLY | O_CLOEXEC);
    const bool written = file >= 0 && write_all(file, text);
    const int reason = errno;
    if (file >= 0) ::close(file);
    errno = reason;
    if (written) return success();
    return cannot("file.cannot_write", "The file cannot be written", path);
  }
  std::string neighbour = target + ".XXXXXX";
  const int file = ::mkstemp(neighbour.data());
  if (file < 0) return cannot("file.cannot_write", "The file cannot be written", path);
  mode_t permissions = old.st_mode & 07777;
  if (!replaces) {
    const mode_t mask = ::umask(0);
    ::umask(mask);
    permissions = 0666 & ~mask;
  }
  const bool written = write_all(file, text) && ::fchmod(file, permissions) == 0 && ::fsync(file) == 0;
  int reason = errno;
  const bool closed = ::close(file) == 0;
  if (written && closed && ::rename(neighbour.c_str(), target.c_str()) == 0) return success();
  if (written) reason = errno;
  ::unlink(neighbour.c_str());
  errno = reason;
  return cannot("file.cannot_write", "The file cannot be written", path);
}

}  // namespace heatledger::cli
