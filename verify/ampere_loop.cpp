#include "verify/ampere_loop.hpp"

#include <fmt/format.h>

#include <algorithm>
#include <cmath>
#include <complex>
#include <numbers>

#include "mesh/offset_line.hpp"
#include "solver/constants.hpp"

namespace barwall::verify {
namespace {

using Complex = std::complex<double>;

struct Worst {
  double error = 0.0;
  std::string place = "none";
  void take(double e, const std::string& where) {
    if (place != "none" && !worse(e, error)) return;
    error = e;
    place = where;
  }
};

mesh::Point middle_of(const mesh::Part& part) {
  mesh::Box box;
  for (const mesh::Shape& piece : part.pieces) box.include(bounds(piece));
  return box.centre();
}

/// Radius of a circle round a bar's middle that runs in air alone, 0 where none fits.
double circle_round(const solver::Problem& problem, int part) {
  const mesh::Part& p = problem.section.parts[static_cast<std::size_t>(part)];
  const mesh::Point middle = middle_of(p);
  double own = 0.0;
  double other = 4.0 * half_size(problem.section);
  for (const mesh::OutlinePiece& piece : problem.outline.pieces) {
    const bool is_own = piece.left.part == part || piece.right.part == part;
    if (is_own) {
      for (mesh::Point q : polyline(piece.curve, 1e-4 * length(piece.curve))) {
        own = std::max(own, distance(middle, q));
      }
    } else {
      other = std::min(other, distance(piece.curve, middle));
    }
  }
  // Room for a few cells on both sides.
  if (other < 1.1 * own) return 0.0;
  const double radius = std::sqrt(own * other);
  // The nearest other part must not lie within the bar's own hollow.
  for (std::size_t k = 0; k < problem.section.parts.size(); ++k) {
    if (static_cast<int>(k) == part) continue;
    for (const mesh::Shape& piece : problem.section.parts[k].pieces) {
      const auto chains = boundary(piece);
      if (distance(middle, at(chains.front().front(), 0.5)) < radius) return 0.0;
    }
  }
  return radius;
}

bool in_air(const solver::Problem& problem, mesh::Point at) {
  const mesh::Location location = locate(*problem.grid, problem.section, at);
  return problem.grid->occupant(location.triangle).part < 0;
}

/// Work of H along closed paths in air, both load patterns [A].
class Work {
public:
  Work(const solver::Solution& solution, const solver::RecoveredField& field)
      : solution_(solution), field_(field) {}

  Complex on_circle(mesh::Point centre, double radius) const {
    constexpr int steps = 720;
    Complex sum = 0.0;
    for (int k = 0; k < steps; ++k) {
      const double angle = 2.0 * std::numbers::pi * (k + 0.5) / steps;
      const mesh::Point unit{std::cos(angle), std::sin(angle)};
      const double step = 2.0 * std::numbers::pi * radius / steps;
      sum += step_work(centre + radius * unit, step * quarter_turn(unit));
    }
    return sum;
  }

  /// Two Gauss points on every stretch of at most a four-hundredth of the line.
  Complex along(const std::vector<mesh::Point>& line) const {
    double whole = 0.0;
    for (std::size_t k = 0; k < line.size(); ++k) {
      whole += distance(line[k], line[(k + 1) % line.size()]);
    }
    constexpr double offset = 0.28867513459481287;  // half of 1 / sqrt 3
    Complex sum = 0.0;
    for (std::size_t k = 0; k < line.size(); ++k) {
      const mesh::Point p = line[k];
      const mesh::Point q = line[(k + 1) % line.size()];
      const int pieces = std::max(1, static_cast<int>(std::ceil(400.0 * distance(p, q) / whole)));
      const mesh::Point step = (1.0 / pieces) * (q - p);
      for (int i = 0; i < pieces; ++i) {
        const mesh::Point middle = p + (i + 0.5) * step;
        sum += step_work(middle - offset * step, 0.5 * step);
        sum += step_work(middle + offset * step, 0.5 * step);
      }
    }
    return sum;
  }

private:
  /// H times a step.
  Complex step_work(mesh::Point at, mesh::Point step) const {
    const mesh::Location location = locate(solution_.grid(), solution_.problem->section, at);
    const auto work = [&](int pattern) {
      return solver::nu_0 * dot(field_.flux_density(location, at, pattern), step);
    };
    return {work(0), solution_.pattern_count() == 2 ? work(1) : 0.0};
  }

  const solver::Solution& solution_;
  const solver::RecoveredField& field_;
};

}  // namespace

AmpereCheck::AmpereCheck(const solver::Problem& problem,
                         const std::vector<std::vector<int>>& bodies) {
  const auto& parts = problem.section.parts;
  const double size = 2.0 * half_size(problem.section);
  const mesh::Point centre = bounds(problem.section).centre();
  const auto& x = problem.grid->x_lines;
  for (double sizes : {2.0, 5.0, 20.0}) {
    if (sizes * size >= 0.5 * (x.back() - x.front())) continue;
    circles_.push_back(
        {centre, sizes * size, -1, fmt::format("the circle at {:g} section sizes", sizes)});
  }
  for (std::size_t k = 0; k < parts.size(); ++k) {
    const mesh::Part& part = parts[k];
    if (part.kind != mesh::Part::Kind::bar) continue;
    const double radius = circle_round(problem, static_cast<int>(k));
    if (radius == 0.0) {
      without_circle_ += (without_circle_.empty() ? "" : ", ") + part.name;
      continue;
    }
    circles_.push_back({middle_of(part), radius, static_cast<int>(k),
                        fmt::format("the circle of {:.4g} mm round {}", 1e3 * radius, part.name)});
  }
  std::vector<std::size_t> body_of(parts.size());
  for (std::size_t b = 0; b < bodies.size(); ++b) {
    for (int part : bodies[b]) body_of[static_cast<std::size_t>(part)] = b;
  }
  std::vector<double> gap_round(bodies.size(), half_size(problem.section));
  for (const mesh::PartGap& pair : gaps(problem.outline)) {
    const std::size_t first = body_of[static_cast<std::size_t>(pair.first)];
    const std::size_t second = body_of[static_cast<std::size_t>(pair.second)];
    if (first == second) continue;
    for (std::size_t b : {first, second}) gap_round[b] = std::min(gap_round[b], pair.gap.width);
  }
  for (std::size_t b = 0; b < bodies.size(); ++b) {
    for (auto& points : offset_lines(problem.outline, bodies[b], 0.5 * gap_round[b])) {
      // A body more than twice as thick as that holds a line as well.
      if (!in_air(problem, points.front())) continue;
      Line line;
      line.place = fmt::format("{:.4g} mm round {}", 500.0 * gap_round[b],
                               parts[static_cast<std::size_t>(bodies[b].front())].name);
      const mesh::Polygon inside{points};
      for (std::size_t k = 0; k < parts.size(); ++k) {
        const double whole = area(parts[k]);
        for (const mesh::Shape& piece : parts[k].pieces) {
          // The line crosses no part: one point of a piece's outline stands for the piece.
          const auto chains = boundary(piece);
          if (contains(inside, at(chains.front().front(), 0.5))) {
            line.within.push_back({k, area(piece) / whole});
          }
        }
      }
      line.points = std::move(points);
      lines_.push_back(std::move(line));
    }
  }
}

std::vector<Check> AmpereCheck::checks(const solver::Solution& solution,
                                       const solver::RecoveredField& field) const {
  const auto& currents = solution.problem->excitation.current;
  double largest = 0.0;
  for (const Complex current : currents) largest = std::max(largest, std::abs(current));
  const Complex net = net_current_of(solution.problem->excitation).sum;
  const auto error_of = [largest](Complex found, Complex expected) {
    return largest > 0.0 ? std::abs(found - expected) / largest : std::abs(found);
  };
  const Work work(solution, field);
  Worst wire;
  for (const Circle& circle : circles_) {
    const Complex expected = circle.bar < 0 ? net : currents[static_cast<std::size_t>(circle.bar)];
    wire.take(error_of(work.on_circle(circle.centre, circle.radius), expected), circle.place);
  }
  Worst loop;
  for (const Line& line : lines_) {
    Complex enclosed = 0.0;
    for (const Within& within : line.within) enclosed += currents[within.part] * within.share;
    loop.take(error_of(work.along(line.points), enclosed), line.place);
  }
  std::string detail = "worst: " + wire.place;
  if (!without_circle_.empty()) detail += "; no circle in air fits round " + without_circle_;
  return {make_check("long-wire", wire.error, 0.005, detail),
          make_check("ampere-loops", loop.error, 0.005,
                     fmt::format("{} loops; worst: {}", lines_.size(), loop.place))};
}

}  // namespace barwall::verify
