#pragma once

#include <string>

#include "io/results.hpp"

namespace barwall::io {

/// The text of figures.json: every number of a run, in the order of the case file. The same
/// results give the same bytes; a value not given is null.
std::string figures_json(const Results& results);

}  // namespace barwall::io
