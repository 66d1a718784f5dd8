#include "core/molecule/valence.hpp"

namespace heatledger::molecule {
namespace {

// Column of the periodic table for hydrogen and the p-block (13 to 18), 0 elsewhere: metals have no normal
// valence.
int column(int element) {
  if (element == 1) return 17;  // one short of a closed shell, as the halogens are
  if (element == 2) return 18;
  constexpr int first_of_row[] = {5, 13, 31, 49, 81};
  for (const int first : first_of_row) {
    if (element >= first && element <= first + 5) return 13 + element - first;
  }
  return 0;
}

int smallest_at_least(int bonded, int first, int step, int last) {
  for (int valence = first; valence <= last; valence += step) {
    if (valence >= bonded) return valence;
  }
  return bonded;
}

}  // namespace

int filled_valence(int element, int charge, int bonded) {
  const int own = column(element);
  if (own == 0) return bonded;
  if (element == 1 && charge > 0) return bonded;  // a bare proton
  const int isoelectronic = own - charge;
  const bool expands = element > 10;
  switch (isoelectronic) {
    case 12:
      return smallest_at_least(bonded, 2, 2, 2);
    case 13:
      return smallest_at_least(bonded, 3, 2, 3);
    case 14:
      return smallest_at_least(bonded, 4, 2, 4);
    case 15:
      return smallest_at_least(bonded, 3, 2, expands || (element == 7 && charge == 0) ? 5 : 3);
    case 16:
      return smallest_at_least(bonded, 2, 2, expands ? 6 : 2);
    case 17:
      return smallest_at_least(bonded, 1, 2, expands ? 7 : 1);
    default:
      return bonded;
  }
}

int organic_valence(int element, int bonded) {
  switch (element) {
    case 5:
      return smallest_at_least(bonded, 3, 2, 3);
    case 6:
      return smallest_at_least(bonded, 4, 2, 4);
    case 7:
    case 15:
      return smallest_at_least(bonded, 3, 2, 5);
    case 8:
      return smallest_at_least(bonded, 2, 2, 2);
    case 16:
      return smallest_at_least(bonded, 2, 2, 6);
    case 9:
    case 17:
    case 35:
    case 53:
      return smallest_at_least(bonded, 1, 2, 1);
    default:
      return bonded;
  }
}

}  // namespace heatledger::molecule
