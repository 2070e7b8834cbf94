#pragma once

#include <filesystem>
#include <functional>
#include <string>

#include "io/canvas.hpp"
#include "io/frame.hpp"
#include "io/results.hpp"

namespace barwall::io {

/// The bytes of one picture in two formats.
struct Pictures {
  std::string png;
  std::string svg;
};

/// The same drawing in both, at once where the system gives a thread.
Pictures in_both_formats(const std::function<std::string(Canvas::Kind)>& drawn);

/// Where on its page a picture of results shows the section.
Frame picture_frame(const mesh::Section& section);

/// The section with |B| (with a frequency its r.m.s.) in colours on a logarithmic scale, flux
/// lines, outlines, names, the currents' signs, forces and axes in millimetres; below it the forces
/// of a fault over time.
/// \throws std::runtime_error when drawing fails
Pictures draw_pictures(const Results& results);

/// Writes draw_pictures to picture.png and picture.svg.
/// \throws std::runtime_error also when a file cannot be written
void write_pictures(const Results& results, const std::filesystem::path& folder);

/// The section of a case and its grid, before any solve: the parts in tints by material with
/// their names and overall dimensions, the fitted grid, a part of it enlarged, and its size.
Pictures draw_section(const Case& input, const solver::Problem& problem);

/// Writes that picture to section.png and section.svg.
/// \throws std::runtime_error when drawing fails or a file cannot be written
void draw_section(const Case& input, const solver::Problem& problem,
                  const std::filesystem::path& folder);

}  // namespace barwall::io
