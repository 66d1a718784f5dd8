// The site table: a site's own species, bond values and measured heats in a file of their own, from which
// rows are copied into worksheets. Schema: worksheets/site-table.schema.json.
#pragma once

#include <string>
#include <string_view>
#include <vector>

#include "core/base/result.hpp"
#include "core/document/worksheet.hpp"

namespace heatledger::file {

constexpr int kSiteTableVersion = 1;
constexpr std::string_view kSiteTableFormat = "heatledger-site-table";

struct SiteTable {
  struct Heat {
    std::string equation;
    document::TypedHeat heat;
  };
  std::string name;            ///< "Brackwater 2026"; rows copied from it carry it
  document::TypedBonds bonds;  ///< `from` is the name of the table, here and below
  document::TypedFigures figures;
  std::vector<Heat> heats;
  std::vector<Error> not_understood;  ///< entries left aside, each with its field path
};

/// True for a text that says it is a site table, whether or not it can be read.
bool looks_like_site_table(std::string_view text);

/// @errors file.not_json, file.too_deep, file.duplicate_key (offset), file.not_a_site_table,
/// file.newer_version
Result<SiteTable> read_site_table(std::string_view text);

}  // namespace heatledger::file
