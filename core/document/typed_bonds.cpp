#include "core/document/typed_bonds.hpp"

#include "core/document/typed_energy.hpp"
#include "core/document/typed_rows.hpp"

namespace heatledger::document {

ReadBonds read_typed_bonds(const TypedBonds& typed) {
  ReadBonds overlay;
  for (std::size_t i = 0; i < typed.size(); ++i) {
    const TypedBond& entry = typed[i];
    const std::string path = "bonds[" + std::to_string(i) + "]";
    if (entry.bond.empty() && entry.value.empty()) continue;
    const Result<molecule::BondType> type = molecule::parse_bond_type(entry.bond);
    if (!type) {
      overlay.errors.push_back(placed(type.error(), path + ".bond"));
      continue;
    }
    const Result<uncertainty::Figure> figure = parse_molar_energy(entry.value);
    if (!figure) {
      overlay.errors.push_back(placed(figure.error(), path + ".value"));
      continue;
    }
    if (figure->value <= 0) {
      overlay.errors.push_back({"typed_bond.not_positive", "A bond enthalpy is a positive figure.",
                                path + ".value",
                                "Breaking a bond takes heat: type the figure without a sign."});
      continue;
    }
    estimate::BondValue value;
    value.type = *type;
    value.value = figure->value;
    value.u95 = figure->u95;
    value.origin = estimate::BondOrigin::User;
    value.source = stated_source(entry.source, entry.from);
    if (value.u95 <= 0) overlay.exact.push_back(path + ".value");
    overlay.values.push_back(std::move(value));
  }
  return overlay;
}

}  // namespace heatledger::document
