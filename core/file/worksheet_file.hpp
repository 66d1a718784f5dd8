// The worksheet file: JSON text in and out. Schema: worksheets/worksheet.schema.json.
#pragma once

#include <string>
#include <string_view>
#include <vector>

#include "core/base/result.hpp"
#include "core/document/worksheet.hpp"

namespace heatledger::file {

constexpr int kWorksheetVersion = 1;

struct Opened {
  document::Worksheet sheet;
  int version = kWorksheetVersion;
  std::vector<Error> not_understood;  ///< parts that were kept or left aside, each with its field path
  std::string digest;                 ///< digest of results when it was saved; empty when the file has none
};

/// @errors file.not_json (with offset), file.not_a_worksheet, file.newer_version, file.too_deep, file.duplicate_key
Result<Opened> read_worksheet(std::string_view text);

/// Canonical order, two-space indent, ends with a newline; reading and writing again gives the same bytes.
/// @param digest  digest of the results on the sheet, see page/digest.hpp; may be empty
std::string write_worksheet(const document::Worksheet& sheet, std::string_view digest);

}  // namespace heatledger::file
