// A value with its ±, kept as the list of independent sources that the ± comes from, so that what stands on
// both sides of a difference cancels. Display of figures stands in core/units.
#pragma once

#include <cstdint>
#include <optional>
#include <string>
#include <vector>

namespace heatledger::uncertainty {

/// A finished figure: value and half width of its 95 % interval, both in the unit of the value.
struct Figure {
  double value = 0;
  double u95 = 0;  ///< >= 0
};

/// One independent source of error: a bond value, one table row, one typed figure. Equal keys are the same
/// error.
using SourceKey = std::uint64_t;

/// Kinds of source; the upper bits of a SourceKey, so that keys of different kinds never meet.
enum class SourceKind : std::uint8_t {
  BondValue = 1,
  Compound,
  Phase,
  HeatCapacity,
  Atom,
  Typed,
  Estimate,
  Measurement,
  Other
};
constexpr SourceKey source_key(SourceKind kind, std::uint64_t index) {
  return (static_cast<SourceKey>(kind) << 56) | (index & 0x00ffffffffffffffULL);
}

/// Sensitivity of a quantity to one source times that source's 95 % half width; the sign matters for
/// cancelling.
struct Part {
  SourceKey source = 0;
  double u95 = 0;
};

/// Value with independent parts, sorted by source, each source at most once. Linear in every operation.
class Quantity {
 public:
  Quantity() = default;
  explicit Quantity(double value) : value_(value) {}
  Quantity(double value, double u95, SourceKey source);
  /// Parts in any order; equal sources are added, in the order given.
  Quantity(double value, std::vector<Part> parts);

  double value() const { return value_; }
  /// Half width of the 95 % interval: root of the sum of squares over the independent parts.
  double u95() const;
  const std::vector<Part>& parts() const { return parts_; }
  Figure figure() const { return {value_, u95()}; }

  /// this += factor * other, merging equal sources.
  void add(const Quantity& other, double factor = 1);
  Quantity scaled(double factor) const;

 private:
  double value_ = 0;
  std::vector<Part> parts_;
};

}  // namespace heatledger::uncertainty
