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

/// A field of a CSV line (RFC 4180): in quotation marks where it holds one, a comma or a line end.
std::string csv_field(const std::string& text);

}  // namespace barwall::io
