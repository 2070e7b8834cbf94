#include "io/nearest_name.hpp"

#include <algorithm>
#include <cstddef>
#include <cstdlib>

namespace barwall::io {

namespace {

/// Longer names are no typing errors of any valid one.
constexpr std::size_t longest_compared = 100;
/// Shorter names are the beginning of too many others.
constexpr std::size_t shortest_beginning = 3;

std::string lower_case(std::string_view text) {
  std::string result(text);
  for (char& letter : result) {
    if (letter >= 'A' && letter <= 'Z') letter = static_cast<char>(letter - 'A' + 'a');
  }
  return result;
}

}  // namespace

int edit_distance(std::string_view first, std::string_view second) {
  const std::string a = lower_case(first);
  const std::string b = lower_case(second);
  // Rows i - 2, i - 1 and i of the table of distances between the beginnings of both words.
  std::vector<int> before_last(b.size() + 1), last(b.size() + 1), row(b.size() + 1);
  for (std::size_t j = 0; j <= b.size(); ++j) row[j] = static_cast<int>(j);
  for (std::size_t i = 1; i <= a.size(); ++i) {
    before_last.swap(last);
    last.swap(row);
    row[0] = static_cast<int>(i);
    for (std::size_t j = 1; j <= b.size(); ++j) {
      const int replaced = last[j - 1] + (a[i - 1] == b[j - 1] ? 0 : 1);
      row[j] = std::min({last[j] + 1, row[j - 1] + 1, replaced});
      const bool swapped = i > 1 && j > 1 && a[i - 1] == b[j - 2] && a[i - 2] == b[j - 1];
      if (swapped) row[j] = std::min(row[j], before_last[j - 2] + 1);
    }
  }
  return row[b.size()];
}

std::string nearest_name(std::string_view mistyped, const std::vector<std::string>& candidates) {
  if (mistyped.size() > longest_compared) return {};
  std::string nearest;
  int least = 0;
  for (const std::string& candidate : candidates) {
    if (candidate.size() > longest_compared) continue;
    const int longer = static_cast<int>(std::max(mistyped.size(), candidate.size()));
    const bool begins = mistyped.size() >= shortest_beginning &&
                        candidate.compare(0, mistyped.size(), mistyped) == 0;
    const int allowed = begins ? longer : std::max(1, longer / 3);
    const int letters =
        std::abs(static_cast<int>(mistyped.size()) - static_cast<int>(candidate.size()));
    if (letters > allowed || (!nearest.empty() && letters >= least)) continue;
    const int distance = edit_distance(mistyped, candidate);
    if (distance > allowed || distance >= longer) continue;
    if (nearest.empty() || distance < least) {
      nearest = candidate;
      least = distance;
    }
  }
  return nearest;
}

std::string suggestion(std::string_view mistyped, const std::vector<std::string>& candidates) {
  const std::string nearest = nearest_name(mistyped, candidates);
  return nearest.empty() ? std::string() : "; did you mean \"" + nearest + "\"?";
}

}  // namespace barwall::io
