#include "core/burning/combustion_gases.hpp"

#include <algorithm>
#include <cmath>

#include "core/base/check.hpp"
#include "core/facts/library.hpp"
#include "core/molecule/formula.hpp"

namespace heatledger::burning {

namespace {

struct Named {
  std::string_view name, formula;
};

constexpr Named kNames[] = {
    {"nitrogen", "N2"},
    {"oxygen", "O2"},
    {"water", "H2O"},
    {"carbon dioxide", "CO2"},
    {"argon", "Ar"},
    {"carbon monoxide", "CO"},
    {"hydrogen", "H2"},
    {"nitric oxide", "NO"},
    {"hydroxyl radical", "OH"},
    {"hydrogen atom", "H"},
    {"oxygen atom", "O"},
    {"sulfur dioxide", "SO2"},
    {"sulfur trioxide", "SO3"},
    {"sulfur monoxide", "SO"},
    {"hydrogen chloride", "HCl"},
    {"chlorine", "Cl2"},
    {"chlorine atom", "Cl"},
    {"nitrogen dioxide", "NO2"},
    {"nitrous oxide", "N2O"},
    {"hydroperoxyl radical", "HO2"},
    {"hydrogen peroxide", "H2O2"},
    {"ozone", "O3"},
    {"nitrogen atom", "N"},
    {"carbon atom", "C"},
    {"sulfur atom", "S"},
    {"ammonia", "NH3"},
    {"amidogen", "NH2"},
    {"imidogen", "NH"},
    {"nitrous acid", "HNO2"},
    {"nitric acid", "HNO3"},
    {"dinitrogen tetroxide", "N2O4"},
    {"hydrogen cyanide", "HCN"},
    {"isocyanic acid", "HNCO"},
    {"cyanogen", "C2N2"},
    {"cyanogen chloride", "ClCN"},
    {"hydrogen sulfide", "H2S"},
    {"mercapto radical", "SH"},
    {"disulfur", "S2"},
    {"octasulfur", "S8"},
    {"carbonyl sulfide", "COS"},
    {"carbon disulfide", "CS2"},
    {"sulfuric acid", "H2SO4"},
    {"methane", "CH4"},
    {"methyl radical", "CH3"},
    {"methylene radical", "CH2"},
    {"ethyne", "C2H2"},
    {"ethene", "C2H4"},
    {"ethane", "C2H6"},
    {"formaldehyde", "CH2O"},
    {"hypochlorous acid", "HOCl"},
    {"dichlorine monoxide", "Cl2O"},
    {"chlorine dioxide", "ClO2"},
    {"nitrosyl chloride", "NOCl"},
    {"sulfuryl chloride", "SO2Cl2"},
    {"disulfur dichloride", "S2Cl2"},
    {"phosgene", "COCl2"},
    {"tetrachloromethane", "CCl4"},
    {"tetrachloroethene", "C2Cl4"},
};

bool is_complete_product(std::string_view formula) {
  return formula == "CO2" || formula == "H2O" || formula == "SO2" || formula == "HCl";
}

GasFigures inside(const std::array<double, 7>& a, double t, double log_t) {
  GasFigures f;
  f.cp_r = a[0] + t * (a[1] + t * (a[2] + t * (a[3] + t * a[4])));
  f.h_rt = a[0] + t * (a[1] / 2 + t * (a[2] / 3 + t * (a[3] / 4 + t * a[4] / 5))) + a[5] / t;
  f.s_r = a[0] * log_t + t * (a[1] + t * (a[2] / 2 + t * (a[3] / 3 + t * a[4] / 4))) + a[6];
  return f;
}

GasFigures figures_of(const facts::Polynomial& polynomial, double t, double log_t) {
  const double end = std::clamp(t, polynomial.lowest(), polynomial.highest());
  const facts::PolynomialRange* range = &polynomial.ranges.front();
  for (const facts::PolynomialRange& next : polynomial.ranges) {
    if (end >= next.from) range = &next;
  }
  if (end == t) return inside(range->a, t, log_t);
  // Beyond the range: constant heat capacity.
  const double log_end = std::log(end);
  GasFigures f = inside(range->a, end, log_end);
  f.h_rt = (f.h_rt * end + f.cp_r * (t - end)) / t;
  f.s_r += f.cp_r * (log_t - log_end);
  return f;
}

}  // namespace

GasFigures Gas::at(double temperature, double log_temperature) const {
  GasFigures f = figures_of(*polynomial, temperature, log_temperature);
  f.h_rt += shift / (kFitGasConstant * temperature);
  return f;
}

double Gas::enthalpy(double temperature) const {
  return kFitGasConstant * temperature * at(temperature, std::log(temperature)).h_rt;
}

double Gas::heat_capacity(double temperature) const {
  return kFitGasConstant * at(temperature, std::log(temperature)).cp_r;
}

const std::vector<Gas>& combustion_gases() {
  static const std::vector<Gas> all = [] {
    std::vector<Gas> gases;
    for (const Named& named : kNames) {
      Gas gas;
      gas.name = named.name;
      gas.formula = named.formula;
      gas.polynomial = facts::find_polynomial(named.name, 'g');
      CHECK(gas.polynomial != nullptr, "every combustion gas has a polynomial");
      const Result<molecule::Composition> atoms = molecule::parse_formula(gas.polynomial->formula);
      for (std::size_t e = 0; e < kElements; ++e) {
        const auto found = atoms->atoms.find(kElementNumbers[e]);
        if (found != atoms->atoms.end()) gas.atoms[e] = found->second;
      }
      if (is_complete_product(named.formula)) {
        const facts::Compound* compound = facts::Library::embedded().find_name(named.name);
        CHECK(compound != nullptr && compound->gas.formation_enthalpy, "the library knows burning products");
        gas.shift = compound->gas.formation_enthalpy->value - gas.polynomial->formation_enthalpy;
      }
      gases.push_back(gas);
    }
    return gases;
  }();
  return all;
}

const Gas& combustion_gas(std::string_view formula) {
  for (const Gas& gas : combustion_gases()) {
    if (gas.formula == formula) return gas;
  }
  CHECK(false, "a combustion gas is asked for by a formula of the list");
  return combustion_gases().front();
}

double graphite_gibbs(double temperature) {
  static const facts::Polynomial* const graphite = facts::find_polynomial("carbon, graphite", 's');
  CHECK(graphite != nullptr, "graphite has a polynomial");
  const GasFigures f = figures_of(*graphite, temperature, std::log(temperature));
  return f.h_rt - f.s_r;
}

}  // namespace heatledger::burning
