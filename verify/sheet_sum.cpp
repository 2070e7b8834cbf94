#include "verify/sheet_sum.hpp"

#include <algorithm>
#include <cstddef>

#include "verify/complex_field.hpp"

// The inner loop is compiled for several instruction sets; the loader takes the best one that
// the processor has, whoever made it: levels of features, not names of processors (it
// chooses before an address sanitizer is up, so not together with one).
#if defined(__x86_64__) && defined(__GNUC__) && !defined(__clang__) && \
    !defined(__SANITIZE_ADDRESS__)
#define BARWALL_BEST_INSTRUCTIONS \
  __attribute__((target_clones("default", "arch=x86-64-v3", "arch=x86-64-v4")))
#else
#define BARWALL_BEST_INSTRUCTIONS
#endif

namespace barwall::verify {

using mesh::Point;

namespace {

/// Sheets as columns of numbers; with w = z - middle and h half the chord, a far sheet gives
///   b = (mu_0 I / 2 pi w) (1 + v/3 + v^2/5 + ...),   v = (h / w)^2.
struct SheetTable {
  std::vector<double> middle_x, middle_y;
  std::vector<double> square_x, square_y;  ///< h^2 [m2]
  std::vector<double> strength;            ///< mu_0 I / 2 pi [T m]
  std::vector<double> near;                ///< |w|^2 up to which the series is not used [m2]
  std::vector<double> guard;               ///< lost beside |w|^2 where the series is used [m2]
};

// Cut after v^6, |v| <= 1/16 leaves (1/16)^7 / 15 = 2.5e-10.
constexpr double near_in_half_widths = 4.0;

SheetTable table_of(std::span<const CurrentSheet> sheets) {
  SheetTable table;
  for (std::vector<double>* column :
       {&table.middle_x, &table.middle_y, &table.square_x, &table.square_y, &table.strength,
        &table.near, &table.guard}) {
    column->reserve(sheets.size());
  }
  for (const CurrentSheet& sheet : sheets) {
    const Point middle = between(sheet.from, sheet.to, 0.5);
    const Point half = 0.5 * (sheet.to - sheet.from);
    table.middle_x.push_back(middle.x);
    table.middle_y.push_back(middle.y);
    table.square_x.push_back(half.x * half.x - half.y * half.y);
    table.square_y.push_back(2.0 * half.x * half.y);
    table.strength.push_back(mu_0_over_2pi * sheet.density * 2.0 * norm(half));
    table.near.push_back(near_in_half_widths * near_in_half_widths * dot(half, half));
    // Keeps the discarded values of near sheets finite, so that 0 times them is 0.
    table.guard.push_back(std::max(1e-20 * dot(half, half), 1e-300));
  }
  return table;
}

/// b of the sheets far enough from (x, y) for the series; the squared distances [m2] that it
/// compared with `near` are left in `distance_squared`.
BARWALL_BEST_INSTRUCTIONS
Point far_sum(const double* middle_x, const double* middle_y, const double* square_x,
              const double* square_y, const double* strength, const double* near,
              const double* guard, int count, double x, double y, double* distance_squared) {
  double real = 0.0;
  double imaginary = 0.0;
#pragma omp simd reduction(+ : real, imaginary)
  for (int i = 0; i < count; ++i) {
    const double wx = x - middle_x[i];
    const double wy = y - middle_y[i];
    const double r2 = wx * wx + wy * wy;
    distance_squared[i] = r2;
    const double inverse = 1.0 / (r2 + guard[i]);
    const double ux = wx * inverse;  // u = 1 / w
    const double uy = -wy * inverse;
    const double sx = ux * ux - uy * uy;
    const double sy = 2.0 * ux * uy;
    const double vx = square_x[i] * sx - square_y[i] * sy;
    const double vy = square_x[i] * sy + square_y[i] * sx;
    double gx = 1.0 / 13.0;
    double gy = 0.0;
    double next = 0.0;
    next = gx * vx - gy * vy + 1.0 / 11.0, gy = gx * vy + gy * vx, gx = next;
    next = gx * vx - gy * vy + 1.0 / 9.0, gy = gx * vy + gy * vx, gx = next;
    next = gx * vx - gy * vy + 1.0 / 7.0, gy = gx * vy + gy * vx, gx = next;
    next = gx * vx - gy * vy + 1.0 / 5.0, gy = gx * vy + gy * vx, gx = next;
    next = gx * vx - gy * vy + 1.0 / 3.0, gy = gx * vy + gy * vx, gx = next;
    next = gx * vx - gy * vy + 1.0, gy = gx * vy + gy * vx, gx = next;
    // One selection, no branch: with more the compiler gives up on vectors.
    const double weight = r2 > near[i] ? strength[i] : 0.0;
    real += weight * (gx * ux - gy * uy);
    imaginary += weight * (gx * uy + gy * ux);
  }
  return {imaginary, real};
}

}  // namespace

std::vector<Point> field_of_sheets(std::span<const CurrentSheet> sheets,
                                   std::span<const Point> at) {
  // A block of sheets stays in the first-level cache while a bunch of points goes over it.
  constexpr std::ptrdiff_t sheets_per_block = 512;
  constexpr std::ptrdiff_t points_per_bunch = 8;
  const SheetTable table = table_of(sheets);
  const auto sheet_count = static_cast<std::ptrdiff_t>(sheets.size());
  const auto point_count = static_cast<std::ptrdiff_t>(at.size());
  std::vector<Point> field(at.size());

#pragma omp parallel for schedule(dynamic)
  for (std::ptrdiff_t bunch = 0; bunch < point_count; bunch += points_per_bunch) {
    double distance_squared[sheets_per_block];
    const std::ptrdiff_t bunch_end = std::min(bunch + points_per_bunch, point_count);
    for (std::ptrdiff_t block = 0; block < sheet_count; block += sheets_per_block) {
      const std::ptrdiff_t block_end = std::min(block + sheets_per_block, sheet_count);
      for (std::ptrdiff_t p = bunch; p < bunch_end; ++p) {
        const Point point = at[p];
        Point block_field = far_sum(
            &table.middle_x[block], &table.middle_y[block], &table.square_x[block],
            &table.square_y[block], &table.strength[block], &table.near[block], &table.guard[block],
            static_cast<int>(block_end - block), point.x, point.y, distance_squared);
        for (std::ptrdiff_t s = block; s < block_end; ++s) {
          // The very number that far_sum compared: computed anew it could round otherwise, and
          // a sheet on the limit would count twice or not at all.
          if (!(distance_squared[s - block] > table.near[s])) {
            block_field += field_of_sheet(sheets[s], point);
          }
        }
        field[p] += block_field;
      }
    }
  }
  return field;
}

}  // namespace barwall::verify
