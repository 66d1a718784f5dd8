#include "core/file/step_file.hpp"
#include "core/file/worksheet_file.hpp"
#include "core/file/writer.hpp"

namespace heatledger::file {
namespace {

Json reaction_json(const document::ReactionSheet& reaction) {
  Writer out;
  out.texts(kReaction, reaction);
  Json measured = record_json(reaction.measured, kHeat);
  if (!measured.members().empty()) out.value("measured", std::move(measured));
  out.text("note", reaction.note);
  out.flag("show_profile", reaction.show_profile);
  out.flag("show_checker", reaction.show_checker);
  out.flag("show_measured", reaction.show_measured);
  out.texts("checker", reaction.checker);
  return out.finish(reaction.unknown);
}

Json results_json(const SavedResults& results) {
  Writer out;
  out.text("digest", results.digest);
  out.texts("figures", results.figures);
  return out.finish({});
}

}  // namespace

std::string write_worksheet(const document::Worksheet& sheet, const SavedResults& results) {
  Writer out;
  out.text("format", std::string(kWorksheetFormat));
  out.value("version", Json::number(std::to_string(kWorksheetVersion)));
  const Json header = record_json(*sheet.header, kHeader);
  if (!header.members().empty()) out.value("header", header);
  Json reactions = Json::array();
  for (const auto& reaction : sheet.reactions) reactions.items().push_back(reaction_json(*reaction));
  out.list("reactions", std::move(reactions), *sheet.misfits);
  Json steps = Json::array();
  for (const auto& step : sheet.steps) steps.items().push_back(step_json(*step));
  out.list("steps", std::move(steps), *sheet.misfits);
  Json bonds = Json::array();
  for (const auto& bond : *sheet.typed_bonds) bonds.items().push_back(record_json(bond, kBond));
  out.list("bonds", std::move(bonds), *sheet.misfits);
  Json species = Json::array();
  for (const auto& figure : *sheet.typed_figures) species.items().push_back(record_json(figure, kFigure));
  out.list("species", std::move(species), *sheet.misfits);
  Json quantities = Json::array();
  for (const auto& quantity : *sheet.quantities)
    quantities.items().push_back(record_json(quantity, kQuantity));
  out.list("quantities", std::move(quantities), *sheet.misfits);
  out.lines("notes", *sheet.notes, *sheet.misfits);
  out.lines("assumptions", *sheet.assumptions, *sheet.misfits);
  Json saved = results_json(results);
  if (!saved.members().empty()) out.value("results", std::move(saved));
  return write_json_text(out.finish(*sheet.unknown)) + "\n";
}

}  // namespace heatledger::file
