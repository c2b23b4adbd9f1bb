#include <algorithm>
#include <bandwright/population.hpp>

#include "units/constants.hpp"

namespace bandwright {

PartValues values_at_work(const Population& p, double ambient) {
  PartValues values = p.printed;
  for (std::size_t i = 0; i < kRoleCount; ++i) {
    values[i] *= p.bias_factor[i];
    values[i] *= 1 - p.cold_loss[i] * std::max(kColdBegins - ambient, 0.0);
  }
  return values;
}

Stage nominal_stage(const Population& p, const OperatingCondition& condition) {
  Stage stage{values_at_work(p, condition.ambient), &p.device, p.around};
  stage.around.supply = condition.supply;
  stage.around.ambient = condition.ambient;
  return stage;
}

}  // namespace bandwright
