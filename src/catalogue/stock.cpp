// The user's own parts: read, checked one by one, then against each other.
#include <algorithm>
#include <bandwright/catalogue.hpp>
#include <cmath>
#include <functional>
#include <unordered_set>

#include "catalogue/stock_part.hpp"
#include "catalogue/stock_rows.hpp"

namespace bandwright {

namespace {

constexpr std::string_view kByteOrderMark = "\xEF\xBB\xBF";

constexpr std::size_t kMostReserved = 1 << 17;  // rows; a longer list grows as it must

std::size_t likely_rows(std::string_view text) {
  return std::min(static_cast<std::size_t>(std::count(text.begin(), text.end(), '\n')), kMostReserved);
}

bool is_json(std::string_view text) {
  const std::size_t first = text.find_first_not_of(" \t\r\n");
  return first != std::string_view::npos && (text[first] == '{' || text[first] == '[');
}

bool same_or_both_unknown(double a, double b) { return a == b || (std::isnan(a) && std::isnan(b)); }

struct SamePart {
  bool operator()(const StockPart* a, const StockPart* b) const {
    return a->kind == b->kind && a->value == b->value && a->type == b->type && a->tolerance == b->tolerance &&
           same_or_both_unknown(a->voltage_rating, b->voltage_rating) &&
           same_or_both_unknown(a->power_rating, b->power_rating) && a->family == b->family &&
           a->part_number == b->part_number;
  }
};

struct PartHash {
  std::size_t operator()(const StockPart* part) const {
    std::size_t hash = static_cast<std::size_t>(part->kind);
    const auto mix = [&](std::size_t more) { hash = hash * 31 + more; };
    for (const double number : {part->value, part->voltage_rating, part->power_rating})
      mix(std::hash<double>()(number));
    for (const std::string* text : {&part->type, &part->family, &part->part_number})
      mix(std::hash<std::string>()(*text));
    return hash;
  }
};

std::string in_short(const StockPart& part) {
  const std::string kind = word(part.kind);
  if (part.kind == PartKind::transistor) return kind + " " + part.type;
  const Dimension dimension = part.kind == PartKind::resistor ? Dimension::resistance : Dimension::capacitance;
  return kind + " " + format_quantity(part.value, dimension);
}

// Two rows of one part would have the stock count it twice, or once, as chance has it.
void refuse_doubles(const std::vector<StockPart>& parts, FaultList& faults) {
  std::unordered_set<const StockPart*, PartHash, SamePart> met(2 * parts.size());
  for (const StockPart& part : parts) {
    const auto [first, is_new] = met.insert(&part);
    if (is_new) continue;
    faults.add([&, other = *first]() -> Fault {
      return {part.where, in_short(part),
              "each part once, or with another rating or part number; the same stands in " + other->where, ""};
    });
  }
}

}  // namespace

Stock read_stock(std::string_view text, std::string_view name, const Catalogue& catalogue) {
  Stock stock{name.empty() ? "stock" : std::string(name), {}};
  stock.parts.reserve(likely_rows(text));
  FaultList faults(stock.name);
  StockPartReader reader(catalogue, faults);
  const auto take = [&](const StockRow& row) {
    if (auto part = reader.read(row)) stock.parts.push_back(std::move(*part));
  };
  if (text.starts_with(kByteOrderMark)) text.remove_prefix(kByteOrderMark.size());
  if (text.find('\0') != std::string_view::npos)
    faults.add([&]() -> Fault {
      return {stock.name, std::string(text.substr(0, 40)), "text: comma-separated values or JSON", ""};
    });
  else if (is_json(text))
    read_stock_json(text, faults, take);
  else
    read_stock_csv(text, faults, take);
  refuse_doubles(stock.parts, faults);
  faults.throw_if_any();
  return stock;
}

}  // namespace bandwright
