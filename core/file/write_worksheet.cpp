#include <algorithm>

#include "core/file/json.hpp"
#include "core/file/step_file.hpp"
#include "core/file/worksheet_file.hpp"

namespace heatledger::file {
namespace {

/// Builds one object in canonical order: known members that say something, then what was kept from the file.
class Writer {
 public:
  void text(const char* key, const std::string& value) {
    if (!value.empty()) object_.add(key, Json::string(value));
  }
  void flag(const char* key, bool value) {
    if (value) object_.add(key, Json::boolean(true));
  }
  void lines(const char* key, const document::Lines& lines, const document::Misfits& misfits) {
    Json array = Json::array();
    for (const std::string& line : lines) array.items().push_back(Json::string(line));
    list(key, std::move(array), misfits);
  }
  void value(const char* key, Json value) { object_.add(key, std::move(value)); }

  /// A list with the items that were kept aside put back to their places.
  void list(const char* key, Json array, const document::Misfits& misfits) {
    for (const document::Misfit& misfit : misfits) {
      if (misfit.list != key) continue;
      Result<Json> item = read_json(misfit.json);
      if (!item.ok()) continue;
      const std::size_t place = std::min(misfit.place, array.items().size());
      array.items().insert(array.items().begin() + static_cast<std::ptrdiff_t>(place),
                           std::move(item).value());
    }
    if (!array.items().empty()) object_.add(key, std::move(array));
  }

  /// Adds the members of a kept JSON object text, leaving out keys that now have a value of their own; what
  /// was kept of an object that has one goes into it.
  Json finish(const std::string& unknown) {
    if (!unknown.empty()) {
      Result<Json> kept = read_json(unknown);
      if (kept.ok()) {
        for (Json::Member& member : kept->members()) {
          merge(std::move(member));
        }
      }
    }
    return std::move(object_);
  }

 private:
  void merge(Json::Member kept) {
    for (Json::Member& own : object_.members()) {
      if (own.first != kept.first) continue;
      if (!own.second.is_object() || !kept.second.is_object()) return;
      for (Json::Member& inner : kept.second.members()) {
        if (own.second.find(inner.first) == nullptr) own.second.add(inner.first, std::move(inner.second));
      }
      return;
    }
    object_.add(std::move(kept.first), std::move(kept.second));
  }

  Json object_ = Json::object();
};

Json header_json(const document::Header& header) {
  Writer out;
  out.text("title", header.title);
  out.text("subtitle", header.subtitle);
  out.text("sheet_number", header.sheet_number);
  out.text("revision", header.revision);
  out.text("prepared", header.prepared);
  out.text("prepared_date", header.prepared_date);
  out.text("checked", header.checked);
  out.text("checked_date", header.checked_date);
  return out.finish(header.unknown);
}

Json heat_json(const document::TypedHeat& heat) {
  Writer out;
  out.text("value", heat.value);
  out.text("per", heat.per);
  out.text("at", heat.at);
  out.text("medium", heat.medium);
  out.text("includes", heat.includes);
  out.text("source", heat.source);
  out.text("from", heat.from);
  return out.finish(heat.unknown);
}

Json reaction_json(const document::ReactionSheet& reaction) {
  Writer out;
  out.text("id", reaction.id);
  out.text("title", reaction.title);
  out.text("equation", reaction.equation);
  out.text("basis", reaction.basis);
  out.text("bond_set", reaction.bond_set);
  out.text("pinned_route", reaction.pinned_route);
  out.text("reactants_at", reaction.reactants_at);
  out.text("products_at", reaction.products_at);
  out.text("pressure", reaction.pressure);
  Json measured = heat_json(reaction.measured);
  if (!measured.members().empty()) out.value("measured", std::move(measured));
  out.text("note", reaction.note);
  out.flag("show_profile", reaction.show_profile);
  out.flag("show_checker", reaction.show_checker);
  out.flag("show_measured", reaction.show_measured);
  if (!reaction.checker.empty()) {
    Json checker = Json::object();
    for (const auto& entry : reaction.checker) checker.add(entry.first, Json::string(entry.second));
    out.value("checker", std::move(checker));
  }
  return out.finish(reaction.unknown);
}

Json bond_json(const document::TypedBond& bond) {
  Writer out;
  out.text("bond", bond.bond);
  out.text("value", bond.value);
  out.text("source", bond.source);
  out.text("from", bond.from);
  return out.finish(bond.unknown);
}

Json figure_json(const document::TypedFigure& figure) {
  Writer out;
  out.text("species", figure.species);
  out.text("figure", figure.figure);
  out.text("value", figure.value);
  out.text("source", figure.source);
  out.text("from", figure.from);
  return out.finish(figure.unknown);
}

Json results_json(const SavedResults& results) {
  Writer out;
  out.text("digest", results.digest);
  if (!results.figures.empty()) {
    Json figures = Json::object();
    for (const auto& figure : results.figures) figures.add(figure.first, Json::string(figure.second));
    out.value("figures", std::move(figures));
  }
  return out.finish({});
}

}  // namespace

std::string write_worksheet(const document::Worksheet& sheet, const SavedResults& results) {
  Writer out;
  out.text("format", std::string(kWorksheetFormat));
  out.value("version", Json::number(std::to_string(kWorksheetVersion)));
  const Json header = header_json(*sheet.header);
  if (!header.members().empty()) out.value("header", header);
  Json reactions = Json::array();
  for (const auto& reaction : sheet.reactions) reactions.items().push_back(reaction_json(*reaction));
  out.list("reactions", std::move(reactions), *sheet.misfits);
  Json steps = Json::array();
  for (const auto& step : sheet.steps) steps.items().push_back(step_json(*step));
  out.list("steps", std::move(steps), *sheet.misfits);
  Json bonds = Json::array();
  for (const auto& bond : *sheet.typed_bonds) bonds.items().push_back(bond_json(bond));
  out.list("bonds", std::move(bonds), *sheet.misfits);
  Json species = Json::array();
  for (const auto& figure : *sheet.typed_figures) species.items().push_back(figure_json(figure));
  out.list("species", std::move(species), *sheet.misfits);
  out.lines("notes", *sheet.notes, *sheet.misfits);
  out.lines("assumptions", *sheet.assumptions, *sheet.misfits);
  Json saved = results_json(results);
  if (!saved.members().empty()) out.value("results", std::move(saved));
  return write_json_text(out.finish(*sheet.unknown)) + "\n";
}

}  // namespace heatledger::file
