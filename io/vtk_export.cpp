#include "io/vtk_export.hpp"

#include "io/vtk_files.hpp"

namespace barwall::io {

mesh::Box section_surroundings(const Results& results) {
  const mesh::Point centre = bounds(results.problem->section).centre();
  const double distance = 3.0 * 2.0 * half_size(results.problem->section);
  return {centre - mesh::Point{distance, distance}, centre + mesh::Point{distance, distance}};
}

mesh::Box near_box(const Results& results) {
  mesh::Box box = section_surroundings(results);
  for (const solver::ProbeFigures& probe : results.figures.probes) {
    for (const mesh::Point point : probe.probe.points) box.include(point);
  }
  return box;
}

void write_vtk(const Results& results, const std::filesystem::path& folder) {
  write_field(results, folder);
  write_series(results, folder);
  write_outlines(results, folder);
  write_flux_lines(results, folder);
  write_forces(results, folder);
  write_probes(results, folder);
}

}  // namespace barwall::io
