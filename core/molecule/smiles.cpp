#include "core/molecule/smiles.hpp"

#include <algorithm>
#include <array>
#include <cstdint>
#include <utility>
#include <vector>

#include "core/molecule/elements.hpp"
#include "core/molecule/kekule.hpp"
#include "core/molecule/smiles_errors.hpp"

namespace heatledger::molecule {
namespace {

constexpr std::uint32_t no_atom = 0xFFFFFFFF;
// An atom has at most this sum of bond orders: what one byte counts, far above any real coordination.
constexpr int most_bond_orders = 240;

enum class Written : std::uint8_t { Nothing, Single, Double, Triple, Quadruple, Aromatic };

// Without initialisers: a reader holds a hundred of them and sets each before it reads it.
struct PendingBond {
  Written order;
  BondMark mark;
  std::uint32_t offset;
};

struct OpenRing {
  std::uint32_t atom, offset;
  PendingBond bond;
};

// Closures up to this number are checked on the spot for repeating a bond.
constexpr std::size_t few_closures = 16;
struct LateClosure {
  std::uint32_t bond, offset;
};

struct OpenBranch {
  std::uint32_t atom, offset;
};

// Branches that fit on the stack of the machine; deeper ones (up to a megabyte of brackets) go to the heap.
class BranchStack {
 public:
  bool empty() const { return size_ == 0; }
  void push(OpenBranch branch) {
    if (size_ < shallow_.size()) {
      shallow_[size_] = branch;
    } else {
      deep_.push_back(branch);
    }
    ++size_;
  }
  OpenBranch pop() {
    --size_;
    if (size_ < shallow_.size()) return shallow_[size_];
    const OpenBranch branch = deep_.back();
    deep_.pop_back();
    return branch;
  }

 private:
  std::array<OpenBranch, 32> shallow_;
  std::vector<OpenBranch> deep_;
  std::size_t size_ = 0;
};

class Reader {
 public:
  Reader(std::string_view text, Graph& graph) : text_(text), graph_(graph) {}

  bool read();
  SmilesFault fault() const { return fault_; }
  std::size_t fault_offset() const { return fault_offset_; }

 private:
  // '\0' past the end: no character of SMILES, so every switch falls through to its refusal.
  char peek(std::size_t ahead = 0) const { return at_ + ahead < text_.size() ? text_[at_ + ahead] : '\0'; }
  bool fail(SmilesFault fault, std::size_t offset) {
    fault_ = fault;
    fault_offset_ = offset;
    return false;
  }
  bool add_atom(Atom atom, std::size_t offset);
  bool add_organic(std::uint8_t element, bool aromatic, std::size_t length);
  bool add_bond(std::uint32_t a, std::uint32_t b, const PendingBond& bond, std::size_t offset);
  bool set_bond(Written order, BondMark mark);
  bool read_bracket();
  bool read_bracket_symbol(Atom& atom);
  bool read_chirality(Atom& atom);
  bool read_charge(Atom& atom);
  bool read_ring();
  bool close_ring(std::size_t number, std::size_t offset);
  bool check_late_closures();
  bool open_branch();
  bool close_branch();
  bool finish();
  std::size_t atom_offset(std::uint32_t atom) const;

  std::string_view text_;
  Graph& graph_;
  std::size_t at_ = 0;
  std::uint32_t previous_ = no_atom;
  PendingBond pending_{};
  bool any_aromatic_ = false;
  bool after_dot_ = false;
  BranchStack branches_;
  std::array<std::uint64_t, 2> open_rings_{};
  std::array<OpenRing, 100> rings_;  // valid where open_rings_ has its bit
  std::size_t closures_ = 0;
  std::vector<LateClosure> late_closures_;
  SmilesFault fault_ = SmilesFault::Empty;
  std::size_t fault_offset_ = 0;
};

bool Reader::add_bond(std::uint32_t a, std::uint32_t b, const PendingBond& pending, std::size_t offset) {
  Atom& first = graph_.atoms[a];
  Atom& second = graph_.atoms[b];
  Bond bond;
  bond.a = a;
  bond.b = b;
  bond.mark = pending.mark;
  int order = 1;
  switch (pending.order) {
    case Written::Nothing:
      // Two aromatic atoms, or one and a '*': aromatic if a ring holds the bond, which the last step decides.
      bond.aromatic = (first.aromatic && (second.aromatic || second.element == 0)) ||
                      (second.aromatic && first.element == 0);
      break;
    case Written::Aromatic:
      if (!(first.aromatic || first.element == 0) || !(second.aromatic || second.element == 0)) {
        return fail(SmilesFault::AromaticBondMisplaced, pending.offset);
      }
      bond.aromatic = true;
      any_aromatic_ = true;
      break;
    case Written::Single:
      break;
    case Written::Double:
      order = 2;
      break;
    case Written::Triple:
      order = 3;
      break;
    case Written::Quadruple:
      order = 4;
      break;
  }
  if (first.unpaired > most_bond_orders - order || second.unpaired > most_bond_orders - order) {
    return fail(SmilesFault::TooManyBonds, offset);
  }
  first.unpaired = static_cast<std::uint8_t>(first.unpaired + order);
  second.unpaired = static_cast<std::uint8_t>(second.unpaired + order);
  if (bond.aromatic) first.aromatic = second.aromatic = true;
  bond.order = static_cast<Order>(order);
  graph_.bonds.push_back(bond);
  return true;
}

bool Reader::add_atom(Atom atom, std::size_t offset) {
  const auto index = static_cast<std::uint32_t>(graph_.atoms.size());
  graph_.atoms.push_back(atom);
  after_dot_ = false;
  if (previous_ != no_atom && !add_bond(previous_, index, pending_, offset)) return false;
  previous_ = index;
  pending_ = {};
  return true;
}

bool Reader::add_organic(std::uint8_t element, bool aromatic, std::size_t length) {
  Atom atom;
  atom.element = element;
  atom.aromatic = aromatic;
  atom.hydrogens = hydrogens_unfilled;
  any_aromatic_ |= aromatic;
  const std::size_t offset = at_;
  at_ += length;
  return add_atom(atom, offset);
}

bool Reader::set_bond(Written order, BondMark mark) {
  if (previous_ == no_atom) return fail(SmilesFault::BondWithoutAtom, at_);
  if (pending_.order != Written::Nothing) return fail(SmilesFault::TwoBonds, at_);
  pending_ = {order, mark, static_cast<std::uint32_t>(at_)};
  ++at_;
  return true;
}

bool Reader::read_bracket_symbol(Atom& atom) {
  const char c = peek();
  const char d = peek(1);
  if (c == '*') {
    ++at_;
    return true;
  }
  if (c >= 'A' && c <= 'Z') {
    if (d >= 'a' && d <= 'z') {
      if (const std::optional<int> two = atomic_number(text_.substr(at_, 2))) {
        atom.element = static_cast<std::uint8_t>(*two);
        at_ += 2;
        return true;
      }
    }
    if (const std::optional<int> one = atomic_number(text_.substr(at_, 1))) {
      atom.element = static_cast<std::uint8_t>(*one);
      ++at_;
      return true;
    }
    return fail(SmilesFault::UnknownElement, at_);
  }
  atom.aromatic = true;
  any_aromatic_ = true;
  if (c == 's' && d == 'e') {
    atom.element = 34;
    at_ += 2;
    return true;
  }
  if (c == 'a' && d == 's') {
    atom.element = 33;
    at_ += 2;
    return true;
  }
  switch (c) {
    case 'b':
      atom.element = 5;
      break;
    case 'c':
      atom.element = 6;
      break;
    case 'n':
      atom.element = 7;
      break;
    case 'o':
      atom.element = 8;
      break;
    case 'p':
      atom.element = 15;
      break;
    case 's':
      atom.element = 16;
      break;
    default:
      return fail(at_ < text_.size() ? SmilesFault::UnknownElement : SmilesFault::UnclosedBracket, at_);
  }
  ++at_;
  return true;
}

bool Reader::read_chirality(Atom& atom) {
  if (peek() != '@') return true;
  const std::size_t start = at_++;
  if (peek() == '@') {
    ++at_;
    atom.chirality = 2;
    return true;
  }
  struct Class {
    char first, second;
    int count, base;
  };
  constexpr Class classes[] = {
      {'T', 'H', 2, 3}, {'A', 'L', 2, 5}, {'S', 'P', 3, 7}, {'T', 'B', 20, 10}, {'O', 'H', 30, 30}};
  atom.chirality = 1;
  for (const Class& kind : classes) {
    if (peek() != kind.first || peek(1) != kind.second) continue;
    at_ += 2;
    int number = 0;
    while (peek() >= '0' && peek() <= '9' && number < 100) number = number * 10 + (text_[at_++] - '0');
    if (number < 1 || number > kind.count) return fail(SmilesFault::UnknownChirality, start);
    atom.chirality = static_cast<std::uint8_t>(kind.base + number - 1);
    return true;
  }
  return true;
}

bool Reader::read_charge(Atom& atom) {
  const char sign = peek();
  if (sign != '+' && sign != '-') return true;
  const std::size_t start = at_++;
  int charge = 1;
  if (peek() >= '0' && peek() <= '9') {
    charge = 0;
    while (peek() >= '0' && peek() <= '9' && charge < 100) charge = charge * 10 + (text_[at_++] - '0');
  } else {
    while (peek() == sign && charge < 100) {
      ++at_;
      ++charge;
    }
  }
  if (charge > 15) return fail(SmilesFault::NumberTooLarge, start);
  atom.charge = static_cast<std::int8_t>(sign == '+' ? charge : -charge);
  return true;
}

bool Reader::read_bracket() {
  const std::size_t start = at_++;
  Atom atom;
  int isotope = 0;
  while (peek() >= '0' && peek() <= '9') {
    isotope = isotope * 10 + (text_[at_++] - '0');
    if (isotope > 999) return fail(SmilesFault::NumberTooLarge, start + 1);
  }
  atom.isotope = static_cast<std::uint16_t>(isotope);
  if (!read_bracket_symbol(atom) || !read_chirality(atom)) return false;
  if (peek() == 'H') {
    const std::size_t count = at_++;
    atom.hydrogens = 1;
    if (peek() >= '0' && peek() <= '9') atom.hydrogens = static_cast<std::uint8_t>(text_[at_++] - '0');
    // Only [HH] itself, as many tables write the hydrogen molecule.
    const bool lone = previous_ == no_atom && peek() == ']' && text_[at_ - 1] == 'H';
    if (atom.element == 1 && !lone) return fail(SmilesFault::HydrogenOnHydrogen, count);
  }
  if (!read_charge(atom)) return false;
  if (peek() == ':') {
    const std::size_t colon = at_++;
    if (peek() < '0' || peek() > '9') return fail(SmilesFault::InsideBracket, at_);
    int number = 0;
    while (peek() >= '0' && peek() <= '9') {
      number = number * 10 + (text_[at_++] - '0');
      if (number > 9999) return fail(SmilesFault::NumberTooLarge, colon);
    }
    atom.atom_class = static_cast<std::uint16_t>(number);
  }
  if (peek() != ']') {
    if (at_ >= text_.size()) return fail(SmilesFault::UnclosedBracket, start);
    return fail(SmilesFault::InsideBracket, at_);
  }
  ++at_;
  if (atom.element != 1 || atom.hydrogens == 0) return add_atom(atom, start);
  // [HH], a hydrogen molecule: two atoms, so that its bond is one like any other.
  atom.hydrogens = 0;
  if (!add_atom(atom, start)) return false;
  Atom second;
  second.element = 1;
  return add_atom(second, start);
}

bool Reader::close_ring(std::size_t number, std::size_t offset) {
  if (previous_ == no_atom) return fail(SmilesFault::RingWithoutAtom, offset);
  const std::uint64_t bit = std::uint64_t{1} << (number & 63);
  std::uint64_t& open = open_rings_[number >> 6];
  OpenRing& ring = rings_[number];
  if ((open & bit) == 0) {
    open |= bit;
    ring.atom = previous_;
    ring.offset = static_cast<std::uint32_t>(offset);
    ring.bond = pending_;
    pending_ = {};
    return true;
  }
  open &= ~bit;
  if (ring.atom == previous_) return fail(SmilesFault::RingToItself, offset);
  PendingBond bond = ring.bond;
  if (bond.order == Written::Nothing) {
    bond = pending_;
    // The mark is kept as seen from the first atom of the bond.
    if (bond.mark != BondMark::None) bond.mark = bond.mark == BondMark::Up ? BondMark::Down : BondMark::Up;
  } else if (pending_.order != Written::Nothing && pending_.order != bond.order) {
    return fail(SmilesFault::RingBondsDiffer, offset);
  }
  pending_ = {};
  if (closures_ < few_closures) {
    ++closures_;
    for (const Bond& other : graph_.bonds) {
      if ((other.a == ring.atom && other.b == previous_) || (other.a == previous_ && other.b == ring.atom)) {
        return fail(SmilesFault::RingRepeatsBond, offset);
      }
    }
  } else {
    late_closures_.push_back(
        {static_cast<std::uint32_t>(graph_.bonds.size()), static_cast<std::uint32_t>(offset)});
  }
  return add_bond(ring.atom, previous_, bond, offset);
}

// Looking through all bonds at each closure would take quadratic time where there are thousands; those are
// sorted.
bool Reader::check_late_closures() {
  std::vector<std::pair<std::uint64_t, std::uint32_t>> sorted;
  sorted.reserve(graph_.bonds.size());
  for (std::uint32_t i = 0; i < graph_.bonds.size(); ++i) {
    const Bond& bond = graph_.bonds[i];
    const std::uint64_t low = bond.a < bond.b ? bond.a : bond.b;
    const std::uint64_t high = bond.a < bond.b ? bond.b : bond.a;
    sorted.emplace_back((low << 32) | high, i);
  }
  std::sort(sorted.begin(), sorted.end());
  std::uint32_t first_repeat = no_atom;
  for (std::size_t i = 1; i < sorted.size(); ++i) {
    if (sorted[i].first == sorted[i - 1].first && sorted[i].second < first_repeat)
      first_repeat = sorted[i].second;
  }
  for (const LateClosure& closure : late_closures_) {
    if (closure.bond == first_repeat) return fail(SmilesFault::RingRepeatsBond, closure.offset);
  }
  return true;
}

bool Reader::read_ring() {
  const std::size_t start = at_;
  if (peek() != '%') {
    const auto number = static_cast<std::size_t>(text_[at_++] - '0');
    return close_ring(number, start);
  }
  const char tens = peek(1);
  const char ones = peek(2);
  if (tens < '0' || tens > '9' || ones < '0' || ones > '9') return fail(SmilesFault::RingNumber, start);
  at_ += 3;
  return close_ring(static_cast<std::size_t>((tens - '0') * 10 + (ones - '0')), start);
}

bool Reader::open_branch() {
  if (previous_ == no_atom) return fail(SmilesFault::BranchWithoutAtom, at_);
  if (pending_.order != Written::Nothing) return fail(SmilesFault::BondWithoutAtom, pending_.offset);
  branches_.push({previous_, static_cast<std::uint32_t>(at_)});
  ++at_;
  if (peek() == ')') return fail(SmilesFault::EmptyBranch, at_ - 1);
  if (peek() == '(') return fail(SmilesFault::BranchWithoutAtom, at_);
  if (peek() == '%' || (peek() >= '0' && peek() <= '9')) return fail(SmilesFault::RingWithoutAtom, at_);
  return true;
}

bool Reader::close_branch() {
  if (branches_.empty()) return fail(SmilesFault::UnopenedBranch, at_);
  if (pending_.order != Written::Nothing) return fail(SmilesFault::BondWithoutAtom, pending_.offset);
  if (after_dot_) return fail(SmilesFault::DotWithoutAtom, at_ - 1);
  previous_ = branches_.pop().atom;
  ++at_;
  return true;
}

std::size_t Reader::atom_offset(std::uint32_t atom) const {
  std::uint32_t seen = 0;
  for (std::size_t i = 0; i < text_.size(); ++i) {
    const char c = text_[i];
    const bool starts = c == '[' || c == '*' || (c >= 'A' && c <= 'Z') || (c >= 'a' && c <= 'z');
    if (!starts) continue;
    if (seen++ == atom) return i;
    if (c == '[') {
      i = text_.find(']', i);
    } else if (i + 1 < text_.size() &&
               ((c == 'C' && text_[i + 1] == 'l') || (c == 'B' && text_[i + 1] == 'r'))) {
      ++i;
    }
  }
  return text_.size();
}

bool Reader::finish() {
  const std::size_t end = at_;
  for (; at_ < text_.size(); ++at_) {
    const char c = text_[at_];
    if (c != ' ' && c != '\t' && c != '\r' && c != '\n') return fail(SmilesFault::TextAfterEnd, at_);
  }
  if (pending_.order != Written::Nothing) return fail(SmilesFault::BondWithoutAtom, pending_.offset);
  if (graph_.atoms.empty()) return fail(SmilesFault::Empty, 0);
  if (after_dot_) return fail(SmilesFault::DotWithoutAtom, end - 1);
  if (!branches_.empty()) return fail(SmilesFault::UnclosedBranch, branches_.pop().offset);
  if ((open_rings_[0] | open_rings_[1]) != 0) {
    std::size_t first = text_.size();
    for (std::size_t number = 0; number < rings_.size(); ++number) {
      const bool open = (open_rings_[number >> 6] >> (number & 63)) & 1;
      if (open && rings_[number].offset < first) first = rings_[number].offset;
    }
    return fail(SmilesFault::UnclosedRing, first);
  }
  if (!late_closures_.empty() && !check_late_closures()) return false;
  const std::optional<std::uint32_t> failed = fill_valences(graph_, any_aromatic_);
  if (failed) return fail(SmilesFault::CannotKekulise, atom_offset(*failed));
  return true;
}

bool Reader::read() {
  graph_.clear();
  while (at_ < text_.size()) {
    const char c = text_[at_];
    bool ok = true;
    switch (c) {
      case 'C':
        ok = peek(1) == 'l' ? add_organic(17, false, 2) : add_organic(6, false, 1);
        break;
      case 'B':
        ok = peek(1) == 'r' ? add_organic(35, false, 2) : add_organic(5, false, 1);
        break;
      case 'N':
        ok = add_organic(7, false, 1);
        break;
      case 'O':
        ok = add_organic(8, false, 1);
        break;
      case 'P':
        ok = add_organic(15, false, 1);
        break;
      case 'S':
        ok = add_organic(16, false, 1);
        break;
      case 'F':
        ok = add_organic(9, false, 1);
        break;
      case 'I':
        ok = add_organic(53, false, 1);
        break;
      case 'b':
        ok = add_organic(5, true, 1);
        break;
      case 'c':
        ok = add_organic(6, true, 1);
        break;
      case 'n':
        ok = add_organic(7, true, 1);
        break;
      case 'o':
        ok = add_organic(8, true, 1);
        break;
      case 'p':
        ok = add_organic(15, true, 1);
        break;
      case 's':
        ok = add_organic(16, true, 1);
        break;
      case '*': {
        Atom any;
        const std::size_t offset = at_++;
        ok = add_atom(any, offset);
        break;
      }
      case '[':
        ok = read_bracket();
        break;
      case '(':
        ok = open_branch();
        break;
      case ')':
        ok = close_branch();
        break;
      case '-':
        ok = set_bond(Written::Single, BondMark::None);
        break;
      case '=':
        ok = set_bond(Written::Double, BondMark::None);
        break;
      case '#':
        ok = set_bond(Written::Triple, BondMark::None);
        break;
      case '$':
        ok = set_bond(Written::Quadruple, BondMark::None);
        break;
      case ':':
        ok = set_bond(Written::Aromatic, BondMark::None);
        break;
      case '/':
        ok = set_bond(Written::Single, BondMark::Up);
        break;
      case '\\':
        ok = set_bond(Written::Single, BondMark::Down);
        break;
      case '.':
        if (pending_.order != Written::Nothing) return fail(SmilesFault::BondWithoutAtom, pending_.offset);
        if (previous_ == no_atom) return fail(SmilesFault::DotWithoutAtom, at_);
        previous_ = no_atom;
        after_dot_ = true;
        ++at_;
        break;
      case '0':
      case '1':
      case '2':
      case '3':
      case '4':
      case '5':
      case '6':
      case '7':
      case '8':
      case '9':
      case '%':
        ok = read_ring();
        break;
      case ' ':
      case '\t':
      case '\r':
      case '\n':
        if (graph_.atoms.empty() && branches_.empty()) {
          ++at_;
          break;
        }
        return finish();
      default:
        return fail(SmilesFault::UnexpectedCharacter, at_);
    }
    if (!ok) return false;
  }
  return finish();
}

}  // namespace

Status parse_smiles_into(std::string_view text, Graph& out) {
  Reader reader(text, out);
  if (reader.read()) return success();
  return smiles_error(reader.fault(), reader.fault_offset(), text);
}

Result<Graph> parse_smiles(std::string_view text) {
  Graph graph;
  const Status status = parse_smiles_into(text, graph);
  if (!status) return status.error();
  return graph;
}

}  // namespace heatledger::molecule
