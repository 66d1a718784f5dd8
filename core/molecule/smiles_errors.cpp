#include "core/molecule/smiles_errors.hpp"

#include <array>
#include <string>

namespace heatledger::molecule {
namespace {

struct Wording {
  const char* code;
  const char* message;
  const char* hint;
};

// In the order of SmilesFault.
constexpr std::array<Wording, 25> wordings{{
    {"smiles.empty", "There is no structure in this text.",
     "Write a structure, for example CCO for ethanol."},
    {"smiles.unexpected_character", "This character has no meaning in a structure.",
     "Elements outside B C N O P S F Cl Br I stand in square brackets, for example [Na+]."},
    {"smiles.unknown_element", "Inside the bracket there is no element symbol here.",
     "Write a symbol in its usual capitals, for example [Fe+2], or * for any atom."},
    {"smiles.unclosed_bracket", "A square bracket is opened and never closed.",
     "Close it with ] after the charge."},
    {"smiles.bracket_content", "The bracket holds something that does not belong at this place.",
     "The order is isotope, symbol, @ marks, H count, charge, class: [13CH3-] or [NH4+]."},
    {"smiles.hydrogen_on_hydrogen", "A hydrogen atom cannot carry a hydrogen count.",
     "Write hydrogen molecules as [H][H]."},
    {"smiles.unknown_chirality", "This stereo class has no such number.",
     "Use @TH1-2, @AL1-2, @SP1-3, @TB1-20 or @OH1-30, or leave the mark out: it does not change the bonds."},
    {"smiles.number_too_large", "A number in the bracket is larger than it can be.",
     "Isotopes go to 999, charges to 15, classes to 9999."},
    {"smiles.bond_without_atom", "A bond sign has no atom on one side of it.",
     "Put an atom on both sides of the bond."},
    {"smiles.two_bonds", "Two bond signs stand side by side.", "Keep one of them."},
    {"smiles.aromatic_bond_misplaced", "An aromatic bond joins an atom that is not aromatic.",
     "Write both atoms in small letters, or use - or = in place of the colon."},
    {"smiles.too_many_bonds", "One atom has more bonds than any atom can have.",
     "Check where the branches end."},
    {"smiles.ring_number", "After % two digits are needed.", "Write ring number 12 as %12."},
    {"smiles.ring_without_atom", "A ring number has no atom before it.",
     "Write the ring number right after its atom."},
    {"smiles.unclosed_ring", "A ring is opened here and never closed.",
     "Write the same number again after the atom that closes the ring."},
    {"smiles.ring_to_itself", "A ring closes on the atom that opened it.",
     "A ring needs at least three atoms."},
    {"smiles.ring_bonds_differ", "The two ends of a ring closure name different bonds.",
     "Keep the bond sign at one of the two ends."},
    {"smiles.ring_repeats_bond", "A ring closure joins two atoms that are bonded already.",
     "Write one bond of higher order, or check the ring numbers."},
    {"smiles.branch_without_atom", "A branch opens where there is no atom to carry it.",
     "Write the atom first, then the branch in round brackets."},
    {"smiles.empty_branch", "A branch is empty.", "Leave out the pair of round brackets."},
    {"smiles.unclosed_branch", "A branch is opened and never closed.", "Close it with a round bracket."},
    {"smiles.unopened_branch", "A round bracket closes a branch that was never opened.",
     "Remove it, or open the branch after its atom."},
    {"smiles.dot_without_atom", "A dot has no structure on one side of it.",
     "A dot separates two structures, for example [Na+].[Cl-]."},
    {"smiles.cannot_kekulise", "No alternation of single and double bonds fits this aromatic system.",
     "Often a hydrogen is missing: pyrrole nitrogen is written [nH]. Or write the ring with = and capitals."},
    {"smiles.text_after_end", "The structure ends at a blank, and more text follows.",
     "Keep the structure alone in this field."},
}};

}  // namespace

Error smiles_error(SmilesFault fault, std::size_t offset, std::string_view text) {
  const Wording& wording = wordings[static_cast<std::size_t>(fault)];
  std::string message = wording.message;
  const bool names_character =
      fault == SmilesFault::UnexpectedCharacter || fault == SmilesFault::InsideBracket;
  if (names_character && offset < text.size() && text[offset] > ' ' && text[offset] < 0x7F) {
    message.insert(message.size() - 1, std::string(": '") + text[offset] + "'");
  }
  return Error{wording.code, std::move(message), "offset " + std::to_string(offset), wording.hint};
}

}  // namespace heatledger::molecule
