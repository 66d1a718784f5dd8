#include "core/document/air_row.hpp"

#include "core/base/number_text.hpp"
#include "core/facts/air.hpp"
#include "core/facts/resolve.hpp"
#include "core/units/quantity_text.hpp"

namespace heatledger::document {
namespace {

std::string without_spaces(const std::string& text) {
  std::string plain;
  for (const char c : text) {
    if (c != ' ' && c != '\t') plain += c;
  }
  const std::string gas = "(g)";
  if (plain.size() > gas.size() && plain.compare(plain.size() - gas.size(), gas.size(), gas) == 0)
    plain.resize(plain.size() - gas.size());
  return plain;
}

template <std::size_t N>
std::vector<AirPart> parts_of(const std::array<facts::AirComponent, N>& air, double share) {
  std::vector<AirPart> parts;
  for (const facts::AirComponent& component : air)
    parts.push_back({std::string(component.name), component.mole_fraction * share, 0});
  return parts;
}

/// Mass shares from the molar masses.
Status weigh(std::vector<AirPart>& parts) {
  double whole = 0;
  for (AirPart& part : parts) {
    const Result<std::shared_ptr<const facts::Species>> species = facts::resolve_species(part.name, false);
    if (!species.ok()) return species.error();
    part.mass_share = part.mole_share * (*species)->molar_mass;
    whole += part.mass_share;
  }
  for (AirPart& part : parts) part.mass_share /= whole;
  return success();
}

struct Moisture {
  double humidity = facts::kDefaultRelativeHumidity;
  double temperature = facts::kDefaultAirTemperature;
};

/// "40 % at 30 °C"; empty is the default of the conventions.
Result<Moisture> read_moisture(std::string text) {
  Moisture moisture;
  while (!text.empty() && (text.front() == ',' || text.front() == ' ')) text.erase(0, 1);
  if (text.empty()) return moisture;
  if (const std::size_t at = text.find(" at "); at != std::string::npos) {
    const Result<units::TypedValue> warm =
        units::parse_quantity(text.substr(at + 4), units::dimension::kTemperature);
    if (!warm.ok()) return warm.error();
    moisture.temperature = warm->value;
    text.resize(at);
  }
  const Result<units::TypedValue> humidity = units::parse_quantity(text, units::dimension::kNumber);
  if (!humidity.ok()) return humidity.error();
  moisture.humidity = humidity->value;
  return moisture;
}

}  // namespace

Result<std::optional<AirRow>> read_air(const std::string& text) {
  const std::string plain = without_spaces(text);
  AirRow row;
  if (plain == "air" || plain == "dryair") {
    row.parts = parts_of(facts::dry_air(), 1);
    row.note = "dry air: 78.084 % N2, 20.946 % O2, 0.934 % Ar, 0.036 % CO2";
  } else if (plain == "O2+3.76N2") {
    row.parts = parts_of(facts::textbook_air(), 1);
    row.note = "air as O2 + 3.76 N2";
  } else if (plain.compare(0, 8, "humidair") == 0) {
    const Result<Moisture> moisture = read_moisture(text.substr(text.find("air") + 3));
    if (!moisture.ok()) return moisture.error();
    const Result<double> water = facts::moles_water_per_mole_dry_air(
        moisture->humidity, moisture->temperature, facts::kDefaultAirPressure);
    if (!water.ok()) return water.error();
    row.parts = parts_of(facts::dry_air(), 1 / (1 + *water));
    row.parts.push_back({"water", *water / (1 + *water), 0});
    row.note = "humid air: " + display_number(100 * moisture->humidity, 0) + " % humidity at " +
               display_number(moisture->temperature - 273.15, 1) + " °C and 101.325 kPa, " +
               display_number(100 * *water / (1 + *water), 2) + " mol% water";
  } else {
    return std::optional<AirRow>();
  }
  if (const Status weighed = weigh(row.parts); !weighed.ok()) return weighed.error();
  return std::optional<AirRow>(std::move(row));
}

}  // namespace heatledger::document
