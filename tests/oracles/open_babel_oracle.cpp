#include <openbabel/atom.h>
#include <openbabel/bond.h>
#include <openbabel/elements.h>
#include <openbabel/mol.h>
#include <openbabel/obconversion.h>
#include <openbabel/oberror.h>
#include <openbabel/obiter.h>

#include <array>
#include <utility>

#include "tests/oracles/oracle.hpp"

namespace heatledger::test {
namespace {

OpenBabel::OBConversion& conversion() {
  static OpenBabel::OBConversion instance;
  static const bool ready = instance.SetInFormat("smi");
  static_cast<void>(ready);
  return instance;
}

const char* sign(unsigned order) {
  constexpr std::array<const char*, 5> signs{"?", "-", "=", "#", "$"};
  return order < signs.size() ? signs[order] : "?";
}

// Halogen oxoacids are read as written, [Cl+3]([O-])..; counted here as the double bonds that they stand for.
bool halogen_oxide(OpenBabel::OBAtom* a, OpenBabel::OBAtom* b) {
  const unsigned element = a->GetAtomicNum();
  const bool halogen = element == 17 || element == 35 || element == 53;
  return halogen && a->GetFormalCharge() > 0 && b->GetAtomicNum() == 8 && b->GetFormalCharge() < 0;
}

}  // namespace

std::optional<OracleTally> open_babel_tally(const std::string& smiles) {
  OpenBabel::OBMol molecule;
  if (!conversion().ReadString(&molecule, smiles) || molecule.NumAtoms() == 0) return std::nullopt;
  molecule.AddHydrogens();
  OracleTally tally;
  FOR_BONDS_OF_MOL(bond, molecule) {
    OpenBabel::OBAtom* a = bond->GetBeginAtom();
    OpenBabel::OBAtom* b = bond->GetEndAtom();
    if (!halogen_oxide(a, b) && !halogen_oxide(b, a)) continue;
    const int sign_a = a->GetFormalCharge() > 0 ? 1 : -1;
    a->SetFormalCharge(a->GetFormalCharge() - sign_a);
    b->SetFormalCharge(b->GetFormalCharge() + sign_a);
    bond->SetBondOrder(2);
  }
  FOR_BONDS_OF_MOL(bond, molecule) {
    std::string first = OpenBabel::OBElements::GetSymbol(bond->GetBeginAtom()->GetAtomicNum());
    std::string second = OpenBabel::OBElements::GetSymbol(bond->GetEndAtom()->GetAtomicNum());
    if (second < first) std::swap(first, second);
    ++tally[first + sign(bond->GetBondOrder()) + second];
  }
  return tally;
}

int open_babel_quick_count(const std::string& smiles) {
  OpenBabel::OBMol molecule;
  if (!conversion().ReadString(&molecule, smiles)) return 0;
  std::array<int, 8> by_order{};
  FOR_BONDS_OF_MOL(bond, molecule)++ by_order[bond->GetBondOrder() & 7u];
  int sum = 0;
  for (const int count : by_order) sum += count;
  FOR_ATOMS_OF_MOL(atom, molecule) sum += static_cast<int>(atom->GetImplicitHCount());
  return sum;
}

void silence_open_babel() {
  OpenBabel::obErrorLog.StopLogging();
}

}  // namespace heatledger::test
