// What two quantities have in common.
#pragma once

#include "core/uncertainty/quantity.hpp"

namespace heatledger::uncertainty {

/// Σ over the sources that both depend on of the product of their parts: the covariance of the two in units
/// of 95 % half widths, u95² when both are the same.
double covariance(const Quantity& a, const Quantity& b);

}  // namespace heatledger::uncertainty
