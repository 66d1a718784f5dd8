#include <GraphMol/GraphMol.h>
#include <GraphMol/MolOps.h>
#include <GraphMol/SmilesParse/SmilesParse.h>
#include <RDGeneral/RDLog.h>

#include <array>
#include <memory>
#include <utility>

#include "tests/oracles/oracle.hpp"

namespace heatledger::test {
namespace {

std::unique_ptr<RDKit::RWMol> read(const std::string& smiles) {
  try {
    return std::unique_ptr<RDKit::RWMol>(RDKit::SmilesToMol(smiles));
  } catch (const std::exception&) {
    return nullptr;
  }
}

const char* sign(RDKit::Bond::BondType type) {
  switch (type) {
    case RDKit::Bond::SINGLE:
      return "-";
    case RDKit::Bond::DOUBLE:
      return "=";
    case RDKit::Bond::TRIPLE:
      return "#";
    case RDKit::Bond::QUADRUPLE:
      return "$";
    default:
      return "?";
  }
}

// Halogen oxoacids are read as written, [Cl+3]([O-])..; counted here as the double bonds that they stand for.
bool halogen_oxide(const RDKit::Atom& a, const RDKit::Atom& b) {
  const int element = a.getAtomicNum();
  const bool halogen = element == 17 || element == 35 || element == 53;
  return halogen && a.getFormalCharge() > 0 && b.getAtomicNum() == 8 && b.getFormalCharge() < 0;
}

}  // namespace

std::optional<OracleTally> rdkit_tally(const std::string& smiles) {
  const std::unique_ptr<RDKit::RWMol> molecule = read(smiles);
  if (!molecule) return std::nullopt;
  RDKit::MolOps::Kekulize(*molecule, true);
  RDKit::MolOps::addHs(*molecule);
  OracleTally tally;
  for (RDKit::Bond* bond : molecule->bonds()) {
    RDKit::Atom* a = bond->getBeginAtom();
    RDKit::Atom* b = bond->getEndAtom();
    if (!halogen_oxide(*a, *b) && !halogen_oxide(*b, *a)) continue;
    const int sign_a = a->getFormalCharge() > 0 ? 1 : -1;
    a->setFormalCharge(a->getFormalCharge() - sign_a);
    b->setFormalCharge(b->getFormalCharge() + sign_a);
    bond->setBondType(RDKit::Bond::DOUBLE);
  }
  for (const RDKit::Bond* bond : molecule->bonds()) {
    std::string first = bond->getBeginAtom()->getSymbol();
    std::string second = bond->getEndAtom()->getSymbol();
    if (second < first) std::swap(first, second);
    ++tally[first + sign(bond->getBondType()) + second];
  }
  return tally;
}

int rdkit_quick_count(const std::string& smiles) {
  const std::unique_ptr<RDKit::RWMol> molecule = read(smiles);
  if (!molecule) return 0;
  std::array<int, 32> by_order{};
  for (const RDKit::Bond* bond : molecule->bonds())
    ++by_order[static_cast<unsigned>(bond->getBondType()) & 31u];
  int sum = 0;
  for (const int count : by_order) sum += count;
  for (const RDKit::Atom* atom : molecule->atoms()) sum += static_cast<int>(atom->getTotalNumHs());
  return sum;
}

void silence_rdkit() {
  boost::logging::disable_logs("rdApp.*");
}

}  // namespace heatledger::test
