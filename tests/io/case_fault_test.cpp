#include <catch2/catch.hpp>

#include <cmath>
#include <numbers>
#include <variant>

#include "tests/io/case_support.hpp"

using namespace barwall;
using io::Case;
using test::edited;
using test::fault_of;
using test::read_text;

namespace {

/// Bars of which each carries a load, with a wall, and a fault between three of them.
const std::string alternating = R"(frequency_hz = 60

[given]
factor = 2.1

[[bar]]
name = "L1"
current_a = 7
round_mm = { centre = [0, 0], diameter = 10 }

[[wall]]
name = "plate"
material = "stainless"
rectangle_mm = { centre = [0, 50], size = [200, 5] }

[[bar]]
name = "L2"
current_a = 8
phase_deg = 40
round_mm = { centre = [20, 0], diameter = 10 }

[[bar]]
name = "L3"
current_a = 0
round_mm = { centre = [40, 0], diameter = 10 }

[[bar]]
name = "N"
current_a = "balance"
round_mm = { centre = [60, 0], diameter = 10 }

[fault]
between = ["L1", "L2", "L3"]
symmetrical_ka = 25
r_over_x = 0.1
closing_deg = "worst"

[supports]
span_mm = 300
strength_n = 6000
strength_from = "the support's own data sheet"
)";

const std::string steady = R"([[bar]]
name = "plus"
current_a = 100
round_mm = { centre = [0, 0], diameter = 10 }

[[bar]]
name = "minus"
current_a = -100
round_mm = { centre = [20, 0], diameter = 10 }

[[bar]]
name = "earth"
current_a = 0
round_mm = { centre = [40, 0], diameter = 10 }

[fault]
between = ["minus", "earth"]
direct_ka = 20
time_constant_ms = 30
)";

Case with_decay(const std::string& line) {
  return read_text(edited(alternating, "r_over_x = 0.1", line));
}

const solver::AlternatingFault& course_of(const Case& read) {
  return std::get<solver::AlternatingFault>(read.fault.value().current.course);
}

struct Refusal {
  const char* from;
  const char* to;
  const char* place;  ///< LINE:COLUMN
  std::vector<const char*> said;
};

void check_refusals(const std::string& sound, const std::vector<Refusal>& refusals) {
  REQUIRE(fault_of(sound) == "none");
  for (const Refusal& refusal : refusals) {
    const std::string text = edited(sound, refusal.from, refusal.to);
    INFO("from: " << refusal.from << "\n  to: " << refusal.to);
    REQUIRE_FALSE(text.empty());
    const std::string message = fault_of(text);
    CHECK_THAT(message, Catch::StartsWith(std::string("case.toml:") + refusal.place + ": "));
    for (const char* said : refusal.said) CHECK_THAT(message, Catch::Contains(said));
  }
}

}  // namespace

TEST_CASE("A short circuit names its bars in order and has currents of its own") {
  const Case read = read_text(alternating);
  CHECK(read.fault.value().current.bars == std::vector<int>{0, 2, 3});
  CHECK(course_of(read).frequency_hz == 60.0);
  CHECK(course_of(read).symmetrical == 25e3);
  CHECK(course_of(read).r_over_x == 0.1);
  CHECK_FALSE(course_of(read).closing.has_value());
  CHECK(read.fault->given_key == "r_over_x");
  CHECK(read.fault->given_value == 0.1);
  CHECK_FALSE(read.fault->given_peak.has_value());
  // The loads stay what they are.
  CHECK(read.excitation.current[0] == std::complex<double>(7.0));
  CHECK(read.excitation.current[3] == 0.0);

  const Case to_neutral =
      read_text(edited(alternating, "[\"L1\", \"L2\", \"L3\"]", "[\"L3\", \"N\"]"));
  CHECK(to_neutral.fault.value().current.bars == std::vector<int>{3, 4});
  CHECK_FALSE(read_text(test::one_bar).fault.has_value());
  CHECK_FALSE(read_text(test::one_bar).supports.has_value());
}

TEST_CASE("Each of the six ways to say how the offset decays gives its R/X") {
  CHECK(course_of(with_decay("x_over_r = 4")).r_over_x == 0.25);
  CHECK(course_of(with_decay("power_factor = 0.6")).r_over_x == Approx(0.75).epsilon(1e-14));
  CHECK(course_of(with_decay("power_factor = 0")).r_over_x == 0.0);
  CHECK(course_of(with_decay("r_over_x = 0")).r_over_x == 0.0);
  CHECK(course_of(with_decay("kappa = 2")).r_over_x == 0.0);

  const double r_over_x = std::log(0.98 / (2.1 / std::numbers::sqrt2 - 1.02)) / 3.0;
  const auto peak_given = [&](const std::string& line, const char* key, double value) {
    const Case read = with_decay(line);
    CAPTURE(line);
    CHECK(course_of(read).r_over_x == Approx(r_over_x).epsilon(1e-12));
    CHECK(read.fault->given_peak.value() == Approx(52.5e3).epsilon(1e-14));
    CHECK(read.fault->given_key == key);
    CHECK(read.fault->given_value == Approx(value).epsilon(1e-14));
  };
  peak_given("peak_over_rms = 2.1", "peak_over_rms", 2.1);
  peak_given("peak_over_rms = \"factor\"", "peak_over_rms", 2.1);
  peak_given("peak_ka = 52.5", "peak_ka", 52.5);
  peak_given("kappa = \"factor / sqrt(2)\"", "kappa", 2.1 / std::numbers::sqrt2);
  // The upper end may come from a formula that rounds.
  CHECK(course_of(with_decay("peak_over_rms = \"2 * sqrt(2)\"")).r_over_x == 0.0);
  CHECK(course_of(with_decay("peak_ka = 70.71067811866")).r_over_x == 0.0);
}

TEST_CASE("The closing angle is a number, or the worst, also where it is left out") {
  const auto closing = [](const std::string& line) {
    return course_of(read_text(edited(alternating, "closing_deg = \"worst\"\n", line))).closing;
  };
  CHECK_FALSE(closing("").has_value());
  CHECK(closing("closing_deg = -90\n").value() == Approx(-0.5 * std::numbers::pi).epsilon(1e-15));
  CHECK(closing("closing_deg = 360\n").value() == Approx(2.0 * std::numbers::pi).epsilon(1e-15));
  CHECK(closing("closing_deg = \"factor * 100\"\n").value() ==
        Approx(210.0 * std::numbers::pi / 180.0));
}

TEST_CASE("A steady fault rises with its time constant, or has a peak") {
  const Case rise = read_text(steady);
  CHECK(rise.fault.value().current.bars == std::vector<int>{1, 2});
  const auto& rising = std::get<solver::DirectRise>(rise.fault->current.course);
  CHECK(rising.steady == 20e3);
  CHECK(rising.time_constant == Approx(0.03).epsilon(1e-15));
  CHECK(rise.fault->given_key == "time_constant_ms");
  CHECK_FALSE(rise.fault->given_peak.has_value());

  const Case peak = read_text(edited(steady, "time_constant_ms = 30", "peak_ka = 20"));
  const auto& peaking = std::get<solver::DirectPeak>(peak.fault.value().current.course);
  CHECK(peaking.steady == 20e3);
  CHECK(peaking.peak == 20e3);
  CHECK(peak.fault->given_peak.value() == 20e3);
}

TEST_CASE("Supports have a span and perhaps a strength with its source") {
  const Case read = read_text(alternating);
  CHECK(read.supports.value().span == 0.3);
  CHECK(read.supports->strength.value() == 6000.0);
  CHECK(read.supports->strength_from == "the support's own data sheet");
  const Case bare = read_text(steady + "[supports]\nspan_mm = 450\n");
  CHECK(bare.supports.value().span == 0.45);
  CHECK_FALSE(bare.supports->strength.has_value());
  CHECK(bare.supports->strength_from.empty());
}

TEST_CASE("A short circuit is between two or three different bars") {
  const char* bars = "[\"L1\", \"L2\", \"L3\"]";
  check_refusals(
      alternating,
      {{bars, "[\"L1\", \"M2\"]", "33:18", {"between: unknown bar \"M2\"", "did you mean \"L2\"?"}},
       {bars, "[\"L1\", \"plate\"]", "33:18", {"\"plate\" is a wall, not a bar"}},
       {bars, "[\"L1\", \"L2\", \"L1\"]", "33:24", {"between names \"L1\" twice"}},
       {bars, "[\"L1\"]", "33:11", {"between names 1 bar;", "2 or 3"}},
       {bars, "[\"L1\", \"L2\", \"L3\", \"N\"]", "33:11", {"between names 4 bars", "2 or 3"}},
       {bars, "[]", "33:11", {"between names nothing"}},
       {bars, "\"L1\"", "33:11", {"between is \"L1\"", "must be an array"}},
       {"between = [\"L1\", \"L2\", \"L3\"]\n", "", "32:1", {"[fault] has no between"}},
       {"[fault]", "[[fault]]", "32:1", {"[fault] is an array", "must be a table"}},
       {"between", "betwen", "33:1", {"unknown key \"betwen\"", "did you mean \"between\"?"}}});
  check_refusals(steady, {{"[\"minus\", \"earth\"]",
                           "[\"plus\", \"minus\", \"earth\"]",
                           "17:11",
                           {"between names 3 bars", "needs a frequency_hz", "between 2"}}});
}

TEST_CASE("An alternating fault has one symmetrical current and one way to decay") {
  check_refusals(
      alternating,
      {{"symmetrical_ka = 25\n", "", "32:1", {"[fault] has no symmetrical_ka"}},
       {"symmetrical_ka = 25",
        "direct_ka = 25",
        "34:1",
        {"direct_ka does not go with frequency_hz", "symmetrical_ka"}},
       {"r_over_x = 0.1", "time_constant_ms = 9", "35:1", {"time_constant_ms does not go"}},
       {"r_over_x = 0.1\n",
        "",
        "32:1",
        {"[fault] needs one of r_over_x, x_over_r, power_factor, "
         "kappa, peak_over_rms, peak_ka"}},
       {"r_over_x = 0.1",
        "r_over_x = 0.1\nkappa = 1.7",
        "36:1",
        {"[fault] has r_over_x and kappa; only one"}}});
}

TEST_CASE("A steady fault has a direct current with a rise or a peak, and no closing angle") {
  check_refusals(
      steady,
      {{"direct_ka = 20",
        "symmetrical_ka = 20",
        "18:1",
        {"symmetrical_ka needs a frequency_hz", "direct_ka"}},
       {"direct_ka = 20\n", "", "16:1", {"[fault] has no direct_ka"}},
       {"time_constant_ms = 30", "r_over_x = 0.1", "19:1", {"r_over_x needs a frequency_hz"}},
       {"time_constant_ms = 30\n", "", "16:1", {"needs one of time_constant_ms, peak_ka"}},
       {"time_constant_ms = 30", "time_constant_ms = 30\npeak_ka = 40", "20:1", {"only one"}},
       {"time_constant_ms = 30",
        "time_constant_ms = 30\nclosing_deg = \"worst\"",
        "20:1",
        {"closing_deg needs a frequency_hz"}},
       {"time_constant_ms = 30", "time_constant_ms = 0", "19:20", {"greater than 0 ms"}},
       {"time_constant_ms = 30",
        "peak_ka = 19.9",
        "19:11",
        {"peak_ka is 19.9 kA", "at least direct_ka = 20 kA"}},
       {"direct_ka = 20", "direct_ka = -20", "18:13", {"direct_ka is -20 kA", "greater than 0 kA"}},
       {"direct_ka = 20", "direct_ka = 2e6", "18:13", {"at most 1000000 kA"}}});
}

TEST_CASE("Numbers of a fault out of range are refused with their range") {
  const char* decay = "r_over_x = 0.1";
  check_refusals(
      alternating,
      {{"symmetrical_ka = 25", "symmetrical_ka = 0", "34:18", {"greater than 0 kA"}},
       {decay, "r_over_x = -0.1", "35:12", {"r_over_x is -0.1", "at least 0 and at most 1000"}},
       {decay, "r_over_x = 1001", "35:12", {"at most 1000"}},
       {decay, "x_over_r = 0", "35:12", {"x_over_r is 0", "at least 0.001"}},
       {decay, "power_factor = 1", "35:16", {"power_factor is 1", "at least 0 and less than 1"}},
       {decay, "power_factor = -0.2", "35:16", {"power_factor is -0.2"}},
       {decay, "power_factor = \"factor - 1\"", "35:16", {"\"factor - 1\" = 1.1;"}},
       {decay, "kappa = 1.02", "35:9", {"kappa is 1.02", "greater than 1.02 and at most 2"}},
       {decay,
        "kappa = 2.1",
        "35:9",
        {"kappa is 2.1", "greater than 1.02 and at most 2; did you mean peak_over_rms?"}},
       {decay, "kappa = 3", "35:9", {"kappa is 3", "at most 2"}},
       {decay,
        "peak_over_rms = 1.4",
        "35:17",
        {"peak_over_rms is 1.4", "greater than 1.4425 and at most 2.82842 (kappa from 1.02 to 2",
         "did you mean kappa?"}},
       {decay, "peak_over_rms = 2.83", "35:17", {"peak_over_rms is 2.83;", "at most 2.82842"}},
       {decay,
        "peak_ka = 25",
        "35:11",
        {"peak_ka is 25 kA", "greater than 36.0625 kA and at most 70.7106 kA",
         "symmetrical_ka = 25"}},
       {decay, "peak_ka = 71", "35:11", {"peak_ka is 71 kA"}},
       {decay, "peak_ka = nan", "35:11", {"a finite number"}}});
  // What a message allows is allowed.
  for (const char* allowed : {"peak_over_rms = 1.4425", "peak_over_rms = 2.82842",
                              "peak_ka = 36.0625", "peak_ka = 70.7106", "kappa = 1.0200001"}) {
    CHECK(fault_of(edited(alternating, decay, allowed)) == "none");
  }
}

TEST_CASE("A closing angle that is none is refused with what is allowed") {
  const char* worst = "closing_deg = \"worst\"";
  check_refusals(
      alternating,
      {{worst,
        "closing_deg = \"wurst\"",
        "36:15",
        {"closing_deg is \"wurst\"", "-360 deg", "did you mean \"worst\"?"}},
       {worst,
        "closing_deg = 361",
        "36:15",
        {"closing_deg is 361 deg", "\"worst\" or an angle", "at most 360 deg"}},
       {worst, "closing_deg = -360.5", "36:15", {"closing_deg is -360.5 deg"}},
       {worst, "closing_deg = true", "36:15", {"closing_deg is true", "\"worst\" or an angle"}},
       {worst, "closing_deg = \"angle\"", "36:15", {"unknown name \"angle\""}}});
}

TEST_CASE("Supports without a fault, a span, or half of a strength are refused") {
  check_refusals(
      alternating,
      {{"span_mm = 300\n", "", "38:1", {"[supports] has no span_mm"}},
       {"span_mm = 300", "span_mm = 0", "39:11", {"span_mm is 0 mm"}},
       {"strength_n = 6000\n", "", "40:1", {"strength_from without strength_n"}},
       {"strength_from = \"the support's own data sheet\"\n",
        "",
        "38:1",
        {"strength_n without strength_from", "source"}},
       {"strength_n = 6000", "strength_n = 0", "40:14", {"strength_n is 0 N", "greater than 0 N"}},
       {"strength_n", "strength_kn", "40:1", {"did you mean \"strength_n\"?"}}});
  CHECK(fault_of(test::one_bar + "\n[supports]\nspan_mm = 300\n") ==
        "case.toml:6:1: [supports] without [fault]: what they hold is a short circuit");
}
