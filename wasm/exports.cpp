// The boundary of the browser face: bytes in, bytes out. Everything else crosses it as the JSON text that
// core/page/requests.hpp describes, so that JavaScript never holds a C++ object.
#include <cstddef>
#include <cstdlib>
#include <string>
#include <string_view>

#include "core/page/requests.hpp"

namespace {

/// The last answer; it stays where it is until the next request.
std::string& answer() {
  static std::string text;
  return text;
}

}  // namespace

extern "C" {

/// Room for a request of `size` bytes; the caller writes UTF-8 there and gives it back with
/// heatledger_release.
char* heatledger_allocate(std::size_t size) {
  return static_cast<char*>(std::malloc(size > 0 ? size : 1));
}

void heatledger_release(char* bytes) {
  std::free(bytes);
}

/// Answers one request. @return first byte of the answer (UTF-8 JSON), valid until the next call
const char* heatledger_handle_request(const char* text, std::size_t size) {
  answer() = heatledger::page::handle_request(std::string_view(text, size));
  return answer().data();
}

/// Length of the last answer in bytes.
std::size_t heatledger_answer_size() {
  return answer().size();
}
}
