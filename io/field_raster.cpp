#include "io/field_raster.hpp"

#include <algorithm>
#include <cmath>

#include "mesh/grid_window.hpp"

namespace barwall::io {
namespace {

class Painter {
public:
  Painter(const Results& results, FieldRaster& raster)
      : grid_(*results.problem->grid),
        field_(*results.field),
        raster_(raster),
        pixel_{raster.window.width() / raster.width, raster.window.height() / raster.height} {}

  /// Rows `from` to `to` (excluded); bands of rows may be painted in parallel.
  void paint(int from, int to) const {
    const mesh::Box& w = raster_.window;
    const mesh::GridWindow cells = window_covering(
        grid_, {{w.low.x, w.high.y - to * pixel_.y}, {w.high.x, w.high.y - from * pixel_.y}});
    for (int j = cells.first_row; j < cells.last_row; ++j) {
      for (int i = cells.first_column; i < cells.last_column; ++i) {
        const int cell = j * (grid_.columns - 1) + i;
        triangle(2 * cell, from, to);
        triangle(2 * cell + 1, from, to);
      }
    }
  }

private:
  void triangle(int t, int from, int to) const {
    const auto p = grid_.corners(t);
    mesh::Box box;
    for (mesh::Point q : p) box.include(q);
    // Column c has its middle at low.x + (c + 1/2) pixel, row r at high.y - (r + 1/2) pixel.
    const mesh::Box& w = raster_.window;
    const int c0 = first_middle((box.low.x - w.low.x) / pixel_.x, 0);
    const int c1 = last_middle((box.high.x - w.low.x) / pixel_.x, raster_.width);
    const int r0 = first_middle((w.high.y - box.high.y) / pixel_.y, from);
    const int r1 = last_middle((w.high.y - box.low.y) / pixel_.y, to);
    if (c0 > c1 || r0 > r1) return;
    const double whole = cross(p[1] - p[0], p[2] - p[0]);
    constexpr double slack = -1e-9;
    for (int r = r0; r <= r1; ++r) {
      for (int c = c0; c <= c1; ++c) {
        const mesh::Point at{w.low.x + (c + 0.5) * pixel_.x, w.high.y - (r + 0.5) * pixel_.y};
        const double w0 = cross(p[1] - at, p[2] - at) / whole;
        const double w1 = cross(p[2] - at, p[0] - at) / whole;
        const double w2 = 1.0 - w0 - w1;
        if (w0 < slack || w1 < slack || w2 < slack) continue;
        raster_.magnitude[static_cast<std::size_t>(r) * static_cast<std::size_t>(raster_.width) +
                          static_cast<std::size_t>(c)] =
            static_cast<float>(field_.rms({t, {w0, w1, w2}}, at));
      }
    }
  }

  static int first_middle(double place, int least) {
    return std::max(least, static_cast<int>(std::ceil(std::max(place, -1.0) - 0.5)));
  }
  static int last_middle(double place, int end) {
    return static_cast<int>(std::floor(std::min(place, 1.0 * end) - 0.5));
  }

  const mesh::FittedGrid& grid_;
  const solver::RecoveredField& field_;
  FieldRaster& raster_;
  mesh::Point pixel_;  ///< a pixel's sides [m]
};

}  // namespace

FieldRaster field_raster(const Results& results, const mesh::Box& window, int width, int height) {
  FieldRaster raster{window, width, height, {}};
  raster.magnitude.assign(static_cast<std::size_t>(width) * static_cast<std::size_t>(height), 0.0f);
  const Painter painter(results, raster);
  constexpr int band = 32;
#pragma omp parallel for schedule(dynamic)
  for (int from = 0; from < height; from += band)
    painter.paint(from, std::min(height, from + band));
  return raster;
}

Bitmap coloured(const FieldRaster& raster, const LogScale& scale) {
  Bitmap bitmap{raster.width, raster.height, {}};
  bitmap.pixels.resize(raster.magnitude.size());
  for (std::size_t k = 0; k < bitmap.pixels.size(); ++k) {
    bitmap.pixels[k] = viridis_rgb(viridis_index(scale.position(raster.magnitude[k])));
  }
  return bitmap;
}

}  // namespace barwall::io
