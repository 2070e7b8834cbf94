#include "io/scales.hpp"

#include <fmt/format.h>

#include <algorithm>
#include <array>
#include <cmath>

namespace barwall::io {
namespace {

constexpr double rounding = 1e-9;
constexpr std::array<double, 4> steps = {1.0, 2.0, 5.0, 10.0};

/// 10^n: exact for the whole powers that a double holds.
double power_of_ten(int n) {
  return n >= 0 ? std::pow(10.0, n) : 1.0 / std::pow(10.0, -n);
}

int decade_of(double value) {
  const int n = static_cast<int>(std::floor(std::log10(value)));
  return value * (1.0 + rounding) >= power_of_ten(n + 1) ? n + 1 : n;
}

/// m times 10^n, correctly rounded for small powers.
double times_power(double m, int n) {
  return n >= 0 ? m * power_of_ten(n) : m / power_of_ten(-n);
}

}  // namespace

double round_down_125(double value) {
  const int n = decade_of(value);
  double best = times_power(1.0, n);
  for (double m : steps) {
    const double candidate = times_power(m, n);
    if (candidate <= value * (1.0 + rounding)) best = candidate;
  }
  return best;
}

double round_up_125(double value) {
  const int n = decade_of(value);
  for (double m : steps) {
    const double candidate = times_power(m, n);
    if (candidate >= value * (1.0 - rounding)) return candidate;
  }
  return times_power(1.0, n + 1);
}

RoundTicks round_ticks(double low, double high, int count) {
  RoundTicks ticks;
  ticks.step = round_up_125((high - low) / std::max(1, count));
  const double slack = rounding * (high - low);
  const double first = std::ceil((low - slack) / ticks.step);
  const double last = std::floor((high + slack) / ticks.step);
  for (double k = first; k <= last; k += 1.0) ticks.places.push_back(k * ticks.step);
  return ticks;
}

std::string plain_number(double value) {
  std::string text = fmt::format("{:.10g}", value);
  if (text.find('e') != std::string::npos) {
    const int decimals = std::clamp(9 - decade_of(std::abs(value)), 0, 20);
    text = fmt::format("{:.{}f}", value, decimals);
    if (text.find('.') != std::string::npos) {
      text.erase(text.find_last_not_of('0') + 1);
      if (text.back() == '.') text.pop_back();
    }
  }
  if (text == "-0") return "0";
  if (text[0] == '-') text.replace(0, 1, "\u2212");
  return text;
}

double LogScale::position(double value_in) const {
  return std::log(value_in / low) / std::log(high / low);
}

double LogScale::value(double at) const {
  return low * std::pow(high / low, at);
}

LogScale log_scale_of(std::vector<float> values) {
  std::erase_if(values, [](float v) { return !(v > 0.0f) || !std::isfinite(v); });
  if (values.empty()) return {};
  const auto exceeded_by = [&values](double share) {
    const auto k =
        static_cast<std::ptrdiff_t>((1.0 - share) * static_cast<double>(values.size() - 1));
    std::nth_element(values.begin(), values.begin() + k, values.end());
    return static_cast<double>(values[static_cast<std::size_t>(k)]);
  };
  LogScale scale;
  scale.high = round_up_125(exceeded_by(0.002));
  scale.low = round_down_125(exceeded_by(0.99));
  scale.low =
      std::clamp(scale.low, round_up_125(scale.high * 1e-4), round_down_125(scale.high * 0.1));
  return scale;
}

std::vector<ScaleMark> scale_marks(const LogScale& scale) {
  std::vector<ScaleMark> marks;
  const double end = scale.high * (1.0 + rounding);
  for (int n = decade_of(scale.low); times_power(1.0, n) <= end; ++n) {
    for (double m : {1.0, 2.0, 5.0}) {
      const double value = times_power(m, n);
      if (value >= scale.low * (1.0 - rounding) && value <= end) marks.push_back({value, m == 1.0});
    }
  }
  return marks;
}

PrefixedUnit prefixed_unit(double value, const std::string& unit) {
  static const std::array<PrefixedUnit, 6> prefixes = {
      {{1e6, "M"}, {1e3, "k"}, {1.0, ""}, {1e-3, "m"}, {1e-6, "\u00b5"}, {1e-9, "n"}}};
  for (const PrefixedUnit& prefix : prefixes) {
    if (std::abs(value) >= prefix.size * (1.0 - rounding)) return {prefix.size, prefix.name + unit};
  }
  return value == 0.0 || !std::isfinite(value) ? PrefixedUnit{1.0, unit}
                                               : PrefixedUnit{1e-9, "n" + unit};
}

}  // namespace barwall::io
