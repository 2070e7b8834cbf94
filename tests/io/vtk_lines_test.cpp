#include <catch2/catch.hpp>
#include <cmath>
#include <numbers>

#include "io/flux_lines.hpp"
#include "mesh/sampling.hpp"
#include "tests/io/vtk_support.hpp"

namespace barwall {
namespace {

using mesh::Point;
using test::VtkFile;

VtkFile file_of(const io::Results& results, const std::string& name) {
  return test::read_vtk(test::folder_of(results) / name);
}

std::vector<Point> points_of(const VtkFile& file, std::size_t cell) {
  std::vector<Point> points;
  for (const int k : file.cells[cell]) {
    points.push_back(file.points.point(static_cast<std::size_t>(k)));
  }
  return points;
}

double length_of(const std::vector<Point>& points) {
  double sum = 0.0;
  for (std::size_t k = 1; k < points.size(); ++k) sum += distance(points[k - 1], points[k]);
  return sum;
}

TEST_CASE("outlines.vtp holds every outline with the parts to its left and right", "[vtk]") {
  const io::Results& results = test::steady_results();
  const VtkFile file = file_of(results, "outlines.vtp");
  REQUIRE(file.cells.size() == results.problem->outline.pieces.size());
  const auto& names = file.field_data.texts.at("part_names");
  std::map<std::string, double> length;
  for (std::size_t c = 0; c < file.cells.size(); ++c) {
    const std::vector<Point> line = points_of(file, c);
    REQUIRE(line.size() >= 2);
    length[file.cell_data.texts.at("name")[c]] += length_of(line);
    const Point middle = between(line[0], line[1], 0.5);
    const Point normal = quarter_turn((1.0 / distance(line[0], line[1])) * (line[1] - line[0]));
    for (const bool left : {true, false}) {
      const std::string side = left ? "part_left" : "part_right";
      const double number = file.cell_data.numbers.at(side).at(c);
      const Point beside = middle + (left ? 1e-5 : -1e-5) * normal;
      CHECK(number == occupant_at(results.problem->section, beside).part + 1);
      CHECK(file.cell_data.texts.at(side + "_name")[c] == names[static_cast<std::size_t>(number)]);
    }
  }
  CHECK(length["A"] == Approx(0.096));
  CHECK(length["B"] == Approx(std::numbers::pi * 0.016).epsilon(1e-4));
  // The foot's upper side is the plate's too, and belongs to the foot, painted later.
  CHECK(length["plate"] == Approx(0.212 - 0.04));
  CHECK(length["foot"] == Approx(0.092));
}

TEST_CASE("flux_lines.vtp holds lines of constant A at the instant it names", "[vtk]") {
  for (const io::Results* results : {&test::steady_results(), &test::alternating_results()}) {
    const VtkFile file = file_of(*results, "flux_lines.vtp");
    const auto& grid = results->solution->grid();
    const bool alternating = results->alternating();
    CHECK(file.field_data.numbers.count("instant_deg") == (alternating ? 1 : 0));
    double wt = 0.0;
    if (alternating) {
      wt = file.field_data.numbers.at("instant_deg").at(0) * std::numbers::pi / 180.0;
      CHECK(wt == Approx(flux_line_instant(*results)));
    }
    const Eigen::MatrixXd& potential = results->solution->potential;
    const Eigen::VectorXd a =
        alternating ? Eigen::VectorXd(std::numbers::sqrt2 * (std::cos(wt) * potential.col(0) -
                                                             std::sin(wt) * potential.col(1)))
                    : Eigen::VectorXd(potential.col(0));
    REQUIRE(file.cells.size() >= 40);
    const double scale = a.cwiseAbs().maxCoeff();
    for (std::size_t c = 0; c < file.cells.size(); ++c) {
      const double level = file.cell_data.numbers.at("A_Wb_per_m").at(c);
      for (const Point p : points_of(file, c)) {
        const auto at = locate(grid, results->problem->section, p);
        const auto n = grid.triangle(at.triangle);
        double value = 0.0;
        for (std::size_t k = 0; k < 3; ++k) value += at.weight[k] * a[n[k]];
        CHECK(value == Approx(level).margin(1e-9 * scale));
      }
    }
  }
}

TEST_CASE("forces.vtp holds the given forces at the parts' centroids", "[vtk]") {
  const io::Results& results = test::steady_results();
  const VtkFile file = file_of(results, "forces.vtp");
  // The plate and its foot are in contact: only their common force is given.
  REQUIRE(file.point_data.texts.at("name") == std::vector<std::string>{"A", "B", "plate+foot"});
  CHECK(file.point_data.texts.at("kind") == std::vector<std::string>{"bar", "bar", "body"});
  CHECK(file.cells.size() == 3);
  const std::vector<const solver::Entry*> entries{
      &results.figures.bars[0], &results.figures.bars[1], &results.figures.bodies[0]};
  std::vector<Point> force;
  for (const solver::Entry* entry : entries) {
    force.push_back({find_figure(entry->figures, "force_x")->value,
                     find_figure(entry->figures, "force_y")->value});
  }
  CHECK(compared(file.point_data.numbers.at("force_N_per_m"), force) == "same");
  CHECK(distance(file.points.point(0), {-0.020, 0.0}) < 1e-9);
  CHECK(distance(file.points.point(1), {0.025, 0.0}) < 1e-4);
  const double body_y = (600.0 * -40.0 + 240.0 * -46.0) / 840.0;
  CHECK(distance(file.points.point(2), {0.0, 1e-3 * body_y}) < 1e-9);
}

TEST_CASE("With a frequency forces.vtp holds the mean force and the force at its peak", "[vtk]") {
  const io::Results& results = test::alternating_results();
  const VtkFile file = file_of(results, "forces.vtp");
  REQUIRE(file.point_data.texts.at("name") ==
          std::vector<std::string>{"L1", "L2", "L3", "plate+foot"});
  std::vector<Point> mean;
  for (const solver::Entry& bar : results.figures.bars) {
    mean.push_back({find_figure(bar.figures, "force_mean_x")->value,
                    find_figure(bar.figures, "force_mean_y")->value});
  }
  const auto& body = results.figures.bodies.front().figures;
  mean.push_back(
      {find_figure(body, "force_mean_x")->value, find_figure(body, "force_mean_y")->value});
  CHECK(compared(file.point_data.numbers.at("force_mean_N_per_m"), mean) == "same");
  for (int bar = 0; bar < 3; ++bar) {
    const auto k = static_cast<std::size_t>(bar);
    const solver::Peak peak = peak_of(lorentz_force(solver::PartIntegrals(*results.solution), bar));
    const Point found = file.point_data.numbers.at("force_at_peak_N_per_m").point(k);
    CHECK(distance(found, peak.value) < 1e-9 * peak.magnitude);
    CHECK(file.point_data.numbers.at("force_peak_at_deg").at(k) ==
          Approx(peak.wt * 180.0 / std::numbers::pi));
  }
}

TEST_CASE("probes.vtp holds every probe's points and B, lines joined", "[vtk]") {
  for (const io::Results* results : {&test::steady_results(), &test::alternating_results()}) {
    const VtkFile file = file_of(*results, "probes.vtp");
    std::vector<Point> at;
    std::vector<Point> b;
    std::vector<Point> quadrature;
    std::vector<double> rms;
    std::vector<double> peak;
    std::vector<std::string> names;
    for (const auto& probe : results->figures.probes) {
      for (const auto& point : probe.points) {
        const auto value = [&](const std::string& key) {
          const solver::Figure* figure = find_figure(point.figures, key);
          return figure == nullptr ? 0.0 : figure->value;
        };
        at.push_back(point.at);
        names.push_back(probe.probe.name);
        if (results->alternating()) {
          b.push_back({value("b_x_in_phase"), value("b_y_in_phase")});
          quadrature.push_back({value("b_x_quadrature"), value("b_y_quadrature")});
          rms.push_back(value("b_rms"));
          peak.push_back(value("b_peak"));
        } else {
          b.push_back({value("b_x"), value("b_y")});
        }
      }
    }
    CHECK(compared(file.points, at) == "same");
    CHECK(file.point_data.texts.at("probe") == names);
    const auto& arrays = file.point_data.numbers;
    if (results->alternating()) {
      CHECK(compared(arrays.at("B_in_phase_T"), b) == "same");
      CHECK(compared(arrays.at("B_quadrature_T"), quadrature) == "same");
      CHECK(compared(arrays.at("B_rms_T"), 1, rms) == "same");
      CHECK(compared(arrays.at("B_peak_T"), 1, peak) == "same");
    } else {
      CHECK(compared(arrays.at("B_T"), b) == "same");
    }
    CHECK(file.cell_data.texts.at("probe").front() == "sensor");
    CHECK(file.cells.front() == std::vector<int>{0});
    CHECK(file.cell_data.texts.at("probe")[1] == "above");
    CHECK(file.cells[1] == std::vector<int>{1, 2, 3, 4, 5, 6, 7});
  }
}

TEST_CASE("A probe line round groups of parts that stand apart is joined within each", "[vtk]") {
  const io::Results& results = test::steady_results();
  const VtkFile file = file_of(results, "probes.vtp");
  // At 5 mm round the bars and the plate: three lines, none of which leaps to the next.
  int lines = 0;
  for (std::size_t c = 0; c < file.cells.size(); ++c) {
    if (file.cell_data.texts.at("probe")[c] != "around") continue;
    ++lines;
    const std::vector<Point> points = points_of(file, c);
    for (std::size_t k = 1; k < points.size(); ++k) {
      CHECK(distance(points[k - 1], points[k]) < 0.02);
    }
  }
  CHECK(lines == 3);
}

}  // namespace
}  // namespace barwall
