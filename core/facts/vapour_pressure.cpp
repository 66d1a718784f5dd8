#include "core/facts/vapour_pressure.hpp"

#include <cmath>
#include <string>

#include "core/base/check.hpp"
#include "core/base/number_text.hpp"
#include "core/facts/embedded_tables.hpp"
#include "core/facts/key_index.hpp"
#include "core/facts/name_key.hpp"
#include "core/facts/sources.hpp"
#include "core/facts/table_reader.hpp"

namespace heatledger::facts {

namespace {

struct Table {
  std::vector<VapourPressure> rows;
  KeyIndex by_cas;

  Table() {
    TableReader table(tables::vapour_pressure);
    const std::size_t cas = table.column("cas"), form = table.column("form"), from = table.column("from"),
                      to = table.column("to"), source = table.column("source"), first = table.column("c1");
    while (table.next()) {
      VapourPressure& row = rows.emplace_back();
      row.cas = table.cell(cas);
      row.form = static_cast<VapourPressure::Form>(table.cell(form).front());
      row.from = table.number(from);
      row.to = table.number(to);
      const Source* named = find_source(table.cell(source));
      CHECK(named != nullptr, "every source key of a table stands in sources.tsv");
      row.source = named->name;
      for (std::size_t i = 0; i < row.c.size(); ++i)
        row.c[i] = table.has(first + i) ? table.number(first + i) : 0;
    }
    by_cas.reserve(rows.size());
    for (std::uint32_t i = 0; i < rows.size(); ++i) by_cas.put(key_hash(rows[i].cas), i);
  }
};

const Table& table() {
  static const Table all;
  return all;
}

}  // namespace

const std::vector<VapourPressure>& vapour_pressures() {
  return table().rows;
}

const VapourPressure* find_vapour_pressure(const Compound& compound) {
  if (compound.cas.empty()) return nullptr;
  const VapourPressure* found = nullptr;
  table().by_cas.each(key_hash(compound.cas), [&](std::uint32_t row) {
    found = &table().rows[row];
    return false;
  });
  return found;
}

Result<PressureValue> vapour_pressure(const VapourPressure& equation, double temperature) {
  if (!(temperature >= equation.from && temperature <= equation.to)) {
    const std::string where =
        std::isfinite(temperature) ? machine_number(temperature, 6) + " K" : "temperature";
    return Error{"thermo.temperature_range",
                 "The vapour pressure equation holds from " + machine_number(equation.from, 6) + " to " +
                     machine_number(equation.to, 6) + " K.",
                 where, "Choose a temperature in this range, or type the pressure with its source."};
  }
  const std::array<double, 5>& c = equation.c;
  const double t = temperature;
  PressureValue value;
  value.pressure =
      equation.form == VapourPressure::Form::Logarithmic
          ? std::exp(c[0] + c[1] / t + c[2] * std::log(t) + (c[3] == 0 ? 0 : c[3] * std::pow(t, c[4])))
          : std::pow(10.0, c[0] - c[1] / (t + c[2]));
  value.u95 = value.pressure * (value.pressure < 10000 ? 0.05 : 0.02);
  return value;
}

}  // namespace heatledger::facts
