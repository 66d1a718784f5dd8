#include <cerrno>
#include <cstring>
#include <filesystem>
#include <memory>
#include <string>
#include <system_error>
#include <variant>
#include <vector>

#include "core/page/session.hpp"
#include "core/page/writers.hpp"
#include "desktop/cli/command.hpp"
#include "desktop/cli/files.hpp"
#include "desktop/cli/output.hpp"

namespace heatledger::cli {
namespace {

struct Options {
  std::string sheet, html, csv, markdown, svg, site;
  bool json = false;
};

Status write_drawings(const page::Page& shown, const std::string& folder, std::vector<std::string>& written) {
  std::error_code problem;
  std::filesystem::create_directories(folder, problem);
  if (problem) {
    return Error{"file.cannot_write", "The folder cannot be made: " + problem.message() + ".", folder,
                 "Check the path and its permissions."};
  }
  for (const page::Block& block : shown.blocks) {
    const auto* drawing = std::get_if<page::Drawing>(&block);
    if (drawing == nullptr) continue;
    const std::string path = (std::filesystem::path(folder) / (drawing->id + ".svg")).string();
    const Status status = write_file(path, page::write_svg(*drawing));
    if (!status.ok()) return status.error();
    written.push_back(path);
  }
  return success();
}

int count_errors(const page::Page& shown) {
  int errors = 0;
  for (const page::Block& block : shown.blocks) {
    const auto* note = std::get_if<page::Note>(&block);
    if (note != nullptr && note->kind == page::NoteKind::Error) ++errors;
  }
  return errors;
}

int run(const Options& options) {
  const auto fail = [&](const Error& error) {
    options.json ? complain_json(error) : complain(error);
    return kWrongInput;
  };
  const Result<std::string> text = read_file(options.sheet);
  if (!text.ok()) return fail(text.error());
  page::Session session;
  if (const Status opened = session.open(*text); !opened.ok()) {
    Error error = opened.error();
    error.where = error.where.empty() ? options.sheet : options.sheet + ", " + error.where;
    return fail(error);
  }
  if (!options.site.empty()) {
    const Result<std::string> table = read_file(options.site);
    if (!table.ok()) return fail(table.error());
    if (const Status copied = session.command("import_site_table", {{"text", *table}}); !copied.ok()) {
      Error error = copied.error();
      error.where = options.site + ", " + error.where;
      return fail(error);
    }
  }
  const page::Page& shown = session.page();
  std::vector<std::string> written;
  if (!options.html.empty()) {
    const Status status = write_file(options.html, page::write_html(shown, session.workings()));
    if (!status.ok()) return fail(status.error());
    written.push_back(options.html);
  }
  if (!options.csv.empty()) {
    const Status status = write_file(options.csv, page::write_csv(shown));
    if (!status.ok()) return fail(status.error());
    written.push_back(options.csv);
  }
  if (!options.markdown.empty()) {
    const Status status = write_file(options.markdown, page::write_markdown(shown));
    if (!status.ok()) return fail(status.error());
    written.push_back(options.markdown);
  }
  if (!options.svg.empty()) {
    const Status status = write_drawings(shown, options.svg, written);
    if (!status.ok()) return fail(status.error());
  }
  if (options.json) {
    if (!print(page::write_json(shown) + '\n')) return kWrongInput;
  } else if (written.empty() && options.svg.empty()) {
    if (!print(page::write_text(shown))) return kWrongInput;
  } else {
    for (const std::string& path : written) {
      if (path != "-" && !print("wrote " + path + '\n')) return kWrongInput;
    }
  }
  const int errors = count_errors(shown);
  if (errors == 0) return kDone;
  complain(
      {"work.errors_on_sheet",
       errors == 1 ? "The sheet shows an error." : "The sheet shows " + std::to_string(errors) + " errors.",
       options.sheet, "The text of the sheet names each place."});
  return kWrongInput;
}

}  // namespace

void add_work(CLI::App& app, Chosen& chosen) {
  CLI::App* command = app.add_subcommand(
      "work", "Computes a worksheet: prints it, or writes its report, tables and drawings");
  const auto options = std::make_shared<Options>();
  command
      ->add_option("sheet", options->sheet,
                   "Worksheet file (*.heatledger.json); - reads it from standard input")
      ->required();
  command->add_option("--html", options->html, "Write a report that prints as it stands")->type_name("OUT");
  command->add_option("--csv", options->csv, "Write every table as comma-separated values")->type_name("OUT");
  command->add_option("--markdown", options->markdown, "Write the sheet as Markdown")->type_name("OUT");
  command->add_option("--svg", options->svg, "Write every drawing into this folder")->type_name("DIR");
  command
      ->add_option("--site", options->site,
                   "Copy the rows of this site table that the sheet uses, before computing")
      ->type_name("FILE");
  command->add_flag("--json", options->json, "Print the page as JSON");
  command->callback([options, &chosen] { chosen = [options] { return run(*options); }; });
}

}  // namespace heatledger::cli
