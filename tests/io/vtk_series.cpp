// The time series of a cycle and of a fault, and the field over a cycle in saturable steel.

#include <catch2/catch.hpp>
#include <cmath>
#include <filesystem>
#include <numbers>
#include <regex>

#include "io/vtk_export.hpp"
#include "tests/io/program_support.hpp"
#include "tests/io/saturable_case.hpp"
#include "tests/io/vtk_support.hpp"

namespace barwall {
namespace {

namespace fs = std::filesystem;
using mesh::Point;
using test::FileArray;
using test::VtkFile;

/// What a .pvd file lists.
struct Entry {
  double time;
  std::string file;
};

std::vector<Entry> entries_of(const fs::path& collection) {
  const std::string text = test::text_of_file(collection);
  const std::regex whole(
      R"(<\?xml version="1\.0"\?>\s*<VTKFile type="Collection" version="0\.1">\s*<Collection>)"
      R"(((?:\s*<DataSet timestep="[^"]*" file="[^"]*"/>)*)\s*</Collection>\s*</VTKFile>\s*)");
  std::smatch parts;
  REQUIRE(std::regex_match(text, parts, whole));
  const std::string list = parts[1];
  const std::regex one(R"rx(timestep="([^"]*)" file="([^"]*)")rx");
  std::vector<Entry> entries;
  for (std::sregex_iterator k(list.begin(), list.end(), one), end; k != end; ++k) {
    entries.push_back({std::stod((*k)[1]), (*k)[2]});
  }
  return entries;
}

/// The instants of the cycle or of the fault, their times and their collection.
struct Series {
  std::string name;
  const solver::Instants* instants;
  std::vector<double> seconds;
};

std::vector<Series> series_of(const io::Results& results) {
  Series cycle{"cycle", &*results.instants, {}};
  for (const double wt : results.instants->wt) {
    cycle.seconds.push_back(wt / (100.0 * std::numbers::pi));
  }
  return {cycle, {"fault", &*results.fault->course, results.fault->course_seconds}};
}

/// Names in a folder that begin so.
std::vector<std::string> names_with(const fs::path& folder, const std::string& beginning) {
  std::vector<std::string> names;
  for (const std::string& name : test::names_in(folder)) {
    if (name.rfind(beginning, 0) == 0) names.push_back(name);
  }
  return names;
}

/// Three of a file's point numbers, a cell's corners, and the place that each stands for.
struct Corner {
  std::size_t point;
  int place;
};

std::vector<Corner> corners_of(const VtkFile& file, std::size_t cell, const io::Results& results,
                               const solver::RecoveredField& field) {
  const mesh::FittedGrid& grid = results.solution->grid();
  Point centre;
  for (const int point : file.cells[cell]) {
    centre += (1.0 / 3.0) * file.points.point(static_cast<std::size_t>(point));
  }
  const int triangle = locate(grid, results.problem->section, centre).triangle;
  std::vector<Corner> corners;
  for (const int point : file.cells[cell]) {
    const Point at = file.points.point(static_cast<std::size_t>(point));
    int nearest = -1;
    double least = HUGE_VAL;
    for (const int place : field.places(triangle)) {
      const Point node = grid.nodes[static_cast<std::size_t>(field.node_of_place(place))];
      if (distance(node, at) >= least) continue;
      least = distance(node, at);
      nearest = place;
    }
    REQUIRE(least <= 1e-6 * norm(at));  // points are in single precision, too
    corners.push_back({static_cast<std::size_t>(point), nearest});
  }
  return corners;
}

constexpr double single = 1e-7;  ///< of a number in single precision

}  // namespace

TEST_CASE("A time series lists its instants in order, from zero over half a cycle or a whole one") {
  const io::Results& results = test::saturable_results();
  const fs::path& folder = test::folder_of(results);
  const double period = 0.02;
  for (const Series& series : series_of(results)) {
    INFO(series.name);
    const auto entries = entries_of(folder / (series.name + ".pvd"));
    REQUIRE(entries.size() == series.instants->size());
    CHECK(entries.front().time == 0.0);
    for (std::size_t k = 0; k < entries.size(); ++k) {
      CHECK(entries[k].time == Approx(series.seconds[k]).epsilon(1e-8));
      if (k > 0) CHECK(entries[k].time > entries[k - 1].time);
      CHECK(fs::is_regular_file(folder / entries[k].file));
    }
    const double step = entries[1].time;
    const bool half = series.name == "cycle";
    // The end of half a cycle is its start, reversed: no instant of its own.
    CHECK(entries.back().time == Approx(half ? 0.5 * period - step : period));
    CHECK(names_with(folder, series.name + "_").size() == entries.size());
  }
}

TEST_CASE("Every file of a time series holds the field of its instant in single precision") {
  const io::Results& results = test::saturable_results();
  const fs::path& folder = test::folder_of(results);
  for (const Series& series : series_of(results)) {
    const auto entries = entries_of(folder / (series.name + ".pvd"));
    for (std::size_t k = 1; k < entries.size(); k += 4) {
      INFO(entries[k].file);
      const VtkFile file = test::read_vtk(folder / entries[k].file);
      const solver::Solution& solution = *series.instants->solution[k];
      const solver::RecoveredField field(solution);
      CHECK(file.names_of_point_arrays() == std::vector<std::string>{"A_Wb_per_m", "B_T"});
      CHECK(file.names_of_cell_arrays() == std::vector<std::string>{"J_A_per_m2", "mu_r", "part"});
      CHECK(file.field_data.numbers.at("time_s").values == std::vector<double>{series.seconds[k]});
      CHECK(file.field_data.texts.at("case_hash").front() == results.input.sha256);
      const FileArray& b = file.point_data.numbers.at("B_T");
      const FileArray& a = file.point_data.numbers.at("A_Wb_per_m");
      CHECK(b.type == "float");
      CHECK(a.type == "float");
      const double largest_a = solution.potential.cwiseAbs().maxCoeff();
      std::size_t compared = 0;
      for (std::size_t cell = 0; cell < file.cells.size(); cell += 41) {
        for (const Corner& corner : corners_of(file, cell, results, field)) {
          const Point expected = field.flux_density(corner.place, 0);
          REQUIRE(distance(b.point(corner.point), expected) <= single * norm(expected));
          const double potential = solution.potential(field.node_of_place(corner.place), 0);
          REQUIRE(std::abs(a.at(corner.point) - potential) <= single * largest_a);
          ++compared;
        }
      }
      CHECK(compared > 100);
    }
  }
}

TEST_CASE("A file of a time series tells the currents and permeability of its instant") {
  const io::Results& results = test::saturable_results();
  const VtkFile file = test::read_vtk(test::folder_of(results) / "fault_12.vtu");
  const solver::Solution& solution = *results.fault->course->solution[12];
  std::array<double, 5> current{};
  double least = HUGE_VAL;
  double most = 0.0;
  for (std::size_t cell = 0; cell < file.cells.size(); ++cell) {
    std::array<Point, 3> p;
    for (std::size_t k = 0; k < 3; ++k) {
      p[k] = file.points.point(static_cast<std::size_t>(file.cells[cell][k]));
    }
    const auto part = static_cast<std::size_t>(file.cell_data.numbers.at("part").at(cell));
    REQUIRE(part < current.size());
    current[part] += file.cell_data.numbers.at("J_A_per_m2").at(cell) * triangle_area(p);
    if (part != 4) continue;
    least = std::min(least, file.cell_data.numbers.at("mu_r").at(cell));
    most = std::max(most, file.cell_data.numbers.at("mu_r").at(cell));
  }
  const auto& expected = solution.patterns[0].part_current;
  for (std::size_t bar = 0; bar < 3; ++bar) {
    CHECK(current[bar + 1] == Approx(expected[bar]).epsilon(1e-4));
  }
  CHECK(current[4] == 0.0);
  CHECK(least > 1.0);
  CHECK(most > 2.0 * least);  // more and less saturated
}

TEST_CASE("A later run with fewer instants leaves no instant of an earlier one behind") {
  const test::ScratchFolder scratch;
  const fs::path out = scratch.path() / "out";
  scratch.write("plate.toml", test::saturable_case + test::fault_beside_plate);
  test::run_barwall(scratch.path(), "solve plate.toml --quiet --out out --set load_a=120000");
  CHECK(names_with(out, "cycle_").size() == 24);
  CHECK(names_with(out, "fault_").size() == 25 + 1);  // and fault_forces.csv
  scratch.write("plate.toml", test::saturable_case);
  test::run_barwall(scratch.path(), "solve plate.toml --quiet --out out");
  CHECK(names_with(out, "cycle_").size() == 12);
  CHECK(names_with(out, "cycle_").back() == "cycle_11.vtu");
  CHECK(entries_of(out / "cycle.pvd").size() == 12);
  CHECK(names_with(out, "fault").empty());
  scratch.write("plate.toml", test::direct_saturable_case());
  test::run_barwall(scratch.path(), "solve plate.toml --quiet --out out");
  CHECK(fs::exists(out / "field.vtu"));
  CHECK(names_with(out, "cycle").empty());
}

TEST_CASE("Steady currents, and alternating ones beside constant permeability, have no series") {
  const io::Results direct = io::run_case(test::read_text(test::direct_saturable_case()));
  for (const io::Results* results :
       {&test::steady_results(), &test::alternating_results(), &direct}) {
    const test::NewFolder folder;
    write_vtk(*results, folder.path);
    for (const std::string& name : test::names_in(folder.path)) {
      INFO(name);
      CHECK(fs::path(name).extension() != ".pvd");
      CHECK(name.rfind("cycle", 0) == std::string::npos);
      CHECK(name.rfind("fault", 0) == std::string::npos);
    }
  }
}

TEST_CASE(
    "A direct current that rises beside saturable steel has a series of five time constants") {
  const io::Results results = io::run_case(test::read_text(test::direct_saturable_case() + R"(
[fault]
between = ["L1", "L3"]
direct_ka = 60
time_constant_ms = 20
)"));
  const test::NewFolder folder;
  write_vtk(results, folder.path);
  const auto entries = entries_of(folder.path / "fault.pvd");
  REQUIRE(entries.size() == results.fault->course->size());
  CHECK(entries.front().time == 0.0);
  CHECK(entries.back().time == Approx(0.1));
  const VtkFile last = test::read_vtk(folder.path / entries.back().file);
  CHECK(last.field_data.numbers.at("time_s").values.front() == Approx(0.1));
  CHECK_FALSE(fs::exists(folder.path / "cycle.pvd"));
}

TEST_CASE(
    "R.m.s. and peak in field.vtu of a saturated cycle are what a probe at the node reports") {
  const io::Results& results = test::saturable_results();
  const VtkFile file = test::read_vtk(test::folder_of(results) / "field.vtu");
  const mesh::FittedGrid& grid = results.solution->grid();
  // On an outline a probe takes the side painted later: nodes within one part, and in air.
  std::vector<solver::Probe> probes;
  std::vector<std::size_t> points;
  std::array<int, 5> in_part{};
  for (std::size_t cell = 0; cell < file.cells.size(); cell += 5) {
    const Corner corner = corners_of(file, cell, results, *results.field).front();
    const int node = results.field->node_of_place(corner.place);
    const Point at = grid.nodes[static_cast<std::size_t>(node)];
    const int region = results.field->region_of_place(corner.place);
    const auto location = locate(grid, results.problem->section, at);
    if (grid.region[static_cast<std::size_t>(location.triangle)] != region) continue;
    const auto part = static_cast<std::size_t>(file.cell_data.numbers.at("part").at(cell));
    if (in_part[part]++ >= 12) continue;
    probes.push_back({std::to_string(cell), {at}, false, {}, {}});
    points.push_back(corner.point);
  }
  for (const int count : in_part) CHECK(count >= 12);
  const solver::ForceGeometry geometry(*results.problem);
  std::vector<solver::Readings> readings;
  for (const auto& solution : results.instants->solution) {
    readings.push_back(readings_at_instant(solver::PartIntegrals(*solution),
                                           solver::RecoveredField(*solution), geometry, probes));
  }
  auto cycle = over_half_cycle(std::span<const solver::Readings>(readings));
  cycle.levels = field_levels(*results.instants);
  cycle.loops.resize(results.problem->loops.size());
  const auto figures = figures_of(*results.problem, geometry, cycle, probes, {});
  const auto& arrays = file.point_data.numbers;
  double flattened = 0.0;
  for (std::size_t k = 0; k < probes.size(); ++k) {
    const auto& found = figures.probes[k].points.front().figures;
    const auto value = [&](const char* key) { return find_figure(found, key)->value; };
    CHECK(arrays.at("B_rms_T").at(points[k]) == Approx(value("b_rms")).epsilon(1e-9));
    CHECK(arrays.at("B_peak_T").at(points[k]) == Approx(value("b_peak")).epsilon(1e-9));
    const Point in_phase{value("b_x_in_phase"), value("b_y_in_phase")};
    const Point quadrature{value("b_x_quadrature"), value("b_y_quadrature")};
    const double size = value("b_rms");
    CHECK(distance(arrays.at("B_in_phase_T").point(points[k]), in_phase) < 1e-9 * size);
    CHECK(distance(arrays.at("B_quadrature_T").point(points[k]), quadrature) < 1e-9 * size);
    flattened = std::max(flattened, size / std::hypot(norm(in_phase), norm(quadrature)));
  }
  CHECK(flattened > 1.003);  // more than the fundamental is in them
}

}  // namespace barwall
