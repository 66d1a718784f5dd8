#include "core/document/blank_texts.hpp"

#include "core/units/quantity_text.hpp"

namespace heatledger::document {

std::string BlankTexts::text(const char* id) const {
  const auto found = sheet_.blanks.find(id);
  if (found == sheet_.blanks.end()) return {};
  const std::size_t first = found->second.find_first_not_of(" \t");
  if (first == std::string::npos) return {};
  return found->second.substr(first, found->second.find_last_not_of(" \t") - first + 1);
}

void BlankTexts::refuse(Error error, const char* id) {
  const std::string where = std::string("blanks.") + id;
  error.where = error.where.empty() ? where : where + ", " + error.where;
  errors_.push_back(std::move(error));
}

step::Blank BlankTexts::quantity(const char* id, const units::Dimension& dimension) {
  const std::string typed = text(id);
  if (typed.empty()) return std::nullopt;
  const Result<units::TypedValue> read = units::evaluate_quantity(typed, dimension, names_);
  if (!read.ok()) {
    refuse(read.error(), id);
    return std::nullopt;
  }
  return step::Typed{read->value, read->u95.value_or(0)};
}

step::Blank BlankTexts::above_zero(step::Blank figure, const char* id) {
  if (!figure || figure->value > 0) return figure;
  refuse(Error{"step.out_of_range", "This figure is above zero.", "", "Look at the figure and its unit."},
         id);
  return std::nullopt;
}

step::Blank BlankTexts::positive(const char* id, const units::Dimension& dimension) {
  return above_zero(quantity(id, dimension), id);
}

step::Blank BlankTexts::pressure(const char* id) {
  const std::string typed = text(id);
  if (typed.empty()) return std::nullopt;
  const Result<units::TypedValue> read = units::evaluate_quantity(typed, names_);
  const Result<double> absolute = read.ok() ? units::absolute_pressure(*read) : read.error();
  if (!absolute.ok()) {
    refuse(absolute.error(), id);
    return std::nullopt;
  }
  return above_zero(step::Typed{*absolute, read->u95.value_or(0)}, id);
}

}  // namespace heatledger::document
