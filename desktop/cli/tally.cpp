#include <memory>
#include <string>

#include "core/page/answers.hpp"
#include "desktop/cli/command.hpp"
#include "desktop/cli/files.hpp"
#include "desktop/cli/output.hpp"
#include "desktop/cli/question_text.hpp"

namespace heatledger::cli {
namespace {

struct Options {
  std::string equation, set = "average", table, basis, reactants_at, products_at, site;
  bool json = false, smiles = false;
};

int run(const Options& options) {
  const auto fail = [&](const Error& error) {
    options.json ? complain_json(error) : complain(error);
    return kWrongInput;
  };
  const Result<std::string> equation = question_text(options.equation);
  if (!equation.ok()) return fail(equation.error());
  page::TallyQuestion question;
  question.equation = *equation;
  question.smiles = options.smiles;
  question.route = options.set == "context" ? page::BondRoute::Context : page::BondRoute::Average;
  question.set = options.table;
  question.basis = options.basis;
  question.reactants_at = options.reactants_at;
  question.products_at = options.products_at;
  std::string site;
  if (!options.site.empty()) {
    Result<std::string> text = read_file(options.site);
    if (!text.ok()) return fail(text.error());
    site = std::move(text).value();
    question.site_table = site;
  }
  balance::CachedSpecies source;
  const Result<page::Answer> answer =
      page::answer_tally(question, options.json ? page::AnswerShape::Json : page::AnswerShape::Text, source);
  if (!answer.ok()) return fail(answer.error());
  if (!print(answer->text)) return kWrongInput;
  if (!answer->wrong) return kDone;
  complain(*answer->wrong);
  return kWrongInput;
}

}  // namespace

void add_tally(CLI::App& app, Chosen& chosen) {
  CLI::App* command =
      app.add_subcommand("tally", "The ledger of one equation: bonds broken and formed, routes, ±");
  const auto options = std::make_shared<Options>();
  command
      ->add_option(
          "equation", options->equation,
          "\"nitrobenzene(l) + 3 H2 -> aniline(l) + 2 H2O(l)\": names, formulas, SMILES in double quotes; "
          "- reads it from standard input")
      ->required();
  command->add_option("--set", options->set, "Whose figures to state: average bonds, or bonds in context")
      ->check(CLI::IsMember({"average", "context"}))
      ->capture_default_str();
  command->add_option("--table", options->table,
                      "Published table of average bonds; the primary one if not given");
  command->add_option("--basis", options->basis,
                      "Also state it per mole of SPECIES, or per \"kg SPECIES\", or per \"kg reactants\"");
  command
      ->add_option("--reactants-at", options->reactants_at,
                   "Temperature of what goes in, \"80 degC\"; 25 degC if not given")
      ->type_name("T");
  command->add_option("--products-at", options->products_at, "Temperature of what comes out")->type_name("T");
  command
      ->add_option("--site", options->site,
                   "Site table whose species and bond values go before published ones")
      ->type_name("FILE");
  command->add_flag("--smiles", options->smiles, "Every species is SMILES, as if in double quotes");
  command->add_flag("--json", options->json, "One JSON object: kJ for the written coefficients");
  command->callback([options, &chosen] { chosen = [options] { return run(*options); }; });
}

}  // namespace heatledger::cli
