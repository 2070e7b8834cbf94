#include "verify/phase_order.hpp"

#include <catch2/catch.hpp>
#include <numbers>

#include "tests/support/sections.hpp"

using namespace barwall;
using namespace barwall::verify;

namespace {

mesh::Section bars_named(const std::vector<std::string>& names) {
  mesh::Section section;
  for (const std::string& name : names) {
    section.parts.push_back(support::bar(name, {mesh::Round{{}, 0.01}}));
  }
  return section;
}

std::complex<double> phasor(double size, double degrees) {
  return std::polar(size, degrees * std::numbers::pi / 180.0);
}

/// Notices of one circuit with bars of these names, in this order.
std::vector<solver::Notice> listed(const std::vector<std::string>& names) {
  return phase_order(bars_named(names),
                     {50.0, {phasor(900, 0), phasor(900, -120), phasor(900, 120)}},
                     {{{0, 1, 2}, -1}});
}

/// Notices of bars with currents of their own.
std::vector<solver::Notice> given(const std::vector<std::string>& names,
                                  const std::vector<std::complex<double>>& currents) {
  return phase_order(bars_named(names), {50.0, currents}, {});
}

}  // namespace

TEST_CASE("A circuit listed against its bars' names names the two that look swapped") {
  struct Row {
    std::vector<std::string> names;
    const char* swapped;
  };
  for (const Row& row :
       {Row{{"L1", "L3", "L2"}, "\"L2\" and \"L3\""}, Row{{"L2", "L1", "L3"}, "\"L1\" and \"L2\""},
        Row{{"L3", "L2", "L1"}, "\"L1\" and \"L3\""},
        Row{{"bar 8", "bar 16", "bar 12"}, "\"bar 12\" and \"bar 16\""},
        Row{{"A", "C", "B"}, "\"B\" and \"C\""},
        Row{{"feed s", "feed r", "feed t"}, "\"feed r\" and \"feed s\""},
        Row{{"U", "W", "V"}, "\"V\" and \"W\""}}) {
    const auto found = listed(row.names);
    INFO(row.swapped);
    REQUIRE(found.size() == 1);
    CHECK(found[0].name == "phase order");
    CHECK_FALSE(found[0].indicative);
    CHECK_THAT(found[0].detail, Catch::EndsWith(std::string(row.swapped) + " look swapped"));
  }
}

TEST_CASE("Names in order, rotated, or of no sequence raise no notice of phase order") {
  const std::vector<std::vector<std::string>> quiet = {
      {"L1", "L2", "L3"}, {"L2", "L3", "L1"},        {"L3", "L1", "L2"}, {"L9", "L10", "L11"},
      {"T", "R", "S"},    {"red", "yellow", "blue"}, {"L1", "K3", "L2"}, {"A", "W", "B"},
      {"L1", "C", "B"},   {"1A", "1C", "2B"}};
  for (const auto& names : quiet) {
    INFO(names[0] << ' ' << names[1] << ' ' << names[2]);
    CHECK(listed(names).empty());
  }
}

TEST_CASE("Three bars with phases of their own are looked at as a circuit is") {
  const auto found =
      given({"L1", "L2", "L3"}, {phasor(900, 0), phasor(905, 120.5), phasor(900, -120)});
  REQUIRE(found.size() == 1);
  CHECK_THAT(found[0].detail,
             Catch::Contains("\"L1\", \"L3\", \"L2\"") && Catch::Contains("\"L2\" and \"L3\""));
  const auto turned =
      given({"N", "A", "B", "C"}, {5.0, phasor(900, -120), phasor(900, 0), phasor(900, 120)});
  REQUIRE(turned.size() == 1);
  CHECK_THAT(turned[0].detail,
             Catch::Contains("\"B\", \"A\", \"C\"") && Catch::Contains("\"A\" and \"B\""));
  for (const double start : {0.0, 40.0, 60.0, -60.0, 120.0, 180.0}) {
    INFO(start);
    const auto at = [&](double degrees) { return phasor(900, start + degrees); };
    CHECK(given({"L1", "L2", "L3"}, {at(0), at(-120), at(120)}).empty());
    CHECK(given({"L1", "L2", "L3"}, {at(0), at(120), at(-120)}).size() == 1);
  }
}

TEST_CASE("Currents that are no three phases say nothing of their order") {
  const std::vector<std::string> names = {"L1", "L2", "L3"};
  CHECK(given(names, {phasor(900, 0), phasor(920, 120), phasor(900, -120)}).empty());
  CHECK(given(names, {phasor(900, 0), phasor(900, 122), phasor(900, -120)}).empty());
  CHECK(given(names, {phasor(900, 0), phasor(900, 0), phasor(900, -120)}).empty());
  CHECK(given(names, {phasor(900, 0), phasor(900, 120), 0.0}).empty());
  CHECK(given({"L1", "L2", "L3", "L4"},
              {phasor(900, 0), phasor(900, 120), phasor(900, -120), phasor(900, 0)})
            .empty());
  const std::vector<std::complex<double>> steady = {900.0, -450.0, -450.0};
  CHECK(phase_order(bars_named(names), {0.0, steady}, {}).empty());
}
