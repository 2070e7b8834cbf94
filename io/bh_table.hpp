#pragma once

#include <array>
#include <memory>
#include <string_view>
#include <vector>

#include "io/case_text.hpp"
#include "solver/bh_curve.hpp"

namespace barwall::io {

/// Most rows of one B-H table.
inline constexpr std::size_t most_bh_rows = 10'000;

/// The rows of a B-H table as they stand somewhere, with the places of H and B in each.
struct BhTable {
  Place place;  ///< of the table as a whole
  std::vector<solver::BhPoint> points;
  std::vector<std::array<Place, 2>> places;
};

/// Reads a curve file: lines of text, `#` begins a comment, the first line that holds anything is
/// `H_A_per_m,B_T`, every other one is H [A/m] and B [T] with a comma between. Blanks, empty lines,
/// a byte order mark, Windows line ends and a missing last one do not matter.
/// \param csv its file names the curve file in messages
/// \throws InputError
BhTable read_curve_file(const CaseText& csv, std::string_view bytes);

/// Reads bh_points = [[H, B], ...].
/// \throws InputError
BhTable read_bh_points(const CaseText& text, const TomlValue& value);

/// The curve through a table's rows.
/// \param what how messages call the table
/// \throws InputError at the place of the row that does not fit
std::shared_ptr<const solver::BhCurve> curve_through(const CaseText& text, const BhTable& table,
                                                     std::string_view what);

}  // namespace barwall::io
