// Streams for the suites of this room, and the columns of its check tables.
#pragma once

#include <gtest/gtest.h>

#include <cstdlib>
#include <map>
#include <string>

#include "core/burning/burn.hpp"
#include "tests/core/support/test_files.hpp"

namespace heatledger::burning::test_cases {

inline double number(const std::string& text) {
  return std::strtod(text.c_str(), nullptr);
}

/// One row of a table by column name.
struct Case {
  std::map<std::string, std::string> cells;
  const std::string& text(const std::string& column) const { return cells.at(column); }
  double value(const std::string& column) const { return number(cells.at(column)); }
};
inline std::vector<Case> cases(const std::string& table) {
  const test::Table read = test::read_table("tests/data/checks/" + table);
  std::vector<Case> all;
  for (const std::vector<std::string>& row : read.rows) {
    Case one;
    for (std::size_t i = 0; i < read.columns.size(); ++i)
      one.cells[read.columns[i]] = i < row.size() ? row[i] : "";
    all.push_back(one);
  }
  return all;
}

inline Part part(const std::string& text, molecule::Phase phase, double moles, bool quoted = false) {
  const auto species = facts::resolve_species(text, quoted);
  EXPECT_TRUE(species.ok()) << text;
  Result<Part> made = make_part(text, *species, phase, moles);
  EXPECT_TRUE(made.ok()) << text << (made.ok() ? "" : ": " + made.error().message);
  return *made;
}

inline Stream stream(const std::string& name, Role role, std::vector<Part> parts,
                     double temperature = 298.15) {
  Stream s;
  s.name = name;
  s.role = role;
  s.parts = std::move(parts);
  s.temperature = {temperature, 0};
  return s;
}

/// One mole of a fuel in dry air.
inline BurnInput flame_of(const std::string& fuel, molecule::Phase phase, double ratio, bool quoted = false) {
  BurnInput in;
  in.streams.push_back(stream("fuel", Role::Fuel, {part(fuel, phase, 1, quoted)}));
  in.air_figure = {ratio, 0};
  return in;
}

inline Numbers burnt(const BurnInput& in) {
  Result<Numbers> n = burn(in);
  EXPECT_TRUE(n.ok()) << (n.ok() ? "" : n.error().message);
  return n.ok() ? *n : Numbers{};
}

}  // namespace heatledger::burning::test_cases
