// Whether the stock has enough of the parts of a design.
#include <algorithm>

#include "alternates_trial.hpp"

namespace bandwright {

namespace {

/// How often one board takes a part of the stock.
long uses_of(const OfferedParts& parts, const StockPart* own) {
  long uses = 0;
  for (const OfferedValue& part : parts) {
    if (part.connection == Connection::single)
      uses += part.stock == own;
    else
      for (const PairedPart& half : part.pair) uses += half.stock == own;
  }
  return uses;
}

std::vector<const StockPart*> stock_of(const OfferedParts& parts) {
  std::vector<const StockPart*> list;
  const auto add = [&](const StockPart* own) {
    if (own != nullptr && own->quantity && std::find(list.begin(), list.end(), own) == list.end()) list.push_back(own);
  };
  for (const OfferedValue& part : parts) {
    if (part.connection == Connection::single)
      add(part.stock);
    else
      for (const PairedPart& half : part.pair) add(half.stock);
  }
  return list;
}

}  // namespace

std::string shortage(const Spec& spec, const OfferedParts& parts) {
  std::string text;
  for (const StockPart* own : stock_of(parts)) {
    const long needed = uses_of(parts, own) * spec.parts.boards;
    const Dimension dimension = own->kind == PartKind::resistor ? Dimension::resistance : Dimension::capacitance;
    if (needed > *own->quantity)
      text += std::string(text.empty() ? "" : "; ") + "the stock holds " + std::to_string(*own->quantity) + " of " +
              format_quantity(own->value, dimension) + ", " + std::to_string(needed) + " are needed";
  }
  return text;
}

}  // namespace bandwright
