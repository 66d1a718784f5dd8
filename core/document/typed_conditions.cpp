#include "core/document/typed_conditions.hpp"

#include "core/document/typed_energy.hpp"
#include "core/document/typed_rows.hpp"

namespace heatledger::document {
namespace {

void read_temperature(const std::string& text, const char* field, std::optional<double>& kelvin,
                      const units::NamedFigures& names, std::vector<Error>& errors) {
  if (text.empty()) return;
  const Result<units::TypedValue> value =
      units::evaluate_quantity(text, units::dimension::kTemperature, names);
  if (!value.ok()) {
    errors.push_back(placed(value.error(), field));
  } else if (value->value <= 0) {
    errors.push_back({"thermo.temperature_range", "A temperature is above zero kelvin.", field,
                      "Type a temperature such as 80 degC."});
  } else {
    kelvin = value->value;
  }
}

void read_pressure(const std::string& text, std::optional<double>& pascal, const units::NamedFigures& names,
                   std::vector<Error>& errors) {
  if (text.empty()) return;
  const Result<units::TypedValue> typed = units::evaluate_quantity(text, names);
  if (!typed.ok()) {
    errors.push_back(placed(typed.error(), "pressure"));
    return;
  }
  const Result<double> absolute = units::absolute_pressure(*typed);
  if (!absolute.ok()) {
    errors.push_back(placed(absolute.error(), "pressure"));
    return;
  }
  pascal = *absolute;
}

/// FNV-1a over what makes two measurements the same.
std::uint64_t key_of(const ReactionSheet& sheet) {
  std::uint64_t hash = 14695981039346656037ULL;
  for (const std::string* text : {&sheet.id, &sheet.equation, &sheet.measured.value}) {
    for (const char c : *text) hash = (hash ^ static_cast<unsigned char>(c)) * 1099511628211ULL;
    hash = (hash ^ 0xffU) * 1099511628211ULL;
  }
  return hash;
}

void read_measured(const ReactionSheet& sheet, const units::NamedFigures& names, Conditions& out) {
  const TypedHeat& typed = sheet.measured;
  if (typed.value.empty()) return;
  const Result<uncertainty::Figure> value = parse_molar_energy(typed.value);
  if (!value.ok()) {
    out.errors.push_back(placed(value.error(), "measured.value"));
    return;
  }
  balance::MeasuredHeat heat;
  heat.value = value->value;
  heat.u95 = value->u95;
  heat.per = typed.per;
  heat.source = stated_source(typed.source, typed.from);
  heat.key = key_of(sheet);
  read_temperature(typed.at, "measured.at", heat.at, names, out.errors);
  if (!typed.medium.empty()) heat.remark = typed.medium + "; ";
  const std::string includes = typed.includes.empty() ? "unknown" : typed.includes;
  heat.remark += "mixing, dilution, evaporation, gas loss in it: " + includes;
  heat.includes = includes == "yes"  ? balance::Includes::Yes
                  : includes == "no" ? balance::Includes::No
                                     : balance::Includes::Unknown;
  if (includes != "yes" && includes != "no" && includes != "unknown") {
    out.errors.push_back({"measured.includes",
                          "Whether the measured heat includes mixing is yes, no or unknown.",
                          "measured.includes", "Choose one of the three."});
  }
  out.measured_exact = heat.u95 <= 0;
  out.measured = std::move(heat);
}

}  // namespace

Conditions read_conditions(const ReactionSheet& sheet, const units::NamedFigures& names) {
  Conditions out;
  read_temperature(sheet.reactants_at, "reactants_at", out.reactants_at, names, out.errors);
  read_temperature(sheet.products_at, "products_at", out.products_at, names, out.errors);
  read_pressure(sheet.pressure, out.pressure, names, out.errors);
  read_measured(sheet, names, out);
  return out;
}

}  // namespace heatledger::document
