#include <catch2/catch.hpp>

#include "tests/io/case_support.hpp"

using namespace barwall;
using test::edited;
using test::fault_of;
using test::one_bar;
using test::whole_case;

namespace {

/// The case of every table with one thing changed, and what the message must say.
struct Fault {
  const char* from;
  const char* to;
  const char* place;  ///< LINE:COLUMN
  std::vector<const char*> said;
};

void check(const std::vector<Fault>& faults) {
  REQUIRE(fault_of(whole_case) == "none");
  for (const Fault& fault : faults) {
    const std::string text = edited(whole_case, fault.from, fault.to);
    INFO("from: " << fault.from << "\n  to: " << fault.to);
    REQUIRE_FALSE(text.empty());
    const std::string message = fault_of(text);
    CHECK_THAT(message, Catch::StartsWith(std::string("case.toml:") + fault.place + ": "));
    for (const char* said : fault.said) CHECK_THAT(message, Catch::Contains(said));
  }
}

}  // namespace

TEST_CASE("What is no TOML is refused where it stands") {
  check({{"run_length_m = 3", "run_length_m = ", "3:16", {"not valid TOML"}},
         {"run_length_m = 3", "run_length_m = 3 4", "3:18", {"not valid TOML"}},
         {"[given]", "[given", "5:7", {"not valid TOML"}},
         {"title = \"Three", "title = \"\xff", "1:9", {"not valid TOML", "utf-8"}},
         {"run_length_m = 3", "run_length_m = 99999999999999999999", "3:36", {"not valid TOML"}}});
}

TEST_CASE("Unknown keys are refused with the nearest") {
  check({{"run_length_m",
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
  check(
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
  check({{"run_length_m = 3", "run_length_m = 3\nrun_length_m = 4", "4:16", {"run_length_m"}},
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
  check({{"name = \"L1\"", "name = \"\"", "13:8", {"1 to 60 characters"}},
         {"name = \"L1\"", "name = \"L/1\"", "13:8", {"\"L/1\"", "\"/\""}},
         {"name = \"L1\"", sixty_one.c_str(), "13:8", {"(61 characters)"}},
         {"name = \"L1\"", "name = \"L\\n1\"", "13:8", {"control character"}},
         {"name = \"sensor\"", "name = \"a/b\"", "56:8", {"\"a/b\""}},
         {"name = \"pair\"", "name = \"a/b\"", "72:8", {"\"a/b\""}},
         {"[material.trunking]", "[material.\"a/b\"]", "9:11", {"\"a/b\""}},
         {"name = \"L1\"", "name = 7", "13:8", {"name is a number (7); it must be a string"}}});
}

TEST_CASE("Wrong types are refused") {
  check({{"title = \"Three flat bars in a trunking\"",
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

TEST_CASE("Numbers out of range are refused with what is allowed") {
  check({{"frequency_hz = 50", "frequency_hz = 0", "2:16", {"0 Hz", "greater than 0 Hz"}},
         {"frequency_hz = 50", "frequency_hz = -50", "2:16", {"-50 Hz"}},
         {"frequency_hz = 50", "frequency_hz = nan", "2:16", {"nan", "a finite number"}},
         {"frequency_hz = 50", "frequency_hz = -inf", "2:16", {"-inf", "a finite number"}},
         {"run_length_m = 3", "run_length_m = 0.0", "3:16", {"0 m", "greater than 0 m"}},
         {"relative_permeability = 600",
          "relative_permeability = 0.5",
          "10:25",
          {"0.5", "at least 1"}},
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
  check({{"centre = [\"-pitch_mm\", 0]",
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
  check(
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
  check({{"[material.trunking]", "[material.copper]", "9:11", {"\"copper\" exists already"}},
         {"relative_permeability = 600",
          "relative_permeability = 600\nbh_curve = \"x.csv\"",
          "11:1",
          {"relative_permeability and bh_curve", "only one"}},
         {"relative_permeability = 600",
          "bh_points = [[0, 0], [200, 0.5]]",
          "10:1",
          {"B-H tables are not supported yet"}},
         {"relative_permeability = 600",
          "bh_curve = \"x.csv\"",
          "10:1",
          {"B-H tables are not supported yet"}}});
}

TEST_CASE("A current given twice, not at all or against the frequency is refused") {
  check(
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

TEST_CASE("A thickness that leaves no hole is refused") {
  check({{"outer = [320, 220], thickness = 3",
          "outer = [320, 220], thickness = 110",
          "19:63",
          {"thickness is 110 mm", "no hole", "less than 110 mm"}},
         {"outer_diameter = 20, thickness = 2",
          "outer_diameter = 20, thickness = 12",
          "42:65",
          {"thickness is 12 mm", "no hole"}}});
}

TEST_CASE("Polygons that are no shapes are refused") {
  const char* sound = "[[-150, -100], [-140, -100], [-145, -90]]";
  check({{sound, "[[0, 80], [5, 80]]", "48:14", {"2 corners", "3 to 10000"}},
         {sound, "[[0, 80], [5, 80], [10, 80]]", "48:14", {"has no area"}},
         {sound, "[[0, 80], [5, 85], [5, 80], [0, 85]]", "48:14", {"crosses or touches itself"}},
         {sound, "[[0, 80], [5, 80], [5, 85], [0, 80]]", "48:14", {"coincident corners: 4 and 1"}},
         {sound, "{ centre = [0, 0] }", "48:14", {"must be an array"}},
         {sound, "[[0, 80], [5], [5, 85]]", "48:24", {"a pair of numbers"}}});
}

TEST_CASE("A part has one shape, a shape one place") {
  check({{"round_mm = {",
          "polygon_mm = [[0, 0], [1, 0], [0, 1]]\nround_mm = {",
          "28:1",
          {"polygon_mm and round_mm", "only one"}},
         {"diameter = 40",
          "diameter = 40, centres = [[0, 0]]",
          "27:55",
          {"centre and centres", "only one"}},
         {"centres = [[-108, 0], [-92, 0]]", "centres = []", "32:28", {"0 points"}},
         {"distance_mm = 1000",
          "distance_mm = 1000\nat_mm = [0, 0]",
          "69:1",
          {"distance_mm does not go with at_mm"}},
         {"at_mm = [0, 95]", "at_mm = [0, 95]\npoints = 5", "58:1", {"points", "at_mm"}},
         {"to_mm = [1000, 1000]", "to_mm = [-1000, 1000]", "64:9", {"same point as from_mm"}},
         {"limit_ut = 200\n", "", "58:1", {"limit_from without limit_ut"}}});
}

TEST_CASE("Overlaps that are not allowed are refused with the parts' names") {
  check({{"centre = [0, 0], size = [8, 80] }",
          "centre = [-55, 0], size = [8, 80] }",
          "23:16",
          {"bar \"L2\" overlaps bar \"L1\"", "near (", "may touch"}},
         {"centres = [[-108, 0], [-92, 0]]",
          "centres = [[-98, 0], [-93, 0]]",
          "32:16",
          {"pieces 1 and 2 of bar \"N\" overlap"}},
         {"tube_mm = { centre = [120, 0]",
          "tube_mm = { centre = [150, 0]",
          "42:11",
          {"bar \"earth\" overlaps wall \"trunking\""}},
         {"tube_mm = { centre = [120, 0]",
          "tube_mm = { centre = [77, 0]",
          "42:11",
          {"bar \"earth\" overlaps bar \"L3\""}},
         {"round_mm = { centre = [\"pitch_mm\", 0], diameter = 40 }",
          "round_mm = { centre = [\"pitch_mm\", 0], diameter = 102 }",
          "42:11",
          {"bar \"earth\" overlaps bar \"L3\""}},
         {"[[-150, -100], [-140, -100], [-145, -90]]",
          "[[30, 100], [60, 100], [45, 109]]",
          "48:14",
          {"bar \"aux\" overlaps wall \"trunking\""}}});
}

TEST_CASE("A bar in an opening that is too small for it overlaps the wall") {
  const std::string plate =
      "[[wall]]\nname = \"plate\"\nmaterial = \"brass\"\n"
      "rectangle_mm = { centre = [0, 0], size = [200, 6] }\n"
      "[[opening]]\nname = \"o\"\nthrough = [\"plate\"]\n";
  const auto with = [&](const std::string& shape) {
    return fault_of(one_bar + plate + shape + "\n");
  };
  CHECK(with("rectangle_mm = { centre = [0, 0], size = [8, 6] }") == "none");
  CHECK_THAT(with("rectangle_mm = { centre = [0, 0], size = [7.9999, 6] }"),
             Catch::StartsWith("case.toml:4:16: bar \"A\" overlaps wall \"plate\" near ("));
  CHECK_THAT(with("rectangle_mm = { centre = [0, 0], size = [8, 5.9] }"),
             Catch::Contains("bar \"A\" overlaps wall \"plate\""));
  CHECK(with("round_mm = { centre = [0, 0], diameter = 10 }") == "none");
  CHECK_THAT(with("round_mm = { centre = [0, 0], diameter = 9.9 }"),
             Catch::Contains("bar \"A\" overlaps wall \"plate\""));
  // An opening through another wall does not help.
  CHECK_THAT(fault_of(one_bar + edited(plate, "through = [\"plate\"]", "through = [\"other\"]") +
                      "rectangle_mm = { centre = [0, 0], size = [8, 6] }\n"
                      "[[wall]]\nname = \"other\"\nmaterial = \"brass\"\n"
                      "rectangle_mm = { centre = [500, 0], size = [8, 6] }\n"),
             Catch::Contains("bar \"A\" overlaps wall \"plate\""));
  // Steel painted over the air again is in the way.
  CHECK_THAT(fault_of(one_bar + "[[wall]]\nname = \"gap\"\nmaterial = \"air\"\n"
                                "round_mm = { centre = [0, 0], diameter = 100 }\n"
                                "[[wall]]\nname = \"rib\"\nmaterial = \"brass\"\n"
                                "round_mm = { centre = [0, 0], diameter = 2 }\n"),
             Catch::Contains("bar \"A\" overlaps wall \"rib\""));
}

TEST_CASE("A case without bars is refused") {
  CHECK(fault_of("") == "case.toml:1:1: the case has no [[bar]]; it needs at least one");
  CHECK_THAT(fault_of("title = \"x\"\n"), Catch::Contains("no [[bar]]"));
}

TEST_CASE("What is no readable plain file is refused") {
  const test::ScratchFolder folder;
  const auto message = [](const std::filesystem::path& path) {
    try {
      io::read_case(path);
    } catch (const io::InputError& error) {
      return std::string(error.what());
    }
    return std::string("none");
  };
  const std::string folder_name = folder.path().string();
  CHECK(message(folder.path() / "missing.toml") == folder_name + "/missing.toml:1:1: no such file");
  CHECK_THAT(message(folder.path()), Catch::Contains("this is a folder"));
  CHECK_THAT(message("/dev/zero"), Catch::Contains("no plain file"));
  CHECK_THAT(message(folder.write("huge.toml", std::string(11'000'000, '#'))),
             Catch::Contains("too large"));
  CHECK_THAT(message(folder.write("binary.toml", std::string("\0\x01\x02", 3))),
             Catch::Contains("not valid TOML"));
}

TEST_CASE("Bounds keep the work on any input small") {
  using Catch::Contains;
  // Keys of many parts, which a parser would nest without end.
  std::string dotted = "a";
  for (int k = 0; k < 100'000; ++k) dotted += ".a";
  CHECK_THAT(fault_of(dotted + " = 1\n"), Contains("more than 32 parts"));
  CHECK_THAT(fault_of("[" + dotted + "]\n"), Contains("more than 32 parts"));
  CHECK_THAT(fault_of("x = " + std::string(100'000, '[')), Contains("not valid TOML"));
  CHECK(fault_of("# " + std::string(1000, '.') + "\n" + one_bar) == "none");
  CHECK(fault_of("title = '" + std::string(1000, '.') + "'\n" + one_bar) == "none");

  std::string many = "[[bar]]\nname = \"A\"\ncurrent_a = 1\nround_mm = { centres = [";
  for (int k = 0; k < 10'001; ++k) many.append("[").append(std::to_string(k)).append(", 0],");
  CHECK_THAT(fault_of(many + "], diameter = 1 }\n"), Contains("10001 points"));

  std::string probes = one_bar;
  for (int k = 0; k < 11; ++k) {
    probes += "[[probe]]\nname = \"" + std::to_string(k) + "\"\ndistance_mm = 5\npoints = 100000\n";
  }
  CHECK_THAT(fault_of(probes), Contains("1000000 points of all probes"));
}

TEST_CASE("Intricate sections end the test for overlaps with a message") {
  // Two combs of thousands of teeth, one turned by a quarter over the other, both in brass that
  // a sheet of air covers: nothing is wrong but the number of crossings.
  const auto comb = [](const std::string& name, bool upright) {
    std::string text = "[[wall]]\nname = \"" + name + "\"\nmaterial = \"brass\"\npolygon_mm = [";
    const auto add = [&](double a, double b) {
      text.append("[").append(std::to_string(upright ? a : b)).append(",");
      text.append(std::to_string(upright ? b : a)).append("],");
    };
    add(-1, -1);
    add(1001, -1);
    for (int k = 1000; k > 0; --k) {
      for (const double step : {0.0, -0.5}) {
        add(k + step, step == 0.0 ? 0 : 1000);
        add(k + step, step == 0.0 ? 1000 : 0);
      }
    }
    add(-1, 0);
    return text + "]\n";
  };
  const std::string text =
      "[[bar]]\nname = \"A\"\ncurrent_a = 1\n"
      "rectangle_mm = { centre = [500, 500], size = [900, 900] }\n" +
      comb("first", true) + comb("second", false) +
      "[[wall]]\nname = \"sheet\"\nmaterial = \"air\"\n"
      "rectangle_mm = { centre = [500, 500], size = [2000, 2000] }\n";
  CHECK_THAT(fault_of(text), Catch::Contains("too intricate"));
}
