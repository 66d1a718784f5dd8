// A site table copied into a sheet: whatever its bytes, reading ends calmly, and a sheet that took its rows
// is saved, opens again to the same bytes, and stays the same when the table is copied once more.
#include <cstdint>
#include <string>
#include <string_view>

#include "core/base/check.hpp"
#include "core/file/site_table.hpp"
#include "core/page/session.hpp"

using namespace heatledger;

extern "C" int LLVMFuzzerTestOneInput(const std::uint8_t* data, std::size_t size) {
  const std::string text(reinterpret_cast<const char*>(data), size);
  const Result<file::SiteTable> table = file::read_site_table(text);
  if (!table) {
    CHECK(!table.error().code.empty() && !table.error().message.empty(), "an error names itself");
    return 0;
  }
  page::Session session;
  CHECK(session.edit("r1.equation", "nitrobenzene(l) + 3 H2(g) -> aniline(l) + 2 H2O(l)").ok(),
        "an equation is typed");
  const Status copied = session.command("import_site_table", {{"text", text}});
  if (!copied.ok()) {
    CHECK(!copied.error().code.empty() && !copied.error().message.empty(), "an error names itself");
    return 0;
  }
  const std::string saved = session.save();
  page::Session again;
  CHECK(again.open(saved).ok(), "what is saved can be opened");
  CHECK(again.save() == saved, "saving is a fixed point");
  CHECK(again.command("import_site_table", {{"text", text}}).ok(), "the same table can be copied again");
  CHECK(again.save() == saved, "copying twice is copying once");
  return 0;
}
