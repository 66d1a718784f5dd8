#include "core/page/step_blocks.hpp"

#include "core/base/number_text.hpp"
#include "core/document/step_kinds.hpp"
#include "core/molecule/equation.hpp"
#include "core/page/cells.hpp"
#include "core/page/findings_blocks.hpp"
#include "core/page/step_checker_blocks.hpp"
#include "core/page/step_figures.hpp"
#include "core/safety/cautions.hpp"
#include "core/step/words.hpp"

namespace heatledger::page {
namespace {

using document::StepSheet;
using step::StepResult;

/// Blanks that can be sought, with their words.
std::vector<std::pair<std::string, std::string>> seekable(const StepSheet& sheet) {
  const document::KindOfStep& kind = document::kind_of(sheet);
  if (!kind.sought.empty()) return {kind.sought.begin(), kind.sought.end()};
  std::vector<std::pair<std::string, std::string>> list{{"duty", "duty, heat to the process"},
                                                        {"outlet.temperature", "outlet or end temperature"},
                                                        {"loss", "heat loss"},
                                                        {"shaft", "shaft work"},
                                                        {"conductance", "UA of the surface"}};
  for (std::size_t f = 0; f < sheet.feeds.size(); ++f) {
    const document::FeedSheet& feed = sheet.feeds[f];
    const std::string id = "feed." + std::to_string(f),
                      name = feed.name.empty() ? "feed " + std::to_string(f + 1) : feed.name;
    list.push_back({id + ".temperature", "temperature of " + name});
    const bool excess = feed.total.find("excess ") != std::string::npos;
    if (!feed.total.empty()) list.push_back({id + ".total", (excess ? "excess in " : "amount of ") + name});
    for (std::size_t r = 0; r < feed.rows.size(); ++r)
      list.push_back({id + ".part." + std::to_string(r), feed.rows[r].species + " in " + name});
  }
  for (std::size_t j = 0; j < sheet.reactions.size(); ++j)
    list.push_back({"reaction." + std::to_string(j) + ".progress",
                    "progress of " + sheet.reactions[j].reaction + ", " + sheet.reactions[j].how});
  if (!kind.per_time) {
    list.push_back({"vessel.heat_capacity", "vessel and internals"});
    list.push_back({"time", "time for the cooling capacity"});
  }
  return list;
}

/// What is typed where the answer is sought stays, but is not used.
void mark_sought(Cell& cell) {
  cell.hint = "sought";
  cell.tone = Tone::Quiet;
  if (!cell.text.empty()) cell.text += " (sought; what is typed is not used)";
}

Cell choice_cell(std::string id, std::string text, std::vector<std::string> choices) {
  Cell cell = typed_cell(std::move(id), std::move(text), "", CellKind::Choice);
  cell.choices = std::move(choices);
  return cell;
}

class Blocks {
 public:
  explicit Blocks(const StepView& view)
      : view_(view),
        sheet_(view.sheet),
        kind_(document::kind_of(view.sheet)),
        result_(view.outcome.result.get()),
        findings_(view.outcome.findings.get()),
        id_(view.sheet.id) {}

  std::vector<Block> build() {
    const std::string kind = kind_.name;
    blocks_.push_back(heading_block(
        id_ + ".heading",
        "Step " + std::to_string(view_.number) + ": " + (sheet_.title.empty() ? kind : sheet_.title), kind));
    add(head());
    errors();
    add(answers());
    if (findings_ != nullptr) add_all(findings_groups(id_, *findings_));
    spread_covers();
    exact();
    add(feeds());
    if (kind_.profile) add(profile());
    if (kind_.reactions) add(reactions());
    add(dilutions());
    add(conditions());
    if (kind_.leaving) add(leaving());
    if (kind_.species) add(species());
    add(out());
    add_all(step_checker_blocks(view_));
    drawings();
    if (findings_ != nullptr) add_all(findings_charts(id_, *findings_));
    notes();
    return std::move(blocks_);
  }

 private:
  bool flow() const { return kind_.per_time; }

  void add_all(std::vector<Block> blocks) {
    for (Block& block : blocks) blocks_.push_back(std::move(block));
  }

  void add(Table table) {
    if (!table.rows.empty()) blocks_.push_back(std::move(table));
  }

  Table table(const char* name, TableLook look, std::vector<Column> columns) const {
    Table made;
    made.id = id_ + "." + name;
    made.look = look;
    made.columns = std::move(columns);
    return made;
  }

  void form_row(Table& form, const std::string& name, const std::string& label, Cell cell,
                bool screen_only = false) {
    Row row = row_of(id_ + "." + name + ".row");
    row.screen_only = screen_only;
    row.cells = {label_cell(label, Tone::Quiet), std::move(cell)};
    form.rows.push_back(std::move(row));
  }

  Table head() {
    Table form = table("head", TableLook::Form, {column("what", "", Align::Left, 0.35), column("value", "")});
    form_row(form, "title", "Title", typed_cell(id_ + ".title", sheet_.title, "what happens in this step"));
    std::vector<std::string> kinds;
    for (const document::KindOfStep& kind : document::kinds_of_step()) kinds.emplace_back(kind.name);
    form_row(form, "kind", "Kind of step", choice_cell(id_ + ".kind", kind_.name, std::move(kinds)));
    std::vector<std::string> blanks, drawn{"nothing"};
    for (const auto& entry : seekable(sheet_)) blanks.push_back(entry.second);
    drawn.insert(drawn.end(), blanks.begin(), blanks.end());
    const std::string sought = sheet_.sought.empty() ? seekable(sheet_).front().first : sheet_.sought;
    if (blanks.size() > 1)
      form_row(form, "sought", "Sought",
               choice_cell(id_ + ".sought", sought_words(sheet_, sought), std::move(blanks)));
    if (!kind_.sought.empty()) {
      form_row(form, "remove", "", button_cell(id_ + ".remove", "Remove this step"), true);
      return form;
    }
    form_row(
        form, "curve", "Drawn against",
        choice_cell(id_ + ".curve", sheet_.curve.empty() ? "nothing" : sought_words(sheet_, sheet_.curve),
                    std::move(drawn)),
        true);
    form_row(form, "show_checker", "Checker's column",
             choice_cell(id_ + ".show_checker", sheet_.show_checker ? "shown" : "not shown",
                         {"not shown", "shown"}),
             true);
    form_row(form, "remove", "", button_cell(id_ + ".remove", "Remove this step"), true);
    return form;
  }

  void errors() {
    for (std::size_t i = 0; i < view_.outcome.errors.size(); ++i) {
      const Error& error = view_.outcome.errors[i];
      std::string text = error.message;
      if (!error.hint.empty()) text += " " + error.hint;
      blocks_.push_back(note_block(id_ + ".error." + std::to_string(i), NoteKind::Error, std::move(text),
                                   cells_of(error.where)));
    }
  }

  /// The cell that an error's field path or blank id names.
  std::vector<std::string> cells_of(const std::string& where) const {
    std::string path = where.substr(0, where.find(','));
    std::string cell;
    for (const char c : path) {
      if (c == '[') {
        cell += '.';
      } else if (c != ']') {
        cell += c;
      }
    }
    const auto begins = [&](const char* with) {
      return cell.compare(0, std::string(with).size(), with) == 0;
    };
    if (begins("feeds.")) {
      cell = "feed." + cell.substr(6);
      if (const std::size_t rows = cell.find(".rows."); rows != std::string::npos)
        cell.replace(rows, 6, ".row.");
    } else if (begins("reactions.")) {
      cell = "reaction." + cell.substr(10);
    } else if (begins("blanks.")) {
      cell = "blank." + cell.substr(7);
    } else {
      for (const document::StepBlank& blank : document::step_blanks()) {
        if (cell == blank.id) return {id_ + ".blank." + cell};
      }
      if (!begins("leaving.") && !begins("species.") && !begins("profile.") && !begins("feed.") &&
          !begins("reaction."))
        return {};
      if (const std::size_t part = cell.find(".part."); part != std::string::npos) {
        cell.replace(part, 6, ".row.");
        cell += ".amount";
      }
      if (const std::size_t at = cell.find(".temperature"); at != std::string::npos)
        cell.replace(at, 12, ".at");
      if (const std::size_t at = cell.find(".progress"); at != std::string::npos)
        cell.replace(at, 9, ".figure");
    }
    return {id_ + "." + cell};
  }

  Table answers() {
    Table boxes = table(
        "answers", TableLook::Boxes,
        {column("what", ""), column("figure", "", Align::Right), column("unit", ""), column("u95", "")});
    if (result_ == nullptr) return boxes;
    for (std::size_t i = 0; i < result_->answers.size(); ++i) {
      const step::Answer& answer = result_->answers[i];
      const ShownFigure shown = shown_answer(answer);
      const std::string cell = id_ + ".answer." + std::to_string(i);
      Row row = row_of(cell + ".row");
      std::string label = answer.label;
      if (!answer.mark.empty()) label += ", " + answer.mark;
      row.cells = {label_cell(std::move(label), Tone::Quiet), figure_cell(cell, shown.value, Tone::Strong),
                   label_cell(shown.unit), label_cell(beside_answer(answer), Tone::Quiet)};
      boxes.rows.push_back(std::move(row));
    }
    return boxes;
  }

  /// What the ± does not cover stands under the figures that a safety file takes from here.
  void spread_covers() {
    bool safety = false;
    if (findings_ != nullptr) {
      for (const step::FindingGroup& group : findings_->groups) {
        for (const step::Finding& finding : group.findings)
          safety = safety || finding.unfavourable.has_value();
      }
    }
    if (result_ != nullptr) {
      for (const step::Answer& answer : result_->answers) safety = safety || is_for_safety(answer.id);
    }
    if (safety) blocks_.push_back(note_block(id_ + ".covers", NoteKind::Info, safety::what_spread_covers()));
  }

  /// How many inputs count as exact, and one entry that gives all of them a ±.
  void exact() {
    if (result_ == nullptr || result_->exact_inputs == 0) return;
    Table form =
        table("exact", TableLook::Form, {column("what", "", Align::Left, 0.35), column("value", "")});
    const bool one = result_->exact_inputs == 1;
    form_row(form, "exact",
             std::to_string(result_->exact_inputs) + (one ? " typed input taken as exact; give it a ±"
                                                          : " typed inputs taken as exact; give them a ±"),
             typed_cell(id_ + ".exact", view_.rejected == nullptr ? "" : view_.rejected->text,
                        "1 % or, for temperatures, 1 K", CellKind::Number),
             true);
    add(std::move(form));
    if (view_.rejected != nullptr) {
      blocks_.push_back(note_block(id_ + ".exact.rejected", NoteKind::Error,
                                   view_.rejected->error.message + " " + view_.rejected->error.hint,
                                   {id_ + ".exact"}));
    }
  }

  /// What a row of a feed brings, of air all its parts together; empty when there is no result.
  std::optional<step::StreamLine> fed(std::size_t feed, std::size_t row) const {
    if (result_ == nullptr || feed >= result_->model->input().feeds.size()) return std::nullopt;
    const std::vector<step::FeedPart>& parts = result_->model->input().feeds[feed].parts;
    std::optional<step::StreamLine> sum;
    std::size_t part = 0;
    for (const step::StreamLine& line : result_->in) {
      if (line.stream != feed || part >= parts.size() || parts[part++].row != row) continue;
      if (!sum) {
        sum = line;
        continue;
      }
      sum->amount += line.amount;
      sum->mass += line.mass;
      sum->heat += line.heat;
    }
    return sum;
  }

  std::vector<Cell> amounts(const step::StreamLine* line) const {
    if (line == nullptr) return {label_cell(""), label_cell(""), label_cell("")};
    Cell moles = label_cell(shown_amount(line->amount, flow())),
         mass = label_cell(shown_mass(line->mass, flow())), heat = label_cell(shown_heat(line->heat, flow()));
    for (Cell* cell : {&moles, &mass, &heat}) {
      cell->kind = CellKind::Number;
      cell->origin = Origin::Derived;
    }
    if (line->mass == 0 && line->amount != 0) mass.text = "–";
    return {std::move(moles), std::move(mass), std::move(heat)};
  }

  Table feeds() {
    Table list =
        table("feeds", TableLook::List,
              {column("what", "What goes in"), column("amount", "amount"), column("at", "temperature"),
               column("pressure", "pressure"), column("moles", flow() ? "kmol/h" : "kmol", Align::Right),
               column("mass", flow() ? "kg/h" : "kg", Align::Right),
               column("heat", std::string(heat_unit(flow())) + " from 25 °C", Align::Right)});
    const std::string& sought = sheet_.sought;
    for (std::size_t f = 0; f <= sheet_.feeds.size(); ++f) {
      const document::FeedSheet feed = f < sheet_.feeds.size() ? sheet_.feeds[f] : document::FeedSheet{};
      const std::string id = id_ + ".feed." + std::to_string(f);
      Row head = row_of(id + ".head");
      head.screen_only = f == sheet_.feeds.size();
      head.cells = {typed_cell(id + ".name", feed.name,
                               f == sheet_.feeds.size() ? "one more feed" : "name of the feed"),
                    typed_cell(id + ".total", feed.total, "with shares: its amount", CellKind::Number),
                    typed_cell(id + ".at", feed.at, "25 °C", CellKind::Number),
                    typed_cell(id + ".pressure", feed.pressure, "1 atm", CellKind::Number)};
      if (sought == "feed." + std::to_string(f) + ".total") mark_sought(head.cells[1]);
      if (sought == "feed." + std::to_string(f) + ".temperature") mark_sought(head.cells[2]);
      int free = 3;
      if (!kind_.roles.empty()) {
        std::vector<std::string> roles(kind_.roles.begin(), kind_.roles.end());
        const std::string role = feed.role.empty() ? roles.front() : feed.role;
        head.cells.push_back(choice_cell(id + ".role", role, std::move(roles)));
        --free;
      }
      if (view_.steps_above.empty()) {
        head.cells.push_back(label_cell("", Tone::Plain, free));
      } else {
        std::vector<std::string> sources{"own rows"};
        for (const std::string& above : view_.steps_above) sources.push_back("from " + above);
        Cell from = choice_cell(id + ".from", feed.from.empty() ? "own rows" : "from " + feed.from,
                                std::move(sources));
        from.span = free;
        head.cells.push_back(std::move(from));
      }
      list.rows.push_back(std::move(head));
      if (f == sheet_.feeds.size()) break;
      if (!feed.from.empty()) {
        carried_rows(list, f, id);
        continue;
      }
      for (std::size_t r = 0; r <= feed.rows.size(); ++r) {
        const document::FeedRow row_text = r < feed.rows.size() ? feed.rows[r] : document::FeedRow{};
        const std::string cell = id + ".row." + std::to_string(r);
        Row row = row_of(cell + ".line");
        row.screen_only = r == feed.rows.size();
        row.cells = {
            typed_cell(cell + ".species", row_text.species, "ethene(g)"),
            typed_cell(cell + ".amount", row_text.amount, flow() ? "12 kmol/h" : "340 kg", CellKind::Number),
            label_cell("", Tone::Plain, 2)};
        const std::optional<step::StreamLine> brought = fed(f, r);
        for (Cell& more : amounts(brought ? &*brought : nullptr)) row.cells.push_back(std::move(more));
        if (sought == "feed." + std::to_string(f) + ".part." + std::to_string(r)) mark_sought(row.cells[1]);
        list.rows.push_back(std::move(row));
      }
    }
    return list;
  }

  void carried_rows(Table& list, std::size_t feed, const std::string& id) {
    if (result_ == nullptr) return;
    std::size_t r = 0;
    for (const step::StreamLine& line : result_->in) {
      if (line.stream != feed) continue;
      Row row = row_of(id + ".carried." + std::to_string(r++));
      row.cells = {label_cell(species_words(line), Tone::Plain, 4)};
      for (Cell& more : amounts(&line)) row.cells.push_back(std::move(more));
      list.rows.push_back(std::move(row));
    }
  }

  std::string species_words(const step::StreamLine& line) const { return stream_species(*result_, line); }

  Table reactions() {
    Table list = table(
        "reactions", TableLook::List,
        {column("reaction", "What reacts"), column("how", "how far"), column("figure", ""),
         column("heat", "heat, if typed here"), column("extent", flow() ? "kmol/h" : "kmol", Align::Right),
         column("heat_25", "kJ/mol at 25 °C", Align::Right), column("u95", "±", Align::Right),
         column("free", std::string(heat_unit(flow())) + " set free at 25 °C", Align::Right)});
    if (view_.reactions.empty()) return list;
    for (std::size_t j = 0; j <= sheet_.reactions.size(); ++j) {
      const bool spare = j == sheet_.reactions.size();
      const document::ProgressSheet typed = spare ? document::ProgressSheet{} : sheet_.reactions[j];
      const std::string id = id_ + ".reaction." + std::to_string(j);
      Row row = row_of(id + ".line");
      row.screen_only = spare;
      std::vector<std::string> choices{"none"};
      choices.insert(choices.end(), view_.reactions.begin(), view_.reactions.end());
      row.cells = {
          choice_cell(id + ".reaction", typed.reaction.empty() ? "none" : typed.reaction, std::move(choices)),
          typed_cell(id + ".how", typed.how, "conversion of …"),
          typed_cell(id + ".figure", typed.figure, "92 %", CellKind::Number),
          typed_cell(id + ".heat", typed.heat, "as on the ledger", CellKind::Number)};
      if (sheet_.sought == "reaction." + std::to_string(j) + ".progress") mark_sought(row.cells[2]);
      if (result_ != nullptr && j < result_->reactions.size()) {
        const step::ReactionLine& line = result_->reactions[j];
        const ShownFigure heat = shown_figure({line.heat_25.value() / 1000, line.heat_25.u95() / 1000},
                                              units::dimension::kTemperatureDifference);
        row.cells.push_back(label_cell(shown_amount(line.extent, flow())));
        row.cells.push_back(figure_cell(id + ".heat_25", heat.value));
        row.cells.push_back(label_cell(heat.u95.empty() ? "" : heat.u95, Tone::Quiet));
        row.cells.push_back(figure_cell(id + ".free", shown_heat(line.set_free, flow())));
      } else {
        for (int i = 0; i < 4; ++i) row.cells.push_back(label_cell(""));
      }
      list.rows.push_back(std::move(row));
      if (kind_.rate_law && !spare) list.rows.push_back(rate_law(typed, id));
      if (typed.heat.empty()) continue;
      Row measured = row_of(id + ".measured", RowRole::Detail);
      Cell includes = choice_cell(id + ".includes", typed.includes.empty() ? "unknown" : typed.includes,
                                  {"yes", "no", "unknown"});
      includes.span = 2;
      measured.cells = {label_cell("per mole of", Tone::Quiet),
                        typed_cell(id + ".heat_per", typed.heat_per, "as written"),
                        label_cell("measured at", Tone::Quiet),
                        typed_cell(id + ".heat_at", typed.heat_at, "25 °C", CellKind::Number),
                        label_cell("holds mixing, evaporation, gas loss", Tone::Quiet, 2),
                        std::move(includes)};
      list.rows.push_back(std::move(measured));
    }
    return list;
  }

  static Row rate_law(const document::ProgressSheet& typed, const std::string& id) {
    Row row = row_of(id + ".rate", RowRole::Detail);
    Cell orders = typed_cell(id + ".orders", typed.orders, "1 in each reactant");
    orders.span = 2;
    row.cells = {label_cell("rate constant", Tone::Quiet),
                 typed_cell(id + ".rate_constant", typed.rate_constant, "none typed, or: as fast as dosed",
                            CellKind::Number),
                 label_cell("at", Tone::Quiet),
                 typed_cell(id + ".rate_at", typed.rate_at, "25 °C", CellKind::Number),
                 label_cell("activation energy", Tone::Quiet),
                 typed_cell(id + ".activation", typed.activation, "78 kJ/mol", CellKind::Number),
                 std::move(orders)};
    return row;
  }

  /// How much of the dosed feed has gone in by when.
  Table profile() {
    Table list = table("profile", TableLook::List,
                       {column("time", "Dosing: time since the start", Align::Left, 0.5),
                        column("amount", "gone in by then")});
    for (std::size_t i = 0; i <= sheet_.profile.size(); ++i) {
      const bool spare = i == sheet_.profile.size();
      const document::ProfileRow typed = spare ? document::ProfileRow{} : sheet_.profile[i];
      const std::string id = id_ + ".profile." + std::to_string(i);
      Row row = row_of(id + ".line");
      row.screen_only = spare;
      row.cells = {typed_cell(id + ".time", typed.time, "1.5 h", CellKind::Number),
                   typed_cell(id + ".amount", typed.amount, "40 %", CellKind::Number)};
      list.rows.push_back(std::move(row));
    }
    return list;
  }

  Table conditions() {
    Table form =
        table("conditions", TableLook::Form, {column("what", "", Align::Left, 0.35), column("value", "")});
    const std::string sought = sheet_.sought.empty() ? seekable(sheet_).front().first : sheet_.sought;
    for (const document::StepBlank& blank : document::step_blanks()) {
      if (std::string_view(blank.kinds).find(kind_.letter) == std::string_view::npos) continue;
      const auto typed = sheet_.blanks.find(blank.id);
      const std::string text = typed == sheet_.blanks.end() ? std::string() : typed->second;
      Cell cell = typed_cell(id_ + ".blank." + blank.id, text, blank.hint, CellKind::Number);
      if (sought == blank.id) mark_sought(cell);
      const bool screen_only = text.empty() && sought != blank.id;
      form_row(form, std::string("blank.") + blank.id, blank.label, std::move(cell), screen_only);
    }
    return form;
  }

  Table leaving() {
    Table list =
        table("leaving", TableLook::List,
              {column("species", "Leaves otherwise than written", Align::Left, 0.5), column("how", "how")});
    for (std::size_t i = 0; i <= sheet_.leaving.size(); ++i) {
      const bool spare = i == sheet_.leaving.size();
      const document::LeavingRow typed = spare ? document::LeavingRow{} : sheet_.leaving[i];
      const std::string id = id_ + ".leaving." + std::to_string(i);
      Row row = row_of(id + ".line");
      row.screen_only = spare;
      row.cells = {typed_cell(id + ".species", typed.species, "water"),
                   typed_cell(id + ".how", typed.how, "gas, liquid, saturation, 30 % vapour")};
      list.rows.push_back(std::move(row));
    }
    return list;
  }

  Table species() {
    Table list = table("species", TableLook::List,
                       {column("species", "Figures for this step"), column("heat_capacity", "heat capacity"),
                        column("density", "density"), column("vapour_pressure", "vapour pressure"),
                        column("molar_mass", "molar mass, of a code name")});
    for (std::size_t i = 0; i <= sheet_.species.size(); ++i) {
      const bool spare = i == sheet_.species.size();
      const document::SpeciesRow typed = spare ? document::SpeciesRow{} : sheet_.species[i];
      const std::string id = id_ + ".species." + std::to_string(i);
      Row row = row_of(id + ".line");
      row.screen_only = spare;
      row.cells = {typed_cell(id + ".species", typed.species, "a species or code name"),
                   typed_cell(id + ".heat_capacity", typed.heat_capacity, "2.1 kJ/(kg K)", CellKind::Number),
                   typed_cell(id + ".density", typed.density, "870 kg/m3", CellKind::Number),
                   typed_cell(id + ".vapour_pressure", typed.vapour_pressure, "4 kPa", CellKind::Number),
                   typed_cell(id + ".molar_mass", typed.molar_mass, "312 g/mol", CellKind::Number)};
      list.rows.push_back(std::move(row));
    }
    return list;
  }

  /// What dissolves, dilutes or concentrates, each on a line of its own.
  Table dilutions() {
    Table list = table("dilutions", TableLook::List,
                       {column("what", "What dissolves"), column("before", "wt% as fed", Align::Right),
                        column("after", "wt% as it leaves", Align::Right),
                        column("free", std::string(heat_unit(flow())) + " set free", Align::Right)});
    if (result_ == nullptr) return list;
    for (std::size_t i = 0; i < result_->dilutions.size(); ++i) {
      const step::DilutionLine& line = result_->dilutions[i];
      Row row = row_of(id_ + ".dilution." + std::to_string(i));
      row.cells = {label_cell(line.words),
                   label_cell(line.before >= 1 ? "pure" : display_number(100 * line.before, 1)),
                   label_cell(line.after > 0 ? display_number(100 * line.after, 1) : "–"),
                   label_cell(shown_heat(line.set_free, flow()))};
      list.rows.push_back(std::move(row));
    }
    return list;
  }

  Table out() {
    Table list =
        table("out", TableLook::List,
              {column("what", "What leaves"), column("at", "", Align::Right),
               column("moles", flow() ? "kmol/h" : "kmol", Align::Right),
               column("mass", flow() ? "kg/h" : "kg", Align::Right),
               column("heat", std::string(heat_unit(flow())) + " from 25 °C", Align::Right),
               column("enthalpy", std::string(heat_unit(flow())) + " with formation", Align::Right)});
    if (result_ == nullptr) return list;
    double mass = 0, heat = 0;
    for (std::size_t i = 0; i < result_->out.size(); ++i) {
      const step::StreamLine& line = result_->out[i];
      Row row = row_of(id_ + ".out." + std::to_string(i));
      row.cells = {label_cell(species_words(line)), label_cell(step::celsius(line.temperature), Tone::Quiet)};
      for (Cell& more : amounts(&line)) row.cells.push_back(std::move(more));
      row.cells.push_back(label_cell(line.enthalpy ? shown_heat(*line.enthalpy, flow()) : "–", Tone::Quiet));
      list.rows.push_back(std::move(row));
      mass += line.mass;
      heat += line.heat;
    }
    Row total = row_of(id_ + ".out.total", RowRole::Result);
    total.cells = {label_cell("Leaves in all", Tone::Strong, 3),
                   label_cell(shown_mass(mass, flow()), Tone::Strong),
                   label_cell(shown_heat(heat, flow()), Tone::Strong), label_cell("")};
    list.rows.push_back(std::move(total));
    Row closing = row_of(id_ + ".out.closing", RowRole::Detail);
    closing.cells = {
        label_cell(result_->closure.sentence, result_->closure.heat_closes ? Tone::Good : Tone::Caution, 6)};
    list.rows.push_back(std::move(closing));
    return list;
  }

  void drawings() {
    if (result_ == nullptr) return;
    Drawing bands = heat_bands(id_ + ".bands", *result_);
    if (!bands.strokes.empty()) {
      blocks_.push_back(heading_block(id_ + ".bands.heading", "Where the heat comes from and goes",
                                      std::string(heat_unit(flow())) + " from 25 °C"));
      blocks_.push_back(std::move(bands));
    }
    Drawing curve = answer_curve(id_ + ".curve.drawing", view_.outcome);
    if (!curve.strokes.empty()) {
      std::string words = result_->answers.front().label;
      words[0] = static_cast<char>(words[0] >= 'a' && words[0] <= 'z' ? words[0] - 'a' + 'A' : words[0]);
      blocks_.push_back(heading_block(id_ + ".curve.heading", words + " against " + view_.outcome.curve_label,
                                      "with its ±"));
      blocks_.push_back(std::move(curve));
    }
  }

  void notes() {
    std::size_t n = 0;
    const auto add_note = [&](NoteKind kind, const std::string& text) {
      blocks_.push_back(note_block(id_ + ".note." + std::to_string(n++), kind, text));
    };
    if (result_ == nullptr && findings_ == nullptr) {
      if (sheet_.feeds.empty())
        add_note(NoteKind::Info,
                 "Name a feed and what it brings; the balance follows as soon as it is complete.");
      return;
    }
    if (result_ != nullptr) {
      for (const std::string& caution : result_->cautions) add_note(NoteKind::Caution, caution);
    }
    if (findings_ != nullptr) {
      for (const std::string& caution : findings_->cautions) add_note(NoteKind::Caution, caution);
    }
    for (const std::string& note : view_.outcome.notes) add_note(NoteKind::Info, note);
    if (result_ != nullptr) {
      for (const std::string& note : result_->notes) add_note(NoteKind::Info, note);
    }
    if (findings_ != nullptr) {
      for (const std::string& note : findings_->notes) add_note(NoteKind::Info, note);
    }
    if (!sheet_.note.empty()) add_note(NoteKind::Info, sheet_.note);
  }

  const StepView& view_;
  const StepSheet& sheet_;
  const document::KindOfStep& kind_;
  const StepResult* result_;
  const step::Findings* findings_;
  std::string id_;
  std::vector<Block> blocks_;
};

}  // namespace

std::vector<Block> step_blocks(const StepView& view) {
  return Blocks(view).build();
}

std::vector<Block> step_convention_blocks(const std::set<std::string>& kinds) {
  Table table;
  table.id = "step_conventions";
  table.columns = {column("text", "")};
  bool batch = false;
  for (const document::KindOfStep& kind : document::kinds_of_step())
    batch = batch || (!kind.per_time && kinds.count(kind.name) > 0);
  std::vector<std::string> lines =
      step::step_conventions(batch ? step::StepKind::Charge : step::StepKind::ThroughFlow);
  for (const document::KindOfStep& kind : document::kinds_of_step()) {
    if (kind.conventions == nullptr || kinds.count(kind.name) == 0) continue;
    for (std::string& line : kind.conventions()) lines.push_back(std::move(line));
  }
  for (const std::string& line : lines) {
    Row row = row_of("step_convention." + std::to_string(table.rows.size()));
    row.cells = {label_cell(line, Tone::Quiet)};
    table.rows.push_back(std::move(row));
  }
  return {heading_block("step_conventions.heading", "Conventions of the steps"), std::move(table)};
}

std::vector<Block> add_step_blocks() {
  Table table;
  table.id = "steps.add";
  table.look = TableLook::Form;
  Row row = row_of("steps.add.row");
  row.screen_only = true;
  for (const document::KindOfStep& kind : document::kinds_of_step()) {
    const std::string letter(1, kind.letter);
    table.columns.push_back(column(letter, ""));
    row.cells.push_back(button_cell("steps.add." + letter, kind.button));
  }
  table.rows.push_back(std::move(row));
  return {std::move(table)};
}

std::string sought_words(const StepSheet& sheet, const std::string& id) {
  for (const auto& entry : seekable(sheet)) {
    if (entry.first == id) return entry.second;
  }
  return id;
}

std::string sought_from_words(const StepSheet& sheet, const std::string& words) {
  for (const auto& entry : seekable(sheet)) {
    if (entry.second == words) return entry.first;
  }
  return words;
}

std::optional<Margin> step_margin(const StepSheet& sheet, const document::StepOutcome& outcome,
                                  const std::string& cell) {
  if (outcome.findings != nullptr) {
    if (std::optional<Margin> found = findings_margin(sheet.id, *outcome.findings, cell)) return found;
  }
  if (outcome.result == nullptr) return std::nullopt;
  const StepResult& result = *outcome.result;
  Margin margin;
  margin.cell = cell;
  const std::string stem = sheet.id + ".";
  for (std::size_t i = 0; i < result.answers.size(); ++i) {
    if (cell != stem + "answer." + std::to_string(i)) continue;
    const step::Answer& answer = result.answers[i];
    const ShownFigure shown = shown_answer(answer);
    margin.value = shown.value + (shown.u95.empty() ? "" : " " + shown.u95) +
                   (shown.unit.empty() ? "" : " " + shown.unit);
    margin.subject = answer.label + (answer.mark.empty() ? "" : ", " + answer.mark);
    margin.steps = answer.working;
    Margin::Section shares;
    shares.heading = "Which inputs carry the ±";
    constexpr std::size_t kMost = 6;
    for (std::size_t s = 0; s < answer.shares.size() && s < kMost; ++s) {
      if (answer.shares[s].share < 0.005) break;
      shares.notes.push_back(note_block(cell + ".share." + std::to_string(s), NoteKind::Info,
                                        result.model->slots()[answer.shares[s].slot].label + ": " +
                                            display_number(100 * answer.shares[s].share, 0) + " %"));
    }
    if (const std::string drawn = drawn_text(answer); !drawn.empty())
      shares.notes.push_back(note_block(cell + ".drawn", NoteKind::Info, drawn));
    if (!shares.notes.empty()) margin.sections.push_back(std::move(shares));
    return margin;
  }
  for (std::size_t j = 0; j < result.reactions.size(); ++j) {
    const step::ReactionLine& line = result.reactions[j];
    const step::StepReaction& reaction = result.model->input().reactions[j];
    const bool flow = result.model->input().kind == step::StepKind::ThroughFlow;
    const std::string id = stem + "reaction." + std::to_string(j);
    if (cell != id + ".heat_25" && cell != id + ".free") continue;
    margin.subject = reaction.name;
    margin.value = cell == id + ".free" ? step::heat_text(line.set_free, flow)
                                        : display_number(line.heat_25.value() / 1000, 2) + " kJ/mol";
    margin.steps = {
        "heat at 25 °C, phases as written: " + display_number(line.heat_25.value() / 1000, 2) + " kJ/mol",
        "at the outlet temperature: " + display_number(line.heat_at_end / 1000, 2) + " kJ/mol",
        "extent " + step::amount_text(line.extent, flow),
        "set free at 25 °C: " + step::heat_text(line.set_free, flow)};
    margin.sources = {reaction.heat.source};
    return margin;
  }
  return std::nullopt;
}

}  // namespace heatledger::page
