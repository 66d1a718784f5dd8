#include "core/estimate/context_words.hpp"

#include <algorithm>
#include <vector>

namespace heatledger::estimate {
namespace {

constexpr const char* kSubscripts[] = {"₀", "₁", "₂", "₃", "₄", "₅", "₆", "₇", "₈", "₉"};

const char* order_sign(unsigned order) {
  switch (order) {
    case 2:
      return "=";
    case 3:
      return "≡";
    case aromatic_order:
      return "⋯";
    default:
      return "–";
  }
}

/// "CH₃", "CH" of an aromatic ring as "ring CH".
std::string group(const ContextAtom& atom) {
  std::string text = atom.aromatic ? "ring " : "";
  text += kind_symbol(atom.kind);
  if (atom.hydrogens != 0) text += "H";
  if (atom.hydrogens > 1) text += kSubscripts[std::min<unsigned>(atom.hydrogens, 9)];
  if (atom.sign != 0) text += atom.sign == 1 ? "⁺" : "⁻";
  return text;
}

/// Other heavy neighbours: "(=O,C)"; single bonds without a sign, double bonds first.
std::string neighbours(const ContextGraph& graph, std::uint32_t atom, std::uint32_t except) {
  std::vector<std::string> parts;
  for (const auto& next : around(graph, atom)) {
    if (next.atom == except) continue;
    const unsigned order = graph.bonds[next.bond].order;
    parts.push_back(std::string(order == 1 ? "" : order_sign(order)) +
                    kind_symbol(graph.atoms[next.atom].kind));
  }
  std::sort(parts.begin(), parts.end());
  std::string text;
  for (const std::string& part : parts) text += (text.empty() ? "(" : ",") + part;
  return text.empty() ? text : text + ")";
}

std::string end_words(const ContextGraph& graph, std::uint32_t atom, std::uint32_t except) {
  return group(graph.atoms[atom]) + neighbours(graph, atom, except);
}

}  // namespace

std::string bond_words(Kind a, Kind b, unsigned order) {
  std::string x = kind_symbol(a), y = kind_symbol(b);
  if (y < x) std::swap(x, y);
  return x + order_sign(order) + y;
}

std::string ends_words(const ContextGraph& graph, std::uint32_t bond) {
  const ContextBond& of = graph.bonds[bond];
  std::string a = end_words(graph, of.a, of.b), b = end_words(graph, of.b, of.a);
  if (b < a) std::swap(a, b);
  return a + order_sign(of.order) + b;
}

std::string hydrogens_words(const ContextGraph& graph, std::uint32_t atom) {
  std::string text = "in " + group(graph.atoms[atom]);
  std::vector<std::string> parts;
  for (const auto& next : around(graph, atom)) {
    const unsigned order = graph.bonds[next.bond].order;
    const std::string sign = order == 1 || order == aromatic_order ? "" : order_sign(order);
    parts.push_back(sign + end_words(graph, next.atom, atom));
  }
  std::sort(parts.begin(), parts.end());
  for (std::size_t i = 0; i < parts.size(); ++i) text += (i == 0 ? " on " : ", ") + parts[i];
  return text;
}

}  // namespace heatledger::estimate
