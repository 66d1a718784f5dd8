#include <unistd.h>

#include <cerrno>
#include <cstring>
#include <filesystem>
#include <memory>
#include <string>
#include <system_error>
#include <vector>

#include "desktop/cli/command.hpp"
#include "desktop/cli/output.hpp"

namespace heatledger::cli {
namespace {

/// Hands over to heatledger-window beside this program, else on PATH. A program of its own, so that the
/// command line runs where there is no display and no graphics library.
int run(const std::string& sheet) {
  std::vector<char*> arguments;
  std::string program = "heatledger-window";
  std::string file = sheet;
  std::error_code problem;
  const std::filesystem::path here = std::filesystem::read_symlink("/proc/self/exe", problem);
  if (!problem) {
    const std::filesystem::path folder = here.parent_path();
    for (const std::filesystem::path& candidate :
         {folder / program, folder.parent_path() / "window" / program}) {
      if (std::filesystem::exists(candidate, problem)) {
        program = candidate.string();
        break;
      }
    }
  }
  arguments.push_back(program.data());
  if (!file.empty()) arguments.push_back(file.data());
  arguments.push_back(nullptr);
  ::execvp(program.c_str(), arguments.data());
  complain({"window.not_found", std::string("The window could not be started: ") + std::strerror(errno) + ".",
            program, "Install heatledger-window beside heatledger."});
  return kWrongInput;
}

}  // namespace

void add_window(CLI::App& app, Chosen& chosen) {
  CLI::App* command = app.add_subcommand("window", "Opens a worksheet in the window");
  const auto sheet = std::make_shared<std::string>();
  command->add_option("sheet", *sheet, "Worksheet file; an empty sheet if not given");
  command->callback([sheet, &chosen] { chosen = [sheet] { return run(*sheet); }; });
}

}  // namespace heatledger::cli
