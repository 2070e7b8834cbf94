#include <catch2/catch.hpp>

#include "tests/io/case_faults.hpp"

using namespace barwall;
using test::check_faults;
using test::fault_of;
using test::one_bar;

TEST_CASE("What is no TOML is refused where it stands") {
  check_faults(
      {{"run_length_m = 3", "run_length_m = ", "3:16", {"not valid TOML"}},
       {"run_length_m = 3", "run_length_m = 3 4", "3:18", {"not valid TOML"}},
       {"[given]", "[given", "5:7", {"not valid TOML"}},
       {"[given]", "[.given]", "5:2", {"not valid TOML"}},
       {"title = \"Three", "title = \"\xff", "1:9", {"not valid TOML", "utf-8"}},
       {"run_length_m = 3", "run_length_m = 99999999999999999999", "3:36", {"not valid TOML"}}});
}

TEST_CASE("Unknown keys are refused with the nearest") {
  check_faults(
      {{"run_length_m",
        "run_lenght_m",
        "3:1",
        {"unknown key \"run_lenght_m\"", "did you mean \"run_length_m\"?"}},
       {"frequency_hz", "frequency", "2:1", {"did you mean \"frequency_hz\"?"}},
       {"[[wall]]", "[[walls]]", "16:3", {"\"walls\"", "did you mean \"wall\"?"}},
       {"relative_permeability",
        "mu",
        "10:1",
        {"unknown key \"mu\" in [material.trunking]", "allowed: relative_permeability"}},
       {"current_a = 10\n",
        "curent_a = 10\n",
        "46:1",
        {"unknown key \"curent_a\" in [[bar]]", "did you mean \"current_a\"?"}},
       {"turn_deg", "turn_degrees", "14:61", {"rectangle_mm", "did you mean \"turn_deg\"?"}},
       {"diameter = 40", "radius = 20", "27:40", {"unknown key \"radius\" in round_mm"}},
       {"through", "trough", "52:1", {"[[opening]]", "did you mean \"through\"?"}},
       {"neutral =", "netural =", "37:1", {"[[three_phase]]", "did you mean \"neutral\"?"}},
       {"limit_from", "limit_form", "59:1", {"[[probe]]", "did you mean \"limit_from\"?"}},
       {"return", "retrun", "74:1", {"[[loop]]", "did you mean \"return\"?"}},
       {"reach", "reech", "78:1", {"[grid]", "did you mean \"reach\"?"}},
       {"material = \"trunking\"", "current_a = 4", "18:1", {"\"current_a\" in [[wall]]"}}});
}

TEST_CASE("Missing keys are refused at the header of their table") {
  check_faults(
      {{"name = \"L1\"\n", "", "12:1", {"[[bar]] has no name"}},
       {"name = \"trunking\"\n", "", "16:1", {"[[wall]] has no name"}},
       {"material = \"trunking\"\n", "", "16:1", {"[[wall]] has no material"}},
       {"relative_permeability = 600\n",
        "",
        "9:1",
        {"[material.trunking] needs one of relative_permeability"}},
       {"round_mm = { centre = [\"pitch_mm\", 0], diameter = 40 }\n",
        "",
        "25:1",
        {"[[bar]] needs one of rectangle_mm, round_mm, tube_mm, frame_mm, polygon_mm"}},
       {"size = [8, 80] }", "turn_deg = 1 }", "23:16", {"rectangle_mm has no size"}},
       {"centre = [0, 0], outer", "outer", "19:12", {"frame_mm needs one of centre, centres"}},
       {", diameter = 40", "", "27:12", {"round_mm has no diameter"}},
       {", thickness = 2", "", "42:11", {"tube_mm has no thickness"}},
       {"through = [\"trunking\"]\n", "", "50:1", {"[[opening]] has no through"}},
       {"bars = [\"L1\", \"L2\", \"L3\"]\n", "", "34:1", {"[[three_phase]] has no bars"}},
       {"current_a = 1000\n", "", "34:1", {"[[three_phase]] has no current_a"}},
       {"at_mm = [0, 95]\n", "", "55:1", {"[[probe]] needs a place", "at_mm"}},
       {"to_mm = [1000, 1000]\n", "", "61:1", {"[[probe]] has no to_mm"}},
       {"points = 101\n", "", "61:1", {"[[probe]] has no points"}},
       {"return = [\"L2\", \"L3\"]\n", "", "71:1", {"[[loop]] has no return"}},
       {"limit_from = \"the limit's own source\"\n", "", "55:1", {"limit_ut without limit_from"}}});
}

TEST_CASE("Repeated keys and names are refused") {
  check_faults(
      {{"run_length_m = 3", "run_length_m = 3\nrun_length_m = 4", "4:16", {"run_length_m"}},
       {"name = \"L2\"", "name = \"L1\"", "22:8", {"the name \"L1\" is taken"}},
       {"name = \"gland slot\"",
        "name = \"trunking\"",
        "51:8",
        {"\"trunking\" is taken", "bars, walls and openings together"}},
       {"name = \"office side\"",
        "name = \"sensor\"",
        "62:8",
        {"\"sensor\" is taken", "unique among probes"}},
       {"[grid]",
        "[[loop]]\nname = \"pair\"\n[grid]",
        "77:8",
        {"\"pair\" is taken", "unique among loops"}},
       {"through = [\"trunking\"]",
        "through = [\"trunking\", \"trunking\"]",
        "52:24",
        {"names \"trunking\" twice"}},
       {"[grid]", "[given]", "76:1", {"given"}}});
}

TEST_CASE("Names are 1 to 60 characters without a slash") {
  const std::string sixty_one = "name = \"" + std::string(61, 'x') + "\"";
  check_faults(
      {{"name = \"L1\"", "name = \"\"", "13:8", {"1 to 60 characters"}},
       {"name = \"L1\"", "name = \"L/1\"", "13:8", {"\"L/1\"", "\"/\""}},
       {"name = \"L1\"", sixty_one.c_str(), "13:8", {"(61 characters)"}},
       {"name = \"L1\"", "name = \"L\\n1\"", "13:8", {"control character"}},
       {"name = \"sensor\"", "name = \"a/b\"", "56:8", {"\"a/b\""}},
       {"name = \"pair\"", "name = \"a/b\"", "72:8", {"\"a/b\""}},
       {"[material.trunking]", "[material.\"a/b\"]", "9:11", {"\"a/b\""}},
       {"name = \"L1\"", "name = 7", "13:8", {"name is a number (7); it must be a string"}}});
}

TEST_CASE("Wrong types are refused") {
  check_faults(
      {{"title = \"Three flat bars in a trunking\"",
        "title = 3",
        "1:9",
        {"title is a number (3); it must be a string"}},
       {"run_length_m = 3", "run_length_m = true", "3:16", {"true or false", "a number"}},
       {"run_length_m = 3", "run_length_m = 2020-01-01", "3:16", {"a date", "a number"}},
       {"run_length_m = 3", "run_length_m = [3]", "3:16", {"an array", "a number"}},
       {"size = [8, 80], turn", "size = 8, turn", "14:52", {"size is 8", "a pair of numbers"}},
       {"size = [8, 80], turn", "size = [8], turn", "14:52", {"an array of 1"}},
       {"centre = [0, 0], outer", "centre = [0, 0, 0], outer", "19:23", {"an array of 3"}},
       {"centre = [0, 0], outer", "centre = [0, [0]], outer", "19:27", {"an array"}},
       {"through = [\"trunking\"]", "through = \"trunking\"", "52:11", {"must be an array"}},
       {"through = [\"trunking\"]", "through = []", "52:11", {"names nothing"}},
       {"go = [\"L1\"]", "go = [1]", "73:7", {"go is a number (1); it must be a string"}},
       {"round_mm = {", "round_mm = 4 #", "27:12", {"round_mm is 4; it must be a table"}}});
}

TEST_CASE("Tables that must be lists of tables, or tables, are refused otherwise") {
  CHECK_THAT(fault_of("bar = 3\n"),
             Catch::Contains("case.toml:1:1: bar is a number; write [[bar]]"));
  CHECK_THAT(fault_of("[bar]\nname = \"A\"\n"),
             Catch::Contains("case.toml:1:1: bar is a single table; write [[bar]]"));
  CHECK_THAT(fault_of("bar = [3]\n"), Catch::Contains("case.toml:1:8: [[bar]] is 3"));
  CHECK_THAT(fault_of("grid = 3\n" + one_bar), Catch::Contains("case.toml:1:8: [grid] is 3"));
  CHECK_THAT(fault_of("given = 3\n" + one_bar),
             Catch::Contains("case.toml:1:9: given is a number"));
  CHECK_THAT(fault_of("material = 3\n" + one_bar), Catch::Contains("case.toml:1:12: material is"));
  CHECK_THAT(fault_of("material.x = 3\n" + one_bar),
             Catch::Contains("case.toml:1:14: [material.x] is 3; it must be a table"));
}
