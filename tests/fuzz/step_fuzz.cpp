// A process step typed line by line, "cell<TAB>text": whatever is typed, no figure is shown that is no
// number, and the sheet is saved and read back the same.
#include <cstdint>
#include <string>
#include <string_view>

#include "core/base/check.hpp"
#include "core/page/session.hpp"

using namespace heatledger;

namespace {

/// A step of one kind over a reaction, that the lines then change.
page::Session started(bool charge) {
  page::Session session;
  const Status equation = session.edit("r1.equation", "CO(g) + H2O(g) -> CO2(g) + H2(g)");
  const Status step = session.command("add_step", {{"kind", charge ? "charge" : "through-flow"}});
  CHECK(equation.ok() && step.ok(), "a sheet with a step is always to be had");
  return session;
}

bool is_no_number(const std::string& text) {
  return text == "nan" || text == "inf" || text == "\u2212inf" || text == "\u2212nan" || text == "-nan";
}

void check_figures(const page::Page& shown) {
  for (const page::Block& block : shown.blocks) {
    const page::Table* table = std::get_if<page::Table>(&block);
    if (table == nullptr) continue;
    for (const page::Row& row : table->rows) {
      for (const page::Cell& cell : row.cells)
        CHECK(cell.editable || !is_no_number(cell.text), "a figure that is shown is a number");
    }
  }
}

}  // namespace

extern "C" int LLVMFuzzerTestOneInput(const std::uint8_t* data, std::size_t size) {
  std::string_view rest(reinterpret_cast<const char*>(data), size);
  page::Session session = started(!rest.empty() && rest.front() == 'c');
  constexpr int kMostLines = 40;
  for (int line = 0; line < kMostLines && !rest.empty(); ++line) {
    const std::size_t end = rest.find('\n');
    const std::string_view text = rest.substr(0, end);
    rest = end == std::string_view::npos ? std::string_view() : rest.substr(end + 1);
    const std::size_t tab = text.find('\t');
    if (tab == std::string_view::npos) continue;
    const Status edited = session.edit("s1." + std::string(text.substr(0, tab)), text.substr(tab + 1));
    if (!edited.ok()) CHECK(!edited.error().code.empty(), "a refusal tells its code");
  }
  check_figures(session.page());
  const std::string saved = session.save();
  page::Session other;
  CHECK(other.open(saved).ok(), "what is saved opens");
  CHECK(other.save() == saved, "and saves the same");
  return 0;
}
