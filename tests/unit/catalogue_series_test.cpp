// Preferred-number series against print.
//
// Truth: the standard's numbers as they stand elsewhere. E3 to E24: a ceramic capacitor vendor's specification,
// complete. E96: a chip resistor maker's table of two-figure codes, its first 40 values. E192: 104 of the values of E24
// and E192 on a resistor maker's colour-code card (Vishay), 920 among them and no 919; complete against a public table
// of preferred numbers whose origin is unknown. All read through text copies; the tables of IEC 60063:2015 were not
// read themselves.
#include <array>
#include <bandwright/catalogue.hpp>
#include <cmath>
#include <numeric>
#include <set>

#include "catch.hpp"

using namespace bandwright;

namespace {

constexpr std::array<int, 24> kE24 = {10, 11, 12, 13, 15, 16, 18, 20, 22, 24, 27, 30,
                                      33, 36, 39, 43, 47, 51, 56, 62, 68, 75, 82, 91};
constexpr std::array<int, 192> kE192 = {
    100, 101, 102, 104, 105, 106, 107, 109, 110, 111, 113, 114, 115, 117, 118, 120, 121, 123, 124, 126, 127, 129,
    130, 132, 133, 135, 137, 138, 140, 142, 143, 145, 147, 149, 150, 152, 154, 156, 158, 160, 162, 164, 165, 167,
    169, 172, 174, 176, 178, 180, 182, 184, 187, 189, 191, 193, 196, 198, 200, 203, 205, 208, 210, 213, 215, 218,
    221, 223, 226, 229, 232, 234, 237, 240, 243, 246, 249, 252, 255, 258, 261, 264, 267, 271, 274, 277, 280, 284,
    287, 291, 294, 298, 301, 305, 309, 312, 316, 320, 324, 328, 332, 336, 340, 344, 348, 352, 357, 361, 365, 370,
    374, 379, 383, 388, 392, 397, 402, 407, 412, 417, 422, 427, 432, 437, 442, 448, 453, 459, 464, 470, 475, 481,
    487, 493, 499, 505, 511, 517, 523, 530, 536, 542, 549, 556, 562, 569, 576, 583, 590, 597, 604, 612, 619, 626,
    634, 642, 649, 657, 665, 673, 681, 690, 698, 706, 715, 723, 732, 741, 750, 759, 768, 777, 787, 796, 806, 816,
    825, 835, 845, 856, 866, 876, 887, 898, 909, 920, 931, 942, 953, 965, 976, 988};

// Counts and sums of the significant numbers (two figures to E24, three from E48), from the same lists.
struct Count {
  const char* name;
  std::size_t count;
  int sum;
};
constexpr std::array<Count, 7> kCounts = {{{"E3", 3, 79},
                                           {"E6", 6, 195},
                                           {"E12", 12, 429},
                                           {"E24", 24, 901},
                                           {"E48", 48, 18313},
                                           {"E96", 96, 37070},
                                           {"E192", 192, 74599}}};

std::vector<int> significant(const char* name) {
  const Series& s = *find_series(name);
  std::vector<int> numbers;
  for (const double x : decade_values(s)) {
    numbers.push_back(static_cast<int>(std::lround(x * (s.digits == 2 ? 10 : 100))));
  }
  return numbers;
}

template <std::size_t N>
std::vector<int> every(const std::array<int, N>& full, std::size_t step) {
  std::vector<int> taken;
  for (std::size_t i = 0; i < N; i += step) taken.push_back(full[i]);
  return taken;
}

}  // namespace

TEST_CASE("series have the published counts and sums") {
  for (const Count& row : kCounts) {
    INFO(row.name);
    const std::vector<int> numbers = significant(row.name);
    CHECK(numbers.size() == row.count);
    CHECK(std::accumulate(numbers.begin(), numbers.end(), 0) == row.sum);
  }
}

TEST_CASE("series have the published values") {
  CHECK(significant("E24") == every(kE24, 1));
  CHECK(significant("E12") == every(kE24, 2));
  CHECK(significant("E6") == every(kE24, 4));
  CHECK(significant("E3") == every(kE24, 8));
  CHECK(significant("E192") == every(kE192, 1));
  CHECK(significant("E96") == every(kE192, 2));
  CHECK(significant("E48") == every(kE192, 4));
}

TEST_CASE("E24 and E96 share six numbers, E24 and E192 eleven") {
  // IEC 60063 as printed in the lists above: 24 + 96 - 114 and 24 + 192 - 205.
  const auto together = [](const char* fine) {
    std::set<int> all;
    for (const int x : significant("E24")) all.insert(10 * x);
    for (const int x : significant(fine)) all.insert(x);
    return all.size();
  };
  CHECK(together("E96") == 114);
  CHECK(together("E192") == 205);
}

TEST_CASE("a value stands in a series in every decade, with floating noise and without") {
  constexpr double kNoise = 4e-16;  // one or two units in the last place: what a scaled decimal may carry
  for (const Series& s : series()) {
    for (int decade = -14; decade <= 9; ++decade) {
      for (const double x : decade_values(s)) {
        const double value = x * std::pow(10.0, decade);
        INFO(s.name << " " << value);
        CHECK(in_series(s, value));
        CHECK(in_series(s, value * (1 + kNoise)));
        CHECK(in_series(s, value * (1 - kNoise)));
        CHECK_FALSE(in_series(s, value * 1.0001));
        CHECK_FALSE(in_series(s, value * 0.9999));
      }
    }
  }
}

TEST_CASE("values outside every series") {
  for (const double value : {9.19e3, 2.6, 50.0, 4.85, 0.0, -47.0, double(NAN), double(INFINITY)}) {
    INFO(value);
    CHECK(coarsest_series(value) == nullptr);
  }
}

TEST_CASE("the coarsest series that holds a value") {
  const auto name = [](double value) { return coarsest_series(value)->name; };
  CHECK(name(2.2e-6) == "E3");
  CHECK(name(680e3) == "E6");
  CHECK(name(8.2e-9) == "E12");
  CHECK(name(9100) == "E24");
  CHECK(name(105) == "E48");
  CHECK(name(4.99e3) == "E96");
  CHECK(name(920) == "E192");
  CHECK(name(1e-9) == "E3");
  CHECK(find_series("E1") == nullptr);
  CHECK(find_series("E7") == nullptr);
}
