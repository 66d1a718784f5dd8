#include "core/estimate/context_report.hpp"

#include <algorithm>
#include <cmath>

#include "core/base/number_text.hpp"
#include "core/estimate/context_accuracy.hpp"

namespace heatledger::estimate {
namespace {

struct Section {
  const char* name;
  const char* unit;
  FitKind kind;
  std::size_t right_hand_side;
};

constexpr Section kSections[] = {
    {"formation", "kJ/mol", FitKind::Formation, 0},   {"vaporisation", "kJ/mol", FitKind::Vaporisation, 0},
    {"liquid", "J/(mol K)", FitKind::Liquid, 0},      {"gas 298.15 K", "J/(mol K)", FitKind::Gas298, 0},
    {"gas 500 K", "J/(mol K)", FitKind::GasAbove, 1}, {"gas 1000 K", "J/(mol K)", FitKind::GasAbove, 4}};

std::string heading(const Section& section) {
  const ContextFit& fit = *embedded_fit(section.kind).fit;
  return std::string(section.name) + ", " + section.unit + ": " + std::to_string(fit.rows().size()) +
         " rows, " + std::to_string(fit.features()) + " features\n";
}

std::string section_text(const Section& section) {
  const FittedProperty& fitted = embedded_fit(section.kind);
  const std::vector<LeftOutRow> rows = leave_each_out(fitted, section.kind, section.right_hand_side);
  return heading(section) + accuracy_text(accuracy_table(fitted, section.kind, rows)) + "\n";
}

}  // namespace

std::string accuracy_section(const std::string& name) {
  for (const Section& section : kSections) {
    if (name == section.name) return section_text(section);
  }
  return {};
}

std::string accuracy_report() {
  std::string text =
      "Each row of the training table predicted without itself and its stereoisomers: absolute errors, share "
      "of errors\n"
      "inside the stated 68 and 95 % intervals, median standard deviation. \"Trusted\": two sources share "
      "the value; families\n"
      "count trusted rows. \"Second half\": compounds that no first choice of a spread was made on; the last "
      "ones were made with\n"
      "all rows in view, so a new molecule may fare a little worse than these figures. \"Set aside\": rows "
      "of "
      "training.tsv\n"
      "that the fit leaves out, each with its reason there; the line below it judges the trusted organic "
      "rows "
      "together with\n"
      "them. Printed by `heatledger_refit accuracy`; a test compares it with the model as shipped.\n\n";
  for (const Section& section : kSections) text += section_text(section);
  return text;
}

std::string folds_report(unsigned folds) {
  std::string text;
  for (const Section& section : kSections) {
    const std::vector<LeftOutRow> rows = leave_folds_out(section.kind, section.right_hand_side, folds);
    text += heading(section) + accuracy_text(accuracy_table(embedded_fit(section.kind), section.kind, rows)) +
            "\n";
  }
  return text;
}

std::string worst_report(std::size_t most) {
  std::string text;
  for (const Section& section : kSections) {
    const FittedProperty& fitted = embedded_fit(section.kind);
    std::vector<LeftOutRow> rows = leave_each_out(fitted, section.kind, section.right_hand_side);
    std::sort(rows.begin(), rows.end(), [](const LeftOutRow& a, const LeftOutRow& b) {
      return std::fabs(a.error) / a.s > std::fabs(b.error) / b.s;
    });
    text += heading(section);
    for (std::size_t i = 0; i < std::min(most, rows.size()); ++i) {
      const TrainingFigure& figure = fitted.figures[rows[i].figure];
      const TrainingCompound& compound = training_compounds()[figure.compound];
      text += "  " + machine_number(rows[i].error / rows[i].s, 3) + "  " + machine_number(rows[i].error, 4) +
              "  " + std::string(compound.name) + "  " + std::string(compound.smiles) + "  weight " +
              machine_number(figure.weight, 3) + (figure.trusted ? "  trusted\n" : "\n");
    }
  }
  return text;
}

}  // namespace heatledger::estimate
