#include <fmt/format.h>
#include <vtkFieldData.h>
#include <vtkNew.h>
#include <vtkUnstructuredGrid.h>

#include <exception>
#include <numbers>

#include "io/folder_rules.hpp"
#include "io/results_folder.hpp"
#include "io/vtk_arrays.hpp"
#include "io/vtk_files.hpp"
#include "io/vtk_solution.hpp"

namespace barwall::io {
namespace {

void write_instants(const Results& results, const solver::Instants& instants,
                    const std::vector<double>& seconds, const std::string& name,
                    const std::filesystem::path& folder) {
  std::string collection =
      "<?xml version=\"1.0\"?>\n<VTKFile type=\"Collection\" version=\"0.1\">\n <Collection>\n";
  for (std::size_t k = 0; k < instants.size(); ++k) {
    collection += fmt::format("  <DataSet timestep=\"{:.9g}\" file=\"{}\"/>\n", seconds[k],
                              instant_file(name, k));
  }
  collection += " </Collection>\n</VTKFile>\n";
  const mesh::FittedGrid& grid = results.solution->grid();
  const std::vector<int> triangles =
      triangles_of(grid, window_covering(grid, section_surroundings(results)), true);
  std::vector<std::exception_ptr> failures(instants.size());
#pragma omp parallel for schedule(dynamic)
  for (std::size_t k = 0; k < instants.size(); ++k) {
    try {
      const solver::Solution& solution = *instants.solution[k];
      vtkNew<vtkUnstructuredGrid> data;
      add_instant(data, solution, solver::RecoveredField(solution), triangles);
      add_labels(data, results);
      add_scalars(data->GetFieldData(), "time_s", {seconds[k]});
      write(data, folder / instant_file(name, k));
    } catch (...) {
      failures[k] = std::current_exception();
    }
  }
  for (const std::exception_ptr& failure : failures) {
    if (failure) std::rethrow_exception(failure);
  }
  write_text(folder / (name + ".pvd"), collection);
}

}  // namespace

void write_series(const Results& results, const std::filesystem::path& folder) {
  if (const auto& instants = results.instants) {
    std::vector<double> seconds;
    for (const double wt : instants->wt) {
      seconds.push_back(wt / (2.0 * std::numbers::pi * results.problem->excitation.frequency_hz));
    }
    write_instants(results, *instants, seconds, "cycle", folder);
  }
  if (results.fault && results.fault->course) {
    write_instants(results, *results.fault->course, results.fault->course_seconds, "fault", folder);
  }
}

}  // namespace barwall::io
