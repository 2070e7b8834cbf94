// Two round bars through the installed package: the force between them is that between two long
// wires, mu_0 I^2 / (2 pi d) = 2e-7 * 1000^2 / 0.06 N/m.

#include <cmath>
#include <cstdio>
#include <fstream>

#include "io/results.hpp"

int main() {
  std::ofstream("pair.toml") << R"(
[[bar]]
name = "go"
current_a = 1000
round_mm = { centre = [0, 0], diameter = 20 }

[[bar]]
name = "back"
current_a = "balance"
round_mm = { centre = [60, 0], diameter = 20 }
)";
  const barwall::io::Results results = barwall::io::run_case(barwall::io::read_case("pair.toml"));
  double force = 0.0;
  for (const auto& figure : results.figures.bars.front().figures) {
    if (figure.key == "force_x") force = figure.value;
  }
  const double expected = -2e-7 * 1e6 / 0.06;
  std::printf("force on the bar: %.6f N/m, long wires: %.6f N/m, verdict: %s\n", force, expected,
              results.verdict().c_str());
  return results.verdict() == "sound" && std::abs(force - expected) < 0.002 * std::abs(expected)
             ? 0
             : 1;
}
