#include "core/facts/compound_rows.hpp"

#include "core/base/check.hpp"
#include "core/facts/embedded_tables.hpp"
#include "core/facts/figures.hpp"
#include "core/facts/table_reader.hpp"

namespace heatledger::facts {

namespace {

/// One letter a flag; their meaning stands at the head of tables/compounds.tsv.
void read_flags(std::string_view flags, Compound& compound) {
  compound.structure = compound.smiles.empty() ? Structure::None : Structure::Molecule;
  for (const char flag : flags) {
    switch (flag) {
      case 'f':
        compound.structure = Structure::Formal;
        break;
      case 'a':
        compound.vapour_associates = true;
        break;
      case 'u':
        compound.usual_of_formula = true;
        break;
      case 'g':
      case 'l':
      case 's':
        compound.reference_element = true;
        compound.reference_phase = flag;
        break;
      default:
        CHECK(false, "compounds.tsv uses the flags named at its head");
    }
  }
}

}  // namespace

CompoundRows::CompoundRows() {
  TableReader table(tables::compounds);
  const std::size_t name = table.column("name"), cas = table.column("cas"), formula = table.column("formula"),
                    synonyms = table.column("synonyms");
  smiles_ = table.column("smiles");
  flags_ = table.column("flags");
  remark_ = table.column("remark");
  first_figure_ = table.column(kFigureColumns.front().column);
  heads_.reserve(2500);
  while (table.next()) {
    heads_.push_back(
        {table.cell(name), table.cell(cas), table.cell(formula), table.cell(synonyms), table.line()});
  }
  known_ = std::vector<std::atomic<const Compound*>>(heads_.size());
}

const Compound& CompoundRows::compound(std::uint32_t row) const {
  if (const Compound* known = known_[row].load(std::memory_order_acquire)) return *known;
  const std::lock_guard<std::mutex> lock(mutex_);
  if (const Compound* known = known_[row].load(std::memory_order_relaxed)) return *known;
  compounds_.emplace_back();
  read(row, compounds_.back());
  known_[row].store(&compounds_.back(), std::memory_order_release);
  return compounds_.back();
}

void CompoundRows::read(std::uint32_t row, Compound& out) const {
  const Head& head = heads_[row];
  std::vector<std::string_view> cells;
  split_cells(head.line, cells);
  const auto cell = [&](std::size_t column) {
    return column < cells.size() ? cells[column] : std::string_view();
  };
  out.id = row;
  out.name = head.name;
  out.cas = head.cas;
  out.formula = head.formula;
  out.smiles = cell(smiles_);
  out.remark = cell(remark_);
  read_flags(cell(flags_), out);
  each_name(row, [&](std::string_view name) {
    if (name.data() != head.name.data() && name.data() != head.cas.data()) out.synonyms.push_back(name);
  });
  for (std::size_t i = 0; i < kFigureColumns.size(); ++i) {
    const std::string_view text = cell(first_figure_ + i);
    if (!text.empty()) figure(out, kFigureColumns[i].kind) = figures_.read(text, kFigureColumns[i]);
  }
}

}  // namespace heatledger::facts
