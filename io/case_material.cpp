#include "io/case_material.hpp"

#include <fmt/format.h>

#include <algorithm>
#include <filesystem>
#include <memory>
#include <system_error>

#include "io/bh_table.hpp"
#include "io/nearest_name.hpp"
#include "io/plain_file.hpp"
#include "io/sha256.hpp"

namespace barwall::io {

namespace {

namespace fs = std::filesystem;

constexpr Allowed permeability{1.0, 1e9, true, ""};
constexpr Allowed resistivity{0.0, 1.0, false, " ohm m"};
constexpr PlainFileKind curve_file{"curve", ".csv", 1'000'000};
/// Most rows of all B-H tables together.
constexpr std::size_t most_rows_together = 200'000;

/// Where a curve file lies, links and ".." resolved.
fs::path resolved(const CaseText& text, const TomlValue& value, const fs::path& folder,
                  const std::string& name) {
  std::error_code error;
  const fs::path home = fs::canonical(folder, error);
  const fs::path file = error ? fs::path() : fs::weakly_canonical(folder / name, error);
  if (error) {
    text.fail(value.place, fmt::format("bh_curve is {}, which cannot be looked up: {}",
                                       shown(value), error.message()));
  }
  if (std::mismatch(home.begin(), home.end(), file.begin(), file.end()).first != home.end()) {
    text.fail(value.place, fmt::format("bh_curve is {}, which lies outside the case's folder; it "
                                       "must be a file in that folder or below",
                                       shown(value)));
  }
  return file;
}

/// Reads the magnetic laws of a case's materials.
class LawReader {
public:
  LawReader(const CaseText& text, std::vector<std::string>& curve_digests)
      : text_(text), curve_digests_(curve_digests) {}

  solver::Material read(const std::string& name, const TomlEntry& law) {
    if (law.key == "relative_permeability") {
      return {name, read_number(text_, law.value, law.key, permeability)};
    }
    if (law.key == "bh_curve") return saturable_material(name, curve_in_file(law));
    const BhTable table = read_bh_points(text_, law.value);
    count(table, law);
    return saturable_material(name, curve_through(text_, table, law.key));
  }

private:
  void count(const BhTable& table, const TomlEntry& law) {
    rows_ += table.points.size();
    if (rows_ > most_rows_together) {
      text_.fail(law.place,
                 fmt::format("more than {} rows of B-H tables together", most_rows_together));
    }
  }

  std::shared_ptr<const solver::BhCurve> curve_in_file(const TomlEntry& law) {
    const std::string name = read_line(text_, law.value, law.key);
    const fs::path parent = fs::path(text_.file).parent_path();
    const fs::path folder = parent.empty() ? "." : parent;
    const fs::path file = resolved(text_, law.value, folder, name);
    const auto [known, is_new] = files_.try_emplace(file);
    Curve& curve = known->second;
    if (is_new) {
      std::string bytes;
      try {
        bytes = bytes_of(file, curve_file);
      } catch (const PlainFileError& error) {
        text_.fail(law.value.place,
                   fmt::format("bh_curve is {}: {}", shown(law.value), error.what()));
      }
      const CaseText csv{(parent / name).string(), {}};
      const BhTable table = read_curve_file(csv, bytes);
      count(table, law);
      curve = {curve_through(csv, table, "the curve"), sha256(bytes)};
    }
    curve_digests_.push_back(curve.digest);
    return curve.curve;
  }

  struct Curve {
    std::shared_ptr<const solver::BhCurve> curve;
    std::string digest;
  };

  const CaseText& text_;
  std::vector<std::string>& curve_digests_;
  std::map<fs::path, Curve> files_;  ///< those read already
  std::size_t rows_ = 0;
};

}  // namespace

CaseMaterials read_materials(const CaseTable& root) {
  const CaseText& text = root.text();
  CaseMaterials result;
  Materials& materials = result.by_name;
  LawReader laws(text, result.curve_digests);
  const std::vector<std::string> law_keys = {"relative_permeability", "bh_points", "bh_curve"};
  std::vector<std::string> keys = law_keys;
  keys.emplace_back("resistivity_ohm_m");
  for (const char* name : {"air", "copper", "aluminium", "brass", "stainless"}) {
    materials[name] = {name, 1.0};
  }
  const std::size_t built_in = materials.size();
  const TomlEntry* entry = root.find("material");
  if (entry == nullptr) return result;
  const auto* list = std::get_if<TomlTable>(&entry->value.content);
  if (list == nullptr) {
    text.fail(entry->value.place,
              fmt::format("material is {}; write [material.NAME] above each material",
                          kind_of(entry->value)));
  }
  for (const TomlEntry& material : list->entries) {
    check_name(text, material.place, material.key, "the material's name");
    if (materials.size() == built_in + 10000) {
      text.fail(material.place, "more than 10000 materials");
    }
    if (materials.count(material.key) != 0) {
      text.fail(material.place, fmt::format("material \"{}\" exists already, with a relative "
                                            "permeability of 1; choose another name",
                                            material.key));
    }
    const CaseTable table(text, material.value, "[material." + material.key + "]", keys);
    solver::Material& known = materials[material.key];
    known = laws.read(material.key, table.exactly_one(law_keys));
    if (const TomlEntry* given = table.find("resistivity_ohm_m")) {
      known.resistivity = read_number(text, given->value, given->key, resistivity);
    }
  }
  return result;
}

const solver::Material& read_material(const Materials& materials, const CaseText& text,
                                      const TomlValue& value) {
  const std::string name = read_line(text, value, "material");
  const auto found = materials.find(name);
  if (found == materials.end()) {
    std::vector<std::string> known;
    for (const auto& material : materials) known.push_back(material.first);
    const std::string nearest = suggestion(name, known);
    const std::string help =
        nearest.empty() ? "; air, copper, aluminium, brass and stainless exist, others need a "
                          "[material.NAME]"
                        : nearest;
    text.fail(value.place, fmt::format("unknown material {}{}", shown(value), help));
  }
  return found->second;
}

}  // namespace barwall::io
