// Prints every example worksheet anew into tests/data/worksheets and saves its figures, after a change of
// data or of the program that is meant to change them. Run from the repository root; read the difference
// before it is committed.
#include <cstdio>
#include <filesystem>
#include <fstream>
#include <iterator>
#include <string>

#include "core/page/session.hpp"
#include "core/page/writers.hpp"

namespace {

void write_file(const std::filesystem::path& path, const std::string& text) {
  std::ofstream(path, std::ios::binary) << text;
  std::printf("%s\n", path.string().c_str());
}

}  // namespace

int main() {
  const std::string ending = ".heatledger.json";
  for (const auto& entry : std::filesystem::directory_iterator("worksheets")) {
    const std::string name = entry.path().filename().string();
    if (name.size() <= ending.size() || name.substr(name.size() - ending.size()) != ending) continue;
    std::ifstream in(entry.path(), std::ios::binary);
    const std::string text((std::istreambuf_iterator<char>(in)), std::istreambuf_iterator<char>());
    heatledger::page::Session session;
    if (const heatledger::Status status = session.open(text); !status.ok()) {
      std::fprintf(stderr, "%s: %s\n", name.c_str(), status.error().message.c_str());
      return 1;
    }
    const std::string saved = session.save();
    // Opened again, so that the print carries no note about figures that changed since the former save.
    heatledger::page::Session reopened;
    if (!reopened.open(saved).ok()) return 1;
    write_file(entry.path(), saved);
    write_file("tests/data/worksheets/" + name.substr(0, name.size() - ending.size()) + ".txt",
               heatledger::page::write_text(reopened.page(), 100));
  }
  return 0;
}
