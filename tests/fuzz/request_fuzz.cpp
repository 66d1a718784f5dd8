// Requests, one a line, to the boundary of the browser face: every answer is one JSON object with "ok", an
// error has the one shape, and the page stays in step with its changes.
#include <algorithm>
#include <cstdint>
#include <string>
#include <string_view>

#include "core/base/check.hpp"
#include "core/file/json.hpp"
#include "core/page/requests.hpp"

using namespace heatledger;

namespace {

void check_answer(std::string_view request) {
  const Result<file::Json> answer = file::read_json(page::handle_request(request));
  CHECK(answer.ok() && answer->is_object(), "an answer is a JSON object");
  const file::Json* ok = answer->find("ok");
  CHECK(ok != nullptr && ok->is_boolean(), "an answer says whether it is one");
  if (ok->is_true()) {
    CHECK(answer->find("value") != nullptr, "an answer has a value");
    return;
  }
  const file::Json* error = answer->find("error");
  CHECK(error != nullptr, "a refusal has an error");
  for (const char* key : {"code", "message", "where", "hint"}) {
    CHECK(error->find(key) != nullptr && error->find(key)->is_string(), "an error has its four texts");
  }
}

}  // namespace

extern "C" int LLVMFuzzerTestOneInput(const std::uint8_t* data, std::size_t size) {
  std::string_view text(reinterpret_cast<const char*>(data), size);
  const std::string opened = page::handle_request(R"({"do":"new"})");
  const std::size_t digits = opened.find_first_of("0123456789");
  CHECK(digits != std::string::npos, "a new sheet has a number");
  const std::string number = opened.substr(digits, opened.find_first_not_of("0123456789", digits) - digits);
  while (!text.empty()) {
    const std::size_t end = std::min(text.find('\n'), text.size());
    std::string request(text.substr(0, end));
    text.remove_prefix(std::min(end + 1, text.size()));
    // "@" stands for the number of the sheet, so that a corpus file works whatever ran before it.
    const std::size_t mark = request.find('@');
    if (mark != std::string::npos) request.replace(mark, 1, number);
    check_answer(request);
  }
  check_answer("{\"do\":\"page\",\"sheet\":" + number + "}");
  check_answer("{\"do\":\"close\",\"sheet\":" + number + "}");
  return 0;
}
