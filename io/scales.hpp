#pragma once

#include <string>
#include <vector>

namespace barwall::io {

/// The largest of 1, 2, 5 times a power of ten that is not above `value` > 0, to rounding.
double round_down_125(double value);
/// The smallest of 1, 2, 5 times a power of ten that is not below `value` > 0, to rounding.
double round_up_125(double value);

/// Round places (multiples of 1, 2 or 5 times a power of ten) from `low` to `high`, at most
/// about `count` of them, and the step between them.
struct RoundTicks {
  double step = 1.0;
  std::vector<double> places;
};
RoundTicks round_ticks(double low, double high, int count);

/// A number without trailing zeros, with a true minus sign, written in full: "0.05", "2000".
std::string plain_number(double value);

/// A logarithmic scale from `low` to `high`, both 1, 2 or 5 times a power of ten.
struct LogScale {
  double low = 1.0;
  double high = 10.0;

  /// 0 at low, 1 at high, beyond for values beyond.
  double position(double value) const;
  /// The value at a position.
  double value(double position) const;
};

/// The scale that holds all but the smallest hundredth and the largest two thousandths of the
/// values, one to four decades long; values that are not positive are left out.
LogScale log_scale_of(std::vector<float> values);

/// 1, 2 and 5 times every power of ten on the scale.
struct ScaleMark {
  double value = 0.0;
  bool decade = false;
};
std::vector<ScaleMark> scale_marks(const LogScale& scale);

/// A unit with a metric prefix, as UTF-8: 1e-3 and "mT".
struct PrefixedUnit {
  double size = 1.0;
  std::string name;
};

/// The prefix in which `value` is from 1 to 1000, between nano and mega.
PrefixedUnit prefixed_unit(double value, const std::string& unit);

}  // namespace barwall::io
