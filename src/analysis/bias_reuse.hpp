// The second half of the analysis, for callers that keep the operating point while only capacitors change.
#pragma once

#include <bandwright/analysis.hpp>

#include "analysis/operating_point.hpp"

namespace bandwright {

Analysis analyse_response(const Stage& stage, const Circuit<double>& circuit, const NominalBias& bias,
                          const GainDefinition& definition, ResponseModel model = ResponseModel::exact);

}  // namespace bandwright
