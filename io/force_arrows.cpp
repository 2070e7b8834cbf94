#include "io/force_arrows.hpp"

#include <algorithm>
#include <cmath>
#include <numbers>

#include "io/scales.hpp"

namespace barwall::io {
namespace {

/// The force of an entry, zero where it has none.
mesh::Point force_of(const solver::Entry& entry) {
  const auto value = [&entry](const char* key) {
    const solver::Figure* figure = find_figure(entry.figures, key);
    return figure == nullptr || !std::isfinite(figure->value) ? 0.0 : figure->value;
  };
  if (find_figure(entry.figures, "force_peak") != nullptr) {
    const double angle = value("force_peak_direction") * std::numbers::pi / 180.0;
    return value("force_peak") * mesh::Point{std::cos(angle), std::sin(angle)};
  }
  return {value("force_x"), value("force_y")};
}

/// The farthest point of some parts' outlines along a ray from the middle of the box round them.
mesh::Point pushed_point(const mesh::Outline& outline, const std::vector<int>& parts,
                         mesh::Point direction) {
  std::vector<mesh::Curve> curves;
  mesh::Box box;
  for (const mesh::OutlinePiece& piece : outline.pieces) {
    const auto within = [&parts](mesh::Occupant o) {
      return std::find(parts.begin(), parts.end(), o.part) != parts.end();
    };
    if (!within(piece.left) && !within(piece.right)) continue;
    curves.push_back(piece.curve);
    box.include(bounds(piece.curve));
  }
  const mesh::Point start = box.centre();
  const double reach = box.width() + box.height();
  const mesh::Point end = start + (reach / norm(direction)) * direction;
  mesh::Point farthest = start;
  for (const mesh::Curve& curve : curves) {
    for (double t : crossings(curve, start, end)) {
      const mesh::Point hit = between(start, end, t);
      if (distance(start, hit) > distance(start, farthest)) farthest = hit;
    }
  }
  return farthest;
}

}  // namespace

std::vector<ForceArrow> force_arrows(const Results& results) {
  const std::vector<mesh::Part>& parts = results.problem->section.parts;
  std::vector<ForceArrow> arrows;
  const auto index_of = [&parts](const std::string& name) {
    const auto found = std::find_if(parts.begin(), parts.end(),
                                    [&](const mesh::Part& part) { return part.name == name; });
    return static_cast<int>(found - parts.begin());
  };
  for (const solver::Entry& bar : results.figures.bars) {
    const auto k = static_cast<std::size_t>(index_of(bar.name));
    arrows.push_back({bar.name, centroid(parts[k]), force_of(bar)});
  }
  std::erase_if(arrows, [](const ForceArrow& arrow) { return !(norm(arrow.force) > 0.0); });
  const auto add_pushed = [&](const solver::Entry& entry, const std::vector<std::string>& names) {
    const mesh::Point force = force_of(entry);
    if (!(norm(force) > 0.0)) return;
    std::vector<int> members;
    for (const std::string& name : names) members.push_back(index_of(name));
    arrows.push_back({entry.name, pushed_point(results.problem->outline, members, force), force});
  };
  for (const solver::Entry& wall : results.figures.walls) add_pushed(wall, {wall.name});
  for (const solver::Entry& body : results.figures.bodies) add_pushed(body, body.parts);
  return arrows;
}

ArrowScale arrow_scale(const std::vector<ForceArrow>& arrows, double pixels_per_metre) {
  constexpr double shortest_pixels = 14.0;
  double largest = 0.0;
  double apart = HUGE_VAL;  // least distance between two arrows' starts
  for (std::size_t k = 0; k < arrows.size(); ++k) {
    largest = std::max(largest, norm(arrows[k].force));
    for (std::size_t m = 0; m < k; ++m) {
      apart = std::min(apart, distance(arrows[k].at, arrows[m].at));
    }
  }
  if (!(largest > 0.0)) return {};
  const double longest_pixels = std::clamp(0.75 * apart * pixels_per_metre, 55.0, 120.0);
  ArrowScale scale;
  scale.pixels = longest_pixels / largest;
  scale.reference = round_down_125(largest);
  scale.least = shortest_pixels / scale.pixels;
  return scale;
}

void draw_arrow(Canvas& canvas, PagePoint from, PagePoint to) {
  const double length = distance(from, to);
  if (!(length > 0.0)) return;
  const PagePoint along = (1.0 / length) * (to - from);
  const PagePoint aside = quarter_turn(along);
  const double head = std::min(20.0, 0.7 * length);
  const double half_head = 0.42 * head;
  const double half_shaft = std::min(3.2, 0.2 * head);
  const PagePoint neck = to - head * along;
  const std::vector<PagePoint> shape = {
      from + half_shaft * aside, neck + half_shaft * aside, neck + half_head * aside, to,
      neck - half_head * aside,  neck - half_shaft * aside, from - half_shaft * aside};
  canvas.line(shape, {{1.0, 1.0, 1.0, 0.95}, 3.5, {}}, true);
  canvas.fill({shape}, marking_ink);
}

void draw_forces(Canvas& canvas, const std::vector<ForceArrow>& arrows, const ArrowScale& scale,
                 const Frame& frame, LabelPlacement& labels) {
  constexpr double half_width = 9.0;
  for (const ForceArrow& arrow : arrows) {
    if (norm(arrow.force) < scale.least) continue;
    const PagePoint from = frame.page(arrow.at);
    const PagePoint to = from + scale.pixels * PagePoint{arrow.force.x, -arrow.force.y};
    draw_arrow(canvas, from, to);
    labels.block_line(from, to, half_width);
  }
}

}  // namespace barwall::io
