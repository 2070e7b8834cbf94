#include <catch2/catch.hpp>

#include <cmath>
#include <numbers>

#include "io/sha256.hpp"
#include "tests/io/case_support.hpp"

using namespace barwall;
using io::Case;
using mesh::Part;
using test::edited;
using test::one_bar;
using test::read_text;
using test::whole_case;

namespace {

template <class Form>
Form only_form(const std::string& shape) {
  const Case read = read_text("[[bar]]\nname = \"A\"\ncurrent_a = 1\n" + shape + "\n");
  REQUIRE(read.section.parts.size() == 1);
  REQUIRE(read.section.parts[0].pieces.size() == 1);
  return std::get<Form>(read.section.parts[0].pieces[0]);
}

}  // namespace

TEST_CASE("A case file is read whole, its parts in the order of the file") {
  const Case read = read_text(whole_case);
  CHECK(read.name == "case");
  CHECK(read.title == "Three flat bars in a trunking");
  CHECK(read.sha256 == io::sha256(whole_case));
  CHECK(read.run_length_m == 3.0);
  CHECK(read.excitation.frequency_hz == 50.0);
  CHECK(read.given ==
        std::vector<std::pair<std::string, double>>{{"pitch_mm", 60.0}, {"half_mm", 30.0}});
  std::vector<std::string> names;
  for (const Part& part : read.section.parts) names.push_back(part.name);
  CHECK(names == std::vector<std::string>{"L1", "trunking", "L2", "L3", "N", "earth", "aux"});
  CHECK(read.section.parts[0].kind == Part::Kind::bar);
  CHECK(read.section.parts[1].kind == Part::Kind::wall);
  CHECK(read.section.parts[4].pieces.size() == 2);
  REQUIRE(read.materials.size() == 7);
  CHECK(read.materials[0].name == "copper");
  CHECK(read.materials[1].relative_permeability == 600.0);
  CHECK(read.materials[4].name == "aluminium");
  REQUIRE(read.section.openings.size() == 1);
  CHECK(read.section.openings[0].name == "gland slot");
  CHECK(read.section.openings[0].through == std::vector<int>{1});
  CHECK(read.grid.cells_across == 6);
  CHECK(read.grid.cells_across_given);
  CHECK(read.grid.reach == 300.0);
  CHECK(read.grid_place.substr(read.grid_place.size() - 5) == ":76:1");
}

TEST_CASE("Each shape is read in metres and radians") {
  const auto r = only_form<mesh::Rectangle>(
      "rectangle_mm = { centre = [1, -2.5], size = [8, 80], turn_deg = 30 }");
  CHECK(r.centre == mesh::Point{0.001, -0.0025});
  CHECK(r.width == 0.008);
  CHECK(r.height == 0.08);
  CHECK(r.turn == Approx(std::numbers::pi / 6.0).epsilon(1e-15));
  const auto c = only_form<mesh::Round>("round_mm = { centre = [3, 4], diameter = 40 }");
  CHECK(c.centre == mesh::Point{0.003, 0.004});
  CHECK(c.diameter == 0.04);
  const auto t =
      only_form<mesh::Tube>("tube_mm = { centre = [0, 0], outer_diameter = 40, thickness = 5 }");
  CHECK(t.outer_diameter == 0.04);
  CHECK(t.thickness == 0.005);
  const auto f = only_form<mesh::Frame>(
      "frame_mm = { centre = [0, 0], outer = [320, 220], thickness = 3, turn_deg = -10 }");
  CHECK(f.width == 0.32);
  CHECK(f.height == 0.22);
  CHECK(f.thickness == 0.003);
  CHECK(f.turn == Approx(-std::numbers::pi / 18.0).epsilon(1e-15));
  const auto p = only_form<mesh::Polygon>("polygon_mm = [[0, 0], [10, 0], [0, 5]]");
  CHECK(p.corners == std::vector<mesh::Point>{{0, 0}, {0.01, 0}, {0, 0.005}});
}

TEST_CASE("A quarter turn leaves a rectangle exactly parallel to the axes") {
  for (const char* turn : {"90", "-90", "270", "\"360/4\""}) {
    const auto r = only_form<mesh::Rectangle>(
        std::string("rectangle_mm = { centre = [0, 0], size = [8, 80], turn_deg = ") + turn + " }");
    CHECK(r.turn == 0.0);
    CHECK(r.width == 0.08);
    CHECK(r.height == 0.008);
  }
  const auto half = only_form<mesh::Rectangle>(
      "rectangle_mm = { centre = [0, 0], size = [8, 80], turn_deg = 180 }");
  CHECK(half.turn == 0.0);
  CHECK(half.width == 0.008);
}

TEST_CASE("A large turn is the same rectangle as the small one") {
  const auto r = only_form<mesh::Rectangle>(
      "rectangle_mm = { centre = [0, 0], size = [8, 80], turn_deg = 120 }");
  const mesh::Rectangle expected{{0, 0}, 0.008, 0.08, 2.0 * std::numbers::pi / 3.0};
  for (const mesh::Point point :
       {mesh::Point{0.03, 0.016}, {0.03, -0.016}, {-0.03, 0.016}, {0.0, 0.03}, {0.002, 0.001}}) {
    CHECK(contains(r, point) == contains(expected, point));
  }
}

TEST_CASE("A shape with centres is repeated as pieces of one part") {
  const Case read = read_text(
      "[[bar]]\nname = \"A\"\ncurrent_a = 1\n"
      "tube_mm = { centres = [[0, 0], [50, 0], [100, 0]], outer_diameter = 40, thickness = 5 }\n");
  REQUIRE(read.section.parts[0].pieces.size() == 3);
  CHECK(centroid(read.section.parts[0].pieces[2]) == mesh::Point{0.1, 0.0});
}

TEST_CASE("Expressions stand wherever a number may, and --set replaces what they use") {
  const std::string text =
      "frequency_hz = \"f\"\nrun_length_m = \"2*n\"\n"
      "[given]\nf = 50\nn = 4\nw = \"n*2\"\n"
      "[material.m]\nrelative_permeability = \"100*n\"\n"
      "[[bar]]\nname = \"A\"\ncurrent_a = \"1000*sqrt(n)\"\nphase_deg = \"45*n\"\n"
      "rectangle_mm = { centre = [\"-w\", \"w/2\"], size = [\"w\", 80], turn_deg = \"n-4\" }\n"
      "[[probe]]\nname = \"p\"\nfrom_mm = [\"w\", 0]\nto_mm = [\"10*w\", 0]\npoints = \"n+1\"\n"
      "limit_ut = \"25*w\"\nlimit_from = \"w\"\n"
      "[grid]\ncells_across = \"n\"\nreach = \"100*n\"\n";
  const Case read = read_text(text);
  CHECK(read.excitation.frequency_hz == 50.0);
  CHECK(read.run_length_m == 8.0);
  CHECK(read.excitation.current[0] == std::complex<double>(-2000.0, 0.0));
  const auto& r = std::get<mesh::Rectangle>(read.section.parts[0].pieces[0]);
  CHECK(r.centre == mesh::Point{-0.008, 0.004});
  CHECK(r.width == 0.008);
  CHECK(read.probes[0].points == 5);
  CHECK(read.probes[0].limit_t.value() == Approx(200e-6).epsilon(1e-15));
  CHECK(read.probes[0].limit_from == "w");
  CHECK(read.grid.cells_across == 4);

  const Case set = read_text(text, {{"n", "2 + 6"}});
  CHECK(set.given ==
        std::vector<std::pair<std::string, double>>{{"f", 50.0}, {"n", 8.0}, {"w", 16.0}});
  CHECK(std::get<mesh::Rectangle>(set.section.parts[0].pieces[0]).width == 0.016);
  CHECK(set.sha256 != read.sha256);
  const Case both = read_text(text, {{"n", "8"}, {"f", "60"}});
  CHECK(both.sha256 == read_text(text, {{"f", "60"}, {"n", "8"}}).sha256);
  CHECK(read_text(text, {{"w", "n*3"}}).given[2].second == 12.0);
}

TEST_CASE("A three-phase circuit runs at 0, -120 and +120 degrees and needs no neutral current") {
  const Case read = read_text(whole_case);
  const auto& current = read.excitation.current;
  const double height = 500.0 * std::sqrt(3.0);
  CHECK(current[0] == std::complex<double>(1000.0, 0.0));
  CHECK(current[2].real() == -500.0);
  CHECK(current[2].imag() == Approx(-height).epsilon(1e-15));
  CHECK(current[3].real() == -500.0);
  CHECK(current[3].imag() == Approx(height).epsilon(1e-15));
  CHECK(current[4] == std::complex<double>(0.0, 0.0));
  REQUIRE(read.circuits.size() == 1);
  CHECK(read.circuits[0].bars == std::vector<int>{0, 2, 3});
  CHECK(read.circuits[0].neutral == 4);
}

TEST_CASE("The balance bar carries minus the phasor sum of all others") {
  const Case read = read_text(whole_case);
  const std::complex<double> aux = read.excitation.current[6];
  CHECK(aux.real() == Approx(10.0 * std::sqrt(0.75)).epsilon(1e-15));
  CHECK(aux.imag() == 5.0);
  CHECK(std::abs(read.excitation.current[5] + aux) < 1e-13 * 1000.0);
  CHECK(read.excitation.current[1] == std::complex<double>(0.0, 0.0));

  const Case steady = read_text(one_bar +
                                "[[bar]]\nname = \"B\"\ncurrent_a = \"balance\"\n"
                                "round_mm = { centre = [50, 0], diameter = 10 }\n"
                                "[[bar]]\nname = \"C\"\ncurrent_a = -30\n"
                                "round_mm = { centre = [80, 0], diameter = 10 }\n");
  CHECK_FALSE(steady.excitation.alternating());
  CHECK(steady.excitation.current[1] == std::complex<double>(-70.0, 0.0));
}

TEST_CASE("Walls of air are empty, other walls without magnetism are parts like any other") {
  const Case read = read_text(one_bar +
                              "[[wall]]\nname = \"slot\"\nmaterial = \"air\"\n"
                              "rectangle_mm = { centre = [100, 0], size = [10, 10] }\n"
                              "[[wall]]\nname = \"plate\"\nmaterial = \"stainless\"\n"
                              "rectangle_mm = { centre = [200, 0], size = [10, 10] }\n"
                              "[[wall]]\nname = \"steel\"\nmaterial = \"steel\"\n"
                              "rectangle_mm = { centre = [300, 0], size = [10, 10] }\n"
                              "[material.steel]\nrelative_permeability = 1000\n");
  const auto& parts = read.section.parts;
  CHECK(parts[1].empty);
  CHECK_FALSE(parts[2].empty);
  CHECK_FALSE(parts[3].empty);
  CHECK_FALSE(parts[0].sharp_corners);
  CHECK_FALSE(parts[2].sharp_corners);
  CHECK(parts[3].sharp_corners);
}

TEST_CASE("Names may have 60 characters of any alphabet") {
  std::string name;
  for (int k = 0; k < 60; ++k) name += "\xc3\xa9";
  const Case read = read_text(edited(one_bar, "\"A\"", "\"" + name + "\""));
  CHECK(read.section.parts[0].name == name);
}

TEST_CASE("Tables may be written in line, with a byte order mark and with Windows line ends") {
  const Case read = read_text(
      "\xef\xbb\xbf"
      "bar = [{ name = \"A\", current_a = 1, round_mm = { centre = [0, 0], diameter = 5 } }]\r\n"
      "grid.reach = 50\r\n");
  CHECK(read.section.parts.size() == 1);
  CHECK(read.grid.reach == 50.0);
}

TEST_CASE("Bars may touch each other and the walls' openings and holes") {
  CHECK_NOTHROW(read_text(one_bar +
                          "[[bar]]\nname = \"B\"\ncurrent_a = 1\n"
                          "rectangle_mm = { centre = [8, 0], size = [8, 80] }\n"
                          "[[wall]]\nname = \"w\"\nmaterial = \"stainless\"\n"
                          "frame_mm = { centre = [4, 0], outer = [20, 84], thickness = 2 }\n"));
}

TEST_CASE("A bar may pass through an opening of a wall, or where air is painted over it") {
  const std::string plate =
      "[[wall]]\nname = \"plate\"\nmaterial = \"brass\"\n"
      "rectangle_mm = { centre = [0, 0], size = [200, 6] }\n";
  CHECK_THROWS_AS(read_text(one_bar + plate), io::InputError);
  CHECK_NOTHROW(read_text(one_bar + plate +
                          "[[opening]]\nname = \"o\"\nthrough = [\"plate\"]\n"
                          "rectangle_mm = { centre = [0, 0], size = [8, 10] }\n"));
  CHECK_NOTHROW(read_text(one_bar + plate +
                          "[[wall]]\nname = \"gap\"\nmaterial = \"air\"\n"
                          "round_mm = { centre = [0, 0], diameter = 12 }\n"));
  // Two openings side by side, each too narrow alone.
  CHECK_NOTHROW(read_text(one_bar + plate +
                          "[[opening]]\nname = \"o\"\nthrough = [\"plate\"]\n"
                          "rectangle_mm = { centres = [[-2, 0], [2, 0]], size = [4, 10] }\n"));
}
