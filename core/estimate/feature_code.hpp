// The description of one counted feature, packed into a few bytes: hashed for counting, spelled out for
// people.
#pragma once

#include <array>
#include <cstdint>
#include <optional>
#include <string>

#include "core/estimate/context_molecule.hpp"

namespace heatledger::estimate {

/// Elements of the model by a small code of their own.
enum class Kind : std::uint8_t { H, C, N, O, F, Si, P, S, Cl, Br, I, B };
constexpr std::size_t kind_count = 12;
const char* kind_symbol(Kind kind);
/// Empty for an element that the model does not cover.
std::optional<Kind> kind_of(int atomic_number);

/// How unsaturated an atom is: written u(i) in the feature text.
enum class Unsaturation : std::uint8_t { None, Double, Triple, Aromatic };

/// Bond orders as the features see them: 1, 2, 3, and 4 for aromatic.
constexpr std::uint8_t aromatic_order = 4;

/// Short type: element and unsaturation. With the sign of a left-over charge it also describes a neighbour.
using ShortType = std::uint8_t;
constexpr ShortType short_type(Kind kind, Unsaturation u) {
  return static_cast<ShortType>(static_cast<unsigned>(kind) | (static_cast<unsigned>(u) << 4));
}
/// sign: 0 none, 1 '+', 2 '-'
constexpr ShortType signed_type(ShortType type, unsigned sign) {
  return static_cast<ShortType>(type | (sign << 6));
}

/// Full type: signed short type, total degree, hydrogens.
using FullType = std::uint16_t;
constexpr FullType full_type(ShortType signed_short, unsigned degree, unsigned hydrogens) {
  return static_cast<FullType>((signed_short << 8) | (degree << 4) | hydrogens);
}

/// Bytes of one description. Longer ones (large rings of hetero atoms) are folded into a hash and lose their
/// text.
class FeatureCode {
 public:
  explicit FeatureCode(FeatureClass family) : family_(family) {}

  FeatureCode& byte(unsigned value) {
    if (size_ == bytes_.size()) fold();
    bytes_[size_++] = static_cast<std::uint8_t>(value);
    return *this;
  }
  FeatureCode& pair(unsigned value) { return byte(value >> 8).byte(value & 0xff); }
  FeatureCode& word(std::uint64_t value) {
    for (int shift = 56; shift >= 0; shift -= 8) byte(static_cast<unsigned>(value >> shift) & 0xff);
    return *this;
  }
  /// Two bytes in ascending order: the feature has no direction.
  FeatureCode& sorted(unsigned a, unsigned b) { return a <= b ? byte(a).byte(b) : byte(b).byte(a); }
  FeatureCode& sorted_pairs(unsigned a, unsigned b) { return a <= b ? pair(a).pair(b) : pair(b).pair(a); }
  /// Records that the description names this element; decides the c, o, x of a split class.
  FeatureCode& names(Kind kind) {
    elements_ = static_cast<std::uint16_t>(elements_ | (1u << static_cast<unsigned>(kind)));
    return *this;
  }
  FeatureCode& names_all(unsigned mask) {
    elements_ = static_cast<std::uint16_t>(elements_ | mask);
    return *this;
  }

  /// The class with c, o or x settled from the elements named.
  FeatureClass family() const;
  /// Hash of class and description.
  std::uint64_t key() const;
  /// The text of the feature as estimator documents write it ("C4h3|1|O2h1"), without its class.
  std::string text() const;

 private:
  void fold();

  std::array<std::uint8_t, 56> bytes_;
  std::uint8_t size_ = 0;
  bool folded_ = false;
  FeatureClass family_;
  std::uint16_t elements_ = 0;
};

/// "B2o", "OMP".
const char* class_name(FeatureClass family);

/// Mixes one word into a hash; the two arguments play different parts, so mix(a, b) is not mix(b, a).
/// Whole-number arithmetic only, so equal in every build.
constexpr std::uint64_t mix(std::uint64_t state, std::uint64_t value) {
  std::uint64_t mixed = (state + 0x243f6a8885a308d3ULL) * 0x9e3779b97f4a7c15ULL;
  mixed ^= mixed >> 31;
  mixed = (mixed + value) * 0xbf58476d1ce4e5b9ULL;
  mixed ^= mixed >> 29;
  mixed *= 0x94d049bb133111ebULL;
  return mixed ^ (mixed >> 32);
}

}  // namespace heatledger::estimate
