// Runs a program and keeps what it wrote.
#pragma once

#include <string>
#include <vector>

namespace heatledger::test {

struct Ran {
  int status = -1;  ///< exit status; 128 + n when a signal ended it
  std::string out, err;
};

/// Runs the heatledger that was just built. @param input  standard input
Ran heatledger(const std::vector<std::string>& arguments, const std::string& input = {});
/// Any program, searched on PATH. @param folder  where it runs; empty: here
Ran run(const std::vector<std::string>& command, const std::string& input = {},
        const std::string& folder = {});

/// A folder for one test, removed with everything in it.
class TemporaryFolder {
 public:
  TemporaryFolder();
  ~TemporaryFolder();
  TemporaryFolder(const TemporaryFolder&) = delete;
  TemporaryFolder& operator=(const TemporaryFolder&) = delete;
  std::string operator/(const std::string& name) const { return path_ + "/" + name; }
  const std::string& path() const { return path_; }

 private:
  std::string path_;
};

std::string read_whole(const std::string& path);
void write_whole(const std::string& path, const std::string& text);

}  // namespace heatledger::test
