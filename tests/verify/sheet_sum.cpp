#include "verify/sheet_sum.hpp"

#include <omp.h>
#include <array>
#include <catch2/catch.hpp>
#include <random>

using barwall::mesh::Point;
using barwall::mesh::turned;
using barwall::verify::CurrentSheet;
using barwall::verify::field_of_sheet;
using barwall::verify::field_of_sheets;

namespace {

std::vector<CurrentSheet> scattered_sheets(int count, double longest) {
  std::mt19937 random(7);
  std::uniform_real_distribution<double> unit(0.0, 1.0);
  std::vector<CurrentSheet> sheets;
  for (int i = 0; i < count; ++i) {
    const Point from{0.4 * unit(random), 0.3 * unit(random)};
    const Point step = turned({longest * unit(random), 0.0}, 6.28 * unit(random));
    sheets.push_back({from, from + step, 2e5 * (unit(random) - 0.5)});
  }
  return sheets;
}

std::vector<Point> scattered_points(int count) {
  std::mt19937 random(11);
  std::uniform_real_distribution<double> unit(-0.3, 0.7);
  std::vector<Point> points;
  for (int i = 0; i < count; ++i) points.push_back({unit(random), unit(random)});
  return points;
}

}  // namespace

TEST_CASE("the fast sum of many sheets equals the closed forms added one by one") {
  for (const double longest : {1e-3, 2e-2, 3e-1}) {
    const auto sheets = scattered_sheets(3000, longest);
    const auto points = scattered_points(200);
    const auto fast = field_of_sheets(sheets, points);
    REQUIRE(fast.size() == points.size());
    double worst = 0.0;
    for (std::size_t p = 0; p < points.size(); ++p) {
      Point exact;
      double scale = 0.0;  // the sum of the sheets' separate fields
      for (const CurrentSheet& sheet : sheets) {
        const Point one = field_of_sheet(sheet, points[p]);
        exact += one;
        scale += norm(one);
      }
      worst = std::max(worst, distance(fast[p], exact) / scale);
    }
    CAPTURE(longest);
    CHECK(worst < 1e-9);
  }
}

TEST_CASE("each sheet of the fast sum is right to 1e-9 of its own field at every distance") {
  const CurrentSheet sheet{{0.01, -0.002}, {0.013, 0.002}, 1e4};
  const Point middle = between(sheet.from, sheet.to, 0.5);
  std::vector<Point> points;
  for (double ratio = 0.3; ratio < 1e4; ratio *= 1.07) {
    for (int direction = 0; direction < 24; ++direction) {
      points.push_back(middle + turned({ratio * 0.005, 0.0}, 0.1 + 0.2618 * direction));
    }
  }
  const auto fast = field_of_sheets(std::array{sheet}, points);
  double worst = 0.0;
  for (std::size_t p = 0; p < points.size(); ++p) {
    const Point exact = field_of_sheet(sheet, points[p]);
    worst = std::max(worst, distance(fast[p], exact) / norm(exact));
  }
  CHECK(worst < 1e-9);
}

TEST_CASE("the sum of many sheets does not depend on the number of threads") {
  const auto sheets = scattered_sheets(2500, 1e-2);
  const auto points = scattered_points(101);
  const int usual = omp_get_max_threads();
  omp_set_num_threads(1);
  const auto alone = field_of_sheets(sheets, points);
  omp_set_num_threads(3);
  const auto shared = field_of_sheets(sheets, points);
  omp_set_num_threads(usual);
  CHECK(alone == shared);
}

TEST_CASE("no sheets and no points are both allowed") {
  CHECK(field_of_sheets({}, std::array{Point{1.0, 2.0}}).front() == Point{});
  CHECK(field_of_sheets(scattered_sheets(3, 0.1), {}).empty());
}
