#include "core/molecule/elements.hpp"

#include <array>

#include "core/base/check.hpp"

namespace heatledger::molecule {
namespace {

struct Element {
  std::string_view symbol;
  double mass;
};

// Mass number of the longest-lived isotope where the standard gives no atomic weight (Tc, Pm, Po to Ac, Np
// on).
constexpr std::array<Element, 119> elements{{
    {"*", 0},       {"H", 1.008},   {"He", 4.0026}, {"Li", 6.94},   {"Be", 9.0122}, {"B", 10.81},
    {"C", 12.011},  {"N", 14.007},  {"O", 15.999},  {"F", 18.998},  {"Ne", 20.180}, {"Na", 22.990},
    {"Mg", 24.305}, {"Al", 26.982}, {"Si", 28.085}, {"P", 30.974},  {"S", 32.06},   {"Cl", 35.45},
    {"Ar", 39.95},  {"K", 39.098},  {"Ca", 40.078}, {"Sc", 44.956}, {"Ti", 47.867}, {"V", 50.942},
    {"Cr", 51.996}, {"Mn", 54.938}, {"Fe", 55.845}, {"Co", 58.933}, {"Ni", 58.693}, {"Cu", 63.546},
    {"Zn", 65.38},  {"Ga", 69.723}, {"Ge", 72.630}, {"As", 74.922}, {"Se", 78.971}, {"Br", 79.904},
    {"Kr", 83.798}, {"Rb", 85.468}, {"Sr", 87.62},  {"Y", 88.906},  {"Zr", 91.224}, {"Nb", 92.906},
    {"Mo", 95.95},  {"Tc", 97},     {"Ru", 101.07}, {"Rh", 102.91}, {"Pd", 106.42}, {"Ag", 107.87},
    {"Cd", 112.41}, {"In", 114.82}, {"Sn", 118.71}, {"Sb", 121.76}, {"Te", 127.60}, {"I", 126.90},
    {"Xe", 131.29}, {"Cs", 132.91}, {"Ba", 137.33}, {"La", 138.91}, {"Ce", 140.12}, {"Pr", 140.91},
    {"Nd", 144.24}, {"Pm", 145},    {"Sm", 150.36}, {"Eu", 151.96}, {"Gd", 157.25}, {"Tb", 158.93},
    {"Dy", 162.50}, {"Ho", 164.93}, {"Er", 167.26}, {"Tm", 168.93}, {"Yb", 173.05}, {"Lu", 174.97},
    {"Hf", 178.49}, {"Ta", 180.95}, {"W", 183.84},  {"Re", 186.21}, {"Os", 190.23}, {"Ir", 192.22},
    {"Pt", 195.08}, {"Au", 196.97}, {"Hg", 200.59}, {"Tl", 204.38}, {"Pb", 207.2},  {"Bi", 208.98},
    {"Po", 209},    {"At", 210},    {"Rn", 222},    {"Fr", 223},    {"Ra", 226},    {"Ac", 227},
    {"Th", 232.04}, {"Pa", 231.04}, {"U", 238.03},  {"Np", 237},    {"Pu", 244},    {"Am", 243},
    {"Cm", 247},    {"Bk", 247},    {"Cf", 251},    {"Es", 252},    {"Fm", 257},    {"Md", 258},
    {"No", 259},    {"Lr", 262},    {"Rf", 267},    {"Db", 270},    {"Sg", 269},    {"Bh", 270},
    {"Hs", 270},    {"Mt", 278},    {"Ds", 281},    {"Rg", 281},    {"Cn", 285},    {"Nh", 286},
    {"Fl", 289},    {"Mc", 289},    {"Lv", 293},    {"Ts", 293},    {"Og", 294},
}};

// First letter × second letter ('\0' or 'a'..'z') to atomic number: one look-up per symbol read.
constexpr std::array<std::uint8_t, 26 * 27> make_index() {
  std::array<std::uint8_t, 26 * 27> index{};
  for (std::size_t z = 1; z < elements.size(); ++z) {
    const std::string_view text = elements[z].symbol;
    const std::size_t second = text.size() > 1 ? static_cast<std::size_t>(text[1] - 'a' + 1) : 0;
    index[static_cast<std::size_t>(text[0] - 'A') * 27 + second] = static_cast<std::uint8_t>(z);
  }
  return index;
}
constexpr std::array<std::uint8_t, 26 * 27> index_by_letters = make_index();

}  // namespace

std::string_view symbol(int atomic_number) {
  CHECK(atomic_number >= 0 && atomic_number <= 118, "an atomic number from 0 to 118");
  return elements[static_cast<std::size_t>(atomic_number)].symbol;
}

std::optional<int> atomic_number(std::string_view symbol) {
  if (symbol == "*") return 0;
  if (symbol.empty() || symbol.size() > 2 || symbol[0] < 'A' || symbol[0] > 'Z') return std::nullopt;
  if (symbol.size() == 2 && (symbol[1] < 'a' || symbol[1] > 'z')) return std::nullopt;
  const std::size_t second = symbol.size() > 1 ? static_cast<std::size_t>(symbol[1] - 'a' + 1) : 0;
  const int found = index_by_letters[static_cast<std::size_t>(symbol[0] - 'A') * 27 + second];
  if (found == 0) return std::nullopt;
  return found;
}

double atomic_mass(int atomic_number) {
  CHECK(atomic_number >= 0 && atomic_number <= 118, "an atomic number from 0 to 118");
  return elements[static_cast<std::size_t>(atomic_number)].mass;
}

double isotope_mass(int atomic_number, int mass_number) {
  CHECK(mass_number > 0, "a mass number above zero");
  // Audi et al., AME2020: atomic masses of deuterium and tritium.
  if (atomic_number == 1 && mass_number == 2) return 2.014101778;
  if (atomic_number == 1 && mass_number == 3) return 3.016049281;
  return mass_number;
}

}  // namespace heatledger::molecule
