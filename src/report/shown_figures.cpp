#include "report/shown_figures.hpp"

#include <fmt/format.h>

#include <cmath>

#include "units/constants.hpp"

namespace bandwright {

namespace {

// Shares are pure numbers that people read in per cent.
bool is_share(Figure figure) {
  return figure == Figure::emitter_voltage_share || figure == Figure::collector_emitter_share;
}

}  // namespace

std::string shown_key(const FigureInfo& figure) {
  const std::string key = figure.key;
  const bool plain = figure.dimension != Dimension::temperature || key.ends_with("_degc");
  return plain ? key : key + "_degc";
}

double shown_value(const Candidate& candidate, const FigureInfo& figure) {
  return shown_value(candidate.analysis.figures[index(figure.figure)], figure);
}

double shown_value(double value, const FigureInfo& figure) {
  return figure.dimension == Dimension::temperature ? value - kZeroCelsius : value;
}

std::string figure_text(double value, const FigureInfo& figure, int digits) {
  if (std::isnan(value)) return "-";
  if (figure.dimension == Dimension::gain && value > 0)
    return fmt::format("{} ({:.1f} dB)", format_quantity(value, Dimension::gain, digits), 20 * std::log10(value));
  if (is_share(figure.figure)) return fmt::format("{:.{}g} %", 100 * value, digits - 1);
  return format_quantity(value, figure.dimension, digits);
}

std::string figure_text(const Candidate& candidate, const FigureInfo& figure, int digits) {
  return figure_text(candidate.analysis.figures[index(figure.figure)], figure, digits);
}

std::string short_family(const std::string& family, Role role) {
  const std::string kind = info(role).kind == PartKind::resistor ? " resistor" : " capacitor";
  return family.ends_with(kind) ? family.substr(0, family.size() - kind.size()) : family;
}

std::string tolerance_text(const Tolerance& tolerance) {
  if (tolerance.below == tolerance.above) return fmt::format("±{:.4g} %", 100 * tolerance.above);
  return fmt::format("-{:.4g}/+{:.4g} %", 100 * tolerance.below, 100 * tolerance.above);
}

PartValues role_values(const std::vector<Part>& parts) {
  PartValues values{};
  for (const Part& part : parts) {
    double& value = values[index(part.role)];
    if (value == 0) {
      value = part.value;
    } else {
      value = paired_value(part.kind, part.connection, value, part.value);
    }
  }
  return values;
}

std::string order_reason(const DesignResult& result) {
  const Parts& parts = result.spec.parts;
  const std::string reason = info(result.ranked_by).reason;
  return parts.stock.empty() || parts.stock_only ? reason : reason + "; parts at hand before bought ones";
}

}  // namespace bandwright
