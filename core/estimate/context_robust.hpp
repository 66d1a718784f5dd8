// Weights of the table's rows: how far each fits the others. The shipped weights stand in the table; here is
// how they are come by.
#pragma once

#include <vector>

#include "core/estimate/context_table.hpp"

namespace heatledger::estimate {

/// Weights by expectation-maximisation for errors that follow Student's t instead of the normal law: a row
/// whose figure lies far off, given its stated error, counts for less; none counts for more than its stated
/// error. With several right-hand sides the squared misfits are averaged.
/// @param figures  one fit's figures; their own weights are not used
/// @param rounds   refits; six settle the weights to about 1e-3
/// @return         one weight per figure, 0 < w <= 1
/// @source K. L. Lange, R. J. A. Little, J. M. G. Taylor, J. Am. Stat. Assoc. 84 (1989) 881
std::vector<double> robust_weights(FitKind kind, const std::vector<TrainingFigure>& figures,
                                   const std::vector<double>& temperatures, int rounds,
                                   const MoleculeSource& molecule = training_molecule);

}  // namespace heatledger::estimate
