#include <vtkNew.h>

#include "io/vtk_arrays.hpp"
#include "io/vtk_export.hpp"
#include "io/vtk_files.hpp"
#include "io/vtk_solution.hpp"

namespace barwall::io {

void write_field(const Results& results, const std::filesystem::path& folder) {
  const mesh::FittedGrid& grid = results.solution->grid();
  const mesh::GridWindow window = window_covering(grid, near_box(results));
  for (const bool near : {true, false}) {
    vtkNew<vtkUnstructuredGrid> data;
    add_solution(data, *results.solution, *results.field, triangles_of(grid, window, near));
    add_labels(data, results);
    write(data, folder / (near ? "field.vtu" : "field_far.vtu"));
  }
}

}  // namespace barwall::io
