#include "io/quantity_text.hpp"

#include <fmt/format.h>

#include <algorithm>
#include <array>
#include <cmath>

namespace barwall::io {
namespace {

constexpr std::array<const char*, 9> prefixes = {"p", "n", "µ", "m", "", "k", "M", "G", "T"};
constexpr int no_prefix = 4;

/// Powers of 1000 by which a value is shown.
int thousands(double value) {
  if (value == 0.0) return 0;
  // A value that rounds up to 1000 takes the next prefix.
  const double shown = std::abs(value) * (1.0 + 5e-5);
  const int power = static_cast<int>(std::floor(std::log10(shown) / 3.0));
  return std::clamp(power, -no_prefix, static_cast<int>(prefixes.size()) - 1 - no_prefix);
}

std::string four_digits(double scaled) {
  if (scaled == 0.0) return "0";
  const int whole = static_cast<int>(std::floor(std::log10(std::abs(scaled) * (1.0 + 5e-5)))) + 1;
  return fmt::format("{:.{}f}", scaled, std::clamp(4 - whole, 0, 6));
}

std::string with_prefix(const std::string& unit, int power) {
  const std::string shown = unit.rfind("ohm", 0) == 0 ? "Ω" + unit.substr(3) : unit;
  return prefixes[static_cast<std::size_t>(power + no_prefix)] + shown;
}

}  // namespace

std::string quantity_text(double value, const std::string& unit) {
  return quantity_text({"", value, unit});
}

std::string quantity_text(const solver::Figure& figure) {
  if (!std::isfinite(figure.value)) return "-";
  const int power = thousands(figure.value);
  const double scale = std::pow(1000.0, -power);
  std::string text = four_digits(figure.value * scale);
  if (std::isfinite(figure.plus_minus)) text += fmt::format(" ± {:.2g}", figure.plus_minus * scale);
  return text + " " + with_prefix(figure.unit, power);
}

std::string direction_text(double degrees) {
  if (!std::isfinite(degrees)) return "";
  static constexpr std::array<const char*, 8> words = {"right", "up right",  "up",   "up left",
                                                       "left",  "down left", "down", "down right"};
  const double whole = std::round(std::fmod(std::fmod(degrees, 360.0) + 360.0, 360.0));
  const int shown = static_cast<int>(whole) % 360;
  const auto sector = static_cast<std::size_t>((shown + 22) / 45) % words.size();
  return fmt::format("{} ({}°)", words[sector], shown);
}

}  // namespace barwall::io
