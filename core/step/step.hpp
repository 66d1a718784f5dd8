// The heat balance of one process step: streams with their enthalpies, the answer with its ± and working,
// closure of heat and elements, cautions. The arithmetic itself stands in model.hpp.
#pragma once

#include <memory>

#include "core/step/spread.hpp"

namespace heatledger::step {

/// One substance of one stream.
struct StreamLine {
  std::size_t stream = 0;  ///< index of the feed; for what leaves 0
  std::size_t substance = 0;
  State state;
  double amount = 0;       ///< [mol] or [mol/s]
  double mass = 0;         ///< [kg] or [kg/s]; 0 when no molar mass is known
  double temperature = 0;  ///< [K]
  double heat =
      0;  ///< from 25 °C in the reference state, heat of solution left out (DilutionLine) [J] or [W]
  std::optional<double> enthalpy;  ///< with the formation enthalpy [J] or [W]; empty when a species has none
};

struct ReactionLine {
  double extent = 0;              ///< [mol] or [mol/s]
  uncertainty::Quantity heat_25;  ///< at 25 °C, phases as written, for the coefficients written [J]
  double heat_at_end = 0;         ///< at the outlet temperature [J]
  double set_free = 0;            ///< −extent × heat at 25 °C [J] or [W], > 0 exothermic
};

/// What one substance gives off by being dissolved, diluted or concentrated.
struct DilutionLine {
  std::size_t substance = 0;
  std::string words;     ///< "dilution of H₂SO₄, 96 to 78 wt%"
  double before = 0;     ///< mass fraction; 1 for what came undissolved
  double after = 0;      ///< mass fraction as it leaves; 0: all of it reacted
  double by_tables = 0;  ///< set free, > 0 gives off heat [J] or [W]
  double set_free = 0;   ///< as the balance takes it
  std::vector<std::string> working;
  std::string source;
};

struct ElementLine {
  std::string symbol;
  double in = 0, out = 0;  ///< [mol] or [mol/s]
};

struct Closure {
  double heat = 0;  ///< what is left over of all heats, relative to their sum
  bool heat_closes = false;
  std::vector<ElementLine> elements;  ///< empty: not checkable
  std::string why_not_checkable;
  bool elements_close = false;
  /// Duty from the formation enthalpies of everything that enters and leaves; empty when one is missing.
  std::optional<double> duty_by_formation;
  std::string sentence;  ///< "Heat closes to 1e-16; C, H, O close."
};

/// One heat of the balance, for the bands to scale and the working: what comes in is > 0.
struct HeatLine {
  enum class Kind : std::uint8_t { Stream, Reaction, Dilution, Duty, Loss, Work, Vessel } kind = Kind::Stream;
  std::string label;
  double in = 0;  ///< [J] or [W], < 0: goes out
};

struct Answer {
  FigureId id = FigureId::Sought;
  std::string label;
  units::Dimension dimension;
  uncertainty::Quantity value;       ///< first order
  std::vector<Share> shares;         ///< which inputs carry the ±, largest first
  std::optional<DrawnFigure> drawn;  ///< by draws, where the answer bends
  std::vector<std::string> working;
  std::string mark;  ///< "remove", "supply", "notional"
};

struct StepResult {
  std::shared_ptr<const Model> model;
  std::vector<double> values;  ///< all numbers at the solution
  std::vector<StreamLine> in, out;
  std::vector<ReactionLine> reactions;
  std::vector<DilutionLine> dilutions;
  std::vector<HeatLine> heats;
  Closure closure;
  std::vector<Answer> answers;  ///< the sought figure first
  double duty = 0;              ///< [J] or [W], > 0 heat to the process
  int exact_inputs = 0;         ///< typed figures without a ±
  std::vector<std::string> notes, cautions;
};

struct SolveOptions {
  bool draws = false;  ///< also by draws
  DrawOptions draw;
};

/// Solves a step.
/// @errors those of Model::of and solve_sought
Result<StepResult> solve_step(StepInput input, Lookups& lookups, const SolveOptions& options = {});

/// The conventions that every step follows, one sentence each, for the short list on the sheet.
std::vector<std::string> step_conventions(StepKind kind);

/// "remove", "supply", "" for none.
std::string duty_word(double duty);

}  // namespace heatledger::step
