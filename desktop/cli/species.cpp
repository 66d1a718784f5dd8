#include <memory>
#include <string>

#include "core/page/answers.hpp"
#include "desktop/cli/command.hpp"
#include "desktop/cli/output.hpp"
#include "desktop/cli/question_text.hpp"

namespace heatledger::cli {
namespace {

struct Options {
  std::string species;
  bool json = false, smiles = false, estimate_only = false;
};

int run(const Options& options) {
  const auto fail = [&](const Error& error) {
    options.json ? complain_json(error) : complain(error);
    return kWrongInput;
  };
  const Result<std::string> text = question_text(options.species);
  if (!text.ok()) return fail(text.error());
  page::SpeciesQuestion question;
  question.species = *text;
  question.smiles = options.smiles;
  question.estimate_only = options.estimate_only;
  balance::CachedSpecies source;
  const Result<page::Answer> answer = page::answer_species(
      question, options.json ? page::AnswerShape::Json : page::AnswerShape::Text, source);
  if (!answer.ok()) return fail(answer.error());
  return print(answer->text) ? kDone : kWrongInput;
}

}  // namespace

void add_species(CLI::App& app, Chosen& chosen) {
  CLI::App* command = app.add_subcommand("species", "The figures of one compound with their ± and sources");
  const auto options = std::make_shared<Options>();
  command
      ->add_option("species", options->species,
                   "Name, CAS number, formula or SMILES (\"ethyl acetate\", \"CCOC(C)=O\"); - reads it from "
                   "standard input")
      ->required();
  command->add_flag("--estimate-only", options->estimate_only,
                    "Leave every tabulated value of this very compound aside");
  command->add_flag("--smiles", options->smiles, "The text is SMILES (CO is methanol, not carbon monoxide)");
  command->add_flag("--json", options->json, "One JSON object: kJ/mol, J/(mol K), K");
  command->callback([options, &chosen] { chosen = [options] { return run(*options); }; });
}

}  // namespace heatledger::cli
