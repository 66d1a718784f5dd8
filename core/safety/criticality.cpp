#include "core/safety/criticality.hpp"

#include "core/base/number_text.hpp"
#include "core/uncertainty/normal_draws.hpp"

namespace heatledger::safety {
namespace {

/// Temperatures closer than this are equal: far above rounding, far below any measurement [K].
constexpr double kTie = 1e-6;
/// Share of the draws that a class must hold to count: one tail of the 95 % interval.
constexpr double kTail = 0.025;

bool below(double a, double b) {
  return a < b - kTie;
}

bool is_counted(Criticality criticality) {
  return criticality <= Criticality::NotOperable;
}

std::string celsius(double kelvin) {
  return display_number(kelvin - 273.15, 1) + " °C";
}

std::vector<std::string> four_figures(const CoolingFailure& means) {
  return {"process temperature " + celsius(means.process),
          "maximum temperature of the synthesis reaction " + celsius(means.mtsr),
          "maximum technical temperature " + (means.mtt ? celsius(*means.mtt) : "not known"),
          "T_D24 " + (means.td24 ? celsius(*means.td24) : "not typed")};
}

const char* rule(Criticality criticality) {
  switch (criticality) {
    case Criticality::Class1:
      return "MTSR < MTT < T_D24: class 1";
    case Criticality::Class2:
      return "MTSR < T_D24 ≤ MTT: class 2";
    case Criticality::Class3:
      return "MTT ≤ MTSR < T_D24: class 3";
    case Criticality::Class4:
      return "MTT < T_D24 ≤ MTSR: class 4";
    case Criticality::Class5:
      return "T_D24 ≤ MTSR and T_D24 ≤ MTT: class 5";
    case Criticality::NotOperable:
      return "T_D24 ≤ process temperature: not operable, no class";
    default:
      return nullptr;
  }
}

Assessment assessment_of(const CoolingFailure& means) {
  Assessment assessment;
  assessment.at_means = assessment.verdict = classify(means);
  if (is_counted(assessment.verdict)) assessment.shares[static_cast<std::size_t>(assessment.verdict) - 1] = 1;
  assessment.working = four_figures(means);
  if (const char* line = rule(assessment.at_means)) assessment.working.push_back(line);
  return assessment;
}

void settle(Assessment& assessment) {
  if (assessment.drawn) {
    std::string line = "of the draws:";
    for (std::size_t i = 0; i < assessment.shares.size(); ++i) {
      if (assessment.shares[i] == 0) continue;
      line += (line.back() == ':' ? " " : ", ") + display_number(100 * assessment.shares[i], 1) + " % " +
              (i < 5 ? "class " + std::to_string(i + 1) : std::string("not operable"));
      if (assessment.shares[i] >= kTail) assessment.verdict = static_cast<Criticality>(i + 1);
    }
    assessment.working.push_back(line);
    assessment.working.push_back("the worst that holds at least 2.5 % counts");
  }
  assessment.words = criticality_words(assessment.verdict);
  assessment.meaning = criticality_meaning(assessment.verdict);
}

}  // namespace

Criticality classify(const CoolingFailure& failure) {
  if (!failure.td24) return Criticality::NeedsTd24;
  const double td24 = *failure.td24;
  if (!below(failure.process, td24)) return Criticality::NotOperable;
  if (!failure.mtt) return Criticality::NeedsMtt;
  const double mtt = *failure.mtt;
  if (!below(failure.mtsr, td24)) return below(mtt, td24) ? Criticality::Class4 : Criticality::Class5;
  if (!below(failure.mtsr, mtt)) return Criticality::Class3;
  return below(mtt, td24) ? Criticality::Class1 : Criticality::Class2;
}

Assessment assess(const CoolingFailure& means, const std::vector<CoolingFailure>& draws) {
  Assessment assessment = assessment_of(means);
  std::array<std::size_t, 6> counts{};
  std::size_t counted = 0;
  for (const CoolingFailure& draw : draws) {
    const Criticality criticality = classify(draw);
    if (!is_counted(criticality)) continue;
    ++counts[static_cast<std::size_t>(criticality) - 1];
    ++counted;
  }
  if (is_counted(assessment.at_means) && counted > 0) {
    assessment.drawn = true;
    for (std::size_t i = 0; i < counts.size(); ++i)
      assessment.shares[i] = static_cast<double>(counts[i]) / static_cast<double>(counted);
  }
  settle(assessment);
  return assessment;
}

Assessment assess(const UncertainFailure& failure, std::size_t draws, std::uint64_t seed) {
  CoolingFailure means{failure.process.value(), failure.mtsr.value(), {}, {}};
  std::vector<uncertainty::Quantity> all{failure.process, failure.mtsr};
  if (failure.mtt) {
    means.mtt = failure.mtt->value();
    all.push_back(*failure.mtt);
  }
  if (failure.td24) {
    means.td24 = failure.td24->value();
    all.push_back(*failure.td24);
  }
  bool spread = false;
  for (const uncertainty::Quantity& each : all) spread = spread || each.u95() > 0;
  if (!spread || !is_counted(classify(means))) return assess(means, {});
  const std::vector<std::vector<double>> rows = uncertainty::draw_together(all, draws, seed);
  std::vector<CoolingFailure> scenarios(draws);
  for (std::size_t i = 0; i < draws; ++i) {
    CoolingFailure& scenario = scenarios[i];
    scenario.process = rows[0][i];
    scenario.mtsr = rows[1][i];
    if (failure.mtt) scenario.mtt = rows[2][i];
    if (failure.td24) scenario.td24 = rows.back()[i];
  }
  return assess(means, scenarios);
}

std::string criticality_words(Criticality criticality) {
  switch (criticality) {
    case Criticality::NotOperable:
      return "not operable: T_D24 is not above the process temperature";
    case Criticality::NeedsTd24:
      return "class needs T_D24";
    case Criticality::NeedsMtt:
      return "class needs a maximum technical temperature";
    default:
      return "class " + std::to_string(static_cast<int>(criticality));
  }
}

std::string criticality_meaning(Criticality criticality) {
  switch (criticality) {
    case Criticality::Class1:
      return "After a cooling failure the charge reaches neither the technical limit nor decomposition, and "
             "the limit lies before decomposition.";
    case Criticality::Class2:
      return "After a cooling failure the charge reaches neither the technical limit nor decomposition, but "
             "kept warm for long it meets decomposition before the limit.";
    case Criticality::Class3:
      return "After a cooling failure the charge reaches the technical limit: boiling or relief has to carry "
             "the heat of the synthesis; decomposition is not reached.";
    case Criticality::Class4:
      return "After a cooling failure the charge reaches the technical limit, and decomposition if that does "
             "not hold it: boiling or relief is all that stands between.";
    case Criticality::Class5:
      return "After a cooling failure the charge reaches decomposition before any technical limit: change "
             "the process, or hold quench or dumping ready.";
    case Criticality::NotOperable:
      return "Decomposition is within 24 h of its maximum rate at the process temperature itself.";
    default:
      return {};
  }
}

Band severity(double rise) {
  return rise < 50 ? Band::Low : rise > 200 ? Band::High : Band::Medium;
}

Band likelihood(double time) {
  constexpr double kHour = 3600;
  return time > 24 * kHour ? Band::Low : time < 8 * kHour ? Band::High : Band::Medium;
}

const char* band_word(Band band) {
  return band == Band::Low ? "low" : band == Band::High ? "high" : "medium";
}

const char* criticality_source() {
  return "F. Stoessel, What is your thermal risk?, Chem. Eng. Prog. 89 (10) (1993) 68";
}

}  // namespace heatledger::safety
