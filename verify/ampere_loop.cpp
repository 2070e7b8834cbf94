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

class AmpereLoops {
public:
  AmpereLoops(const solver::Solution& solution, const solver::RecoveredField& field)
      : solution_(solution), problem_(*solution.problem), field_(field) {
    for (Complex current : problem_.excitation.current) {
      largest_ = std::max(largest_, std::abs(current));
      net_ += current;
    }
  }

  Check long_wire() const {
    Worst worst;
    const double size = 2.0 * half_size(problem_.section);
    const mesh::Point centre = bounds(problem_.section).centre();
    const auto& grid = solution_.grid();
    for (double sizes : {2.0, 5.0, 20.0}) {
      if (sizes * size >= 0.5 * (grid.x_lines.back() - grid.x_lines.front())) continue;
      worst.take(error_of(on_circle(centre, sizes * size), net_),
                 fmt::format("the circle at {:g} section sizes", sizes));
    }
    std::string without;
    for (std::size_t k = 0; k < problem_.section.parts.size(); ++k) {
      const mesh::Part& part = problem_.section.parts[k];
      if (part.kind != mesh::Part::Kind::bar) continue;
      const double radius = circle_round(static_cast<int>(k));
      if (radius == 0.0) {
        without += (without.empty() ? "" : ", ") + part.name;
        continue;
      }
      worst.take(error_of(on_circle(middle_of(part), radius), problem_.excitation.current[k]),
                 fmt::format("the circle of {:.4g} mm round {}", 1e3 * radius, part.name));
    }
    std::string detail = "worst: " + worst.place;
    if (!without.empty()) detail += "; no circle in air fits round " + without;
    return make_check("long-wire", worst.error, 0.005, detail);
  }

  Check loops(const std::vector<std::vector<int>>& bodies) const {
    Worst worst;
    int count = 0;
    std::vector<std::size_t> body_of(problem_.section.parts.size());
    for (std::size_t b = 0; b < bodies.size(); ++b) {
      for (int part : bodies[b]) body_of[static_cast<std::size_t>(part)] = b;
    }
    std::vector<double> gap_round(bodies.size(), half_size(problem_.section));
    for (const mesh::PartGap& pair : gaps(problem_.outline)) {
      const std::size_t first = body_of[static_cast<std::size_t>(pair.first)];
      const std::size_t second = body_of[static_cast<std::size_t>(pair.second)];
      if (first == second) continue;
      for (std::size_t b : {first, second}) gap_round[b] = std::min(gap_round[b], pair.gap.width);
    }
    for (std::size_t b = 0; b < bodies.size(); ++b) {
      const double gap = gap_round[b];
      for (const auto& line : offset_lines(problem_.outline, bodies[b], 0.5 * gap)) {
        // A body more than twice as thick as that holds a line as well.
        if (!in_air(line.front())) continue;
        ++count;
        worst.take(
            error_of(along(line), enclosed_by(line)),
            fmt::format("{:.4g} mm round {}", 500.0 * gap,
                        problem_.section.parts[static_cast<std::size_t>(bodies[b].front())].name));
      }
    }
    return make_check("ampere-loops", worst.error, 0.005,
                      fmt::format("{} loops; worst: {}", count, worst.place));
  }

private:
  struct Worst {
    double error = 0.0;
    std::string place = "none";
    void take(double e, const std::string& where) {
      if (place != "none" && !worse(e, error)) return;
      error = e;
      place = where;
    }
  };

  double error_of(Complex found, Complex expected) const {
    return largest_ > 0.0 ? std::abs(found - expected) / largest_ : std::abs(found);
  }

  bool in_air(mesh::Point at) const {
    const mesh::Location location = locate(solution_.grid(), problem_.section, at);
    return solution_.grid().occupant(location.triangle).part < 0;
  }

  /// H in air times a step, both load patterns [A].
  Complex step_work(mesh::Point at, mesh::Point step) const {
    const mesh::Location location = locate(solution_.grid(), problem_.section, at);
    const auto work = [&](int pattern) {
      return solver::nu_0 * dot(field_.flux_density(location, at, pattern), step);
    };
    return {work(0), solution_.pattern_count() == 2 ? work(1) : 0.0};
  }

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

  Complex enclosed_by(const std::vector<mesh::Point>& line) const {
    const mesh::Polygon inside{line};
    Complex sum = 0.0;
    for (std::size_t k = 0; k < problem_.section.parts.size(); ++k) {
      const mesh::Part& part = problem_.section.parts[k];
      const double whole = area(part);
      for (const mesh::Shape& piece : part.pieces) {
        // The line crosses no part: one point of a piece's outline stands for the piece.
        const auto chains = boundary(piece);
        if (contains(inside, at(chains.front().front(), 0.5))) {
          sum += problem_.excitation.current[k] * (area(piece) / whole);
        }
      }
    }
    return sum;
  }

  static mesh::Point middle_of(const mesh::Part& part) {
    mesh::Box box;
    for (const mesh::Shape& piece : part.pieces) box.include(bounds(piece));
    return box.centre();
  }

  /// Radius of a circle round a bar's middle that runs in air alone, 0 where none fits.
  double circle_round(int part) const {
    const mesh::Part& p = problem_.section.parts[static_cast<std::size_t>(part)];
    const mesh::Point middle = middle_of(p);
    double own = 0.0;
    double other = 4.0 * half_size(problem_.section);
    for (const mesh::OutlinePiece& piece : problem_.outline.pieces) {
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
    for (std::size_t k = 0; k < problem_.section.parts.size(); ++k) {
      if (static_cast<int>(k) == part) continue;
      for (const mesh::Shape& piece : problem_.section.parts[k].pieces) {
        const auto chains = boundary(piece);
        if (distance(middle, at(chains.front().front(), 0.5)) < radius) return 0.0;
      }
    }
    return radius;
  }

  const solver::Solution& solution_;
  const solver::Problem& problem_;
  const solver::RecoveredField& field_;
  double largest_ = 0.0;
  Complex net_ = 0.0;
};

}  // namespace

std::vector<Check> check_ampere(const solver::Solution& solution,
                                const solver::RecoveredField& field,
                                const std::vector<std::vector<int>>& bodies) {
  const AmpereLoops loops(solution, field);
  return {loops.long_wire(), loops.loops(bodies)};
}

}  // namespace barwall::verify
