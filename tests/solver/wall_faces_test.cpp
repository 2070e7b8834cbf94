// The forces on the faces of walls: exact answers at planes and corners, sums, and what is a face.

#include "solver/wall_faces.hpp"

#include <catch2/catch.hpp>
#include <complex>
#include <numbers>

#include "tests/support/sections.hpp"
#include "tests/support/solved.hpp"

namespace barwall {
namespace {

using mesh::Point;
using support::mm;
using support::solved;
using support::Solved;

constexpr double pi = std::numbers::pi;

/// The faces of a solved problem with their forces.
struct Faces {
  std::vector<solver::WallFace> face;
  std::vector<solver::PulsatingVector> force;

  explicit Faces(const Solved& run) {
    const solver::WallFaces faces(*run.problem);
    face = faces.faces();
    for (std::size_t k = 0; k < face.size(); ++k) {
      force.push_back(faces.force(*run.solution, *run.field, k));
    }
  }
  std::size_t index(const std::string& side, int part) const {
    for (std::size_t k = 0; k < face.size(); ++k) {
      if (face[k].side == side && face[k].part == part) return k;
    }
    FAIL("no face " << side);
    return 0;
  }
  double push(std::size_t k) const { return push_of(face[k], force[k]).mean; }
  double push(const std::string& side, int part) const { return push(index(side, part)); }
  double largest_push() const {
    double largest = 0.0;
    for (std::size_t k = 0; k < face.size(); ++k) largest = std::max(largest, std::abs(push(k)));
    return largest;
  }
  /// Largest difference of a push from that of the same face elsewhere, of the largest push.
  double difference(const Faces& other) const {
    REQUIRE(face.size() == other.face.size());
    double worst = 0.0;
    for (std::size_t k = 0; k < face.size(); ++k) {
      worst = std::max(worst, std::abs(push(k) - other.push(k)));
    }
    return worst / largest_push();
  }
  /// The sum of all, less a body's force from the stress in the whole band round it, of the
  /// largest push.
  double sum_less_body(const Solved& run, int part) const {
    Point sum;
    for (const auto& f : force) sum += Point{f.x.mean, f.y.mean};
    const auto& bodies = run.geometry->bands.bodies();
    const auto body = std::find(bodies.begin(), bodies.end(), std::vector<int>{part});
    REQUIRE(body != bodies.end());
    const auto whole = run.geometry->bands.force(
        *run.solution, static_cast<int>(body - bodies.begin()), solver::whole_band);
    return norm(sum - Point{whole.x.mean, whole.y.mean}) / largest_push();
  }
};

/// A flat bar of net current beside a steel plate.
std::shared_ptr<solver::Problem> bar_beside_plate(int cells_across) {
  mesh::Section section;
  section.parts.push_back(support::bar("bar", {mesh::Rectangle{{0, 0}, 20 * mm, 120 * mm, 0.0}}));
  section.parts.push_back(
      support::steel_wall("plate", {mesh::Rectangle{{73 * mm, 0}, 6 * mm, 300 * mm, 0.0}}));
  return support::problem_of(section, {1, 500}, {4000.0, 0.0}, {cells_across});
}

std::shared_ptr<solver::Problem> trunking(int cells_across) {
  return support::problem_of(support::three_bars_in_trunking(), {1, 1, 1, 600},
                             {1000.0, -400.0, -600.0, 0.0}, {cells_across});
}

TEST_CASE("The panels of a symmetrical trunking bear loads though the whole bears none") {
  const Solved run = solved(support::problem_of(support::three_bars_in_trunking(), {1, 1, 1, 600},
                                                {1000.0, 0.0, -1000.0, 0.0}));
  const Faces faces(run);
  REQUIRE(faces.face.size() == 4);
  CHECK(faces.sum_less_body(run, 3) < 1e-6);
  CHECK(faces.push("top", 3) == Approx(faces.push("bottom", 3)).epsilon(1e-6));
  CHECK(faces.push("left", 3) == Approx(faces.push("right", 3)).epsilon(1e-6));
  CHECK(faces.push("top", 3) < -0.1);  // drawn inward
  CHECK(faces.face[faces.index("top", 3)].length == Approx(320 * mm));
  CHECK(faces.face[faces.index("left", 3)].length == Approx(220 * mm));
}

TEST_CASE("The faces of a wall alone in air together take its whole force") {
  const Solved box = solved(trunking(4));
  CHECK(Faces(box).sum_less_body(box, 3) < 2e-3);
  const Solved plate = solved(bar_beside_plate(4));
  CHECK(Faces(plate).sum_less_body(plate, 1) < 2e-3);
}

TEST_CASE("Halving the grid changes the push on a face little, halving it again less") {
  const Faces coarse(solved(trunking(2)));
  const Faces middle(solved(trunking(4)));
  CHECK(middle.difference(coarse) < 2e-3);
  const Faces plates[] = {Faces(solved(bar_beside_plate(2))), Faces(solved(bar_beside_plate(4))),
                          Faces(solved(bar_beside_plate(8)))};
  CHECK(plates[1].difference(plates[0]) < 5e-3);
  CHECK(plates[2].difference(plates[1]) < 0.5 * plates[1].difference(plates[0]));
}

TEST_CASE("Two bars draw the surface of a wide plate as their images draw them") {
  constexpr double height = 30 * mm;
  constexpr double spacing = 50 * mm;
  constexpr double current = 1000.0;
  constexpr double permeability = 1000.0;
  mesh::Section section;
  for (double side : {-0.5, 0.5}) {
    section.parts.push_back(
        support::bar(side < 0.0 ? "go" : "back", {mesh::Round{{side * spacing, height}, 10 * mm}}));
  }
  section.parts.push_back(
      support::steel_wall("plate", {mesh::Rectangle{{0, -0.5}, 10.0, 1.0, 0.0}}));
  const Faces faces(
      solved(support::problem_of(section, {1, 1, permeability}, {current, -current, 0.0})));
  const double image = (permeability - 1.0) / (permeability + 1.0);
  const double exact =
      2.0 * image * solver::mu_0 * current * current / (2.0 * pi) *
      (1.0 / (2.0 * height) - 2.0 * height / (4.0 * height * height + spacing * spacing));
  CHECK(faces.push("top", 2) == Approx(exact).epsilon(5e-3));
  for (const char* side : {"left", "right", "bottom"}) {
    CHECK(std::abs(faces.push(side, 2)) < 1e-3 * exact);
  }
}

struct Wire {
  Point at;
  double current;
};

/// Pushes on the two faces of an endless wedge of steel without reluctance, which lies between the
/// angles pi and pi + opening: z to the power lambda maps the air round it onto half a plane, where
/// the wires have images of their own sign. The face at pi comes first.
std::array<double, 2> pushes_on_wedge(double opening, const std::vector<Wire>& wires) {
  const double air = 2.0 * pi - opening;
  const double lambda = pi / air;
  // By the angle from the second face, through the air.
  const auto mapped = [&](double r, double angle) {
    return std::polar(std::pow(r, lambda), lambda * angle);
  };
  std::array<double, 2> push{};
  for (int face : {0, 1}) {
    constexpr int steps = 20000;
    for (int k = 0; k < steps; ++k) {
      // Radii up to 10 m, evenly in their logarithms, down to where no stress is left: it gathers
      // at the corner, the more the sharper it is.
      const double step = std::log(1e61) / steps;
      const double r = 1e-60 * std::exp((k + 0.5) * step);
      const std::complex<double> place = mapped(r, face == 0 ? air : 0.0);
      std::complex<double> sum = 0.0;
      for (const Wire& wire : wires) {
        const double angle = std::atan2(wire.at.y, wire.at.x) + pi - opening;
        const std::complex<double> image = mapped(norm(wire.at), angle);
        sum += wire.current * (1.0 / (place - image) + 1.0 / (place - std::conj(image)));
      }
      const double b =
          solver::mu_0 / (2.0 * pi) * std::abs(sum) * lambda * std::pow(r, lambda - 1.0);
      push[static_cast<std::size_t>(face)] += 0.5 * solver::nu_0 * b * b * r * step;
    }
  }
  return push;
}

TEST_CASE("At a corner of steel each face takes the push that a conformal map gives it") {
  const double degrees = GENERATE(30.0, 60.0, 90.0, 120.0, 225.0);
  const double opening = degrees * pi / 180.0;
  std::vector<Wire> wires{{{4 * mm, 14 * mm}, 1000.0}, {{14 * mm, 2 * mm}, -1000.0}};
  if (degrees > 180.0) wires[1].at = {-14 * mm, 12 * mm};
  mesh::Section section;
  for (const Wire& wire : wires) {
    section.parts.push_back(
        support::bar(wire.current > 0.0 ? "go" : "back", {mesh::Round{wire.at, 6 * mm}}));
  }
  // As good as endless: what is cut off matters as (14 mm / 10 m)^(2 lambda).
  constexpr double size = 10.0;
  std::vector<Point> corners{{0, 0}, {-size, 0}};
  if (degrees > 100.0) corners.push_back({-size, -size});
  if (degrees > 180.0) corners.push_back({size, -size});
  corners.push_back({size * std::cos(pi + opening), size * std::sin(pi + opening)});
  section.parts.push_back(support::steel_wall("wedge", {mesh::Polygon{corners}}));
  const Faces faces(solved(support::problem_of(section, {1, 1, 1e5}, {1000.0, -1000.0, 0.0})));
  REQUIRE(faces.face.size() == corners.size());
  const auto exact = pushes_on_wedge(opening, wires);
  INFO(degrees << " degrees: " << faces.push(0) / exact[0] << ", "
               << faces.push(corners.size() - 1) / exact[1] << " of the exact");
  const double within = degrees < 90.0 ? 1e-2 : 4e-3;
  CHECK(faces.push(0) == Approx(exact[0]).epsilon(within));
  CHECK(faces.push(corners.size() - 1) == Approx(exact[1]).epsilon(within));
}

TEST_CASE("A turned trunking bears on its panels what an upright one does") {
  mesh::Section section = support::three_bars_in_trunking();
  const double turn = 0.4;
  for (mesh::Part& part : section.parts) {
    for (mesh::Shape& shape : part.pieces) {
      if (auto* bar = std::get_if<mesh::Rectangle>(&shape)) {
        bar->centre = turned(bar->centre, turn);
        bar->turn = turn;
      } else {
        std::get<mesh::Frame>(shape).turn = turn;
      }
    }
  }
  const Faces upright(solved(trunking(4)));
  const Faces inclined(
      solved(support::problem_of(section, {1, 1, 1, 600}, {1000.0, -400.0, -600.0, 0.0})));
  CHECK(upright.difference(inclined) < 5e-3);
}

TEST_CASE("A polygon's faces bear what the same rectangle's do, whichever way its corners run") {
  const auto problem = bar_beside_plate(2);
  const Faces rectangle(solved(problem));
  std::vector<Point> corners{
      {70 * mm, -150 * mm}, {76 * mm, -150 * mm}, {76 * mm, 150 * mm}, {70 * mm, 150 * mm}};
  std::vector<std::string> order{"bottom", "right", "top", "left"};
  if (GENERATE(true, false)) {
    std::reverse(corners.begin(), corners.end());
    order = {"top", "right", "bottom", "left"};
  }
  mesh::Section section = problem->section;
  section.parts[1].pieces = {mesh::Polygon{corners}};
  const Faces polygon(solved(support::problem_of(section, {1, 500}, {4000.0, 0.0}, {2})));
  for (std::size_t k = 0; k < 4; ++k) {
    const std::string side = "side " + std::to_string(k + 1);
    CHECK(polygon.push(side, 1) == Approx(rectangle.push(order[k], 1)).epsilon(1e-6));
  }
}

TEST_CASE("The force on a face at every instant of a cycle is that of the currents then") {
  const std::vector<std::complex<double>> phasors{1000.0, std::polar(800.0, -2.0),
                                                  -1000.0 - std::polar(800.0, -2.0), 0.0};
  const auto section = support::three_bars_in_trunking();
  const Faces cycle(solved(support::problem_of(section, {1, 1, 1, 600}, phasors, {2}, 50.0)));
  for (double wt : {0.0, 0.7, 2.9}) {
    std::vector<std::complex<double>> now;
    for (const auto& phasor : phasors) {
      now.emplace_back(std::numbers::sqrt2 * std::real(phasor * std::polar(1.0, wt)));
    }
    const Faces instant(solved(support::problem_of(section, {1, 1, 1, 600}, now, {2})));
    for (std::size_t k = 0; k < cycle.face.size(); ++k) {
      const Point expected{instant.force[k].x.mean, instant.force[k].y.mean};
      CHECK(norm(cycle.force[k].at(wt) - expected) < 1e-8 * instant.largest_push());
      CHECK(push_of(cycle.face[k], cycle.force[k]).at(wt) ==
            Approx(instant.push(k)).margin(1e-8 * instant.largest_push()));
    }
  }
}

TEST_CASE("An opening's surfaces count to the panel that it cuts, whose length stays whole") {
  mesh::Section section = support::three_bars_in_trunking();
  section.openings.push_back(
      {"slot", {3}, {mesh::Rectangle{{30 * mm, 108.5 * mm}, 40 * mm, 10 * mm, 0.0}}});
  const Solved run =
      solved(support::problem_of(section, {1, 1, 1, 600}, {1000.0, -400.0, -600.0, 0.0}));
  const Faces faces(run);
  REQUIRE(faces.face.size() == 4);
  CHECK(faces.face[faces.index("top", 3)].length == Approx(320 * mm));
  CHECK(faces.sum_less_body(run, 3) < 2e-3);
}

TEST_CASE("Surface cut away or in contact with another wall is no part of a face") {
  mesh::Section section;
  section.parts.push_back(support::bar("bar", {mesh::Round{{0, 60 * mm}, 20 * mm}}));
  // A plate with a groove in its top, a rib that stands on it and a tube, all of steel.
  section.parts.push_back(
      support::steel_wall("plate", {mesh::Rectangle{{0, 0}, 200 * mm, 10 * mm, 0.0}}));
  section.parts.push_back(
      support::steel_wall("rib", {mesh::Rectangle{{50 * mm, 20 * mm}, 8 * mm, 30 * mm, 0.0}}));
  section.parts.push_back(
      support::steel_wall("tube", {mesh::Tube{{-80 * mm, 60 * mm}, 40 * mm, 4 * mm}}));
  section.openings.push_back(
      {"groove", {1}, {mesh::Rectangle{{-40 * mm, 5 * mm}, 16 * mm, 8 * mm, 0.0}}});
  const Solved run =
      solved(support::problem_of(section, {1, 500, 500, 500}, {1000.0, 0.0, 0.0, 0.0}));
  const Faces faces(run);
  REQUIRE(faces.face.size() == 7);  // the rib's bottom and the tube are none
  CHECK(faces.face[faces.index("top", 1)].length == Approx((200 - 8 - 16) * mm));
  CHECK(faces.face[faces.index("bottom", 1)].length == Approx(200 * mm));
  CHECK(faces.face[faces.index("left", 2)].length == Approx(30 * mm));
  for (const auto& face : faces.face) CHECK(face.part != 3);
  // Plate and rib together are one body.
  Point sum;
  for (const auto& f : faces.force) sum += Point{f.x.mean, f.y.mean};
  const auto& bodies = run.geometry->bands.bodies();
  const auto body = std::find(bodies.begin(), bodies.end(), std::vector<int>{1, 2});
  REQUIRE(body != bodies.end());
  const auto whole = run.geometry->bands.force(
      *run.solution, static_cast<int>(body - bodies.begin()), solver::whole_band);
  CHECK(norm(sum - Point{whole.x.mean, whole.y.mean}) < 5e-3 * faces.largest_push());
}

TEST_CASE("Only walls of magnetic material have faces") {
  CHECK(solver::WallFaces(*support::problem_of(support::three_bars_in_trunking(), {1, 1, 1, 1},
                                               {1.0, -1.0, 0.0, 0.0}, {2}))
            .faces()
            .empty());
  const auto steel_bars = solver::WallFaces(*support::problem_of(
      support::three_bars_in_trunking(), {300, 1, 1, 600}, {1.0, -1.0, 0.0, 0.0}, {2}));
  REQUIRE(steel_bars.faces().size() == 4);
  for (const auto& face : steel_bars.faces()) CHECK(face.part == 3);
}

}  // namespace
}  // namespace barwall
