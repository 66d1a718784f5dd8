#include "core/facts/ester_name.hpp"

#include "core/facts/name_key.hpp"

namespace heatledger::facts {
namespace {

struct Part {
  std::string_view names;   ///< name keys, separated by blanks
  std::string_view smiles;  ///< alkyl: from the atom that binds oxygen; acid: * stands for O and the alkyl
};

constexpr Part kAlkyls[] = {
    {"methyl", "C"},
    {"ethyl", "CC"},
    {"propyl npropyl", "CCC"},
    {"isopropyl ipropyl 2propyl propan2yl 1methylethyl", "C(C)C"},
    {"butyl nbutyl", "CCCC"},
    {"isobutyl ibutyl 2methylpropyl", "CC(C)C"},
    {"secbutyl sbutyl 2butyl butan2yl 1methylpropyl", "C(C)CC"},
    {"tertbutyl tbutyl 11dimethylethyl 2methylpropan2yl", "C(C)(C)C"},
    {"pentyl npentyl amyl namyl", "CCCCC"},
    {"isopentyl isoamyl 3methylbutyl", "CCC(C)C"},
    {"neopentyl 22dimethylpropyl", "CC(C)(C)C"},
    {"hexyl nhexyl", "CCCCCC"},
    {"heptyl nheptyl", "CCCCCCC"},
    {"octyl noctyl", "CCCCCCCC"},
    {"2ethylhexyl", "CC(CC)CCCC"},
    {"nonyl nnonyl", "CCCCCCCCC"},
    {"decyl ndecyl", "CCCCCCCCCC"},
    {"dodecyl lauryl", "CCCCCCCCCCCC"},
    {"cyclohexyl", "C1CCCCC1"},
    {"benzyl phenylmethyl", "Cc1ccccc1"},
    {"phenyl", "c1ccccc1"},
    {"vinyl ethenyl", "C=C"},
    {"allyl prop2enyl prop2en1yl", "CC=C"},
    {"2hydroxyethyl", "CCO"},
    {"2methoxyethyl", "CCOC"},
    {"2ethoxyethyl", "CCOCC"},
    {"2butoxyethyl", "CCOCCCC"},
};

constexpr Part kAcids[] = {
    {"formate methanoate", "C(=O)*"},
    {"acetate ethanoate", "CC(=O)*"},
    {"propionate propanoate", "CCC(=O)*"},
    {"butyrate butanoate nbutyrate", "CCCC(=O)*"},
    {"isobutyrate isobutanoate 2methylpropanoate 2methylpropionate", "CC(C)C(=O)*"},
    {"valerate pentanoate nvalerate", "CCCCC(=O)*"},
    {"isovalerate 3methylbutanoate 3methylbutyrate", "CC(C)CC(=O)*"},
    {"2methylbutanoate 2methylbutyrate", "CCC(C)C(=O)*"},
    {"pivalate 22dimethylpropanoate 22dimethylpropionate trimethylacetate", "CC(C)(C)C(=O)*"},
    {"caproate hexanoate", "CCCCCC(=O)*"},
    {"enanthate heptanoate", "CCCCCCC(=O)*"},
    {"caprylate octanoate", "CCCCCCCC(=O)*"},
    {"2ethylhexanoate", "CCCCC(CC)C(=O)*"},
    {"pelargonate nonanoate", "CCCCCCCCC(=O)*"},
    {"caprate decanoate", "CCCCCCCCCC(=O)*"},
    {"laurate dodecanoate", "CCCCCCCCCCCC(=O)*"},
    {"myristate tetradecanoate", "CCCCCCCCCCCCCC(=O)*"},
    {"palmitate hexadecanoate", "CCCCCCCCCCCCCCCC(=O)*"},
    {"stearate octadecanoate", "CCCCCCCCCCCCCCCCCC(=O)*"},
    {"oleate", "CCCCCCCC/C=C\\CCCCCCCC(=O)*"},
    {"linoleate", "CCCCC/C=C\\C/C=C\\CCCCCCCC(=O)*"},
    {"acrylate propenoate prop2enoate 2propenoate", "C=CC(=O)*"},
    {"methacrylate 2methylpropenoate 2methylprop2enoate 2methyl2propenoate", "C=C(C)C(=O)*"},
    {"crotonate", "C/C=C/C(=O)*"},
    {"benzoate", "c1ccccc1C(=O)*"},
    {"phenylacetate", "c1ccccc1CC(=O)*"},
    {"cinnamate", "c1ccccc1/C=C/C(=O)*"},
    {"salicylate 2hydroxybenzoate", "Oc1ccccc1C(=O)*"},
    {"lactate 2hydroxypropanoate", "CC(O)C(=O)*"},
    {"glycolate hydroxyacetate", "OCC(=O)*"},
    {"chloroacetate", "ClCC(=O)*"},
    {"dichloroacetate", "ClC(Cl)C(=O)*"},
    {"trichloroacetate", "ClC(Cl)(Cl)C(=O)*"},
    {"trifluoroacetate", "FC(F)(F)C(=O)*"},
    {"cyanoacetate", "N#CCC(=O)*"},
    {"acetoacetate 3oxobutanoate", "CC(=O)CC(=O)*"},
    {"pyruvate 2oxopropanoate", "CC(=O)C(=O)*"},
    {"levulinate 4oxopentanoate", "CC(=O)CCC(=O)*"},
    {"chloroformate", "ClC(=O)*"},
    {"carbamate", "NC(=O)*"},
};

/// Both acid groups bind the same alkyl.
constexpr Part kDiacids[] = {
    {"carbonate", "C(=O)(*)*"},
    {"oxalate ethanedioate", "C(=O)(*)C(=O)*"},
    {"malonate propanedioate", "C(=O)(*)CC(=O)*"},
    {"succinate butanedioate", "C(=O)(*)CCC(=O)*"},
    {"glutarate pentanedioate", "C(=O)(*)CCCC(=O)*"},
    {"adipate hexanedioate", "C(=O)(*)CCCCC(=O)*"},
    {"azelate nonanedioate", "C(=O)(*)CCCCCCCC(=O)*"},
    {"sebacate decanedioate", "C(=O)(*)CCCCCCCCC(=O)*"},
    {"maleate", "C(=O)(*)/C=C\\C(=O)*"},
    {"fumarate", "C(=O)(*)/C=C/C(=O)*"},
    {"phthalate", "C(=O)(*)c1ccccc1C(=O)*"},
    {"isophthalate", "C(=O)(*)c1cccc(c1)C(=O)*"},
    {"terephthalate", "C(=O)(*)c1ccc(cc1)C(=O)*"},
};

template <std::size_t n>
const Part* find(const Part (&parts)[n], std::string_view key) {
  for (const Part& part : parts) {
    std::string_view rest = part.names;
    while (!rest.empty()) {
      const std::size_t blank = rest.find(' ');
      if (rest.substr(0, blank) == key) return &part;
      rest = blank == std::string_view::npos ? std::string_view() : rest.substr(blank + 1);
    }
  }
  return nullptr;
}

std::string joined(const Part& acid, const Part& alkyl) {
  std::string smiles;
  for (const char c : acid.smiles) {
    if (c == '*') {
      smiles += "O";
      smiles += alkyl.smiles;
    } else {
      smiles += c;
    }
  }
  return smiles;
}

}  // namespace

std::optional<std::string> smiles_of_ester(std::string_view name) {
  while (!name.empty() && name.back() == ' ') name.remove_suffix(1);
  const std::size_t blank = name.rfind(' ');
  if (blank == std::string_view::npos) return std::nullopt;
  const std::string acid_key = name_key(name.substr(blank + 1)), alkyl_key = name_key(name.substr(0, blank));
  const Part* alkyl = find(kAlkyls, alkyl_key);
  if (alkyl != nullptr) {
    const Part* acid = find(kAcids, acid_key);
    return acid != nullptr ? std::optional<std::string>(joined(*acid, *alkyl)) : std::nullopt;
  }
  const Part* diacid = find(kDiacids, acid_key);
  if (diacid == nullptr) return std::nullopt;
  for (const std::string_view twice : {"di", "bis"}) {
    if (alkyl_key.substr(0, twice.size()) != twice) continue;
    if (const Part* both = find(kAlkyls, alkyl_key.substr(twice.size()))) return joined(*diacid, *both);
  }
  return std::nullopt;
}

}  // namespace heatledger::facts
