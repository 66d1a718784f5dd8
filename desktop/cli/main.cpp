// heatledger: heats of reaction from the terminal. Each command stands in a file of its own.
#include <csignal>
#include <exception>
#include <iostream>

#include "desktop/cli/command.hpp"

namespace {

constexpr const char* kAbout =
    "Heats of reaction with their ± and their working: bonds broken and formed, formation enthalpies,\n"
    "corrections to the phases written. Figures are drafts: measure before a design or a safety file rests "
    "on them.";

constexpr const char* kFooter =
    "Examples:\n"
    "  heatledger tally \"nitrobenzene(l) + 3 H2 -> aniline(l) + 2 H2O(l)\"\n"
    "  heatledger species \"ethyl acetate\"\n"
    "  heatledger work sheet.heatledger.json --html report.html\n"
    "  heatledger bulk < questions.jsonl > answers.jsonl\n"
    "\n"
    "Exit status: 0 done, 1 the input was wrong (the message names the place), 2 usage.";

int run(int argc, char** argv) {
  using namespace heatledger::cli;
  CLI::App app(kAbout, "heatledger");
  app.footer(kFooter);
  app.set_version_flag("--version", "heatledger " HEATLEDGER_VERSION);
  app.require_subcommand(1);
  Chosen chosen;
  add_tally(app, chosen);
  add_species(app, chosen);
  add_work(app, chosen);
  add_bulk(app, chosen);
  add_compare(app, chosen);
  add_window(app, chosen);
  try {
    app.parse(argc, argv);
  } catch (const CLI::ParseError& problem) {
    // 0 after --help and --version; any other way to end here is a question of usage.
    return app.exit(problem) == 0 ? kDone : kUsage;
  }
  return chosen();
}

}  // namespace

int main(int argc, char** argv) {
  // A reader that closes the pipe ends the program without a word, also when the parent had ignored the
  // signal.
  std::signal(SIGPIPE, SIG_DFL);
  try {
    return run(argc, argv);
  } catch (const std::exception& failure) {
    std::cerr << "heatledger: " << failure.what() << '\n';
    return heatledger::cli::kWrongInput;
  }
}
