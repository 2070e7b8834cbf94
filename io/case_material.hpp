#pragma once

#include <map>
#include <string>
#include <vector>

#include "io/case_text.hpp"
#include "solver/material.hpp"

namespace barwall::io {

/// Materials by name: air, copper, aluminium, brass and stainless, and those of the file.
using Materials = std::map<std::string, solver::Material, std::less<>>;

/// The materials of a case.
struct CaseMaterials {
  Materials by_name;
  std::vector<std::string> curve_digests;  ///< SHA-256 of every bh_curve's bytes, in file order
};

/// Reads [material.*] and the curve files that it names; they lie in the case's folder or below.
/// \throws InputError at the place in the case file or, for what a curve file says, in that file
CaseMaterials read_materials(const CaseTable& root);

/// The material that a string names.
/// \throws InputError for an unknown one, with the nearest
const solver::Material& read_material(const Materials& materials, const CaseText& text,
                                      const TomlValue& value);

}  // namespace barwall::io
