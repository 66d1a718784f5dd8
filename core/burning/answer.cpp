#include "core/burning/answer.hpp"

#include <algorithm>
#include <cmath>
#include <functional>
#include <map>

#include "core/base/number_text.hpp"
#include "core/burning/calorific.hpp"
#include "core/molecule/elements.hpp"
#include "core/molecule/formula.hpp"
#include "core/step/words.hpp"
#include "core/thermo/heat_capacity_curve.hpp"
#include "core/units/constants.hpp"
#include "core/units/display.hpp"

namespace heatledger::burning {

namespace {

namespace d = units::dimension;
using step::digits;
using step::Finding;
using step::FindingGroup;
using uncertainty::Quantity;
using uncertainty::SourceKey;

constexpr const char* kPolynomials = "B. J. McBride, S. Gordon, M. A. Reno, NASA TM-4513, 1993";

/// One source of error at the end of its interval.
struct Moved {
  SourceKey key = 0;
  BurnInput input;
};

/// ΔfH and the share by which h(T) − h(25 °C) may be off, of one product.
struct ProductFacts {
  Quantity formation;
  SourceKey heat_capacity = 0;
  double share = 0;
};

const std::array<ProductFacts, kProducts>& product_facts() {
  static const std::array<ProductFacts, kProducts> all = [] {
    std::array<ProductFacts, kProducts> facts{};
    for (std::size_t p = 0; p < kProducts; ++p) {
      const auto species = facts::resolve_species(combustion_gas(kProductFormulas[p]).name, false);
      CHECK(species.ok(), "the library knows the products of burning");
      const auto formation = thermo::tabulated_formation(**species, molecule::Phase::Gas);
      if (formation.ok()) facts[p].formation = formation->value;
      const auto curve = thermo::heat_capacity_curve(**species, molecule::Phase::Gas);
      if (!curve.ok()) continue;
      facts[p].heat_capacity = curve->key;
      constexpr double kTypical = 1500;  // K; the share changes little along the curve
      facts[p].share = curve->deviation(kTypical) / curve->increment(kTypical);
    }
    return facts;
  }();
  return all;
}

std::vector<Moved> moved_inputs(const BurnInput& in) {
  std::vector<Moved> all;
  std::uint64_t typed = 0;
  const auto move = [&](SourceKey key, const std::function<void(BurnInput&)>& apply) {
    Moved moved{key, in};
    apply(moved.input);
    all.push_back(std::move(moved));
  };
  const auto typed_key = [&] {
    return uncertainty::source_key(uncertainty::SourceKind::Typed, 0xb0000000ULL + typed++);
  };
  const auto figure = [&](const step::Typed& value, const std::function<void(BurnInput&, double)>& set) {
    const SourceKey key = typed_key();
    if (value.u95 > 0) move(key, [&](BurnInput& m) { set(m, value.value + value.u95); });
  };
  const auto blank = [&](step::Blank BurnInput::*member) {
    const SourceKey key = typed_key();
    if (in.*member && (in.*member)->u95 > 0)
      move(key, [&](BurnInput& m) { (m.*member)->value += (in.*member)->u95; });
  };
  figure(in.air_temperature, [](BurnInput& m, double v) { m.air_temperature.value = v; });
  figure(in.air_figure, [](BurnInput& m, double v) { m.air_figure.value = v; });
  figure(in.dilution.value_or(step::Typed{}), [](BurnInput& m, double v) { m.dilution->value = v; });
  figure(in.dilution_temperature, [](BurnInput& m, double v) { m.dilution_temperature.value = v; });
  for (const auto member : {&BurnInput::loss, &BurnInput::loss_share, &BurnInput::chamber_temperature,
                            &BurnInput::flue_temperature, &BurnInput::chamber_volume, &BurnInput::so3,
                            &BurnInput::hcl, &BurnInput::lfl})
    blank(member);
  std::map<SourceKey, bool> formations;  // in the order of the keys: the same everywhere
  for (std::size_t i = 0; i < in.streams.size(); ++i) {
    figure(in.streams[i].temperature, [&](BurnInput& m, double v) { m.streams[i].temperature.value = v; });
    for (std::size_t k = 0; k < in.streams[i].parts.size(); ++k) {
      const Part& part = in.streams[i].parts[k];
      figure({part.moles, part.u95}, [&](BurnInput& m, double v) { m.streams[i].parts[k].moles = v; });
      if (!part.heat)
        figure(part.heat_capacity,
               [&](BurnInput& m, double v) { m.streams[i].parts[k].heat_capacity.value = v; });
      for (const uncertainty::Part& source : part.formation.parts()) formations[source.source] = true;
    }
  }
  const auto share_of = [](const Quantity& quantity, SourceKey key) {
    for (const uncertainty::Part& source : quantity.parts()) {
      if (source.source == key) return source.u95;
    }
    return 0.0;
  };
  for (const ProductFacts& product : product_facts()) {
    for (const uncertainty::Part& source : product.formation.parts()) formations[source.source] = true;
  }
  for (const auto& entry : formations) {
    move(entry.first, [&](BurnInput& m) {
      for (Stream& stream : m.streams) {
        for (Part& part : stream.parts)
          part.formation = Quantity(part.formation.value() + share_of(part.formation, entry.first));
      }
      for (std::size_t p = 0; p < kProducts; ++p)
        m.offsets[p].formation += share_of(product_facts()[p].formation, entry.first);
    });
  }
  for (std::size_t p = 0; p < kProducts; ++p) {
    if (product_facts()[p].share != 0)
      move(product_facts()[p].heat_capacity,
           [&](BurnInput& m) { m.offsets[p].factor += product_facts()[p].share; });
  }
  return all;
}

class Answer {
 public:
  Answer(const BurnInput& in, Numbers numbers, std::vector<std::pair<SourceKey, Numbers>> moved)
      : in_(in), n_(std::move(numbers)), moved_(std::move(moved)) {}

  step::Findings build() {
    temperatures();
    heat();
    air();
    flue();
    for (std::size_t i = 0; i < n_.fuels.size(); ++i) calorific(i);
    equilibrium();
    emissions();
    for (std::size_t i = 0; i < n_.fuels.size(); ++i) limits(i);
    closure();
    out_.notes = notes();
    out_.cautions = cautions(in_, n_);
    out_.charts = charts(in_, n_);
    return std::move(out_);
  }

 private:
  /// The figure with every source of error moved in turn.
  template <typename Get>
  Quantity q(const Get& get) const {
    const double base = get(n_);
    std::vector<uncertainty::Part> parts;
    for (const auto& [key, numbers] : moved_) {
      const double change = get(numbers) - base;
      // The searches end at 1e-9; what is smaller than a few of these is their rounding.
      if (std::abs(change) > 1e-8 * std::abs(base)) parts.push_back({key, change});
    }
    return Quantity(base, std::move(parts));
  }

  void group(std::string id, std::string heading, std::string aside = {}) {
    FindingGroup g;
    g.id = std::move(id);
    g.heading = std::move(heading);
    g.aside = std::move(aside);
    out_.groups.push_back(std::move(g));
  }

  /// Adds the error of a published rule itself.
  static void rule_error(Finding& f, double u95, std::uint64_t rule) {
    f.value.add(
        Quantity(0, u95, uncertainty::source_key(uncertainty::SourceKind::Other, 0xb0000000ULL + rule)));
  }

  template <typename Get>
  Finding& add(std::string id, std::string label, const units::Dimension& dimension, const Get& get,
               std::vector<std::string> working = {}, std::vector<std::string> sources = {}) {
    Finding f;
    f.id = std::move(id);
    f.label = std::move(label);
    f.dimension = dimension;
    f.value = q(get);
    f.working = std::move(working);
    f.sources = std::move(sources);
    out_.groups.back().findings.push_back(std::move(f));
    return out_.groups.back().findings.back();
  }

  Finding& words(std::string id, std::string label, std::string text, std::vector<std::string> working = {},
                 std::vector<std::string> sources = {}) {
    Finding f;
    f.id = std::move(id);
    f.label = std::move(label);
    f.text = std::move(text);
    f.working = std::move(working);
    f.sources = std::move(sources);
    out_.groups.back().findings.push_back(std::move(f));
    return out_.groups.back().findings.back();
  }

  void missing(std::string id, std::string label, std::string why) {
    Finding f;
    f.id = std::move(id);
    f.label = std::move(label);
    f.why_missing = std::move(why);
    out_.groups.back().findings.push_back(std::move(f));
  }

  /// In a unit of its own, so as words: "39.83 ± 0.02 MJ/normal m³".
  template <typename Get>
  Finding& shown_in(const char* unit, double unit_size, std::string id, std::string label, const Get& get,
                    std::vector<std::string> working = {}, std::vector<std::string> sources = {}) {
    Finding& f =
        add(std::move(id), std::move(label), d::kNumber, get, std::move(working), std::move(sources));
    const uncertainty::Figure value = f.value.scaled(1 / unit_size).figure();
    int decimals = 3;
    for (double limit = 10; decimals > 1 && std::abs(value.value) >= limit; limit *= 10) --decimals;
    double last = 0.5;
    for (int i = 0; i < decimals; ++i) last /= 10;
    f.text = value.u95 > 0 && value.u95 < last
                 ? display_number(value.value, decimals) + " ± < " + display_number(2 * last, decimals)
                 : units::figure_text(value, decimals);
    f.text += std::string(" ") + unit;
    return f;
  }

  /// [mol/s] in normal cubic metres an hour.
  template <typename Get>
  Finding& normal_flow(std::string id, std::string label, const Get& get,
                       std::vector<std::string> working = {}) {
    return shown_in("normal m³/h", 1 / (units::kNormalMolarVolume * 3600), std::move(id), std::move(label),
                    get, std::move(working));
  }

  const Stream* support() const {
    for (const Stream& stream : in_.streams) {
      if (stream.role == Role::SupportFuel) return &stream;
    }
    return nullptr;
  }

  void temperatures() {
    group("flame", "Temperatures", "at " + digits(in_.pressure / 1000) + " kPa");
    const auto in_balance = [&](const Amounts& gas, double t) {
      std::string line;
      for (std::size_t p = 0; p < kProducts; ++p) {
        if (gas[p] <= 1e-9 * total(gas)) continue;
        if (!line.empty()) line += ", ";
        line += std::string(kProductFormulas[p]) + " " + step::amount_text(gas[p], true);
      }
      return "flue gas " + line + ", cp there " + digits(heat_capacity(gas, t, in_.offsets) / total(gas)) +
             " J/(mol K)";
    };
    if (in_.sought == Sought::Support) {
      const Stream& fuel = *support();
      const double moles = fuel.moles() / fuel.scale, mass = fuel.mass() / fuel.scale;
      const std::vector<std::string> working{
          "amount at which heat of the feeds − heat loss = heat of the flue gas at " +
          step::celsius(in_.chamber_temperature->value)};
      add(
          "support.mass", "support fuel for the chamber temperature", d::kMassFlow,
          [=](const Numbers& n) { return n.support * mass; }, working);
      bool by_mole = true;
      for (const Part& part : fuel.parts) by_mole = by_mole && part.species != nullptr;
      if (by_mole)
        normal_flow(
            "support.volume", "the same", [=](const Numbers& n) { return n.support * moles; }, working);
    }
    if (in_.sought == Sought::Ratio)
      add("ratio.found", "air ratio for the chamber temperature", d::kNumber, [](const Numbers& n) {
        return n.ratio;
      }).ratio = true;
    if (n_.complete) {
      add("flame.complete", "adiabatic flame temperature, complete burning", d::kTemperature,
          [](const Numbers& n) { return *n.flame_temperature; },
          {"heat of the feeds into the flame = heat of its gas at the flame temperature; no dissociation",
           in_balance(n_.flame, *n_.flame_temperature)},
          {kPolynomials});
    } else {
      missing("flame.complete", "adiabatic flame temperature, complete burning",
              "short of oxygen: only the equilibrium stands");
    }
    add("flame.equilibrium", "adiabatic flame temperature, chemical equilibrium", d::kTemperature,
        [](const Numbers& n) { return n.equilibrium->temperature; },
        {"least Gibbs energy over " + std::to_string(combustion_gases().size()) +
             " gases at constant enthalpy and pressure",
         "independent of where the search begins; elements close to 1e-9 of all atoms",
         "heat capacity with the composition following " +
             digits(n_.equilibrium->heat_capacity / n_.equilibrium->total) + " J/(mol K)"},
        {kPolynomials});
    if (n_.complete && (n_.loss != 0 || n_.dilution > 0 || in_.chamber_temperature)) {
      add("chamber", "chamber temperature", d::kTemperature,
          [](const Numbers& n) { return *n.chamber_temperature; },
          {"flame and dilution air, less the heat loss of " + step::heat_text(n_.loss, true),
           in_balance(n_.chamber, *n_.chamber_temperature)},
          {kPolynomials});
    }
    if (n_.quench_temperature) {
      add("quench", "temperature behind the quench", d::kTemperature,
          [](const Numbers& n) { return *n.quench_temperature; },
          {"all quench water evaporated", in_balance(n_.flue, *n_.quench_temperature)}, {kPolynomials});
    }
    if (n_.residence) {
      shown_in("s", 1, "residence", "residence time in the chamber",
               [](const Numbers& n) { return *n.residence; },
               {"volume " + digits(in_.chamber_volume->value) + " m³ over the actual flow at " +
                step::celsius(*n_.chamber_temperature) + ", " +
                digits(in_.chamber_volume->value / *n_.residence) + " m³/s"});
    }
  }

  void heat() {
    group("heat", "Heat", "25 °C");
    add("heat.net", "heat set free, net", d::kPower, [](const Numbers& n) { return n.net_heat; },
        {"all product water as vapour; liquid water of the feeds evaporated"});
    add("heat.gross", "heat set free, gross", d::kPower, [](const Numbers& n) { return n.gross_heat; },
        {"net + product water × 44.0 kJ/mol"});
    add("heat.sensible_in", "sensible heat that the feeds and the air bring", d::kPower,
        [](const Numbers& n) { return n.sensible_in; });
    if (n_.loss != 0) add("heat.loss", "heat loss", d::kPower, [](const Numbers& n) { return n.loss; });
    if (!n_.complete) return;
    if (!in_.flue_temperature) {
      missing("heat.load", "heat to the load", "needs the flue gas exit temperature");
      return;
    }
    const std::string exit = step::celsius(in_.flue_temperature->value);
    add("heat.flue", "sensible loss with the flue gas", d::kPower,
        [](const Numbers& n) { return *n.flue_sensible; },
        {"flue gas " + step::amount_text(total(n_.flue), true) + " from 25 °C to " + exit}, {kPolynomials});
    add("heat.latent", "latent loss with its water", d::kPower,
        [](const Numbers& n) { return *n.flue_latent; },
        {"water " + step::amount_text(of(n_.flue, Product::H2O), true) +
         " × 44.0 kJ/mol; lost against the gross value"});
    Finding& load = add("heat.load", "heat to the load", d::kPower, [](const Numbers& n) { return *n.load; },
                        {"net " + step::heat_text(n_.net_heat, true) + " + sensible heat in " +
                         step::heat_text(n_.sensible_in, true) + " − loss " + step::heat_text(n_.loss, true) +
                         " − flue gas " + step::heat_text(*n_.flue_sensible, true)});
    load.mark = *n_.load < 0 ? "supply: the flue gas at " + exit + " holds more" : "down to " + exit;
    add("heat.efficiency", "efficiency, net", d::kNumber, [](const Numbers& n) { return *n.efficiency; },
        {"heat to the load / net heat set free"});
  }

  void air() {
    group("air", "Air", in_.air.words);
    add("air.oxygen", "oxygen for complete burning", d::kMolarFlow,
        [](const Numbers& n) { return n.oxygen_needed; }, {"C + S + (H − Cl)/4 − O/2 of what burns"});
    if (n_.oxygen_brought > 0)
      add("air.brought", "oxygen that the feeds bring", d::kMolarFlow,
          [](const Numbers& n) { return n.oxygen_brought; });
    add("air.stoichiometric", "stoichiometric air for all that burns", d::kMolarFlow,
        [](const Numbers& n) { return n.stoichiometric; },
        {"oxygen needed / " + digits(100 * in_.air.oxygen) + " % of the dry air" +
         (in_.air.water > 0 ? ", with " + digits(in_.air.water) + " mol water to each mole"
                            : std::string())});
    shown_in("kg/kg", 1, "air.stoichiometric.mass", "the same per kilogram of fuel",
             [](const Numbers& n) { return n.stoichiometric * n.air_molar_mass / n.fuel_mass; });
    add("air.flow", "combustion air", d::kMolarFlow, [](const Numbers& n) { return n.air; });
    normal_flow("air.volume", "the same, dry", [&](const Numbers& n) { return n.air / (1 + in_.air.water); });
    add("air.mass", "the same", d::kMassFlow, [](const Numbers& n) { return n.air * n.air_molar_mass; });
    add("air.ratio", "air ratio, all oxygen over oxygen needed", d::kNumber,
        [](const Numbers& n) { return n.ratio; },
        {"(" + step::amount_text(n_.oxygen_brought, true) + " + " +
         step::amount_text(n_.ratio * n_.oxygen_needed - n_.oxygen_brought, true) + ") / " +
         step::amount_text(n_.oxygen_needed, true)})
        .ratio = true;
    const bool alone = n_.fuels.size() < 2 && n_.oxygen_brought == 0;
    if (n_.burner_ratio && !alone)
      add("air.burner", "the burner's own air ratio", d::kNumber,
          [](const Numbers& n) { return *n.burner_ratio; },
          {"oxygen of the combustion air / oxygen that fuel and support fuel need"})
          .ratio = true;
  }

  void flue() {
    if (!n_.complete) return;
    group("flue", "Flue gas", "complete burning");
    add("flue.wet", "wet flue gas", d::kMolarFlow, [](const Numbers& n) { return total(n.flue); });
    normal_flow("flue.dry", "dry flue gas", [](const Numbers& n) { return total_dry(n.flue); });
    add("flue.mass", "the flue gas", d::kMassFlow, [](const Numbers& n) { return mass(n.flue); });
    for (const bool wet : {true, false}) {
      for (std::size_t p = 0; p < kProducts; ++p) {
        if (n_.flue[p] <= 0 || (!wet && static_cast<Product>(p) == Product::H2O)) continue;
        const auto share = [=](const Numbers& n) {
          return n.flue[p] / (wet ? total(n.flue) : total_dry(n.flue));
        };
        const std::string id =
            std::string(wet ? "flue.wet." : "flue.dry.") + std::string(kProductFormulas[p]);
        const std::string label =
            molecule::typeset_formula(std::string(kProductFormulas[p])) + (wet ? ", wet" : ", dry");
        if (share(n_) < 0.001) {
          shown_in("ppmv", 1e-6, id, label, share);
        } else {
          add(id, label, d::kVolumeFraction, share);
        }
      }
    }
    if (n_.dew_point) {
      add("flue.dew", "water dew point", d::kTemperature,
          [](const Numbers& n) { return n.dew_point.value_or(273.16); },
          {"water " + digits(of(n_.flue, Product::H2O) / total(n_.flue) * in_.pressure / 1000) + " kPa"},
          {"IAPWS SR1-86(1992), saturation line of water"});
    }
    if (n_.sulfuric_dew_point)
      rule_error(add("flue.dew.sulfuric", "acid dew point, sulfuric acid", d::kTemperature,
                     [](const Numbers& n) { return *n.sulfuric_dew_point; },
                     {"SO3 as typed, " + digits(1e6 * in_.so3->value) +
                      " ppm of the wet gas; the rule is good to some 10 K"},
                     {"F. H. Verhoff, J. T. Banchero, Chem. Eng. Prog. 70 (1974) 71"}),
                 10, 1);
    if (n_.hydrochloric_dew_point)
      rule_error(add("flue.dew.hydrochloric", "acid dew point, hydrochloric acid", d::kTemperature,
                     [](const Numbers& n) { return *n.hydrochloric_dew_point; },
                     {"HCl as typed, " + digits(1e6 * in_.hcl->value) +
                      " ppm of the wet gas; the rule is good to some 10 K"},
                     {"Y.-H. Kiang, Chem. Eng. 88 (1981) 127"}),
                 10, 2);
    const bool acid = of(n_.flue, Product::SO2) > 0 || of(n_.flue, Product::HCl) > 0;
    if (acid && !n_.sulfuric_dew_point && !n_.hydrochloric_dew_point)
      missing("flue.dew.acid", "acid dew point",
              "not calculated: type the share of SO3 or HCl in the wet flue gas");
  }

  void calorific(std::size_t i) {
    const FuelNumbers& fuel = n_.fuels[i];
    const Stream& stream = in_.streams[fuel.stream];
    const std::string id = "calorific." + std::to_string(fuel.stream) + ".";
    group("calorific." + std::to_string(fuel.stream), "Calorific value of " + stream.name,
          "combustion " + step::celsius(in_.combustion_temperature) +
              (fuel.gas ? ", metering " + step::celsius(in_.metering_temperature) + ", 101.325 kPa, ideal gas"
                        : ""));
    std::vector<std::string> sources;
    for (const Part& part : stream.parts) {
      if (std::find(sources.begin(), sources.end(), part.source) == sources.end())
        sources.push_back(part.source);
    }
    for (const bool gross : {true, false}) {
      const std::string which = gross ? "gross" : "net";
      const auto heat_of = [=](const Numbers& n) { return gross ? n.fuels[i].gross : n.fuels[i].net; };
      const std::vector<std::string> working{
          step::heat_text(heat_of(n_), true) + " set free by " + step::mass_text(fuel.mass, true) + " of it",
          !gross                  ? "all water as vapour"
          : in_.chloride_in_water ? "product water liquid, HCl in 600 H2O; CO2, SO2 and N2 gas"
                                  : "product water liquid; CO2, SO2, HCl and N2 gas"};
      if (!fuel.by_mass)
        add(
            id + which + ".mole", which, d::kEnergyPerMole,
            [=](const Numbers& n) { return heat_of(n) / n.fuels[i].moles; }, working, sources);
      add(
          id + which + ".mass", which, d::kEnergyPerMass,
          [=](const Numbers& n) { return heat_of(n) / n.fuels[i].mass; }, working, sources);
      if (fuel.gas && !fuel.by_mass) {
        const auto per_volume = [=](const Numbers& n) {
          return heat_of(n) / n.fuels[i].moles / n.fuels[i].molar_volume;
        };
        shown_in(volume_unit(), 1e6, id + which + ".volume", which + " per cubic metre", per_volume, working,
                 sources);
        if (fuel.compression)
          shown_in(volume_unit(), 1e6, id + which + ".real", which + " per cubic metre of the real gas",
                   [=](const Numbers& n) { return per_volume(n) / *fuel.compression; },
                   {"ideal / Z, Z = " + machine_number(*fuel.compression, 6)}, {"ISO 6976:2016"});
      }
    }
    if (fuel.gas && !fuel.by_mass) {
      shown_in(volume_unit(), 1e6, id + "wobbe", "Wobbe index, gross",
               [=](const Numbers& n) { return n.fuels[i].wobbe_gross; },
               {"gross per cubic metre / √ relative density " + digits(fuel.relative_density)},
               {"ISO 6976:2016"});
    }
  }

  const char* volume_unit() const {
    return std::abs(in_.metering_temperature - 273.15) < 1e-6 ? "MJ/normal m³" : "MJ/m³";
  }

  void equilibrium() {
    const Equilibrium& e = *n_.equilibrium;
    group("equilibrium", "Gas of the flame at chemical equilibrium", "no emission prediction");
    std::vector<std::size_t> order;
    for (std::size_t j = 0; j < e.moles.size(); ++j) {
      if (e.moles[j] > 1e-6 * e.total) order.push_back(j);
    }
    std::sort(order.begin(), order.end(), [&](std::size_t a, std::size_t b) {
      return e.moles[a] != e.moles[b] ? e.moles[a] > e.moles[b]
                                      : combustion_gases()[a].formula < combustion_gases()[b].formula;
    });
    constexpr std::size_t kShown = 14;
    for (std::size_t k = 0; k < order.size() && k < kShown; ++k) {
      const std::size_t j = order[k];
      const auto share = [=](const Numbers& n) { return n.equilibrium->moles[j] / n.equilibrium->total; };
      const std::string formula(combustion_gases()[j].formula);
      if (share(n_) < 0.001) {
        shown_in("ppmv", 1e-6, "equilibrium." + formula, molecule::typeset_formula(formula), share, {},
                 {kPolynomials});
      } else {
        add("equilibrium." + formula, molecule::typeset_formula(formula), d::kVolumeFraction, share, {},
            {kPolynomials});
      }
    }
    if (e.carbon_activity > 1e-3)
      words("equilibrium.soot", "soot",
            e.carbon_activity > 1 ? "would form: carbon activity " + digits(e.carbon_activity)
                                  : "none: carbon activity " + digits(e.carbon_activity));
  }

  /// Milligrams per normal cubic metre, dry, carried to the reference oxygen.
  void emissions() {
    if (!in_.reference_oxygen || !n_.complete) return;
    const double reference = in_.reference_oxygen->value;
    const double y = in_.air.oxygen;
    const double actual = of(n_.flue, Product::O2) / total_dry(n_.flue);
    group("emissions", "Concentrations at " + machine_number(100 * reference, 4) + " % O₂, dry",
          "normal m³: 0 °C, 101.325 kPa");
    const auto carried = [=](const Numbers& n, double moles, double gram_per_mole) {
      const double dry = total_dry(n.flue);
      const double oxygen = of(n.flue, Product::O2) / dry;
      return moles / dry * gram_per_mole / units::kNormalMolarVolume * (y - reference) / (y - oxygen);
    };
    const std::vector<std::string> working{"share × molar mass / 22.414 m³/kmol × (" + digits(100 * y) +
                                           " − " + digits(100 * reference) + ") / (" + digits(100 * y) +
                                           " − " + digits(100 * actual) + ")"};
    for (const Product product : {Product::SO2, Product::HCl, Product::Cl2}) {
      if (of(n_.flue, product) <= 0) continue;
      const std::string formula(kProductFormulas[static_cast<std::size_t>(product)]);
      shown_in(
          "mg/normal m³", 1e-3, "emissions." + formula,
          molecule::typeset_formula(formula) + ", before any cleaning",
          [=](const Numbers& n) { return carried(n, of(n.flue, product), molar_mass_of(product)); }, working);
    }
    const struct {
      const char* formula;
      const char* label;
      double gram_per_mole;
    } trace[] = {{"NO", "NO at the flame's equilibrium, as NO₂", 46.005},
                 {"CO", "CO at the flame's equilibrium", 28.010}};
    for (const auto& gas : trace) {
      std::size_t j = 0;
      while (combustion_gases()[j].formula != gas.formula) ++j;
      shown_in(
          "mg/normal m³", 1e-3, std::string("emissions.") + gas.formula, gas.label,
          [=](const Numbers& n) { return carried(n, n.equilibrium->moles[j], gas.gram_per_mole); }, working)
          .mark = "no prediction";
    }
  }

  void limits(std::size_t i) {
    const FuelNumbers& fuel = n_.fuels[i];
    if (fuel.lfl <= 0) return;
    const Stream& stream = in_.streams[fuel.stream];
    const std::string id = "lfl." + std::to_string(fuel.stream);
    group("flammability." + std::to_string(fuel.stream), "Flammability of " + stream.name, "in air");
    std::vector<std::string> working, sources;
    if (fuel.lfl_typed) {
      working.push_back("typed");
    } else {
      working.push_back(
          "1050 / net heat in kcal/mol, per cent by volume; mixtures by Le Chatelier's rule; the rule is "
          "good to some 10 %");
      sources = {"M. J. Burgess, R. V. Wheeler, J. Chem. Soc. Trans. 99 (1911) 2013",
                 "H. Le Chatelier, Ann. Mines 19 (1891) 388"};
    }
    // Burgess and Wheeler's product lies within a tenth of 1050 for most gases.
    const double share = fuel.lfl_typed ? 0 : 0.1;
    Finding& limit = add(
        id, "lower flammability limit of what burns, 25 °C", d::kVolumeFraction,
        [=](const Numbers& n) { return n.fuels[i].lfl; }, working, sources);
    rule_error(limit, share * fuel.lfl, 3);
    limit.unfavourable = fuel.lfl - limit.value.u95();
    if (std::abs(stream.temperature.value - 298.15) > 0.5) {
      Finding& hot =
          add(id + ".hot", "the same at " + step::celsius(stream.temperature.value), d::kVolumeFraction,
              [=](const Numbers& n) { return n.fuels[i].lfl_at; }, {"× (1 − 0.000721 (T − 25 °C))"},
              {"M. G. Zabetakis, Bulletin 627, US Bureau of Mines, 1965"});
      rule_error(hot, share * fuel.lfl_at, 3);
    }
    if (stream.role != Role::Vent) return;
    add(id + ".share", "what burns in it", d::kVolumeFraction,
        [=](const Numbers& n) { return n.fuels[i].combustible_share; });
    Finding& part = add(id + ".of", "of the lower flammability limit", d::kNumber,
                        [=](const Numbers& n) { return n.fuels[i].combustible_share / n.fuels[i].lfl_at; },
                        {"25 % is customary without monitoring"});
    rule_error(part, share * part.value.value(), 3);
    part.unfavourable = part.value.value() + part.value.u95();
  }

  void closure() {
    double in = n_.air * n_.air_molar_mass + n_.dilution * n_.air_molar_mass;
    for (const Stream& stream : in_.streams) {
      const bool found = in_.sought == Sought::Support && stream.role == Role::SupportFuel;
      in += found ? stream.mass() / stream.scale * n_.support : stream.mass();
    }
    double ash = in - mass(n_.flue);  // what an analysis calls so
    for (const Stream& stream : in_.streams) {
      for (const Part& part : stream.parts) {
        if (part.species != nullptr) continue;
        double atoms = 0;
        for (std::size_t e = 0; e < kElements; ++e)
          atoms += part.atoms[e] * molecule::atomic_mass(kElementNumbers[e]) / 1000;
        ash -= (part.molar_mass - atoms) * part.moles * stream.scale;
      }
    }
    out_.closes = std::abs(ash) < 1e-6 * in && n_.equilibrium->closure < 1e-9;
    out_.closure = out_.closes ? "Elements, mass and energy of the flame close."
                               : "The mass balance of the flame is off by " + digits(ash) + " kg/s.";
  }

  std::vector<std::string> notes() const {
    std::vector<std::string> all;
    all.push_back("Air: " + in_.air.words +
                  ". Normal cubic metre: 0 °C, 101.325 kPa, dry, 22.414 m³/kmol. Losses and "
                  "efficiency are net, 25 °C.");
    all.push_back(
        "Burning products: C to CO2, H to H2O, S to SO2, N to N2, Cl to HCl while hydrogen lasts, the rest "
        "to "
        "Cl2. Ideal gas throughout.");
    for (const Stream& stream : in_.streams) {
      for (const Part& part : stream.parts) {
        if (part.heat || std::abs(stream.temperature.value - 298.15) < 0.5) continue;
        all.push_back("The heat capacity of " + part.name + " is taken as " +
                      digits(part.heat_capacity.value / part.molar_mass / 1000) + " ± " +
                      digits(part.heat_capacity.u95 / part.molar_mass / 1000) + " kJ/(kg K).");
      }
    }
    return all;
  }

  const BurnInput& in_;
  Numbers n_;
  std::vector<std::pair<SourceKey, Numbers>> moved_;
  step::Findings out_;
};

}  // namespace

Result<step::Findings> answer(const BurnInput& input) {
  Result<Numbers> base = burn(input);
  if (!base.ok()) return base.error();
  std::vector<std::pair<SourceKey, Numbers>> moved;
  for (const Moved& one : moved_inputs(input)) {
    Result<Numbers> numbers = burn(one.input);
    // At the edge of what is possible (an air ratio of exactly one less its ±) the figure has no lower end.
    if (!numbers.ok() || numbers->complete != base->complete) continue;
    moved.emplace_back(one.key, std::move(numbers).value());
  }
  return Answer(input, std::move(base).value(), std::move(moved)).build();
}

}  // namespace heatledger::burning
