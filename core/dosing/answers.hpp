// What a dosed charge answers with: its course, its figures with their ±, the failure of the cooling at the
// worst moment. Words and drawings stand in dosed_findings.hpp.
#pragma once

#include <array>
#include <optional>

#include "core/dosing/dosed_step.hpp"
#include "core/dosing/failure.hpp"

namespace heatledger::dosing {

enum class FigureId : unsigned char {
  HeatSetFree,        ///< over the whole course, at the temperature of the start [J], > 0 exothermic
  PeakHeat,           ///< highest rate at which heat is set free [W]
  PeakCooling,        ///< highest cooling asked for, or done [W]
  MeanDuty,           ///< heat taken out over the time of dosing [W]
  ColdFeed,           ///< taken up by all that is dosed on its way to the temperature of the start [J]
  Highest,            ///< temperature [K]
  Accumulation,       ///< largest, of the extent of the whole step
  AccumulationAtEnd,  ///< when dosing ends
  ConversionAtEnd,    ///< when dosing ends
  Conversion,         ///< at the end of the course
  Mtsr,               ///< largest over the course, feed stopped [K]
  MtsrByEnthalpy,     ///< the same by h(T) of what is then there, cp changing on the way [K]
  TemperatureThen,    ///< of the content at that moment [K]
  ColdFeedThen,       ///< cooling by cold feed at that moment, which a stop of the feed takes away [W]
  TimeToMtsr,         ///< from the failure at that moment to 95 % of the rise [s]
  TimeToFastest,      ///< to the fastest rise [s]
  FeedNotStopped,     ///< highest temperature when the feed goes on, failure at the worst moment for that [K]
  AllAtOnce,          ///< everything charged at once at the temperature of the start [K]
  AdiabaticRise,      ///< of the whole step: heat / (final mass × cp) [K]
  DosingTime,         ///< for which the peak of the cooling is the capacity typed [s]
};
constexpr std::size_t kFigures = 20;
using Figures = std::array<std::optional<double>, kFigures>;

/// When something is highest.
struct Times {
  double peak_heat = 0, peak_cooling = 0, highest = 0, accumulation = 0, mtsr = 0;  ///< [s]
};

struct Answers {
  std::shared_ptr<const Course> course;
  Times times;
  Moment worst;           ///< at the largest MTSR
  Failure failure;        ///< from that moment, feed stopped
  Failure feeding;        ///< feed not stopped, from the moment that is worst for that
  double dosing_end = 0;  ///< [s]
  Figures figures;
  std::string why_no_dosing_time;  ///< set when a capacity is typed and gives no time
  std::array<uncertainty::Quantity, kFigures> with_spread;  ///< first order; where the figure exists
  /// Which numbers carry the ± of the largest MTSR: label and share of the variance, largest first.
  std::vector<std::pair<std::string, double>> shares;
  bool nothing_known = false;  ///< no kinetics at all: accumulation and MTSR by the dosing are not known
};

inline const std::optional<double>& figure(const Answers& answers, FigureId id) {
  return answers.figures[static_cast<std::size_t>(id)];
}
inline const uncertainty::Quantity& quantity(const Answers& answers, FigureId id) {
  return answers.with_spread[static_cast<std::size_t>(id)];
}

struct AnswerOptions {
  bool spread = true;
  RunOptions run;
};

/// @errors dosing.too_steep and those of DosedModel::system
Result<Answers> answer(const DosedModel& model, const AnswerOptions& options = {});

}  // namespace heatledger::dosing
