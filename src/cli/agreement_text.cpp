#include "cli/agreement_text.hpp"

#include <fmt/format.h>

namespace bandwright::cli {

std::string agreement_text(const Agreement& agreement, const std::string& name, int rank) {
  const std::string head = fmt::format("Candidate {} of {}: ", rank, name);
  const std::string most = fmt::format("largest relative difference {:.2g}", agreement.largest);
  if (agreement.differing.empty())
    return head + fmt::format("all {} figures recomputed agree with the file, {}.", agreement.compared, most);
  std::string names;
  for (const Figure figure : agreement.differing) {
    if (!names.empty()) names += ", ";
    names += info(figure).label;
  }
  return head + fmt::format("{} of {} figures recomputed differ from the file ({}), {} in {}.",
                            agreement.differing.size(), agreement.compared, names, most, info(agreement.worst).label);
}

}  // namespace bandwright::cli
