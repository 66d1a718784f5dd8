#include "core/molecule/element_names.hpp"

#include <array>

namespace heatledger::molecule {
namespace {

constexpr std::array<std::string_view, 119> kNames = {
    "",           "hydrogen",     "helium",        "lithium",     "beryllium",   "boron",
    "carbon",     "nitrogen",     "oxygen",        "fluorine",    "neon",        "sodium",
    "magnesium",  "aluminium",    "silicon",       "phosphorus",  "sulfur",      "chlorine",
    "argon",      "potassium",    "calcium",       "scandium",    "titanium",    "vanadium",
    "chromium",   "manganese",    "iron",          "cobalt",      "nickel",      "copper",
    "zinc",       "gallium",      "germanium",     "arsenic",     "selenium",    "bromine",
    "krypton",    "rubidium",     "strontium",     "yttrium",     "zirconium",   "niobium",
    "molybdenum", "technetium",   "ruthenium",     "rhodium",     "palladium",   "silver",
    "cadmium",    "indium",       "tin",           "antimony",    "tellurium",   "iodine",
    "xenon",      "caesium",      "barium",        "lanthanum",   "cerium",      "praseodymium",
    "neodymium",  "promethium",   "samarium",      "europium",    "gadolinium",  "terbium",
    "dysprosium", "holmium",      "erbium",        "thulium",     "ytterbium",   "lutetium",
    "hafnium",    "tantalum",     "tungsten",      "rhenium",     "osmium",      "iridium",
    "platinum",   "gold",         "mercury",       "thallium",    "lead",        "bismuth",
    "polonium",   "astatine",     "radon",         "francium",    "radium",      "actinium",
    "thorium",    "protactinium", "uranium",       "neptunium",   "plutonium",   "americium",
    "curium",     "berkelium",    "californium",   "einsteinium", "fermium",     "mendelevium",
    "nobelium",   "lawrencium",   "rutherfordium", "dubnium",     "seaborgium",  "bohrium",
    "hassium",    "meitnerium",   "darmstadtium",  "roentgenium", "copernicium", "nihonium",
    "flerovium",  "moscovium",    "livermorium",   "tennessine",  "oganesson"};

}  // namespace

std::string_view element_name(int atomic_number) {
  return atomic_number >= 1 && atomic_number <= 118 ? kNames[static_cast<std::size_t>(atomic_number)]
                                                    : std::string_view();
}

}  // namespace heatledger::molecule
