#include "solver/bh_curve.hpp"

#include <fmt/format.h>

#include <cmath>
#include <utility>

#include "solver/constants.hpp"

namespace barwall::solver {

namespace {

using Column = BhTableError::Column;

/// Room for rounding, also that of mu_0 itself, when a rise is compared with vacuum's.
constexpr double rounding = 1e-9;

std::string shown(const BhPoint& point) {
  return fmt::format("{} A/m, {} T", point.field, point.flux_density);
}

void check_row(const BhPoint& point, std::size_t row) {
  const auto fail = [&](Column column, const std::string& what) {
    throw BhTableError(fmt::format("row {} is {}; {}", row + 1, shown(point), what), row, column);
  };
  if (!std::isfinite(point.field)) fail(Column::field, "H must be a finite number");
  if (!std::isfinite(point.flux_density)) fail(Column::flux_density, "B must be a finite number");
  if (point.flux_density > largest_bh_flux_density) {
    fail(Column::flux_density, fmt::format("B must be at most {} T", largest_bh_flux_density));
  }
  if (row == 0 && point.field != 0.0) fail(Column::field, "the first row must be 0, 0");
  if (row == 0 && point.flux_density != 0.0) {
    fail(Column::flux_density, "the first row must be 0, 0");
  }
}

void check_step(const BhPoint& before, const BhPoint& point, std::size_t row) {
  const auto fail = [&](Column column, const std::string& what) {
    throw BhTableError(fmt::format("rows {} and {} are {} and {}; {}", row, row + 1, shown(before),
                                   shown(point), what),
                       row, column);
  };
  const double rise = point.flux_density - before.flux_density;
  const double step = point.field - before.field;
  if (!(step > 0.0)) fail(Column::field, "H must rise from row to row");
  if (!(rise >= smallest_bh_step)) {
    fail(Column::flux_density,
         fmt::format("B must rise by at least {} T from row to row", smallest_bh_step));
  }
  if (rise < (1.0 - rounding) * mu_0 * step) {
    fail(Column::flux_density,
         fmt::format("B rises by {:.6g} T, more slowly than in vacuum; it must rise by at least "
                     "{:.6g} T, mu_0 times the rise of H",
                     rise, mu_0 * step));
  }
  if (rise > steepest_bh_rise * mu_0 * step) {
    fail(Column::flux_density,
         fmt::format("B must rise at most {} times faster than in vacuum", steepest_bh_rise));
  }
}

void check(const std::vector<BhPoint>& points) {
  for (std::size_t row = 0; row < points.size(); ++row) {
    check_row(points[row], row);
    if (row > 0) check_step(points[row - 1], points[row], row);
  }
  if (points.size() < fewest_bh_points) {
    throw BhTableError(
        fmt::format("{} rows; a B-H table has at least {}", points.size(), fewest_bh_points),
        points.size(), Column::field);
  }
}

/// dH/dB at every row, from the widths [T] and secants [m/H] of the intervals.
std::vector<double> slopes_at_rows(const std::vector<double>& width,
                                   const std::vector<double>& secant) {
  const std::size_t last = width.size();
  std::vector<double> slope(last + 1);
  for (std::size_t k = 1; k < last; ++k) {
    const double before = 2.0 * width[k] + width[k - 1];
    const double after = width[k] + 2.0 * width[k - 1];
    slope[k] = (before + after) / (before / secant[k - 1] + after / secant[k]);
  }
  // No second derivative at B = 0: 3 secant = 2 slope[0] + slope[1].
  slope[1] = std::fmin(slope[1], 2.0 * secant[0]);
  slope[0] = 0.5 * (3.0 * secant[0] - slope[1]);

  const double s = secant[last - 1];
  const double bend = (s - secant[last - 2]) / (width[last - 1] + width[last - 2]);
  slope[last] = std::clamp(s + bend * width[last - 1], 0.5 * s, std::fmax(nu_0, 0.5 * s));
  return slope;
}

}  // namespace

BhCurve make_bh_curve(std::vector<BhPoint> points) {
  check(points);
  const std::size_t intervals = points.size() - 1;
  std::vector<double> width, secant;
  for (std::size_t k = 0; k < intervals; ++k) {
    width.push_back(points[k + 1].flux_density - points[k].flux_density);
    secant.push_back((points[k + 1].field - points[k].field) / width[k]);
  }
  const std::vector<double> slope = slopes_at_rows(width, secant);

  BhCurve curve;
  double energy = 0.0;
  for (std::size_t k = 0; k < intervals; ++k) {
    const double h = points[k].field;
    const double c1 = slope[k];
    const double c2 = k == 0 ? 0.0 : (3.0 * secant[k] - 2.0 * c1 - slope[k + 1]) / width[k];
    const double c3 = (c1 + slope[k + 1] - 2.0 * secant[k]) / (width[k] * width[k]);
    curve.pieces_.push_back({points[k].flux_density, h, c1, c2, c3, energy});
    energy += width[k] * (0.5 * (h + points[k + 1].field) + width[k] / 12.0 * (c1 - slope[k + 1]));
  }
  const double end = points.back().flux_density;
  curve.pieces_.push_back({end, points.back().field, nu_0, 0.0, 0.0, energy});

  const std::size_t buckets = 8 * points.size();
  curve.buckets_per_tesla_ = static_cast<double>(buckets - 1) / end;
  curve.bucket_begin_.assign(buckets + 1, 1);
  std::int32_t begun = 1;
  for (std::size_t k = 0; k < buckets; ++k) {
    curve.bucket_begin_[k] = begun;
    while (begun <= static_cast<std::int32_t>(intervals) &&
           curve.bucket(curve.pieces_[static_cast<std::size_t>(begun)].b) == k) {
      ++begun;
    }
  }
  curve.bucket_begin_[buckets] = begun;
  curve.points_ = std::move(points);
  return curve;
}

}  // namespace barwall::solver
