#include "core/estimate/feature_code.hpp"

#include <algorithm>
#include <vector>

namespace heatledger::estimate {
namespace {

constexpr const char* kSymbols[kind_count] = {"H", "C", "N", "O", "F", "Si", "P", "S", "Cl", "Br", "I", "B"};
constexpr const char* kClassNames[feature_class_count] = {
    "K0",  "B",   "Ac", "Ao",  "Ax",  "B1c", "B1o",  "B1x", "B2c",  "B2o", "B2x", "B3c", "B3o", "B3x", "G1c",
    "G1o", "G1x", "P2", "P2h", "P3",  "P3h", "P4h",  "GA",  "P5",   "P5m", "R0",  "R1",  "R1h", "R2c", "R2o",
    "R2x", "RS",  "RF", "RP",  "BAY", "SC",  "OMP0", "OMP", "OMP2", "CT0", "CT",  "HB0", "HB",  "VX",  "Bx"};

constexpr unsigned kCarbonHydrogen =
    1u << static_cast<unsigned>(Kind::C) | 1u << static_cast<unsigned>(Kind::H);
constexpr unsigned kWithNitrogenOxygen =
    kCarbonHydrogen | 1u << static_cast<unsigned>(Kind::N) | 1u << static_cast<unsigned>(Kind::O);

FeatureClass shifted(FeatureClass family, unsigned by) {
  return static_cast<FeatureClass>(static_cast<unsigned>(family) + by);
}

/// Reads the bytes of a code from the front.
class Reader {
 public:
  Reader(const std::uint8_t* at, std::size_t size) : at_(at), end_(at + size) {}
  bool more() const { return at_ != end_; }
  unsigned byte() { return at_ == end_ ? 0u : *at_++; }
  unsigned pair() {
    const unsigned high = byte();
    return high << 8 | byte();
  }
  std::string number() { return std::to_string(byte()); }
  std::string element() {
    const unsigned code = byte();
    return code < kind_count ? kSymbols[code] : "lp";
  }
  std::string order() { return order_text(byte()); }
  static std::string order_text(unsigned order) {
    return order == aromatic_order ? "a" : std::to_string(order);
  }
  std::string short_text() { return short_text(byte()); }
  static std::string short_text(unsigned type) {
    static constexpr const char* kUnsaturation[4] = {"", "d", "t", "a"};
    return std::string(kSymbols[std::min<std::size_t>(type & 15, kind_count - 1)]) +
           kUnsaturation[type >> 4 & 3];
  }
  static std::string sign_text(unsigned type) { return type >> 6 == 1 ? "+" : type >> 6 == 2 ? "-" : ""; }
  std::string full_text() {
    const unsigned type = pair();
    if (type == 0) return "H";
    return short_text(type >> 8) + std::to_string(type >> 4 & 15) + "h" + std::to_string(type & 15) +
           sign_text(type >> 8);
  }
  std::string ring_text() {
    const std::string size = number();
    return size + (byte() != 0 ? "A" : "n");
  }

 private:
  const std::uint8_t* at_;
  const std::uint8_t* end_;
};

std::string joined(std::vector<std::string> parts, const char* between) {
  std::sort(parts.begin(), parts.end());
  std::string text;
  for (const std::string& part : parts) {
    if (!text.empty()) text += between;
    text += part;
  }
  return text;
}

/// element[(neighbours)]: what hangs on one end of a bond.
std::string environment_text(Reader& in) {
  const unsigned root = in.byte(), hydrogens = in.byte(), heavy = in.byte();
  std::vector<std::string> around(hydrogens, "1H");
  for (unsigned i = 0; i < heavy; ++i) {
    const unsigned order = in.byte(), type = in.byte();
    const std::string plain = Reader::short_text(type & 15);
    around.push_back(Reader::order_text(order) + plain + Reader::sign_text(type) +
                     Reader::short_text(type).substr(plain.size()));
  }
  std::string text = Reader::short_text(root & 15) + Reader::sign_text(root);
  if (!around.empty()) text += "(" + joined(around, ",") + ")";
  return text;
}

std::string ring_detail(Reader& in) {
  std::string text = in.ring_text();
  for (const char* part : {"d", "t", "f", "x"}) text += part + in.number();
  return text;
}

std::string hetero_list(Reader& in) {
  std::vector<std::string> elements;
  while (in.more()) elements.push_back(in.element());
  return joined(elements, "");
}

std::string omp_text(Reader& in) {
  const unsigned what = in.byte();
  if (what == 0) {
    const char* place = in.byte() == 1 ? "o:" : "m:";
    const std::string a = in.short_text();
    return place + joined({a, in.short_text()}, ".");
  }
  if (what == 3) {
    const std::string a = in.short_text();
    return "p:" + joined({a, in.short_text()}, ".");
  }
  if (what == 1) {
    std::string text = "h" + in.number();
    text += in.element();
    text += in.number();
    return text + ":" + in.short_text();
  }
  std::string text = "hh" + in.number();
  const std::string a = in.element();
  text += joined({a, in.element()}, "");
  return text + in.number();
}

}  // namespace

std::optional<Kind> kind_of(int atomic_number) {
  switch (atomic_number) {
    case 1:
      return Kind::H;
    case 5:
      return Kind::B;
    case 6:
      return Kind::C;
    case 7:
      return Kind::N;
    case 8:
      return Kind::O;
    case 9:
      return Kind::F;
    case 14:
      return Kind::Si;
    case 15:
      return Kind::P;
    case 16:
      return Kind::S;
    case 17:
      return Kind::Cl;
    case 35:
      return Kind::Br;
    case 53:
      return Kind::I;
    default:
      return std::nullopt;
  }
}

const char* kind_symbol(Kind kind) {
  return kSymbols[static_cast<std::size_t>(kind)];
}
const char* class_name(FeatureClass family) {
  return kClassNames[static_cast<std::size_t>(family)];
}

FeatureClass FeatureCode::family() const {
  switch (family_) {
    case FeatureClass::B: {
      const Kind first = static_cast<Kind>(bytes_[0]), second = static_cast<Kind>(bytes_[1]);
      const auto either = [&](Kind kind) { return first == kind || second == kind; };
      const auto nitrogen_or_oxygen = [](Kind kind) { return kind == Kind::N || kind == Kind::O; };
      const bool rare = either(Kind::Si) || either(Kind::P) || either(Kind::B);
      const bool organic =
          either(Kind::C) || either(Kind::H) || (nitrogen_or_oxygen(first) && nitrogen_or_oxygen(second));
      return rare || !organic ? FeatureClass::Bx : family_;
    }
    case FeatureClass::Ac:
    case FeatureClass::B1c:
    case FeatureClass::B2c:
    case FeatureClass::B3c:
    case FeatureClass::G1c:
    case FeatureClass::R2c: {
      if ((elements_ & ~kCarbonHydrogen) == 0) return family_;
      return shifted(family_, (elements_ & ~kWithNitrogenOxygen) == 0 ? 1 : 2);
    }
    default:
      return family_;
  }
}

std::uint64_t FeatureCode::key() const {
  std::uint64_t state = mix(0x243f6a8885a308d3ULL, static_cast<std::uint64_t>(family_) << 8 | size_);
  std::uint64_t word = 0;
  for (std::size_t i = 0; i < size_; ++i) {
    word = word << 8 | bytes_[i];
    if ((i & 7) == 7) {
      state = mix(state, word);
      word = 0;
    }
  }
  return mix(state, word);
}

void FeatureCode::fold() {
  const std::uint64_t state = key();
  size_ = 0;
  folded_ = true;
  word(state);
}

std::string FeatureCode::text() const {
  if (folded_) return "folded";
  Reader in(bytes_.data(), size_);
  switch (family_) {
    case FeatureClass::K0:
      return "mol";
    case FeatureClass::B: {
      const std::string a = in.element(), b = in.element(), order = in.order();
      return std::min(a, b) + order + std::max(a, b);
    }
    case FeatureClass::Ac:
      return in.full_text();
    case FeatureClass::B1c: {
      const std::string type = in.full_text(), order = in.order();
      return type + "|" + order + in.element();
    }
    case FeatureClass::B2c: {
      const std::string a = in.full_text(), b = in.full_text(), order = in.order();
      return std::min(a, b) + "|" + order + "|" + std::max(a, b);
    }
    case FeatureClass::B3c: {
      const std::string order = in.order(), a = environment_text(in), b = environment_text(in);
      return std::min(a, b) + "~" + order + "~" + std::max(a, b);
    }
    case FeatureClass::G1c: {
      const std::string type = in.full_text();
      std::vector<std::string> around(in.byte(), "1H");
      while (in.more()) {
        const std::string order = in.order();
        around.push_back(order + in.short_text());
      }
      return type + ":" + joined(around, ",");
    }
    case FeatureClass::P2: {
      const std::string a = in.short_text(), b = in.short_text(), middle = in.short_text();
      return std::min(a, b) + "." + middle + "." + std::max(a, b);
    }
    case FeatureClass::P2h:
    case FeatureClass::P4h: {
      const std::string a = in.element();
      return joined({a, in.element()}, ".");
    }
    case FeatureClass::P3: {
      const std::string a = in.short_text(), b = in.short_text(), c = in.short_text(), d = in.short_text();
      return std::min(a, b) + "." + joined({c, d}, ".") + "." + in.order() + "." + std::max(a, b);
    }
    case FeatureClass::P3h: {
      const std::string a = in.element(), b = in.element(), order = in.order();
      return joined({a, b}, ".") + "." + (order == "3" ? "t" : order);
    }
    case FeatureClass::GA:
      return "gauche";
    case FeatureClass::P5: {
      const std::string a = in.number();
      return a + in.number();
    }
    case FeatureClass::P5m: {
      std::string text = in.number();
      text += in.number();
      return text + in.element();
    }
    case FeatureClass::R0:
      return in.ring_text();
    case FeatureClass::RS:
      return in.ring_text() + "sub";
    case FeatureClass::R1:
      return ring_detail(in);
    case FeatureClass::R1h: {
      const std::string ring = in.ring_text();
      return ring + ":" + hetero_list(in);
    }
    case FeatureClass::R2c: {
      const std::string ring = ring_detail(in);
      return ring + ":" + hetero_list(in);
    }
    case FeatureClass::RF: {
      const unsigned shared = in.byte();
      const std::string a = in.ring_text();
      const std::string how = shared == 0   ? "spiro"
                              : shared == 1 ? "fused"
                                            : "bridge" + std::to_string(shared);
      return how + ":" + joined({a, in.ring_text()}, ",");
    }
    case FeatureClass::RP: {
      std::string text = in.ring_text() + ":";
      while (in.more()) text += in.byte() != 0 ? "F" : "-";
      return text;
    }
    case FeatureClass::BAY: {
      const char* how = in.byte() != 0 ? "biaryl:" : "bay:";
      const std::string a = in.element();
      return how + joined({a, in.element()}, ".");
    }
    case FeatureClass::SC:
      return "ring system";
    case FeatureClass::OMP0: {
      const unsigned place = in.byte();
      return place == 1 ? "o" : place == 2 ? "m" : "p";
    }
    case FeatureClass::OMP:
      return omp_text(in);
    case FeatureClass::OMP2: {
      const std::string a = in.full_text();
      return "o:" + joined({a, in.full_text()}, ".");
    }
    case FeatureClass::CT0:
      return "cis";
    case FeatureClass::CT: {
      if (in.byte() == 0) {
        const std::string a = in.element();
        return "cis:" + joined({a, in.element()}, ".");
      }
      const std::string a = in.number();
      return "cisb:" + a + in.number();
    }
    case FeatureClass::HB0: {
      const std::string a = in.element();
      return a + in.number();
    }
    case FeatureClass::HB: {
      const std::string a = in.short_text(), b = in.short_text();
      return a + ">" + b + in.number();
    }
    case FeatureClass::VX: {
      static constexpr const char* kNames[4] = {"sqrt_nh", "nd>0", "nd>1", "nd2"};
      return kNames[in.byte() & 3];
    }
    default:
      return {};
  }
}

}  // namespace heatledger::estimate
