#include "io/section_drawing.hpp"

#include <algorithm>
#include <cmath>
#include <map>

namespace barwall::io {
namespace {

constexpr Colour section_ink{0.08, 0.08, 0.1, 1.0};
constexpr Colour paper{1.0, 1.0, 1.0, 1.0};

std::vector<PagePoint> on_page(const mesh::Curve& curve, const Frame& frame) {
  constexpr double sagitta = 0.1;  // pixels
  std::vector<PagePoint> points;
  for (mesh::Point p : polyline(curve, sagitta / frame.scale())) points.push_back(frame.page(p));
  return points;
}

/// The outline's pieces round one part, joined end to end into closed chains.
std::vector<std::vector<PagePoint>> chains_round(const mesh::Outline& outline, int part,
                                                 const Frame& frame) {
  std::vector<mesh::Curve> open;
  for (const mesh::OutlinePiece& piece : outline.pieces) {
    if (piece.left.part == part && piece.right.part != part) open.push_back(piece.curve);
    if (piece.right.part == part && piece.left.part != part) open.push_back(reversed(piece.curve));
  }
  std::vector<std::vector<PagePoint>> chains;
  while (!open.empty()) {
    const mesh::Point start = at(open.back(), 0.0);
    mesh::Point end = at(open.back(), 1.0);
    std::vector<PagePoint> chain = on_page(open.back(), frame);
    open.pop_back();
    while (!open.empty() && distance(start, end) > 10.0 * outline.contact) {
      const auto next = std::min_element(
          open.begin(), open.end(), [&](const mesh::Curve& a, const mesh::Curve& b) {
            return distance(at(a, 0.0), end) < distance(at(b, 0.0), end);
          });
      const auto more = on_page(*next, frame);
      chain.insert(chain.end(), more.begin(), more.end());
      end = at(*next, 1.0);
      open.erase(next);
    }
    chains.push_back(std::move(chain));
  }
  return chains;
}

PageBox page_box(const mesh::Box& box, const Frame& frame) {
  return {frame.page({box.low.x, box.high.y}), frame.page({box.high.x, box.low.y})};
}

/// A visible part, or one piece of it, that gets a name.
struct Named {
  std::string name;
  int part = -1;
  mesh::Box box;
  std::vector<PagePoint> edge;  ///< points of its outline on the page
};

std::vector<Named> named_pieces(const solver::Problem& problem, const Frame& frame) {
  std::map<mesh::Occupant, Named> found;
  for (const mesh::OutlinePiece& piece : problem.outline.pieces) {
    for (mesh::Occupant side : {piece.left, piece.right}) {
      if (side.part < 0) continue;
      const mesh::Part& part = problem.section.parts[static_cast<std::size_t>(side.part)];
      const bool bar = part.kind == mesh::Part::Kind::bar;
      // Pieces of a wall share one name.
      if (!bar) side.piece = 0;
      Named& named = found[side];
      named.part = side.part;
      named.name = part.name;
      if (bar && part.pieces.size() > 1)
        named.name.append(1, '.').append(std::to_string(side.piece + 1));
      named.box.include(bounds(piece.curve));
      const int samples =
          std::clamp(static_cast<int>(length(piece.curve) * frame.scale() / 8.0), 1, 400);
      for (int k = 0; k <= samples; ++k) {
        named.edge.push_back(frame.page(at(piece.curve, static_cast<double>(k) / samples)));
      }
    }
  }
  std::vector<Named> result;
  result.reserve(found.size());
  for (auto& [occupant, named] : found) result.push_back(std::move(named));
  // Bars first: they are the smaller ones, and their names matter most.
  std::stable_partition(result.begin(), result.end(), [&](const Named& n) {
    return problem.section.parts[static_cast<std::size_t>(n.part)].kind == mesh::Part::Kind::bar;
  });
  return result;
}

bool shows(const mesh::Box& box, const mesh::Box& window) {
  return box.low.x < window.high.x && window.low.x < box.high.x && box.low.y < window.high.y &&
         window.low.y < box.high.y;
}

/// True when the part covers the middle and every corner of a square.
bool covers(const solver::Problem& problem, int part, mesh::Point middle, double half) {
  if (occupant_at(problem.section, middle).part != part) return false;
  for (double x : {-half, half}) {
    for (double y : {-half, half}) {
      if (occupant_at(problem.section, middle + mesh::Point{x, y}).part != part) return false;
    }
  }
  return true;
}

}  // namespace

void fill_parts(Canvas& canvas, const mesh::Outline& outline, const Frame& frame,
                const std::vector<Colour>& colours) {
  canvas.begin_clip(frame.box);
  for (int part : visible_parts(outline)) {
    canvas.fill(chains_round(outline, part, frame), colours[static_cast<std::size_t>(part)]);
  }
  canvas.end_clip();
}

void draw_outlines(Canvas& canvas, const solver::Problem& problem, const Frame& frame) {
  const auto thickness_of = [&](mesh::Occupant occupant) {
    if (occupant.part < 0) return HUGE_VAL;
    const mesh::Part& part = problem.section.parts[static_cast<std::size_t>(occupant.part)];
    return thickness(part.pieces[static_cast<std::size_t>(occupant.piece)]);
  };
  canvas.begin_clip(frame.box);
  for (const mesh::OutlinePiece& piece : problem.outline.pieces) {
    const double thin = std::min(thickness_of(piece.left), thickness_of(piece.right));
    const double width = std::clamp(0.2 * thin * frame.scale(), 0.4, 1.8);
    canvas.line(on_page(piece.curve, frame), {section_ink, width, {}});
  }
  canvas.end_clip();
}

std::vector<double> currents_at(const solver::Excitation& excitation, double wt) {
  std::vector<double> currents;
  double largest = 0.0;
  for (const std::complex<double>& current : excitation.current) {
    currents.push_back((current * std::polar(1.0, wt)).real());
    largest = std::max(largest, std::abs(current));
  }
  // A current that passes through zero at this instant is zero but for rounding.
  for (double& current : currents) {
    if (std::abs(current) < 1e-9 * largest) current = 0.0;
  }
  return currents;
}

void draw_current_sign(Canvas& canvas, PagePoint centre, double radius, double current) {
  const Pen pen{section_ink, std::max(1.0, 0.14 * radius), {}};
  canvas.circle(centre, radius, paper, pen);
  if (current > 0.0) {
    canvas.circle(centre, 0.26 * radius, section_ink, {section_ink, 0.5, {}});
  } else if (current < 0.0) {
    const double d = 0.62 * radius;
    canvas.line({centre + PagePoint{-d, -d}, centre + PagePoint{d, d}}, pen);
    canvas.line({centre + PagePoint{-d, d}, centre + PagePoint{d, -d}}, pen);
  }
}

int draw_names(Canvas& canvas, const solver::Problem& problem, const Frame& frame,
               const std::vector<double>& currents, LabelPlacement& labels, double text_size) {
  constexpr double least_radius = 5.0;
  constexpr std::size_t many = 40;
  const std::vector<Named> all = named_pieces(problem, frame);
  if (all.size() > many) text_size *= 0.75;
  constexpr double backing = 2.0;
  const TextStyle style{text_size, Align::start, false, section_ink, 0.0, false};
  for (const Named& named : all) labels.avoid_line(named.edge);

  // Signs first: their places are given.
  std::vector<double> beside(all.size(), 0.0);  // radius of a sign beside the name
  for (std::size_t k = 0; k < all.size(); ++k) {
    const Named& named = all[k];
    const mesh::Part& part = problem.section.parts[static_cast<std::size_t>(named.part)];
    if (part.kind != mesh::Part::Kind::bar || currents.empty()) continue;
    const mesh::Point middle = named.box.centre();
    double radius = 0.6 * text_size;
    while (radius >= least_radius &&
           !covers(problem, named.part, middle, 1.1 * radius / frame.scale())) {
      radius *= 0.9;
    }
    if (radius < least_radius) {
      beside[k] = 0.36 * text_size;
      continue;
    }
    const PagePoint centre = frame.page(middle);
    draw_current_sign(canvas, centre, radius, currents[static_cast<std::size_t>(named.part)]);
    labels.block({centre - PagePoint{radius, radius}, centre + PagePoint{radius, radius}});
  }

  int left_out = 0;
  for (std::size_t k = 0; k < all.size(); ++k) {
    const Named& named = all[k];
    if (!shows(named.box, frame.window)) continue;
    const bool solid = covers(problem, named.part, named.box.centre(), 0.0);
    const double sign = beside[k] > 0.0 ? 2.0 * beside[k] + 0.25 * text_size : 0.0;
    const double width = canvas.text_width(named.name, style) + sign + 2.0 * backing;
    const double height = 1.12 * text_size + 2.0 * backing;
    const auto label = labels.place(width, height, page_box(named.box, frame), solid, named.edge);
    if (!label) {
      ++left_out;
      continue;
    }
    if (label->leader) {
      canvas.line({(*label->leader)[0], (*label->leader)[1]}, {{1.0, 1.0, 1.0, 0.8}, 3.0, {}});
      canvas.line({(*label->leader)[0], (*label->leader)[1]}, {section_ink, 1.2, {}});
    }
    canvas.box(label->box, Colour{1.0, 1.0, 1.0, 0.85});
    const PagePoint low = label->box.low + PagePoint{backing, backing};
    if (sign > 0.0) {
      draw_current_sign(canvas, {low.x + beside[k], low.y + 0.56 * text_size}, beside[k],
                        currents[static_cast<std::size_t>(named.part)]);
    }
    canvas.text({low.x + sign, low.y + 0.84 * text_size}, named.name, style);
  }
  return left_out;
}

}  // namespace barwall::io
