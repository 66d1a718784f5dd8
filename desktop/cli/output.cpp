#include "desktop/cli/output.hpp"

#include <cerrno>
#include <cstdio>
#include <cstring>
#include <string>

#include "core/page/answers.hpp"

namespace heatledger::cli {

bool print(std::string_view text) {
  const bool written =
      std::fwrite(text.data(), 1, text.size(), stdout) == text.size() && std::fflush(stdout) == 0;
  if (!written)
    std::fprintf(stderr, "heatledger: standard output cannot be written: %s\n", std::strerror(errno));
  return written;
}

void complain(const Error& error) {
  const std::string text = "heatledger: " + page::error_text(error);
  std::fwrite(text.data(), 1, text.size(), stderr);
}

void complain_json(const Error& error) {
  print(page::error_json(error));
}

}  // namespace heatledger::cli
