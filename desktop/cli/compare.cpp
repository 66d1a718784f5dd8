#include <memory>
#include <string>

#include "core/page/comparison.hpp"
#include "core/page/writers.hpp"
#include "desktop/cli/command.hpp"
#include "desktop/cli/files.hpp"
#include "desktop/cli/output.hpp"

namespace heatledger::cli {
namespace {

struct Options {
  std::string first, second, html;
  bool json = false;
};

int run(const Options& options) {
  const auto fail = [&](const Error& error) {
    options.json ? complain_json(error) : complain(error);
    return kWrongInput;
  };
  const Result<std::string> first = read_file(options.first);
  if (!first.ok()) return fail(first.error());
  const Result<std::string> second = read_file(options.second);
  if (!second.ok()) return fail(second.error());
  const Result<page::Comparison> comparison = page::compare_sheets(*first, *second);
  if (!comparison.ok()) return fail(comparison.error());
  const page::Page shown = page::comparison_page(*comparison);
  if (!options.html.empty()) {
    const Status status = write_file(options.html, page::write_html(shown, {}));
    if (!status.ok()) return fail(status.error());
    return options.html == "-" || print("wrote " + options.html + '\n') ? kDone : kWrongInput;
  }
  return print(options.json ? page::write_json(shown) + '\n' : page::write_text(shown)) ? kDone : kWrongInput;
}

}  // namespace

void add_compare(CLI::App& app, Chosen& chosen) {
  CLI::App* command = app.add_subcommand(
      "compare",
      "Compares two worksheets: changed inputs, changed results, and which input moved which result");
  const auto options = std::make_shared<Options>();
  command->add_option("first", options->first, "Worksheet file that the changes start from")->required();
  command->add_option("second", options->second, "Worksheet file with the changes")->required();
  command->add_option("--html", options->html, "Write the comparison as a page that prints")
      ->type_name("OUT");
  command->add_flag("--json", options->json, "Print the comparison as JSON");
  command->callback([options, &chosen] { chosen = [options] { return run(*options); }; });
}

}  // namespace heatledger::cli
