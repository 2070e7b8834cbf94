#include "io/case_parts.hpp"

#include <fmt/format.h>

#include <algorithm>
#include <cstddef>

#include "io/case_shape.hpp"
#include "io/nearest_name.hpp"

namespace barwall::io {

namespace {

using mesh::Part;

/// Most corners of all polygons together; most_pieces bounds all pieces together likewise.
constexpr std::size_t most_corners_together = 20000;

std::vector<std::string> keys_with_shapes(std::vector<std::string> keys) {
  keys.insert(keys.end(), shape_keys().begin(), shape_keys().end());
  return keys;
}

/// Counts pieces and corners, and refuses more than the bounds.
struct Bounds {
  std::size_t pieces = 0;
  std::size_t corners = 0;

  void add(const CaseText& text, const ShapeGiven& given) {
    pieces += given.pieces.size();
    for (const mesh::Shape& shape : given.pieces) {
      if (const auto* g = std::get_if<mesh::Polygon>(&shape)) corners += g->corners.size();
    }
    if (pieces > most_pieces) {
      text.fail(given.place,
                fmt::format("more than {} pieces of bars, walls and openings", most_pieces));
    }
    if (corners > most_corners_together) {
      text.fail(given.place,
                fmt::format("more than {} corners of polygons", most_corners_together));
    }
  }
};

/// Reads the name of a bar, wall or opening and enters it.
std::string enter_name(CaseParts& parts, const CaseTable& table, int index) {
  const TomlValue& value = table.require("name");
  std::string name = read_name(table.text(), value, "name");
  if (!parts.index_of.emplace(name, index).second) {
    table.text().fail(value.place,
                      fmt::format("the name \"{}\" is taken; names are unique among bars, walls "
                                  "and openings together",
                                  name));
  }
  return name;
}

void read_bar_or_wall(CaseParts& parts, const CaseTable& table, Part::Kind kind,
                      const Materials& materials, Bounds& bounds) {
  const CaseText& text = table.text();
  Part part;
  part.kind = kind;
  part.name = enter_name(parts, table, static_cast<int>(parts.section.parts.size()));
  const bool bar = kind == Part::Kind::bar;
  const TomlEntry* given = table.find("material");
  if (given == nullptr && !bar) table.require("material");
  const solver::Material& material =
      given == nullptr ? materials.at("copper") : read_material(materials, text, given->value);
  const bool air = material.name == "air";
  if (bar && air) {
    text.fail(given->value.place,
              fmt::format("bar \"{}\" is of air; a bar needs a conducting material", part.name));
  }
  part.empty = air;
  part.sharp_corners = material.magnetic();
  ShapeGiven shape = read_shape(table);
  bounds.add(text, shape);
  part.pieces = std::move(shape.pieces);
  parts.section.parts.push_back(std::move(part));
  parts.materials.push_back(material);
  parts.shape_places.push_back(shape.place);
  parts.tables.push_back(table);
}

}  // namespace

bool CaseParts::is_bar(int part) const {
  return section.parts[static_cast<std::size_t>(part)].kind == Part::Kind::bar;
}

std::vector<std::string> CaseParts::names(Part::Kind kind) const {
  std::vector<std::string> list;
  for (const Part& part : section.parts) {
    if (part.kind == kind) list.push_back(part.name);
  }
  return list;
}

CaseParts read_parts(const CaseTable& root, const Materials& materials) {
  const CaseText& text = root.text();

  struct Entry {
    const TomlValue* table;
    Part::Kind kind;
  };
  std::vector<Entry> entries;
  for (const TomlValue* table : tables_of(root, "bar")) entries.push_back({table, Part::Kind::bar});
  if (entries.empty()) text.fail(root.header(), "the case has no [[bar]]; it needs at least one");
  for (const TomlValue* table : tables_of(root, "wall")) {
    entries.push_back({table, Part::Kind::wall});
  }
  std::stable_sort(entries.begin(), entries.end(),
                   [](const Entry& a, const Entry& b) { return a.table->place < b.table->place; });

  CaseParts parts;
  Bounds bounds;
  for (const Entry& entry : entries) {
    const bool bar = entry.kind == Part::Kind::bar;
    const CaseTable table(text, *entry.table, bar ? "[[bar]]" : "[[wall]]",
                          keys_with_shapes(bar ? std::vector<std::string>{"name", "material",
                                                                          "current_a", "phase_deg"}
                                               : std::vector<std::string>{"name", "material"}));
    read_bar_or_wall(parts, table, entry.kind, materials, bounds);
  }
  for (const TomlValue* value : tables_of(root, "opening")) {
    const CaseTable table(text, *value, "[[opening]]", keys_with_shapes({"name", "through"}));
    mesh::Opening opening;
    opening.name = enter_name(parts, table, -1);
    opening.through =
        read_part_list(parts, text, table.require("through"), "through", Part::Kind::wall);
    ShapeGiven shape = read_shape(table);
    bounds.add(text, shape);
    opening.pieces = std::move(shape.pieces);
    parts.section.openings.push_back(std::move(opening));
  }
  return parts;
}

int read_part(const CaseParts& parts, const CaseText& text, const TomlValue& value,
              std::string_view what, Part::Kind kind) {
  const std::string name = read_line(text, value, what);
  const std::string wanted = kind == Part::Kind::bar ? "bar" : "wall";
  const auto found = parts.index_of.find(name);
  if (found == parts.index_of.end()) {
    text.fail(value.place, fmt::format("{}: unknown {} {}{}", what, wanted, shown(value),
                                       suggestion(name, parts.names(kind))));
  }
  const int index = found->second;
  if (index < 0 || parts.section.parts[static_cast<std::size_t>(index)].kind != kind) {
    const char* other = index < 0 ? "an opening" : parts.is_bar(index) ? "a bar" : "a wall";
    text.fail(value.place,
              fmt::format("{}: {} is {}, not a {}", what, shown(value), other, wanted));
  }
  return index;
}

std::vector<int> read_part_list(const CaseParts& parts, const CaseText& text,
                                const TomlValue& value, std::string_view what, Part::Kind kind) {
  const TomlArray& array = read_array(text, value, what);
  if (array.empty()) text.fail(value.place, fmt::format("{} names nothing", what));
  std::vector<int> list;
  std::vector<bool> named(parts.section.parts.size(), false);
  for (const TomlValue& element : array) {
    const int index = read_part(parts, text, element, what, kind);
    if (named[static_cast<std::size_t>(index)]) {
      text.fail(element.place, fmt::format("{} names {} twice", what, shown(element)));
    }
    named[static_cast<std::size_t>(index)] = true;
    list.push_back(index);
  }
  return list;
}

}  // namespace barwall::io
