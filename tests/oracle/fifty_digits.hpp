// The same network stamped and solved in fifty decimal digits: the judge where long double and the library part.
#pragma once

#include "network.hpp"

namespace oracle {

/// |v(output)| for 1 V on the driven wire, at a frequency in Hz.
Real magnitude_in_fifty_digits(const Network& network, int output, Real frequency);

}  // namespace oracle
