// Writers give the same bytes in a locale with a decimal comma and grouped thousands.
#include <bandwright/report.hpp>
#include <locale>

#include "catch.hpp"
#include "sample_bill.hpp"
#include "sample_result.hpp"

using namespace bandwright;

namespace {

struct CommaNumbers : std::numpunct<char> {
  char do_decimal_point() const override { return ','; }
  char do_thousands_sep() const override { return '.'; }
  std::string do_grouping() const override { return "\3"; }
};

// The global locale is changed while it lives.
class CommaLocale {
public:
  CommaLocale() : before_(std::locale::global(std::locale(std::locale(), new CommaNumbers))) {}
  ~CommaLocale() { std::locale::global(before_); }
  CommaLocale(const CommaLocale&) = delete;
  CommaLocale& operator=(const CommaLocale&) = delete;

private:
  std::locale before_;
};

std::string all_writers() {
  const DesignResult result = test::sample_result();
  const Bill bill = test::sample_bill();
  return write_bill_table({bill, std::nullopt}) + write_bill_json({bill, std::nullopt}) + write_bill_csv(bill) +
         write_table(result) + write_json(result) + write_csv(result) + write_catalogue(built_in_catalogue()) +
         write_transistor(built_in_catalogue(), built_in_catalogue().transistors.front()) +
         write_series(*find_series("E24"));
}

}  // namespace

TEST_CASE("a decimal comma of the locale reaches no writer") {
  const std::string before = all_writers();
  const CommaLocale comma;
  CHECK(all_writers() == before);
}
