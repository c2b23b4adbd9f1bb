// Version: which bandwright this is.
//
//   std::cout << bandwright::version();  // "0.1.0"
#pragma once

namespace bandwright {

/// Major, minor and patch number, as in the CMake package and in the result document's "program".
const char* version();

}  // namespace bandwright
