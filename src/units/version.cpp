#include <bandwright/version.hpp>

namespace bandwright {

const char* version() { return BANDWRIGHT_VERSION; }

}  // namespace bandwright
