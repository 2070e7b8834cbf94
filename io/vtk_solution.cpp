#include "io/vtk_solution.hpp"

#include <vtkCellArray.h>
#include <vtkCellData.h>
#include <vtkCellType.h>
#include <vtkFloatArray.h>
#include <vtkNew.h>
#include <vtkPointData.h>
#include <vtkPoints.h>

#include "io/vtk_arrays.hpp"
#include "solver/constants.hpp"

namespace barwall::io {
namespace {

using mesh::Point;

/// Sets points and cells. Points are the places that the triangles' corners have, ascending:
/// returned, and with them one triangle that meets each place.
struct Places {
  std::vector<int> place;
  std::vector<int> triangle;
};

Places add_mesh(vtkUnstructuredGrid* data, const mesh::FittedGrid& grid,
                const solver::RecoveredField& field, const std::vector<int>& chosen) {
  std::vector<int> triangle_at(static_cast<std::size_t>(field.place_count()), -1);
  for (const int t : chosen) {
    for (const int place : field.places(t)) triangle_at[static_cast<std::size_t>(place)] = t;
  }
  Places used;
  std::vector<int> point_of(triangle_at.size(), -1);
  for (std::size_t place = 0; place < triangle_at.size(); ++place) {
    if (triangle_at[place] < 0) continue;
    point_of[place] = static_cast<int>(used.place.size());
    used.place.push_back(static_cast<int>(place));
    used.triangle.push_back(triangle_at[place]);
  }
  vtkNew<vtkPoints> points;
  points->SetDataTypeToDouble();
  points->SetNumberOfPoints(static_cast<vtkIdType>(used.place.size()));
  for (std::size_t k = 0; k < used.place.size(); ++k) {
    const Point p = grid.nodes[static_cast<std::size_t>(field.node_of_place(used.place[k]))];
    points->SetPoint(static_cast<vtkIdType>(k), p.x, p.y, 0.0);
  }
  data->SetPoints(points);
  vtkNew<vtkCellArray> cells;
  cells->AllocateExact(static_cast<vtkIdType>(chosen.size()),
                       3 * static_cast<vtkIdType>(chosen.size()));
  for (const int t : chosen) {
    cells->InsertNextCell(3);
    for (const int place : field.places(t)) {
      cells->InsertCellPoint(point_of[static_cast<std::size_t>(place)]);
    }
  }
  data->SetCells(VTK_TRIANGLE, cells);
  return used;
}

/// How much of a solution is told.
enum class Detail { all, without_h_and_cells };

/// B and H as recovered in the place's own occupant, and A.
void add_point_data(vtkUnstructuredGrid* data, const solver::Solution& solution,
                    const solver::RecoveredField& field, const Places& used, Detail detail) {
  FluxDensityArrays arrays;
  arrays.b.resize(static_cast<std::size_t>(solution.pattern_count()));
  for (std::size_t pattern = 0; pattern < arrays.b.size(); ++pattern) {
    for (const int place : used.place) {
      arrays.b[pattern].push_back(field.flux_density(place, static_cast<int>(pattern)));
    }
  }
  for (const int place : used.place) {
    arrays.rms.push_back(field.rms(place));
    arrays.peak.push_back(field.peak(place));
  }
  const bool alternating = solution.problem->excitation.alternating();
  vtkFieldData* to = data->GetPointData();
  add_flux_density(to, arrays);
  for (int k = 0; k < solution.pattern_count(); ++k) {
    if (detail == Detail::all) {
      std::vector<Point> h;
      for (const int place : used.place) h.push_back(field.field_strength(place, k));
      add_vectors(to, quantity_name("H", "A_per_m", k, alternating), h);
    }
    std::vector<double> a;
    for (const int place : used.place) {
      a.push_back(solution.potential(field.node_of_place(place), k));
    }
    add_scalars(to, quantity_name("A", "Wb_per_m", k, alternating), a);
  }
}

void add_cell_data(vtkUnstructuredGrid* data, const solver::Solution& solution,
                   const std::vector<int>& chosen, Detail detail) {
  const bool alternating = solution.problem->excitation.alternating();
  const mesh::FittedGrid& grid = solution.grid();
  vtkFieldData* to = data->GetCellData();
  std::vector<std::int32_t> part;
  std::vector<double> permeability;
  for (const int t : chosen) {
    part.push_back(grid.occupant(t).part + 1);
    permeability.push_back(solver::nu_0 / solution.reluctivity[static_cast<std::size_t>(t)]);
  }
  add_integers(to, "part", part);
  add_scalars(to, "mu_r", permeability);
  for (int k = 0; k < solution.pattern_count(); ++k) {
    const auto density = density_by_region(
        *solution.problem, solution.patterns[static_cast<std::size_t>(k)].part_current);
    std::vector<double> j;
    for (const int t : chosen) {
      j.push_back(density[static_cast<std::size_t>(grid.region[static_cast<std::size_t>(t)])]);
    }
    add_scalars(to, quantity_name("J", "A_per_m2", k, alternating), j);
    if (detail != Detail::all) continue;
    std::vector<Point> b;
    for (const int t : chosen) {
      b.push_back(solver::cell_flux_density(grid, t, solution.potential.col(k)));
    }
    add_vectors(to, quantity_name("B_cell", "T", k, alternating), b);
  }
}

void add_told(vtkUnstructuredGrid* data, const solver::Solution& solution,
              const solver::RecoveredField& field, const std::vector<int>& triangles,
              Detail detail) {
  const Places used = add_mesh(data, solution.grid(), field, triangles);
  add_point_data(data, solution, field, used, detail);
  add_cell_data(data, solution, triangles, detail);
}

/// Turns points and arrays of doubles into floats.
void make_single(vtkUnstructuredGrid* data) {
  vtkNew<vtkPoints> points;
  points->SetDataTypeToFloat();
  points->DeepCopy(data->GetPoints());
  data->SetPoints(points);
  for (vtkFieldData* fields : {static_cast<vtkFieldData*>(data->GetPointData()),
                               static_cast<vtkFieldData*>(data->GetCellData())}) {
    for (int k = 0; k < fields->GetNumberOfArrays(); ++k) {
      vtkDataArray* array = fields->GetArray(k);
      if (array == nullptr || array->GetDataType() != VTK_DOUBLE) continue;
      vtkNew<vtkFloatArray> single;
      single->DeepCopy(array);
      fields->AddArray(single);  // takes the place of the one of its name
    }
  }
}

}  // namespace

std::vector<int> triangles_of(const mesh::FittedGrid& grid, const mesh::GridWindow& window,
                              bool inside) {
  std::vector<int> result;
  for (int j = 0; j < grid.rows - 1; ++j) {
    for (int i = 0; i < grid.columns - 1; ++i) {
      if (window.contains(i, j) != inside) continue;
      const int cell = j * (grid.columns - 1) + i;
      result.push_back(2 * cell);
      result.push_back(2 * cell + 1);
    }
  }
  return result;
}

void add_solution(vtkUnstructuredGrid* data, const solver::Solution& solution,
                  const solver::RecoveredField& field, const std::vector<int>& triangles) {
  add_told(data, solution, field, triangles, Detail::all);
}

void add_instant(vtkUnstructuredGrid* data, const solver::Solution& solution,
                 const solver::RecoveredField& field, const std::vector<int>& triangles) {
  add_told(data, solution, field, triangles, Detail::without_h_and_cells);
  make_single(data);
}

}  // namespace barwall::io
