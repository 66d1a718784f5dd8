// Site tables and figures typed in a sheet, laid over the published library: what they cover stays reachable.
#pragma once

#include <memory>
#include <string>
#include <string_view>
#include <vector>

#include "core/facts/figures.hpp"
#include "core/facts/library.hpp"

namespace heatledger::facts {

/// One figure of a site record.
struct SiteFigure {
  FigureKind kind = FigureKind::FormationGas;
  double value = 0;    ///< SI
  double u95 = 0;      ///< [unit of value]; 0: typed without ±, counts as exact
  std::string source;  ///< "site table 2026, measured in house"
  std::string remark;
};

/// What a site table or a sheet says of one compound. Empty texts leave the published ones.
struct SiteRecord {
  std::string name;  ///< required; a record lies over the published compound of this name or CAS number
  std::string cas, formula, smiles;
  std::vector<std::string> synonyms;
  std::vector<SiteFigure> figures;
};

class LayeredLibrary final : public Library {
 public:
  /// @param base     stays in use; must outlive this
  /// @param records  later records lie over earlier ones of the same name
  /// @param layer    name of the layer, for the sentence that tells why a figure was taken ("site table of
  /// the sheet")
  LayeredLibrary(const Library& base, std::vector<SiteRecord> records, std::string layer);
  ~LayeredLibrary() override;

  const Compound* find_name(std::string_view text) const override;
  std::vector<const Compound*> find_formula(std::string_view hill) const override;
  std::vector<const Compound*> find_structures(std::string_view canonical_smiles,
                                               std::string_view hill = {}) const override;
  std::vector<Completion> complete(std::string_view text, std::size_t limit) const override;
  /// The record that `compound` lies over; nullptr for a compound that is new in this layer or not of it. A
  /// figure that covers another also keeps it among its `rivals`.
  const Compound* covered(const Compound& compound) const override;

 private:
  struct State;
  std::unique_ptr<State> state_;
};

}  // namespace heatledger::facts
