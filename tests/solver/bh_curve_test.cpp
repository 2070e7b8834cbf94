#include "solver/bh_curve.hpp"

#include <array>
#include <catch2/catch.hpp>
#include <cmath>
#include <limits>
#include <random>

#include "solver/constants.hpp"
#include "solver/material.hpp"
#include "tests/support/bh_tables.hpp"

using namespace barwall;
using solver::BhCurve;
using solver::BhPoint;
using solver::make_bh_curve;
using solver::mu_0;
using solver::nu_0;

namespace {

Approx near(double value, double relative) {
  return Approx(value).epsilon(relative).margin(0.0);
}

/// A table with steps of B and secants over many orders of magnitude, in no order.
std::vector<BhPoint> random_rows(std::mt19937& random) {
  std::uniform_real_distribution<double> exponent(-4.0, 0.0);
  std::uniform_real_distribution<double> permeability(0.0, 5.0);
  std::vector<BhPoint> rows = {{0.0, 0.0}};
  const int count = 3 + static_cast<int>(random() % 40);
  for (int k = 0; k < count; ++k) {
    const double step = std::pow(10.0, exponent(random));
    rows.push_back({rows.back().field + step * nu_0 / std::pow(10.0, permeability(random)),
                    rows.back().flux_density + step});
  }
  return rows;
}

/// Published tables, and random ones.
std::vector<BhCurve> many_curves() {
  std::vector<BhCurve> curves;
  curves.push_back(make_bh_curve(support::cast_iron()));
  curves.push_back(make_bh_curve(support::workshop_steel()));
  std::mt19937 random(7);
  for (int k = 0; k < 200; ++k) curves.push_back(make_bh_curve(random_rows(random)));
  return curves;
}

/// Secant dH/dB of the interval from row k.
double secant(const BhCurve& curve, std::size_t k) {
  const BhPoint& a = curve.points()[k];
  const BhPoint& b = curve.points()[k + 1];
  return (b.field - a.field) / (b.flux_density - a.flux_density);
}

/// Integral over [from, to] by Gauss's rule of three points, exact up to the fifth degree.
template <class Function>
double integral(double from, double to, Function f) {
  const double half = 0.5 * (to - from);
  const double middle = 0.5 * (to + from);
  const double off = half * std::sqrt(0.6);
  return half / 9.0 * (5.0 * f(middle - off) + 8.0 * f(middle) + 5.0 * f(middle + off));
}

/// What make_bh_curve says of rows, or "none"; the row and column at fault before it.
std::string fault_of(const std::vector<BhPoint>& rows) {
  try {
    make_bh_curve(rows);
  } catch (const solver::BhTableError& error) {
    const bool field = error.column == solver::BhTableError::Column::field;
    return std::to_string(error.row) + (field ? "H: " : "B: ") + error.what();
  }
  return "none";
}

}  // namespace

TEST_CASE("a curve passes through the rows of its table") {
  for (const BhCurve& curve : many_curves()) {
    for (const BhPoint& row : curve.points()) {
      CHECK(curve.field(row.flux_density) == near(row.field, 1e-14));
    }
    CHECK(curve.field(0.0) == 0.0);
    CHECK(curve.table_end() == curve.points().back().flux_density);
  }
}

TEST_CASE("the published table of cast iron gives its rows and its largest permeability") {
  const BhCurve iron = make_bh_curve(support::cast_iron());
  // Rows in A/m and T to the digits of oersted and gauss, worked out by hand.
  CHECK(iron.field(0.3350) == near(569.8, 1e-4));
  CHECK(iron.field(0.9600) == near(7082, 1e-4));
  CHECK(iron.field(1.0985) == near(12154, 1e-4));
  CHECK(1.0 / iron.reluctivity(0.3350) / mu_0 == near(support::cast_iron_permeability, 2e-3));
  // H / B falls and rises again: the largest permeability is at that row or close to it.
  double largest = 0.0;
  for (int k = 1; k < 2000; ++k) {
    largest = std::fmax(largest, 1.0 / iron.reluctivity(1.1 * k / 2000) / mu_0);
  }
  CHECK(largest == near(support::cast_iron_permeability, 5e-3));
}

TEST_CASE("dH/dB is positive everywhere, and H rises from sample to sample") {
  for (const BhCurve& curve : many_curves()) {
    double last = 0.0;
    for (std::size_t k = 0; k + 1 < curve.points().size(); ++k) {
      const double from = curve.points()[k].flux_density;
      const double to = curve.points()[k + 1].flux_density;
      for (int i = 0; i < 64; ++i) {
        const auto state = curve.at(from + (to - from) * i / 64);
        REQUIRE(state.slope > 0.0);
        if (k + i > 0) REQUIRE(state.field > last);
        last = state.field;
      }
    }
  }
}

TEST_CASE("dH/dB exceeds vacuum's by half at most, and not at inner rows") {
  // A steep interval between two flat ones, and one that begins as slowly as vacuum.
  const double mu = 1000.0 * mu_0;
  const BhCurve spike = make_bh_curve({{0, 0},
                                       {100, 100 * mu},
                                       {50100, 100 * mu + 50000 * mu_0},
                                       {50200, 200 * mu + 50000 * mu_0}});
  CHECK(spike.slope(100 * mu + 25000 * mu_0) > 1.4 * nu_0);
  std::vector<BhCurve> curves = many_curves();
  curves.push_back(spike);
  curves.push_back(make_bh_curve({{0, 0}, {1e5, 1e5 * mu_0}, {1.001e5, 0.3}, {1.1e5, 0.4}}));
  for (const BhCurve& curve : curves) {
    for (int i = 0; i <= 5000; ++i) {
      REQUIRE(curve.slope(curve.table_end() * i / 5000) <= 1.5 * nu_0);
    }
    for (std::size_t k = 1; k < curve.points().size(); ++k) {
      REQUIRE(curve.slope(curve.points()[k].flux_density) <= nu_0 * (1.0 + 1e-12));
    }
  }
}

TEST_CASE("H and dH/dB are continuous at every row, H alone at the end of the table") {
  for (const BhCurve& curve : many_curves()) {
    const auto& rows = curve.points();
    for (std::size_t k = 1; k < rows.size(); ++k) {
      const double b = rows[k].flux_density;
      const auto below = curve.at(std::nextafter(b, 0.0));
      const auto above = curve.at(b);
      CHECK(below.field == near(above.field, 1e-12));
      CHECK(below.energy == near(above.energy, 1e-12));
      if (k + 1 == rows.size()) continue;
      // The last digit of b changes dH/dB a little where a steep interval is narrow.
      const double steepest = std::fmax(secant(curve, k - 1), secant(curve, k));
      const double narrowest =
          std::fmin(b - rows[k - 1].flux_density, rows[k + 1].flux_density - b);
      const double last_digit = b - std::nextafter(b, 0.0);
      CHECK(std::abs(below.slope - above.slope) <
            (1e-14 + 10.0 * last_digit / narrowest) * steepest);
    }
  }
  // The kink is real: this table ends long before saturation.
  const BhCurve iron = make_bh_curve(support::cast_iron());
  CHECK(iron.slope(std::nextafter(iron.table_end(), 0.0)) < 0.5 * nu_0);
  CHECK(iron.slope(iron.table_end()) == nu_0);
}

TEST_CASE("dH/dB is the difference quotient of H") {
  for (const BhCurve& curve : many_curves()) {
    const auto& rows = curve.points();
    for (std::size_t k = 0; k + 1 < rows.size(); ++k) {
      const double width = rows[k + 1].flux_density - rows[k].flux_density;
      const double b = rows[k].flux_density + 0.37 * width;
      const double step = 1e-3 * width;
      // Fourth order in the step, hence exact for a cubic but for rounding.
      const double quotient = (8.0 * (curve.field(b + step) - curve.field(b - step)) -
                               (curve.field(b + 2 * step) - curve.field(b - 2 * step))) /
                              (12.0 * step);
      const double rounding = 4e-15 * (rows[k + 1].field + secant(curve, k) * b) / step;
      CHECK(std::abs(quotient - curve.slope(b)) < 1e-9 * secant(curve, k) + rounding);
    }
  }
}

TEST_CASE("energy and coenergy are the integrals of H dB and B dH") {
  for (const BhCurve& curve : many_curves()) {
    const auto& rows = curve.points();
    double energy = 0.0;
    double coenergy = 0.0;
    const auto advance = [&](double from, double to) {
      energy += integral(from, to, [&](double b) { return curve.field(b); });
      coenergy += integral(from, to, [&](double b) { return b * curve.slope(b); });
      CHECK(curve.energy(to) == near(energy, 1e-12));
      CHECK(curve.coenergy(to) == near(coenergy, 1e-11));
    };
    for (std::size_t k = 0; k + 1 < rows.size(); ++k) {
      const double from = rows[k].flux_density;
      const double to = rows[k + 1].flux_density;
      const double between = 0.3 * from + 0.7 * to;
      advance(from, between);
      advance(between, to);
    }
    advance(curve.table_end(), curve.table_end() + 0.5);
    CHECK(curve.energy(0.0) == 0.0);
    CHECK(curve.coenergy(0.0) == 0.0);
  }
}

TEST_CASE("rows on a straight line give H = nu B, between them and at B = 0") {
  const double nu = nu_0 / 800.0;
  std::vector<BhPoint> rows;
  for (double b : {0.0, 0.01, 0.02, 0.3, 0.37, 1.1, 1.9}) rows.push_back({nu * b, b});
  const BhCurve line = make_bh_curve(rows);
  for (int i = 0; i <= 1000; ++i) {
    const double b = std::fmin(1.9 * i / 1000, std::nextafter(1.9, 0.0));
    const auto state = line.at(b);
    CHECK(state.field == Approx(nu * b).epsilon(1e-14).margin(0.0));
    CHECK(state.slope == near(nu, 2e-14));
    CHECK(state.energy == Approx(0.5 * nu * b * b).epsilon(1e-14).margin(0.0));
    CHECK(line.reluctivity(b) == near(nu, 1e-14));
    CHECK(std::abs(line.reluctivity_slope(b)) * b * b < 1e-13 * nu);
  }
}

TEST_CASE("vacuum itself is a curve, and continues as vacuum") {
  const BhCurve vacuum =
      make_bh_curve({{0, 0}, {1e4, 1e4 * mu_0}, {3e4, 3e4 * mu_0}, {1e5, 1e5 * mu_0}});
  for (double b : {0.0, 0.005, 0.02, 0.1, 0.2, 5.0}) {
    CHECK(vacuum.at(b).slope == near(nu_0, 1e-13));
    CHECK(vacuum.reluctivity(b) == near(nu_0, 1e-13));
  }
}

TEST_CASE("reluctivity has its limit at B = 0, and a finite slope in B^2") {
  for (const BhCurve& curve : many_curves()) {
    CHECK(curve.reluctivity(0.0) == curve.slope(0.0));
    CHECK(curve.reluctivity(1e-200) == curve.slope(0.0));
    CHECK(curve.differential_permeability(0.0) == near(1.0 / curve.slope(0.0), 1e-15));
    const double first = curve.points()[1].flux_density;
    CHECK(std::isfinite(curve.reluctivity_slope(0.0)));
    for (double share : {1e-3, 0.1, 0.9, 1.5, 40.0}) {
      const double b = share * first;
      const auto state = curve.at(b);
      CHECK(curve.reluctivity(b) == near(state.field / b, 1e-13));
      const double expected = 0.5 * (state.slope - state.field / b) / (b * b);
      // Where slope and reluctivity differ by little their difference is all rounding.
      const double rounding = 1e-15 * (state.slope + state.field / b) / (b * b);
      CHECK(curve.reluctivity_slope(b) == Approx(expected).epsilon(1e-12).margin(rounding));
    }
    // H / B is a function of B^2 that is smooth at 0: nu - nu(0) falls with the square of B.
    const double rise = curve.reluctivity(0.5 * first) - curve.reluctivity(0.0);
    CHECK(curve.reluctivity_slope(0.0) * 0.25 * first * first == Approx(rise).margin(1e-9));
  }
}

TEST_CASE("the slopes at both ends are at least half the neighbouring secant") {
  for (const BhCurve& curve : many_curves()) {
    const std::size_t last = curve.points().size() - 2;
    CHECK(curve.slope(0.0) >= 0.5 * secant(curve, 0) * (1.0 - 1e-14));
    const double end = curve.slope(std::nextafter(curve.table_end(), 0.0));
    CHECK(end >= 0.5 * secant(curve, last) * (1.0 - 1e-9));
  }
  // Both bounds are met: H rises much faster after the first interval, much slower in the last.
  const BhCurve curve = make_bh_curve({{0, 0}, {10, 0.1}, {2000, 0.11}, {2010, 0.21}});
  CHECK(curve.slope(0.0) == near(50.0, 1e-12));
  CHECK(curve.slope(std::nextafter(0.21, 0.0)) == near(50.0, 1e-9));
}

TEST_CASE("beyond the table H rises with the reluctivity of vacuum") {
  for (const BhCurve& curve : many_curves()) {
    const double end = curve.table_end();
    const double h = curve.points().back().field;
    for (double more : {1e-6, 0.3, 20.0}) {
      const double b = end + more;
      CHECK(curve.slope(b) == nu_0);
      CHECK(curve.differential_permeability(b) == near(mu_0, 1e-15));
      CHECK(curve.field(b) == near(h + (b - end) * nu_0, 1e-14));
      CHECK(curve.reluctivity(b) == near(curve.field(b) / b, 1e-15));
    }
  }
}

TEST_CASE("an analytic curve sampled finely is met with third order or better") {
  const support::BrauerSteel steel;
  const auto errors = [&](int steps) {
    const BhCurve curve = make_bh_curve(steel.rows(steps, 2.0));
    std::array<double, 4> worst{};
    for (int i = 0; i < 20000; ++i) {
      const double b = 2.0 * (i + 0.5) / 20000;
      const auto state = curve.at(b);
      worst[0] = std::fmax(worst[0], std::abs(state.field / steel.field(b) - 1.0));
      worst[1] = std::fmax(worst[1], std::abs(state.slope / steel.slope(b) - 1.0));
      worst[2] = std::fmax(worst[2], std::abs(state.energy / steel.energy(b) - 1.0));
      worst[3] = std::fmax(worst[3], std::abs(curve.reluctivity(b) / steel.reluctivity(b) - 1.0));
    }
    return worst;
  };
  const auto coarse = errors(100);
  const auto fine = errors(400);
  CHECK(coarse[0] < 3e-4);
  CHECK(fine[0] < 5e-6);
  CHECK(fine[1] < 2e-3);
  CHECK(fine[2] < 3e-6);
  CHECK(fine[3] < 5e-6);
  CHECK(coarse[0] / fine[0] > 50.0);  // 4^3 = 64
}

TEST_CASE("every look-up finds the interval that a plain search finds") {
  std::mt19937 random(11);
  for (int n = 0; n < 50; ++n) {
    const BhCurve curve = make_bh_curve(random_rows(random));
    const auto& rows = curve.points();
    std::uniform_real_distribution<double> place(0.0, 1.2 * curve.table_end());
    for (int i = 0; i < 2000; ++i) {
      const double b = place(random);
      std::size_t k = 0;
      while (k + 1 < rows.size() && rows[k + 1].flux_density <= b) ++k;
      const double h = curve.field(b);
      CHECK(h >= rows[k].field);
      if (k + 1 < rows.size()) CHECK(h <= rows[k + 1].field * (1.0 + 1e-15));
    }
  }
}

TEST_CASE("a flux density that is no number gives no number and no other harm") {
  const BhCurve curve = make_bh_curve(support::cast_iron());
  const double nan = std::numeric_limits<double>::quiet_NaN();
  CHECK(std::isnan(curve.at(nan).field));
  CHECK(std::isnan(curve.at(nan).energy));
  CHECK(std::isnan(curve.reluctivity(nan)));
}

TEST_CASE("a row that does not fit is named with its values and what is allowed") {
  const double inf = std::numeric_limits<double>::infinity();
  const std::vector<BhPoint> good = {{0, 0}, {100, 0.2}, {200, 0.4}, {1000, 1.2}, {5000, 1.5}};
  REQUIRE(fault_of(good) == "none");
  struct Fault {
    std::size_t row;
    BhPoint point;
    std::string said;
  };
  const std::vector<Fault> faults = {
      {0, {1, 0}, "0H: row 1 is 1 A/m, 0 T; the first row must be 0, 0"},
      {0, {0, 0.1}, "0B: row 1 is 0 A/m, 0.1 T; the first row must be 0, 0"},
      {2, {inf, 0.4}, "2H: row 3 is inf A/m, 0.4 T; H must be a finite number"},
      {2, {200, -std::nan("")}, "2B: row 3"},
      {2,
       {100, 0.4},
       "2H: rows 2 and 3 are 100 A/m, 0.2 T and 100 A/m, 0.4 T; H must rise from row to row"},
      {2, {-200, 0.4}, "2H: rows 2 and 3"},
      {2,
       {200, 0.2},
       "2B: rows 2 and 3 are 100 A/m, 0.2 T and 200 A/m, 0.2 T; B must rise by at least 1e-09 T"},
      {2, {200, 0.2 + 1e-10}, "2B: rows 2 and 3"},
      {3,
       {1000, 0.401},
       "3B: rows 3 and 4 are 200 A/m, 0.4 T and 1000 A/m, 0.401 T; B rises by 0.001 T, more slowly "
       "than in vacuum; it must rise by at least 0.00100531 T, mu_0 times the rise of H"},
      {2, {100 + 1e-12, 0.4}, "2B: rows 2 and 3"},
      {4, {5000, 1001}, "4B: row 5 is 5000 A/m, 1001 T; B must be at most 1000 T"}};
  for (const Fault& fault : faults) {
    auto rows = good;
    rows[fault.row] = fault.point;
    CHECK_THAT(fault_of(rows), Catch::StartsWith(fault.said));
  }
  CHECK(fault_of({}) == "0H: 0 rows; a B-H table has at least 4");
  CHECK(fault_of({{0, 0}, {100, 0.2}, {200, 0.4}}) == "3H: 3 rows; a B-H table has at least 4");
}

TEST_CASE("a material with a curve is magnetic, saturable, and has its initial permeability") {
  const auto curve = std::make_shared<const BhCurve>(make_bh_curve(support::workshop_steel()));
  const solver::Material steel = solver::saturable_material("plate", curve);
  CHECK(steel.saturable());
  CHECK(steel.magnetic());
  CHECK(steel.relative_permeability == near(nu_0 / curve->slope(0.0), 1e-14));
  // The first rows: 16 A/m at 2.5 mT is a permeability of 124.
  CHECK(steel.relative_permeability == near(124.0, 0.1));
  const solver::Material constant{"plate", 600.0};
  CHECK_FALSE(constant.saturable());
  CHECK(constant.magnetic());
  CHECK_FALSE(solver::Material{}.magnetic());
}
