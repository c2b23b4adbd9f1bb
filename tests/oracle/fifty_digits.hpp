// The same network stamped and solved in fifty decimal digits: the judge of the long double solve, and of limits.
#pragma once

#include "network.hpp"

namespace oracle {

/// |v(output)| for 1 V on the driven wire, at a frequency in Hz.
Real magnitude_in_fifty_digits(const Network& network, int output, Real frequency);

}  // namespace oracle
