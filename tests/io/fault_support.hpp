#pragma once

#include <string>

#include "case_support.hpp"
#include "io/results.hpp"

namespace barwall::test {

/// Three round bars in open air, not in a row, one named with a comma and a quotation mark, and a
/// neutral of two pieces that carries nothing in the short circuit.
inline const std::string round_bars = R"(title = "Three round bars"
frequency_hz = 50
[[bar]]
name = "L1"
round_mm = { centre = [-70, 0], diameter = 20 }
[[bar]]
name = "L2, \"middle\""
round_mm = { centre = [0, 30], diameter = 20 }
[[bar]]
name = "L3"
round_mm = { centre = [60, 0], diameter = 20 }
[[three_phase]]
bars = ["L1", "L2, \"middle\"", "L3"]
current_a = 400
[[bar]]
name = "N"
current_a = 0
round_mm = { centres = [[-20, -60], [20, -60]], diameter = 20 }
[fault]
between = ["L1", "L2, \"middle\"", "L3"]
symmetrical_ka = 20
r_over_x = 0.1
closing_deg = 37
)";

inline const io::Results& three_bar_fault() {
  static const io::Results results = io::run_case(read_text(round_bars));
  return results;
}

/// Two round bars on a coarse grid; what [fault] holds besides its bars follows.
inline std::string two_round_bars(const std::string& top, const std::string& fault) {
  return top + R"(
[[bar]]
name = "plus"
current_a = 10
round_mm = { centre = [-50, 0], diameter = 20 }
[[bar]]
name = "minus"
current_a = "balance"
round_mm = { centre = [50, 0], diameter = 20 }
[grid]
cells_across = 3
reach = 30
)" + (fault.empty() ? "" : "[fault]\nbetween = [\"plus\", \"minus\"]\n" + fault);
}

inline const io::Results& two_bar_fault() {
  static const io::Results results = io::run_case(
      read_text(two_round_bars("frequency_hz = 60", "symmetrical_ka = 15\nkappa = 1.6\n")));
  return results;
}

inline const io::Results& direct_fault() {
  static const io::Results results =
      io::run_case(read_text(two_round_bars("", "direct_ka = 20\ntime_constant_ms = 12\n")));
  return results;
}

/// A fault of which only the peak is known.
inline const io::Results& fault_without_course() {
  static const io::Results results =
      io::run_case(read_text(two_round_bars("", "direct_ka = 20\npeak_ka = 30\n")));
  return results;
}

}  // namespace barwall::test
