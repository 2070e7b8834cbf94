#include <catch2/catch.hpp>

#include "tests/io/case_support.hpp"

using namespace barwall;
using io::Case;
using io::ProbeRequest;
using test::edited;
using test::one_bar;
using test::read_text;
using test::whole_case;

TEST_CASE("Probes are points, lines and lines around") {
  const Case read = read_text(whole_case);
  REQUIRE(read.probes.size() == 3);
  CHECK(read.probes[0].kind == ProbeRequest::Kind::point);
  CHECK(read.probes[0].at == mesh::Point{0.0, 0.095});
  CHECK(read.probes[0].limit_t.value() == Approx(200e-6).epsilon(1e-15));
  CHECK(read.probes[0].limit_from == "the limit's own source");
  CHECK(read.probes[1].kind == ProbeRequest::Kind::line);
  CHECK(read.probes[1].from == mesh::Point{-1.0, 1.0});
  CHECK(read.probes[1].to == mesh::Point{1.0, 1.0});
  CHECK(read.probes[1].points == 101);
  CHECK_FALSE(read.probes[1].limit_t.has_value());
  CHECK(read.probes[2].kind == ProbeRequest::Kind::around);
  CHECK(read.probes[2].clearance == 1.0);
  CHECK(read.probes[2].points == 181);
  const Case finer =
      read_text(edited(whole_case, "distance_mm = 1000", "distance_mm = 1000\npoints = 721"));
  CHECK(finer.probes[2].points == 721);
}

TEST_CASE("Without probes the lines at 200 mm and 1000 mm are asked for") {
  const Case read = read_text(one_bar);
  REQUIRE(read.probes.size() == 2);
  CHECK(read.probes[0].name == "200 mm around");
  CHECK(read.probes[0].kind == ProbeRequest::Kind::around);
  CHECK(read.probes[0].clearance == 0.2);
  CHECK(read.probes[0].points == 181);
  CHECK(read.probes[1].name == "1000 mm around");
  CHECK(read.probes[1].clearance == 1.0);
}

TEST_CASE("A case without title, grid and loops has defaults") {
  const Case read = read_text(one_bar);
  CHECK(read.title == "case");
  CHECK_FALSE(read.run_length_m.has_value());
  CHECK(read.grid.cells_across == 4);
  CHECK_FALSE(read.grid.cells_across_given);
  CHECK(read.grid.reach == 400.0);
  CHECK(read.loops.empty());
}

TEST_CASE("Loops are read with their sides, and default to every pair of up to 10 bars") {
  const Case given = read_text(whole_case);
  REQUIRE(given.loops.size() == 1);
  CHECK(given.loops[0].name == "pair");
  CHECK(given.loops[0].go == std::vector<int>{0});
  CHECK(given.loops[0].back == std::vector<int>{2, 3});

  const auto row = [](int bars) {
    std::string text;
    for (int k = 0; k < bars; ++k) {
      text += "[[bar]]\nname = \"" + std::to_string(k) +
              "\"\ncurrent_a = 1\nround_mm = { centre = [" + std::to_string(20 * k) +
              ", 0], diameter = 20 }\n";
    }
    return text;
  };
  const Case three = read_text(row(3));
  REQUIRE(three.loops.size() == 3);
  CHECK(three.loops[0].name == "0-1");
  CHECK(three.loops[1].name == "0-2");
  CHECK(three.loops[2].name == "1-2");
  CHECK(three.loops[2].go == std::vector<int>{1});
  CHECK(three.loops[2].back == std::vector<int>{2});
  CHECK(read_text(row(10)).loops.size() == 45);
  CHECK(read_text(row(11)).loops.empty());
}

TEST_CASE("Default loops keep names of their own where bars' names run together") {
  std::string text;
  int x = 0;
  for (const char* name : {"A", "A-B", "B-C", "C"}) {
    text += std::string("[[bar]]\nname = \"") + name +
            "\"\ncurrent_a = 1\nround_mm = { centre = [" + std::to_string(x += 20) +
            ", 0], diameter = 10 }\n";
  }
  const Case read = read_text(text);
  REQUIRE(read.loops.size() == 6);
  CHECK(read.loops[1].name == "A-B-C");
  CHECK(read.loops[4].name == "A-B-C (2)");
}
