#include "core/estimate/context_fit.hpp"

#include <algorithm>
#include <bit>
#include <cmath>

#include "core/base/check.hpp"
#include "core/estimate/feature_code.hpp"

namespace heatledger::estimate {
namespace {

constexpr std::uint32_t kNone = FeaturePlace::none;

/// Which rows have a feature: none seen yet, one, or several.
struct Seen {
  std::uint64_t key = 0;
  std::uint32_t row = kNone;
  bool several = false;
  double scaled = 0;
};

std::size_t table_size(std::size_t entries) {
  std::size_t size = 1024;
  while (size < entries * 2) size *= 2;
  return size;
}

/// Rows and features in one pass: every distinct key with the row that has it.
std::vector<Seen> distinct_features(const ContextSettings& settings, const std::vector<FitRow>& rows) {
  std::vector<Seen> seen;
  std::vector<std::uint32_t> slots(1024, 0);
  for (std::uint32_t r = 0; r < rows.size(); ++r) {
    for (const FeatureCount& feature : rows[r].molecule->features) {
      const double spread = settings.spread[static_cast<std::size_t>(feature.family)];
      if (spread == 0) continue;
      std::size_t slot = feature.key & (slots.size() - 1);
      while (slots[slot] != 0 && seen[slots[slot] - 1].key != feature.key)
        slot = (slot + 1) & (slots.size() - 1);
      if (slots[slot] != 0) {
        seen[slots[slot] - 1].several = true;
        continue;
      }
      seen.push_back({feature.key, r, false, spread * feature.count});
      slots[slot] = static_cast<std::uint32_t>(seen.size());
      if (seen.size() * 2 < slots.size()) continue;
      slots.assign(slots.size() * 2, 0);
      for (std::uint32_t i = 0; i < seen.size(); ++i) {
        std::size_t at = seen[i].key & (slots.size() - 1);
        while (slots[at] != 0) at = (at + 1) & (slots.size() - 1);
        slots[at] = i + 1;
      }
    }
  }
  std::sort(seen.begin(), seen.end(), [](const Seen& a, const Seen& b) { return a.key < b.key; });
  return seen;
}

/// Key of the own deviation of a row's molecule.
std::uint64_t own_key(std::uint32_t row) {
  return mix(row, 0xd1);
}

bool same_counts(const ContextMolecule& a, const ContextMolecule& b) {
  return std::equal(
      a.features.begin(), a.features.end(), b.features.begin(), b.features.end(),
      [](const FeatureCount& x, const FeatureCount& y) { return x.key == y.key && x.count == y.count; });
}

}  // namespace

ContextFit::ContextFit(const ContextSettings& settings, std::vector<FitRow> rows)
    : settings_(settings), rows_(std::move(rows)) {
  CHECK(!rows_.empty(), "rows to fit to");
  place_features();
  solve();
}

void ContextFit::place_features() {
  std::uint32_t unknowns = 0;
  for (const Seen& seen : distinct_features(settings_, rows_)) {
    Entry entry;
    entry.key = seen.key;
    if (seen.several) {
      entry.place.shared = unknowns++;
    } else {
      entry.place.row = seen.row;
      entry.place.in_row = seen.scaled;
    }
    entries_.push_back(entry);
  }
  slots_.assign(table_size(entries_.size()), 0);
  for (std::uint32_t i = 0; i < entries_.size(); ++i) {
    std::size_t slot = entries_[i].key & (slots_.size() - 1);
    while (slots_[slot] != 0) slot = (slot + 1) & (slots_.size() - 1);
    slots_[slot] = i + 1;
  }
  row_start_.assign(1, 0);
  for (std::uint32_t r = 0; r < rows_.size(); ++r) {
    double noise = rows_[r].noise;
    for (const FeatureCount& feature : rows_[r].molecule->features) {
      const double spread = settings_.spread[static_cast<std::size_t>(feature.family)];
      if (spread == 0) continue;
      const FeaturePlace& place = *find(feature.key);
      if (place.shared == kNone) {
        noise += place.in_row * place.in_row;
      } else {
        row_index_.push_back(place.shared);
        row_value_.push_back(spread * feature.count);
      }
    }
    row_start_.push_back(static_cast<std::uint32_t>(row_index_.size()));
    row_noise_.push_back(noise);
    by_constitution_.emplace_back(rows_[r].molecule->constitution, r);
  }
  std::sort(by_constitution_.begin(), by_constitution_.end());
}

/// P = 1 + Σ rows x x' / variance, lower triangle; column by column, rows in the order of the table.
LowerTriangle ContextFit::information() const {
  const std::size_t unknowns = static_cast<std::size_t>(std::count_if(
      entries_.begin(), entries_.end(), [](const Entry& e) { return e.place.shared != kNone; }));
  std::vector<std::uint32_t> first(unknowns + 1, 0), where(row_index_.size()), row_of(row_index_.size());
  for (const std::uint32_t j : row_index_) ++first[j + 1];
  for (std::size_t j = 0; j < unknowns; ++j) first[j + 1] += first[j];
  std::vector<std::uint32_t> next(first.begin(), first.end() - 1);
  for (std::uint32_t r = 0; r < rows_.size(); ++r) {
    for (std::uint32_t e = row_start_[r]; e < row_start_[r + 1]; ++e) {
      where[next[row_index_[e]]] = e;
      row_of[next[row_index_[e]]++] = r;
    }
  }
  LowerTriangle matrix;
  matrix.start.assign(1, 0);
  matrix.row.reserve(row_index_.size() * 2);
  matrix.value.reserve(row_index_.size() * 2);
  std::vector<double> column(unknowns, 0.0);
  std::vector<std::uint64_t> touched((unknowns + 63) / 64, 0);
  for (std::uint32_t j = 0; j < unknowns; ++j) {
    touched[j / 64] |= std::uint64_t{1} << (j % 64);
    column[j] = 1;
    for (std::uint32_t at = first[j]; at < first[j + 1]; ++at) {
      const std::uint32_t r = row_of[at];
      const double weight = row_value_[where[at]] / row_noise_[r];
      for (std::uint32_t e = where[at]; e < row_start_[r + 1]; ++e) {
        const std::uint32_t i = row_index_[e];
        touched[i / 64] |= std::uint64_t{1} << (i % 64);
        column[i] += weight * row_value_[e];
      }
    }
    for (std::size_t w = j / 64; w < touched.size(); ++w) {
      for (; touched[w] != 0; touched[w] &= touched[w] - 1) {
        const std::size_t i = w * 64 + static_cast<std::size_t>(std::countr_zero(touched[w]));
        matrix.row.push_back(static_cast<int>(i));
        matrix.value.push_back(column[i]);
        column[i] = 0;
      }
    }
    matrix.start.push_back(static_cast<int>(matrix.row.size()));
  }
  return matrix;
}

void ContextFit::solve() {
  cholesky_.factor(information());
  const std::size_t right_hand_sides = rows_.front().y.size();
  std::vector<double> sum, forward;
  for (std::size_t k = 0; k < right_hand_sides; ++k) {
    sum.assign(cholesky_.size(), 0.0);
    for (std::uint32_t r = 0; r < rows_.size(); ++r) {
      const double weight = rows_[r].y[k] / row_noise_[r];
      for (std::uint32_t e = row_start_[r]; e < row_start_[r + 1]; ++e)
        sum[row_index_[e]] += row_value_[e] * weight;
    }
    cholesky_.forward(sum, forward);
    beta_.emplace_back();
    cholesky_.backward(forward, beta_.back());
  }
}

const FeaturePlace* ContextFit::find(std::uint64_t key) const {
  std::size_t slot = key & (slots_.size() - 1);
  while (slots_[slot] != 0) {
    const Entry& entry = entries_[slots_[slot] - 1];
    if (entry.key == key) return &entry.place;
    slot = (slot + 1) & (slots_.size() - 1);
  }
  return nullptr;
}

std::vector<std::uint32_t> ContextFit::rows_of(std::uint64_t constitution) const {
  std::vector<std::uint32_t> rows;
  auto at = std::lower_bound(by_constitution_.begin(), by_constitution_.end(),
                             std::make_pair(constitution, std::uint32_t{0}));
  for (; at != by_constitution_.end() && at->first == constitution; ++at) rows.push_back(at->second);
  return rows;
}

std::uint32_t ContextFit::find_row(const ContextMolecule& molecule) const {
  auto at = std::lower_bound(by_constitution_.begin(), by_constitution_.end(),
                             std::make_pair(molecule.constitution, std::uint32_t{0}));
  std::uint32_t only = kNone;
  std::size_t isomers = 0;
  for (; at != by_constitution_.end() && at->first == molecule.constitution; ++at) {
    if (rows_[at->second].molecule->stereo == molecule.stereo) return at->second;
    only = at->second;
    ++isomers;
  }
  if (isomers != 1) return kNone;
  const ContextMolecule& row = *rows_[only].molecule;
  const bool one_is_silent = molecule.stereo == 0 || row.stereo == 0;
  return one_is_silent || same_counts(molecule, row) ? only : kNone;
}

std::vector<std::pair<std::uint64_t, double>> ContextFit::row_latents(std::uint32_t row) const {
  std::vector<std::pair<std::uint64_t, double>> latents;
  for (const FeatureCount& feature : rows_[row].molecule->features) {
    const FeaturePlace* place = find(feature.key);
    if (place != nullptr && place->row == row) latents.emplace_back(feature.key, place->in_row);
  }
  latents.emplace_back(own_key(row), std::sqrt(rows_[row].own));
  return latents;
}

double ContextFit::row_dot(std::uint32_t row, const std::vector<double>& x) const {
  double sum = 0;
  for (std::uint32_t e = row_start_[row]; e < row_start_[row + 1]; ++e)
    sum += row_value_[e] * x[row_index_[e]];
  return sum;
}

void ContextFit::row_vector(std::uint32_t row, std::vector<double>& x) const {
  x.assign(unknowns(), 0.0);
  for (std::uint32_t e = row_start_[row]; e < row_start_[row + 1]; ++e) x[row_index_[e]] = row_value_[e];
}

double ContextFit::feature_value(const FeatureCount& feature, std::size_t right_hand_side) const {
  const double spread = settings_.spread[static_cast<std::size_t>(feature.family)];
  const FeaturePlace* place = spread == 0 ? nullptr : find(feature.key);
  if (place == nullptr) return 0;
  const std::vector<double>& beta = beta_[right_hand_side];
  if (place->shared != kNone) return spread * beta[place->shared];
  const double left_over = rows_[place->row].y[right_hand_side] - row_dot(place->row, beta);
  return spread * place->in_row * left_over / row_noise_[place->row];
}

Functional ContextFit::functional(const std::vector<Term>& terms,
                                  const std::vector<std::uint32_t>& without) const {
  Functional out;
  out.x.assign(unknowns(), 0.0);
  out.constant.assign(right_hand_sides(), 0.0);
  const auto is_left_out = [&](std::uint32_t row) {
    return std::find(without.begin(), without.end(), row) != without.end();
  };
  const auto add_latent = [&](std::uint64_t key, double coefficient, std::uint32_t row, double in_row,
                              bool own) {
    Functional::Latent latent;
    latent.key = key;
    latent.coefficient = coefficient;
    latent.own = own;
    if (row != kNone && !is_left_out(row)) {
      latent.row = row;
      latent.in_row = in_row;
    }
    out.latents.push_back(latent);
  };
  for (const Term& term : terms) {
    for (const FeatureCount& feature : term.molecule->features) {
      const double spread = settings_.spread[static_cast<std::size_t>(feature.family)];
      if (spread == 0) continue;
      const double scaled = term.coefficient * feature.count * spread;
      const FeaturePlace* place = find(feature.key);
      if (place != nullptr && place->shared != kNone) {
        out.x[place->shared] += scaled;
      } else {
        add_latent(feature.key, scaled, place == nullptr ? kNone : place->row,
                   place == nullptr ? 0 : place->in_row, false);
      }
    }
    if (!term.own) continue;
    const double own = std::sqrt(own_variance(settings_, term.molecule->measures));
    const std::uint32_t row = term.own_row ? find_row(*term.molecule) : kNone;
    const std::uint64_t identity =
        row != kNone ? own_key(row) : mix(mix(term.molecule->constitution, term.molecule->stereo), 0xd2);
    add_latent(identity, term.coefficient * own, row, own, true);
  }
  // Equal unknowns of several terms net before anything is squared.
  std::stable_sort(out.latents.begin(), out.latents.end(),
                   [](const Functional::Latent& a, const Functional::Latent& b) { return a.key < b.key; });
  std::size_t kept = 0;
  for (std::size_t i = 0; i < out.latents.size(); ++i) {
    if (kept != 0 && out.latents[kept - 1].key == out.latents[i].key) {
      out.latents[kept - 1].coefficient += out.latents[i].coefficient;
    } else {
      out.latents[kept++] = out.latents[i];
    }
  }
  out.latents.resize(kept);
  out.latents.erase(std::remove_if(out.latents.begin(), out.latents.end(),
                                   [](const Functional::Latent& latent) { return latent.coefficient == 0; }),
                    out.latents.end());
  for (const Functional::Latent& latent : out.latents) {
    if (latent.row == kNone) {
      out.unseen += !latent.own;
      continue;
    }
    out.in_table = out.in_table || latent.own;
    const double share = latent.coefficient * latent.in_row;
    const auto known = std::find_if(out.rows.begin(), out.rows.end(),
                                    [&](const Functional::RowShare& r) { return r.row == latent.row; });
    if (known != out.rows.end()) {
      known->share += share;
    } else {
      out.rows.push_back({latent.row, share});
    }
  }
  std::sort(out.rows.begin(), out.rows.end(),
            [](const Functional::RowShare& a, const Functional::RowShare& b) { return a.row < b.row; });
  // What a row says of its own unknowns: share / variance × (figure − shared features).
  for (const Functional::RowShare& share : out.rows) {
    const double gain = share.share / row_noise_[share.row];
    for (std::uint32_t e = row_start_[share.row]; e < row_start_[share.row + 1]; ++e) {
      out.x[row_index_[e]] -= gain * row_value_[e];
    }
    for (std::size_t k = 0; k < out.constant.size(); ++k) out.constant[k] += gain * rows_[share.row].y[k];
  }
  return out;
}

double ContextFit::mean(const Functional& functional, std::size_t right_hand_side) const {
  const std::vector<double>& beta = beta_[right_hand_side];
  double sum = functional.constant[right_hand_side];
  for (std::size_t j = 0; j < beta.size(); ++j) {
    if (functional.x[j] != 0) sum += functional.x[j] * beta[j];
  }
  return sum;
}

double ContextFit::variance(const Functional& f) const {
  double sum = cholesky_.squared_norm(f.x);
  for (const Functional::Latent& latent : f.latents) sum += latent.coefficient * latent.coefficient;
  for (const Functional::RowShare& row : f.rows) sum -= row.share * row.share / row_noise_[row.row];
  return sum;
}

double ContextFit::covariance(const Functional& f, const std::vector<double>& zf, const Functional& g,
                              const std::vector<double>& zg) const {
  double sum = 0;
  for (std::size_t j = 0; j < zf.size(); ++j) sum += zf[j] * zg[j];
  for (std::size_t i = 0, k = 0; i < f.latents.size() && k < g.latents.size();) {
    if (f.latents[i].key < g.latents[k].key) {
      ++i;
    } else if (g.latents[k].key < f.latents[i].key) {
      ++k;
    } else {
      sum += f.latents[i++].coefficient * g.latents[k++].coefficient;
    }
  }
  for (std::size_t i = 0, k = 0; i < f.rows.size() && k < g.rows.size();) {
    if (f.rows[i].row < g.rows[k].row) {
      ++i;
    } else if (g.rows[k].row < f.rows[i].row) {
      ++k;
    } else {
      sum -= f.rows[i].share * g.rows[k].share / row_noise_[f.rows[i].row];
      ++i;
      ++k;
    }
  }
  return sum;
}

}  // namespace heatledger::estimate
