// Short ways to a ledger for the suites of this room.
#pragma once

#include <gtest/gtest.h>

#include <string>

#include "core/balance/ledger.hpp"

namespace heatledger::balance::test_sheets {

inline std::shared_ptr<const estimate::BondSet> bond_set(const std::string& name = "") {
  Result<estimate::BondSet> set = estimate::BondSet::published(name);
  EXPECT_TRUE(set.ok()) << name;
  return std::make_shared<const estimate::BondSet>(std::move(set).value());
}

inline std::shared_ptr<const Reaction> reaction(const std::string& equation) {
  static CachedSpecies species;
  Result<Reaction> read = read_reaction(equation, species);
  EXPECT_TRUE(read.ok()) << equation << ": " << (read.ok() ? "" : read.error().message);
  if (!read.ok()) return nullptr;
  return std::make_shared<const Reaction>(std::move(read).value());
}

inline Result<Ledger> try_ledger(const std::string& equation, const std::string& basis = "",
                                 const std::string& set = "") {
  std::shared_ptr<const Reaction> read = reaction(equation);
  if (read == nullptr) return Error{"test.not_read", equation, "", ""};
  LedgerOptions options;
  options.set = bond_set(set);
  options.basis = basis;
  return make_ledger(read, options);
}

/// A ledger that must exist; an empty one after a failure, so that the suite goes on.
inline Ledger ledger(const std::string& equation, const std::string& basis = "",
                     const std::string& set = "") {
  Result<Ledger> made = try_ledger(equation, basis, set);
  EXPECT_TRUE(made.ok()) << equation << ": " << (made.ok() ? "" : made.error().message);
  return made.ok() ? std::move(made).value() : Ledger{};
}

/// [kJ]; a failure and zero when there is no figure.
inline double kj(const std::optional<uncertainty::Quantity>& quantity) {
  EXPECT_TRUE(quantity.has_value());
  return quantity ? quantity->value() / 1000 : 0;
}

}  // namespace heatledger::balance::test_sheets
