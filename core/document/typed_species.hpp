// What a sheet says of species, laid over the published library: names of the figures that can be typed, and
// the library and species as the equations of that sheet see them.
#pragma once

#include <memory>
#include <optional>
#include <string>
#include <string_view>
#include <unordered_map>
#include <vector>

#include "core/balance/reaction.hpp"
#include "core/document/worksheet.hpp"
#include "core/facts/layered_library.hpp"
#include "core/uncertainty/quantity.hpp"
#include "core/units/dimension.hpp"

namespace heatledger::document {

/// One thing that can be typed of a species.
struct FigureName {
  std::string_view id;     ///< as the file spells it: "formation_liquid"
  std::string_view words;  ///< as the sheet shows it: "formation enthalpy, liquid"
  std::string_view unit;   ///< to show an example of: "kJ/mol"; empty for texts
  units::Dimension dimension;
  std::optional<facts::FigureKind> kind;  ///< empty: what the species is (molar mass, formula, structure)
};

/// In the order in which a choice lists them.
const std::vector<FigureName>& typed_figure_names();
/// By id or by words; nullptr for any other text.
const FigureName* find_typed_figure(std::string_view text);

/// How one typed figure was read; one for each entry of Worksheet::typed_figures.
struct ReadFigure {
  std::optional<uncertainty::Figure> value;  ///< SI; empty: a text, or not readable
  bool exact = false;                        ///< a figure typed without ±
  bool new_species = false;                  ///< no published compound lies under it
  std::string species;                       ///< name it goes by in the library of the sheet
  std::optional<facts::Datum> published;     ///< what it covers
};

/// The published library with the typed figures of one sheet over it. Immutable but for the species it
/// remembers; species point into it, so whoever keeps them keeps this.
class SheetLibrary final : public balance::SpeciesSource {
 public:
  explicit SheetLibrary(const TypedFigures& typed);
  ~SheetLibrary() override;

  const facts::Library& library() const;
  const std::vector<ReadFigure>& figures() const { return figures_; }
  /// `where` is a field path: "species[2].value, offset 3".
  /// Codes: typed_species.figure, typed_species.not_positive, typed_species.published_identity and those of
  /// resolve_species, parse_quantity, parse_formula, parse_smiles, make_coded_species.
  const std::vector<Error>& errors() const { return errors_; }
  /// Names of the species whose gas formation or vaporisation enthalpy is typed with a ±.
  const std::vector<std::string>& measured_species() const { return measured_; }

  Result<std::shared_ptr<const facts::Species>> species(std::string_view text, bool quoted) override;

 private:
  struct Gathered;
  void read(const TypedFigures& typed, std::size_t index, std::vector<Gathered>& gathered);

  std::unique_ptr<facts::LayeredLibrary> layer_;  ///< null: nothing is typed
  std::vector<ReadFigure> figures_;
  std::vector<Error> errors_;
  std::vector<std::string> measured_;
  std::unordered_map<std::string, double> molar_mass_;  ///< [kg/mol] of species without a formula, by name
  std::unordered_map<std::string, std::shared_ptr<const facts::Species>> known_;
};

}  // namespace heatledger::document
