#include "sample_population.hpp"

namespace bandwright::test {

SampleDesign sample_design(const std::string& requirements, const std::string& more) {
  SampleDesign s;
  const std::string text = R"({"supply": {"nominal": "12 V", "tolerance": "5 %"}, "source": {"resistance": 600},
      "load": {"resistance": "10k", "capacitance": "220 pF"}, "stray": {"input": "3 pF", "output": "3 pF",
      "feedback": "0.3 pF"}, "requirements": )" +
                           requirements + more + "}";
  s.spec = read_spec(text, "sample", {}, SpecUse::check);
  s.device = derive_parameters(*built_in_catalogue().find_transistor("BC547B")).parameters;
  const PartValues values = {82e3, 22e3, 3.9e3, 62, 1.2e3, 4.7e-6, 1e-6, 100e-6, 2.7e-9};
  PartValues working{};
  for (const RoleInfo& r : roles()) {
    s.parts[index(r.role)] = resolve_value(built_in_catalogue(), s.spec, r.role, {values[index(r.role)]});
    working[index(r.role)] = s.parts[index(r.role)].working_value;
  }
  s.nominal = analyse({working, &s.device, surroundings(s.spec)}, gain_definition(s.spec));
  return s;
}

}  // namespace bandwright::test
