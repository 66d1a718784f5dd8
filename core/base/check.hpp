// CHECK: a broken invariant is a bug in the program, so it stops, in release builds too.
#pragma once

namespace heatledger {
[[noreturn]] void check_failed(const char* file, int line, const char* condition, const char* expected);
}

/// CHECK(condition, "what was expected"): stops the program with place and expectation when condition is
/// false.
#define CHECK(condition, expected)                                          \
  do {                                                                      \
    if (!(condition)) [[unlikely]]                                          \
      ::heatledger::check_failed(__FILE__, __LINE__, #condition, expected); \
  } while (false)
