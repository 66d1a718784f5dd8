// A quantity that reads, written for a file, reads back to the same figure and dimension.
#include <cmath>
#include <cstdint>
#include <string>
#include <string_view>

#include "core/base/check.hpp"
#include "core/units/quantity_text.hpp"

using namespace heatledger;
using namespace heatledger::units;

extern "C" int LLVMFuzzerTestOneInput(const std::uint8_t* data, std::size_t size) {
  const std::string_view text(reinterpret_cast<const char*>(data), size);
  const Result<TypedValue> typed = parse_quantity(text);
  if (!typed) {
    CHECK(!typed.error().code.empty() && !typed.error().message.empty() && !typed.error().where.empty(),
          "a refusal tells what and where");
    return 0;
  }
  CHECK(std::isfinite(typed->value) && (!typed->u95 || (std::isfinite(*typed->u95) && *typed->u95 >= 0)),
        "a figure is finite");
  const double in_unit = typed->unit.from_si(typed->value);
  // Figures at the end of the range of doubles lose digits or leave it on the way back.
  if (!std::isfinite(in_unit) ||
      (in_unit != 0 && (std::fabs(in_unit) < 1e-290 || std::fabs(in_unit) > 1e290)))
    return 0;
  if (typed->value != 0 && std::fabs(typed->value) < 1e-290) return 0;
  const Result<TypedValue> again = parse_quantity(machine_text(typed->value, typed->unit));
  CHECK(again.ok() && again->dimension() == typed->dimension(), "what is written reads back");
  // Ten digits are written; on a scale of temperature they are ten digits of the typed number.
  const double scale = std::fabs(typed->value) + std::fabs(in_unit * typed->unit.factor);
  CHECK(std::fabs(again->value - typed->value) <= 1e-9 * scale, "to the digits written");
  return 0;
}
