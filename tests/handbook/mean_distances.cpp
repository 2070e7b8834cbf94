// Geometric mean distances. Maxwell's formula; F. W. Grover, Inductance Calculations, table 3,
// gives the own distances to five figures (from memory). The digits here were computed outside
// the code by two formulas and by random sampling.
#include <catch2/catch.hpp>
#include <cmath>

#include "verify/mean_distance.hpp"

using namespace barwall::verify;

namespace {

Approx digits(double value, double half_last_digit) {
  return Approx(value).epsilon(0.0).margin(1.02 * half_last_digit);
}

}  // namespace

TEST_CASE("a rectangle's mean distance from itself follows Maxwell's table") {
  const double rows[][3] = {{0, 0.2231301601, 0},
                            {0.01, 0.2232217001, 0.00041017},
                            {0.025, 0.2233279527, 0.00088605},
                            {0.05, 0.2234546936, 0.00145340},
                            {0.10, 0.2235990372, 0.00209916},
                            {0.125, 0.2236383020, 0.00227474},
                            {0.15, 0.2236636730, 0.00238818},
                            {0.20, 0.2236865869, 0.00249063},
                            {0.25, 0.2236869662, 0.00249232},
                            {0.30, 0.2236754491, 0.00244083},
                            {0.40, 0.2236387935, 0.00227694},
                            {0.50, 0.2236011440, 0.00210858},
                            {0.60, 0.2235704140, 0.00197114},
                            {0.70, 0.2235482973, 0.00187221},
                            {0.80, 0.2235341891, 0.00180909},
                            {1.00, 0.2235245780, 0.00176610}};
  for (const auto& [ratio, share, logarithm] : rows) {
    CAPTURE(ratio);
    const double own = own_distance_of_rectangle(1.0, ratio) / (1.0 + ratio);
    CHECK(own == digits(share, 5e-11));
    CHECK(std::log(own) + 1.5 == digits(logarithm, 5e-9));
    // CDA Publication 22, "Copper for Busbars", section 9: 0.2235 (a + b).
    CHECK(own == Approx(0.2235).epsilon(2e-3));
  }
  CHECK(own_distance_of_rectangle(1.0, 1.0) == digits(0.4470491559, 5e-11));
  CHECK(own_distance_of_rectangle(0.01, 0.1) == digits(24.59589409e-3, 5e-12));
}

TEST_CASE("round sections have the mean distances of the textbooks") {
  CHECK(own_distance_of_disc(1.0) == digits(0.7788007831, 5e-11));
  CHECK(own_distance_of_disc(1.0) == digits(0.7788, 5e-5));  // Mehta ch. 9, Stevenson ch. 3
  CHECK(own_distance_of_ellipse(1.0, 1.0) == own_distance_of_disc(1.0));
  const double rings[][2] = {{0.1, 0.78256020},  {0.25, 0.80025250}, {0.5, 0.85184586},
                             {0.75, 0.92062827}, {0.8, 0.93579866},  {0.9, 0.96725091},
                             {0.95, 0.98347571}};
  for (const auto& [ratio, distance] : rings) {
    CHECK(own_distance_of_ring(ratio, 1.0) == digits(distance, 5e-9));
  }
}

TEST_CASE("two equal bars face to face have the table's mean distances") {
  // Rows: centres over height; columns: thickness over height 0, 0.05, 0.1, 0.2, 0.5, 1; 0 = none.
  const double thickness[] = {0, 0.05, 0.1, 0.2, 0.5, 1};
  const double rows[][7] = {{0.1, 2.940884, 2.938047, 2.929407, 0, 0, 0},
                            {0.2, 1.846416, 1.845162, 1.841383, 1.825993, 0, 0},
                            {0.3, 1.495454, 1.494677, 1.492339, 1.482908, 0, 0},
                            {0.5, 1.234527, 1.234113, 1.232869, 1.227872, 1.191723, 0},
                            {0.75, 1.121233, 1.120994, 1.120278, 1.117402, 1.096836, 0},
                            {1, 1.073363, 1.073208, 1.072742, 1.070876, 1.057594, 1.006550},
                            {1.5, 1.034771, 1.034691, 1.034453, 1.033500, 1.026755, 1.001551},
                            {2, 1.020074, 1.020027, 1.019884, 1.019314, 1.015296, 1.000511},
                            {5, 1.003313, 1.003304, 1.003280, 1.003181, 1.002491, 1.000013}};
  for (const auto& row : rows) {
    for (int c = 0; c < 6; ++c) {
      if (row[c + 1] == 0.0) continue;
      CAPTURE(row[0], thickness[c]);
      const Sides bar{thickness[c], 1.0};
      CHECK(mutual_distance(bar, bar, row[0], 0.0) / row[0] == digits(row[c + 1], 5e-7));
    }
  }
}

TEST_CASE("two equal bars edge to edge have the table's mean distances") {
  const double thickness[] = {0, 0.1, 0.2, 0.5};
  const double rows[][5] = {{1, 0.8925206, 0.8952719, 0.9014965, 0.9323868},
                            {1.1, 0.9174322, 0.9187492, 0.9225007, 0.9447963},
                            {1.25, 0.9394507, 0.9402470, 0.9425970, 0.9578336},
                            {1.5, 0.9598325, 0.9603019, 0.9617013, 0.9711651},
                            {2, 0.9782592, 0.9784936, 0.9791951, 0.9840393},
                            {3, 0.9905711, 0.9906683, 0.9909597, 0.9929894},
                            {5, 0.9966453, 0.9966792, 0.9967808, 0.9974914}};
  for (const auto& row : rows) {
    for (int c = 0; c < 4; ++c) {
      CAPTURE(row[0], thickness[c]);
      const Sides bar{1.0, thickness[c]};
      CHECK(mutual_distance(bar, bar, row[0], 0.0) / row[0] == digits(row[c + 1], 5e-8));
    }
  }
  CHECK(std::exp(2.0 * std::log(2.0) - 1.5) == digits(0.8925206, 5e-8));
  // E. B. Rosa 1907 gives 1.00655 for two squares side by side (from memory).
  CHECK(mutual_distance({1, 1}, {1, 1}, 1.0, 0.0) == digits(1.00655, 5e-6));
}

TEST_CASE("pairs of busbars have the inductance of their mean distances") {
  struct Row {
    double width, height, distance, mutual_mm, own_mm, nanohenry;
  };
  const Row rows[] = {{0.01, 0.1, 0.02, 36.82765517, 24.59589409, 161.467816},
                      {0.01, 0.1, 0.05, 61.64346630, 24.59589409, 367.5150886},
                      {0.01, 0.1, 0.1, 107.2742172, 24.59589409, 589.1235247},
                      {0.01, 0.1, 0.2, 203.9768384, 24.59589409, 846.1707713},
                      {0.1, 0.01, 0.15, 144.0452880, 24.59589409, 707.0192913},
                      {0.01, 0.06, 0.05, 54.94461976, 15.65723278, 502.1571182},
                      {0.02, 0.02, 0.06, 60.00614797, 8.940983118, 761.5205886},
                      {0.01, 0.01, 0.02, 20.01021111, 4.470491559, 599.497731}};
  for (const Row& row : rows) {
    CAPTURE(row.width, row.height, row.distance);
    const Sides bar{row.width, row.height};
    CHECK(1e3 * mutual_distance(bar, bar, row.distance, 0.0) ==
          Approx(row.mutual_mm).epsilon(1e-9));
    CHECK(1e3 * own_distance_of_rectangle(row.width, row.height) ==
          Approx(row.own_mm).epsilon(1e-9));
    CHECK(1e9 * inductance_of_bar_pair(bar, row.distance, 0.0) ==
          Approx(row.nanohenry).epsilon(2e-9));
  }
}

TEST_CASE("three transposed flat bars have the inductance of their mean distances") {
  const Sides bar{0.01, 0.1};
  const double own = std::log(1e3 * own_distance_of_rectangle(0.01, 0.1));
  const double next = std::log(1e3 * mutual_distance(bar, bar, 0.1, 0.0));
  const double outer = std::log(1e3 * mutual_distance(bar, bar, 0.2, 0.0));
  CHECK(own == digits(3.2025795221, 5e-11));
  CHECK(next == digits(4.6753883338, 5e-11));
  CHECK(outer == digits(5.3180064504, 5e-11));
  CHECK(200.0 * ((2.0 * next + outer) / 3.0 - own) == Approx(337.4029701).epsilon(1e-9));
}
