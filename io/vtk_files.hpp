#pragma once

#include <filesystem>

#include "io/results.hpp"

namespace barwall::io {

// The single files of write_vtk, each \throws WriteError.

/// field.vtu and field_far.vtu.
void write_field(const Results& results, const std::filesystem::path& folder);
/// With alternating currents in saturable steel cycle.pvd, the instants of half a cycle as a time
/// series, with cycle_00.vtu and so on; in a fault the same as fault.pvd, from closing on. They cover
/// the section's surroundings, as steady fields in single precision: B_T, A_Wb_per_m, J_A_per_m2,
/// mu_r, part.
void write_series(const Results& results, const std::filesystem::path& folder);
/// outlines.vtp: a polyline per outline piece; of a circle no chord is farther than 4e-5 of the
/// radius from it.
void write_outlines(const Results& results, const std::filesystem::path& folder);
/// flux_lines.vtp: 40 levels of A in the box that field.vtu covers round the section.
void write_flux_lines(const Results& results, const std::filesystem::path& folder);
/// forces.vtp: a point for every bar, wall and body whose force is given.
void write_forces(const Results& results, const std::filesystem::path& folder);
/// probes.vtp: the probes' points, those of a line joined.
void write_probes(const Results& results, const std::filesystem::path& folder);

/// The section's box alone, 3 section sizes to every side of its centre [m].
mesh::Box section_surroundings(const Results& results);

}  // namespace barwall::io
