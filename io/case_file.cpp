#include <fmt/format.h>

#include <algorithm>
#include <map>
#include <utility>

#include "io/case.hpp"
#include "io/case_currents.hpp"
#include "io/case_fault.hpp"
#include "io/case_material.hpp"
#include "io/case_overlaps.hpp"
#include "io/case_parts.hpp"
#include "io/case_requests.hpp"
#include "io/case_text.hpp"
#include "io/nearest_name.hpp"
#include "io/plain_file.hpp"
#include "io/sha256.hpp"

namespace barwall::io {

namespace {

/// Ten thousand bars fill a quarter of it.
constexpr PlainFileKind case_file{"case", ".toml", 4'000'000};
constexpr std::size_t most_given = 10000;

/// Without a line to point at, messages about the file as a whole point at its beginning.
std::string bytes_of_case(const CaseText& text) {
  try {
    return bytes_of(text.file, case_file);
  } catch (const PlainFileError& error) {
    text.fail({}, error.what());
  }
}

std::string option_of(const Setting& setting) {
  return fmt::format("--set {}={}", setting.name, setting.value);
}

/// Settings by name; two of one name are refused.
std::map<std::string, const Setting*> by_name(const CaseText& text,
                                              const std::vector<Setting>& settings) {
  std::map<std::string, const Setting*> sorted;
  for (const Setting& setting : settings) {
    if (!sorted.emplace(setting.name, &setting).second) {
      text.fail({}, fmt::format("{}: {} is set twice", option_of(setting), setting.name));
    }
  }
  return sorted;
}

/// Reads [given] in file order, each value after those above it; settings replace values.
std::vector<std::pair<std::string, double>> read_given(
    const CaseTable& root, CaseText& text, const std::map<std::string, const Setting*>& settings) {
  std::vector<std::pair<std::string, double>> given;
  std::vector<std::string> names;
  const TomlEntry* entry = root.find("given");
  const TomlTable empty;
  const TomlTable* table = &empty;
  if (entry != nullptr) {
    table = std::get_if<TomlTable>(&entry->value.content);
    if (table == nullptr) {
      text.fail(entry->value.place,
                fmt::format("given is {}; it must be a table [given]", kind_of(entry->value)));
    }
  }
  for (const TomlEntry& name : table->entries) names.push_back(name.key);
  const Place place = entry == nullptr ? Place{} : entry->value.place;
  if (names.size() > most_given) {
    text.fail(place, fmt::format("more than {} names in [given]", most_given));
  }
  for (const auto& [name, setting] : settings) {
    if (std::find(names.begin(), names.end(), name) != names.end()) continue;
    text.fail(place, fmt::format("{}: {} \"{}\"{}", option_of(*setting),
                                 names.empty() ? "the case has no [given] with a name"
                                               : "[given] has no name",
                                 name, suggestion(name, names)));
  }
  for (const TomlEntry& name : table->entries) {
    check_name(text, name.place, name.key, "the name in [given]");
    if (!names_a_value(name.key)) {
      text.fail(name.place,
                fmt::format("\"{}\" cannot be a name in [given]: it must be a letter followed by "
                            "letters, digits and \"_\", and not sqrt, sin, cos or balance",
                            name.key));
    }
    const auto setting = settings.find(name.key);
    double value = 0.0;
    if (setting == settings.end()) {
      value = read_number(text, name.value, name.key, {});
    } else {
      try {
        value = evaluate(setting->second->value, text.given);
      } catch (const ExpressionError& error) {
        text.fail(name.value.place,
                  fmt::format("{}: {}", option_of(*setting->second), error.what()));
      }
    }
    text.given[name.key] = value;
    given.emplace_back(name.key, value);
  }
  return given;
}

}  // namespace

Case read_case(const std::filesystem::path& file, const std::vector<Setting>& settings) {
  CaseText text{file.string(), {}};
  std::string hashed = bytes_of_case(text);
  const TomlValue toml = parse_toml(text.file, hashed);
  const CaseTable root(
      text, toml, "the case",
      {"title", "frequency_hz", "run_length_m", "given", "material", "bar", "three_phase", "wall",
       "opening", "probe", "loop", "fault", "supports", "grid"});
  Case result;
  result.file = text.file;
  result.name = file.stem().string();
  const auto sorted_settings = by_name(text, settings);
  for (const auto& [name, setting] : sorted_settings)
    hashed.append("\n").append(option_of(*setting));

  const TomlEntry* title = root.find("title");
  result.title = title == nullptr ? result.name : read_line(text, title->value, "title");
  result.given = read_given(root, text, sorted_settings);
  if (const TomlEntry* run = root.find("run_length_m")) {
    result.run_length_m =
        read_number(text, run->value, "run_length_m", {0.0, metres(farthest_mm), false, " m"});
  }

  const CaseMaterials materials = read_materials(root);
  for (const std::string& digest : materials.curve_digests) {
    hashed.append("\nbh_curve ").append(digest);
  }
  result.sha256 = sha256(hashed);
  CaseParts parts = read_parts(root, materials.by_name);
  CaseCurrents currents = read_currents(root, parts);
  result.probes = read_probes(root);
  result.loops = read_loops(root, parts);
  result.fault = read_fault(root, parts, currents.excitation.frequency_hz);
  result.supports = read_supports(root);
  result.grid = read_grid(root);
  const TomlEntry* grid = root.find("grid");
  const Place grid_place = grid == nullptr ? Place{} : grid->value.place;
  result.grid_place = fmt::format("{}:{}:{}", text.file, grid_place.line, grid_place.column);
  check_overlaps(text, parts.section, parts.shape_places);

  result.section = std::move(parts.section);
  result.materials = std::move(parts.materials);
  result.excitation = std::move(currents.excitation);
  result.circuits = std::move(currents.circuits);
  return result;
}

}  // namespace barwall::io
