#include "core/uncertainty/covariance.hpp"

namespace heatledger::uncertainty {

double covariance(const Quantity& a, const Quantity& b) {
  double sum = 0;
  auto i = a.parts().begin();
  auto j = b.parts().begin();
  while (i != a.parts().end() && j != b.parts().end()) {
    if (i->source < j->source) {
      ++i;
    } else if (j->source < i->source) {
      ++j;
    } else {
      sum += i++->u95 * j++->u95;
    }
  }
  return sum;
}

}  // namespace heatledger::uncertainty
