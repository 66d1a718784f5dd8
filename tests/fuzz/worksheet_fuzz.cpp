// A worksheet file that opens, written again, opens again to the same bytes; whatever the bytes, reading ends
// calmly.
#include <cstdint>
#include <string>
#include <string_view>

#include "core/base/check.hpp"
#include "core/file/worksheet_file.hpp"

using namespace heatledger;

extern "C" int LLVMFuzzerTestOneInput(const std::uint8_t* data, std::size_t size) {
  const std::string_view text(reinterpret_cast<const char*>(data), size);
  const Result<file::Opened> opened = file::read_worksheet(text);
  if (!opened) {
    CHECK(!opened.error().code.empty() && !opened.error().message.empty(), "an error names itself");
    return 0;
  }
  const std::string first = file::write_worksheet(opened->sheet, opened->results);
  const Result<file::Opened> again = file::read_worksheet(first);
  CHECK(again.ok(), "what is written can be read");
  CHECK(file::write_worksheet(again->sheet, again->results) == first, "writing is a fixed point");
  return 0;
}
