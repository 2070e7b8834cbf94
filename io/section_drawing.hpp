#pragma once

#include <complex>
#include <string>
#include <vector>

#include "io/frame.hpp"
#include "io/label_placement.hpp"
#include "solver/problem.hpp"

namespace barwall::io {

/// The parts of a section fill their areas with flat colours, one per part; what is covered or
/// cut away does not show.
void fill_parts(Canvas& canvas, const mesh::Outline& outline, const Frame& frame,
                const std::vector<Colour>& colours);

/// Every visible outline; thin parts get thin lines.
void draw_outlines(Canvas& canvas, const solver::Problem& problem, const Frame& frame);

/// Current of each part at an instant, for its sign alone [A]: in-phase cos wt - quadrature sin wt.
std::vector<double> currents_at(const solver::Excitation& excitation, double wt);

/// The names of all visible parts, and on every bar the sign of its current: a dot towards the
/// reader, a cross away, an empty ring for none. Names that find no free place are left out.
/// \param currents one per part; empty for no signs
/// \return how many names were left out
int draw_names(Canvas& canvas, const solver::Problem& problem, const Frame& frame,
               const std::vector<double>& currents, LabelPlacement& labels, double text_size);

/// Ring with a dot, a cross or nothing in it.
void draw_current_sign(Canvas& canvas, PagePoint centre, double radius, double current);

}  // namespace barwall::io
