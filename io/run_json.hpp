#pragma once

#include <filesystem>
#include <string>

#include "io/results.hpp"

namespace barwall::io {

/// The text of run.json: what the run took and how the solve went, which may differ from run to
/// run, and which case file it was of.
/// \param folder the results folder; the case file's place is given from there
std::string run_json(const Results& results, const std::filesystem::path& folder);

/// A case file's place as seen from a results folder, so that both can be moved together.
std::string place_of_case(const Case& input, const std::filesystem::path& folder);

/// Largest memory that this process has held so far [bytes].
double peak_memory();

}  // namespace barwall::io
