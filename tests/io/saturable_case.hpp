#pragma once

#include <string>

#include "io/results.hpp"
#include "tests/io/case_support.hpp"

namespace barwall::test {

/// Three phases over a plate of saturable steel, small and quick, on a grid too coarse to be sound.
/// Half a cycle takes 12 instants, of twice the load 24.
inline const std::string saturable_case = R"(title = "Three phases over a plate that saturates"
frequency_hz = 50

[given]
load_a = 60000

[material.plate]
bh_points = [[0, 0], [100, 0.16], [400, 0.85], [1200, 1.33], [5000, 1.66], [20000, 1.92],
             [80000, 2.12], [160000, 2.23]]

[[bar]]
name = "L1"
rectangle_mm = { centre = [-40, 0], size = [20, 20] }

[[bar]]
name = "L2"
rectangle_mm = { centre = [0, 0], size = [20, 20] }

[[bar]]
name = "L3"
rectangle_mm = { centre = [40, 0], size = [20, 20] }

[[three_phase]]
bars = ["L1", "L2", "L3"]
current_a = "load_a"

[[wall]]
name = "plate"
material = "plate"
rectangle_mm = { centre = [0, -25], size = [120, 10] }

[[probe]]
name = "sensor"
at_mm = [20, 5]

[grid]
cells_across = 2
reach = 5
)";

inline const std::string fault_beside_plate = R"(
[fault]
between = ["L1", "L2", "L3"]
symmetrical_ka = 45
r_over_x = 0.1
)";

/// Results of the case with its fault, made once.
inline const io::Results& saturable_results() {
  static const io::Results results = io::run_case(read_text(saturable_case + fault_beside_plate));
  return results;
}

/// The same plate beside a direct current, without a frequency.
inline std::string direct_saturable_case() {
  std::string text = edited(saturable_case, "frequency_hz = 50\n", "");
  text = edited(text, R"([[three_phase]]
bars = ["L1", "L2", "L3"]
current_a = "load_a"
)",
                "");
  text = edited(text, "name = \"L1\"\n", "name = \"L1\"\ncurrent_a = \"load_a\"\n");
  text = edited(text, "name = \"L2\"\n", "name = \"L2\"\ncurrent_a = 0\n");
  return edited(text, "name = \"L3\"\n", "name = \"L3\"\ncurrent_a = \"balance\"\n");
}

}  // namespace barwall::test
