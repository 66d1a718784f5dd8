#include "core/page/bulk.hpp"

#include <utility>

#include "core/balance/quick_tally.hpp"
#include "core/estimate/bond_set.hpp"
#include "core/page/json_line.hpp"
#include "core/page/json_text.hpp"
#include "core/page/species_json.hpp"
#include "core/page/tally_figures.hpp"

namespace heatledger::page {
namespace {

constexpr const char* kShape = "Write {\"id\": 1, \"equation\": \"H2 + Cl2 -> 2 HCl\"} on one line.";

Error no_question(const LineQuestion& question) {
  std::string message = "The line asks nothing: it has neither \"equation\" nor \"species\" nor \"smiles\".";
  if (!question.first_unknown.empty()) message += " The key \"" + question.first_unknown + "\" is not known.";
  return {"bulk.no_question", std::move(message), "", kShape};
}

void write_failure(std::string_view id, const Error& error, std::string& out) {
  JsonText json(out);
  json.open_object().key("id");
  id.empty() ? json.null() : json.raw(id);
  json.key("error");
  write_error(json, error);
  json.close_object();
  out += '\n';
}

}  // namespace

struct Bulk::State {
  State(const BulkOptions& how, std::shared_ptr<const estimate::BondSet> set)
      : options(how),
        // By the average set the context route is left out: it costs fifty times the rest of the answer.
        tally(std::move(set), how.route == BondRoute::Context ? balance::ContextUse::Always
                                                              : balance::ContextUse::WhereNeeded) {}

  BulkOptions options;
  balance::QuickTally tally;
  balance::CachedSpecies species;  ///< of questions for one compound, and of whole answers
  LineQuestion question;

  void answer_equation(std::string& out);
  void answer_species(std::string& out);
  /// Puts the id of the present line in front of a whole answer of `tally` or `species`.
  void with_id(const Answer& answer, std::string& out);
};

void Bulk::State::with_id(const Answer& answer, std::string& out) {
  out += "{\"id\":";
  out += question.id.empty() ? std::string_view("null") : question.id;
  out += ',';
  out.append(answer.text, 1, std::string::npos);
}

void Bulk::State::answer_equation(std::string& out) {
  if (options.full) {
    TallyQuestion whole;
    whole.equation = *question.equation;
    whole.route = options.route;
    const Result<Answer> answer = answer_tally(whole, AnswerShape::Json, species);
    answer.ok() ? with_id(*answer, out) : write_failure(question.id, answer.error(), out);
    return;
  }
  const Result<balance::QuickAnswer> answer = tally.tally(*question.equation);
  if (!answer.ok()) return write_failure(question.id, answer.error(), out);
  TallyFigures figures = tally_figures(*answer);
  if (options.route == BondRoute::Context) figures = in_context(std::move(figures));
  JsonText json(out);
  json.open_object().key("id");
  question.id.empty() ? json.null() : json.raw(question.id);
  json.key("balanced").boolean(true);
  write_columns(json, figures);
  json.key("gas_298");
  write_kilojoules(json, figures.gas_298);
  json.key("as_written");
  write_kilojoules(json, figures.as_written);
  json.key("routes").open_object();
  write_routes(json, figures);
  json.close_object().close_object();
  out += '\n';
}

void Bulk::State::answer_species(std::string& out) {
  const bool smiles = question.smiles.has_value();
  Result<std::shared_ptr<const facts::Species>> found =
      species.species(smiles ? *question.smiles : *question.species, smiles);
  if (!found.ok()) return write_failure(question.id, found.error(), out);
  const SpeciesFigures figures = species_figures(std::move(found.value()), question.estimate_only);
  JsonText json(out);
  json.open_object().key("id");
  question.id.empty() ? json.null() : json.raw(question.id);
  write_species_keys(json, figures);
  json.close_object();
  out += '\n';
}

Bulk::Bulk(const BulkOptions& options) {
  Result<estimate::BondSet> set = estimate::BondSet::published(estimate::BondSet::names().front());
  CHECK(set.ok(), "the primary bond set is always there");
  state_ =
      std::make_unique<State>(options, std::make_shared<const estimate::BondSet>(std::move(set.value())));
}

Bulk::~Bulk() = default;

void Bulk::answer(std::string_view line, std::string& out) {
  LineQuestion& question = state_->question;
  while (!line.empty() && (line.back() == '\r' || line.back() == ' ' || line.back() == '\t'))
    line.remove_suffix(1);
  if (line.empty()) return;
  if (line.size() > kLongestBulkLine) return answer_too_long(line, out);
  if (const Status status = read_question(line, question); !status.ok()) {
    return write_failure(question.id, status.error(), out);
  }
  const int asked =
      question.equation.has_value() + question.species.has_value() + question.smiles.has_value();
  if (asked == 0) return write_failure(question.id, no_question(question), out);
  if (asked > 1) {
    return write_failure(question.id,
                         {"bulk.several_questions", "The line asks more than one thing.", "",
                          "Ask each on a line of its own."},
                         out);
  }
  question.equation ? state_->answer_equation(out) : state_->answer_species(out);
}

void Bulk::answer_too_long(std::string_view beginning, std::string& out) {
  // The rest of the line is gone, but its id usually stands first.
  const Status status = read_question(beginning, state_->question);
  (void)status;
  write_failure(state_->question.id,
                {"bulk.line_too_long", "The line is longer than 1 MiB.",
                 "offset " + std::to_string(kLongestBulkLine), kShape},
                out);
}

}  // namespace heatledger::page
