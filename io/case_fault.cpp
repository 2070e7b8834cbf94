#include "io/case_fault.hpp"

#include <fmt/format.h>

#include <algorithm>
#include <cmath>
#include <cstddef>
#include <cstdint>
#include <numbers>
#include <string>
#include <utility>
#include <variant>
#include <vector>

#include "io/nearest_name.hpp"

namespace barwall::io {

namespace {

constexpr double largest_ka = 1e6;
constexpr Allowed any_ka{0.0, largest_ka, false, " kA"};
constexpr Allowed any_r_over_x{0.0, 1000.0, true, ""};
constexpr Allowed any_x_over_r{0.001, 1e9, true, ""};
constexpr Allowed any_time_constant{0.0, 1e6, false, " ms"};
constexpr Allowed any_strength{0.0, 1e12, false, " N"};
constexpr double largest_closing_deg = 360.0;

/// A number as the file says it; of an expression also its value.
std::string said(const TomlValue& value, double number, std::string_view unit) {
  const bool expression = std::holds_alternative<std::string>(value.content);
  return expression ? fmt::format("{} = {}{}", shown(value), number, unit)
                    : fmt::format("{}{}", number, unit);
}

/// The ends of a range in six digits, rounded inwards, so that what a message allows is allowed.
std::pair<double, double> shown_range(double low, double high) {
  const auto scale = [](double end) { return std::pow(10.0, 5.0 - std::floor(std::log10(end))); };
  return {std::ceil(low * scale(low) - 1e-6) / scale(low),
          std::floor(high * scale(high) + 1e-6) / scale(high)};
}

/// A factor kappa given as `unit_size` times itself: outside its range the message gives the range
/// in the key's own terms. A value at the upper end may be off by rounding.
double read_kappa(const CaseText& text, const TomlEntry& entry, double unit_size,
                  std::string_view unit, std::string_view because) {
  const double number = read_number(text, entry.value, entry.key, {});
  const double kappa = number / unit_size;
  const auto within = [](double k) {
    return k > solver::least_kappa && k <= solver::largest_kappa * (1.0 + 1e-9);
  };
  if (within(kappa)) return std::min(kappa, solver::largest_kappa);
  // One typed for the other is the likeliest slip.
  const double factor = std::numbers::sqrt2;
  std::string other;
  if (entry.key == "kappa" && within(number / factor)) other = "peak_over_rms";
  if (entry.key == "peak_over_rms" && within(number)) other = "kappa";
  const auto [low, high] =
      shown_range(unit_size * solver::least_kappa, unit_size * solver::largest_kappa);
  text.fail(entry.value.place,
            fmt::format("{} is {}; it must be greater than {}{} and at most {}{}{}{}", entry.key,
                        said(entry.value, number, unit), low, unit, high, unit, because,
                        other.empty() ? "" : fmt::format("; did you mean {}?", other)));
}

double read_power_factor(const CaseText& text, const TomlValue& value) {
  const double number = read_number(text, value, "power_factor", {});
  if (!(number >= 0.0 && number < 1.0)) {
    text.fail(value.place, fmt::format("power_factor is {}; it must be at least 0 and less than 1",
                                       said(value, number, "")));
  }
  return number;
}

/// Refuses keys that belong to the other kind of current.
void refuse(const CaseTable& table, const std::vector<std::string>& keys, const char* why) {
  for (const std::string& key : keys) {
    if (const TomlEntry* entry = table.find(key)) {
      table.text().fail(entry->place, fmt::format("{} {}", key, why));
    }
  }
}

/// "worst", which is no angle, or an angle in radians.
std::optional<double> read_closing(const CaseText& text, const TomlValue& value) {
  const auto* word = std::get_if<std::string>(&value.content);
  if (word != nullptr && *word == "worst") return {};
  const std::string allowed =
      fmt::format("it must be \"worst\" or an angle of at least -{0} deg and at most {0} deg",
                  largest_closing_deg);
  const std::string nearest = word == nullptr ? "" : suggestion(*word, {"worst"});
  const bool number = std::holds_alternative<std::int64_t>(value.content) ||
                      std::holds_alternative<double>(value.content);
  if (!nearest.empty() || (word == nullptr && !number)) {
    text.fail(value.place, fmt::format("closing_deg is {}; {}{}", shown(value), allowed, nearest));
  }
  const double degrees = read_number(text, value, "closing_deg", {});
  if (std::abs(degrees) > largest_closing_deg) {
    text.fail(value.place,
              fmt::format("closing_deg is {}; {}", said(value, degrees, " deg"), allowed));
  }
  return degrees * std::numbers::pi / 180.0;
}

void read_alternating(const CaseTable& table, double frequency_hz, FaultRequest& fault) {
  const CaseText& text = table.text();
  const auto refused = "does not go with frequency_hz; an alternating fault has symmetrical_ka";
  refuse(table, {"direct_ka", "time_constant_ms"}, refused);
  solver::AlternatingFault current;
  current.frequency_hz = frequency_hz;
  const double ka = read_number(text, table.require("symmetrical_ka"), "symmetrical_ka", any_ka);
  current.symmetrical = 1e3 * ka;
  const TomlEntry& decay = table.exactly_one(
      {"r_over_x", "x_over_r", "power_factor", "kappa", "peak_over_rms", "peak_ka"});
  fault.given_key = decay.key;
  const auto from_peak = [&](double unit_size, const char* unit, const std::string& because) {
    const double kappa = read_kappa(text, decay, unit_size, unit, because);
    current.r_over_x = solver::r_over_x_of_kappa(kappa);
    fault.given_value = kappa * unit_size;
    fault.given_peak = kappa * std::numbers::sqrt2 * current.symmetrical;
  };
  if (decay.key == "r_over_x") {
    current.r_over_x = read_number(text, decay.value, decay.key, any_r_over_x);
    fault.given_value = current.r_over_x;
  } else if (decay.key == "x_over_r") {
    fault.given_value = read_number(text, decay.value, decay.key, any_x_over_r);
    current.r_over_x = 1.0 / fault.given_value;
  } else if (decay.key == "power_factor") {
    fault.given_value = read_power_factor(text, decay.value);
    current.r_over_x = solver::r_over_x_of_power_factor(fault.given_value);
  } else if (decay.key == "kappa") {
    from_peak(1.0, "", "");
  } else if (decay.key == "peak_over_rms") {
    from_peak(std::numbers::sqrt2, "", " (kappa from 1.02 to 2, times the square root of 2)");
  } else {
    from_peak(std::numbers::sqrt2 * ka, " kA",
              fmt::format(" (kappa from 1.02 to 2, times the square root of 2, times "
                          "symmetrical_ka = {})",
                          ka));
  }
  if (const TomlEntry* closing = table.find("closing_deg")) {
    current.closing = read_closing(text, closing->value);
  }
  fault.current.course = current;
}

void read_direct(const CaseTable& table, FaultRequest& fault) {
  const CaseText& text = table.text();
  refuse(table, {"symmetrical_ka"}, "needs a frequency_hz; a steady fault has direct_ka");
  refuse(table, {"r_over_x", "x_over_r", "power_factor", "kappa", "peak_over_rms", "closing_deg"},
         "needs a frequency_hz");
  const double ka = read_number(text, table.require("direct_ka"), "direct_ka", any_ka);
  const TomlEntry& course = table.exactly_one({"time_constant_ms", "peak_ka"});
  fault.given_key = course.key;
  if (course.key == "time_constant_ms") {
    fault.given_value = read_number(text, course.value, course.key, any_time_constant);
    fault.current.course = solver::DirectRise{1e3 * ka, 1e-3 * fault.given_value};
    return;
  }
  fault.given_value = read_number(text, course.value, course.key, any_ka);
  if (fault.given_value < ka) {
    text.fail(course.value.place,
              fmt::format("peak_ka is {}; it must be at least direct_ka = {} kA and at most {} kA",
                          said(course.value, fault.given_value, " kA"), ka, largest_ka));
  }
  fault.given_peak = 1e3 * fault.given_value;
  fault.current.course = solver::DirectPeak{1e3 * ka, *fault.given_peak};
}

}  // namespace

std::optional<FaultRequest> read_fault(const CaseTable& root, const CaseParts& parts,
                                       double frequency_hz) {
  const TomlEntry* entry = root.find("fault");
  if (entry == nullptr) return {};
  const CaseText& text = root.text();
  const CaseTable table(
      text, entry->value, "[fault]",
      {"between", "symmetrical_ka", "r_over_x", "x_over_r", "power_factor", "kappa",
       "peak_over_rms", "peak_ka", "closing_deg", "direct_ka", "time_constant_ms"});
  FaultRequest fault;
  const TomlValue& between = table.require("between");
  fault.current.bars = read_part_list(parts, text, between, "between", mesh::Part::Kind::bar);
  const std::size_t bars = fault.current.bars.size();
  if (bars != 2 && bars != 3) {
    text.fail(between.place, fmt::format("between names {} bar{}; a short circuit is between 2 or "
                                         "3 bars, in phase order",
                                         bars, bars == 1 ? "" : "s"));
  }
  if (frequency_hz > 0.0) {
    read_alternating(table, frequency_hz, fault);
    return fault;
  }
  if (bars == 3) {
    text.fail(between.place,
              "between names 3 bars, which needs a frequency_hz; a steady fault is between 2");
  }
  read_direct(table, fault);
  return fault;
}

std::optional<SupportRequest> read_supports(const CaseTable& root) {
  const TomlEntry* entry = root.find("supports");
  if (entry == nullptr) return {};
  const CaseText& text = root.text();
  const CaseTable table(text, entry->value, "[supports]",
                        {"span_mm", "strength_n", "strength_from"});
  if (root.find("fault") == nullptr) {
    text.fail(table.header(), "[supports] without [fault]: what they hold is a short circuit");
  }
  SupportRequest supports;
  supports.span = metres(read_number(text, table.require("span_mm"), "span_mm", size_mm));
  const TomlEntry* strength = table.find("strength_n");
  const TomlEntry* source = table.find("strength_from");
  if (strength != nullptr) {
    supports.strength = read_number(text, strength->value, "strength_n", any_strength);
    if (source == nullptr) {
      text.fail(table.header(),
                "strength_n without strength_from: give the strength's own source, which is "
                "printed beside it");
    }
    supports.strength_from = read_line(text, source->value, "strength_from");
  } else if (source != nullptr) {
    text.fail(source->place, "strength_from without strength_n");
  }
  return supports;
}

}  // namespace barwall::io
