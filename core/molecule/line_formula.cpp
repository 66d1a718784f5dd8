#include "core/molecule/line_formula.hpp"

#include <algorithm>
#include <array>
#include <optional>
#include <string>
#include <utility>
#include <vector>

#include "core/base/text_error.hpp"
#include "core/base/utf8.hpp"
#include "core/molecule/elements.hpp"
#include "core/molecule/formula.hpp"
#include "core/molecule/line_fragment.hpp"

namespace heatledger::molecule {
namespace {

constexpr std::size_t kMostAtoms = 10000;
constexpr int kMostLevels = 32;

bool is_digit(char c) {
  return c >= '0' && c <= '9';
}
bool is_lower(char c) {
  return c >= 'a' && c <= 'z';
}
bool is_halogen(int element) {
  return element == 9 || element == 17 || element == 35 || element == 53;
}

Error not_condensed(std::size_t at, std::string message) {
  return error_at("line_formula.not_condensed", std::move(message), at,
                  "Write a name, SMILES, or a condensed formula such as CH3CH2OH.");
}

Error molecular(std::size_t at) {
  return not_condensed(at, "This is a molecular formula: it does not say how its atoms are bound.");
}

Error crowded(std::size_t at) {
  return not_condensed(at, "There are more atoms here than the chain can bind.");
}

Error ambiguous(std::size_t at, std::string message) {
  return error_at("line_formula.ambiguous", std::move(message), at,
                  "Write the name, SMILES, or a formula that shows the chain.");
}

/// A bracket or the whole text while it is read.
struct Level {
  LineFragment chain;
  int front_hydrogens = 0;                                 ///< wait for the next atom
  std::vector<std::pair<LineFragment, int>> front_pieces;  ///< so do these, each so many times
  int mark = 0;                                            ///< order written before the next atom; 0: none
  std::size_t mark_at = 0;
  std::uint32_t last = kNoAtom;  ///< hydrogens belong to it
  bool bare = false;             ///< the last atom has got nothing since it came

  bool started() const { return chain.current != kNoAtom; }
  bool waiting() const { return front_hydrogens > 0 || !front_pieces.empty(); }
};

/// Sulfur with more than six bonds or phosphorus with more than five: each =O in brackets adds two.
bool binds_beyond_expansion(const Graph& graph) {
  std::vector<int> bonds(graph.atoms.size());
  for (std::size_t i = 0; i < bonds.size(); ++i) bonds[i] = graph.atoms[i].hydrogens;
  for (const Bond& bond : graph.bonds) {
    for (const std::uint32_t end : {bond.a, bond.b}) bonds[end] += static_cast<int>(bond.order);
  }
  for (std::size_t i = 0; i < bonds.size(); ++i) {
    const int element = graph.atoms[i].element;
    if ((element == 16 && bonds[i] > 6) || (element == 15 && bonds[i] > 5)) return true;
  }
  return false;
}

class LineReader {
 public:
  explicit LineReader(std::string_view text) : text_(text) {}

  Result<Graph> read() {
    if (text_.empty()) return not_condensed(0, "There is no formula here.");
    read_prefix();
    const std::size_t begin = at_;
    LineFragment whole;
    if (std::optional<Error> failed = read_level(0, whole)) return *failed;
    if (at_ < text_.size()) return not_condensed(at_, "This bracket closes nothing.");
    if (prefix_ != 0 && !prefix_used_)
      return not_condensed(0, "This prefix belongs to no group of the formula.");
    const bool any = std::any_of(whole.graph.atoms.begin(), whole.graph.atoms.end(), [](const Atom& atom) {
      return atom.element == 6 || atom.hydrogens > 0 || is_halogen(atom.element);
    });
    // Without carbon or hydrogen ("OO", "NN") the text says nothing about its bonds.
    if (!any || !whole.close_valences())
      return not_condensed(begin, "The valences of this formula do not close in one single way.");
    if (binds_beyond_expansion(whole.graph)) return crowded(begin);
    if (is_also_molecular(whole.graph))
      return ambiguous(begin, "This is also a molecular formula, and isomers have it.");
    return std::move(whole.graph);
  }

 private:
  /// "CH3NO" reads as nitrosomethane, but whoever writes it in Hill order most likely means formamide. The
  /// sign of it: Hill order, and a bond between two atoms that are neither carbon nor halogen, outside a
  /// nitro group. "C6H5N3" is benzotriazole as often as an azide.
  bool is_also_molecular(const Graph& graph) const {
    auto odd = [&](std::uint32_t i) {
      return graph.atoms[i].element != 6 && !is_halogen(graph.atoms[i].element) && graph.atoms[i].charge == 0;
    };
    const bool suspect = std::any_of(graph.bonds.begin(), graph.bonds.end(), [&](const Bond& bond) {
      const bool nitrogens = graph.atoms[bond.a].element == 7 && graph.atoms[bond.b].element == 7;
      return nitrogens || (odd(bond.a) && odd(bond.b));
    });
    return suspect && hill_formula(composition(graph)) == text_;
  }

  static bool diazo_fits(const LineFragment& chain) {
    const std::uint32_t end = chain.free_end();
    return end != kNoAtom && chain.graph.atoms[end].element == 6 && chain.free[end] == 2;
  }

  char peek(std::size_t ahead = 0) const { return at_ + ahead < text_.size() ? text_[at_ + ahead] : '\0'; }
  bool starts(std::string_view word) const { return text_.compare(at_, word.size(), word) == 0; }

  void read_prefix() {
    struct Prefix {
      std::string_view text;
      char kind;
    };
    constexpr std::array<Prefix, 10> kPrefixes = {{{"n-", 'n'},
                                                   {"i-", 'i'},
                                                   {"iso-", 'i'},
                                                   {"s-", 's'},
                                                   {"sec-", 's'},
                                                   {"t-", 't'},
                                                   {"tert-", 't'},
                                                   {"o-", 'o'},
                                                   {"m-", 'm'},
                                                   {"p-", 'p'}}};
    for (const Prefix& prefix : kPrefixes) {
      if (!starts(prefix.text)) continue;
      prefix_ = prefix.kind;
      at_ += prefix.text.size();
      return;
    }
  }

  /// Digits on the line or lowered; 1 when there are none. Counts beyond reason come back as 100000.
  int read_count() {
    int count = 0, digits = 0;
    for (;; ++digits) {
      const utf8::CodePoint point = utf8::code_point_at(text_, at_);
      int digit = -1;
      if (point.value >= '0' && point.value <= '9') digit = static_cast<int>(point.value - '0');
      if (point.value >= 0x2080 && point.value <= 0x2089) digit = static_cast<int>(point.value - 0x2080);
      if (digit < 0) break;
      count = std::min(count * 10 + digit, 100000);
      at_ += point.bytes;
    }
    return digits == 0 ? 1 : count;
  }

  std::optional<int> read_element() {
    const std::size_t length = is_lower(peek(1)) ? 2 : 1;
    const std::optional<int> element = atomic_number(text_.substr(at_, length));
    if (!element || *element == 0) return std::nullopt;
    at_ += length;
    return element;
  }

  /// Bytes of a bond mark at the present place, its order in `order`; 0 when there is none.
  std::size_t bond_mark(int& order) const {
    struct Mark {
      std::string_view text;
      int order;
    };
    constexpr std::array<Mark, 6> kMarks = {
        {{"-", 1}, {"=", 2}, {"#", 3}, {"\u2261", 3}, {"\u2013", 1}, {"\u2212", 1}}};
    for (const Mark& mark : kMarks) {
      if (!starts(mark.text)) continue;
      order = mark.order;
      return mark.text.size();
    }
    return 0;
  }

  /// Reads up to a closing bracket or the end.
  std::optional<Error> read_level(int depth, LineFragment& out) {
    if (depth > kMostLevels) return not_condensed(at_, "Brackets are nested too deeply.");
    Level level;
    while (at_ < text_.size() && peek() != ')' && peek() != ']') {
      if (level.chain.graph.atoms.size() > kMostAtoms)
        return not_condensed(at_, "This formula stands for too many atoms.");
      int order = 0;
      if (const std::size_t bytes = bond_mark(order); bytes > 0) {
        if (level.mark != 0 || !level.started())
          return not_condensed(at_, "This bond mark has no atom before it.");
        level.mark = order;
        level.mark_at = at_;
        level.bare = false;
        at_ += bytes;
        continue;
      }
      const bool bracket = peek() == '(' || peek() == '[';
      if (std::optional<Error> failed = bracket ? read_bracket(level, depth) : read_symbol(level))
        return failed;
    }
    if (level.mark != 0) return not_condensed(level.mark_at, "Nothing stands after this bond mark.");
    if (std::optional<Error> failed = use_up(level)) return failed;
    out = std::move(level.chain);
    return std::nullopt;
  }

  /// What still waits for an atom at the end: two equal halves, "(C6H5)2", or nothing that makes a molecule.
  std::optional<Error> use_up(Level& level) {
    if (!level.waiting()) return std::nullopt;
    if (level.started() || level.front_hydrogens > 0 || level.front_pieces.size() != 1 ||
        level.front_pieces[0].second != 2)
      return molecular(0);
    const LineFragment half = level.front_pieces[0].first;
    level.front_pieces.clear();
    const std::uint32_t one = level.chain.append(half), two = level.chain.append(half);
    if (!level.chain.bind(one + half.current, two + half.current, 1, true)) return molecular(0);
    level.chain.first = level.chain.current = one + half.current;
    return std::nullopt;
  }

  std::optional<Error> read_bracket(Level& level, int depth) {
    const std::size_t begin = at_;
    const char closer = peek() == '(' ? ')' : ']';
    ++at_;
    const std::size_t inside = at_;
    int written = 0;
    at_ += bond_mark(written);
    LineFragment piece;
    if (std::optional<Error> failed = read_level(depth + 1, piece)) return failed;
    if (peek() != closer) return not_condensed(begin, "This bracket is never closed.");
    const std::string_view content = text_.substr(inside, at_ - inside);
    ++at_;
    const int count = read_count();
    if (piece.empty() || count == 0) return not_condensed(begin, "This group is empty.");
    if (static_cast<std::size_t>(count) * piece.graph.atoms.size() > kMostAtoms) {
      return not_condensed(begin, "This formula stands for too many atoms.");
    }
    if (level.mark != 0)
      return not_condensed(level.mark_at, "A bond mark in front of a bracket has no single meaning.");
    if (content == "O" && count == 1 && level.started()) {
      // "CH3C(O)CH3": on an atom with two valences free an oxygen in brackets is double bonded.
      const int centre = level.chain.graph.atoms[level.chain.current].element;
      if ((centre == 6 && level.chain.free[level.chain.current] >= 2) || centre == 15 || centre == 16)
        written = 2;
    }
    return attach(level, piece, count, true, written, begin);
  }

  std::optional<Error> read_symbol(Level& level) {
    const std::size_t begin = at_;
    const std::optional<int> element = read_element();
    if (!element || chain_valence(*element) == 0) {
      return not_condensed(begin, "Condensed formulas are read for C, H, N, O, S, P, Si and halogens.");
    }
    const int count = read_count();
    if (count == 0) return not_condensed(begin, "A count cannot be zero.");
    if (*element == 1) return add_hydrogens(level, count, begin);
    if (is_halogen(*element)) return add_halogens(level, *element, count, begin);
    if (*element == 6 && count > 1) return add_carbon_group(level, count, begin);
    if (*element == 8 && level.bare && level.mark == 0 && adds_double_oxygen(level, count))
      return add_double_oxygen(level, count, begin);
    if (*element == 16 && count == 2 && level.bare && level.mark == 0 && !level.started())
      return molecular(begin);
    if (*element == 16 && count == 2 && level.bare && level.mark == 0 &&
        level.chain.free[level.chain.current] == 4) {
      for (int i = 0; i < 2; ++i) level.chain.bind(level.chain.current, level.chain.add_atom(16, 2), 2, true);
      level.bare = false;
      return std::nullopt;
    }
    const bool front_nitro =
        *element == 8 && count == 2 && !level.started() && peek() == 'N' && !is_lower(peek(1));
    const bool nitro = *element == 7 && count == 1 && starts("O2") && !is_digit(peek(2)) && peek(2) != 'H';
    if ((front_nitro || nitro) && level.front_hydrogens == 0) {
      at_ += front_nitro ? 1 : 2;
      return attach(level, nitro_piece(), 1, false, 0, begin);
    }
    // Three nitrogens behind a chain are an azide; nothing else is written so.
    if (*element == 7 && count == 3 && level.started() && level.mark == 0)
      return attach(level, azide_piece(), 1, false, 0, begin);
    // Two behind a carbon that has exactly two valences left, or in front of one: diazo.
    const bool diazo_end = level.started() && level.mark == 0 && diazo_fits(level.chain);
    const bool diazo_front = !level.started() && level.front_hydrogens == 0 && (starts("CH") || starts("C("));
    if (*element == 7 && count == 2 && (diazo_end || diazo_front))
      return attach(level, diazo_piece(), 1, false, diazo_end ? 2 : 0, begin);
    if (*element == 8 && count == 1 && level.front_hydrogens == 1 && !level.started() && starts("OC") &&
        peek(2) != 'H' && !is_lower(peek(2))) {
      at_ += 2;
      level.front_hydrogens = 0;
      return attach(level, carboxyl_piece(), 1, false, 0, begin);
    }
    if (count > 1) return molecular(begin);
    LineFragment atom;
    atom.first = atom.current = atom.add_atom(*element, chain_valence(*element));
    std::optional<Error> failed = attach(level, atom, 1, false, 0, begin);
    level.bare = true;
    return failed;
  }

  std::optional<Error> add_hydrogens(Level& level, int count, std::size_t begin) {
    level.bare = false;
    if (!level.started()) {
      if (level.front_hydrogens > 0) return molecular(begin);
      level.front_hydrogens = count;
      return std::nullopt;
    }
    const std::uint32_t to =
        level.last != kNoAtom && level.chain.free[level.last] > 0 ? level.last : level.chain.free_end();
    if (to == kNoAtom || level.mark != 0 || !level.chain.add_hydrogens(to, count)) {
      return not_condensed(begin, "There are more hydrogens here than the atom can bind.");
    }
    level.chain.step_back();
    return std::nullopt;
  }

  std::optional<Error> add_halogens(Level& level, int element, int count, std::size_t begin) {
    if (count > 12) return crowded(begin);
    LineFragment atom;
    atom.first = atom.current = atom.add_atom(element, 1);
    const std::uint32_t keeper = level.last;
    if (std::optional<Error> failed = attach(level, atom, count, false, 0, begin)) return failed;
    // "CHCl2H" is unusual but clear: hydrogens still belong to the carbon.
    if (keeper != kNoAtom) level.last = keeper;
    return std::nullopt;
  }

  /// Oxygen directly after a bare C, S or P: double bonded, unless the valence is used up or a hydrogen
  /// follows.
  bool adds_double_oxygen(const Level& level, int count) const {
    const std::uint32_t centre = level.chain.current;
    if (centre == kNoAtom) return false;
    const int free = level.chain.free[centre];
    const bool hydrogen_follows = peek() == 'H' && !is_lower(peek(1));
    switch (level.chain.graph.atoms[centre].element) {
      case 6:
        return count == 1 ? free >= 2 && !hydrogen_follows : count == 2 && free >= 3;
      case 16:
        return hydrogen_follows ? count == 3 : count <= 2;
      case 15:
        return count == 1 && (free == 0 || starts("Cl") || starts("Br") || starts("F"));
      default:
        return false;
    }
  }

  std::optional<Error> add_double_oxygen(Level& level, int count, std::size_t begin) {
    LineFragment& chain = level.chain;
    const std::uint32_t centre = chain.current;
    const bool carbon = chain.graph.atoms[centre].element == 6;
    auto add_double = [&] {
      // Sulfur and phosphorus go beyond their chain valence here.
      if (!carbon) chain.free[centre] += 2;
      return chain.bind(centre, chain.add_atom(8, 2), 2, true);
    };
    bool fits = add_double();
    if (count >= 2 && (!carbon || chain.free[centre] == 2)) fits = fits && add_double();
    if ((count == 2 && carbon && chain.free[centre] == 1) || count == 3) {
      const std::uint32_t single = chain.add_atom(8, 2);
      fits = fits && chain.bind(centre, single, 1, true);
      chain.parent[single] = centre;
      chain.current = level.last = single;
    }
    level.bare = false;
    if (!fits) return crowded(begin);
    return std::nullopt;
  }

  /// C2H5, C2H3, C6H5, C6H4 and, with a prefix, alkyl groups.
  std::optional<Error> add_carbon_group(Level& level, int carbons, std::size_t begin) {
    int hydrogens = 0;
    if (peek() == 'H' && !is_lower(peek(1))) {
      ++at_;
      hydrogens = read_count();
    }
    const std::string group = "C" + std::to_string(carbons) + "H" + std::to_string(hydrogens);
    const bool alone = at_ >= text_.size() && begin == 0;
    auto put = [&](const LineFragment& piece) { return attach(level, piece, 1, false, 0, begin); };
    if (alone) return molecular(begin);
    if (carbons == 6 && hydrogens == 5) return put(phenyl_piece());
    if (carbons == 2 && hydrogens == 5) return put(alkyl_piece(2, 'n'));
    if (carbons == 2 && hydrogens == 3) return put(vinyl_piece());
    if (carbons == 6 && hydrogens == 4) {
      if ((prefix_ != 'o' && prefix_ != 'm' && prefix_ != 'p') || prefix_used_) {
        return ambiguous(begin, "C6H4 does not say whether its two groups stand ortho, meta or para.");
      }
      prefix_used_ = true;
      return put(phenylene_piece(prefix_ == 'o' ? 1 : prefix_ == 'm' ? 2 : 3));
    }
    if (hydrogens == 2 * carbons + 1) {
      const bool named = prefix_ == 'n' || (prefix_ == 'i' && carbons <= 4) ||
                         ((prefix_ == 's' || prefix_ == 't') && carbons == 4);
      if (!named || prefix_used_ || carbons > 100)
        return ambiguous(begin, group + " can be a straight or a branched group.");
      prefix_used_ = true;
      return put(alkyl_piece(carbons, prefix_));
    }
    if (hydrogens == 0) return molecular(begin);
    return ambiguous(begin, group + " can be bound in several ways.");
  }

  /// Binds a piece `count` times to the chain, or keeps it for the next atom.
  /// @param written  bond order that stands inside the bracket before it; 0: none
  std::optional<Error> attach(Level& level, const LineFragment& piece, int count, bool bracket, int written,
                              std::size_t begin) {
    LineFragment& chain = level.chain;
    level.bare = false;
    const bool link = piece.is_link() && written == 0;
    if (!level.started()) {
      const bool series = link || count == 1;
      if (written != 0) return not_condensed(begin, "This bond mark has no atom before it.");
      if (!series) {
        level.front_pieces.emplace_back(piece, count);
        return std::nullopt;
      }
    }
    const int order = written != 0 ? written : std::max(1, level.mark);
    const bool is_fixed = written != 0 || level.mark != 0;
    for (int i = 0; i < count; ++i) {
      const bool starts_chain = !level.started();
      const std::uint32_t to = chain.free_end();
      const std::uint32_t base = chain.append(piece);
      const std::uint32_t first = base + piece.first;
      if (starts_chain) {
        if (!bind_front(level, first)) return crowded(begin);
        chain.first = first;
        if (piece.first != piece.current && !bracket) chain.spare = first;
      } else {
        // Beyond the chain valence only for =O on sulfur and phosphorus.
        const int centre =
            to == kNoAtom ? chain.graph.atoms[chain.current].element : chain.graph.atoms[to].element;
        std::uint32_t end = to;
        if (written == 2 && (centre == 15 || centre == 16) && piece.graph.atoms[piece.first].element == 8) {
          end = chain.current;
          chain.free[end] += 2;
        }
        if (end == kNoAtom || !chain.bind(end, first, order, is_fixed)) return crowded(begin);
        chain.parent[first] = end;
      }
      if (starts_chain || link || !bracket) {
        chain.current = base + piece.current;
        level.last = chain.current;
        if (piece.current != piece.first && chain.parent[chain.current] == kNoAtom)
          chain.parent[chain.current] = first;
      } else {
        level.last = chain.current;
      }
      chain.step_back();
    }
    level.mark = 0;
    return std::nullopt;
  }

  /// Binds all that waits in front to the atom that has come.
  static bool bind_front(Level& level, std::uint32_t atom) {
    LineFragment& chain = level.chain;
    if (level.front_hydrogens > 0 && !chain.add_hydrogens(atom, level.front_hydrogens)) return false;
    for (const auto& [piece, count] : level.front_pieces) {
      for (int i = 0; i < count; ++i) {
        const std::uint32_t base = chain.append(piece);
        if (!chain.bind(base + piece.current, atom, 1, false)) return false;
      }
    }
    level.front_hydrogens = 0;
    level.front_pieces.clear();
    return true;
  }

  std::string_view text_;
  std::size_t at_ = 0;
  char prefix_ = 0;
  bool prefix_used_ = false;
};

}  // namespace

Result<Graph> parse_line_formula(std::string_view text) {
  return LineReader(text).read();
}

}  // namespace heatledger::molecule
