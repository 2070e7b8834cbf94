// Sections with steel against a general-purpose PDE library (see pde_reference/README.md):
// committed reference numbers, each with its own uncertainty.

#include <catch2/catch.hpp>
#include <cmath>
#include <fstream>
#include <nlohmann/json.hpp>

#include "io/results.hpp"

namespace barwall {
namespace {

using Figures = std::map<std::string, double>;

const std::string folder = BARWALL_SOURCE_DIR "/tests/handbook/pde_reference/";

Figures reference_figures(const std::string& file) {
  nlohmann::json reference;
  std::ifstream(folder + file) >> reference;
  Figures figures;
  for (const auto& [address, entry] : reference.at("figures").items()) {
    figures[address] = entry.at("value");
  }
  return figures;
}

/// The figures of a case that is sound.
Figures computed_figures(const std::string& file) {
  const io::Results results = io::run_case(io::read_case(folder + file));
  CHECK(results.verdict() == "sound");
  Figures figures;
  for (const auto& [address, figure] : addresses(results.figures)) figures[address] = figure->value;
  return figures;
}

/// What the error of a figure is to be seen against, and how much of that it may be.
struct Allowed {
  double scale;
  double share;
};

/// Compares every reference figure with the computed one of the same address.
template <class AllowedOf>
void compare(const Figures& found, const Figures& expected, AllowedOf allowed_of) {
  for (const auto& [address, value] : expected) {
    INFO(address << " of " << value);
    REQUIRE(found.contains(address));
    const Allowed allowed = allowed_of(address, value);
    INFO("off by " << (found.at(address) - value) / allowed.scale << " of " << allowed.scale);
    CHECK(std::abs(found.at(address) - value) < allowed.share * allowed.scale);
  }
}

std::string owner_of(const std::string& address) {
  return address.substr(0, address.rfind('/'));
}

}  // namespace

TEST_CASE("A section with steel agrees with a general-purpose PDE library") {
  const Figures expected = reference_figures("pde_reference.json");
  CHECK(expected.size() >= 60);
  const double largest_force = std::abs(expected.at("bars/L1/force_x"));
  compare(computed_figures("section.toml"), expected,
          [&](const std::string& address, double value) -> Allowed {
            if (address.find("force") != std::string::npos) {
              return {largest_force, address.starts_with("bars/") ? 1e-3 : 5e-3};
            }
            if (address.starts_with("probes/")) {
              const std::string probe = owner_of(address);
              // p8 and p9 lie outside, 300 and 400 mm from the centre.
              const bool far = probe == "probes/p8" || probe == "probes/p9";
              return {std::abs(expected.at(probe + "/b")), far ? 2e-2 : 5e-3};
            }
            // Linkage, inductance, energy 2e-3.
            return {std::abs(value), address.ends_with("b_mean") ? 3e-3 : 2e-3};
          });
}

TEST_CASE("A saturated section agrees with a general-purpose PDE library") {
  const Figures expected = reference_figures("saturated_reference.json");
  CHECK(expected.size() >= 30);
  CHECK(expected.at("walls/duct/saturated_share") > 0.3);
  const Figures found = computed_figures("saturated_section.toml");
  compare(found, expected, [&](const std::string& address, double value) -> Allowed {
    const std::string owner = owner_of(address);
    // Bars and the duct by their own force, which for the duct is 6 % of a bar's.
    if (address.find("force") != std::string::npos) {
      return {std::hypot(expected.at(owner + "/force_x"), expected.at(owner + "/force_y")), 2e-3};
    }
    // p4 lies outside, 200 mm from the duct.
    if (address.starts_with("probes/")) return {expected.at(owner + "/b"), 3e-3};
    // A triangle of the grid is saturated as a whole or not at all.
    if (address.ends_with("saturated_share")) return {1.0, 2e-3};
    // Linkage, inductance, energy and coenergy 2e-3: all are off together by the scheme's error in
    // the field between the bars, 0.08 %.
    return {std::abs(value), owner.starts_with("walls/") ? 1e-3 : 2e-3};
  });
}

}  // namespace barwall
