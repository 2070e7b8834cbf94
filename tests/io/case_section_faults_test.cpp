#include <catch2/catch.hpp>

#include "tests/io/case_faults.hpp"

using namespace barwall;
using test::check_faults;
using test::edited;
using test::fault_of;
using test::one_bar;

TEST_CASE("A thickness that leaves no hole is refused") {
  check_faults({{"outer = [320, 220], thickness = 3",
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
  check_faults(
      {{sound, "[[0, 80], [5, 80]]", "48:14", {"2 corners", "3 to 10000"}},
       {sound, "[[0, 80], [5, 80], [10, 80]]", "48:14", {"has no area"}},
       {sound, "[[0, 80], [5, 85], [5, 80], [0, 85]]", "48:14", {"crosses or touches itself"}},
       {sound, "[[0, 80], [5, 80], [5, 85], [0, 80]]", "48:14", {"coincident corners: 4 and 1"}},
       {sound, "{ centre = [0, 0] }", "48:14", {"must be an array"}},
       {sound, "[[0, 80], [5], [5, 85]]", "48:24", {"a pair of numbers"}}});
}

TEST_CASE("A part has one shape, a shape one place") {
  check_faults(
      {{"round_mm = {",
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
  check_faults({{"centre = [0, 0], size = [8, 80] }",
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
