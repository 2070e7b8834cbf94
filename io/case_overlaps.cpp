#include "io/case_overlaps.hpp"

#include <fmt/format.h>

#include <algorithm>
#include <cmath>
#include <cstddef>
#include <string>

#include "io/overlay.hpp"

namespace barwall::io {

namespace {

using mesh::Part;
using mesh::Point;
using mesh::Section;

/// One piece of a part, or of an opening when `part` is -1.
struct Piece {
  int part = -1;
  int opening = -1;
  int index = 0;
  Outline outline;
};

struct Pieces {
  std::vector<Piece> bars;      ///< by their left ends
  std::vector<Piece> walls;     ///< in file order
  std::vector<Piece> openings;  ///< in file order
};

Pieces pieces_of(const Section& section) {
  Pieces pieces;
  for (std::size_t k = 0; k < section.parts.size(); ++k) {
    const Part& part = section.parts[k];
    auto& list = part.kind == Part::Kind::bar ? pieces.bars : pieces.walls;
    for (std::size_t m = 0; m < part.pieces.size(); ++m) {
      list.push_back({static_cast<int>(k), -1, static_cast<int>(m), outline_of(part.pieces[m])});
    }
  }
  for (std::size_t k = 0; k < section.openings.size(); ++k) {
    for (const mesh::Shape& shape : section.openings[k].pieces) {
      pieces.openings.push_back({-1, static_cast<int>(k), 0, outline_of(shape)});
    }
  }
  std::stable_sort(pieces.bars.begin(), pieces.bars.end(), [](const Piece& a, const Piece& b) {
    return a.outline.box.low.x < b.outline.box.low.x;
  });
  return pieces;
}

std::string near(Point point) {
  return fmt::format("near ({:.6g}, {:.6g}) mm", 1000.0 * point.x, 1000.0 * point.y);
}

void check_effort(const CaseText& text, const Effort& effort, Place place) {
  if (!effort.spent()) return;
  text.fail(place,
            "the outlines are too many and too intricate to test for overlaps; give fewer pieces, "
            "or polygons with fewer corners");
}

void check_bars(const CaseText& text, const Section& section, const std::vector<Place>& places,
                const std::vector<Piece>& bars, Effort& effort) {
  for (std::size_t i = 0; i < bars.size(); ++i) {
    const double right = bars[i].outline.box.high.x;
    for (std::size_t j = i + 1; j < bars.size() && bars[j].outline.box.low.x < right; ++j) {
      effort.left -= 5;
      const auto point = overlap(bars[i].outline, bars[j].outline, effort);
      const Piece& later = std::max(bars[i].part, bars[j].part) == bars[j].part ? bars[j] : bars[i];
      const Piece& earlier = &later == &bars[j] ? bars[i] : bars[j];
      const Place place = places[static_cast<std::size_t>(later.part)];
      if (point) {
        const std::string& name = section.parts[static_cast<std::size_t>(later.part)].name;
        const std::string& other = section.parts[static_cast<std::size_t>(earlier.part)].name;
        const std::string what = later.part == earlier.part
                                     ? fmt::format("pieces {} and {} of bar \"{}\" overlap",
                                                   std::min(later.index, earlier.index) + 1,
                                                   std::max(later.index, earlier.index) + 1, name)
                                     : fmt::format("bar \"{}\" overlaps bar \"{}\"", name, other);
        text.fail(place, fmt::format("{} {}; bars may touch, but not overlap", what, near(*point)));
      }
      check_effort(text, effort, place);
    }
  }
}

/// The walls and openings that overlap one piece of a bar, as a small section of their own.
struct Surroundings {
  Section section;
  std::vector<mesh::Curve> curves;
  double thickness = HUGE_VAL;  ///< of the thinnest wall that is not air
};

Surroundings surroundings_of(const Piece& bar, const Section& whole, const Pieces& pieces,
                             Effort& effort) {
  Surroundings about;
  std::vector<int> new_index(whole.parts.size(), -1);
  const auto add = [&](const Piece& piece, std::vector<mesh::Shape>& shapes) {
    shapes.push_back(piece.outline.shape);
    about.curves.insert(about.curves.end(), piece.outline.curves.begin(),
                        piece.outline.curves.end());
  };
  for (const Piece& wall : pieces.walls) {
    effort.left -= 5;
    if (!overlap(bar.outline, wall.outline, effort)) continue;
    const Part& part = whole.parts[static_cast<std::size_t>(wall.part)];
    int& index = new_index[static_cast<std::size_t>(wall.part)];
    if (index < 0) {
      index = static_cast<int>(about.section.parts.size());
      about.section.parts.push_back(part);
      about.section.parts.back().pieces.clear();
    }
    add(wall, about.section.parts[static_cast<std::size_t>(index)].pieces);
    if (!part.empty) about.thickness = std::fmin(about.thickness, wall.outline.thickness);
  }
  if (about.thickness == HUGE_VAL) return about;
  for (const Piece& piece : pieces.openings) {
    effort.left -= 5;
    if (!overlap(bar.outline, piece.outline, effort)) continue;
    mesh::Opening opening;
    for (const int wall : whole.openings[static_cast<std::size_t>(piece.opening)].through) {
      const int index = new_index[static_cast<std::size_t>(wall)];
      if (index >= 0) opening.through.push_back(index);
    }
    if (opening.through.empty()) continue;
    add(piece, opening.pieces);
    about.section.openings.push_back(std::move(opening));
  }
  return about;
}

void check_walls(const CaseText& text, const Section& section, const std::vector<Place>& places,
                 const Pieces& pieces, Effort& effort) {
  for (const Piece& bar : pieces.bars) {
    Surroundings about = surroundings_of(bar, section, pieces, effort);
    const Place place = places[static_cast<std::size_t>(bar.part)];
    check_effort(text, effort, place);
    if (about.thickness == HUGE_VAL) continue;
    about.curves.insert(about.curves.end(), bar.outline.curves.begin(), bar.outline.curves.end());
    const double depth =
        depth_that_counts(std::fmin(about.thickness, bar.outline.thickness), bar.outline.box);
    const auto asked = static_cast<std::int64_t>(about.curves.size());
    const auto point =
        find_region(about.curves, bar.outline.box, depth, effort, [&](Point candidate) {
          effort.left -= 5 * asked;
          return contains(bar.outline.shape, candidate) &&
                 occupant_at(about.section, candidate).part >= 0;
        });
    if (point) {
      const int wall = occupant_at(about.section, *point).part;
      text.fail(place, fmt::format("bar \"{}\" overlaps wall \"{}\" {}; give the wall an "
                                   "[[opening]] there, or move the bar",
                                   section.parts[static_cast<std::size_t>(bar.part)].name,
                                   about.section.parts[static_cast<std::size_t>(wall)].name,
                                   near(*point)));
    }
    check_effort(text, effort, place);
  }
}

}  // namespace

void check_overlaps(const CaseText& text, const Section& section,
                    const std::vector<Place>& places) {
  Effort effort;
  const Pieces pieces = pieces_of(section);
  check_bars(text, section, places, pieces.bars, effort);
  check_walls(text, section, places, pieces, effort);
}

}  // namespace barwall::io
