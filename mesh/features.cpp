#include "mesh/features.hpp"

#include <algorithm>
#include <cmath>

namespace barwall::mesh {
namespace {

// Spacings as fractions of a size, at cells_across = 4.
constexpr double across = 1.0 / 4.0;            // of a width or gap
constexpr double on_diameter = 1.0 / 40.0;      // of a circle's diameter
constexpr double at_bar_edge = 1.0 / 16;        // of a bar's thickness
constexpr double at_sharp_corner = 1.0 / 25.0;  // of a sharp part's thickness

/// A direction counts along an axis when it has at least this share of it: grid lines nearly
/// parallel to two outlines need not be dense between them.
constexpr double least_share = 0.1;

void add_source(Features& features, const Box& box, Point direction, double spacing) {
  if (std::abs(direction.x) >= least_share) {
    features.x.smooth.push_back({box.low.x, box.high.x, spacing});
  }
  if (std::abs(direction.y) >= least_share) {
    features.y.smooth.push_back({box.low.y, box.high.y, spacing});
  }
}

void add_width(Features& features, Point p, Point q, double contact) {
  const double width = distance(p, q);
  if (width <= contact) return;
  Box box;
  box.include(p);
  box.include(q);
  add_source(features, box, (1.0 / width) * (q - p), across * width);
}

/// The stretch over which two nearly parallel segments face each other.
bool add_facing(Features& features, const Segment& a, const Segment& b, double contact) {
  const Point d = a.to - a.from;
  const double size = norm(d);
  const Point along = (1.0 / size) * d;
  const Point across_it = quarter_turn(along);
  const Point e = b.to - b.from;
  if (std::abs(cross(along, e)) > 0.17 * norm(e)) return false;
  double s0 = dot(b.from - a.from, along);
  double s1 = dot(b.to - a.from, along);
  double g0 = dot(b.from - a.from, across_it);
  double g1 = dot(b.to - a.from, across_it);
  if (s0 > s1) {
    std::swap(s0, s1);
    std::swap(g0, g1);
  }
  const double from = std::max(0.0, s0);
  const double to = std::min(size, s1);
  if (to - from <= 1e-9 * size) return false;
  const auto gap_at = [&](double s) { return g0 + (g1 - g0) * (s - s0) / (s1 - s0); };
  const double gap_from = gap_at(from);
  const double gap_to = gap_at(to);
  if (gap_from * gap_to <= 0.0) return false;
  const double width = std::min(std::abs(gap_from), std::abs(gap_to));
  if (width <= contact) return true;  // one line, or outlines in contact
  Box box;
  for (double s : {from, to}) {
    box.include(a.from + s * along);
    box.include(a.from + s * along + gap_at(s) * across_it);
  }
  add_source(features, box, across_it, across * width);
  return true;
}

bool share_end(const Curve& a, const Curve& b, double contact) {
  for (double s : {0.0, 1.0}) {
    for (double t : {0.0, 1.0}) {
      if (distance(at(a, s), at(b, t)) <= contact) return true;
    }
  }
  return false;
}

void add_pair(Features& features, const Curve& a, const Curve& b, double contact) {
  const auto* s = std::get_if<Segment>(&a);
  const auto* t = std::get_if<Segment>(&b);
  const bool end_in_common = share_end(a, b, contact);
  if (s != nullptr && t != nullptr) {
    if (add_facing(features, *s, *t, contact) || end_in_common) return;
    const Gap gap = gap_between(a, b);
    add_width(features, gap.from, gap.to, contact);
    return;
  }
  if (!end_in_common) {
    const Gap gap = gap_between(a, b);
    if (gap.width <= contact) return;  // outlines that touch: the cusp between them is closed
    add_width(features, gap.from, gap.to, contact);
  }
  // A curved pair: the width where it changes along the way. Where the two draw apart faster
  // than the spacing may grow the samples ask nothing, so a bounded number of them will do.
  for (const auto& [one, other] : {std::pair{&a, &b}, std::pair{&b, &a}}) {
    const double least = end_in_common ? 0.05 * length(*one) : gap_between(a, b).width;
    const int samples =
        static_cast<int>(std::clamp(length(*one) / std::max(least, contact), 8.0, 200.0));
    for (int k = 0; k < samples; ++k) {
      const Point p = at(*one, (k + 0.5) / samples);
      const Point q = at(*other, nearest_parameter(*other, p));
      if (distance(p, q) > 0.3 * length(*one)) continue;
      if (end_in_common && distance(p, q) < 0.02 * length(*one)) continue;
      add_width(features, p, q, contact);
    }
  }
}

/// The occupant's own shape, or nullptr for air.
const Shape* shape_of(const Section& section, Occupant occupant) {
  if (occupant.part < 0) return nullptr;
  return &section.parts[static_cast<std::size_t>(occupant.part)]
              .pieces[static_cast<std::size_t>(occupant.piece)];
}

const Part* part_of(const Section& section, Occupant occupant) {
  return occupant.part < 0 ? nullptr : &section.parts[static_cast<std::size_t>(occupant.part)];
}

void add_edges(Features& features, const Section& section, const OutlinePiece& piece) {
  const Box box = bounds(piece.curve);
  if (const auto* arc = std::get_if<Arc>(&piece.curve)) {
    const double spacing = on_diameter * 2.0 * arc->radius;
    features.x.smooth.push_back({box.low.x, box.high.x, spacing});
    features.y.smooth.push_back({box.low.y, box.high.y, spacing});
  }
  for (Occupant side : {piece.left, piece.right}) {
    const Part* part = part_of(section, side);
    if (part == nullptr || part->kind != Part::Kind::bar) continue;
    if (std::holds_alternative<Arc>(piece.curve)) continue;
    const double spacing = at_bar_edge * thickness(*shape_of(section, side));
    add_source(features, box, left_normal(piece.curve, 0.5), spacing);
  }
}

void add_lines(Features& features, const OutlinePiece& piece, double extent) {
  const Box box = bounds(piece.curve);
  const double weight = length(piece.curve) / extent;
  if (std::holds_alternative<Segment>(piece.curve)) {
    const double size = length(piece.curve);
    if (box.width() <= 1e-12 * size) features.x.lines.push_back({box.low.x, 2.0 + weight});
    if (box.height() <= 1e-12 * size) features.y.lines.push_back({box.low.y, 2.0 + weight});
    return;
  }
  // A curve's extremes, so that it touches a grid line in a node.
  for (double x : {box.low.x, box.high.x}) features.x.lines.push_back({x, 1.0 + weight});
  for (double y : {box.low.y, box.high.y}) features.y.lines.push_back({y, 1.0 + weight});
  const Point centre = std::get<Arc>(piece.curve).centre;
  features.x.lines.push_back({centre.x, 1.0 + weight});
  features.y.lines.push_back({centre.y, 1.0 + weight});
}

struct VertexEnd {
  Point along;  ///< direction into the piece
  const OutlinePiece* piece;
};

void add_corner(Features& features, const Section& section, Point vertex,
                const std::vector<VertexEnd>& ends) {
  features.x.lines.push_back({vertex.x, 1.0});
  features.y.lines.push_back({vertex.y, 1.0});
  if (ends.size() == 2 && dot(ends[0].along, ends[1].along) < -0.94) return;  // nearly straight
  for (const VertexEnd& end : ends) {
    for (Occupant side : {end.piece->left, end.piece->right}) {
      const Part* part = part_of(section, side);
      if (part == nullptr || !part->sharp_corners) continue;
      const double spacing = at_sharp_corner * thickness(*shape_of(section, side));
      features.x.sharp.push_back({vertex.x, vertex.x, spacing});
      features.y.sharp.push_back({vertex.y, vertex.y, spacing});
    }
  }
}

}  // namespace

Features features_of(const Section& section, const Outline& outline) {
  Features features;
  const double extent = 2.0 * half_size(section);
  const auto& pieces = outline.pieces;
  std::vector<Box> boxes;
  std::vector<double> edge;  // radius, or thickness of the bar that the piece bounds [m]
  for (const OutlinePiece& piece : pieces) {
    boxes.push_back(bounds(piece.curve));
    edge.push_back(HUGE_VAL);
    for (Occupant side : {piece.left, piece.right}) {
      const Part* part = part_of(section, side);
      if (part == nullptr || part->kind != Part::Kind::bar) continue;
      const auto* arc = std::get_if<Arc>(&piece.curve);
      edge.back() = arc != nullptr ? arc->radius : thickness(*shape_of(section, side));
    }
  }
  for (std::size_t a = 0; a < pieces.size(); ++a) {
    add_edges(features, section, pieces[a]);
    add_lines(features, pieces[a], extent);
    for (std::size_t b = a + 1; b < pieces.size(); ++b) {
      // A bar's edge asks for a sixteenth of its thickness there, an arc's for one of its radius:
      // growing from it, the spacing is below a quarter of any gap that is wider than that.
      if (distance(boxes[a], boxes[b]) > std::min(edge[a], edge[b])) continue;
      add_pair(features, pieces[a].curve, pieces[b].curve, outline.contact);
    }
  }
  for (Point vertex : outline.vertices) {
    std::vector<VertexEnd> ends;
    for (std::size_t k = 0; k < pieces.size(); ++k) {
      const OutlinePiece& piece = pieces[k];
      if (distance(boxes[k], vertex) > outline.contact) continue;
      for (double end : {0.0, 1.0}) {
        if (distance(at(piece.curve, end), vertex) > outline.contact) continue;
        const Point forward = tangent(piece.curve, end);
        ends.push_back({end == 0.0 ? forward : -forward, &piece});
      }
    }
    add_corner(features, section, vertex, ends);
  }
  return features;
}

}  // namespace barwall::mesh
