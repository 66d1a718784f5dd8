#include "core/facts/sources.hpp"

#include "core/facts/embedded_tables.hpp"
#include "core/facts/table_reader.hpp"

namespace heatledger::facts {

namespace {

std::vector<Source> read_sources() {
  std::vector<Source> all;
  TableReader table(tables::sources);
  const std::size_t key = table.column("key"), name = table.column("name"),
                    standing = table.column("standing"), reference = table.column("reference");
  while (table.next()) {
    Source source;
    source.key = table.cell(key);
    source.name = table.cell(name);
    source.standing = table.cell(standing);
    source.reference = table.cell(reference);
    source.rank = static_cast<int>(all.size()) + 1;
    all.push_back(source);
  }
  return all;
}

}  // namespace

const std::vector<Source>& sources() {
  static const std::vector<Source> all = read_sources();
  return all;
}

const Source* find_source(std::string_view key) {
  for (const Source& source : sources()) {
    if (source.key == key) return &source;
  }
  return nullptr;
}

std::string_view source_reference(std::string_view name) {
  for (const Source& source : sources()) {
    if (source.name == name) return source.reference;
  }
  return name;
}

}  // namespace heatledger::facts
