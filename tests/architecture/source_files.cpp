#include "tests/architecture/source_files.hpp"

#include <algorithm>
#include <cstdlib>
#include <fstream>
#include <iterator>
#include <regex>
#include <sstream>
#include <stdexcept>

namespace barwall::support {

namespace fs = std::filesystem;

namespace {

/// Position of a folder among the layers, -1 for any other name.
int rank_of(const std::string& folder) {
  const auto* found = std::find(std::begin(layers), std::end(layers), folder);
  return found == std::end(layers) ? -1 : static_cast<int>(found - std::begin(layers));
}

std::string text_of(const fs::path& file) {
  std::ifstream stream(file);
  if (!stream) throw std::runtime_error(file.string() + " cannot be read");
  std::ostringstream text;
  text << stream.rdbuf();
  return text.str();
}

}  // namespace

std::vector<fs::path> files_of(const fs::path& folder, const std::vector<std::string>& extensions) {
  std::vector<fs::path> files;
  for (const auto& entry : fs::recursive_directory_iterator(folder)) {
    const std::string extension = entry.path().extension().string();
    if (std::find(extensions.begin(), extensions.end(), extension) != extensions.end()) {
      files.push_back(entry.path());
    }
  }
  std::sort(files.begin(), files.end());
  return files;
}

std::vector<std::string> includes_of(const fs::path& file) {
  static const std::regex form(R"re((?:#\s*include|__has_include\s*\()\s*[<"]([^>"\n]+)[>"])re");
  static const std::regex line_comment(R"(//[^\n]*)");
  const std::string text = std::regex_replace(text_of(file), line_comment, "");
  std::vector<std::string> includes;
  for (std::sregex_iterator it(text.begin(), text.end(), form), end; it != end; ++it) {
    includes.push_back((*it)[1]);
  }
  return includes;
}

std::vector<std::string> climbing_includes(const fs::path& root) {
  std::vector<std::string> climbing;
  for (const std::string layer : layers) {
    if (!fs::exists(root / layer)) continue;
    for (const fs::path& file : files_of(root / layer, {".hpp", ".h", ".cpp", ".inl"})) {
      const fs::path place = file.lexically_relative(root);
      for (const std::string& include : includes_of(file)) {
        // "../io/case.hpp" climbs as "io/case.hpp" does.
        const fs::path within = include.starts_with(".")
                                    ? (place.parent_path() / include).lexically_normal()
                                    : fs::path(include).lexically_normal();
        if (rank_of(within.begin()->string()) > rank_of(layer)) {
          climbing.push_back(place.string() + ": " + include);
        }
      }
    }
  }
  return climbing;
}

std::vector<fs::path> headers_not_first_anywhere(const fs::path& layer) {
  std::vector<fs::path> headers;
  for (const fs::path& header : files_of(layer, {".hpp"})) {
    const fs::path source = fs::path(header).replace_extension(".cpp");
    if (fs::exists(source)) {
      const auto includes = includes_of(source);
      const auto own = header.lexically_relative(layer.parent_path()).string();
      if (!includes.empty() && includes.front() == own) continue;
    }
    headers.push_back(header);
  }
  return headers;
}

bool compiles_alone(const fs::path& header, const std::string& layer) {
  const std::string command = std::string("'" BARWALL_COMPILER "' -x c++ -w '@") +
                              BARWALL_OPTIONS_FOLDER + "/compile_" + layer + ".txt' '" +
                              header.string() + "'";
  return std::system(command.c_str()) == 0;
}

}  // namespace barwall::support
