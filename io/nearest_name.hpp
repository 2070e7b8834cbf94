#pragma once

#include <string>
#include <string_view>
#include <vector>

namespace barwall::io {

/// Least number of letters to insert, delete, replace or swap with their neighbour that turns
/// `first` into `second`, capitals counting as small letters (V. I. Levenshtein, Soviet Physics
/// Doklady 10, 1966; F. J. Damerau, Comm. ACM 7, 1964).
int edit_distance(std::string_view first, std::string_view second);

/// The candidate nearest to a mistyped name; empty when none is close, that is, when more than
/// a third of the letters would have to change and none begins with all of it (a forgotten
/// unit). Of equally near ones the first.
std::string nearest_name(std::string_view mistyped, const std::vector<std::string>& candidates);

/// `; did you mean "..."?` with the nearest candidate, or nothing when none is close.
std::string suggestion(std::string_view mistyped, const std::vector<std::string>& candidates);

}  // namespace barwall::io
