// Units one by one, and in the lanes that every machine has.
#include "kernel/solve_units.hpp"
#include "kernel/solvers.hpp"

namespace bandwright {

void solve_one_by_one(const UnitTask& task, const CauseScale* scales) { solve_units<double>(task, scales); }

void solve_on_any_machine(const UnitTask& task, const CauseScale* scales) { solve_units<Pack<2>>(task, scales); }

}  // namespace bandwright
