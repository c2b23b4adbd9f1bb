// Preferred numbers of IEC 60063: 10^(i/n) rounded, with the standard's exceptions.
#include <algorithm>
#include <array>
#include <bandwright/catalogue.hpp>
#include <cmath>

namespace bandwright {

namespace {

// Where the standard departs from rounding. E3, E6 and E12 take every eighth, fourth and second value of E24.
struct Exception {
  int number;  // the series in which `index` counts
  int index;
  int value;
};
constexpr std::array<Exception, 9> kExceptions = {{{24, 10, 27},
                                                   {24, 11, 30},
                                                   {24, 12, 33},
                                                   {24, 13, 36},
                                                   {24, 14, 39},
                                                   {24, 15, 43},
                                                   {24, 16, 47},
                                                   {24, 22, 82},
                                                   {192, 185, 920}}};

// Numbers that stand for the same printed value differ by less than this: the noise of a few operations.
constexpr double kFloatingNoise = 1e-9;

int full_series(const Series& series) { return series.digits == 2 ? 24 : 192; }

int significant(const Series& series, int index) {
  const int full = full_series(series);
  const int full_index = index * (full / series.number);
  for (const Exception& e : kExceptions) {
    if (e.number == full && e.index == full_index) return e.value;
  }
  const double scale = series.digits == 2 ? 10 : 100;
  return static_cast<int>(std::lround(scale * std::pow(10.0, static_cast<double>(full_index) / full)));
}

std::vector<int> significant_numbers(const Series& series) {
  std::vector<int> numbers;
  for (int i = 0; i < series.number; ++i) numbers.push_back(significant(series, i));
  return numbers;
}

// The numbers of each series, computed once.
const std::vector<int>& numbers_of(const Series& wanted) {
  static const std::vector<std::vector<int>> all = [] {
    std::vector<std::vector<int>> lists;
    for (const Series& s : series()) lists.push_back(significant_numbers(s));
    return lists;
  }();
  for (std::size_t i = 0; i < all.size(); ++i) {
    if (series()[i].number == wanted.number) return all[i];
  }
  static const std::vector<int> none;
  return none;
}

}  // namespace

const std::vector<Series>& series() {
  static const std::vector<Series> all = {{"E3", 3, 2},   {"E6", 6, 2},   {"E12", 12, 2},  {"E24", 24, 2},
                                          {"E48", 48, 3}, {"E96", 96, 3}, {"E192", 192, 3}};
  return all;
}

const Series* find_series(std::string_view name) {
  for (const Series& s : series()) {
    if (s.name == name) return &s;
  }
  return nullptr;
}

std::vector<double> decade_values(const Series& series) {
  std::vector<double> values;
  for (const int number : numbers_of(series)) values.push_back(number / (series.digits == 2 ? 10.0 : 100.0));
  return values;
}

bool in_series(const Series& series, double value) {
  if (!(value > 0) || !std::isfinite(value)) return false;
  const double lowest = series.digits == 2 ? 10 : 100;
  const double decade = std::floor(std::log10(value) + kFloatingNoise);
  const double scaled = value / std::pow(10.0, decade) * lowest;
  double nearest = std::round(scaled);
  if (std::fabs(scaled - nearest) > kFloatingNoise * scaled) return false;
  if (nearest >= 10 * lowest) nearest /= 10;
  const std::vector<int>& numbers = numbers_of(series);
  return std::binary_search(numbers.begin(), numbers.end(), static_cast<int>(nearest));
}

const Series* coarsest_series(double value) {
  for (const Series& s : series()) {
    if (in_series(s, value)) return &s;
  }
  return nullptr;
}

}  // namespace bandwright
