#pragma once

#include <filesystem>

#include "io/results.hpp"
#include "io/write_error.hpp"

namespace barwall::io {

/// Box round the section, 3 section sizes (the longer side of the box round all parts) to every
/// side of its centre, and round all probes [m]: what field.vtu covers.
mesh::Box near_box(const Results& results);

/// Writes the field as VTK files, in metres, into an existing folder:
///
/// - field.vtu, the grid's cells that cover `near_box`, and field_far.vtu, all others. A node on
///   an outline stands once per occupant, so that jumps stay. Per point the recovered B_T and
///   H_A_per_m, and A_Wb_per_m; per cell J_A_per_m2, mu_r, part, B_cell_T.
/// - outlines.vtp, every outline with the parts on its two sides; flux_lines.vtp;
///   forces.vtp, the force of every part and body at its centroid; probes.vtp.
///
/// With a frequency the names carry _in_phase and _quadrature (r.m.s.) before the unit, and B_rms_T
/// and B_peak_T stand beside them. Vectors have three components. Every file carries the case's
/// title, hash, verdict and the parts' names as field data. The same results give the same bytes.
/// \throws WriteError when a file could not be written whole
void write_vtk(const Results& results, const std::filesystem::path& folder);

}  // namespace barwall::io
