// Simulation of built units: yield, spread and capability.
#pragma once

#include <bandwright/assessment.hpp>

namespace bandwright {

/// Yield, spread of the figures (required ones and the band) and capability, into `assessment`. Histograms on request.
void simulate(const Spec& spec, Assessment& assessment, bool with_histograms);

/// Yield alone, of the same units, without solving a cutoff: |H| at a limit decides on which side of it the cutoff
/// lies.
Yield simulated_yield(const Spec& spec, const Population& population);

/// Whether the simulation may stop, how many units come next, and what has passed so far with its 95 % interval.
bool is_enough(const Spec& spec, const Yield& yield);
std::size_t next_block(const Spec& spec, const Yield& yield);
Yield yield_of(const Spec& spec, std::size_t units, std::size_t passed);

/// The least of (U - X50)/(X99.865 - X50), of values nearest U, and (X50 - L)/(X50 - X0.135), of values nearest L, at
/// most 2. Quantiles from 20,000 values on, else mean and 3 sigma. Uses its samples up.
double capability(const Requirement& requirement, const FigureInfo& figure, std::vector<double>& nearest_upper,
                  std::vector<double>& nearest_lower);

/// The k-th smallest of n values, k = ceil(n p), p in 100,000ths. Reorders.
double quantile(std::vector<double>& values, std::size_t hundred_thousandths);

}  // namespace bandwright
