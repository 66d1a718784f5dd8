#include "core/uncertainty/quantity.hpp"

#include <algorithm>
#include <cmath>
#include <utility>

#include "core/base/check.hpp"

namespace heatledger::uncertainty {

Quantity::Quantity(double value, double u95, SourceKey source) : value_(value) {
  CHECK(u95 >= 0, "a half width is not negative");
  if (u95 > 0) parts_.push_back({source, u95});
}

Quantity::Quantity(double value, std::vector<Part> parts) : value_(value), parts_(std::move(parts)) {
  const auto before = [](const Part& a, const Part& b) { return a.source < b.source; };
  if (!std::is_sorted(parts_.begin(), parts_.end(), before))
    std::stable_sort(parts_.begin(), parts_.end(), before);
  std::size_t kept = 0;
  for (std::size_t i = 0; i < parts_.size(); ++i) {
    if (kept != 0 && parts_[kept - 1].source == parts_[i].source) {
      parts_[kept - 1].u95 += parts_[i].u95;
    } else {
      parts_[kept++] = parts_[i];
    }
  }
  parts_.resize(kept);
}

double Quantity::u95() const {
  double sum = 0;
  for (const Part& part : parts_) sum += part.u95 * part.u95;
  return std::sqrt(sum);
}

void Quantity::add(const Quantity& other, double factor) {
  value_ += factor * other.value_;
  std::vector<Part> merged;
  merged.reserve(parts_.size() + other.parts_.size());
  auto mine = parts_.begin();
  auto theirs = other.parts_.begin();
  while (mine != parts_.end() || theirs != other.parts_.end()) {
    if (theirs == other.parts_.end() || (mine != parts_.end() && mine->source < theirs->source)) {
      merged.push_back(*mine++);
    } else if (mine == parts_.end() || theirs->source < mine->source) {
      merged.push_back({theirs->source, factor * theirs->u95});
      ++theirs;
    } else {
      merged.push_back({mine->source, mine->u95 + factor * theirs->u95});
      ++mine;
      ++theirs;
    }
  }
  parts_ = std::move(merged);
}

Quantity Quantity::scaled(double factor) const {
  Quantity result;
  result.add(*this, factor);
  return result;
}

}  // namespace heatledger::uncertainty
