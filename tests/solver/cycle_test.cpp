// Quantities over a cycle from their values at instants of its half.

#include "solver/cycle.hpp"

#include <catch2/catch.hpp>
#include <numbers>

#include "solver/field_peak.hpp"
#include "solver/local_interpolation.hpp"

namespace barwall::solver {
namespace {

constexpr double pi = std::numbers::pi;

std::vector<double> at_instants(int count, double (*f)(double)) {
  std::vector<double> values;
  for (int k = 0; k < count; ++k) values.push_back(f(pi * k / count));
  return values;
}

double even(double wt) {
  return 3.0 + 2.0 * std::cos(2 * wt) - std::sin(2 * wt) + 0.7 * std::cos(4 * wt) +
         0.4 * std::sin(8 * wt);
}

double odd(double wt) {
  return 2.0 * std::cos(wt) + 3.0 * std::sin(wt) - 0.5 * std::cos(3 * wt) + 0.25 * std::sin(7 * wt);
}

/// Largest of a function over half a cycle, by brute force.
template <class F>
double largest_of(F f) {
  double largest = -HUGE_VAL;
  for (int k = 0; k < 200000; ++k) largest = std::max(largest, f(pi * k / 200000.0));
  return largest;
}

}  // namespace

TEST_CASE("A pulsation through values at instants has the even harmonics that they have") {
  const Pulsation p = pulsation_through(at_instants(12, even));
  CHECK(p.mean == Approx(3.0));
  for (double wt : {0.05, 0.4, 1.0, 1.9, 2.6, 3.1}) CHECK(p.at(wt) == Approx(even(wt)));
}

TEST_CASE("A pulsation's extremes lie between the instants where its crests do") {
  const Pulsation p = pulsation_through(at_instants(12, even));
  CHECK(p.largest() == Approx(largest_of(even)).epsilon(1e-9));
  CHECK(p.smallest() == Approx(-largest_of([](double wt) { return -even(wt); })).epsilon(1e-9));
  CHECK(even(p.largest_at().wt) == Approx(p.largest()));
  double at_instants_alone = 0.0;
  for (double value : at_instants(12, even)) {
    at_instants_alone = std::max(at_instants_alone, value);
  }
  CHECK(at_instants_alone < p.largest() - 1e-3);
}

TEST_CASE("Pulsations with and without higher harmonics agree where there are none") {
  const Pulsation plain{1.0, 0.3, -0.8};
  Pulsation padded = plain;
  padded.higher = {{0.0, 0.0}, {0.0, 0.0}};
  CHECK(padded.largest() == Approx(plain.largest()));
  CHECK(padded.smallest() == Approx(plain.smallest()));
  CHECK(padded.largest_at().wt == Approx(plain.largest_at().wt));
  const Pulsation sum = sum_of(plain, padded, -1.0);
  CHECK(sum.at(0.7) == Approx(0.0).margin(1e-15));
}

TEST_CASE("The polynomial through six values is exact for fifth powers and sums to one") {
  for (double x : {0.0, 1.3, 2.5, 4.9}) {
    const auto factor = local_interpolation(x);
    double power = 0.0;
    double sum = 0.0;
    for (int i = 0; i < 6; ++i) {
      power += factor[static_cast<std::size_t>(i)] * std::pow(i, 5);
      sum += factor[static_cast<std::size_t>(i)];
    }
    CHECK(power == Approx(std::pow(x, 5)));
    CHECK(sum == Approx(1.0));
  }
}

TEST_CASE("A field that leaps as its current changes sign does not ring at its crest") {
  // Saturated steel: 1.9 T and a little of the current's own shape.
  const auto b = [](double wt) {
    return std::tanh(40.0 * std::cos(wt)) * 1.9 + 0.1 * std::cos(wt);
  };
  std::vector<mesh::Point> values;
  for (int k = 0; k < 24; ++k) values.push_back({b(pi * (k + 0.4) / 24), 0.0});
  CHECK(PeakFinder().peak(values) == Approx(2.0).epsilon(1e-5));
}

TEST_CASE("The fundamental is the r.m.s. phasor of what changes once a cycle") {
  const auto phasor = fundamental_through(at_instants(12, odd));
  // sqrt(2) (in-phase cos wt - quadrature sin wt) = 2 cos wt + 3 sin wt
  CHECK(phasor.real() == Approx(2.0 / std::numbers::sqrt2));
  CHECK(phasor.imag() == Approx(-3.0 / std::numbers::sqrt2));
}

TEST_CASE("The largest magnitude of a field is found between instants and past the half cycle") {
  const auto field = [](double wt) {
    return mesh::Point{odd(wt), 1.5 * std::cos(wt - 0.4) + 0.3 * std::cos(3 * wt)};
  };
  const double exact = largest_of([&](double wt) { return norm(field(wt)); });
  std::vector<mesh::Point> values;
  double at_instants_alone = 0.0;
  for (int k = 0; k < 24; ++k) {
    values.push_back(field(pi * k / 24));
    at_instants_alone = std::max(at_instants_alone, norm(values.back()));
  }
  CHECK(PeakFinder().peak(values) == Approx(exact).epsilon(1e-4));
  CHECK(at_instants_alone < 0.999 * exact);
}

}  // namespace barwall::solver
