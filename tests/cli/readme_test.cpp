// Every example of README.md that calls the program is run, and its printed answer compared to the letter.
#include <gtest/gtest.h>

#include <filesystem>
#include <sstream>

#include "run.hpp"

namespace heatledger::test {
namespace {

struct Example {
  std::string command, expected;
  int line = 0;
};

/// Commands in ```console fences: "$ heatledger …" and what stands under it up to the next "$ " or the fence.
std::vector<Example> examples_of(const std::string& text) {
  std::vector<Example> examples;
  std::istringstream in(text);
  bool console = false, ours = false;
  int number = 0;
  for (std::string line; std::getline(in, line);) {
    ++number;
    if (line.compare(0, 3, "```") == 0) {
      console = !console && line.compare(3, 7, "console") == 0;
      ours = false;
    } else if (console && line.compare(0, 2, "$ ") == 0) {
      ours = line.compare(2, 10, "heatledger") == 0;
      if (ours) examples.push_back({line.substr(2), "", number});
    } else if (console && ours) {
      // A command goes on where its line ends with a backslash.
      Example& example = examples.back();
      if (example.expected.empty() && !example.command.empty() && example.command.back() == '\\') {
        example.command += '\n' + line;
      } else {
        example.expected += line + '\n';
      }
    }
  }
  return examples;
}

TEST(Readme, ExamplesPrintWhatTheySay) {
  const std::string source = HEATLEDGER_SOURCE_DIR;
  const std::vector<Example> examples = examples_of(read_whole(source + "/README.md"));
  ASSERT_FALSE(examples.empty()) << "README.md shows no example of the program";
  // A folder of its own, so that examples that write files leave the source tree alone.
  const TemporaryFolder folder;
  std::filesystem::create_directory_symlink(std::filesystem::path(source) / "worksheets",
                                            folder / "worksheets");
  const std::string program = std::filesystem::path(HEATLEDGER_PROGRAM).parent_path().string();
  for (const Example& example : examples) {
    const Ran ran =
        run({"sh", "-c", "PATH='" + program + "':\"$PATH\"; " + example.command}, {}, folder.path());
    EXPECT_EQ(ran.out + ran.err, example.expected)
        << "README.md line " << example.line << ": " << example.command;
  }
}

}  // namespace
}  // namespace heatledger::test
