// A value that copies share until one of them changes: what keeps ten thousand states of a sheet small.
#pragma once

#include <memory>
#include <utility>

namespace heatledger::document {

/// Reads as a const T; `change()` gives a copy of one's own to write to. Never empty.
template <typename T>
class Shared {
 public:
  Shared() : value_(std::make_shared<T>()) {}
  explicit Shared(T value) : value_(std::make_shared<T>(std::move(value))) {}

  const T& operator*() const { return *value_; }
  const T* operator->() const { return value_.get(); }

  /// The value for writing; other holders keep the former one.
  T& change() {
    if (value_.use_count() > 1) value_ = std::make_shared<T>(*value_);
    return *value_;
  }

  /// Equal handles hold the same value; different handles may still hold equal ones.
  std::shared_ptr<const T> handle() const { return value_; }
  friend bool same(const Shared& a, const Shared& b) { return a.value_ == b.value_; }

 private:
  std::shared_ptr<T> value_;
};

}  // namespace heatledger::document
