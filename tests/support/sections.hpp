#pragma once

#include "mesh/section.hpp"

namespace barwall::support {

inline constexpr double mm = 1e-3;

/// A bar of one or more pieces.
inline mesh::Part bar(std::string name, std::vector<mesh::Shape> pieces) {
  return {std::move(name), mesh::Part::Kind::bar, std::move(pieces), false, false};
}

/// A steel wall of one or more pieces.
inline mesh::Part steel_wall(std::string name, std::vector<mesh::Shape> pieces) {
  return {std::move(name), mesh::Part::Kind::wall, std::move(pieces), false, true};
}

/// Three flat bars in a closed trunking: 320 x 220 x 3 mm, bars 8 x 80 mm at 60 mm pitch.
inline mesh::Section three_bars_in_trunking() {
  mesh::Section section;
  const char* names[] = {"L1", "L2", "L3"};
  for (int k = 0; k < 3; ++k) {
    section.parts.push_back(
        bar(names[k], {mesh::Rectangle{{(k - 1) * 60 * mm, 0.0}, 8 * mm, 80 * mm, 0.0}}));
  }
  section.parts.push_back(
      steel_wall("trunking", {mesh::Frame{{0.0, 0.0}, 320 * mm, 220 * mm, 3 * mm, 0.0}}));
  return section;
}

/// Three square bars of 20 mm at 40 mm pitch over a steel plate, 120 x 10 mm, 10 mm below them: few
/// nodes.
inline mesh::Section three_bars_over_plate() {
  mesh::Section section;
  const char* names[] = {"L1", "L2", "L3"};
  for (int k = 0; k < 3; ++k) {
    section.parts.push_back(
        bar(names[k], {mesh::Rectangle{{(k - 1) * 40 * mm, 0.0}, 20 * mm, 20 * mm, 0.0}}));
  }
  section.parts.push_back(
      steel_wall("plate", {mesh::Rectangle{{0.0, -25 * mm}, 120 * mm, 10 * mm, 0.0}}));
  return section;
}

/// Three round bars in trefoil inside a steel pipe: inner radius 60 mm, wall 5 mm.
inline mesh::Section trefoil_in_pipe() {
  mesh::Section section;
  const char* names[] = {"L1", "L2", "L3"};
  for (int k = 0; k < 3; ++k) {
    const double angle = (90.0 + 120.0 * k) * 3.14159265358979323846 / 180.0;
    const mesh::Point centre{25 * mm * std::cos(angle), 25 * mm * std::sin(angle)};
    section.parts.push_back(bar(names[k], {mesh::Round{centre, 20 * mm}}));
  }
  section.parts.push_back(steel_wall("pipe", {mesh::Tube{{0.0, 0.0}, 130 * mm, 5 * mm}}));
  return section;
}

}  // namespace barwall::support
