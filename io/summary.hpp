#pragma once

#include <filesystem>
#include <string>

#include "io/results.hpp"

namespace barwall::io {

/// Columns that no line of the summary exceeds.
inline constexpr int summary_width = 100;

/// The results in brief for the terminal: forces, field at the probes, inductances, walls, then
/// checks and notices, the verdict and where the files and the report lie.
/// \param colour marks failures in colour
std::string summary(const Results& results, const std::filesystem::path& folder, bool colour);

/// The checks as a table: passed or failed, name, measured value, limit, and the detail of each
/// that failed.
std::string checks_table(const Results& results, bool colour);

/// One line: verdict, validity and limits.
std::string verdict_line(const Results& results, bool colour);

}  // namespace barwall::io
