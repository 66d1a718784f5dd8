// heatledger-window: the worksheet in a window of its own.
#include <CLI/CLI.hpp>
#include <cstdio>
#include <memory>
#include <string>

#include "desktop/cli/files.hpp"
#include "desktop/window/app.hpp"

namespace {

using heatledger::Result;
using heatledger::Status;

int complain(const heatledger::Error& error) {
  std::fprintf(stderr, "heatledger-window: %s%s%s\n%s\n", error.message.c_str(),
               error.where.empty() ? "" : " ", error.where.c_str(), error.hint.c_str());
  return 1;
}

}  // namespace

int main(int argc, char** argv) {
  CLI::App options("The worksheet in a window of its own.", "heatledger-window");
  options.set_version_flag("--version", "heatledger-window " HEATLEDGER_VERSION);
  std::string sheet, picture, selected, size = "1280x900";
  float scale = 0;
  options.add_option("sheet", sheet, "Worksheet file; an empty sheet if not given");
  options.add_option("--size", size, "Size of the window in pixels")->type_name("WxH")->capture_default_str();
  options.add_option("--scale", scale, "Pixels per point; as the display says if not given")
      ->check(CLI::Range(0.5, 4.0));
  options.add_option("--screenshot", picture, "Draw once, write the picture and end")->type_name("OUT.png");
  options.add_option("--select", selected, "Select a cell by its id, for a picture with its working")
      ->type_name("CELL");
  bool cells = false;
  options.add_flag("--cells", cells,
                   "Print where each cell stands (id, x, y, width, height in pixels) and end");
  try {
    options.parse(argc, argv);
  } catch (const CLI::ParseError& problem) {
    return options.exit(problem) == 0 ? 0 : 2;
  }
  heatledger::window::BackendOptions how;
  if (std::sscanf(size.c_str(), "%dx%d", &how.width, &how.height) != 2 || how.width < 200 ||
      how.height < 200 || how.width > 16000 || how.height > 16000) {
    std::fprintf(stderr, "heatledger-window: --size is WIDTHxHEIGHT in pixels, as 1280x900\n");
    return 2;
  }
  how.scale = scale;
  how.visible = picture.empty() && !cells;
  Result<std::unique_ptr<heatledger::window::Backend>> backend = heatledger::window::make_backend(how);
  if (!backend.ok()) return complain(backend.error());
  heatledger::window::App app(**backend);
  if (!sheet.empty()) app.open(sheet);
  if (!selected.empty()) app.select(selected);
  if (cells) {
    std::fputs(app.cell_places().c_str(), stdout);
    return 0;
  }
  if (picture.empty()) {
    app.run();
    return 0;
  }
  app.draw();
  const Result<std::string> png = (*backend)->picture();
  if (!png.ok()) return complain(png.error());
  const Status written = heatledger::cli::write_file(picture, *png);
  return written.ok() ? 0 : complain(written.error());
}
