#include "core/estimate/context_fit.hpp"

#include <algorithm>
#include <cmath>
#include <map>

#include "core/estimate/context_conditioning.hpp"
#include "core/estimate/context_table.hpp"
#include "tests/core/estimate/context_support.hpp"

namespace heatledger::estimate {
namespace {

/// Sparse rows of the whole model, every row's own unknowns included: nothing is taken out beforehand here.
struct Augmented {
  std::vector<std::vector<std::pair<std::size_t, double>>>
      rows;  ///< scaled features, then 1 / noise in `weight`
  std::vector<double> weight, y;
  std::map<std::uint64_t, std::size_t> index;

  std::vector<double> scaled(const ContextSettings& settings, const ContextMolecule& molecule) {
    std::vector<double> x(index.size(), 0.0);
    for (const FeatureCount& feature : molecule.features) {
      const auto known = index.find(feature.key);
      if (known != index.end())
        x[known->second] = settings.spread[static_cast<std::size_t>(feature.family)] * feature.count;
    }
    return x;
  }

  /// (1 + Σ w x x') v, row by row: the matrix is never formed.
  std::vector<double> times(const std::vector<double>& v) const {
    std::vector<double> out = v;
    for (std::size_t r = 0; r < rows.size(); ++r) {
      double dot = 0;
      for (const auto& [j, x] : rows[r]) dot += x * v[j];
      for (const auto& [j, x] : rows[r]) out[j] += weight[r] * dot * x;
    }
    return out;
  }

  /// Conjugate gradients with the diagonal as preconditioner, until the residual is 1e-12 of the right-hand
  /// side.
  std::vector<double> solve(const std::vector<double>& b) const {
    std::vector<double> diagonal(b.size(), 1.0), x(b.size(), 0.0), r = b, z(b.size()), p(b.size());
    for (std::size_t k = 0; k < rows.size(); ++k) {
      for (const auto& [j, value] : rows[k]) diagonal[j] += weight[k] * value * value;
    }
    const auto dot = [](const std::vector<double>& a, const std::vector<double>& c) {
      double sum = 0;
      for (std::size_t i = 0; i < a.size(); ++i) sum += a[i] * c[i];
      return sum;
    };
    for (std::size_t i = 0; i < b.size(); ++i) p[i] = z[i] = r[i] / diagonal[i];
    double rz = dot(r, z);
    const double stop = 1e-24 * dot(b, b);
    for (int step = 0; step < 20000 && dot(r, r) > stop; ++step) {
      const std::vector<double> ap = times(p);
      const double alpha = rz / dot(p, ap);
      for (std::size_t i = 0; i < b.size(); ++i) {
        x[i] += alpha * p[i];
        r[i] -= alpha * ap[i];
        z[i] = r[i] / diagonal[i];
      }
      const double next = dot(r, z);
      for (std::size_t i = 0; i < b.size(); ++i) p[i] = z[i] + next / rz * p[i];
      rz = next;
    }
    EXPECT_LE(dot(r, r), stop);
    return x;
  }
};

Augmented augmented_of(const ContextSettings& settings, const std::vector<FitRow>& rows) {
  Augmented out;
  for (const FitRow& row : rows) {
    out.rows.emplace_back();
    for (const FeatureCount& feature : row.molecule->features) {
      const double spread = settings.spread[static_cast<std::size_t>(feature.family)];
      if (spread == 0) continue;
      const std::size_t j = out.index.emplace(feature.key, out.index.size()).first->second;
      out.rows.back().emplace_back(j, spread * feature.count);
    }
    out.weight.push_back(1 / row.noise);
    out.y.push_back(row.y[0]);
  }
  return out;
}

class ContextRefitByGradients : public testing::TestWithParam<FitKind> {};

/// An independent refit: all features as unknowns, conjugate gradients instead of a factor, no elimination.
TEST_P(ContextRefitByGradients, AgreesWithConjugateGradients) {
  const FitKind kind = GetParam();
  const ContextSettings& settings = context_settings(kind);
  const std::vector<FitRow> rows = fit_rows(kind, training_figures(kind), std::vector<double>(8, 298.15));
  const ContextFit fit(settings, rows);
  Augmented augmented = augmented_of(settings, rows);
  EXPECT_EQ(augmented.index.size(), fit.features());
  std::vector<double> b(augmented.index.size(), 0.0);
  for (std::size_t r = 0; r < rows.size(); ++r) {
    for (const auto& [j, x] : augmented.rows[r]) b[j] += augmented.weight[r] * x * augmented.y[r];
  }
  const std::vector<double> beta = augmented.solve(b);
  for (const char* smiles : {"CCOC(C)=O", "CC(C)(C)c1ccccc1", "NCCO"}) {
    const ContextMolecule molecule = molecule_of(smiles);
    const std::vector<double> x = augmented.scaled(settings, molecule);
    double mean = 0, variance = 0;
    const std::vector<double> solved = augmented.solve(x);
    for (std::size_t j = 0; j < x.size(); ++j) {
      mean += x[j] * beta[j];
      variance += x[j] * solved[j];
    }
    for (const FeatureCount& feature : molecule.features) {
      const double scaled = settings.spread[static_cast<std::size_t>(feature.family)] * feature.count;
      if (augmented.index.count(feature.key) == 0) variance += scaled * scaled;
    }
    const Functional features = fit.functional({{1, &molecule, false}}, {});
    // 1e-8 of values near 1e3: what is left of double precision after thousands of steps.
    EXPECT_NEAR(fit.mean(features, 0), mean, 1e-8 * (1 + std::fabs(mean))) << smiles;
    EXPECT_NEAR(std::sqrt(fit.variance(features)), std::sqrt(variance), 1e-8) << smiles;
  }
}

INSTANTIATE_TEST_SUITE_P(Properties, ContextRefitByGradients,
                         testing::Values(FitKind::Gas298, FitKind::Liquid));

/// The formation enthalpies, whose system is too stiff for conjugate gradients, by the dual: one unknown a
/// row, plain elimination of the dense covariance matrix of the rows, on every fourth row of the table.
TEST(ContextRefit, AgreesWithEliminationOfTheDual) {
  const ContextSettings& settings = context_settings(FitKind::Formation);
  std::vector<FitRow> rows;
  const std::vector<FitRow> all =
      fit_rows(FitKind::Formation, training_figures(FitKind::Formation), {298.15});
  for (std::size_t r = 0; r < all.size(); r += 4) rows.push_back(all[r]);
  const ContextFit fit(settings, rows);
  Augmented augmented = augmented_of(settings, rows);
  const std::size_t n = rows.size();
  std::vector<std::vector<double>> dense;
  for (const FitRow& row : rows) dense.push_back(augmented.scaled(settings, *row.molecule));
  const auto dot = [](const std::vector<double>& a, const std::vector<double>& b) {
    double sum = 0;
    for (std::size_t i = 0; i < a.size(); ++i) sum += a[i] * b[i];
    return sum;
  };
  const std::vector<std::string> asked = {"CCOC(C)=O", "CC(C)(C)c1ccccc1", "OCCCO", "C1CCC2CCCCC2C1"};
  std::vector<std::vector<double>> targets;
  for (const std::string& smiles : asked) targets.push_back(augmented.scaled(settings, molecule_of(smiles)));
  // Columns: covariance of the rows, then the figures, then the covariances with what is asked.
  const std::size_t width = n + 1 + asked.size();
  std::vector<std::vector<double>> system(n, std::vector<double>(width, 0.0));
  for (std::size_t i = 0; i < n; ++i) {
    for (std::size_t j = 0; j <= i; ++j) system[i][j] = system[j][i] = dot(dense[i], dense[j]);
    system[i][i] += rows[i].noise;
    system[i][n] = rows[i].y[0];
    for (std::size_t k = 0; k < asked.size(); ++k) system[i][n + 1 + k] = dot(dense[i], targets[k]);
  }
  const std::vector<std::vector<double>> whole = system;
  for (std::size_t p = 0; p < n; ++p) {
    for (std::size_t i = p + 1; i < n; ++i) {
      const double factor = system[i][p] / system[p][p];
      if (factor == 0) continue;
      for (std::size_t j = p; j < width; ++j) system[i][j] -= factor * system[p][j];
    }
  }
  for (std::size_t p = n; p-- > 0;) {
    for (std::size_t c = n; c < width; ++c) {
      for (std::size_t j = p + 1; j < n; ++j) system[p][c] -= system[p][j] * system[j][c];
      system[p][c] /= system[p][p];
    }
  }
  for (std::size_t k = 0; k < asked.size(); ++k) {
    double mean = 0, variance = dot(targets[k], targets[k]);
    for (std::size_t i = 0; i < n; ++i) {
      mean += whole[i][n + 1 + k] * system[i][n];
      variance -= whole[i][n + 1 + k] * system[i][n + 1 + k];
    }
    const ContextMolecule molecule = molecule_of(asked[k]);
    for (const FeatureCount& feature : molecule.features) {
      const double scaled = settings.spread[static_cast<std::size_t>(feature.family)] * feature.count;
      if (augmented.index.count(feature.key) == 0) variance += scaled * scaled;
    }
    const Functional features = fit.functional({{1, &molecule, false}}, {});
    // The dual takes the difference of terms near 1e6, so 1e-8 holds relative to those.
    EXPECT_NEAR(fit.mean(features, 0), mean, 1e-8 * (1 + std::fabs(mean))) << asked[k];
    EXPECT_NEAR(fit.variance(features), variance, 1e-8 * dot(targets[k], targets[k])) << asked[k];
  }
}

TEST(SparseCholesky, SolvesASmallMatrix) {
  // A chain of 40 unknowns with a dense corner: positive definite because the diagonal dominates.
  LowerTriangle matrix;
  matrix.start.push_back(0);
  const int n = 40;
  for (int j = 0; j < n; ++j) {
    for (int i = j; i < n; ++i) {
      const bool dense = j >= 25, chained = i == j + 1;
      if (i != j && !dense && !chained) continue;
      matrix.row.push_back(i);
      matrix.value.push_back(i == j ? 30.0 + j : 1.0 / (1 + i - j));
    }
    matrix.start.push_back(static_cast<int>(matrix.row.size()));
  }
  SparseCholesky cholesky;
  cholesky.factor(matrix);
  EXPECT_GE(cholesky.dense_size(), 15u);
  std::vector<double> x(n, 0.0), z, solved;
  for (int j = 0; j < n; j += 7) x[static_cast<std::size_t>(j)] = 1 + j;
  cholesky.forward(x, z);
  cholesky.backward(z, solved);
  std::vector<double> back(n, 0.0);
  for (std::size_t j = 0; j < static_cast<std::size_t>(n); ++j) {
    for (int e = matrix.start[j]; e < matrix.start[j + 1]; ++e) {
      const std::size_t i = static_cast<std::size_t>(matrix.row[static_cast<std::size_t>(e)]);
      const double value = matrix.value[static_cast<std::size_t>(e)];
      back[i] += value * solved[j];
      if (i != j) back[j] += value * solved[i];
    }
  }
  for (std::size_t j = 0; j < back.size(); ++j)
    EXPECT_NEAR(back[j], x[j], 1e-12);  // one solve of a well-conditioned matrix
  double product = 0;
  for (std::size_t j = 0; j < x.size(); ++j) product += x[j] * solved[j];
  EXPECT_NEAR(cholesky.squared_norm(x), product, 1e-12 * product);
}

/// Weights, values and structures of the embedded table are usable: every row, not a sample.
TEST(ContextTable, HoldsOnlyUsableRows) {
  for (std::size_t c = 0; c < training_compounds().size(); ++c) {
    const TrainingCompound& compound = training_compounds()[c];
    Result<ContextMolecule> counted = context_molecule(graph_of(std::string(compound.smiles)));
    ASSERT_TRUE(counted.ok()) << compound.smiles;
    EXPECT_FALSE(compound.name.empty());
  }
  std::size_t figures = 0;
  for (const FitKind kind :
       {FitKind::Formation, FitKind::Vaporisation, FitKind::Gas298, FitKind::GasAbove, FitKind::Liquid}) {
    for (const TrainingFigure& figure : training_figures(kind)) {
      ++figures;
      EXPECT_GT(figure.u95, 0);
      EXPECT_GT(figure.weight, 0);
      EXPECT_FALSE(source_text(figure.sources).empty());
      for (const double value : figure.value) EXPECT_TRUE(std::isfinite(value));
    }
  }
  EXPECT_GT(figures, 9000u);
}

/// Two rows of one structure would tell a molecule's own deviation twice. Known pairs: mirror images, which
/// the key holds for one, and imines whose geometry hangs on a hydrogen.
TEST(ContextTable, HasEveryStructureOnce) {
  const std::vector<std::string> known = {"C[C@@H]1CCCC[C@@H]1O C[C@H]1CCCC[C@H]1O", "CC=N [H]/N=C/C",
                                          "CC=N [H]/N=C\\C"};
  std::map<std::pair<std::uint64_t, std::uint64_t>, std::string> seen;
  for (std::size_t c = 0; c < training_compounds().size(); ++c) {
    const ContextMolecule& molecule = training_molecule(c);
    const std::string smiles(training_compounds()[c].smiles);
    const auto [at, fresh] = seen.emplace(std::make_pair(molecule.constitution, molecule.stereo), smiles);
    if (fresh) continue;
    EXPECT_EQ(std::count(known.begin(), known.end(), at->second + " " + smiles), 1)
        << at->second << " and " << smiles;
  }
}

}  // namespace
}  // namespace heatledger::estimate
