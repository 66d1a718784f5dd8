#include "core/document/burning_reading.hpp"

#include <algorithm>
#include <cmath>

#include "core/base/number_text.hpp"
#include "core/burning/answer.hpp"
#include "core/burning/calorific.hpp"
#include "core/document/typed_rows.hpp"
#include "core/facts/air.hpp"
#include "core/units/constants.hpp"
#include "core/units/quantity_text.hpp"

namespace heatledger::document {

namespace {

namespace d = units::dimension;
using burning::AirRule;
using burning::Role;
using step::Blank;
using step::Typed;

struct NamedRole {
  const char* words;
  Role role;
  bool analysis;
};
constexpr NamedRole kRoles[] = {
    {"fuel", Role::Fuel, false},
    {"fuel by analysis", Role::Fuel, true},
    {"support fuel", Role::SupportFuel, false},
    {"vent", Role::Vent, false},
    {"liquid waste", Role::LiquidWaste, false},
    {"waste by analysis", Role::LiquidWaste, true},
    {"combustion air", Role::CombustionAir, false},
    {"dilution air", Role::DilutionAir, false},
    {"quench water", Role::QuenchWater, false},
};

const NamedRole* role_of(const FeedSheet& feed) {
  if (feed.role.empty()) return &kRoles[0];
  for (const NamedRole& role : kRoles) {
    if (feed.role == role.words) return &role;
  }
  return nullptr;
}

bool is_air(const NamedRole& role) {
  return role.role == Role::CombustionAir || role.role == Role::DilutionAir;
}

bool ends(const std::string& text, const std::string& with) {
  return text.size() >= with.size() && text.compare(text.size() - with.size(), with.size(), with) == 0;
}

class Reader {
 public:
  Reader(const StepSheet& sheet, const StepContext& context) : sheet_(sheet), context_(context) {}

  BurningReading read() {
    in().pressure = pressure().value_or(Typed{units::kStandardAtmosphere, 0}).value;
    air_kind();
    sought();
    feeds();
    air_amount();
    in().loss = in().loss_share = {};
    loss();
    in().chamber_temperature =
        in().sought == burning::Sought::Temperature ? Blank{} : blank("chamber_temperature", d::kTemperature);
    in().flue_temperature = blank("flue_temperature", d::kTemperature);
    in().chamber_volume = positive("chamber_volume", d::kVolume);
    in().reference_oxygen = share("reference_oxygen");
    in().lfl = share("lfl");
    in().so3 = share("so3_share");
    in().hcl = share("hcl_share");
    if (const Blank t = blank("combustion_temperature", d::kTemperature))
      in().combustion_temperature = t->value;
    if (const Blank t = blank("metering_temperature", d::kTemperature)) in().metering_temperature = t->value;
    const std::string chloride = text_of("chloride");
    in().chloride_in_water = chloride == "in 600 H2O";
    if (!chloride.empty() && chloride != "gas" && !in().chloride_in_water) {
      refuse(
          Error{"burning.calorific", "Hydrogen chloride of a gross value is a gas, or dissolved in 600 H2O.",
                "", "Write gas or in 600 H2O."},
          "blanks.chloride");
    }
    count_exact();
    return std::move(reading_);
  }

 private:
  /// Typed figures without ±, for the note that counts them.
  void count_exact() {
    int exact = 0;
    const auto look = [&](const std::string& text) {
      const bool figure = text.find_first_of("0123456789") != std::string::npos;
      const bool interval = text.find("±") != std::string::npos || text.find("+-") != std::string::npos ||
                            text.find("+/-") != std::string::npos;
      if (figure && !interval) ++exact;
    };
    for (const FeedSheet& feed : sheet_.feeds) {
      look(feed.total);
      look(feed.at);
      look(feed.pressure);
      for (const FeedRow& row : feed.rows) look(row.amount);
    }
    for (const auto& entry : sheet_.blanks) {
      if (entry.first != "air" && entry.first != "chloride") look(entry.second);
    }
    if (exact == 0) return;
    reading_.notes.push_back(exact == 1
                                 ? "One typed figure without ± is taken as exact."
                                 : std::to_string(exact) + " typed figures without ± are taken as exact.");
  }

  burning::BurnInput& in() { return reading_.input; }

  void refuse(Error error, const std::string& where) {
    const bool offset = error.where.compare(0, 7, "offset ") == 0;
    error.where = offset ? where + ", " + error.where : where;
    reading_.errors.push_back(std::move(error));
  }

  std::string text_of(const char* id) const {
    const auto found = sheet_.blanks.find(id);
    return found == sheet_.blanks.end() ? std::string() : trimmed(found->second);
  }

  Blank quantity(const std::string& text, const units::Dimension& dimension, const std::string& where) {
    if (trimmed(text).empty()) return {};
    const Result<units::TypedValue> read = units::evaluate_quantity(text, dimension, *context_.names);
    if (!read.ok()) {
      refuse(read.error(), where);
      return {};
    }
    return Typed{read->value, read->u95.value_or(0)};
  }

  Blank blank(const char* id, const units::Dimension& dimension) {
    return quantity(text_of(id), dimension, std::string("blanks.") + id);
  }

  Blank positive(const char* id, const units::Dimension& dimension) {
    const Blank figure = blank(id, dimension);
    if (!figure || figure->value > 0) return figure;
    refuse(Error{"step.out_of_range", "This figure is above zero.", "", "Look at the figure and its unit."},
           std::string("blanks.") + id);
    return {};
  }

  /// A share between nothing and all, in any unit of shares.
  Blank share(const std::string& text, const std::string& where) {
    if (text.empty()) return {};
    const Result<units::TypedValue> read = units::evaluate_quantity(text, *context_.names);
    const bool fits =
        read.ok() && (read->dimension() == d::kNumber || read->dimension() == d::kVolumeFraction ||
                      read->dimension() == d::kMoleFraction);
    if (!fits || read->value < 0 || read->value >= 1) {
      refuse(read.ok() ? Error{"step.out_of_range", "A share by volume is typed here, between 0 and 100 %.",
                               "", "Type such as 3 % or 5 ppmv."}
                       : read.error(),
             where);
      return {};
    }
    return Typed{read->value, read->u95.value_or(0)};
  }
  Blank share(const char* id) { return share(text_of(id), std::string("blanks.") + id); }

  Blank pressure() {
    const std::string text = text_of("outlet.pressure");
    if (text.empty()) return {};
    const Result<units::TypedValue> read = units::evaluate_quantity(text, *context_.names);
    if (!read.ok()) {
      refuse(read.error(), "blanks.outlet.pressure");
      return {};
    }
    const Result<double> absolute = units::absolute_pressure(*read);
    if (!absolute.ok()) {
      refuse(absolute.error(), "blanks.outlet.pressure");
      return {};
    }
    return Typed{*absolute, 0};
  }

  // Air.

  /// "humid air" (also when empty), "dry air", "O2 + 3.76 N2", "oxygen", "30 % O2".
  void air_kind() {
    std::string text = text_of("air");
    burning::Air air = burning::dry_air();
    bool moist = text.empty() || text == "humid air" || text == "air";
    if (text == "oxygen") {
      air = burning::enriched_air(1);
      air.words = "oxygen";
    } else if (text == "O2 + 3.76 N2" || text == "textbook air") {
      air = burning::textbook_air();
    } else if (ends(text, "O2")) {
      const Blank oxygen = share(trimmed(text.substr(0, text.size() - 2)), "blanks.air");
      if (oxygen && oxygen->value >= air.oxygen) {
        air = burning::enriched_air(oxygen->value);
        air.words = "dry air enriched to " + machine_number(100 * oxygen->value, 4) + " % O2";
      } else if (oxygen) {
        refuse(Error{"burning.air", "Enriched air holds more oxygen than air, 20.946 %.", "",
                     "Type a share above that, such as 30 % O2."},
               "blanks.air");
      }
    } else if (!moist && text != "dry air") {
      refuse(Error{"burning.air", "This air is not known: \"" + text + "\".", "",
                   "Write humid air, dry air, O2 + 3.76 N2, oxygen, or a share such as 30 % O2."},
             "blanks.air");
    }
    std::string humidity = text_of("humidity");
    if (moist || !humidity.empty()) {
      double relative = facts::kDefaultRelativeHumidity, at = facts::kDefaultAirTemperature;
      if (const std::size_t split = humidity.find(" at "); split != std::string::npos) {
        if (const Blank t = quantity(humidity.substr(split + 4), d::kTemperature, "blanks.humidity"))
          at = t->value;
        humidity = trimmed(humidity.substr(0, split));
      }
      if (const Blank typed = quantity(humidity, d::kNumber, "blanks.humidity")) relative = typed->value;
      const std::string words = air.words;
      Result<burning::Air> wet = burning::humid(air, relative, at, facts::kDefaultAirPressure);
      if (!wet.ok()) {
        refuse(wet.error(), "blanks.humidity");
      } else {
        air = std::move(wet).value();
        air.words = (moist ? "air" : words) + (", " + machine_number(100 * relative, 4)) +
                    " % relative humidity at " + machine_number(at - 273.15, 4) + " °C and 101.325 kPa";
      }
    }
    in().air = std::move(air);
  }

  /// Flow of an air [mol/s with its water]: normal m³ and moles are of the dry air, kilograms and m³ as it
  /// is.
  Blank air_flow(const FeedSheet& feed, double temperature, const std::string& where) {
    const std::string text = trimmed(feed.total);
    if (text.empty()) return {};
    const Result<units::TypedValue> read = units::evaluate_quantity(text, *context_.names);
    if (!read.ok()) {
      refuse(read.error(), where + ".total");
      return {};
    }
    const double wet = 1 + in().air.water;
    double factor = 0;
    if (read->dimension() == d::kMolarFlow) factor = wet;
    if (read->dimension() == d::kMassFlow) factor = wet / burning::mass(in().air.products());
    if (read->dimension() == d::kVolumeFlow) factor = in().pressure / (units::kGasConstant * temperature);
    if (factor == 0 || read->value < 0) {
      refuse(Error{"step.figure", "The amount of air is a flow, of moles, mass or volume.", "",
                   "Type such as 1200 Nm3/h or 1.5 t/h."},
             where + ".total");
      return {};
    }
    return Typed{read->value * factor, read->u95.value_or(0) * factor};
  }

  void air_amount() {
    int figures = air_typed_ ? 1 : 0;
    const auto rule = [&](AirRule which, const Blank& figure) {
      if (!figure) return;
      ++figures;
      in().rule = which;
      in().air_figure = *figure;
    };
    const bool found = in().sought == burning::Sought::Ratio;
    if (!found) rule(AirRule::Ratio, positive("air_ratio", d::kNumber));
    rule(AirRule::BurnerRatio, positive("burner_ratio", d::kNumber));
    std::string oxygen = text_of("flue_oxygen");
    if (!oxygen.empty()) {
      const bool dry = ends(oxygen, "dry"), wet = ends(oxygen, "wet");
      if (!dry && !wet) {
        refuse(Error{"burning.dry_or_wet", "Oxygen in the flue gas is stated dry or wet.", "",
                     "Write 3 % dry, or 2.6 % wet."},
               "blanks.flue_oxygen");
      } else {
        rule(dry ? AirRule::FlueDry : AirRule::FlueWet,
             share(trimmed(oxygen.substr(0, oxygen.size() - 3)), "blanks.flue_oxygen"));
      }
    }
    if (figures > 1 || (found && figures > 0)) {
      refuse(Error{"burning.air_twice", "The amount of air is fixed more than once.", "",
                   "Keep one of: air ratio, burner's air ratio, oxygen in the flue gas, flow of the "
                   "combustion air."},
             "blanks.air_ratio");
    } else if (figures == 0 && !found && reading_.errors.empty()) {
      refuse(
          Error{"burning.air", "How much air there is has not been typed.", "",
                "Type an air ratio, the oxygen in the flue gas (dry or wet), or a flow of combustion air."},
          "blanks.air_ratio");
    }
  }

  // Feeds.

  void sought() {
    if (sheet_.sought == "support") in().sought = burning::Sought::Support;
    if (sheet_.sought == "air_ratio") in().sought = burning::Sought::Ratio;
  }

  /// The sheet as a through-flow step, with what only this kind of step knows left out.
  StepSheet plain_sheet() const {
    StepSheet plain = sheet_;
    plain.kind = "through-flow";
    plain.sought.clear();
    plain.reactions.clear();
    plain.blanks.clear();
    for (FeedSheet& feed : plain.feeds) {
      const NamedRole* role = role_of(feed);
      if (role != nullptr && !is_air(*role) && !role->analysis) continue;
      feed.rows.clear();
      feed.total.clear();
      feed.from.clear();
    }
    return plain;
  }

  void feeds() {
    const StepSheet plain = plain_sheet();
    StepReading plainly = read_step(plain, context_);
    for (Error& error : plainly.errors) reading_.errors.push_back(std::move(error));
    for (std::string& note : plainly.notes) reading_.notes.push_back(std::move(note));
    for (std::size_t i = 0; i < sheet_.feeds.size(); ++i) {
      const FeedSheet& typed = sheet_.feeds[i];
      const std::string where = "feeds[" + std::to_string(i) + "]";
      const NamedRole* role = role_of(typed);
      if (role == nullptr) {
        refuse(Error{"burning.role", "This role of a feed is not known: \"" + typed.role + "\".", "",
                     "Choose one of the list."},
               where + ".role");
        continue;
      }
      if (i >= plainly.input.feeds.size()) continue;
      const step::Feed& feed = plainly.input.feeds[i];
      const Typed temperature = feed.temperature.value_or(Typed{units::kReferenceTemperature, 0});
      if (is_air(*role)) {
        air_feed(typed, *role, temperature, where);
        continue;
      }
      burning::Stream stream;
      stream.name = feed.name;
      stream.role = role->role;
      stream.temperature = temperature;
      if (role->analysis) {
        analysis(stream, typed, where);
      } else {
        species(stream, plainly.input, feed, where);
      }
      if (stream.parts.empty()) continue;
      in().streams.push_back(std::move(stream));
    }
  }

  void air_feed(const FeedSheet& typed, const NamedRole& role, const Typed& temperature,
                const std::string& where) {
    for (const FeedRow& row : typed.rows) {
      if (trimmed(row.species).empty() && trimmed(row.amount).empty()) continue;
      refuse(Error{"burning.air", "The composition of an air stands in the blank \"air\".", "",
                   "Take these rows out; a stream of another gas is a vent."},
             where + ".rows[0].species");
      return;
    }
    const Blank flow = air_flow(typed, temperature.value, where);
    if (role.role == Role::CombustionAir) {
      in().air_temperature = temperature;
      if (!flow) return;
      air_typed_ = true;
      in().rule = AirRule::Flow;
      in().air_figure = *flow;
      return;
    }
    in().dilution_temperature = temperature;
    if (flow) {
      in().dilution = *flow;
    } else {
      refuse(Error{"burning.no_amount", "The dilution air has no amount.", "",
                   "Type a flow, such as 400 Nm3/h."},
             where + ".total");
    }
  }

  /// Moles a second of every part, from flows, shares and totals.
  void species(burning::Stream& stream, const step::StepInput& plain, const step::Feed& feed,
               const std::string& where) {
    std::vector<double> per_mole;  // kg
    for (std::size_t r = 0; r < feed.parts.size(); ++r) {
      const step::FeedPart& part = feed.parts[r];
      const step::SubstanceInput& substance = plain.substances[part.substance];
      Result<burning::Part> made = burning::make_part(substance.name, substance.species, part.state.phase, 0);
      if (!made.ok()) {
        refuse(made.error(), where + ".rows[" + std::to_string(r) + "].species");
        stream.parts.clear();
        return;
      }
      per_mole.push_back(made->molar_mass);
      stream.parts.push_back(std::move(made).value());
    }
    if (stream.parts.empty()) return;
    if (feed.shares != step::ShareKind::None) {
      shares(stream, feed, where);
      return;
    }
    const bool all_blank = std::none_of(feed.parts.begin(), feed.parts.end(),
                                        [](const step::FeedPart& part) { return part.figure.has_value(); });
    if (all_blank && stream.parts.size() == 1) {
      stream.parts[0].moles = unit_flow(stream);
      return;
    }
    for (std::size_t r = 0; r < feed.parts.size(); ++r) {
      const std::string row = where + ".rows[" + std::to_string(r) + "].amount";
      if (!feed.parts[r].figure) {
        refuse(Error{"burning.no_amount", "The amount of " + stream.parts[r].name + " is not typed.", "",
                     "Type a flow or a share, such as 12 kmol/h or 4 mol%."},
               row);
        continue;
      }
      const double factor =
          moles_per(feed.parts[r].measure, stream.parts[r], plain, feed, feed.parts[r].substance, row);
      stream.parts[r].moles = feed.parts[r].figure->value * factor;
      stream.parts[r].u95 = feed.parts[r].figure->u95 * factor;
    }
  }

  /// 1 kmol/h of a feed whose amount does not matter or was not typed.
  double unit_flow(burning::Stream& stream) {
    stream.amount_typed = false;
    const bool sought = in().sought == burning::Sought::Support && stream.role == Role::SupportFuel;
    if (!sought)
      reading_.notes.push_back("No amount of " + stream.name + " is typed: it is reckoned with 1 kmol/h.");
    return 1000.0 / 3600;
  }

  double moles_per(step::Measure measure, const burning::Part& part, const step::StepInput& plain,
                   const step::Feed& feed, std::size_t substance, const std::string& where) {
    if (measure == step::Measure::Mole) return 1;
    if (measure == step::Measure::Mass) return 1 / part.molar_mass;
    if (part.phase == molecule::Phase::Gas) {
      const double p = feed.pressure ? feed.pressure->value : in().pressure;
      const double t = feed.temperature ? feed.temperature->value : units::kReferenceTemperature;
      return p / (units::kGasConstant * t);
    }
    double density = plain.substances[substance].density ? plain.substances[substance].density->value : 0;
    const facts::Compound* compound = part.species->compound;
    if (density == 0 && compound != nullptr && compound->liquid_density)
      density = compound->liquid_density->value;
    if (density == 0) {
      refuse(Error{"step.no_density", "The density of " + part.name + " is not known.", "",
                   "Type the flow by mass, or a density among the species figures."},
             where);
      return 0;
    }
    return density / part.molar_mass;
  }

  void shares(burning::Stream& stream, const step::Feed& feed, const std::string& where) {
    double given = 0;
    std::size_t rest = stream.parts.size();
    for (std::size_t r = 0; r < feed.parts.size(); ++r) {
      if (feed.parts[r].figure) {
        given += feed.parts[r].figure->value;
      } else {
        rest = r;
      }
    }
    if (given > 1 + 1e-9 || (rest == stream.parts.size() && std::abs(given - 1) > 0.005)) {
      refuse(Error{"step.shares",
                   "The shares of " + stream.name + " make " + machine_number(100 * given, 5) + " %.", "",
                   "Let them make 100 %, or write rest in one of them."},
             where + ".rows[0].amount");
      return;
    }
    const bool by_mass = feed.shares == step::ShareKind::MassShare;
    double moles = 0, mass = 0;
    for (std::size_t r = 0; r < feed.parts.size(); ++r) {
      burning::Part& part = stream.parts[r];
      const Typed figure = feed.parts[r].figure.value_or(Typed{std::max(1 - given, 0.0), 0});
      const double factor = by_mass ? 1 / part.molar_mass : 1;
      part.moles = figure.value * factor;
      part.u95 = figure.u95 * factor;
      moles += part.moles;
      mass += part.moles * part.molar_mass;
    }
    double scale = 0;
    if (!feed.total) {
      scale = unit_flow(stream) / moles;
    } else if (feed.measure == step::Measure::Mass) {
      scale = feed.total->value / mass;
    } else if (feed.measure == step::Measure::Mole) {
      scale = feed.total->value / moles;
    } else {
      const double p = feed.pressure ? feed.pressure->value : in().pressure;
      const double t = feed.temperature ? feed.temperature->value : units::kReferenceTemperature;
      scale = feed.total->value * p / (units::kGasConstant * t) / moles;
    }
    for (burning::Part& part : stream.parts) {
      part.moles *= scale;
      part.u95 *= scale;
    }
  }

  // Analyses.

  void analysis(burning::Stream& stream, const FeedSheet& typed, const std::string& where) {
    burning::Analysis a;
    const struct {
      const char* name;
      double burning::Analysis::*member;
    } names[] = {{"C", &burning::Analysis::c},           {"H", &burning::Analysis::h},
                 {"O", &burning::Analysis::o},           {"N", &burning::Analysis::n},
                 {"S", &burning::Analysis::s},           {"Cl", &burning::Analysis::cl},
                 {"ash", &burning::Analysis::ash},       {"moisture", &burning::Analysis::moisture},
                 {"water", &burning::Analysis::moisture}};
    double given = 0;
    double* rest = nullptr;
    for (std::size_t r = 0; r < typed.rows.size(); ++r) {
      const std::string name = trimmed(typed.rows[r].species), amount = trimmed(typed.rows[r].amount);
      if (name.empty() && amount.empty()) continue;
      const std::string row = where + ".rows[" + std::to_string(r) + "]";
      double* member = nullptr;
      for (const auto& known : names) {
        if (name == known.name) member = &(a.*known.member);
      }
      if (member == nullptr) {
        refuse(Error{"burning.analysis_row", "An analysis holds C, H, O, N, S, Cl, ash and moisture.", "",
                     "Write one of these, or give the feed another role."},
               row + ".species");
        return;
      }
      if (amount == "rest") {
        rest = member;
        continue;
      }
      const Result<units::TypedValue> read = units::evaluate_quantity(amount, *context_.names);
      if (!read.ok() || (read->dimension() != d::kMassFraction && read->dimension() != d::kNumber)) {
        refuse(read.ok()
                   ? Error{"burning.analysis_row", "An analysis is typed in shares of the mass as fired.", "",
                           "Type such as 48.2 wt%."}
                   : read.error(),
               row + ".amount");
        return;
      }
      *member += read->value;
      given += read->value;
    }
    if (rest != nullptr) *rest = std::max(1 - given, 0.0);
    if (given == 0) return;
    if (!calorific(a)) return;
    Result<std::vector<burning::Part>> parts = burning::analysed_fuel(stream.name, a);
    if (!parts.ok()) {
      refuse(parts.error(), where + ".rows[0].amount");
      return;
    }
    Blank flow = quantity(typed.total, d::kMassFlow, where + ".total");
    if (!flow) {
      flow = Typed{100.0 / 3600, 0};
      stream.amount_typed = false;
      reading_.notes.push_back("No amount of " + stream.name + " is typed: it is reckoned with 100 kg/h.");
    }
    stream.parts = std::move(parts).value();
    for (burning::Part& part : stream.parts) part.moles *= flow->value;
    reading_.notes.push_back("Calorific value of " + stream.name + ": " + stream.parts.front().source + ".");
  }

  /// "18.2 MJ/kg gross", "16.9 MJ/kg net", "Dulong", "Channiwala-Parikh" (also when empty).
  bool calorific(burning::Analysis& a) {
    std::string text = text_of("calorific");
    if (text.empty() || text == "Channiwala-Parikh") return true;
    if (text == "Dulong") {
      a.rule = burning::CalorificRule::Dulong;
      return true;
    }
    const bool gross = ends(text, "gross"), net = ends(text, "net");
    if (!gross && !net) {
      refuse(Error{"burning.calorific", "A calorific value is stated gross or net, as fired.", "",
                   "Write 18.2 MJ/kg gross, 16.9 MJ/kg net, Channiwala-Parikh or Dulong."},
             "blanks.calorific");
      return false;
    }
    const Blank figure = quantity(trimmed(text.substr(0, text.size() - (gross ? 5 : 3))), d::kEnergyPerMass,
                                  "blanks.calorific");
    if (!figure) return false;
    a.rule = burning::CalorificRule::Typed;
    a.gross = *figure;
    if (net) {
      constexpr double kHydrogen = 2 * 1.008e-3, kWater = 18.015e-3;  // kg/mol
      a.gross.value += (a.h / kHydrogen + a.moisture / kWater) *
                       burning::vaporisation_of_water(units::kReferenceTemperature);
    }
    return true;
  }

  void loss() {
    const std::string text = text_of("loss");
    if (text.empty()) return;
    const Result<units::TypedValue> read = units::evaluate_quantity(text, *context_.names);
    if (!read.ok()) {
      refuse(read.error(), "blanks.loss");
      return;
    }
    const Typed figure{read->value, read->u95.value_or(0)};
    if (read->dimension() == d::kPower) {
      in().loss = figure;
    } else if (read->dimension() == d::kNumber) {
      in().loss_share = figure;
    } else {
      refuse(Error{"step.figure", "A heat loss is a power, or a share of the net heat set free.", "",
                   "Type such as 40 kW or 3 %."},
             "blanks.loss");
    }
  }

  const StepSheet& sheet_;
  const StepContext& context_;
  BurningReading reading_;
  bool air_typed_ = false;
};

}  // namespace

const std::vector<const char*>& burning_roles() {
  static const std::vector<const char*> all = [] {
    std::vector<const char*> words;
    for (const NamedRole& role : kRoles) words.push_back(role.words);
    return words;
  }();
  return all;
}

BurningReading read_burning(const StepSheet& sheet, const StepContext& context) {
  return Reader(sheet, context).read();
}

void compute_burning(const StepSheet& sheet, const StepContext& context, step::Lookups&,
                     StepOutcome& outcome) {
  BurningReading reading = read_burning(sheet, context);
  outcome.errors = std::move(reading.errors);
  outcome.notes = std::move(reading.notes);
  if (!outcome.errors.empty() || reading.input.streams.empty()) return;
  Result<step::Findings> found = burning::answer(reading.input);
  if (!found.ok()) {
    outcome.errors.push_back(found.error());
    return;
  }
  outcome.findings = std::make_shared<const step::Findings>(std::move(found).value());
}

}  // namespace heatledger::document
