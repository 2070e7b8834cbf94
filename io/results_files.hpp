#pragma once

#include <filesystem>

#include "io/results.hpp"

namespace barwall::io {

/// Writes every file of a results folder (fill_folder says how); the time it takes becomes the
/// last of the stages.
/// \throws InputError, WriteError
void write_results(Results& results, const std::filesystem::path& folder, bool replace);

/// Writes the drawing of a section and its grid.
/// \throws InputError, WriteError
void write_drawing(const Case& input, const solver::Problem& problem,
                   const std::filesystem::path& folder, bool replace);

}  // namespace barwall::io
