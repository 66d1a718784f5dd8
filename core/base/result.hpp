// Result<T>: a value or an Error. Everything that a user or a file can cause comes back this way; a broken
// invariant is a bug and goes through CHECK (check.hpp) instead.
#pragma once

#include <string>
#include <utility>
#include <variant>

#include "core/base/check.hpp"

namespace heatledger {

/// What went wrong, where, and what to do next: the one error shape of every face.
struct Error {
  std::string
      code;  ///< stable dotted word such as `smiles.unclosed_ring`; the list is core/base/error_codes.md
  std::string message;  ///< one calm sentence
  std::string where;    ///< field path ("reactions[0].equation"), line, or byte offset ("offset 7")
  std::string hint;     ///< what to do next

  friend bool operator==(const Error& a, const Error& b) {
    return a.code == b.code && a.message == b.message && a.where == b.where && a.hint == b.hint;
  }
};

/// A value of type T or an Error.
template <typename T>
class [[nodiscard]] Result {
 public:
  Result(T value) : state_(std::in_place_index<0>, std::move(value)) {}      // NOLINT: a value is a Result
  Result(Error error) : state_(std::in_place_index<1>, std::move(error)) {}  // NOLINT: so is an Error

  bool ok() const { return state_.index() == 0; }
  explicit operator bool() const { return ok(); }

  const T& value() const& {
    CHECK(ok(), "a Result read as a value holds one");
    return *std::get_if<0>(&state_);
  }
  T& value() & {
    CHECK(ok(), "a Result read as a value holds one");
    return *std::get_if<0>(&state_);
  }
  T&& value() && {
    CHECK(ok(), "a Result read as a value holds one");
    return std::move(*std::get_if<0>(&state_));
  }
  const Error& error() const {
    CHECK(!ok(), "a Result read as an error holds one");
    return *std::get_if<1>(&state_);
  }

  const T& operator*() const& { return value(); }
  T& operator*() & { return value(); }
  const T* operator->() const { return &value(); }
  T* operator->() { return &value(); }

 private:
  std::variant<T, Error> state_;
};

/// The Result of something that only succeeds or fails.
using Status = Result<std::monostate>;
inline Status success() {
  return std::monostate{};
}

}  // namespace heatledger
