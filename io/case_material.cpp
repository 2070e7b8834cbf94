#include "io/case_material.hpp"

#include <fmt/format.h>

#include <vector>

#include "io/nearest_name.hpp"

namespace barwall::io {

namespace {

constexpr Allowed permeability{1.0, 1e9, true, ""};

}  // namespace

Materials read_materials(const CaseTable& root) {
  const CaseText& text = root.text();
  Materials materials;
  for (const char* name : {"air", "copper", "aluminium", "brass", "stainless"}) {
    materials[name] = {name, 1.0};
  }
  const std::size_t built_in = materials.size();
  const TomlEntry* entry = root.find("material");
  if (entry == nullptr) return materials;
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
    const std::vector<std::string> keys = {"relative_permeability", "bh_points", "bh_curve"};
    const CaseTable table(text, material.value, "[material." + material.key + "]", keys);
    const TomlEntry& law = table.exactly_one(keys);
    if (law.key != keys.front()) {
      text.fail(law.place, fmt::format("{}: B-H tables are not supported yet; give "
                                       "relative_permeability",
                                       law.key));
    }
    materials[material.key] = {material.key, read_number(text, law.value, law.key, permeability)};
  }
  return materials;
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
