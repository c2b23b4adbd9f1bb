#include <algorithm>
#include <bandwright/figure.hpp>

namespace bandwright {

namespace {

using F = Figure;
using U = FigureUse;
using D = Dimension;

// Default tolerances: 1 dB, 20 % or 10 %; ours.
constexpr double kOneDecibel = 0.12201845430196344;  // 10^(1/20) - 1
constexpr double kWide = 0.20;
constexpr double kUsual = 0.10;
constexpr double kNone = 0;

constexpr const char* kOurs = "ours";
constexpr const char* kPractice = "common practice, no source";
constexpr const char* kNoise =
    "Gray, Hurst, Lewis, Meyer, Analysis and Design of Analog Integrated Circuits; Motchenbacher, Connelly, Low-Noise "
    "Electronic System Design, 1993";
constexpr const char* kDistortion =
    "Gray, Hurst, Lewis, Meyer, Analysis and Design of Analog Integrated Circuits; Sansen, Distortion in elementary "
    "transistor circuits, IEEE Trans. CAS-II 46(3), 1999";
constexpr const char* kStability =
    "Millman, Halkias, Integrated Electronics, ch. 9 (book, example; read through a transcription, book not opened)";

// clang-format off
constexpr std::array<FigureInfo, kFigureCount> kFigures = {{
    {F::gain, U::required, D::gain, kOneDecibel, true, "gain", "A", "gain",
     "magnitude from the source's open-circuit EMF to the loaded output, at the peak of the response", kOurs},
    {F::lower_cutoff, U::required, D::frequency, kWide, true, "lower_cutoff", "fL", "lower cutoff",
     "nearest frequency below where the response falls to gain/sqrt(2) (half power, -3.0103 dB)", kPractice},
    {F::upper_cutoff, U::required, D::frequency, kWide, true, "upper_cutoff", "fH", "upper cutoff",
     "nearest frequency above where the response falls to gain/sqrt(2) (half power, -3.0103 dB)", kPractice},
    {F::bandwidth, U::required, D::frequency, kWide, true, "bandwidth", "B", "bandwidth",
     "upper cutoff less lower cutoff", kPractice},
    {F::input_resistance, U::required, D::resistance, kWide, true, "input_resistance", "Rin", "input resistance",
     "of the resistive midband network, right from the node between RS and Cin, load connected", kOurs},
    {F::output_resistance, U::required, D::resistance, kWide, true, "output_resistance", "Rout", "output resistance",
     "of the resistive midband network, into the output with the load removed and RS in place of the source", kOurs},
    {F::output_swing, U::required, D::voltage, kUsual, true, "output_swing", "vo", "output swing",
     "peak at the load before clipping, the smaller of the two sides; says nothing of distortion", kOurs},
    {F::input_overload, U::required, D::voltage, kUsual, true, "input_overload", "vi", "input overload",
     "largest peak input before clipping: output swing over gain", kOurs},
    {F::supply_current, U::required, D::current, kUsual, true, "supply_current", "ICC", "supply current",
     "collector current and divider current, IC + (VCC - VB)/R1", kOurs},
    {F::collector_current, U::required, D::current, kUsual, true, "collector_current", "IC", "collector current",
     "at the operating point, at the junction temperature", kOurs},
    {F::collector_emitter_voltage, U::required, D::voltage, kUsual, true, "collector_emitter_voltage", "VCE",
     "collector-emitter voltage", "at the operating point, magnitude", kOurs},
    {F::dissipation, U::required, D::power, kUsual, true, "dissipation", "P", "dissipation",
     "of the transistor at the operating point, VCE IC + VBE IB", kOurs},

    {F::input_noise_density, U::reserved, D::noise_density, kUsual, true, "input_noise_density", "en",
     "input noise density", "output noise density over gain, at sqrt(fL fH)", kNoise},
    {F::output_noise, U::reserved, D::voltage, kUsual, true, "output_noise", "vno", "output noise",
     "rms, output noise density integrated from fL to fH", kNoise},
    {F::noise_figure, U::reserved, D::decibel, kOneDecibel, false, "noise_figure", "NF", "noise figure",
     "noise power over that of RS alone at 290 K", kNoise},
    {F::second_harmonic, U::reserved, D::fraction, kUsual, true, "second_harmonic", "HD2", "second harmonic",
     "over the fundamental at a stated output level, midband, first term of the power series", kDistortion},
    {F::third_harmonic, U::reserved, D::fraction, kUsual, true, "third_harmonic", "HD3", "third harmonic",
     "over the fundamental at a stated output level, midband, first term of the power series", kDistortion},
    {F::settling_time, U::reserved, D::time, kWide, true, "settling_time", "ts", "settling time",
     "from power-up until the bias stays within 1 %", kOurs},
    {F::supply_rejection, U::reserved, D::decibel, kUsual, false, "supply_rejection", "PSR", "supply rejection",
     "gain over the gain from the supply rail to the output", kOurs},
    {F::cost, U::required, D::money, kUsual, true, "cost", "cost", "cost",
     "sum of the unit costs of all parts of one board", kOurs},

    {F::base_voltage, U::reported, D::voltage, kNone, false, "base_voltage", "VB", "base voltage",
     "base to 0 V at the operating point, with sign", kOurs},
    {F::emitter_voltage, U::reported, D::voltage, kNone, false, "emitter_voltage", "VE", "emitter voltage",
     "emitter to 0 V at the operating point, with sign", kOurs},
    {F::collector_voltage, U::reported, D::voltage, kNone, false, "collector_voltage", "VC", "collector voltage",
     "collector to 0 V at the operating point, with sign", kOurs},
    {F::junction_temperature, U::reported, D::temperature, kNone, false, "junction_temperature_degc", "Tj",
     "junction temperature", "ambient and the rise theta_JA (VCE IC + VBE IB) of the solution at the ambient", kOurs},
    {F::midband_gain, U::reported, D::gain, kNone, true, "midband_gain", "Am", "idealised midband gain",
     "of the resistive network: coupling and bypass capacitors shorted, all other capacitors open", kPractice},
    {F::swing_to_cutoff, U::reported, D::voltage, kNone, true, "swing_to_cutoff", "vo1", "swing to cut-off",
     "peak at the load until the collector current ends, IC R_ac with R_ac = RC||RL", kOurs},
    {F::swing_to_saturation, U::reported, D::voltage, kNone, true, "swing_to_saturation", "vo2", "swing to saturation",
     "peak at the load until VCE(sat), (VCE - VCE(sat)) R_ac/(R_ac + RE_ac)", kOurs},
    {F::stability_factor, U::reported, D::fraction, kNone, true, "stability_factor", "S", "stability factor",
     "dIC/dICBO at constant VBE, (1 + beta)/(1 + beta RE/(RE + Rth))", kStability},
    {F::divider_current_ratio, U::reported, D::fraction, kNone, true, "divider_current_ratio", "ID/IB",
     "divider current over base current", "(VB/R2)/IB; about 10 is usual", kPractice},
    {F::emitter_voltage_share, U::reported, D::fraction, kNone, true, "emitter_voltage_share", "VE/VCC",
     "emitter voltage over supply", "VE/VCC; about a tenth is usual", kPractice},
    {F::collector_emitter_share, U::reported, D::fraction, kNone, true, "collector_emitter_share", "VCE/VCC",
     "collector-emitter voltage over supply", "VCE/VCC; about a half is usual", kPractice},
}};
// clang-format on

constexpr bool in_enum_order() {
  for (std::size_t i = 0; i < kFigures.size(); ++i)
    if (index(kFigures[i].figure) != i) return false;
  return true;
}
static_assert(in_enum_order());

}  // namespace

const std::array<FigureInfo, kFigureCount>& figures() { return kFigures; }

const FigureInfo& info(Figure figure) { return kFigures[index(figure)]; }

std::optional<Figure> find_figure(std::string_view key) {
  const auto found =
      std::find_if(kFigures.begin(), kFigures.end(), [&](const FigureInfo& row) { return key == row.key; });
  if (found == kFigures.end()) return std::nullopt;
  return found->figure;
}

}  // namespace bandwright
