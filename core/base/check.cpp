#include "core/base/check.hpp"

#include <cstdio>
#include <cstdlib>

namespace heatledger {

void check_failed(const char* file, int line, const char* condition, const char* expected) {
  std::fprintf(stderr, "heatledger: internal error at %s:%d: expected %s (%s)\n", file, line, expected,
               condition);
  std::abort();
}

}  // namespace heatledger
