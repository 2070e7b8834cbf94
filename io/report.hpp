#pragma once

#include <filesystem>
#include <string>

#include "io/results.hpp"

namespace barwall::io {

/// A run as one page of HTML that refers to nothing outside itself: the verdict, the picture,
/// every figure, the checks, the notices, the case's data and what the model leaves out.
/// \param picture_png bytes of the picture, set into the page
std::string report_html(const Results& results, const std::string& picture_png);

/// A figure as the report shows it: with a fitting prefix, degrees and shares of a limit in
/// their own way, "-" where it is not given.
std::string shown(const solver::Figure& figure);

/// Writes report.html, with the folder's picture.png set into it, or one drawn anew where the
/// folder has none.
/// \throws std::runtime_error when it cannot be drawn or written
void write_report(const Results& results, const std::filesystem::path& folder);

}  // namespace barwall::io
