// One section with steel against a general-purpose PDE library (see pde_reference/README.md):
// committed reference numbers, each with its own uncertainty.

#include <catch2/catch.hpp>
#include <cmath>
#include <fstream>
#include <nlohmann/json.hpp>

#include "io/results.hpp"

namespace barwall {

TEST_CASE("A section with steel agrees with a general-purpose PDE library") {
  const std::string folder = BARWALL_SOURCE_DIR "/tests/handbook/pde_reference/";
  nlohmann::json reference;
  std::ifstream(folder + "pde_reference.json") >> reference;
  const auto& expected = reference.at("figures");

  const io::Results results = io::run_case(io::read_case(folder + "section.toml"));
  CHECK(results.verdict() == "sound");
  std::map<std::string, double> found;
  for (const auto& [address, figure] : addresses(results.figures)) found[address] = figure->value;

  const double largest_force = std::abs(expected.at("bars/L1/force_x").at("value").get<double>());
  int compared = 0;
  for (const auto& [address, entry] : expected.items()) {
    const double value = entry.at("value");
    double scale = std::abs(value);
    double within = 2e-3;  // linkage, inductance, energy
    if (address.find("force") != std::string::npos) {
      scale = largest_force;
      within = address.starts_with("bars/") ? 1e-3 : 5e-3;
    } else if (address.starts_with("probes/")) {
      const std::string probe = address.substr(0, address.rfind('/'));
      scale = std::abs(expected.at(probe + "/b").at("value").get<double>());
      // p8 and p9 lie outside, 300 and 400 mm from the centre.
      within = probe == "probes/p8" || probe == "probes/p9" ? 2e-2 : 5e-3;
    } else if (address.ends_with("b_mean")) {
      within = 3e-3;
    }
    INFO(address << " of " << value);
    REQUIRE(found.contains(address));
    CHECK(std::abs(found[address] - value) < within * scale);
    ++compared;
  }
  CHECK(compared >= 60);
}

}  // namespace barwall
