// One process step as a person typed it: texts with units, nothing derived. Reading them stands in
// step_reading.hpp.
#pragma once

#include <map>
#include <string>
#include <vector>

#include "core/document/shared.hpp"

namespace heatledger::document {

/// `unknown` of every part: JSON object text of keys that this version does not know, kept for the round
/// trip.

/// One species of a feed.
struct FeedRow {
  std::string species;  ///< as in an equation, with its phase: "ethene(g)"
  std::string amount;   ///< "12 kmol/h", "340 kg", "21 mol%", "8 wt%"; "rest"
  std::string unknown;
};

struct FeedSheet {
  std::string name;
  std::string from;  ///< id of a step above whose outlet this is; its own rows are then not used
  std::string at;    ///< temperature
  std::string pressure;
  std::string total;  ///< with shares: "1.2 t/h"; "20 % excess oxygen over methane"
  std::string role;   ///< what it is for in this kind of step, see KindOfStep::roles; empty: the first
  std::vector<FeedRow> rows;
  std::string unknown;
};

/// How far one reaction of the sheet goes in this step, and the heat it is taken with.
struct ProgressSheet {
  std::string reaction;  ///< id, "r1"
  std::string how;  ///< "conversion of ethene", "yield of X from Y", "selectivity to X from Y", "extent", …
  std::string figure;    ///< "92 %", "3.5 kmol/h"
  std::string heat;      ///< typed for this step: "-95 ± 4 kJ/mol"; empty: the figure taken on the ledger
  std::string heat_per;  ///< species it is stated per mole of; empty: for the coefficients written
  std::string heat_at;   ///< temperature it was measured at; empty: 25 °C
  std::string includes;  ///< mixing, dilution, evaporation, gas loss: "yes", "no", "unknown"
  std::string rate_constant;  ///< "2.1e-4 L/(mol s)"; "as fast as dosed"; empty: not known
  std::string rate_at;        ///< temperature of the rate constant; empty: 25 °C
  std::string activation;     ///< activation energy, "78 kJ/mol"
  std::string orders;         ///< "1 in toluene, 1 in nitric acid"; empty: first order in each reactant
  std::string unknown;
};

/// One point of a dosing profile: how much of the dosed feed has gone in by then; straight between points.
struct ProfileRow {
  std::string time;    ///< "1.5 h"
  std::string amount;  ///< "40 %" of the feed
  std::string unknown;
};

/// How a species leaves when it is not in the phase of the reaction or feed.
struct LeavingRow {
  std::string species;
  std::string how;  ///< "gas", "liquid", "solid", "saturation", "30 % vapour"
  std::string unknown;
};

/// Figures of a species that no table has, for this step.
struct SpeciesRow {
  std::string species;
  std::string heat_capacity;  ///< per mole or per kilogram
  std::string density;
  std::string vapour_pressure;
  std::string molar_mass;  ///< makes the name a code name
  std::string unknown;
};

struct StepSheet {
  std::string id;  ///< "s1", stable through edits and files
  std::string title;
  std::string kind;  ///< name of a kind, see step_kinds.hpp
  std::vector<FeedSheet> feeds;
  std::vector<ProgressSheet> reactions;
  std::vector<LeavingRow> leaving;
  std::vector<SpeciesRow> species;
  std::vector<ProfileRow> profile;  ///< of the dosed feed
  /// Single blanks by name, see step_blanks(): "outlet.temperature" to "180 °C".
  std::map<std::string, std::string> blanks;
  std::string sought;  ///< id of the blank that is sought; empty: the duty
  std::string curve;   ///< id of the blank that the answer is drawn against; empty: none
  std::string note;
  bool show_checker = false;
  std::map<std::string, std::string> checker;  ///< figure (step::review_step) to text as typed
  std::string unknown;
};

/// A single blank of a step.
struct StepBlank {
  const char* id;
  const char* label;
  const char* hint;   ///< an example with its unit
  const char* kinds;  ///< KindOfStep::letter of every kind that has it
};
/// In the order of the sheet.
const std::vector<StepBlank>& step_blanks();

}  // namespace heatledger::document
