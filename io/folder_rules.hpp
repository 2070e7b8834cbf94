#pragma once

#include <cstddef>
#include <filesystem>
#include <string>
#include <vector>

#include "io/case.hpp"

namespace barwall::io {

/// What a command writes into a results folder; of what lies there, only files of these names are
/// ever replaced or removed.
enum class Contents { results, drawing };

/// Names of the files of each, whether or not a run writes all of them.
const std::vector<std::string>& file_names(Contents contents);

/// Name of the k-th file of a time series: "cycle_03.vtu".
std::string instant_file(const std::string& series, std::size_t k);

/// Where a case's results go without --out: results/NAME under the current folder.
std::filesystem::path default_folder(const Case& input);

/// What a folder holds already.
struct Holding {
  bool own_results = false;  ///< results that barwall wrote
  bool same_case = false;    ///< of this case: the same case file, or the same bytes
  std::string title;         ///< of the results' case
};

Holding look_into(const std::filesystem::path& folder, const Case& input);

/// Refuses a folder that may not be written for this case, before any work is done: one that
/// holds another case's results (neither the same case file nor the same bytes) unless `replace`,
/// and one with files of barwall's names that are not barwall's.
/// \throws InputError for those and where a file stands in the way, WriteError where writing is
/// not permitted
void check_folder(const std::filesystem::path& folder, const Case& input, Contents contents,
                  bool replace);

/// The comment that ends a section.svg of barwall's, by which it knows its own drawing.
std::string drawing_mark();

/// True when there is anything at a path, a dangling link too.
bool present(const std::filesystem::path& path);

/// "a/b" of "a/b/".
std::filesystem::path without_last_slash(const std::filesystem::path& path);

}  // namespace barwall::io
