#include "core/page/margin.hpp"
#include "core/page/step_blocks.hpp"

#include <algorithm>
#include <cmath>

#include "core/balance/bond_words.hpp"
#include "core/balance/context_rows.hpp"
#include "core/base/number_text.hpp"
#include "core/molecule/elements.hpp"
#include "core/page/edits.hpp"
#include "core/page/figures.hpp"

namespace heatledger::page {
namespace {

using balance::Ledger;
using uncertainty::Quantity;

void add_source(Margin& margin, const std::string& source) {
  if (source.empty()) return;
  if (std::find(margin.sources.begin(), margin.sources.end(), source) == margin.sources.end()) {
    margin.sources.push_back(source);
  }
}

/// Adds a section of plain notes; nothing when there are none.
void add_section(Margin& margin, const std::string& heading, const std::vector<std::string>& texts,
                 NoteKind kind) {
  if (texts.empty()) return;
  Margin::Section section;
  section.heading = heading;
  for (const std::string& text : texts) {
    Note note;
    note.kind = kind;
    note.text = text;
    section.notes.push_back(std::move(note));
  }
  margin.sections.push_back(std::move(section));
}

/// Working of the figures of one reaction with a ledger.
class LedgerMargin {
 public:
  LedgerMargin(const document::ReactionSheet& sheet, const Ledger& ledger, Margin& margin)
      : sheet_(sheet), ledger_(ledger), margin_(margin) {}

  /// @return whether the id names a figure of the ledger
  bool explain(const IdParts& id) {
    const std::string& part = id[1];
    if (part == "row" && id.size() >= 4) return explain_row(id);
    if (part == "sum" && id.size() == 3) return explain_sum(id[2] == "formed");
    if (part == "difference" || part == "gas_298") return explain_gas(part == "gas_298");
    if (part == "correction" && id.size() >= 3) return explain_correction(id);
    if (part == "as_written") return explain_as_written();
    if (part == "run" && id.size() >= 3) return explain_run(id);
    if (part == "as_run") return explain_as_run();
    if (part == "measured_line" && id.size() >= 3) return explain_measured_line(id);
    if (part == "other_reading") {
      return explain_route(std::string(ledger_.taken == balance::kMeasuredRoute ? balance::kOtherMeasuredRoute
                                                                                : balance::kMeasuredRoute),
                           false);
    }
    if (part == "taken" || part == "per_kg" || part == "per_kg_reactants") return explain_taken(part);
    if (part == "route" && id.size() >= 4) return explain_route(id[2], id[3] == "gas_298");
    return false;
  }

 private:
  const balance::ReactionSpecies& species(std::size_t row) const {
    return ledger_.reaction->species[ledger_.rows[row].species];
  }

  bool explain_row(const IdParts& id) {
    const std::optional<std::size_t> index = id_index(id[2]);
    if (!index || *index >= ledger_.rows.size()) return false;
    const balance::LedgerRow& row = ledger_.rows[*index];
    if (id[3] == "line" && id.size() >= 6)
      return row.context != nullptr ? explain_context_line(row, id) : explain_line(row, *index, id);
    margin_.subject = balance::display_species(species(*index));
    if (id[3] == "u95" && row.context == nullptr) {
      explain_half_width(row);
    } else {
      margin_.steps = row.working;
    }
    if (row.context != nullptr) add_carriers(species(*index), *row.context);
    for (const balance::BondLine& line : row.lines) add_source(margin_, line.source);
    add_source(margin_, row.table_source);
    std::vector<std::string> remarks = row.strains;
    if (!row.remark.empty()) remarks.insert(remarks.begin(), row.remark);
    add_section(margin_, "About this species", remarks, NoteKind::Info);
    return true;
  }

  /// Which bonds the ± of a row comes from, widest first.
  void explain_half_width(const balance::LedgerRow& row) {
    if (!row.in_equation) return;
    const double times = ledger_.reaction->species[row.species].coefficient();
    struct Share {
      std::string text;
      double u95;
    };
    std::vector<Share> shares;
    const auto add = [&](const std::string& label, int count, const estimate::BondValue* price) {
      if (price == nullptr || price->u95 <= 0) return;
      const double u95 = count * price->u95 * times;
      shares.push_back(Share{label + "  " + std::to_string(count) + " \u00d7 " + balance::times_text(times) +
                                 " \u00d7 " + balance::ledger_kj(price->u95) + " = " +
                                 balance::ledger_kj(u95),
                             u95});
    };
    for (const balance::BondLine& line : row.lines) {
      add(balance::bond_label(line.type), line.count, line.price);
      if (line.second) add(balance::bond_label(line.second->type), line.second->count, line.second->price);
    }
    std::stable_sort(shares.begin(), shares.end(),
                     [](const Share& a, const Share& b) { return a.u95 > b.u95; });
    for (const Share& share : shares) margin_.steps.push_back(share.text);
    margin_.steps.push_back("root of the sum of squares: \u00b1 " +
                            balance::ledger_kj(row.in_equation->u95()) + " kJ");
    add_section(margin_, "How \u00b1 adds up",
                {"Errors of one bond value are the same error wherever that bond stands: in the totals, what "
                 "is broken and "
                 "formed again cancels."},
                NoteKind::Info);
  }

  bool explain_line(const balance::LedgerRow& row, std::size_t index, const IdParts& id) {
    const std::optional<std::size_t> at = id_index(id[4]);
    if (!at || *at >= row.lines.size()) return false;
    const balance::BondLine& line = row.lines[*at];
    const balance::ReactionSpecies& entry = species(index);
    margin_.subject = line.label + ", " + balance::display_species(entry);
    const auto add = [&](const molecule::BondType& type, int count, const estimate::BondValue* price) {
      std::string step = balance::bond_label(type) + "  " + std::to_string(count) + " \u00d7 ";
      if (price == nullptr) {
        margin_.steps.push_back(step + "no value");
        return;
      }
      margin_.steps.push_back(step + balance::ledger_kj(price->value) + " = " +
                              balance::ledger_kj(count * price->value));
      add_source(margin_, price->source);
    };
    add(line.type, line.count, line.price);
    if (line.second) add(line.second->type, line.second->count, line.second->price);
    if (line.priced()) {
      if (line.second) margin_.steps.push_back("sum " + balance::ledger_kj(line.per_mole));
      if (entry.coefficient() != 1) {
        margin_.steps.push_back(coefficient_text(entry.term.coefficient) + " \u00d7 " +
                                balance::ledger_kj(line.per_mole) + " = " +
                                balance::ledger_kj(line.per_mole * entry.coefficient()) + " kJ");
      }
    }
    if (!line.remark.empty()) add_section(margin_, "About this bond", {line.remark}, NoteKind::Info);
    return true;
  }

  /// The compounds of the table that an estimate rests on, and what no compound of it has.
  void add_carriers(const balance::ReactionSpecies& entry, const estimate::Explanation& explanation) {
    if (explanation.rows.empty() && explanation.unseen.empty()) return;
    std::vector<std::string> texts;
    for (const estimate::ReferenceRow& row : explanation.rows) {
      texts.push_back(row.name + ", " + display_signed(row.value / 1000, 1) + " \u00b1 " +
                      display_number(row.u95 / 1000, 1) + " kJ/mol (" + row.sources +
                      "): the estimate moves by " + display_signed(row.weight, 2) +
                      " of what this figure does.");
    }
    if (!explanation.unseen.empty()) {
      std::string unseen;
      for (const std::string& feature : explanation.unseen) unseen += (unseen.empty() ? "" : "; ") + feature;
      texts.push_back("No compound of the table has: " + unseen +
                      ". The parent surroundings stand in, with a "
                      "wider \u00b1.");
    }
    add_section(margin_, "What carries the estimate of " + balance::display_species(entry), texts,
                NoteKind::Info);
  }

  /// The same for every species of a route that is estimated, asked for only when somebody looks.
  void add_carriers_of(const balance::Route& route) {
    for (std::size_t i = 0; i < ledger_.rows.size(); ++i) {
      const bool in_context = route.name == balance::kContextRoute;
      const bool estimated =
          std::find(route.estimated.begin(), route.estimated.end(), i) != route.estimated.end();
      const balance::ReactionSpecies& entry = species(i);
      const bool element = entry.species->compound != nullptr && entry.species->compound->reference_element;
      if (element || !(in_context || estimated)) continue;
      const Result<estimate::Explanation> explained =
          balance::explain_in_context(*entry.species, ledger_.observations.get());
      if (explained.ok()) add_carriers(entry, *explained);
    }
  }

  bool explain_context_line(const balance::LedgerRow& row, const IdParts& id) {
    const std::optional<std::size_t> at = id_index(id[4]);
    if (!at || *at >= row.context->lines.size()) return false;
    const estimate::ContextLine& line = row.context->lines[*at];
    const balance::ReactionSpecies& entry = ledger_.reaction->species[row.species];
    const bool bond = line.kind == estimate::LineKind::Bond;
    margin_.subject = (bond ? line.bond + " " : "") + line.text + ", " + balance::display_species(entry);
    const auto one = [](double joule) { return display_number(joule / 1000, 2); };
    if (bond) {
      margin_.steps.push_back("base value of " + line.bond + ", anywhere: " + one(line.base) + " kJ/mol");
      margin_.steps.push_back("its surroundings add " + display_signed(line.surroundings / 1000, 2));
      margin_.steps.push_back(machine_number(line.count, 6) + " \u00d7 " +
                              one(line.base + line.surroundings) + " = " + one(line.total) + " kJ/mol");
    } else {
      margin_.steps.push_back(line.text + ": " + display_signed(line.total / 1000, 2) + " kJ/mol");
    }
    if (entry.coefficient() != 1) {
      margin_.steps.push_back(coefficient_text(entry.term.coefficient) + " \u00d7 " + one(line.total) +
                              " = " + one(line.total * entry.coefficient()) + " kJ");
    }
    add_source(margin_, "bonds in context");
    if (line.unseen > 0) {
      add_section(
          margin_, "About this line",
          {"No compound of the table has these surroundings: the parent surroundings stand in, with a "
           "wider \u00b1."},
          NoteKind::Caution);
    }
    add_carriers(entry, *row.context);
    return true;
  }

  bool explain_run(const IdParts& id) {
    if (id[2] == "taken") return explain_taken("taken");
    const std::optional<std::size_t> index = id_index(id[2]);
    if (!index || *index >= ledger_.to_temperature.size()) return false;
    return explain_line(ledger_.to_temperature[*index]);
  }

  bool explain_measured_line(const IdParts& id) {
    const std::optional<std::size_t> index = id_index(id[2]);
    if (!index || *index >= ledger_.measured_lines.size()) return false;
    return explain_line(ledger_.measured_lines[*index]);
  }

  bool explain_line(const balance::Correction& line) {
    margin_.subject = line.what;
    margin_.steps = line.working;
    if (line.value) {
      margin_.steps.push_back("for the coefficients written: " + balance::kj_with_u95(*line.value, "kJ"));
      add_basis_step(*line.value);
    } else {
      add_section(margin_, "Why there is no value", {line.why_not}, NoteKind::Caution);
    }
    add_source(margin_, line.source);
    return true;
  }

  bool explain_as_run() {
    margin_.subject = "the figure at the temperatures of the run";
    const balance::Route* route = balance::find_route(ledger_, ledger_.taken);
    if (route != nullptr && route->as_written)
      margin_.steps.push_back("taken, 25 \u00b0C: " + balance::kj_with_u95(*route->as_written, "kJ"));
    for (const balance::Correction& line : ledger_.to_temperature) {
      margin_.steps.push_back(
          line.what + "  " +
          (line.value ? balance::fine_kj(line.value->value()) + " kJ" : "no value: " + line.why_not));
      add_source(margin_, line.source);
    }
    if (ledger_.as_run) {
      margin_.steps.push_back("as run: " + balance::kj_with_u95(*ledger_.as_run, "kJ"));
      add_basis_step(*ledger_.as_run);
    }
    add_section(margin_, "Cautions", ledger_.cautions, NoteKind::Caution);
    return true;
  }

  bool explain_sum(bool formed) {
    margin_.subject = formed ? "bonds formed" : "bonds broken";
    for (std::size_t i = 0; i < ledger_.rows.size(); ++i) {
      if (species(i).product != formed) continue;
      const balance::LedgerRow& row = ledger_.rows[i];
      margin_.steps.push_back(
          balance::display_species(species(i)) + "  " +
          (row.in_equation ? balance::ledger_kj(row.in_equation->value()) : std::string("no value")));
    }
    const std::optional<Quantity>& sum = formed ? ledger_.formed : ledger_.broken;
    if (sum) margin_.steps.push_back("sum " + balance::ledger_kj(sum->value()) + " kJ");
    add_source(margin_, ledger_.set->title());
    return true;
  }

  void add_basis_step(const Quantity& as_written) {
    const balance::Basis& basis = ledger_.basis;
    if (basis.kind == balance::Basis::Kind::AsWritten) return;
    const Quantity scaled = balance::on_basis(as_written, basis);
    std::string by;
    const balance::ReactionSpecies& entry = ledger_.reaction->species[basis.species];
    switch (basis.kind) {
      case balance::Basis::Kind::AsWritten:
        break;
      case balance::Basis::Kind::MoleOf:
        by = coefficient_text(entry.term.coefficient) + " mol";
        break;
      case balance::Basis::Kind::KilogramOf:
      case balance::Basis::Kind::KilogramOfReactants:
        by = machine_number(1 / basis.factor, 6) + " kg";
        break;
    }
    margin_.steps.push_back(basis.text + ": " + balance::ledger_kj(as_written.value()) + " / " + by + " = " +
                            balance::kj_with_u95(scaled, basis.unit));
  }

  bool explain_gas(bool on_basis) {
    margin_.subject = "bonds broken minus bonds formed, all as gas, 25 \u00b0C";
    if (ledger_.gas_298) {
      margin_.steps.push_back(balance::ledger_kj(ledger_.broken->value()) + " \u2212 " +
                              balance::ledger_kj(ledger_.formed->value()) + " = " +
                              balance::kj_with_u95(*ledger_.gas_298, "kJ"));
      if (on_basis) add_basis_step(*ledger_.gas_298);
    } else {
      add_missing_rows();
    }
    add_source(margin_, ledger_.set->title());
    add_why_different();
    return true;
  }

  void add_missing_rows() {
    std::vector<std::string> reasons;
    for (const balance::LedgerRow& row : ledger_.rows) {
      if (!row.per_mole) reasons.push_back(row.remark);
    }
    add_section(margin_, "Why there is no value", reasons, NoteKind::Caution);
  }

  bool explain_correction(const IdParts& id) {
    const std::optional<std::size_t> index = id_index(id[2]);
    if (!index || *index >= ledger_.corrections.size()) return false;
    const balance::Correction& correction = ledger_.corrections[*index];
    margin_.subject = correction.what;
    margin_.steps = correction.working;
    if (correction.value) add_basis_step(*correction.value);
    add_source(margin_, correction.source);
    if (!correction.value)
      add_section(margin_, "Why there is no value", {correction.why_not}, NoteKind::Caution);
    return true;
  }

  bool explain_as_written() {
    margin_.subject = "phases as written, 25 \u00b0C, by bonds";
    if (const balance::Route* route = balance::find_route(
            ledger_, ledger_.in_context ? balance::kContextRoute : balance::kAverageRoute)) {
      margin_.steps = route->working;
      if (!route->why_not.empty())
        add_section(margin_, "Why there is no value", {route->why_not}, NoteKind::Caution);
    }
    if (ledger_.as_written) add_basis_step(*ledger_.as_written);
    add_source(margin_, ledger_.set->title());
    for (const balance::Correction& correction : ledger_.corrections) add_source(margin_, correction.source);
    add_why_different();
    return true;
  }

  bool explain_taken(const std::string& which) {
    const balance::Route* route = balance::find_route(ledger_, ledger_.taken);
    margin_.subject =
        which == "taken" ? "the figure this sheet goes on with" : "the figure taken, " + mass_words(which);
    if (route == nullptr) {
      std::vector<std::string> reasons;
      for (const balance::Route& other : ledger_.routes)
        reasons.push_back(route_words(other.name) + ": " + other.why_not);
      add_section(margin_, "Why there is no value", reasons, NoteKind::Caution);
      return true;
    }
    margin_.steps = route->working;
    if (which == "taken") {
      add_basis_step(*route->as_written);
    } else {
      add_mass_step(which, *route->as_written);
    }
    if (route->name == balance::kContextRoute) add_carriers_of(*route);
    add_source(margin_, "by " + route_words(route->name) +
                            (sheet_.pinned_route != route->name ? ", the best route there is"
                                                                : ", pinned on this sheet"));
    add_why_different();
    return true;
  }

  std::string mass_words(const std::string& which) const {
    if (which == "per_kg_reactants") return "per kg of all reactants";
    return "per kg " + balance::display_species(ledger_.reaction->species[mass_species()]);
  }

  std::size_t mass_species() const {
    const balance::Basis::Kind kind = ledger_.basis.kind;
    const bool named = kind == balance::Basis::Kind::MoleOf || kind == balance::Basis::Kind::KilogramOf;
    return named ? ledger_.basis.species : 0;
  }

  void add_mass_step(const std::string& which, const Quantity& figure) {
    double mass = 0;
    for (std::size_t i = 0; i < ledger_.reaction->species.size(); ++i) {
      const balance::ReactionSpecies& entry = ledger_.reaction->species[i];
      if (which == "per_kg" ? i != mass_species() : entry.product) continue;
      const double part = entry.species->molar_mass * entry.coefficient();
      margin_.steps.push_back(balance::display_species(entry) + "  " +
                              coefficient_text(entry.term.coefficient) + " \u00d7 " +
                              machine_number(1000 * entry.species->molar_mass, 6) +
                              " g/mol = " + machine_number(part, 6) + " kg");
      mass += part;
    }
    if (mass <= 0) return;
    margin_.steps.push_back(balance::ledger_kj(figure.value()) + " / " + machine_number(mass, 6) +
                            " kg = " + balance::kj_with_u95(figure.scaled(1 / mass), "kJ/kg"));
  }

  bool explain_route(const std::string& name, bool gas) {
    const balance::Route* route = balance::find_route(ledger_, name);
    if (route == nullptr) return false;
    margin_.subject =
        route_words(name) + (gas ? ", all as gas, 25 \u00b0C" : ", phases as written, 25 \u00b0C");
    margin_.steps = route->working;
    const std::optional<Quantity>& figure = gas ? route->gas_298 : route->as_written;
    if (figure) add_basis_step(*figure);
    if (!route->why_not.empty()) add_section(margin_, "Where it ends", {route->why_not}, NoteKind::Info);
    add_carriers_of(*route);
    add_why_different();
    return true;
  }

  /// The species that part the routes, widest gap first, with what is known of their structures.
  void add_why_different() {
    const balance::Route* average = balance::find_route(ledger_, balance::kAverageRoute);
    const balance::Route* formation = balance::find_route(ledger_, balance::kFormationRoute);
    std::vector<std::string> texts;
    if (average != nullptr && formation != nullptr && average->gas_298 && formation->gas_298) {
      const double apart = average->gas_298->value() - formation->gas_298->value();
      texts.push_back("Average bonds give " + balance::kj_with_u95(*average->gas_298, "kJ") +
                      ", formation enthalpies " + balance::kj_with_u95(*formation->gas_298, "kJ") +
                      " for the gas: " + balance::ledger_kj(std::fabs(apart)) + " kJ apart.");
      if (!ledger_.in_context) add_gaps(texts);
    }
    add_section(margin_, "Why the routes differ", texts, NoteKind::Disagreement);
    add_section(margin_, "Cautions", ledger_.cautions, NoteKind::Caution);
  }

  void add_gaps(std::vector<std::string>& texts) const {
    struct Gap {
      std::size_t row;
      double joule;  ///< what it adds to broken − formed
    };
    std::vector<Gap> gaps;
    for (std::size_t i = 0; i < ledger_.rows.size(); ++i) {
      const balance::LedgerRow& row = ledger_.rows[i];
      if (!row.table || !row.per_mole) continue;
      const double sign = species(i).product ? -1 : 1;
      gaps.push_back({i, sign * species(i).coefficient() * (row.per_mole->value() - row.table->value())});
    }
    std::stable_sort(gaps.begin(), gaps.end(),
                     [](const Gap& a, const Gap& b) { return std::fabs(a.joule) > std::fabs(b.joule); });
    constexpr std::size_t kShown = 3;
    for (std::size_t i = 0; i < gaps.size() && i < kShown; ++i) {
      if (std::fabs(gaps[i].joule) < 1000) break;  // below a kJ there is nothing to explain
      std::string text =
          balance::display_species(species(gaps[i].row)) + ": " + signed_kj(gaps[i].joule, 0) + " kJ";
      for (const std::string& strain : ledger_.rows[gaps[i].row].strains) text += "; " + strain;
      texts.push_back(text + ".");
    }
  }

  const document::ReactionSheet& sheet_;
  const Ledger& ledger_;
  Margin& margin_;
};

void explain_balance(const balance::Reaction& reaction, Margin& margin) {
  margin.subject = "atoms on the left and on the right";
  if (!reaction.checkable) {
    margin.steps.emplace_back("A species has no formula: the balance cannot be checked.");
    return;
  }
  for (const molecule::ElementBalance& element : reaction.balance.elements) {
    const std::string name = element.key == -1 ? "charge" : std::string(molecule::symbol(element.key % 1000));
    margin.steps.push_back(name + "  " + machine_number(element.left, 6) +
                           (element.left == element.right ? " = " : " \u2260 ") +
                           machine_number(element.right, 6));
  }
  if (!reaction.why_unbalanced.empty()) {
    add_section(margin, "What is missing", {reaction.why_unbalanced}, NoteKind::Error);
  }
}

/// What a typed figure covers, with all that is published beside it.
void explain_figure(const document::ReadFigure& read, const document::TypedFigure& entry, Margin& margin) {
  margin.subject = read.species;
  if (!entry.from.empty()) add_source(margin, "site table " + entry.from);
  if (!read.published) return;
  const facts::Datum& datum = *read.published;
  const document::FigureName* name = document::find_typed_figure(entry.figure);
  if (name == nullptr) return;
  margin.steps.push_back("typed here: " + entry.value + (entry.source.empty() ? "" : ", " + entry.source));
  margin.steps.push_back("published, and covered by it: " + published_figure(datum.value, datum.u95, *name) +
                         ", " + std::string(datum.source));
  for (const facts::Rival& rival : datum.rivals) {
    margin.steps.push_back("another table: " + published_figure(rival.value, 0, *name) + ", " +
                           std::string(rival.source));
  }
  add_source(margin, std::string(datum.source));
}

bool is_figure(const std::string& hint) {
  return std::any_of(hint.begin(), hint.end(), [](char c) { return c >= '0' && c <= '9'; });
}

}  // namespace

Result<Margin> make_margin(const document::Worksheet& sheet, const document::Results& results,
                           const Cell& cell) {
  Margin margin;
  margin.cell = cell.id;
  margin.value = cell.text;
  // The hint of a blank for a figure is an example or a default, which must not read as if it had been typed.
  const bool blank = cell.origin == Origin::Typed && cell.text.empty();
  if (!is_figure(cell.hint)) {
    margin.subject = cell.hint;
  } else if (blank) {
    margin.subject = "nothing typed; to be written like " + cell.hint;
  }
  const IdParts id = split_id(cell.id);
  if (const std::size_t step = document::find_step(sheet, id[0]); step < sheet.steps.size()) {
    if (std::optional<Margin> found = step_margin(*sheet.steps[step], *results.steps[step], cell.id))
      return std::move(*found);
  }
  const std::size_t index = document::find_reaction(sheet, id[0]);
  if (index < sheet.reactions.size() && id.size() >= 2) {
    const document::ReactionResult& result = *results.reactions[index];
    if (id[1] == "balance" && result.reaction != nullptr) {
      explain_balance(*result.reaction, margin);
      return margin;
    }
    const balance::Ledger* ledger = result.shown();
    if (ledger != nullptr && cell.has_working) {
      LedgerMargin(*sheet.reactions[index], *ledger, margin).explain(id);
      return margin;
    }
  }
  if (id[0] == "fact" && id.size() == 3) {
    const std::optional<std::size_t> row = id_index(id[1]);
    if (row && *row < results.library->figures().size()) {
      explain_figure(results.library->figures()[*row], sheet.typed_figures->at(*row), margin);
      if (cell.id.compare(cell.id.size() - 9, 9, "published") == 0) return margin;
    }
  }
  if (cell.origin == Origin::Typed && !blank) margin.sources.emplace_back("typed on this sheet");
  return margin;
}

}  // namespace heatledger::page
