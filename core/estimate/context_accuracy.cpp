#include "core/estimate/context_accuracy.hpp"

#include <algorithm>
#include <cmath>
#include <map>

#include "core/base/check.hpp"
#include "core/base/number_text.hpp"
#include "core/estimate/context_graph.hpp"
#include "core/molecule/smiles.hpp"

namespace heatledger::estimate {
namespace {

constexpr unsigned bit(Family family) {
  return 1u << static_cast<unsigned>(family);
}

Family exclusive_family(const ContextGraph& graph) {
  const auto has = [&](Kind kind) { return graph.elements[static_cast<std::size_t>(kind)] != 0; };
  const bool organic = has(Kind::C) && (graph.atoms.size() >= 3 || has(Kind::H));
  if (!organic) return Family::Inorganic;
  if (has(Kind::Si) || has(Kind::P) || has(Kind::B)) return Family::SiliconPhosphorusBoron;
  if (has(Kind::F) || has(Kind::Cl) || has(Kind::Br) || has(Kind::I)) return Family::Halogen;
  if (has(Kind::S)) return Family::Sulfur;
  bool carbonyl = false;
  for (std::uint32_t i = 0; i < graph.atoms.size(); ++i) {
    unsigned oxo = 0;
    for (const auto& next : around(graph, i))
      oxo += graph.bonds[next.bond].order == 2 && graph.atoms[next.atom].kind == Kind::O;
    if (graph.atoms[i].kind == Kind::N && oxo == 2) return Family::Nitro;
    carbonyl = carbonyl || (graph.atoms[i].kind == Kind::C && oxo != 0);
  }
  if (has(Kind::N)) return Family::Nitrogen;
  if (carbonyl) return Family::Carbonyl;
  return has(Kind::O) ? Family::AlcoholEther : Family::Hydrocarbon;
}

bool is_strained(const ContextGraph& graph) {
  for (const ContextRing& ring : graph.rings) {
    if (ring.atoms.size() <= 4) return true;
    for (const ContextRing& other : graph.rings) {
      if (&other == &ring) break;
      const auto common = std::count_if(ring.bonds.begin(), ring.bonds.end(), [&](std::uint32_t bond) {
        return std::find(other.bonds.begin(), other.bonds.end(), bond) != other.bonds.end();
      });
      if (common >= 2) return true;
    }
  }
  return false;
}

double quantile(std::vector<double> values, double share) {
  if (values.empty()) return 0;
  std::sort(values.begin(), values.end());
  const double place = share * static_cast<double>(values.size() - 1);
  const std::size_t below = static_cast<std::size_t>(place);
  const std::size_t above = std::min(below + 1, values.size() - 1);
  return values[below] + (values[above] - values[below]) * (place - static_cast<double>(below));
}

LeftOutRow compare(const ContextFit& fit, const Conditioning& conditioning, FitKind kind, const FitRow& row,
                   const TrainingFigure& figure, std::size_t right_hand_side) {
  const Direction direction = conditioning.direction({{1, row.molecule}});
  LeftOutRow out;
  // The fit works with sign × value; errors are reported in the sign of the value.
  out.error = sign_of(kind) * (row.y[right_hand_side] - conditioning.mean(direction, right_hand_side));
  out.s = std::sqrt(conditioning.variance(direction) + error_variance(fit.settings(), figure));
  return out;
}

const char* kFamilyNames[] = {
    "hydrocarbon", "alcohol, ether", "carbonyl, acid, ester", "amine, nitrile, amide", "nitro", "sulfur",
    "halogen",     "Si, P, B",       "small inorganic",       "strained ring, cage"};

}  // namespace

std::vector<LeftOutRow> leave_each_out(const FittedProperty& fitted, FitKind kind,
                                       std::size_t right_hand_side) {
  const ContextFit& fit = *fitted.fit;
  std::vector<LeftOutRow> out;
  for (std::uint32_t r = 0; r < fit.rows().size(); ++r) {
    const FitRow& row = fit.rows()[r];
    const Conditioning without(fit, fit.rows_of(row.molecule->constitution), {});
    LeftOutRow one = compare(fit, without, kind, row, fitted.figures[r], right_hand_side);
    one.figure = r;
    out.push_back(one);
  }
  return out;
}

std::vector<LeftOutRow> leave_folds_out(FitKind kind, std::size_t right_hand_side, unsigned folds) {
  const FittedProperty& fitted = embedded_fit(kind);
  std::vector<LeftOutRow> out;
  for (unsigned fold = 0; fold < folds; ++fold) {
    std::vector<FitRow> kept;
    std::vector<std::uint32_t> left;
    for (std::uint32_t r = 0; r < fitted.figures.size(); ++r) {
      const FitRow& row = fitted.fit->rows()[r];
      if (row.molecule->constitution % folds == fold) {
        left.push_back(r);
      } else {
        kept.push_back(row);
      }
    }
    const ContextFit fit(fitted.fit->settings(), std::move(kept));
    const Conditioning plain(fit, {}, {});
    for (const std::uint32_t r : left) {
      LeftOutRow one = compare(fit, plain, kind, fitted.fit->rows()[r], fitted.figures[r], right_hand_side);
      one.figure = r;
      out.push_back(one);
    }
  }
  return out;
}

std::vector<LeftOutRow> rows_set_aside(const FittedProperty& fitted, FitKind kind) {
  const std::vector<TrainingFigure> figures = training_figures(kind, TrainingRows::SetAside);
  const std::vector<FitRow> rows = fit_rows(kind, figures, fitted.temperatures);
  std::vector<LeftOutRow> out;
  for (std::uint32_t r = 0; r < rows.size(); ++r) {
    LeftOutRow one = compare(*fitted.fit, *fitted.plain, kind, rows[r], figures[r], 0);
    one.figure = r;
    out.push_back(one);
  }
  return out;
}

unsigned families_of(std::size_t compound) {
  Result<molecule::Graph> graph = molecule::parse_smiles(training_compounds()[compound].smiles);
  CHECK(graph.ok(), "a readable structure in the training table");
  Result<ContextGraph> prepared = context_graph(*graph);
  CHECK(prepared.ok(), "a structure that the model covers in the training table");
  return bit(exclusive_family(*prepared)) | (is_strained(*prepared) ? bit(Family::Strained) : 0u);
}

AccuracyLine accuracy_of(const std::string& set, const std::vector<LeftOutRow>& rows,
                         const ContextSettings& settings, const std::vector<bool>& take) {
  AccuracyLine line;
  line.set = set;
  std::vector<double> errors, spreads;
  double sum = 0, squares = 0;
  std::size_t within68 = 0, within95 = 0;
  for (std::size_t i = 0; i < rows.size(); ++i) {
    if (!take[i]) continue;
    const double error = std::fabs(rows[i].error);
    errors.push_back(error);
    spreads.push_back(rows[i].s);
    sum += error;
    squares += error * error;
    within68 += error < settings.k68 * rows[i].s;
    within95 += error < settings.k95 * rows[i].s;
  }
  line.n = errors.size();
  if (line.n == 0) return line;
  const double n = static_cast<double>(line.n);
  line.mean = sum / n;
  line.rms = std::sqrt(squares / n);
  line.median = quantile(errors, 0.5);
  line.p90 = quantile(errors, 0.9);
  line.median_s = quantile(spreads, 0.5);
  line.cover68 = static_cast<double>(within68) / n;
  line.cover95 = static_cast<double>(within95) / n;
  return line;
}

bool in_choosing_half(const ContextMolecule& molecule) {
  return (mix(molecule.constitution, 0x5eed) & 1) == 0;
}

std::vector<AccuracyLine> accuracy_table(const FittedProperty& fitted, FitKind kind,
                                         const std::vector<LeftOutRow>& rows) {
  const ContextSettings& settings = context_settings(kind);
  std::vector<unsigned> families;
  std::vector<bool> trusted, reported;
  for (const LeftOutRow& row : rows) {
    const TrainingFigure& figure = fitted.figures[row.figure];
    families.push_back(families_of(figure.compound));
    trusted.push_back(figure.trusted);
    reported.push_back(!in_choosing_half(training_molecule(figure.compound)));
  }
  std::vector<AccuracyLine> lines;
  const auto add = [&](const char* set, const auto& take) {
    std::vector<bool> taken;
    for (std::size_t i = 0; i < rows.size(); ++i) taken.push_back(take(i));
    lines.push_back(accuracy_of(set, rows, settings, taken));
  };
  const auto organic = [&](std::size_t i) { return (families[i] & bit(Family::Inorganic)) == 0; };
  add("all rows", [](std::size_t) { return true; });
  add("trusted", [&](std::size_t i) { return trusted[i]; });
  add("trusted, organic", [&](std::size_t i) { return trusted[i] && organic(i); });
  add("  second half", [&](std::size_t i) { return trusted[i] && organic(i) && reported[i]; });
  for (std::size_t f = 0; f <= exclusive_families; ++f) {
    const bool overlaps = f == exclusive_families;  // strained rings: of organic molecules
    add(kFamilyNames[f], [&](std::size_t i) {
      return trusted[i] && (families[i] >> f & 1) != 0 && (!overlaps || organic(i));
    });
  }
  add("one source only", [&](std::size_t i) { return !trusted[i]; });
  if (kind == FitKind::Formation) {
    const std::vector<LeftOutRow> aside = rows_set_aside(fitted, kind);
    lines.push_back(accuracy_of("set aside", aside, settings, std::vector<bool>(aside.size(), true)));
    // All rows set aside are organic and shared by two sources: what the line of trusted organic rows would
    // be with them.
    std::vector<LeftOutRow> together = aside;
    for (std::size_t i = 0; i < rows.size(); ++i)
      if (trusted[i] && organic(i)) together.push_back(rows[i]);
    lines.push_back(
        accuracy_of("organic, with those", together, settings, std::vector<bool>(together.size(), true)));
  }
  return lines;
}

std::string accuracy_text(const std::vector<AccuracyLine>& lines) {
  const auto cell = [](const std::string& text, std::size_t width) {
    return std::string(width > text.size() ? width - text.size() : 1, ' ') + text;
  };
  const auto fixed = [&](double value, double unit) {
    // Rounded in whole units of the last digit, so the text does not depend on any library.
    const long long whole = std::llround(value * unit);
    const long long one = static_cast<long long>(unit);
    std::string fraction = std::to_string(whole % one + one).substr(1);
    return cell(std::to_string(whole / one) + "." + fraction, 8);
  };
  std::string text =
      "set                        n    mean  median     rms     p90   cov68   cov95 median s\n";
  for (const AccuracyLine& line : lines) {
    text += line.set + std::string(line.set.size() < 23 ? 23 - line.set.size() : 1, ' ') +
            cell(std::to_string(line.n), 5);
    if (line.n == 0) {
      text += "\n";
      continue;
    }
    for (const double value : {line.mean, line.median, line.rms, line.p90}) text += fixed(value, 100);
    for (const double value : {line.cover68, line.cover95}) text += fixed(value, 1000);
    text += fixed(line.median_s, 10) + "\n";
  }
  return text;
}

}  // namespace heatledger::estimate
