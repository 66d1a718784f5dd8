// Species from what was found: a compound of the library, a structure, a composition. Which of them a text
// means is decided in resolve.cpp.
#pragma once

#include <memory>
#include <string_view>

#include "core/facts/resolve.hpp"

namespace heatledger::facts {

/// A compound of the library; its structure unless that is formal.
std::shared_ptr<Species> species_of(std::string_view text, const Compound& compound);
/// An ion, or another substance in water that the library of compounds does not hold.
std::shared_ptr<Species> species_of(std::string_view text, const AqueousSubstance& substance);
/// A structure: its compound if the library holds one, else the structure itself under the name `text`.
std::shared_ptr<Species> species_of(std::string_view text, molecule::Graph graph, const Library& library);
/// A composition that no table knows.
std::shared_ptr<Species> species_of(std::string_view text, const molecule::Composition& composition);

}  // namespace heatledger::facts
