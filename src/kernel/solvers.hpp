// One solver an instruction set, each in a file of its own that is compiled for it.
#pragma once

#include "kernel/unit_task.hpp"

namespace bandwright {

using Solver = void (*)(const UnitTask& task, const CauseScale* scales);

void solve_one_by_one(const UnitTask& task, const CauseScale* scales);
void solve_on_any_machine(const UnitTask& task, const CauseScale* scales);
void solve_by_avx2(const UnitTask& task, const CauseScale* scales);

/// False where the program was built for machines that never have these instructions.
extern const bool kBuiltForAvx2;

}  // namespace bandwright
