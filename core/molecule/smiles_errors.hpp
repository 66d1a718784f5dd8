// What can be wrong with a SMILES text, and how it is told. One entry per stable code.
#pragma once

#include <cstddef>
#include <cstdint>
#include <string_view>

#include "core/base/result.hpp"

namespace heatledger::molecule {

enum class SmilesFault : std::uint8_t {
  Empty,
  UnexpectedCharacter,
  UnknownElement,
  UnclosedBracket,
  InsideBracket,
  HydrogenOnHydrogen,
  UnknownChirality,
  NumberTooLarge,
  BondWithoutAtom,
  TwoBonds,
  AromaticBondMisplaced,
  TooManyBonds,
  RingNumber,
  RingWithoutAtom,
  UnclosedRing,
  RingToItself,
  RingBondsDiffer,
  RingRepeatsBond,
  BranchWithoutAtom,
  EmptyBranch,
  UnclosedBranch,
  UnopenedBranch,
  DotWithoutAtom,
  CannotKekulise,
  TextAfterEnd,
};

/// @param offset  bytes from the start of the text
Error smiles_error(SmilesFault fault, std::size_t offset, std::string_view text);

}  // namespace heatledger::molecule
