#include <algorithm>
#include <array>
#include <catch2/catch.hpp>
#include <cmath>
#include <numbers>
#include <set>

#include "io/vtk_export.hpp"
#include "mesh/sampling.hpp"
#include "solver/constants.hpp"
#include "tests/io/vtk_support.hpp"

namespace barwall {
namespace {

using mesh::Point;
using test::FileArray;
using test::VtkFile;

VtkFile near_file(const io::Results& results) {
  return test::read_vtk(test::folder_of(results) / "field.vtu");
}
VtkFile far_file(const io::Results& results) {
  return test::read_vtk(test::folder_of(results) / "field_far.vtu");
}

using Corners = std::array<std::pair<double, double>, 3>;

Corners sorted_corners(const std::array<Point, 3>& p) {
  Corners corners{std::pair{p[0].x, p[0].y}, {p[1].x, p[1].y}, {p[2].x, p[2].y}};
  std::sort(corners.begin(), corners.end());
  return corners;
}

std::array<Point, 3> corners_of(const VtkFile& file, std::size_t cell) {
  std::array<Point, 3> p;
  for (std::size_t k = 0; k < 3; ++k) {
    p[k] = file.points.point(static_cast<std::size_t>(file.cells[cell].at(k)));
  }
  return p;
}

/// The grid's triangles by their corners' positions.
std::map<Corners, int> triangles_by_corners(const mesh::FittedGrid& grid) {
  std::map<Corners, int> result;
  for (int t = 0; t < grid.triangle_count(); ++t) result[sorted_corners(grid.corners(t))] = t;
  return result;
}

/// For every point of a file the place that it stands for, found by way of the file's cells.
std::vector<int> places_of(const VtkFile& file, const io::Results& results) {
  const auto& grid = results.solution->grid();
  const auto triangle = triangles_by_corners(grid);
  std::vector<int> place(file.points.values.size() / 3, -1);
  for (std::size_t c = 0; c < file.cells.size(); ++c) {
    const int t = triangle.at(sorted_corners(corners_of(file, c)));
    for (const int point : file.cells[c]) {
      const Point at = file.points.point(static_cast<std::size_t>(point));
      for (const int candidate : results.field->places(t)) {
        const int node = results.field->node_of_place(candidate);
        if (grid.nodes[static_cast<std::size_t>(node)] != at) continue;
        int& found = place[static_cast<std::size_t>(point)];
        // All cells that share a point must belong to one occupant.
        if (found >= 0 && found != candidate) throw std::runtime_error("a point of two places");
        found = candidate;
      }
    }
  }
  return place;
}

std::vector<Point> expected_b(const io::Results& results, const std::vector<int>& places,
                              int pattern) {
  std::vector<Point> b;
  for (const int place : places) b.push_back(results.field->flux_density(place, pattern));
  return b;
}

TEST_CASE("field.vtu and field_far.vtu together hold every triangle of the grid once", "[vtk]") {
  const io::Results& results = test::steady_results();
  const auto& grid = results.solution->grid();
  const auto known = triangles_by_corners(grid);
  std::set<int> seen;
  std::size_t cells = 0;
  for (const VtkFile& file : {near_file(results), far_file(results)}) {
    for (std::size_t c = 0; c < file.cells.size(); ++c) {
      REQUIRE(file.cells[c].size() == 3);
      const auto p = corners_of(file, c);
      CHECK(triangle_area(p) > 0.0);
      const auto found = known.find(sorted_corners(p));
      REQUIRE(found != known.end());
      seen.insert(found->second);
    }
    cells += file.cells.size();
  }
  CHECK(cells == static_cast<std::size_t>(grid.triangle_count()));
  CHECK(seen.size() == cells);
}

TEST_CASE("field.vtu covers three section sizes about the section and all probes", "[vtk]") {
  const io::Results& results = test::steady_results();
  const auto& grid = results.solution->grid();
  const mesh::Box box = near_box(results);
  // The plate is 100 mm wide; the line probe runs to x = 400 mm, y = 60 mm.
  CHECK(box.low.x == Approx(-0.3));
  CHECK(box.high.x == Approx(0.4));
  CHECK(box.width() == Approx(0.7));
  CHECK(box.height() == Approx(0.6));
  const VtkFile file = near_file(results);
  std::set<Corners> inside;
  for (std::size_t c = 0; c < file.cells.size(); ++c) {
    inside.insert(sorted_corners(corners_of(file, c)));
  }
  CHECK(static_cast<double>(inside.size()) < 0.95 * grid.triangle_count());
  std::vector<Point> wanted{box.low, box.high, {box.low.x, box.high.y}, {box.high.x, box.low.y}};
  for (const auto& probe : results.figures.probes) {
    wanted.insert(wanted.end(), probe.probe.points.begin(), probe.probe.points.end());
  }
  for (int k = 0; k < 500; ++k) {
    const Point unit = mesh::low_discrepancy_point(k);
    wanted.push_back(box.low + Point{unit.x * box.width(), unit.y * box.height()});
  }
  for (const Point p : wanted) {
    const auto at = locate(grid, results.problem->section, p);
    CHECK(inside.count(sorted_corners(grid.corners(at.triangle))) == 1);
  }
}

TEST_CASE("Every point of field.vtu holds B and H of its own occupant and A of its node", "[vtk]") {
  const io::Results& results = test::steady_results();
  const auto permeability = permeability_by_region(*results.problem);
  for (const VtkFile& file : {near_file(results), far_file(results)}) {
    const std::vector<int> places = places_of(file, results);
    std::vector<Point> h;
    std::vector<double> a;
    const std::vector<Point> b = expected_b(results, places, 0);
    for (std::size_t k = 0; k < places.size(); ++k) {
      REQUIRE(places[k] >= 0);
      const auto region = static_cast<std::size_t>(results.field->region_of_place(places[k]));
      h.push_back((1.0 / (solver::mu_0 * permeability[region])) * b[k]);
      a.push_back(results.solution->potential(results.field->node_of_place(places[k]), 0));
    }
    CHECK(file.names_of_point_arrays() ==
          std::vector<std::string>{"A_Wb_per_m", "B_T", "H_A_per_m"});
    CHECK(compared(file.point_data.numbers.at("B_T"), b) == "same");
    CHECK(compared(file.point_data.numbers.at("H_A_per_m"), h) == "same");
    CHECK(compared(file.point_data.numbers.at("A_Wb_per_m"), 1, a) == "same");
  }
}

TEST_CASE("B at a point of field.vtu is what a probe there reports", "[vtk]") {
  const io::Results& results = test::steady_results();
  const VtkFile file = near_file(results);
  const std::vector<int> places = places_of(file, results);
  const auto& grid = results.solution->grid();
  std::vector<solver::Probe> probes;
  std::vector<Point> in_file;
  int on_outlines = 0;
  for (std::size_t k = 0; k < places.size(); k += 97) {
    const Point at = file.points.point(k);
    const int region = results.field->region_of_place(places[k]);
    // On an outline the probe takes the side painted later: that point of the file counts.
    const auto location = locate(grid, results.problem->section, at);
    if (grid.region[static_cast<std::size_t>(location.triangle)] != region) continue;
    if (results.field->place(results.field->node_of_place(places[k]), 0) != places[k]) {
      ++on_outlines;
    }
    probes.push_back({std::to_string(k), {at}, false, {}, {}});
    in_file.push_back(file.point_data.numbers.at("B_T").point(k));
  }
  REQUIRE(probes.size() > 50);
  REQUIRE(on_outlines > 5);
  const solver::ForceGeometry geometry(*results.problem);
  const solver::Figures figures = figures_of(
      *results.problem, geometry,
      readings_of(solver::PartIntegrals(*results.solution), *results.field, geometry, probes),
      probes, {});
  double largest = 0.0;
  for (const Point b : in_file) largest = std::max(largest, norm(b));
  for (std::size_t k = 0; k < probes.size(); ++k) {
    const auto& found = figures.probes[k].points.front().figures;
    const Point b{find_figure(found, "b_x")->value, find_figure(found, "b_y")->value};
    CHECK(distance(b, in_file[k]) < 1e-9 * largest);
  }
}

TEST_CASE("The comparison of files notices a shift by one node and swapped components", "[vtk]") {
  const io::Results& results = test::steady_results();
  const VtkFile file = near_file(results);
  const FileArray& b = file.point_data.numbers.at("B_T");
  const std::vector<Point> right = expected_b(results, places_of(file, results), 0);
  REQUIRE(compared(b, right) == "same");
  std::vector<Point> shifted = right;
  std::rotate(shifted.begin(), shifted.begin() + 1, shifted.end());
  CHECK(compared(b, shifted) != "same");
  std::vector<Point> swapped = right;
  for (Point& p : swapped) p = {p.y, p.x};
  CHECK(compared(b, swapped) != "same");
  std::vector<Point> turned = right;
  for (Point& p : turned) p = -p;
  CHECK(compared(b, turned) != "same");
  std::vector<Point> shorter = right;
  shorter.pop_back();
  CHECK(compared(b, shorter) != "same");
  std::vector<Point> hole = right;
  hole[hole.size() / 2].x = std::nan("");
  CHECK(compared(b, hole) != "same");
  std::vector<double> first;
  for (const Point p : right) first.push_back(p.x);
  CHECK(compared(b, 1, first) != "same");
}

TEST_CASE("Cells hold their part, permeability, current density and the scheme's B", "[vtk]") {
  const io::Results& results = test::steady_results();
  const auto& grid = results.solution->grid();
  const auto known = triangles_by_corners(grid);
  const VtkFile file = near_file(results);
  CHECK(file.names_of_cell_arrays() ==
        std::vector<std::string>{"B_cell_T", "J_A_per_m2", "mu_r", "part"});
  CHECK(file.field_data.texts.at("part_names") ==
        std::vector<std::string>{"air", "A", "B", "plate", "foot"});
  const FileArray& part = file.cell_data.numbers.at("part");
  const FileArray& mu_r = file.cell_data.numbers.at("mu_r");
  const FileArray& density = file.cell_data.numbers.at("J_A_per_m2");
  CHECK(part.type == "int");
  CHECK(density.type == "double");
  std::array<double, 5> area{};
  std::array<double, 5> current{};
  std::vector<Point> b;
  for (std::size_t c = 0; c < file.cells.size(); ++c) {
    const auto p = corners_of(file, c);
    const auto k = static_cast<std::size_t>(part.at(c));
    REQUIRE(k < area.size());
    area[k] += triangle_area(p);
    current[k] += density.at(c) * triangle_area(p);
    CHECK(mu_r.at(c) == Approx(k == 3 ? 200.0 : 1.0).epsilon(1e-12));
    b.push_back(solver::cell_flux_density(grid, known.at(sorted_corners(p)),
                                          results.solution->potential.col(0)));
  }
  CHECK(compared(file.cell_data.numbers.at("B_cell_T"), b) == "same");
  CHECK(area[1] == Approx(320e-6).epsilon(1e-9));
  // The round bar is a polygon of grid edges: a little less than its circle.
  CHECK(area[2] == Approx(std::numbers::pi * 64e-6).epsilon(0.03));
  CHECK(area[2] < std::numbers::pi * 64e-6);
  CHECK(area[3] == Approx(600e-6).epsilon(1e-9));
  CHECK(area[4] == Approx(240e-6).epsilon(1e-9));
  CHECK(current[0] == 0.0);
  CHECK(current[1] == Approx(1000.0).epsilon(1e-12));
  CHECK(current[2] == Approx(-700.0).epsilon(1e-12));
  CHECK(current[3] == 0.0);
  CHECK(current[4] == 0.0);
  // Nothing but air lies in the far file.
  const VtkFile far = far_file(results);
  CHECK(compared(far.cell_data.numbers.at("part"), 1, std::vector<double>(far.cells.size())) ==
        "same");
}

TEST_CASE("At a steel outline tangential B jumps by mu_r, and normal B and H stay", "[vtk]") {
  const io::Results& results = test::steady_results();
  const VtkFile file = near_file(results);
  const std::vector<int> places = places_of(file, results);
  const auto permeability = permeability_by_region(*results.problem);
  // The plate's upper edge, y = -37 mm, away from its corners.
  std::map<double, std::array<std::size_t, 2>> sides;
  std::map<double, int> count;
  for (std::size_t k = 0; k < places.size(); ++k) {
    const Point p = file.points.point(k);
    if (std::abs(p.y + 0.037) > 1e-9 || std::abs(p.x) > 0.03) continue;
    const auto region = static_cast<std::size_t>(results.field->region_of_place(places[k]));
    sides[p.x][permeability[region] > 1.0 ? 1 : 0] = k;
    ++count[p.x];
  }
  REQUIRE(sides.size() > 10);
  const FileArray& b = file.point_data.numbers.at("B_T");
  const FileArray& h = file.point_data.numbers.at("H_A_per_m");
  const FileArray& a = file.point_data.numbers.at("A_Wb_per_m");
  double normal = 0.0;
  double tangential = 0.0;
  for (const auto& entry : sides) {
    normal = std::max(normal, std::abs(b.at(entry.second[0], 1)));
    tangential = std::max(tangential, std::abs(h.at(entry.second[0], 0)));
  }
  for (const auto& [x, side] : sides) {
    INFO("x = " << x);
    CHECK(count[x] == 2);
    CHECK(a.at(side[0]) == a.at(side[1]));
    CHECK(b.at(side[0], 1) == Approx(b.at(side[1], 1)).margin(0.05 * normal));
    CHECK(h.at(side[0], 0) == Approx(h.at(side[1], 0)).margin(0.1 * tangential));
    CHECK(b.at(side[0], 0) ==
          Approx(b.at(side[1], 0) / 200.0).margin(0.1 * tangential * solver::mu_0));
  }
}

TEST_CASE("With a frequency the field has in-phase and quadrature parts, r.m.s. and peak",
          "[vtk]") {
  const io::Results& results = test::alternating_results();
  const VtkFile file = near_file(results);
  const std::vector<int> places = places_of(file, results);
  CHECK(file.names_of_point_arrays() ==
        std::vector<std::string>{"A_in_phase_Wb_per_m", "A_quadrature_Wb_per_m", "B_in_phase_T",
                                 "B_peak_T", "B_quadrature_T", "B_rms_T", "H_in_phase_A_per_m",
                                 "H_quadrature_A_per_m"});
  CHECK(file.names_of_cell_arrays() ==
        std::vector<std::string>{"B_cell_in_phase_T", "B_cell_quadrature_T", "J_in_phase_A_per_m2",
                                 "J_quadrature_A_per_m2", "mu_r", "part"});
  const std::array<std::string, 2> suffix{"_in_phase", "_quadrature"};
  const auto permeability = permeability_by_region(*results.problem);
  std::array<std::vector<Point>, 2> b;
  for (int pattern = 0; pattern < 2; ++pattern) {
    const auto k = static_cast<std::size_t>(pattern);
    b[k] = expected_b(results, places, pattern);
    std::vector<Point> h;
    std::vector<double> a;
    for (std::size_t n = 0; n < places.size(); ++n) {
      const auto region = static_cast<std::size_t>(results.field->region_of_place(places[n]));
      h.push_back((1.0 / (solver::mu_0 * permeability[region])) * b[k][n]);
      a.push_back(results.solution->potential(results.field->node_of_place(places[n]), pattern));
    }
    const auto& arrays = file.point_data.numbers;
    CHECK(compared(arrays.at("B" + suffix[k] + "_T"), b[k]) == "same");
    CHECK(compared(arrays.at("H" + suffix[k] + "_A_per_m"), h) == "same");
    CHECK(compared(arrays.at("A" + suffix[k] + "_Wb_per_m"), 1, a) == "same");
  }
  const FileArray& rms = file.point_data.numbers.at("B_rms_T");
  const FileArray& peak = file.point_data.numbers.at("B_peak_T");
  for (std::size_t n = 0; n < places.size(); n += 53) {
    // Over a cycle of instants: the mean of |B|^2, and the largest |B|.
    constexpr int instants = 720;
    double square = 0.0;
    double largest = 0.0;
    for (int k = 0; k < instants; ++k) {
      const double wt = 2.0 * std::numbers::pi * k / instants;
      const Point now = std::numbers::sqrt2 * (std::cos(wt) * b[0][n] - std::sin(wt) * b[1][n]);
      square += dot(now, now) / instants;
      largest = std::max(largest, norm(now));
    }
    CHECK(rms.at(n) == Approx(std::sqrt(square)));
    CHECK(peak.at(n) == Approx(largest).epsilon(1e-4));
  }
  // Phase L2 of 1000 A at -120 degrees.
  double in_phase = 0.0;
  double quadrature = 0.0;
  for (std::size_t c = 0; c < file.cells.size(); ++c) {
    if (file.cell_data.numbers.at("part").at(c) != 2.0) continue;
    const double area = triangle_area(corners_of(file, c));
    in_phase += area * file.cell_data.numbers.at("J_in_phase_A_per_m2").at(c);
    quadrature += area * file.cell_data.numbers.at("J_quadrature_A_per_m2").at(c);
  }
  CHECK(in_phase == Approx(-500.0));
  CHECK(quadrature == Approx(-500.0 * std::numbers::sqrt3));
}

}  // namespace
}  // namespace barwall
