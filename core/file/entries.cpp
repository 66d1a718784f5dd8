#include "core/file/entries.hpp"

#include "core/file/fields.hpp"

namespace heatledger::file {

document::TypedHeat read_heat(const Json& object, const std::string& path, std::vector<Error>& problems) {
  document::TypedHeat heat;
  Fields fields(object, path, problems);
  fields.text("value", heat.value);
  fields.text("per", heat.per);
  fields.text("at", heat.at);
  fields.text("medium", heat.medium);
  fields.text("includes", heat.includes);
  fields.text("source", heat.source);
  fields.text("from", heat.from);
  heat.unknown = fields.rest();
  return heat;
}

document::TypedBond read_typed_bond(const Json& object, const std::string& path,
                                    std::vector<Error>& problems) {
  document::TypedBond bond;
  Fields fields(object, path, problems);
  fields.text("bond", bond.bond);
  fields.text("value", bond.value);
  fields.text("source", bond.source);
  fields.text("from", bond.from);
  bond.unknown = fields.rest();
  return bond;
}

document::TypedFigure read_typed_figure(const Json& object, const std::string& path,
                                        std::vector<Error>& problems) {
  document::TypedFigure figure;
  Fields fields(object, path, problems);
  fields.text("species", figure.species);
  fields.text("figure", figure.figure);
  fields.text("value", figure.value);
  fields.text("source", figure.source);
  fields.text("from", figure.from);
  figure.unknown = fields.rest();
  return figure;
}

}  // namespace heatledger::file
