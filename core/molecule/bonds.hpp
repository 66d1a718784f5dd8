// Bonds of a structure by type, all hydrogens included. Prices of bonds stand in core/estimate.
#pragma once

#include <cstdint>
#include <string>
#include <string_view>
#include <vector>

#include "core/base/result.hpp"
#include "core/molecule/graph.hpp"

namespace heatledger::molecule {

/// Setting of a bond that published tables price apart from the plain type.
enum class Setting : std::uint8_t {
  Plain = 0,
  Nitro,            ///< the N-O or N=O of a nitro group or nitrate: one of each by convention
  CarbonDioxide,    ///< C=O in CO2
  CarbonMonoxide,   ///< C#O
  NitricOxide,      ///< NO, order 2.5, written N=O
  NitrogenDioxide,  ///< the two equal bonds of NO2
  Ozone,            ///< the two equal bonds of O3
  AromaticRing,     ///< C-C, C=C, C-N, C=N of an aromatic ring (some sets have one value);
                    ///< count_bonds_with_rings only
  // further settings are added at the end with a comment; molecule-specific values attach to them
};

/// Bond type packed into one word: elements in alphabetical order of their symbols, Kekulé order, setting.
struct BondType {
  std::uint8_t first = 0, second = 0;  ///< atomic numbers, symbol of first <= symbol of second
  Order order = Order::Single;
  Setting setting = Setting::Plain;

  std::uint32_t packed() const {
    return (std::uint32_t{first} << 24) | (std::uint32_t{second} << 16) |
           (static_cast<std::uint32_t>(order) << 8) | static_cast<std::uint32_t>(setting);
  }
  friend bool operator==(const BondType& a, const BondType& b) { return a.packed() == b.packed(); }
  friend bool operator<(const BondType& a, const BondType& b) { return a.packed() < b.packed(); }
};

BondType make_bond_type(int element_a, int element_b, Order order, Setting setting = Setting::Plain);

/// "C-H", "C=C", "C#N", "C$C"; with setting "C=O (CO2)", "N-O (nitro)". plain_spelling leaves the setting
/// out.
std::string spelling(const BondType& type);
std::string plain_spelling(const BondType& type);
/// @errors bond.unknown_spelling
Result<BondType> parse_bond_type(std::string_view text);

struct BondCount {
  BondType type;
  int count = 0;
};

/// Sorted by type, each type once.
using BondTally = std::vector<BondCount>;

/// Counts the bonds of the Kekulé structure with all hydrogens in the form of take_octet_form
/// (normalise.hpp), so that every spelling of one structure gives one tally. Marked with their setting: the
/// N-O and N=O of a nitro group (nitrate esters, nitric acid and nitrate ion too), the bonds of CO2, CO (a
/// triple bond whatever was written), NO, NO2 (one N-O, one N=O) and O3 (one O-O, one O=O). To merge settings
/// use plain_tally.
/// @param out  receives the tally; its memory is reused
/// @complexity linear; a molecule without charges or atoms above their octet takes one pass without the heap
void count_bonds(const Graph& graph, BondTally& out);
BondTally count_bonds(const Graph& graph);
/// The same with C-C, C=C, C-N and C=N bonds of aromatic rings (aromaticity.hpp) marked AromaticRing: what a
/// sheet shows, since some tables have one value for them. Slower, since the rings have to be found.
BondTally count_bonds_with_rings(const Graph& graph);
/// All settings merged into Plain: the `bonds` of the command line.
BondTally plain_tally(const BondTally& tally);

}  // namespace heatledger::molecule
