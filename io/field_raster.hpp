#pragma once

#include <vector>

#include "io/canvas.hpp"
#include "io/results.hpp"
#include "io/scales.hpp"

namespace barwall::io {

/// The field's magnitude over a window of the section, at the middles of width x height pixels.
struct FieldRaster {
  mesh::Box window;  ///< [m]
  int width = 0;
  int height = 0;
  std::vector<float> magnitude;  ///< |B|, with a frequency its r.m.s. [T]; rows from the top

  float at(int column, int row) const {
    return magnitude[static_cast<std::size_t>(row) * static_cast<std::size_t>(width) +
                     static_cast<std::size_t>(column)];
  }
};

/// Samples the recovered field. Pixels beyond the grid hold 0.
FieldRaster field_raster(const Results& results, const mesh::Box& window, int width, int height);

/// The raster in the colours of a scale.
Bitmap coloured(const FieldRaster& raster, const LogScale& scale);

}  // namespace barwall::io
