// The single blanks of a step as numbers: reading shared by whatever a step is reckoned for.
#pragma once

#include <string>
#include <vector>

#include "core/document/step_sheet.hpp"
#include "core/step/step_input.hpp"
#include "core/units/expression.hpp"

namespace heatledger::document {

class BlankTexts {
 public:
  /// @param names   what the cells may call
  /// @param errors  gets what cannot be read; `where` is "blanks.ID"
  BlankTexts(const StepSheet& sheet, const units::NamedFigures& names, std::vector<Error>& errors)
      : sheet_(sheet), names_(names), errors_(errors) {}

  /// As typed, without blanks at its ends; empty when nothing is written there.
  std::string text(const char* id) const;
  /// Empty when nothing or nothing readable is written there.
  step::Blank quantity(const char* id, const units::Dimension& dimension);
  /// The same, refused unless above zero (step.out_of_range).
  step::Blank positive(const char* id, const units::Dimension& dimension);
  /// Absolute or gauge, as absolute [Pa] > 0.
  step::Blank pressure(const char* id);

 private:
  step::Blank above_zero(step::Blank figure, const char* id);
  void refuse(Error error, const char* id);

  const StepSheet& sheet_;
  const units::NamedFigures& names_;
  std::vector<Error>& errors_;
};

}  // namespace heatledger::document
