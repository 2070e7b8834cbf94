#pragma once

#include <filesystem>
#include <string>
#include <vector>

namespace barwall::support {

/// The four folders in their order: each may include from itself and from those before it.
inline constexpr const char* layers[] = {"mesh", "solver", "verify", "io"};

/// Files of a folder with one of the extensions, sorted.
std::vector<std::filesystem::path> files_of(const std::filesystem::path& folder,
                                            const std::vector<std::string>& extensions);

/// The include lines of a file as they stand, comments left out: what lies between the quotes or
/// angles, also within __has_include.
std::vector<std::string> includes_of(const std::filesystem::path& file);

/// Every include below `root` that climbs from a layer to a later one, as "file: include".
std::vector<std::string> climbing_includes(const std::filesystem::path& root);

/// Headers of a layer that no source file of the same name begins with: those the build itself
/// does not compile alone.
std::vector<std::filesystem::path> headers_not_first_anywhere(const std::filesystem::path& layer);

/// True when a file compiles as its own translation unit with a layer's include folders.
bool compiles_alone(const std::filesystem::path& header, const std::string& layer);

}  // namespace barwall::support
