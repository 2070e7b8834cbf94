#include "io/folder_rules.hpp"

#include <fmt/format.h>
#include <unistd.h>

#include <cerrno>
#include <fstream>
#include <nlohmann/json.hpp>
#include <sstream>

#include "io/input_error.hpp"
#include "io/run_json.hpp"
#include "io/write_error.hpp"
#include "solver/instants.hpp"

namespace barwall::io {

namespace fs = std::filesystem;

namespace {

std::string read_text(const fs::path& file) {
  std::ifstream stream(file, std::ios::binary);
  std::ostringstream text;
  text << stream.rdbuf();
  return text.str();
}

/// A JSON file of barwall's, or null: it has a "barwall" version and a case.
nlohmann::json read_own_json(const fs::path& file) {
  std::error_code error;
  if (!fs::is_regular_file(file, error)) return nullptr;
  auto json = nlohmann::json::parse(read_text(file), nullptr, false);
  const bool own = json.is_object() && json.contains("barwall") && json.contains("case") &&
                   json["case"].is_object();
  return own ? json : nlohmann::json(nullptr);
}

std::string text_at(const nlohmann::json& json, const char* key) {
  if (!json.is_object()) return {};
  const auto found = json["case"].find(key);
  return found != json["case"].end() && found->is_string() ? found->get<std::string>() : "";
}

/// True when a file that a drawing would replace is a drawing of barwall's, told by the comment
/// at the end of section.svg.
bool own_drawing(const fs::path& folder) {
  const std::string text = read_text(folder / "section.svg");
  const std::string mark = drawing_mark();
  return text.size() >= mark.size() &&
         text.compare(text.size() - mark.size(), mark.size(), mark) == 0;
}

void refuse_foreign(const fs::path& folder, Contents contents) {
  for (const std::string& name : file_names(contents)) {
    if (!present(folder / name)) continue;
    throw InputError(
        fmt::format("{}: the folder holds a {} that barwall did not write; move it away or name "
                    "another folder with --out",
                    folder.string(), name));
  }
}

/// The nearest part of a path that exists.
fs::path existing_part(const fs::path& path) {
  fs::path part = without_last_slash(fs::absolute(path).lexically_normal());
  while (!present(part) && part.has_relative_path()) part = part.parent_path();
  return part;
}

}  // namespace

bool present(const fs::path& path) {
  std::error_code error;
  const auto status = fs::symlink_status(path, error);
  return fs::exists(status);
}

fs::path without_last_slash(const fs::path& path) {
  return path.has_filename() || !path.has_relative_path() ? path : path.parent_path();
}

const std::vector<std::string>& file_names(Contents contents) {
  static const std::vector<std::string> results = [] {
    std::vector<std::string> names = {
        "figures.json",  "figures.csv",     "run.json",       "probes.csv",  "field.vtu",
        "field_far.vtu", "outlines.vtp",    "flux_lines.vtp", "forces.vtp",  "probes.vtp",
        "report.html",   "picture.png",     "picture.svg",    "picture.pdf", "fault.png",
        "fault.svg",     "fault_forces.csv"};
    for (const std::string series : {"cycle", "fault"}) {
      names.push_back(series + ".pvd");
      for (std::size_t k = 0; k <= static_cast<std::size_t>(solver::most_instants); ++k)
        names.push_back(instant_file(series, k));
    }
    return names;
  }();
  static const std::vector<std::string> drawing = {"section.png", "section.svg", "section.pdf"};
  return contents == Contents::results ? results : drawing;
}

std::string instant_file(const std::string& series, std::size_t k) {
  return fmt::format("{}_{:02d}.vtu", series, k);
}

fs::path default_folder(const Case& input) {
  return fs::path("results") / input.name;
}

std::string drawing_mark() {
  return "<!-- drawn by barwall -->\n";
}

Holding look_into(const fs::path& folder, const Case& input) {
  Holding holding;
  const nlohmann::json figures = read_own_json(folder / "figures.json");
  const nlohmann::json run = read_own_json(folder / "run.json");
  holding.own_results = !figures.is_null() || !run.is_null();
  if (!holding.own_results) return holding;
  const std::string place = place_of_case(input, folder);
  holding.same_case = text_at(figures, "sha256") == input.sha256 ||
                      text_at(run, "sha256") == input.sha256 ||
                      (!place.empty() && text_at(run, "file") == place);
  holding.title = figures.is_null() ? text_at(run, "name") : text_at(figures, "title");
  return holding;
}

void check_folder(const fs::path& folder, const Case& input, Contents contents, bool replace) {
  const fs::path existing = existing_part(folder);
  std::error_code error;
  if (!fs::is_directory(existing, error)) {
    throw InputError(fmt::format("{}: {} is no folder, so no results can be written there",
                                 folder.string(), existing.string()));
  }
  if (::access(existing.c_str(), W_OK | X_OK) != 0) {
    throw WriteError(fmt::format("{}: cannot write into the folder: {}", existing.string(),
                                 std::generic_category().message(errno)));
  }
  if (!present(folder)) return;
  for (const std::string& name : file_names(contents)) {
    if (!fs::is_directory(folder / name, error)) continue;
    throw InputError(
        fmt::format("{}: {} is a folder where a file is to be written", folder.string(), name));
  }
  const Holding holding = look_into(folder, input);
  if (holding.own_results && !holding.same_case && !replace) {
    throw InputError(
        fmt::format("{}: the folder holds the results of another case, \"{}\"; name another folder "
                    "with --out, or give --replace to replace them",
                    folder.string(), holding.title));
  }
  if (contents == Contents::results) {
    if (!holding.own_results) refuse_foreign(folder, contents);
  } else if (!own_drawing(folder)) {
    refuse_foreign(folder, contents);
  }
}

}  // namespace barwall::io
