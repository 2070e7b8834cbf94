#pragma once

#include <string>

#include "io/results.hpp"

namespace barwall::io {

/// The text of figures.csv: one line for every figure of figures.json, by address; the points of
/// probe lines stand in probes.csv. Values as in figures.json; empty where not given. A probe's
/// field has the probe's limit beside it, a check's measured value the check's.
std::string figures_csv(const Results& results);

/// The text of probes.csv: one line for every point of every probe.
std::string probes_csv(const Results& results);

/// The text of fault_forces.csv: one line for every instant of a fault from closing on, with the
/// currents of its bars [A] and the forces on every bar, piece, wall and body that is given one
/// [N/m], headed by their addresses: "bars/L1/current_a", "bars/N/pieces/N.1/force_x_n_per_m".
/// Only where results.fault_over_time().
std::string fault_forces_csv(const Results& results);

/// A field of a CSV line (RFC 4180): in quotation marks where it holds one, a comma or a line end.
std::string csv_field(const std::string& text);

}  // namespace barwall::io
