#include "solver/fault_extremes.hpp"

#include <algorithm>
#include <catch2/catch.hpp>
#include <cmath>
#include <numbers>
#include <random>

#include "solver/largest_value.hpp"

using namespace barwall;
using namespace barwall::solver;

namespace {

constexpr double pi = std::numbers::pi;
constexpr double rms = 10e3;
constexpr double hertz = 50.0;
using std::numbers::sqrt2;

FaultCurrent fault_of(std::size_t bars, double r_over_x, std::optional<double> closing = {}) {
  FaultCurrent fault{{0, 1, 2}, AlternatingFault{hertz, rms, r_over_x, closing}};
  fault.bars.resize(bars);
  return fault;
}

/// The force on one of several filaments.
QuadraticForce on_filament(const std::vector<mesh::Point>& at, int bar) {
  const auto n = static_cast<Eigen::Index>(at.size());
  QuadraticForce force{Eigen::MatrixXd::Zero(n, n), Eigen::MatrixXd::Zero(n, n)};
  for (int k = 0; k < static_cast<int>(n); ++k) {
    if (k == bar) continue;
    const mesh::Point to = at[static_cast<std::size_t>(k)] - at[static_cast<std::size_t>(bar)];
    const mesh::Point f = (0.5 * 2e-7 / dot(to, to)) * to;
    force.x(bar, k) = force.x(k, bar) = f.x;
    force.y(bar, k) = force.y(k, bar) = f.y;
  }
  return force;
}

QuadraticForce random_force(Eigen::Index bars, std::mt19937& random) {
  std::uniform_real_distribution<double> any(-1e-6, 1e-6);
  QuadraticForce force{Eigen::MatrixXd(bars, bars), Eigen::MatrixXd(bars, bars)};
  for (Eigen::MatrixXd* f : {&force.x, &force.y}) {
    for (Eigen::Index j = 0; j < bars; ++j) {
      for (Eigen::Index k = 0; k <= j; ++k) (*f)(j, k) = (*f)(k, j) = any(random);
    }
  }
  return force;
}

mesh::Point force_at(const FaultCurrent& fault, const QuadraticForce& force, double t,
                     double closing) {
  const auto currents = fault_currents(fault, t, closing);
  const Eigen::Map<const Eigen::VectorXd> i(currents.data(),
                                            static_cast<Eigen::Index>(currents.size()));
  return {i.dot(force.x * i), i.dot(force.y * i)};
}

/// The extremes by trying out every time and closing angle of a list.
FaultExtremes tried_out(const FaultCurrent& fault, const QuadraticForce& force, double cycles,
                        int steps_per_cycle, const std::vector<double>& closings) {
  FaultExtremes found;
  for (const double closing : closings) {
    for (int k = 0; k <= cycles * steps_per_cycle; ++k) {
      const mesh::Point f = force_at(fault, force, k / (hertz * steps_per_cycle), closing);
      found.x_max.value = std::max(found.x_max.value, f.x);
      found.x_min.value = std::min(found.x_min.value, f.x);
      found.y_max.value = std::max(found.y_max.value, f.y);
      found.y_min.value = std::min(found.y_min.value, f.y);
      found.peak.magnitude = std::max(found.peak.magnitude, norm(f));
    }
  }
  return found;
}

std::vector<double> every_angle(int count) {
  std::vector<double> angles;
  for (int k = 0; k < count; ++k) angles.push_back(pi * k / count);
  return angles;
}

/// As large as anything tried out, and no larger than its steps leave room for.
void check_against(const FaultExtremes& exact, const FaultExtremes& tried, double room) {
  const double size = tried.peak.magnitude;
  const auto check = [&](double value, double found) {
    CHECK(value >= found - 1e-12 * size);
    CHECK(value <= found + room * size);
  };
  check(exact.x_max.value, tried.x_max.value);
  check(-exact.x_min.value, -tried.x_min.value);
  check(exact.y_max.value, tried.y_max.value);
  check(-exact.y_min.value, -tried.y_min.value);
  check(exact.peak.magnitude, tried.peak.magnitude);
}

/// The instants told are those at which the forces are what they are told to be.
void check_instants(const FaultCurrent& fault, const QuadraticForce& force,
                    const FaultExtremes& extremes) {
  const double size = extremes.peak.magnitude;
  const auto then = [&](const auto& extreme) {
    return force_at(fault, force, extreme.seconds.value(), extreme.closing.value_or(0.7));
  };
  CHECK(then(extremes.x_max).x == Approx(extremes.x_max.value).margin(1e-11 * size));
  CHECK(then(extremes.x_min).x == Approx(extremes.x_min.value).margin(1e-11 * size));
  CHECK(then(extremes.y_max).y == Approx(extremes.y_max.value).margin(1e-11 * size));
  CHECK(then(extremes.y_min).y == Approx(extremes.y_min.value).margin(1e-11 * size));
  const mesh::Point peak = then(extremes.peak);
  CHECK(distance(peak, extremes.peak.value) < 1e-7 * size);
  CHECK(norm(extremes.peak.value) == Approx(extremes.peak.magnitude).epsilon(1e-14));
}

const std::vector<mesh::Point> in_line{{-0.1, 0.0}, {0.0, 0.0}, {0.1, 0.0}};

}  // namespace

TEST_CASE("three conductors in line have the factors sqrt(3)/2 and (3 + 2 sqrt(3))/8") {
  // IEC 60865-1 (from memory); the fully offset undamped fault has the factors of steady
  // alternating current, with the peak 2 sqrt(2) I.
  const FaultCurrent fault = fault_of(3, 0.0);
  const double unit = 2e-7 * std::pow(2.0 * sqrt2 * rms, 2) / 0.1;
  const FaultExtremes centre = extremes_of(fault, on_filament(in_line, 1));
  CHECK(centre.x_max.value == Approx(0.5 * std::sqrt(3.0) * unit).epsilon(1e-12));
  CHECK(centre.x_min.value == Approx(-0.5 * std::sqrt(3.0) * unit).epsilon(1e-12));
  CHECK(centre.y_max.value == 0.0);
  CHECK(centre.y_min.value == 0.0);
  CHECK(centre.peak.magnitude == Approx(centre.x_max.value).epsilon(1e-12));
  CHECK(centre.peak.seconds.value() == Approx(0.01));
  const FaultExtremes outer = extremes_of(fault, on_filament(in_line, 0));
  CHECK(outer.x_min.value == Approx(-(3.0 + 2.0 * std::sqrt(3.0)) / 8.0 * unit).epsilon(1e-12));
  CHECK(outer.x_max.value == Approx(0.058013 * unit).epsilon(1e-5));  // recomputed digits
  CHECK(outer.peak.magnitude == Approx(-outer.x_min.value).epsilon(1e-12));
  CHECK(std::atan2(outer.peak.value.y, outer.peak.value.x) == Approx(pi));
}

TEST_CASE("each conductor of a trefoil has the factor sqrt(3)/2") {
  const double h = 0.1 * std::sqrt(3.0);
  const std::vector<mesh::Point> trefoil{{0.0, 2.0 * h / 3.0}, {-0.1, -h / 3.0}, {0.1, -h / 3.0}};
  const FaultCurrent fault = fault_of(3, 0.0);
  const double unit = 2e-7 * std::pow(2.0 * sqrt2 * rms, 2) / 0.2;
  for (int bar = 0; bar < 3; ++bar) {
    const FaultExtremes extremes = extremes_of(fault, on_filament(trefoil, bar));
    CHECK(extremes.peak.magnitude == Approx(0.5 * std::sqrt(3.0) * unit).epsilon(1e-12));
    check_instants(fault, on_filament(trefoil, bar), extremes);
  }
}

TEST_CASE("two conductors push apart with the square of the crest and are never drawn together") {
  for (const double r_over_x : {0.0, 0.1, 0.7}) {
    const FaultCurrent fault = fault_of(2, r_over_x);
    const FaultExtremes extremes = extremes_of(fault, on_filament({{0, 0}, {0, 0.2}}, 0));
    const double crest = crest_of(fault).current;
    CHECK(extremes.y_min.value == Approx(-2e-7 * crest * crest / 0.2).epsilon(1e-12));
    CHECK(extremes.y_min.closing.value() == Approx(crest_of(fault).closing.value()));
    CHECK(extremes.y_max.value == 0.0);
    CHECK(extremes.y_max.seconds.value() == 0.0);
    CHECK(extremes.x_max.value == 0.0);
    CHECK(extremes.x_min.value == 0.0);
  }
}

TEST_CASE("with the worst closing angle no time and no angle gives more") {
  std::mt19937 random(7);
  for (const double r_over_x : {0.0, 0.05, 0.249, 1.0, 8.0}) {
    for (const int bars : {2, 3}) {
      CAPTURE(r_over_x, bars);
      const FaultCurrent fault = fault_of(static_cast<std::size_t>(bars), r_over_x);
      const QuadraticForce force = random_force(bars, random);
      const FaultExtremes exact = extremes_of(fault, force);
      check_against(exact, tried_out(fault, force, 2.0, 500, every_angle(180)), 1e-3);
      check_instants(fault, force, exact);
    }
  }
}

TEST_CASE("with a given closing angle no time gives more") {
  std::mt19937 random(11);
  for (const double r_over_x : {0.0, 0.05, 0.249, 1.0, 8.0}) {
    for (const double closing : {-3.0, 0.0, 0.6, 1.5}) {
      for (const int bars : {2, 3}) {
        CAPTURE(r_over_x, closing, bars);
        const FaultCurrent fault = fault_of(static_cast<std::size_t>(bars), r_over_x, closing);
        const QuadraticForce force = random_force(bars, random);
        const FaultExtremes exact = extremes_of(fault, force);
        check_against(exact, tried_out(fault, force, 60.0, 1000, {closing}), 1e-4);
        CHECK(exact.x_max.closing.value() == closing);
        const FaultExtremes worst =
            extremes_of(fault_of(static_cast<std::size_t>(bars), r_over_x), force);
        CHECK(worst.peak.magnitude >= exact.peak.magnitude * (1.0 - 1e-12));
        CHECK(worst.x_max.value >= exact.x_max.value * (1.0 - 1e-12));
        CHECK(worst.y_min.value <= exact.y_min.value * (1.0 - 1e-12));
      }
    }
  }
}

TEST_CASE("a force that the offset holds back is found after ten cycles") {
  std::mt19937 random(3);
  int late = 0;
  for (int k = 0; k < 30; ++k) {
    const double closing = 0.1 * k;
    const FaultCurrent fault = fault_of(3, 0.01, closing);
    const QuadraticForce force = random_force(3, random);
    const FaultExtremes exact = extremes_of(fault, force);
    CAPTURE(k);
    check_instants(fault, force, exact);
    check_against(exact, tried_out(fault, force, 80.0, 200, {closing}), 2e-3);
    if (*exact.x_max.seconds > 10.0 / hertz) ++late;
  }
  CHECK(late > 0);
}

TEST_CASE(
    "a force that is only approached as the offset decays is that of the sustained currents") {
  // i_1^2 - (i_2 - i_3)^2 with the offset in i_2 and i_3 alone: whenever i_1 is at its crest the
  // offset still takes something away.
  const double r_over_x = 0.2;
  QuadraticForce force{Eigen::MatrixXd::Zero(3, 3), Eigen::MatrixXd::Zero(3, 3)};
  force.x << 1e-6, 0, 0, 0, -1e-6, 1e-6, 0, 1e-6, -1e-6;
  const FaultCurrent fault = fault_of(3, r_over_x, pi - std::atan(r_over_x));
  REQUIRE(fault_currents(fault, 7.0 / hertz, pi - std::atan(r_over_x))[0] ==
          Approx(0.0).margin(1e-6 * rms));
  const FaultExtremes extremes = extremes_of(fault, force);
  CHECK(extremes.x_max.value == Approx(1e-6 * 2.0 * rms * rms).epsilon(1e-14));
  CHECK_FALSE(extremes.x_max.seconds.has_value());
  CHECK(extremes.x_min.seconds.has_value());
  CHECK(tried_out(fault, force, 9.0, 400, {pi - std::atan(r_over_x)}).x_max.value <
        extremes.x_max.value);
}

TEST_CASE("direct fault currents push with the square of what they reach") {
  const QuadraticForce force = on_filament({{0, 0}, {0.05, 0}}, 0);
  const auto of = [&](const FaultCurrent& fault) { return extremes_of(fault, force); };
  const FaultExtremes rise = of({{0, 1}, DirectRise{20e3, 0.03}});
  CHECK(rise.x_min.value == Approx(-2e-7 * 4e8 / 0.05));
  CHECK_FALSE(rise.x_min.seconds.has_value());
  CHECK_FALSE(rise.x_min.closing.has_value());
  CHECK(rise.x_max.value == 0.0);
  CHECK(rise.x_max.seconds.value() == 0.0);
  CHECK(rise.peak.value.x == Approx(rise.x_min.value));
  const FaultExtremes peak = of({{0, 1}, DirectPeak{20e3, 30e3}});
  CHECK(peak.x_min.value == Approx(2.25 * rise.x_min.value));
  CHECK(peak.peak.magnitude == Approx(-peak.x_min.value));
}

TEST_CASE("without a force nothing is found") {
  for (const std::optional<double> closing : {std::optional<double>(), std::optional(0.2)}) {
    const FaultExtremes none = extremes_of(fault_of(3, 0.1, closing), PulsatingVector{});
    CHECK(none.peak.magnitude == 0.0);
    CHECK(none.x_max.value == 0.0);
    CHECK(none.y_min.value == 0.0);
  }
}

TEST_CASE("the largest value is found inside, at the ends and among equals") {
  const auto wave = [](double x) { return std::sin(x) + 0.2 * std::sin(7.0 * x); };
  const LargestValue inside = largest_value(wave, 0.0, 6.0, 60);
  double tried = 0.0;
  for (int k = 0; k <= 600000; ++k) tried = std::max(tried, wave(1e-5 * k));
  CHECK(inside.value >= tried);
  CHECK(inside.value == Approx(tried).epsilon(1e-9));
  CHECK(largest_value([](double x) { return x; }, -1.0, 3.0, 7).at == 3.0);
  CHECK(largest_value([](double x) { return -x; }, -1.0, 3.0, 7).at == -1.0);
  CHECK(largest_value([](double) { return 4.0; }, 2.0, 3.0, 7).at == 2.0);
  // Two crests that a scan alone would mix up: the second is larger by less than a step hides.
  const auto twins = [](double x) {
    return std::exp(-std::pow(x - 1.0, 2)) + (1.0 + 1e-6) * std::exp(-std::pow(x - 7.05, 2));
  };
  CHECK(largest_value(twins, 0.0, 10.0, 100).at == Approx(7.05).epsilon(1e-6));
}
