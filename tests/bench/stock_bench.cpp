// Time of reading a stock of 100,000 rows. Figures belong to the machine they were taken on.
#include <benchmark/benchmark.h>

#include <bandwright/catalogue.hpp>
#include <string>

#include "catalogue/csv_reader.hpp"

using namespace bandwright;

namespace {

constexpr int kRows = 100000;

std::string row(int i, double number) {
  const std::string value = std::to_string(number);
  const std::string cells =
      std::to_string(i % 500) + ",0." + std::to_string(100 + i % 900) + ",PART-" + std::to_string(i);
  if (i % 4 == 3) return "capacitor," + value + " nF,10 %,63 V,film," + cells + ",\"shelf 3, left\"\n";
  return "resistor," + value + "k,1 %,0.25 W 250 V,metal-film," + cells + ",\n";
}

/// Every cell filled, every row another part.
const std::string& large_stock() {
  static const std::string kText = [] {
    const auto numbers = decade_values(*find_series("E96"));
    std::string text = "kind,value,tolerance,rating,family,quantity,unit_cost,part_number,note\n";
    for (int i = 0; i < kRows; ++i) text += row(i, numbers[static_cast<std::size_t>(i) % numbers.size()]);
    return text;
  }();
  return kText;
}

void read_stock_of_100000_rows(benchmark::State& state) {
  const std::string& text = large_stock();
  for (auto _ : state) benchmark::DoNotOptimize(read_stock(text, "drawer.csv", built_in_catalogue()).parts.size());
  state.SetItemsProcessed(state.iterations() * kRows);
}
BENCHMARK(read_stock_of_100000_rows)->Unit(benchmark::kMillisecond);

void read_csv_of_100000_rows(benchmark::State& state) {
  const std::string& text = large_stock();
  for (auto _ : state) {
    CsvReader reader(text);
    std::vector<CsvField> record;
    while (reader.next(record)) benchmark::DoNotOptimize(record.size());
  }
  state.SetItemsProcessed(state.iterations() * kRows);
  state.SetBytesProcessed(state.iterations() * static_cast<std::int64_t>(text.size()));
}
BENCHMARK(read_csv_of_100000_rows)->Unit(benchmark::kMillisecond);

}  // namespace
