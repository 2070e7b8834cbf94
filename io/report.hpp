#pragma once

#include <filesystem>
#include <string>

#include "io/results.hpp"

namespace barwall::io {

/// A run as one page of HTML that refers to nothing outside itself: the verdict, the picture,
/// every figure, the checks, the notices, the case's data and what the model leaves out.
/// \param picture_png bytes of the picture, set into the page
/// \param fault_png the same of the fault over time, where results.fault_over_time()
std::string report_html(const Results& results, const std::string& picture_png,
                        const std::string& fault_png = {});

/// A figure as the report shows it: with a fitting prefix, degrees and shares of a limit in
/// their own way, "-" where it is not given.
std::string shown(const solver::Figure& figure);

/// Writes report.html, with the folder's picture.png and fault.png set into it, or drawn anew where
/// the folder has none.
/// \throws std::runtime_error when it cannot be drawn or written
void write_report(const Results& results, const std::filesystem::path& folder);

}  // namespace barwall::io
