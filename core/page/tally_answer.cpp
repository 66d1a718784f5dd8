#include <memory>
#include <utility>

#include "core/balance/ledger.hpp"
#include "core/document/computation.hpp"
#include "core/document/typed_bonds.hpp"
#include "core/estimate/bond_set.hpp"
#include "core/file/site_table.hpp"
#include "core/page/answer_text.hpp"
#include "core/page/answers.hpp"
#include "core/page/tally_figures.hpp"
#include "core/units/quantity_text.hpp"

namespace heatledger::page {
namespace {

/// Hands every species on as SMILES, for equations that hold nothing else.
class QuotedSpecies : public balance::SpeciesSource {
 public:
  explicit QuotedSpecies(balance::SpeciesSource& source) : source_(source) {}
  Result<std::shared_ptr<const facts::Species>> species(std::string_view text, bool) override {
    return source_.species(text, true);
  }

 private:
  balance::SpeciesSource& source_;
};

std::string_view side_text(bool product) {
  return product ? "product" : "reactant";
}

std::string_view route_text(balance::RowRoute route) {
  switch (route) {
    case balance::RowRoute::Bonds:
      return "bonds";
    case balance::RowRoute::AtomsFromElement:
      return "atoms from the element";
    case balance::RowRoute::Formation:
      return "formation";
    case balance::RowRoute::Missing:
      return "missing";
  }
  return "missing";
}

MaybeFigure figure_of(const std::optional<uncertainty::Quantity>& quantity) {
  if (!quantity) return std::nullopt;
  return quantity->figure();
}

std::string missing_reason(const balance::LedgerRow& row) {
  if (row.missing.empty()) return row.remark.empty() ? "no structure and no formation enthalpy" : row.remark;
  std::string text = "no value in the bond set for ";
  for (std::size_t i = 0; i < row.missing.size(); ++i) {
    if (i > 0) text += ", ";
    text += molecule::spelling(row.missing[i]);
  }
  return text;
}

/// Why a total of the ledger is empty: the rows without a bond sum, named.
std::string columns_reason(const balance::Ledger& ledger) {
  std::string text;
  for (const balance::LedgerRow& row : ledger.rows) {
    if (row.in_equation) continue;
    if (!text.empty()) text += "; ";
    text += ledger.reaction->species[row.species].species->name + ": " + missing_reason(row);
  }
  return text;
}

std::string corrections_reason(const balance::Ledger& ledger) {
  std::string text;
  for (const balance::Correction& line : ledger.corrections) {
    if (line.value) continue;
    if (!text.empty()) text += "; ";
    text += line.what + ": " + line.why_not;
  }
  return text.empty() ? columns_reason(ledger) : text;
}

/// One type of bond of a line; the joined line of a nitro group gives two.
void write_bond(JsonText& json, const balance::BondLine& line, const molecule::BondType& type, int count,
                const estimate::BondValue* price) {
  json.open_object();
  json.key("bond").string(molecule::spelling(type));
  json.key("label").string(line.label);
  json.key("count").integer(count);
  json.key("each");
  if (price != nullptr) {
    json.number(price->value / 1000).key("each_u95").number(price->u95 / 1000);
    json.key("subtotal").number(count * price->value / 1000).key("source").string(price->source);
  } else {
    json.null().key("each_u95").null().key("subtotal").null().key("source").null();
  }
  if (!line.remark.empty()) json.key("remark").string(line.remark);
  json.close_object();
}

/// A line of a row in context: bonds of one kind in one kind of surroundings, or what stands on no bond.
void write_context_line(JsonText& json, const estimate::ContextLine& line) {
  json.open_object();
  if (line.bond.empty()) {
    json.key("bond").null();
  } else {
    json.key("bond").string(line.bond);
  }
  json.key("label").string(line.text);
  json.key("count").number(line.count);
  json.key("base").number(line.base / 1000).key("surroundings").number(line.surroundings / 1000);
  json.key("subtotal").number(line.total / 1000);
  if (line.unseen > 0) json.key("unseen").boolean(true);
  json.close_object();
}

/// The compounds of the table that an estimate rests on, greatest weight first.
void write_carriers(JsonText& json, const estimate::Explanation& explanation) {
  json.key("carried_by").open_array();
  for (const estimate::ReferenceRow& row : explanation.rows) {
    json.open_object().key("name").string(row.name).key("smiles").string(row.smiles);
    json.key("value").number(row.value / 1000).key("u95").number(row.u95 / 1000);
    json.key("weight").number(row.weight).key("source").string(row.sources).close_object();
  }
  json.close_array();
}

void write_row(JsonText& json, const balance::Ledger& ledger, const balance::LedgerRow& row) {
  const balance::ReactionSpecies& entry = ledger.reaction->species[row.species];
  json.open_object();
  json.key("side").string(side_text(entry.product));
  json.key("coefficient").number(entry.coefficient());
  json.key("species").string(entry.species->name);
  json.key("phase").string(molecule::phase_text(entry.term.phase));
  json.key("formula");
  if (entry.species->composition) {
    json.string(molecule::hill_formula(*entry.species->composition));
  } else {
    json.null();
  }
  json.key("smiles");
  if (entry.species->canonical.empty()) {
    json.null();
  } else {
    json.string(entry.species->canonical);
  }
  json.key("route").string(route_text(row.route));
  const std::string reason = row.per_mole ? std::string() : missing_reason(row);
  json.key("per_mole");
  write_kilojoules(json, figure_of(row.per_mole), reason);
  json.key("in_equation");
  write_kilojoules(json, figure_of(row.in_equation), reason);
  json.key("table");
  write_kilojoules(json, figure_of(row.table));
  if (row.table) json.key("table_source").string(row.table_source);
  json.key("bonds").open_array();
  for (const balance::BondLine& line : row.lines) {
    write_bond(json, line, line.type, line.count, line.price);
    if (line.second) write_bond(json, line, line.second->type, line.second->count, line.second->price);
  }
  if (row.context != nullptr) {
    for (const estimate::ContextLine& line : row.context->lines) write_context_line(json, line);
  }
  json.close_array();
  if (row.context != nullptr) write_carriers(json, *row.context);
  if (!row.remark.empty()) json.key("remark").string(row.remark);
  json.close_object();
}

void write_texts(JsonText& json, std::string_view name, const std::vector<std::string>& texts) {
  json.key(name).open_array();
  for (const std::string& text : texts) json.string(text);
  json.close_array();
}

void write_basis(JsonText& json, const balance::Ledger& ledger, const TallyFigures& figures) {
  json.key("per_mole_of");
  const balance::Basis& basis = ledger.basis;
  const bool names_species =
      basis.kind == balance::Basis::Kind::MoleOf || basis.kind == balance::Basis::Kind::KilogramOf;
  json.open_object().key("species");
  if (names_species) {
    json.string(ledger.reaction->species[basis.species].species->name);
  } else {
    json.null();
  }
  const MaybeFigure& whole = figures.taken ? figures.taken : figures.as_written;
  if (whole) {
    json.key("value").number(whole->value * basis.factor / 1000);
    json.key("u95").number(whole->u95 * basis.factor / 1000);
  } else {
    json.key("value").null().key("u95").null().key("reason").string(corrections_reason(ledger));
  }
  json.key("basis").string(basis.text).key("unit").string(basis.unit);
  json.close_object();
}

/// Each line {what, value, u95, source} in kJ, or with null and the reason.
void write_lines(JsonText& json, std::string_view name, const std::vector<balance::Correction>& lines) {
  json.key(name).open_array();
  for (const balance::Correction& line : lines) {
    json.open_object().key("what").string(line.what);
    if (line.value) {
      json.key("value").number(line.value->value() / 1000).key("u95").number(line.value->u95() / 1000);
      json.key("source").string(line.source);
    } else {
      json.key("value").null().key("u95").null().key("reason").string(line.why_not);
    }
    json.close_object();
  }
  json.close_array();
}

std::string as_run_reason(const balance::Ledger& ledger) {
  if (ledger.to_temperature.empty()) return "no temperatures were given";
  for (const balance::Correction& line : ledger.to_temperature) {
    if (!line.value) return line.what + ": " + line.why_not;
  }
  return "no figure to take as written";
}

std::string context_reason(const balance::Ledger& ledger) {
  const balance::Route* route = balance::find_route(ledger, balance::kContextRoute);
  return route != nullptr ? route->why_not : "no estimate by bonds in context for this equation";
}

std::string ledger_json(const balance::Ledger& ledger, BondRoute by) {
  const balance::Reaction& reaction = *ledger.reaction;
  const bool context = by == BondRoute::Context;
  const TallyFigures figures = tally_figures(ledger);
  std::string text;
  JsonText json(text);
  json.open_object();
  json.key("balanced").boolean(reaction.balance.balanced);
  json.key("equation").string(balance::plain_equation(reaction));
  write_columns(json, figures);
  json.key("gas_298");
  write_kilojoules(json, figures.gas_298, context ? context_reason(ledger) : columns_reason(ledger));
  write_lines(json, "corrections", ledger.corrections);
  json.key("as_written");
  write_kilojoules(json, figures.as_written, context ? context_reason(ledger) : corrections_reason(ledger));
  write_lines(json, "to_temperature", ledger.to_temperature);
  json.key("as_run");
  write_kilojoules(json, figure_of(ledger.as_run), as_run_reason(ledger));
  write_basis(json, ledger, figures);
  json.key("routes").open_object();
  write_routes(json, figures);
  json.close_object();
  json.key("route_reasons").open_object();
  for (const balance::Route& route : ledger.routes) {
    if (!route.as_written && route.name != balance::kContextRoute) json.key(route.name).string(route.why_not);
  }
  if (!figures.context) json.key("context").string(context_reason(ledger));
  json.close_object();
  json.key("bond_set").string(context ? "bonds in context" : ledger.set->title());
  json.key("rows").open_array();
  for (const balance::LedgerRow& row : ledger.rows) write_row(json, ledger, row);
  json.close_array();
  write_texts(json, "notes", ledger.notes);
  write_texts(json, "cautions", ledger.cautions);
  json.close_object();
  text += '\n';
  return text;
}

/// An equation that does not balance has no ledger: the element count and every way to balance it instead.
std::string unbalanced_json(const balance::Reaction& reaction, const Error& error) {
  std::string text;
  JsonText json(text);
  json.open_object();
  json.key("balanced").boolean(false);
  json.key("equation").string(balance::plain_equation(reaction));
  json.key("elements").open_array();
  for (const molecule::ElementBalance& element : reaction.balance.elements) {
    json.open_object().key("element").string(element_text(element.key));
    json.key("left").number(element.left).key("right").number(element.right).close_object();
  }
  json.close_array();
  write_texts(json, "proposals", reaction.proposals);
  json.key("error");
  write_error(json, error);
  json.close_object();
  text += '\n';
  return text;
}

}  // namespace

Result<Answer> answer_tally(const TallyQuestion& question, AnswerShape shape,
                            balance::SpeciesSource& source) {
  std::unique_ptr<document::SheetLibrary> site;
  document::TypedBonds site_bonds;
  if (!question.site_table.empty()) {
    Result<file::SiteTable> table = file::read_site_table(question.site_table);
    if (!table.ok()) return table.error();
    site = std::make_unique<document::SheetLibrary>(table->figures);
    site_bonds = std::move(table->bonds);
  }
  balance::SpeciesSource& known = site != nullptr ? static_cast<balance::SpeciesSource&>(*site) : source;
  QuotedSpecies quoted(known);
  balance::SpeciesSource& reader = question.smiles ? static_cast<balance::SpeciesSource&>(quoted) : known;
  Result<balance::Reaction> read = balance::read_reaction(question.equation, reader);
  if (!read.ok()) return read.error();
  const auto reaction = std::make_shared<const balance::Reaction>(std::move(read.value()));

  const std::string_view set_name =
      question.set.empty() ? std::string_view(estimate::BondSet::names().front()) : question.set;
  Result<estimate::BondSet> set = estimate::BondSet::published(set_name);
  if (!set.ok()) return set.error();
  for (const estimate::BondValue& value : document::read_typed_bonds(site_bonds).values) set->lay_over(value);
  balance::LedgerOptions options;
  options.set = std::make_shared<const estimate::BondSet>(std::move(set.value()));
  options.basis = std::string(question.basis);
  options.context = balance::ContextUse::Always;
  options.context_rows = question.route == BondRoute::Context;
  const auto read_temperature = [](std::string_view typed, std::string_view name,
                                   std::optional<double>& kelvin) -> Status {
    if (typed.empty()) return success();
    const Result<units::TypedValue> value = units::parse_quantity(typed, units::dimension::kTemperature);
    if (!value.ok()) {
      Error error = value.error();
      error.where = std::string(name) + ", " + error.where;
      return error;
    }
    kelvin = value->value;
    return success();
  };
  if (const Status status = read_temperature(question.reactants_at, "reactants_at", options.reactants_at);
      !status.ok())
    return status.error();
  if (const Status status = read_temperature(question.products_at, "products_at", options.products_at);
      !status.ok())
    return status.error();
  Result<balance::Ledger> ledger = balance::make_ledger(reaction, options);
  if (!ledger.ok()) {
    if (ledger.error().code != "ledger.not_balanced") return ledger.error();
    const Error& error = ledger.error();
    std::string text =
        shape == AnswerShape::Json ? unbalanced_json(*reaction, error) : unbalanced_text(*reaction);
    return Answer{std::move(text), error};
  }
  std::string text = shape == AnswerShape::Json ? ledger_json(*ledger, question.route) : ledger_text(*ledger);
  return Answer{std::move(text), std::nullopt};
}

}  // namespace heatledger::page
