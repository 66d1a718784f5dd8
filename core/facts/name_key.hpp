// What two spellings of one name have in common: the key that names are looked up by.
#pragma once

#include <cstdint>
#include <string>
#include <string_view>

namespace heatledger::facts {

/// Appends the key of a name to `out`: lower case; accents dropped; Greek letters spelt out ("α" is "alpha");
/// blanks, hyphens, commas, primes and brackets left out; "sulph" as "sulf", "aluminium" as "aluminum",
/// "caesium" as "cesium".
/// @return number of bytes appended; 0 when the text holds nothing that a name is made of
std::size_t append_name_key(std::string_view text, std::string& out);
std::string name_key(std::string_view text);

/// Hash of a key, for the indexes.
/// @source Fowler, Noll, Vo: FNV-1a, 64 bit
std::uint64_t key_hash(std::string_view key);

}  // namespace heatledger::facts
