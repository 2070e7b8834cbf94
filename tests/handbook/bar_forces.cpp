// Forces between bars: the factor of H. B. Dwight, Electrical World 70, 1917, and k12 of
// IEC 60865-1 (from memory); digits computed outside the code and checked by quadrature of J x B.
#include <catch2/catch.hpp>
#include <cmath>
#include <numbers>

#include "verify/bar_force.hpp"
#include "verify/complex_field.hpp"
#include "verify/filled_bar.hpp"

using namespace barwall::mesh;
using namespace barwall::verify;

namespace {

Approx digits(double value, double half_last_digit) {
  return Approx(value).epsilon(0.0).margin(1.02 * half_last_digit);
}

}  // namespace

TEST_CASE("the bar force factor follows the table over gap and slenderness") {
  const double gaps[] = {.05, .1, .2, .3, .4, .5, .6, .8, 1, 1.5, 2};
  const double unlimited = 1e9;  // thickness over height: strips in one plane
  const double rows[][12] = {
      {0, .1371, .2481, .4190, .5431, .6353, .7048, .7580, .8315, .8776, .9366, .9620},
      {0.05, .2535, .3495, .4984, .6064, .6862, .7463, .7920, .8550, .8945, .9450, .9668},
      {0.1, .3508, .4349, .5653, .6596, .7290, .7810, .8205, .8747, .9087, .9521, .9709},
      {0.25, .5662, .6241, .7133, .7769, .8230, .8572, .8829, .9180, .9399, .9679, .9803},
      {0.5, .7801, .8113, .8583, .8908, .9139, .9307, .9432, .9601, .9705, .9840, .9900},
      {1, .9838, .9875, .9925, .9954, .9970, .9980, .9986, .9993, .9996, .9999, .9999},
      {2, 1.1306, 1.1117, 1.0845, 1.0663, 1.0534, 1.0440, 1.0369, 1.0271, 1.0208, 1.0121, 1.0079},
      {4, 1.2145, 1.1797, 1.1331, 1.1037, 1.0835, 1.0690, 1.0581, 1.0431, 1.0333, 1.0198, 1.0131},
      {10, 1.2616, 1.2154, 1.1583, 1.1236, 1.1002, 1.0833, 1.0705, 1.0528, 1.0412, 1.0249, 1.0168},
      {unlimited, 1.2803, 1.2299, 1.1702, 1.1341, 1.1095, 1.0916, 1.0781, 1.0591, 1.0465, 1.0285,
       1.0194}};
  for (const auto& row : rows) {
    const double across = row[0] == unlimited ? 0.0 : 1.0;
    const double along = row[0] == unlimited ? 1.0 : row[0];
    for (int c = 0; c < 11; ++c) {
      CAPTURE(row[0], gaps[c]);
      const double distance = along + gaps[c] * (along + across);
      CHECK(bar_force_factor(along, across, distance) == digits(row[c + 1], 5e-5));
    }
  }
}

TEST_CASE("the bar force factor follows the table of k12 over distance and height") {
  const double heights[] = {1, 2, 4, 6, 8, 10, 12, 16, 20};
  const double rows[][10] = {{2, .9980, .8994, .7133, .5811, .4883, .4207, .3694, .2970, .2485},
                             {3, .9996, .9498, .8230, .7085, .6170, .5447, .4869, .4013, .3411},
                             {4, .9999, .9705, .8829, .7898, .7069, .6367, .5779, .4864, .4194},
                             {6, 1.0000, .9865, .9399, .8800, .8179, .7592, .7057, .6152, .5435},
                             {8, 1.0000, .9923, .9641, .9243, .8790, .8325, .7873, .7053, .6356},
                             {10, 1.0000, .9950, .9763, .9485, .9149, .8785, .8413, .7697, .7051},
                             {15, 1.0000, .9978, .9892, .9755, .9579, .9371, .9143, .8657, .8165},
                             {20, 1.0000, .9988, .9938, .9859, .9753, .9623, .9476, .9141, .8779}};
  for (const auto& row : rows) {
    for (int c = 0; c < 9; ++c) {
      CAPTURE(row[0], heights[c]);
      CHECK(bar_force_factor(1.0, heights[c], row[0]) == digits(row[c + 1], 5e-5));
    }
  }
}

TEST_CASE("thin strips have the elementary limits of the bar force factor") {
  for (const double s : {0.02, 0.1, 1.0}) {
    const double ratio = s / 0.1;
    const double facing =
        ratio * (2.0 * std::atan(1.0 / ratio) - ratio * std::log1p(1.0 / (ratio * ratio)));
    CHECK(bar_force_factor(0.0, 0.1, s) == Approx(facing).epsilon(1e-12));
    const double a = 0.02;
    const double near_end = s > a ? (s - a) * std::log(s - a) : 0.0;
    const double level =
        s / (a * a) * ((s + a) * std::log(s + a) - 2.0 * s * std::log(s) + near_end);
    CHECK(bar_force_factor(a, 0.0, s) == Approx(level).epsilon(1e-10));
  }
}

TEST_CASE("pairs of bars repel with the force of J x B over their section") {
  struct Row {
    double along, across, distance, factor, force;
  };
  const Row rows[] = {
      {0.01, 0.1, 0.02, 0.420668531, 4.206685309}, {0.01, 0.1, 0.05, 0.706127447, 2.824509787},
      {0.01, 0.1, 0.1, 0.878483871, 1.756967742},  {0.01, 0.1, 0.2, 0.962349807, 0.962349807},
      {0.1, 0.01, 0.15, 1.090309710, 1.453746279}, {0.01, 0.06, 0.05, 0.843401187, 3.373604747},
      {0.01, 0.01, 0.02, 0.997998278, 9.979982778}};
  for (const Row& row : rows) {
    CAPTURE(row.along, row.across, row.distance);
    CHECK(bar_force_factor(row.along, row.across, row.distance) == digits(row.factor, 5e-10));
    CHECK(force_between_bars(1e3, 1e3, row.along, row.across, row.distance) ==
          Approx(row.force).epsilon(1e-9));
    const Rectangle other{{row.distance, 0.0}, row.along, row.across, 0.0};
    double direct = 0.0;
    for (const Filament& filament :
         filaments_of(Rectangle{{}, row.along, row.across, 0.0}, 1e3, 16)) {
      direct += force_on(filament.current, field_of(other, 1e3, filament.at)).x;
    }
    CHECK(direct == Approx(row.force).epsilon(1e-9));
  }
  CHECK(bar_force_factor(0.01, 0.1, 0.01) == digits(0.24988, 5e-6));
  CHECK(force_between_bars(5e4, 5e4, 0.01, 0.1, 0.02) == Approx(10516.713).epsilon(1e-7));
}

TEST_CASE("sub-conductors have the effective distances of IEC 60865-1, table 1") {
  // Rounded to the millimetre there (from memory).
  struct Row {
    double thickness, height, printed, exact;
  };
  const Row rows[] = {{5, 40, 20, 20.478},   {5, 50, 24, 23.772},   {5, 60, 27, 27.072},
                      {5, 80, 33, 33.666},   {5, 100, 40, 40.242},  {10, 40, 28, 28.038},
                      {10, 50, 31, 31.194},  {10, 60, 34, 34.417},  {10, 80, 41, 40.956},
                      {10, 100, 47, 47.543}, {10, 120, 54, 54.143}, {10, 160, 67, 67.331},
                      {10, 200, 80, 80.485}};
  for (const Row& row : rows) {
    const double spacing = 2.0 * row.thickness;
    const double effective = spacing / bar_force_factor(row.thickness, row.height, spacing);
    CHECK(effective == digits(row.exact, 1e-3));
    CHECK(effective == digits(row.printed, 1.0));
  }
  const Row three[] = {{5, 50, 13, 13.5},   {5, 60, 15, 15.2},   {5, 80, 18, 18.5},
                       {5, 100, 22, 21.8},  {10, 40, 17, 17.3},  {10, 50, 19, 18.9},
                       {10, 60, 20, 20.5},  {10, 80, 23, 23.8},  {10, 100, 27, 27.1},
                       {10, 120, 30, 30.4}, {10, 160, 37, 37.0}, {10, 200, 43, 43.6}};
  for (const Row& row : three) {
    const double next = 2.0 * row.thickness;
    const double inverse = bar_force_factor(row.thickness, row.height, next) / next +
                           bar_force_factor(row.thickness, row.height, 2.0 * next) / (2.0 * next);
    CHECK(1.0 / inverse == digits(row.exact, 0.05));
    CHECK(1.0 / inverse == digits(row.printed, 1.0));
  }
}

TEST_CASE("peak forces come out as in worked examples") {
  // S. S. Rao, Switchgear Protection and Power Systems, example 17.1: 25 kA, peak 2.55 times that,
  // 0.24 m. The book's rounded constant makes it 0.32 % more.
  CHECK(peak_force_two_phase(2.55 * 25e3, 0.24) == Approx(3386.719).epsilon(1e-6));
  CHECK(peak_force_two_phase(2.55 * 25e3, 0.24) == Approx(346.46 * 9.80665).epsilon(5e-3));
  // An explanatory page on IEC 60865: 50 kA, 0.15 m, about 3300 N/m.
  CHECK(peak_force_two_phase(50e3, 0.15) == Approx(3300.0).epsilon(1.1e-2));
  // A design guide's exercise (from memory): 78.75 kA, 18 cm, 70 cm between supports, 482 daN.
  CHECK(0.07 * peak_force_two_phase(78.75e3, 0.18) == digits(482.0, 0.5));
  // IEC TR 60865-2, example 1 (from memory): 30.5 kA, 0.20 m, bars 60 x 10 mm, k12 0.99, 798 N.
  CHECK(peak_force_centre_phase(30.5e3, 0.202) == digits(798.0, 0.5));
  CHECK(bar_force_factor(0.01, 0.06, 0.2) == digits(0.985898, 5e-7));
}

TEST_CASE("three flat bars at 80 kA peak have the exact factors for both distances") {
  const double next = bar_force_factor(0.01, 0.1, 0.1);
  const double outer = bar_force_factor(0.01, 0.1, 0.2);
  CHECK(next * peak_force_centre_phase(80e3, 0.1) == Approx(9738.1037).epsilon(1e-8));
  // The outer phase's worst instant over the cycle, each distance with its own factor.
  double worst = 0.0;
  for (int k = 0; k < 36000; ++k) {
    const double angle = k * std::numbers::pi / 18000.0;
    const double third = 2.0 * std::numbers::pi / 3.0;
    const double i1 = std::cos(angle);
    const double i2 = std::cos(angle - third);
    const double i3 = std::cos(angle - 2.0 * third);
    worst = std::fmax(worst, -i1 * (i2 * next / 0.1 + i3 * outer / 0.2));
  }
  CHECK(2e-7 * 80e3 * 80e3 * worst == Approx(9227.3503).epsilon(1e-6));
}

TEST_CASE("the phases of a flat and a trefoil set have the factors 0.808 and 0.866") {
  CHECK(peak_force_outer_phase(1.0, 1.0) == Approx(2e-7 * 0.8080127).epsilon(1e-7));
  CHECK(peak_force_centre_phase(1.0, 1.0) == Approx(2e-7 * 0.8660254).epsilon(1e-7));
  // Instants of the extremes, unit peak: the centre pushed towards phase 1, phase 1 outward.
  const auto on_centre = [](double i1, double i2, double i3) { return i2 * (i3 - i1); };
  const auto on_first = [](double i1, double i2, double i3) { return i1 * (i2 + 0.5 * i3); };
  CHECK(on_centre(0.258819, 0.707107, -0.965926) == Approx(-0.866025).epsilon(2e-6));
  CHECK(on_first(-0.965926, 0.707107, 0.258819) == Approx(-0.808013).epsilon(2e-6));
}

TEST_CASE("the peak factor follows IEC 60909-0") {
  const double rows[][2] = {{0, 2.0},        {0.07, 1.814373}, {0.1, 1.746002}, {0.2, 1.557835},
                            {0.3, 1.418438}, {0.5, 1.238668},  {1, 1.068791}};
  for (const auto& [ratio, factor] : rows) CHECK(peak_factor(ratio) == digits(factor, 5e-7));
}
