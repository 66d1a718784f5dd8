// The worksheet file: JSON text in and out. Schema: worksheets/worksheet.schema.json; older versions are
// brought up to date in migration.hpp.
#pragma once

#include <map>
#include <string>
#include <string_view>
#include <vector>

#include "core/base/result.hpp"
#include "core/document/worksheet.hpp"

namespace heatledger::file {

constexpr int kWorksheetVersion = 1;
constexpr std::string_view kWorksheetFormat = "heatledger-worksheet";

/// What the figures read when the sheet was saved, so that a reader can see when a recomputation differs.
struct SavedResults {
  std::string digest;                          ///< over every printed figure; empty when the file has none
  std::map<std::string, std::string> figures;  ///< reaction id to the figure taken, as printed
};

struct Opened {
  document::Worksheet sheet;
  int version = kWorksheetVersion;    ///< of the file, before migration
  std::vector<Error> not_understood;  ///< parts that were kept but not understood, each with its field path
  SavedResults results;
};

/// Keys that this version does not know, and known keys with a value of the wrong kind, are kept and written
/// back.
/// @errors file.not_json, file.too_deep, file.duplicate_key (offset), file.not_a_worksheet,
/// file.newer_version
Result<Opened> read_worksheet(std::string_view text);

/// Canonical order, two-space indent, ends with a newline; reading and writing again gives the same bytes.
std::string write_worksheet(const document::Worksheet& sheet, const SavedResults& results);

}  // namespace heatledger::file
