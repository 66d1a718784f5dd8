#include "core/page/digest.hpp"

#include <array>
#include <cstdint>

#include "core/page/figures.hpp"
#include "core/page/findings_blocks.hpp"
#include "core/page/step_figures.hpp"

namespace heatledger::page {
namespace {

/// FNV-1a, 64 bits: tells texts apart, guards against nothing.
class Digest {
 public:
  void add(const std::string& text) {
    for (const char c : text) step(static_cast<unsigned char>(c));
    step(0xff);  // parts texts: no byte of UTF-8
  }
  std::string hex() const {
    constexpr std::array<char, 17> kDigits{"0123456789abcdef"};
    std::string out;
    for (int shift = 60; shift >= 0; shift -= 4) out += kDigits[(state_ >> shift) & 0xfU];
    return out;
  }

 private:
  void step(std::uint64_t byte) { state_ = (state_ ^ byte) * 0x100000001b3ULL; }
  std::uint64_t state_ = 0xcbf29ce484222325ULL;
};

void add_quantity(Digest& digest, const std::optional<uncertainty::Quantity>& quantity) {
  digest.add(quantity ? figure_kj(quantity->figure()) : std::string("none"));
}

void add_reaction(Digest& digest, const document::ReactionResult& result) {
  if (result.ledger == nullptr) {
    digest.add(result.error ? result.error->code : "empty");
    return;
  }
  const balance::Ledger& ledger = *result.ledger;
  for (const balance::LedgerRow& row : ledger.rows) {
    add_quantity(digest, row.in_equation);
    add_quantity(digest, row.table);
  }
  add_quantity(digest, ledger.gas_298);
  for (const balance::Correction& correction : ledger.corrections) add_quantity(digest, correction.value);
  add_quantity(digest, ledger.as_written);
  for (const balance::Route& route : ledger.routes) {
    digest.add(route.name);
    add_quantity(digest, route.as_written);
  }
  digest.add(ledger.taken);
  for (const balance::Correction& line : ledger.to_temperature) add_quantity(digest, line.value);
  if (!ledger.to_temperature.empty()) add_quantity(digest, ledger.as_run);
}

/// Every figure goes into the digest, the first that there is stands in the list.
void add_findings(Digest& digest, const std::string& id, const step::Findings& findings,
                  file::SavedResults& saved) {
  for (const step::FindingGroup& group : findings.groups) {
    for (const step::Finding& finding : group.findings) {
      const std::string sentence = finding_sentence(finding);
      digest.add(sentence);
      if (finding.why_missing.empty()) saved.figures.emplace(id, sentence);
    }
  }
}

}  // namespace

file::SavedResults results_to_save(const document::Worksheet& sheet, const document::Results& results) {
  file::SavedResults saved;
  Digest digest;
  for (std::size_t i = 0; i < sheet.reactions.size(); ++i) {
    const document::ReactionResult& result = *results.reactions[i];
    add_reaction(digest, result);
    if (result.ledger == nullptr) continue;
    const std::string taken = taken_text(*result.ledger);
    if (!taken.empty())
      saved.figures[sheet.reactions[i]->id] = taken + ", by " + route_words(result.ledger->taken);
  }
  for (std::size_t i = 0; i < sheet.steps.size(); ++i) {
    const document::StepOutcome& outcome = *results.steps[i];
    if (outcome.findings != nullptr) add_findings(digest, sheet.steps[i]->id, *outcome.findings, saved);
    if (outcome.result == nullptr) {
      if (outcome.findings != nullptr) continue;
      digest.add(outcome.errors.empty() ? "empty" : outcome.errors.front().code);
      continue;
    }
    for (const step::Answer& answer : outcome.result->answers) {
      const ShownFigure shown = shown_answer(answer);
      digest.add(answer.label + " " + shown.value + " " + shown.unit + " " + shown.u95);
    }
    const step::Answer& first = outcome.result->answers.front();
    const ShownFigure shown = shown_answer(first);
    saved.figures[sheet.steps[i]->id] =
        first.label + " " + shown.value + (shown.u95.empty() ? "" : " " + shown.u95) + " " + shown.unit;
  }
  saved.digest = digest.hex();
  return saved;
}

std::vector<std::string> changed_figures(const document::Worksheet& sheet, const file::SavedResults& saved,
                                         const file::SavedResults& now) {
  std::vector<std::string> sentences;
  if (saved.digest.empty() || saved.digest == now.digest) return sentences;
  for (std::size_t i = 0; i < sheet.reactions.size(); ++i) {
    const std::string& id = sheet.reactions[i]->id;
    const auto before = saved.figures.find(id), after = now.figures.find(id);
    const std::string was = before == saved.figures.end() ? "no value" : before->second;
    const std::string is = after == now.figures.end() ? "no value" : after->second;
    if (was == is) continue;
    sentences.push_back("Reaction " + std::to_string(i + 1) + " read " + was +
                        " when this sheet was saved and reads " + is +
                        " now: other tables or another version of the program stand behind it.");
  }
  for (std::size_t i = 0; i < sheet.steps.size(); ++i) {
    const std::string& id = sheet.steps[i]->id;
    const auto before = saved.figures.find(id), after = now.figures.find(id);
    const std::string was = before == saved.figures.end() ? "no value" : before->second;
    const std::string is = after == now.figures.end() ? "no value" : after->second;
    if (was == is) continue;
    sentences.push_back("Step " + std::to_string(i + 1) + " read " + was +
                        " when this sheet was saved and reads " + is +
                        " now: other tables or another version of the program stand behind it.");
  }
  if (sentences.empty()) {
    sentences.push_back(
        "Some figures of this sheet no longer read as they did when it was saved; the figures taken are the "
        "same.");
  }
  return sentences;
}

}  // namespace heatledger::page
