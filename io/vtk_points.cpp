#include <vtkCellArray.h>
#include <vtkCellData.h>
#include <vtkNew.h>
#include <vtkPointData.h>
#include <vtkPoints.h>
#include <vtkPolyData.h>

#include <algorithm>
#include <cmath>
#include <numbers>

#include "io/vtk_arrays.hpp"
#include "io/vtk_files.hpp"

namespace barwall::io {
namespace {

using mesh::Point;

double value_of(const std::vector<solver::Figure>& figures, const std::string& key) {
  const solver::Figure* figure = solver::find_figure(figures, key);
  return figure == nullptr ? solver::not_given : figure->value;
}

/// Area and first moment of what shows of a part, as the triangles make it up.
struct Moment {
  double area = 0.0;  ///< [m2]
  Point first;        ///< [m3]

  void operator+=(const Moment& other) {
    area += other.area;
    first += other.first;
  }
};

std::vector<Moment> moments(const Results& results) {
  const mesh::FittedGrid& grid = results.solution->grid();
  std::vector<Moment> result(results.problem->section.parts.size());
  for (int t = 0; t < grid.triangle_count(); ++t) {
    const int part = grid.occupant(t).part;
    if (part < 0) continue;
    const auto p = grid.corners(t);
    const double area = triangle_area(p);
    result[static_cast<std::size_t>(part)] += {area, (area / 3.0) * (p[0] + p[1] + p[2])};
  }
  return result;
}

/// Forces being collected: those that are given.
class Forces {
public:
  explicit Forces(const Results& results) : results_(results), moments_(moments(results)) {}

  void add(const std::string& kind, const solver::Entry& entry,
           const std::vector<std::string>& parts) {
    const bool alternating = results_.alternating();
    const Point force{value_of(entry.figures, alternating ? "force_mean_x" : "force_x"),
                      value_of(entry.figures, alternating ? "force_mean_y" : "force_y")};
    if (std::isnan(force.x) || std::isnan(force.y)) return;
    at_.push_back(centroid(parts));
    name_.push_back(entry.name);
    kind_.push_back(kind);
    force_.push_back(force);
    if (!alternating) return;
    const double direction =
        value_of(entry.figures, "force_peak_direction") * std::numbers::pi / 180.0;
    at_peak_.push_back(value_of(entry.figures, "force_peak") *
                       Point{std::cos(direction), std::sin(direction)});
    peak_at_.push_back(value_of(entry.figures, "force_peak_at"));
  }

  void write_to(const std::filesystem::path& file) const {
    vtkNew<vtkPoints> points;
    points->SetDataTypeToDouble();
    vtkNew<vtkCellArray> vertices;
    for (const Point p : at_) {
      vertices->InsertNextCell(1);
      vertices->InsertCellPoint(points->InsertNextPoint(p.x, p.y, 0.0));
    }
    vtkNew<vtkPolyData> data;
    data->SetPoints(points);
    data->SetVerts(vertices);
    vtkFieldData* to = data->GetPointData();
    add_texts(to, "name", name_);
    add_texts(to, "kind", kind_);
    if (results_.alternating()) {
      add_vectors(to, "force_mean_N_per_m", force_);
      add_vectors(to, "force_at_peak_N_per_m", at_peak_);
      add_scalars(to, "force_peak_at_deg", peak_at_);
    } else {
      add_vectors(to, "force_N_per_m", force_);
    }
    add_labels(data, results_);
    write(data, file);
  }

private:
  Point centroid(const std::vector<std::string>& names) const {
    const auto& parts = results_.problem->section.parts;
    Moment sum;
    for (std::size_t k = 0; k < parts.size(); ++k) {
      if (std::find(names.begin(), names.end(), parts[k].name) != names.end()) sum += moments_[k];
    }
    return (1.0 / sum.area) * sum.first;
  }

  const Results& results_;
  std::vector<Moment> moments_;  ///< per part
  std::vector<Point> at_;
  std::vector<std::string> name_;
  std::vector<std::string> kind_;
  std::vector<Point> force_;  ///< with a frequency the mean
  std::vector<Point> at_peak_;
  std::vector<double> peak_at_;  ///< [deg]
};

/// Ends of the stretches of a probe line that are joined: a line round several groups of parts
/// that stand far apart leaps from one group to the next.
std::vector<std::size_t> stretch_ends(const std::vector<Point>& points) {
  std::vector<double> spacing;
  for (std::size_t k = 1; k < points.size(); ++k) {
    spacing.push_back(distance(points[k - 1], points[k]));
  }
  std::vector<std::size_t> ends;
  if (!spacing.empty()) {
    std::vector<double> sorted = spacing;
    const auto middle = sorted.begin() + static_cast<std::ptrdiff_t>(sorted.size() / 2);
    std::nth_element(sorted.begin(), middle, sorted.end());
    for (std::size_t k = 0; k < spacing.size(); ++k) {
      if (spacing[k] > 3.0 * *middle) ends.push_back(k + 1);
    }
  }
  ends.push_back(points.size());
  return ends;
}

}  // namespace

void write_forces(const Results& results, const std::filesystem::path& folder) {
  Forces forces(results);
  for (const solver::Entry& bar : results.figures.bars) forces.add("bar", bar, {bar.name});
  for (const solver::Entry& wall : results.figures.walls) forces.add("wall", wall, {wall.name});
  for (const solver::Entry& body : results.figures.bodies) forces.add("body", body, body.parts);
  forces.write_to(folder / "forces.vtp");
}

void write_probes(const Results& results, const std::filesystem::path& folder) {
  const bool alternating = results.alternating();
  vtkNew<vtkPoints> points;
  points->SetDataTypeToDouble();
  vtkNew<vtkCellArray> vertices;
  vtkNew<vtkCellArray> lines;
  std::vector<std::string> of_point;
  std::vector<std::string> of_vertex;
  std::vector<std::string> of_line;
  FluxDensityArrays arrays;
  arrays.b.resize(alternating ? 2 : 1);
  for (const solver::ProbeFigures& probe : results.figures.probes) {
    const vtkIdType first = points->GetNumberOfPoints();
    std::vector<Point> place;
    for (const solver::ProbePoint& point : probe.points) {
      points->InsertNextPoint(point.at.x, point.at.y, 0.0);
      place.push_back(point.at);
      of_point.push_back(probe.probe.name);
      for (std::size_t k = 0; k < arrays.b.size(); ++k) {
        const std::string suffix = !alternating ? "" : k == 0 ? "_in_phase" : "_quadrature";
        arrays.b[k].push_back(
            {value_of(point.figures, "b_x" + suffix), value_of(point.figures, "b_y" + suffix)});
      }
      arrays.rms.push_back(value_of(point.figures, "b_rms"));
      arrays.peak.push_back(value_of(point.figures, "b_peak"));
    }
    std::size_t from = 0;
    for (const std::size_t end : stretch_ends(place)) {
      const bool line = end - from > 1;
      vtkCellArray* cells = line ? lines : vertices;
      (line ? of_line : of_vertex).push_back(probe.probe.name);
      cells->InsertNextCell(static_cast<int>(end - from));
      for (; from < end; ++from) cells->InsertCellPoint(first + static_cast<vtkIdType>(from));
    }
  }
  vtkNew<vtkPolyData> data;
  data->SetPoints(points);
  data->SetVerts(vertices);
  data->SetLines(lines);
  add_texts(data->GetPointData(), "probe", of_point);
  add_flux_density(data->GetPointData(), arrays);
  // Cells run: all vertices, then all lines.
  of_vertex.insert(of_vertex.end(), of_line.begin(), of_line.end());
  add_texts(data->GetCellData(), "probe", of_vertex);
  add_labels(data, results);
  write(data, folder / "probes.vtp");
}

}  // namespace barwall::io
