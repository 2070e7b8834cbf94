#pragma once

#include <map>
#include <string>
#include <vector>

#include "io/case_material.hpp"
#include "io/case_text.hpp"
#include "mesh/section.hpp"
#include "solver/material.hpp"

namespace barwall::io {

/// The bars, walls and openings of a case file.
struct CaseParts {
  mesh::Section section;
  std::vector<solver::Material> materials;  ///< one per part
  std::vector<Place> shape_places;          ///< one per part
  std::vector<CaseTable> tables;            ///< one per part: the [[bar]] or [[wall]] itself
  /// Index of a part by its name; openings, which are no parts, have -1.
  std::map<std::string, int, std::less<>> index_of;

  bool is_bar(int part) const;
  /// The names of all bars, or of all walls, in file order.
  std::vector<std::string> names(mesh::Part::Kind kind) const;
};

/// Reads [[bar]], [[wall]] and [[opening]].
/// \throws InputError
CaseParts read_parts(const CaseTable& root, const Materials& materials);

/// The bar, or wall, that a string names.
/// \throws InputError for an unknown name, with the nearest, and for a part of another kind
int read_part(const CaseParts& parts, const CaseText& text, const TomlValue& value,
              std::string_view what, mesh::Part::Kind kind);

/// An array of names of bars, or of walls, none named twice and at least one.
std::vector<int> read_part_list(const CaseParts& parts, const CaseText& text,
                                const TomlValue& value, std::string_view what,
                                mesh::Part::Kind kind);

}  // namespace barwall::io
