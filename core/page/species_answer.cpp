#include <utility>

#include "core/page/answer_text.hpp"
#include "core/page/answers.hpp"
#include "core/page/json_text.hpp"
#include "core/page/species_json.hpp"

namespace heatledger::page {
namespace {

enum class Scale : std::uint8_t { Kilojoules, AsIs };

void write_stated(JsonText& json, const StatedFigure& stated, Scale scale) {
  if (!stated.figure) {
    json.key("value").null().key("u95").null().key("reason").string(stated.reason);
    return;
  }
  const double divisor = scale == Scale::Kilojoules ? 1000 : 1;
  json.key("value").number(stated.figure->value / divisor).key("u95").number(stated.figure->u95 / divisor);
  json.key("route").string(stated.route).key("source").string(stated.source);
}

void write_stated(JsonText& json, std::string_view name, const StatedFigure& stated, Scale scale) {
  json.key(name).open_object();
  write_stated(json, stated, scale);
  json.close_object();
}

void write_bonds(JsonText& json, std::string_view name, const molecule::BondTally& tally, bool plain) {
  json.key(name).open_array();
  for (const molecule::BondCount& bond : tally) {
    json.open_object().key("bond");
    json.string(plain ? molecule::plain_spelling(bond.type) : molecule::spelling(bond.type));
    json.key("count").integer(bond.count).close_object();
  }
  json.close_array();
}

void write_texts(JsonText& json, std::string_view name, const std::vector<std::string>& texts) {
  json.key(name).open_array();
  for (const std::string& text : texts) json.string(text);
  json.close_array();
}

void write_text_or_null(JsonText& json, std::string_view name, std::string_view text) {
  json.key(name);
  if (text.empty()) {
    json.null();
  } else {
    json.string(text);
  }
}

}  // namespace

void write_species_keys(JsonText& json, const SpeciesFigures& figures) {
  const facts::Species& species = *figures.species;
  json.key("name").string(species.name);
  write_text_or_null(json, "cas", species.compound != nullptr ? species.compound->cas : std::string_view());
  write_text_or_null(json, "smiles", species.canonical);
  write_text_or_null(json, "formula",
                     species.composition ? molecule::hill_formula(*species.composition) : std::string());
  json.key("molar_mass_g_mol");
  if (species.molar_mass > 0) {
    json.number(species.molar_mass * 1000);
  } else {
    json.null();
  }
  write_stated(json, "gas_formation", figures.gas_formation, Scale::Kilojoules);
  write_stated(json, "vaporisation_298", figures.vaporisation_298, Scale::Kilojoules);
  write_stated(json, "liquid_formation", figures.liquid_formation, Scale::Kilojoules);
  write_stated(json, "solid_formation", figures.solid_formation, Scale::Kilojoules);
  if (figures.average_gas_formation) {
    write_stated(json, "average_gas_formation", *figures.average_gas_formation, Scale::Kilojoules);
  }
  json.key("cp_gas").open_array();
  for (const HeatCapacityAt& point : figures.cp_gas) {
    json.open_object().key("T").number(point.temperature);
    write_stated(json, point.figure, Scale::AsIs);
    json.close_object();
  }
  json.close_array();
  write_stated(json, "cp_liquid_298", figures.cp_liquid_298, Scale::AsIs);
  write_bonds(json, "bonds", molecule::plain_tally(species.bonds), true);
  write_bonds(json, "bonds_ledger", species.bonds, false);
  write_texts(json, "notes", figures.notes);
  write_texts(json, "cautions", figures.cautions);
}

Result<Answer> answer_species(const SpeciesQuestion& question, AnswerShape shape,
                              balance::SpeciesSource& source) {
  Result<std::shared_ptr<const facts::Species>> species = source.species(question.species, question.smiles);
  if (!species.ok()) return species.error();
  const SpeciesFigures figures = species_figures(std::move(species.value()), question.estimate_only);
  if (shape == AnswerShape::Text) return Answer{species_text(figures), std::nullopt};
  std::string text;
  JsonText json(text);
  json.open_object();
  write_species_keys(json, figures);
  json.close_object();
  text += '\n';
  return Answer{std::move(text), std::nullopt};
}

}  // namespace heatledger::page
