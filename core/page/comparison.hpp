// Two worksheets side by side: what was typed differently, which results differ, and how far each changed
// input alone moves each result.
#pragma once

#include <string>
#include <string_view>
#include <vector>

#include "core/base/result.hpp"
#include "core/page/page.hpp"

namespace heatledger::page {

/// A cell that reads differently in two sheets; empty where a sheet does not have it.
struct ChangedCell {
  std::string cell;   ///< id
  std::string place;  ///< "Step 1: charge in V-7, outlet or end temperature"
  std::string before, after;
};

/// A result that one changed input alone moves.
struct MovedResult {
  std::string cell, place;
  std::string before, after;
  std::string by;  ///< the difference with its sign; empty when either is no number
};

struct InputEffect {
  ChangedCell input;
  std::vector<MovedResult> moved;
  std::string why_not;  ///< set: the input cannot be put into the first sheet alone, and why
};

struct Comparison {
  std::vector<InputEffect> inputs;
  std::vector<ChangedCell> results;
  std::vector<std::string> notes;
};

/// Compares the texts of two worksheet files, the first being the one that the effects start from. Every
/// changed input is put into the first sheet alone; what it moves there is reported, so effects of several
/// inputs need not add up.
/// @errors file.*, with "first" or "second" in front of the place
Result<Comparison> compare_sheets(std::string_view first, std::string_view second);

/// As a page: tables of inputs, results and effects, and a sentence when nothing differs.
Page comparison_page(const Comparison& comparison);

}  // namespace heatledger::page
