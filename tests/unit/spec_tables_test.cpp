// Roles, figures and options: the tables hold together.
#include <algorithm>
#include <bandwright/cause.hpp>
#include <bandwright/figure.hpp>
#include <bandwright/role.hpp>
#include <bandwright/spec.hpp>
#include <cmath>
#include <set>
#include <string>

#include "catch.hpp"

using namespace bandwright;

TEST_CASE("roles are found by key and by designator") {
  std::set<std::string> names;
  for (const RoleInfo& row : roles()) {
    CHECK(find_role(row.key) == row.role);
    CHECK(find_role(row.designator) == row.role);
    CHECK(&info(row.role) == &row);
    names.insert({row.key, row.designator});
  }
  CHECK(names.size() == 2 * kRoleCount);
  CHECK_FALSE(find_role("R9"));
  CHECK_FALSE(find_role(""));
}

TEST_CASE("causes stand in the order of the enum, each with its own key and symbol; the roles come first") {
  std::set<std::string> names;
  for (std::size_t i = 0; i < kCauseCount; ++i) {
    const CauseInfo& row = causes()[i];
    INFO(row.key);
    CHECK(index(row.cause) == i);
    CHECK(&info(row.cause) == &row);
    CHECK(find_cause(row.key) == row.cause);
    CHECK(find_cause(row.symbol) == row.cause);
    names.insert({row.key, row.symbol});
  }
  CHECK(names.size() == 2 * kCauseCount);
  for (const RoleInfo& role : roles()) {
    const CauseInfo& row = info(cause_of(role.role));
    CHECK(std::string(row.key) == role.key);
    CHECK(std::string(row.symbol) == role.designator);
    CHECK(row.kind == CauseKind::part);
  }
  CHECK_FALSE(find_cause("temperature_coefficients"));
  CHECK_FALSE(find_cause(""));
}

TEST_CASE("the parts that a divider-biased stage cannot do without are never absent") {
  for (const Role role :
       {Role::upper_divider, Role::lower_divider, Role::collector, Role::input_coupling, Role::output_coupling})
    CHECK_FALSE(info(role).may_be_absent);
  for (const Role role : {Role::emitter, Role::emitter_bypassed, Role::bypass, Role::shunt})
    CHECK(info(role).may_be_absent);
}

TEST_CASE("every figure has its row, its own key, and a definition with a source") {
  std::set<std::string> keys;
  for (const FigureInfo& row : figures()) {
    INFO(row.key);
    CHECK(find_figure(row.key) == row.figure);
    CHECK(&info(row.figure) == &row);
    CHECK(keys.insert(row.key).second);
    for (const char* text : {row.symbol, row.label, row.definition, row.source}) CHECK(std::string(text).size() > 0);
    CHECK((row.default_tolerance > 0) == (row.use != FigureUse::reported));
  }
  CHECK_FALSE(find_figure("gian"));
  CHECK(std::string(info(Figure::junction_temperature).key) == "junction_temperature_degc");
}

TEST_CASE("default tolerances are those of the format") {
  CHECK(info(Figure::gain).default_tolerance == 0.122018454301963435591);  // 1 dB: 10^(1/20) - 1, computed to 40 digits
  CHECK(info(Figure::noise_figure).default_tolerance == info(Figure::gain).default_tolerance);
  for (const Figure figure : {Figure::lower_cutoff, Figure::upper_cutoff, Figure::bandwidth, Figure::input_resistance,
                              Figure::output_resistance, Figure::settling_time})
    CHECK(info(figure).default_tolerance == 0.2);
  for (const Figure figure : {Figure::output_swing, Figure::input_overload, Figure::supply_current,
                              Figure::collector_current, Figure::collector_emitter_voltage, Figure::dissipation})
    CHECK(info(figure).default_tolerance == 0.1);
}

TEST_CASE("options have one name each, and every required figure has its four") {
  std::set<std::string> options;
  for (const OptionKey& key : spec_options()) {
    INFO(key.option);
    CHECK(options.insert(key.option).second);
    CHECK(key.option.find_first_not_of("abcdefghijklmnopqrstuvwxyz-") == std::string::npos);
    CHECK_FALSE(key.help.empty());
    CHECK(key.help.find('\n') == std::string::npos);
  }
  for (const FigureInfo& figure : figures()) {
    std::string option = figure.key;
    std::replace(option.begin(), option.end(), '_', '-');
    for (const char* end : {"", "-tolerance", "-min", "-max"})
      CHECK(options.count(option + end) == (figure.use == FigureUse::required ? 1 : 0));
  }
  for (const char* option : {"supply", "supply-tolerance", "source-resistance", "load-resistance", "ambient-min",
                             "gain-from", "gain-at", "resistors-series", "devices", "pinned", "ranges", "seed",
                             "assess-units", "assess-yield", "assess-interval", "assess-distribution", "assess-causes"})
    CHECK(options.count(option) == 1);
}
