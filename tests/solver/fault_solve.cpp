// Short circuits beside saturable steel.

#include "solver/fault_solve.hpp"

#include <catch2/catch.hpp>
#include <cmath>
#include <numbers>

#include "tests/support/sections.hpp"
#include "tests/support/steel.hpp"

namespace barwall::solver {
namespace {

using support::mm;

constexpr double pi = std::numbers::pi;
constexpr double hertz = 50.0;

FaultCurrent alternating(std::size_t bars, double symmetrical, double r_over_x,
                         std::optional<double> closing = {}) {
  FaultCurrent fault{{0, 1, 2}, AlternatingFault{hertz, symmetrical, r_over_x, closing}};
  fault.bars.resize(bars);
  return fault;
}

std::shared_ptr<Problem> on_small_grid(const mesh::Section& section, double permeability) {
  std::vector<double> all(section.parts.size(), 1.0);
  all.back() = permeability;
  const std::vector<std::complex<double>> none(section.parts.size(), 0.0);
  return support::problem_of(section, all, none, {2, 5.0}, hertz);
}

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
  CHECK(pushes.size() == 4);  // the sides of the plate, uppermost of the two walls
  take(pushes);
}

/// What two sets of extremes may differ by.
struct Room {
  double force = 0.0;    ///< relative to the largest force of the kind
  double seconds = 0.0;  ///< [s]
};

struct Told {
  double value;  ///< 0 or more
  std::optional<double> seconds;
  std::optional<double> closing;
};

std::vector<Told> told_by(const FaultExtremes& e) {
  return {{e.x_max.value, e.x_max.seconds, e.x_max.closing},
          {-e.x_min.value, e.x_min.seconds, e.x_min.closing},
          {e.y_max.value, e.y_max.seconds, e.y_max.closing},
          {-e.y_min.value, e.y_min.seconds, e.y_min.closing},
          {e.peak.magnitude, e.peak.seconds, e.peak.closing}};
}

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

const double crest = std::numbers::sqrt2;

/// Saturates the plate over which three bars lie.
constexpr double saturating = 32e3;

const Problem& saturable_problem() {
  static const auto problem = support::with_curve(
      on_small_grid(support::three_bars_over_plate(), 1.0), support::test_steel());
  return *problem;
}

const ForceGeometry& saturable_geometry() {
  static const ForceGeometry geometry(saturable_problem());
  return geometry;
}

FaultSolution saturated(const FaultCurrent& fault) {
  return solve_fault(saturable_problem(), fault, saturable_geometry());
}

const FaultSolution& saturated_worst() {
  static const FaultSolution worst = saturated(alternating(3, saturating, 0.1));
  return worst;
}

/// Of steady currents in the bars.
PartForces<PulsatingVector> steady_forces(const std::vector<double>& currents) {
  auto problem = std::make_shared<Problem>(saturable_problem());
  problem->excitation = {};
  problem->excitation.current.assign(currents.begin(), currents.end());
  problem->excitation.current.resize(4, 0.0);
  const Solution solution = solve(std::shared_ptr<const Problem>(problem));
  const RecoveredField field(solution);
  return forces_of(PartIntegrals(solution), saturable_geometry(), &field);
}

double largest_on_a_bar(const FaultSolution& solution) {
  double largest = 0.0;
  for (std::size_t bar = 0; bar < 3; ++bar) {
    largest = std::max(largest, solution.extremes.part[bar]->peak.magnitude);
  }
  return largest;
}

double largest_in_series(const FaultSolution& solution) {
  double largest = 0.0;
  for (std::size_t bar = 0; bar < 3; ++bar) {
    for (const mesh::Point force : *solution.series.force.part[bar]) {
      largest = std::max(largest, norm(force));
    }
  }
  return largest;
}

}  // namespace

TEST_CASE("With a straight line for a curve a fault at its worst is that of a constant one") {
  for (const std::size_t bars : {2, 3}) {
    for (const double r_over_x : {0.0, 0.1}) {
      CAPTURE(bars, r_over_x);
      const Twins twins = twins_of(alternating(bars, 2e3, r_over_x));
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
      const Twins twins = twins_of(alternating(bars, 2e3, r_over_x, 0.4));
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
    const FaultCurrent fault = alternating(2, 2e3, 0.1, closing);
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

TEST_CASE(
    "Beside saturated steel no closing angle gives more than the worst, and its own as much") {
  const FaultSolution& worst = saturated_worst();
  CHECK(worst.levels[3].saturated_share > 0.5);
  CHECK(worst.levels[3].saturated_share < 1.0);
  for (const double closing : {0.1, 0.9, 1.7, 2.5}) {
    const FaultSolution given = saturated(alternating(3, saturating, 0.1, closing));
    for (std::size_t part = 0; part < 4; ++part) {
      CAPTURE(closing, part);
      const auto more = told_by(*worst.extremes.part[part]);
      const auto less = told_by(*given.extremes.part[part]);
      const double size = worst.extremes.part[part]->peak.magnitude;
      for (std::size_t k = 0; k < more.size(); ++k) {
        CHECK(less[k].value <= more[k].value + 2e-3 * size);
      }
      CHECK(given.levels[part].mean <= worst.levels[part].mean * 1.001);
    }
  }
  const auto& peak = worst.extremes.part[0]->peak;
  const FaultSolution own = saturated(alternating(3, saturating, 0.1, peak.closing));
  CHECK(own.extremes.part[0]->peak.magnitude == Approx(peak.magnitude).epsilon(2e-3));
  CHECK(*own.extremes.part[0]->peak.seconds == Approx(*peak.seconds).epsilon(0.02));
}

TEST_CASE("The worst force beside saturated steel is that of the currents of its instant") {
  const FaultCurrent fault = alternating(3, saturating, 0.1);
  for (std::size_t bar = 0; bar < 3; ++bar) {
    const FaultPeak& peak = saturated_worst().extremes.part[bar]->peak;
    const auto forces = steady_forces(fault_currents(fault, *peak.seconds, *peak.closing));
    CHECK(distance(forces.part[bar]->at(0.0), peak.value) < 1e-3 * peak.magnitude);
  }
}

TEST_CASE("The force of a given direct peak current is that of a steady solve with it") {
  const FaultCurrent fault{{0, 2}, DirectPeak{50e3, 80e3}};
  const FaultSolution solution = saturated(fault);
  const auto forces = steady_forces({80e3, 0.0, -80e3});
  for (std::size_t part = 0; part < 4; ++part) {
    const mesh::Point expected = forces.part[part]->at(0.0);
    const double size = norm(forces.part[0]->at(0.0));
    const FaultExtremes& found = *solution.extremes.part[part];
    CHECK(distance(found.peak.value, expected) < 1e-8 * size);
    CHECK(found.x_max.value == Approx(std::max(0.0, expected.x)).margin(1e-8 * size));
    CHECK(found.x_min.value == Approx(std::min(0.0, expected.x)).margin(1e-8 * size));
    CHECK(found.y_max.value == Approx(std::max(0.0, expected.y)).margin(1e-8 * size));
    CHECK(found.y_min.value == Approx(std::min(0.0, expected.y)).margin(1e-8 * size));
    CHECK_FALSE(found.peak.closing.has_value());
    // A bar without current has no force at any time.
    CHECK(found.peak.seconds.has_value() == (part == 1));
  }
  REQUIRE(solution.extremes.push.size() == forces.push.size());
  for (std::size_t face = 0; face < forces.push.size(); ++face) {
    CHECK(solution.extremes.push[face].x_max.value ==
          Approx(std::max(0.0, forces.push[face].x.mean)));
  }
  CHECK(solution.series.seconds.empty());
  CHECK(solution.newton.size() == 1);
}

TEST_CASE("Beside saturated steel forces no longer grow with the square of the currents") {
  const auto per_square = [](double current) {
    const FaultSolution solution = saturated({{0, 2}, DirectPeak{1e3, current}});
    return solution.extremes.part[3]->peak.magnitude / (current * current);
  };
  // As long as the plate is permeable it mirrors the currents, however permeable; then no more.
  const double permeable = per_square(5e3);
  CHECK(per_square(10e3) == Approx(permeable).epsilon(0.02));
  CHECK(per_square(80e3) < 0.8 * permeable);
  const double constant = largest_on_a_bar(saturated(alternating(3, 5e3, 0.1))) / (5e3 * 5e3);
  CHECK(largest_on_a_bar(saturated_worst()) / (saturating * saturating) < 0.99 * constant);
}

TEST_CASE("The first cycle beside steel begins with nothing and has a fault's currents") {
  const FaultCurrent given = alternating(3, saturating, 0.1, 0.9);
  const FaultSolution solutions[] = {saturated_worst(), saturated(given)};
  for (const FaultSolution& solution : solutions) {
    const FaultSeries& series = solution.series;
    REQUIRE(series.seconds.size() == 121);
    CHECK(series.seconds.front() == 0.0);
    CHECK(series.seconds.back() == Approx(1.0 / hertz));
    REQUIRE(series.current.size() == 3);
    for (std::size_t part = 0; part < 4; ++part) {
      CHECK(norm(series.force.part[part]->front()) < 1e-9 * largest_on_a_bar(solution));
    }
    for (std::size_t k = 0; k < series.seconds.size(); ++k) {
      const auto expected = fault_currents(given, series.seconds[k], *series.closing);
      for (std::size_t bar = 0; bar < 3; ++bar) {
        REQUIRE(series.current[bar][k] == Approx(expected[bar]).margin(1e-9 * saturating));
      }
    }
    // The course that was solved: both ends of the cycle, every instant with its own currents.
    REQUIRE(solution.course.has_value());
    REQUIRE(solution.course_seconds.size() == solution.course->size());
    CHECK(solution.course_seconds.front() == 0.0);
    CHECK(solution.course_seconds.back() == Approx(1.0 / hertz));
    for (std::size_t k = 0; k < solution.course->size(); ++k) {
      const auto expected = fault_currents(given, solution.course_seconds[k], *series.closing);
      for (std::size_t bar = 0; bar < 3; ++bar) {
        CHECK(solution.course->solution[k]->patterns[0].part_current[bar] ==
              Approx(expected[bar]).margin(1e-9 * saturating));
      }
    }
    CHECK(solution.course->solution.front()->potential.cwiseAbs().maxCoeff() == 0.0);
  }
  CHECK(*solutions[1].series.closing == 0.9);
}

TEST_CASE("The largest force on a bar in the first cycle is the extreme that is told") {
  // At its worst closing angle the series is that of the bar with the largest force.
  const FaultSolution& worst = saturated_worst();
  CHECK(largest_in_series(worst) == Approx(largest_on_a_bar(worst)).epsilon(5e-3));
  const FaultSolution given = saturated(alternating(2, saturating, 0.0, 0.9));
  CHECK(largest_in_series(given) == Approx(largest_on_a_bar(given)).epsilon(5e-3));
}

TEST_CASE("A direct current that rises beside saturable steel takes its force to the steady one") {
  const double time_constant = 0.03;
  const FaultCurrent fault{{0, 2}, DirectRise{60e3, time_constant}};
  const FaultSolution solution = saturated(fault);
  const auto forces = steady_forces({60e3, 0.0, -60e3});
  const double size = norm(forces.part[0]->at(0.0));
  CHECK(distance(solution.extremes.part[0]->peak.value, forces.part[0]->at(0.0)) < 1e-8 * size);
  CHECK_FALSE(solution.extremes.part[0]->peak.seconds.has_value());
  const FaultSeries& series = solution.series;
  CHECK_FALSE(series.closing.has_value());
  CHECK(series.seconds.back() == Approx(5.0 * time_constant));
  const auto& course = *series.force.part[0];
  CHECK(norm(course.front()) < 1e-9 * size);
  for (std::size_t k = 1; k < course.size(); ++k) {
    REQUIRE(norm(course[k]) >= norm(course[k - 1]) - 1e-6 * size);
  }
  CHECK(norm(course.back()) < size);
  CHECK(norm(course.back()) > 0.97 * size);  // the square of 0.993
}

}  // namespace barwall::solver
