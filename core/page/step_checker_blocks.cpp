#include "core/page/step_checker_blocks.hpp"

#include "core/base/number_text.hpp"
#include "core/molecule/equation.hpp"
#include "core/page/cells.hpp"
#include "core/page/step_figures.hpp"
#include "core/step/words.hpp"
#include "core/units/constants.hpp"

namespace heatledger::page {
namespace {

using step::StepResult;

class Checker {
 public:
  explicit Checker(const StepView& view)
      : view_(view),
        result_(*view.outcome.result),
        against_(view.outcome.own != nullptr ? *view.outcome.own : result_),
        id_(view.sheet.id),
        flow_(result_.model->input().kind == step::StepKind::ThroughFlow) {}

  std::vector<Block> build() {
    std::vector<Block> blocks;
    blocks.push_back(figures());
    const step::StepReview& review = *view_.outcome.review;
    if (!review.summary.empty())
      blocks.push_back(note_block(id_ + ".checker.summary",
                                  review.agrees ? NoteKind::Info : NoteKind::Disagreement, review.summary));
    blocks.push_back(own_data());
    return blocks;
  }

 private:
  bool own() const { return view_.outcome.own != nullptr; }

  /// What a cell of the column names, in a result.
  std::optional<double> figure(const StepResult& result, const std::string& cell) const {
    const auto sum = [](const std::vector<step::StreamLine>& lines) {
      double heat = 0;
      for (const step::StreamLine& line : lines) heat += line.heat;
      return heat;
    };
    if (cell == "sought") return result.values[result.model->sought()];
    if (cell == "outlet") return sum(result.out);
    if (cell == "inlet") return sum(result.in);
    double free = 0;
    for (std::size_t j = 0; j < result.reactions.size(); ++j) {
      const std::string stem = "reaction." + std::to_string(j);
      const step::ReactionLine& line = result.reactions[j];
      free += line.set_free;
      if (cell == stem + ".extent") return line.extent;
      if (cell == stem + ".heat") return line.heat_25.value();
      if (cell == stem + ".free") return line.set_free;
    }
    if (cell == "heat_set_free") return free;
    for (const bool in : {true, false}) {
      const std::vector<step::StreamLine>& lines = in ? result.in : result.out;
      for (std::size_t i = 0; i < lines.size(); ++i) {
        const std::string stem = (in ? "in." : "out.") + std::to_string(i);
        if (cell == stem + ".amount") return lines[i].amount;
        if (cell == stem + ".heat") return lines[i].heat;
      }
    }
    return std::nullopt;
  }

  void add(Table& list, const std::string& cell, const std::string& label) const {
    const std::optional<units::Dimension> dimension = step::check_dimension(result_, cell);
    const std::optional<double> ours = figure(result_, cell);
    if (!dimension || !ours) return;
    const auto typed = view_.sheet.checker.find(cell);
    Row line = row_of(id_ + ".check." + cell + ".line");
    line.screen_only = typed == view_.sheet.checker.end() && !own();
    std::string finding;
    Tone tone = Tone::Quiet;
    for (const step::StepCheckedLine& checked : view_.outcome.review->lines) {
      if (checked.cell != cell) continue;
      finding = checked.finding;
      tone = checked.verdict == step::StepVerdict::Agrees ? Tone::Good : Tone::Caution;
    }
    line.cells = {label_cell(label), label_cell(step::value_text(*ours, *dimension, flow_))};
    if (own()) {
      const std::optional<double> same = figure(against_, cell);
      line.cells.push_back(label_cell(same ? step::value_text(*same, *dimension, flow_) : "–"));
    }
    line.cells.push_back(typed_cell(id_ + ".check." + cell,
                                    typed == view_.sheet.checker.end() ? "" : typed->second,
                                    "their figure with its unit", CellKind::Number));
    line.cells.push_back(label_cell(finding, tone));
    list.rows.push_back(std::move(line));
  }

  Table figures() const {
    Table list;
    list.id = id_ + ".checker";
    list.look = TableLook::List;
    list.columns = {column("what", "Checker's column"),
                    column("ours", own() ? "here, our data" : "here", Align::Right)};
    if (own()) list.columns.push_back(column("same", "same method, their data", Align::Right));
    list.columns.push_back(column("theirs", "on the sheet under review"));
    list.columns.push_back(column("finding", ""));
    const step::StepInput& input = result_.model->input();
    add(list, "sought", result_.model->slots()[result_.model->sought()].label);
    add(list, "outlet", "what leaves, from 25 °C");
    add(list, "inlet", "what enters, from 25 °C");
    if (!result_.reactions.empty()) add(list, "heat_set_free", "heat set free at 25 °C");
    for (std::size_t j = 0; j < result_.reactions.size(); ++j) {
      const std::string cell = "reaction." + std::to_string(j), name = input.reactions[j].name;
      add(list, cell + ".extent", name + ", extent");
      add(list, cell + ".heat", name + ", heat at 25 °C");
      add(list, cell + ".free", name + ", set free at 25 °C");
    }
    for (std::size_t i = 0; i < result_.out.size(); ++i) {
      const std::string cell = "out." + std::to_string(i), name = stream_species(result_, result_.out[i]);
      add(list, cell + ".amount", name + " leaving");
      add(list, cell + ".heat", name + " leaving, heat");
    }
    for (std::size_t i = 0; i < result_.in.size(); ++i) {
      const std::string cell = "in." + std::to_string(i), name = stream_species(result_, result_.in[i]);
      add(list, cell + ".amount", name + " entering");
      add(list, cell + ".heat", name + " entering, heat");
    }
    return list;
  }

  /// Heats of reaction and heat capacities that the sheet under review was reckoned with.
  Table own_data() const {
    Table list;
    list.id = id_ + ".own";
    list.look = TableLook::List;
    list.columns = {column("what", "With the sheet's own data"), column("ours", "here", Align::Right),
                    column("theirs", "on the sheet under review")};
    const step::StepInput& input = result_.model->input();
    const auto add_row = [&](const std::string& key, std::string label, std::string ours, const char* hint) {
      const auto typed = view_.sheet.checker.find(key);
      Row row = row_of(id_ + ".check." + key + ".line");
      row.screen_only = typed == view_.sheet.checker.end();
      row.cells = {label_cell(std::move(label)), label_cell(std::move(ours)),
                   typed_cell(id_ + ".check." + key, typed == view_.sheet.checker.end() ? "" : typed->second,
                              hint, CellKind::Number)};
      list.rows.push_back(std::move(row));
    };
    for (std::size_t j = 0; j < input.reactions.size(); ++j)
      add_row("own.heat." + std::to_string(j), input.reactions[j].name + ", heat at 25 °C as written",
              step::value_text(result_.reactions[j].heat_25.value(), units::dimension::kEnergyPerMole, flow_),
              "-95.2 kJ/mol");
    for (std::size_t i = 0; i < input.substances.size(); ++i) {
      const double cp = result_.model->heat_capacity(result_.values, result_.model->leaving_state(i),
                                                     units::kReferenceTemperature);
      add_row("own.cp." + input.substances[i].name, input.substances[i].name + ", heat capacity, constant",
              cp > 0 ? step::digits(cp) + " J/(mol K) at 25 °C" : "–", "75 J/(mol K)");
    }
    return list;
  }

  const StepView& view_;
  const StepResult& result_;
  const StepResult& against_;
  std::string id_;
  bool flow_;
};

}  // namespace

std::vector<Block> step_checker_blocks(const StepView& view) {
  if (view.outcome.result == nullptr || view.outcome.review == nullptr) return {};
  return Checker(view).build();
}

std::string stream_species(const StepResult& result, const step::StreamLine& line) {
  std::string text = result.model->input().substances[line.substance].name;
  const std::string_view phase = molecule::phase_text(line.state.phase);
  if (phase.empty()) return text;
  text += "(" + std::string(phase);
  const double mass = result.model->molar_mass(line.substance);
  const std::optional<double> ratio =
      line.state.strength && mass > 0 ? thermo::water_ratio(*line.state.strength, mass) : std::nullopt;
  if (ratio) text += ", " + display_number(100 * thermo::mass_fraction(*ratio, mass), 1) + " wt%";
  return text + ")";
}

}  // namespace heatledger::page
