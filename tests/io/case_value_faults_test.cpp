#include <catch2/catch.hpp>

#include "tests/io/case_faults.hpp"

using namespace barwall;
using test::check_faults;
using test::edited;
using test::fault_of;
using test::one_bar;
using test::whole_case;

TEST_CASE("Numbers out of range are refused with what is allowed") {
  check_faults(
      {{"frequency_hz = 50", "frequency_hz = 0", "2:16", {"0 Hz", "greater than 0 Hz"}},
       {"frequency_hz = 50", "frequency_hz = -50", "2:16", {"-50 Hz"}},
       {"frequency_hz = 50", "frequency_hz = nan", "2:16", {"nan", "a finite number"}},
       {"frequency_hz = 50", "frequency_hz = -inf", "2:16", {"-inf", "a finite number"}},
       {"run_length_m = 3", "run_length_m = 0.0", "3:16", {"0 m", "greater than 0 m"}},
       {"relative_permeability = 600",
        "relative_permeability = 0.5",
        "10:25",
        {"0.5", "at least 1"}},
       {"relative_permeability = 600",
        "relative_permeability = 600\nresistivity_ohm_m = 0",
        "11:21",
        {"resistivity_ohm_m is 0 ohm m", "greater than 0 ohm m"}},
       {"relative_permeability = 600",
        "resistivity_ohm_m = 1.01\nrelative_permeability = 600",
        "10:21",
        {"1.01 ohm m", "at most 1 ohm m"}},
       {"size = [8, 80], turn", "size = [8, 0], turn", "14:56", {"size is 0 mm"}},
       {"size = [8, 80], turn",
        "size = [\"10-18\", 80], turn",
        "14:53",
        {"size is \"10-18\" = -8 mm"}},
       {"diameter = 40", "diameter = -40", "27:51", {"diameter is -40 mm"}},
       {"centre = [0, 108.5]",
        "centre = [0, 1.1e7]",
        "53:31",
        {"11000000 mm", "at most 10000000 mm"}},
       {"centre = [0, 108.5], size = [40, 10]",
        "centre = [0, 1e7], size = [40, 10]",
        "53:16",
        {"10000005 mm", "within 10000000 mm"}},
       {"polygon_mm = [[-150, -100]", "polygon_mm = [[-2e7, -100]", "48:16", {"-20000000 mm"}},
       {"at_mm = [0, 95]", "at_mm = [0, -10000001]", "57:13", {"-10000001 mm"}},
       {"points = 101", "points = 1", "65:10", {"points is 1", "from 2 to 100000"}},
       {"points = 101", "points = 100001", "65:10", {"100001"}},
       {"points = 101", "points = 10.5", "65:10", {"10.5", "a whole number"}},
       {"distance_mm = 1000", "distance_mm = 0", "69:15", {"greater than 0 mm"}},
       {"limit_ut = 200", "limit_ut = 0", "58:12", {"greater than 0 uT"}},
       {"cells_across = 6", "cells_across = 1", "77:16", {"cells_across is 1", "from 2"}},
       {"cells_across = 6", "cells_across = 4.5", "77:16", {"4.5", "a whole number"}},
       {"reach = 300", "reach = 4", "78:9", {"reach is 4", "at least 5"}},
       {"current_a = 1000", "current_a = inf", "36:13", {"a finite number"}},
       {"phase_deg = 30", "phase_deg = nan", "47:13", {"a finite number"}}});
}

TEST_CASE("Faults of expressions are told at their string") {
  check_faults(
      {{"centre = [\"-pitch_mm\", 0]",
        "centre = [\"-pich_mm\", 0]",
        "14:28",
        {"centre = \"-pich_mm\"", "unknown name \"pich_mm\"", "did you mean \"pitch_mm\"?"}},
       {"current_a = 10\n", "current_a = \"1/0\"\n", "46:13", {"division by zero"}},
       {"current_a = 10\n", "current_a = \"balanced\"\n", "46:13", {"unknown name \"balanced\""}},
       {"current_a = 10\n", "current_a = \"2^3\"\n", "46:13", {"\"^\"", "not allowed"}},
       {"half_mm = \"pitch_mm / 2\"",
        "half_mm = \"third_mm\"\nthird_mm = 20",
        "7:11",
        {"half_mm = \"third_mm\"", "unknown name \"third_mm\""}},
       {"pitch_mm = 60", "pitch-mm = 60", "6:1", {"\"pitch-mm\" cannot be a name in [given]"}},
       {"pitch_mm = 60", "sin = 60", "6:1", {"\"sin\" cannot be a name in [given]"}},
       {"pitch_mm = 60", "pitch_mm = [60]", "6:12", {"pitch_mm is an array"}}});
}

TEST_CASE("A wrong --set says so, with the nearest name of [given]") {
  CHECK(fault_of(whole_case, {{"pich_mm", "3"}}) ==
        "case.toml:5:1: --set pich_mm=3: [given] has no name \"pich_mm\"; did you mean "
        "\"pitch_mm\"?");
  CHECK_THAT(fault_of(whole_case, {{"pitch_mm", "3 +"}}),
             Catch::StartsWith("case.toml:6:12: --set pitch_mm=3 +: not an expression"));
  CHECK_THAT(fault_of(whole_case, {{"pitch_mm", "half_mm"}}),
             Catch::Contains("--set pitch_mm=half_mm: unknown name \"half_mm\""));
  CHECK_THAT(fault_of(whole_case, {{"pitch_mm", "60"}, {"pitch_mm", "61"}}),
             Catch::Contains("pitch_mm is set twice"));
  CHECK_THAT(fault_of(one_bar, {{"x", "60"}}),
             Catch::StartsWith("case.toml:1:1: --set x=60: the case has no [given]"));
}

TEST_CASE("Unknown materials, bars and walls are refused with the nearest") {
  check_faults(
      {{"material = \"aluminium\"",
        "material = \"aluminum\"",
        "31:12",
        {"unknown material \"aluminum\"", "did you mean \"aluminium\"?"}},
       {"material = \"trunking\"",
        "material = \"truncking\"",
        "18:12",
        {"did you mean \"trunking\"?"}},
       {"material = \"aluminium\"",
        "material = \"wood\"",
        "31:12",
        {"unknown material \"wood\"", "stainless"}},
       {"material = \"aluminium\"",
        "material = \"air\"",
        "31:12",
        {"bar \"N\" is of air", "conducting"}},
       {"bars = [\"L1\", \"L2\"",
        "bars = [\"L1\", \"L4\"",
        "35:15",
        {"unknown bar \"L4\"", "did you mean \"L1\"?"}},
       {"bars = [\"L1\", \"L2\"",
        "bars = [\"L1\", \"trunking\"",
        "35:15",
        {"\"trunking\" is a wall, not a bar"}},
       {"neutral = \"N\"", "neutral = \"earthy\"", "37:11", {"did you mean \"earth\"?"}},
       {"through = [\"trunking\"]",
        "through = [\"trunkin\"]",
        "52:12",
        {"unknown wall \"trunkin\"", "did you mean \"trunking\"?"}},
       {"through = [\"trunking\"]", "through = [\"L1\"]", "52:12", {"\"L1\" is a bar, not a wall"}},
       {"go = [\"L1\"]", "go = [\"gland slot\"]", "73:7", {"is an opening, not a bar"}},
       {"return = [\"L2\", \"L3\"]",
        "return = [\"L2\", \"L1\"]",
        "74:17",
        {"\"L1\" stands in go already"}}});
}

TEST_CASE("Materials are given once, by one law, and none of the built-in ones anew") {
  check_faults({{"[material.trunking]", "[material.copper]", "9:11", {"\"copper\" exists already"}},
                {"relative_permeability = 600",
                 "relative_permeability = 600\nbh_curve = \"x.csv\"",
                 "11:1",
                 {"relative_permeability and bh_curve", "only one"}},
                {"relative_permeability = 600",
                 "resistivity_ohm_m = 1.5e-7",
                 "9:1",
                 {"needs one of relative_permeability"}},
                {"relative_permeability = 600",
                 "relative_permeability = 600\nresistivity = 1e-7",
                 "11:1",
                 {"unknown key \"resistivity\"", "resistivity_ohm_m"}}});
}

TEST_CASE("A current given twice, not at all or against the frequency is refused") {
  check_faults(
      {{"name = \"L3\"",
        "name = \"L3\"\ncurrent_a = 5",
        "27:1",
        {"the current of bar \"L3\" is given twice"}},
       {"bars = [\"L1\", \"L2\", \"L3\"]",
        "bars = [\"L1\", \"L2\", \"aux\"]",
        "25:1",
        {"bar \"L3\" has no current"}},
       {"neutral = \"N\"", "neutral = \"L1\"", "37:11", {"\"L1\" is given twice"}},
       {"neutral = \"N\"\n", "", "29:1", {"bar \"N\" has no current"}},
       {"current_a = 10\n", "current_a = \"balance\"\n", "47:1", {"phase_deg", "balance"}},
       {"current_a = 10\nphase_deg = 30\n",
        "current_a = \"balance\"\n",
        "46:13",
        {"\"aux\"", "\"earth\"", "only one"}},
       {"bars = [\"L1\", \"L2\", \"L3\"]", "bars = [\"L1\", \"L2\"]", "35:8", {"2 bars", "three"}},
       {"bars = [\"L1\", \"L2\", \"L3\"]",
        "bars = [\"L1\", \"L2\", \"L1\"]",
        "35:21",
        {"names \"L1\" twice"}},
       {"name = \"L3\"",
        "name = \"L3\"\nphase_deg = 5",
        "27:1",
        {"phase_deg of bar \"L3\"", "[[three_phase]]"}},
       {"frequency_hz = 50\n", "", "33:1", {"[[three_phase]] needs a frequency_hz"}}});
  CHECK_THAT(fault_of(edited(one_bar, "current_a = 100", "current_a = 100\nphase_deg = 0")),
             Catch::StartsWith("case.toml:4:1: phase_deg of bar \"A\" needs a frequency_hz"));
}
