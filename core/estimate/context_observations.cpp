#include "core/estimate/context_observations.hpp"

#include <array>
#include <cmath>

#include "core/base/check.hpp"
#include "core/estimate/context_store.hpp"

namespace heatledger::estimate {
namespace {

bool concerns(Property property, FitKind kind) {
  switch (property) {
    case Property::GasFormation:
      return kind == FitKind::Formation;
    case Property::Vaporisation298:
      return kind == FitKind::Vaporisation;
    case Property::LiquidHeatCapacity298:
      return kind == FitKind::Liquid;
    case Property::GasHeatCapacity:
      break;
  }
  return false;
}

}  // namespace

struct Observations::Prepared {
  std::array<std::unique_ptr<Conditioning>, fit_kind_count> by_kind;
};

Observations::Observations() : prepared_(std::make_unique<Prepared>()) {}
Observations::Observations(const Observations& other)
    : list_(other.list_), prepared_(std::make_unique<Prepared>()) {}
Observations& Observations::operator=(const Observations& other) {
  list_ = other.list_;
  prepared_ = std::make_unique<Prepared>();
  return *this;
}
Observations::~Observations() = default;

Status Observations::add(Measurement measurement) {
  const auto refuse = [](const char* message) {
    return Error{"estimate.measurement", message, "measurement",
                 "Give the measured figure with its 95 % interval."};
  };
  if (measurement.terms.empty()) return refuse("A measurement belongs to a species or a reaction.");
  if (!std::isfinite(measurement.value)) return refuse("The measured figure is not a number.");
  if (!std::isfinite(measurement.u95) || measurement.u95 <= 0)
    return refuse("A measured figure needs a ± greater than zero.");
  if (measurement.property == Property::GasHeatCapacity) {
    return refuse("A measured gas heat capacity stands for itself and does not enter the fit.");
  }
  list_.push_back(std::move(measurement));
  prepared_ = std::make_unique<Prepared>();
  return success();
}

void Observations::remove(std::size_t index) {
  CHECK(index < list_.size(), "a measurement of the list");
  list_.erase(list_.begin() + static_cast<std::ptrdiff_t>(index));
  prepared_ = std::make_unique<Prepared>();
}

std::vector<MeasuredDirection> observed_directions(const Observations& observations, FitKind kind) {
  std::vector<MeasuredDirection> out;
  for (const Measurement& measurement : observations.list_) {
    if (!concerns(measurement.property, kind)) continue;
    const double scale = kind == FitKind::Liquid ? 1 : 1000;
    MeasuredDirection one;
    one.figure = sign_of(kind) * measurement.value / scale;
    for (const Measurement::Term& term : measurement.terms) {
      one.terms.push_back({term.coefficient, term.molecule.get()});
      one.figure -= term.coefficient * offset(kind, *term.molecule, gas_nodes[0]);
    }
    const double s = measurement.u95 / scale / 2;
    one.variance = s * s;
    out.push_back(std::move(one));
  }
  return out;
}

const Conditioning* observed_conditioning(const Observations& observations, FitKind kind) {
  const std::vector<MeasuredDirection> measured = observed_directions(observations, kind);
  if (measured.empty()) return nullptr;
  std::unique_ptr<Conditioning>& prepared = observations.prepared_->by_kind[static_cast<std::size_t>(kind)];
  if (prepared == nullptr) {
    prepared =
        std::make_unique<Conditioning>(*embedded_fit(kind).fit, std::vector<std::uint32_t>{}, measured);
  }
  return prepared.get();
}

}  // namespace heatledger::estimate
