// Results of the steps of a worksheet: one after the other, recomputed where an edit reaches.
#pragma once

#include <memory>
#include <vector>

#include "core/document/named_quantities.hpp"
#include "core/document/step_reading.hpp"
#include "core/step/findings.hpp"
#include "core/step/step_checker.hpp"

namespace heatledger::document {

/// A point of the curve of the answer against one blank.
struct CurvePoint {
  double x = 0, y = 0;  ///< SI
  double u95 = 0;
};

/// A step computed. Immutable: the same inputs give the same object.
struct StepOutcome {
  /// The balance of streams; null: `errors` say why, or the kind of step has none.
  std::shared_ptr<const step::StepResult> result;
  /// What the kind of step answers beyond that; null: nothing.
  std::shared_ptr<const step::Findings> findings;
  std::vector<Error> errors;  ///< of single texts, and of the step as a whole
  std::vector<std::string> notes;
  std::shared_ptr<const void> library;  ///< that its species point into
  std::vector<CurvePoint> curve;  ///< answer against StepSheet::curve; empty when not asked or not possible
  std::shared_ptr<const step::StepResult> own;  ///< the same method with the data of the sheet under review
  std::shared_ptr<const step::StepReview> review;  ///< of the checker's column; null: not shown
  std::string curve_label;
  units::Dimension curve_dimension;
};

/// Keeps what was looked up, and the last outcomes by what they were computed from.
class StepCalculator {
 public:
  StepCalculator();
  ~StepCalculator();
  StepCalculator(StepCalculator&&) noexcept;
  StepCalculator& operator=(StepCalculator&&) noexcept;

  /// @param species  as the sheet knows them; another source computes everything anew
  /// @param quantities  what cells may call by name; others compute everything anew
  /// @param ledgers  one for each reaction id that has a figure; their identity decides what is recomputed
  std::vector<std::shared_ptr<const StepOutcome>> compute(
      const std::vector<Shared<StepSheet>>& steps, const std::shared_ptr<balance::SpeciesSource>& species,
      const std::map<std::string, std::shared_ptr<const balance::Ledger>>& ledgers,
      const std::shared_ptr<const ReadQuantities>& quantities);

 private:
  struct Memory;
  std::unique_ptr<Memory> memory_;
};

}  // namespace heatledger::document
