#include "core/facts/polynomials.hpp"

#include <cmath>
#include <string>

#include "core/base/check.hpp"
#include "core/base/number_text.hpp"
#include "core/facts/embedded_tables.hpp"
#include "core/facts/key_index.hpp"
#include "core/facts/name_key.hpp"
#include "core/facts/table_reader.hpp"

namespace heatledger::facts {

namespace {

constexpr double kGasConstantOfReport = 8.314510;  ///< [J/(mol K)], NASA TM-4513; goes with the coefficients
constexpr double kReference = 298.15;              ///< [K]

std::string keyed(std::string_view name, char phase) {
  return name_key(name) + '|' + phase;
}

struct PolynomialTable {
  std::vector<Polynomial> all;
  KeyIndex names;

  PolynomialTable() {
    TableReader table(tables::polynomials);
    const std::size_t name = table.column("name"), phase = table.column("phase"),
                      formula = table.column("formula"), hf = table.column("hf298"),
                      from = table.column("from"), to = table.column("to"), first = table.column("a1");
    while (table.next()) {
      if (table.has(name)) {
        Polynomial& p = all.emplace_back();
        p.name = table.cell(name);
        p.phase = table.cell(phase).front();
        p.formula = table.cell(formula);
        p.stable_at_298 = table.has(hf);
        if (p.stable_at_298) p.formation_enthalpy = table.number(hf) * 1000;
      }
      CHECK(!all.empty(), "polynomials.tsv begins with a named row");
      PolynomialRange range;
      range.from = table.number(from);
      range.to = table.number(to);
      for (std::size_t i = 0; i < range.a.size(); ++i) range.a[i] = table.number(first + i);
      all.back().ranges.push_back(range);
    }
    names.reserve(all.size());
    for (std::uint32_t i = 0; i < all.size(); ++i) names.put(key_hash(keyed(all[i].name, all[i].phase)), i);
  }
};

const PolynomialTable& table() {
  static const PolynomialTable all;
  return all;
}

PolynomialValue value_at(const PolynomialRange& range, double t) {
  const std::array<double, 7>& a = range.a;
  PolynomialValue v;
  v.cp = kGasConstantOfReport * (a[0] + t * (a[1] + t * (a[2] + t * (a[3] + t * a[4]))));
  v.h = kGasConstantOfReport *
        (t * (a[0] + t * (a[1] / 2 + t * (a[2] / 3 + t * (a[3] / 4 + t * a[4] / 5)))) + a[5]);
  v.s = kGasConstantOfReport *
        (a[0] * std::log(t) + t * (a[1] + t * (a[2] / 2 + t * (a[3] / 3 + t * a[4] / 4))) + a[6]);
  return v;
}

}  // namespace

Result<PolynomialValue> evaluate(const Polynomial& polynomial, double temperature) {
  // Ranges that begin at 300 K stand for 298.15 K too: 1.85 K of extrapolation moves Cp by less than 0.1 %.
  const double low =
      polynomial.lowest() > kReference && polynomial.lowest() <= 300 ? kReference : polynomial.lowest();
  if (!(temperature >= low && temperature <= polynomial.highest())) {
    const std::string where =
        std::isfinite(temperature) ? machine_number(temperature, 6) + " K" : "temperature";
    return Error{"thermo.temperature_range",
                 "The polynomial of " + std::string(polynomial.name) + " holds from " +
                     machine_number(low, 6) + " to " + machine_number(polynomial.highest(), 6) + " K.",
                 where, "Choose a temperature in this range."};
  }
  const PolynomialRange* range = &polynomial.ranges.front();
  for (const PolynomialRange& next : polynomial.ranges) {
    if (temperature >= next.from) range = &next;
  }
  return value_at(*range, temperature);
}

const std::vector<Polynomial>& polynomials() {
  return table().all;
}

const Polynomial* find_polynomial(std::string_view name, char phase) {
  const Polynomial* found = nullptr;
  table().names.each(key_hash(keyed(name, phase)), [&](std::uint32_t row) {
    found = &table().all[row];
    return false;
  });
  return found;
}

std::vector<const Polynomial*> find_polynomials(std::string_view hill, char phase) {
  std::vector<const Polynomial*> found;
  for (const Polynomial& p : table().all) {
    if (p.phase == phase && p.formula == hill) found.push_back(&p);
  }
  return found;
}

}  // namespace heatledger::facts
