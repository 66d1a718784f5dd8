#include "core/page/step_exact.hpp"

#include <cmath>
#include <vector>

#include "core/base/number_text.hpp"
#include "core/units/quantity_text.hpp"

namespace heatledger::page {
namespace {

namespace d = units::dimension;

/// Every text of a step that may hold a quantity.
std::vector<std::string*> quantities(document::StepSheet& step) {
  std::vector<std::string*> texts;
  for (document::FeedSheet& feed : step.feeds) {
    for (std::string* text : {&feed.at, &feed.pressure, &feed.total}) texts.push_back(text);
    for (document::FeedRow& row : feed.rows) texts.push_back(&row.amount);
  }
  for (document::ProgressSheet& progress : step.reactions) {
    for (std::string* text :
         {&progress.figure, &progress.heat, &progress.rate_constant, &progress.activation})
      texts.push_back(text);
  }
  for (document::SpeciesRow& row : step.species) {
    for (std::string* text : {&row.heat_capacity, &row.density, &row.vapour_pressure}) texts.push_back(text);
  }
  for (auto& blank : step.blanks) texts.push_back(&blank.second);
  return texts;
}

/// Three significant digits, without a power of ten.
std::string short_number(double value) {
  int decimals = 2;
  for (double limit = 10; decimals > 0 && value >= limit; limit *= 10) --decimals;
  for (double limit = 1; decimals < 9 && value < limit; limit /= 10) ++decimals;
  std::string text = display_number(value, decimals);
  while (text.find('.') != std::string::npos && (text.back() == '0' || text.back() == '.')) text.pop_back();
  return text;
}

/// "12.5 kmol/h" to "12.5 ± 0.13 kmol/h"; empty when it does not read so.
std::string with_half_width(const std::string& text, double half_width) {
  std::size_t length = 0;
  const std::size_t first = text.find_first_not_of(" \t");
  if (first == std::string::npos || !parse_number_prefix(std::string_view(text).substr(first), length))
    return {};
  const std::string given = text.substr(0, first + length) + " ± " + short_number(half_width) + " " +
                            text.substr(text.find_first_not_of(" \t", first + length) == std::string::npos
                                            ? text.size()
                                            : text.find_first_not_of(" \t", first + length));
  const Result<units::TypedValue> read = units::parse_quantity(given);
  return read.ok() && read->u95 ? given : std::string();
}

}  // namespace

Result<int> give_half_width_to_step(document::StepSheet& step, const std::string& spread) {
  const Result<units::TypedValue> read = units::parse_quantity(spread);
  const bool share = read.ok() && read->dimension() == d::kNumber,
             kelvin = read.ok() && units::parse_quantity(spread, d::kTemperatureDifference).ok();
  if ((!share && !kelvin) || !(read->value > 0)) {
    return Error{"edit.half_width", "The ± for all of them is a share, or a difference for temperatures.", "",
                 "Type such as 1 % or 1 K; single figures get theirs in their own cell."};
  }
  int given = 0;
  for (std::string* text : quantities(step)) {
    const Result<units::TypedValue> typed = units::parse_quantity(*text);
    if (!typed.ok() || typed->u95) continue;
    const bool temperature = typed->dimension() == d::kTemperature;
    if (temperature != kelvin) continue;
    std::size_t length = 0;
    const std::optional<double> number =
        parse_number_prefix(std::string_view(*text).substr(text->find_first_not_of(" \t")), length);
    if (!number || *number == 0) continue;
    const double half_width = share ? std::fabs(*number) * read->value : read->value / typed->unit.factor;
    const std::string with = with_half_width(*text, half_width);
    if (with.empty()) continue;
    *text = with;
    ++given;
  }
  return given;
}

}  // namespace heatledger::page
