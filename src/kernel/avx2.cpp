// Units in lanes of four, compiled for AVX2. Nothing here may have a name that other files share: see Pack.
#include "kernel/solve_units.hpp"
#include "kernel/solvers.hpp"

namespace bandwright {

#ifdef __AVX2__

namespace {
struct Avx2 {};
}  // namespace

const bool kBuiltForAvx2 = true;
void solve_by_avx2(const UnitTask& task, const CauseScale* scales) { solve_units<Pack<4, Avx2>>(task, scales); }

#else

const bool kBuiltForAvx2 = false;
void solve_by_avx2(const UnitTask&, const CauseScale*) {}

#endif

}  // namespace bandwright
