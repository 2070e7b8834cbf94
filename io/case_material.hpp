#pragma once

#include <map>
#include <string>

#include "io/case_text.hpp"
#include "solver/material.hpp"

namespace barwall::io {

/// Materials by name: air, copper, aluminium, brass and stainless, and those of the file.
using Materials = std::map<std::string, solver::Material, std::less<>>;

/// Reads [material.*].
/// \throws InputError
Materials read_materials(const CaseTable& root);

/// The material that a string names.
/// \throws InputError for an unknown one, with the nearest
const solver::Material& read_material(const Materials& materials, const CaseText& text,
                                      const TomlValue& value);

}  // namespace barwall::io
