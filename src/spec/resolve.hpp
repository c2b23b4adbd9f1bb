// From what was said to what is meant: defaults, ends of conditions, limits of requirements, and the checks that look
// at more than one field.
#pragma once

#include "spec/statements.hpp"

namespace bandwright {

/// Supply and ambient, and the limit on the supply's height.
void resolve_conditions(Draft& draft, Statements& statements, bool allow_high_voltage);

/// Limits L and U of every requirement: an explicit min or max is the limit on its side; a tolerance t, given or (where
/// there is neither min nor max) the default, sets each side without one: L = target/(1 + t), U = target (1 + t);
/// "-a/+b": target (1 - a), target (1 + b).
void resolve_requirements(Draft& draft, Statements& statements, SpecUse use);

/// Rules of parts: defaults and contradictions.
void resolve_parts(Draft& draft, Statements& statements);

}  // namespace bandwright
