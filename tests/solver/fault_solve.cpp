// Short circuits beside steel whose curve is a straight line, against a constant permeability.

#include "solver/fault_solve.hpp"

#include <catch2/catch.hpp>
#include <cmath>
#include <numbers>

#include "tests/support/faults.hpp"
#include "tests/support/sections.hpp"
#include "tests/support/steel.hpp"

namespace barwall::solver {
namespace {

using support::mm;
using support::on_small_grid;
using support::Told;
using support::told_by;

constexpr double pi = std::numbers::pi;
constexpr double hertz = support::fault_hertz;

/// One bar of two pieces, and the plate with a part that it touches: every kind of force.
mesh::Section every_kind_of_force() {
  mesh::Section section = support::three_bars_over_plate();
  section.parts[2].pieces.push_back(mesh::Rectangle{{70 * mm, 0.0}, 20 * mm, 20 * mm, 0.0});
  section.parts.insert(
      section.parts.begin() + 3,
      support::steel_wall("foot", {mesh::Rectangle{{0.0, -35 * mm}, 40 * mm, 10 * mm, 0.0}}));
  return section;
}

/// A fault on the same section with a constant permeability and with a straight line for a curve.
struct Twins {
  FaultSolution constant;
  FaultSolution curved;

  static constexpr double permeability = 300.0;
  static const Problem& constant_problem() {
    static const auto problem = on_small_grid(every_kind_of_force(), permeability);
    return *problem;
  }
  static const Problem& curved_problem() {
    static const auto problem = support::with_curve(
        on_small_grid(every_kind_of_force(), permeability), support::straight_line(permeability));
    return *problem;
  }
};

Twins twins_of(const FaultCurrent& fault) {
  const ForceGeometry geometry(Twins::constant_problem());
  return {solve_fault(Twins::constant_problem(), fault, geometry),
          solve_fault(Twins::curved_problem(), fault, geometry)};
}

/// Hands over everything that two sets know of the same part, piece, body or face, kind by kind.
template <class T, class Take>
void side_by_side(const PartForces<T>& a, const PartForces<T>& b, Take take) {
  std::vector<std::pair<const T*, const T*>> own;
  REQUIRE(a.part.size() == b.part.size());
  for (std::size_t k = 0; k < a.part.size(); ++k) {
    REQUIRE(a.part[k].has_value() == b.part[k].has_value());
    if (a.part[k]) own.emplace_back(&*a.part[k], &*b.part[k]);
  }
  for (std::size_t k = 0; k < a.piece.size(); ++k) {
    REQUIRE(a.piece[k].size() == b.piece[k].size());
    for (std::size_t p = 0; p < a.piece[k].size(); ++p) {
      own.emplace_back(&a.piece[k][p], &b.piece[k][p]);
    }
  }
  REQUIRE(a.body.size() == b.body.size());
  for (std::size_t k = 0; k < a.body.size(); ++k) own.emplace_back(&a.body[k], &b.body[k]);
  CHECK(own.size() == 6);  // three bars, two pieces, one body; the walls touch
  take(own);
  REQUIRE(a.push.size() == b.push.size());
  std::vector<std::pair<const T*, const T*>> pushes;
  for (std::size_t k = 0; k < a.push.size(); ++k) pushes.emplace_back(&a.push[k], &b.push[k]);
  CHECK(pushes.size() == 4);  // the sides of the plate; the foot is not magnetic
  take(pushes);
}

/// What two sets of extremes may differ by.
struct Room {
  double force = 0.0;    ///< relative to the largest force of the kind
  double seconds = 0.0;  ///< [s]
};

void check_same(const Told& found, const Told& expected, const Room& room, double size) {
  CHECK(found.value <= expected.value + room.force * size);
  // With a given closing angle steel is followed through the first cycle alone.
  if (expected.seconds.value_or(0.0) > 1.0 / hertz && expected.closing) return;
  CHECK(found.value >= expected.value - room.force * size);
  if (expected.value < 0.02 * size) return;
  REQUIRE(found.seconds.has_value() == expected.seconds.has_value());
  if (found.seconds) CHECK(std::abs(*found.seconds - *expected.seconds) <= room.seconds);
  REQUIRE(found.closing.has_value() == expected.closing.has_value());
  if (!found.closing) return;
  CHECK(std::abs(std::remainder(*found.closing - *expected.closing, pi)) < 1e-5);
}

void check_extremes(const Twins& twins, const Room& room) {
  side_by_side(twins.curved.extremes, twins.constant.extremes, [&](const auto& pairs) {
    double size = 0.0;
    for (const auto& pair : pairs) size = std::max(size, pair.second->peak.magnitude);
    REQUIRE(size > 1.0);
    for (const auto& [found, expected] : pairs) {
      const auto a = told_by(*found);
      const auto b = told_by(*expected);
      for (std::size_t k = 0; k < a.size(); ++k) check_same(a[k], b[k], room, size);
    }
  });
}

void check_levels(const Twins& twins, double room) {
  REQUIRE(twins.curved.levels.size() == 5);
  for (std::size_t part = 0; part < 5; ++part) {
    CHECK(twins.curved.levels[part].mean == Approx(twins.constant.levels[part].mean).epsilon(room));
    CHECK(twins.curved.levels[part].high == Approx(twins.constant.levels[part].high).epsilon(room));
  }
  CHECK(twins.curved.levels[4].share_beyond_table == 0.0);  // the line ends at 2 T
}

/// Steel is followed through one cycle, constant permeabilities through five: to every `of_curved`
/// times of the one belong `of_constant` of the other.
void check_series(const Twins& twins, std::size_t of_curved, std::size_t of_constant, double room) {
  const FaultSeries& a = twins.curved.series;
  const FaultSeries& b = twins.constant.series;
  REQUIRE(a.closing.has_value() == b.closing.has_value());
  if (a.closing) CHECK(*a.closing == Approx(*b.closing).margin(1e-6));
  REQUIRE(a.seconds.size() > 100);
  double size = 0.0;
  for (const auto& part : twins.constant.extremes.part) {
    if (part) size = std::max(size, part->peak.magnitude);
  }
  std::size_t times = 0;
  for (std::size_t i = 0, j = 0; i < a.seconds.size(); i += of_curved, j += of_constant, ++times) {
    REQUIRE(a.seconds[i] == Approx(b.seconds.at(j)).margin(1e-12));
    for (std::size_t bar = 0; bar < b.current.size(); ++bar) {
      REQUIRE(a.current[bar][i] == Approx(b.current[bar][j]).margin(0.01));
    }
    for (std::size_t part = 0; part < 5; ++part) {
      if (!b.force.part[part]) continue;
      REQUIRE(distance((*a.force.part[part])[i], (*b.force.part[part])[j]) <= room * size);
    }
  }
  CHECK(times > 50);
}

/// What a cubic spline through instants 15 degrees apart leaves: 5/384 of the step's fourth power
/// of the fourth slope, that of a force cos(2 wt) / 2 of its peak 8; twice as much at the end.
constexpr double spline_room = 1e-3;

/// By how much the largest of instants 15 degrees apart falls short of a crest between them.
const double instant_room = 1.0 - std::cos(7.5 * pi / 180.0);

}  // namespace

TEST_CASE("With a straight line for a curve a fault at its worst is that of a constant one") {
  for (const std::size_t bars : {2, 3}) {
    for (const double r_over_x : {0.0, 0.1}) {
      CAPTURE(bars, r_over_x);
      const Twins twins = twins_of(support::alternating_fault(bars, 2e3, r_over_x));
      // Instants take part in half a turn as exactly as they are solved.
      check_extremes(twins, {1e-7, 1e-12});
      check_levels(twins, 1e-5);
      check_series(twins, 1, 1, spline_room);
    }
  }
}

TEST_CASE("With a straight line for a curve a fault closed at an angle is that of a constant one") {
  for (const std::size_t bars : {2, 3}) {
    for (const double r_over_x : {0.0, 0.1}) {
      CAPTURE(bars, r_over_x);
      const Twins twins = twins_of(support::alternating_fault(bars, 2e3, r_over_x, 0.4));
      CHECK(twins.curved.series.closing.value() == 0.4);
      // A third of a degree for where the spline's crest is.
      check_extremes(twins, {spline_room, 2e-5});
      check_levels(twins, instant_room);
      check_series(twins, 1, 1, spline_room);
    }
  }
}

TEST_CASE("With a straight line for a curve a fault of direct current is that of a constant one") {
  const Twins rise = twins_of({{0, 2}, DirectRise{4e3, 0.03}});
  check_extremes(rise, {1e-7, 0.0});
  check_levels(rise, 1e-7);
  check_series(rise, 2, 5, spline_room);
  const Twins peak = twins_of({{0, 2}, DirectPeak{3e3, 4e3}});
  check_extremes(peak, {1e-7, 0.0});
  check_levels(peak, 1e-7);
  CHECK(peak.curved.series.seconds.empty());
  CHECK(peak.constant.series.seconds.empty());
  CHECK_FALSE(peak.curved.course.has_value());
}

TEST_CASE("The field of two bars in a fault is as large as their current with its closing angle") {
  const Problem& problem = Twins::constant_problem();
  const ForceGeometry geometry(problem);
  auto steady = std::make_shared<Problem>(problem);
  steady->excitation = {0.0, {1e3, -1e3, 0.0, 0.0, 0.0}};
  const auto expected = field_levels(solve(std::shared_ptr<const Problem>(steady)));
  for (const double closing : {0.0, 0.5, 1.2, 2.5}) {
    const FaultCurrent fault = support::alternating_fault(2, 2e3, 0.1, closing);
    double largest = 0.0;
    for (int k = 0; k <= 7200; ++k) {
      largest =
          std::max(largest, std::abs(fault_currents(fault, k / (3600.0 * hertz), closing)[0]));
    }
    CAPTURE(closing, largest);
    const auto found = solve_fault(problem, fault, geometry).levels;
    for (std::size_t part = 0; part < 5; ++part) {
      // Looked for every three degrees.
      CHECK(found[part].mean == Approx(expected[part].mean * largest / 1e3).epsilon(4e-4));
      CHECK(found[part].high == Approx(expected[part].high * largest / 1e3).epsilon(4e-4));
    }
  }
}

}  // namespace barwall::solver
