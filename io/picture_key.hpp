#pragma once

#include "io/field_raster.hpp"
#include "io/force_arrows.hpp"

namespace barwall::io {

/// The colours of a field's scale in a box, labelled below and titled above; triangles at its
/// ends where the raster holds values beyond them.
void draw_colour_bar(Canvas& canvas, const LogScale& scale, const FieldRaster& raster,
                     const PageBox& box, bool alternating, double text_size);

/// What the force arrows mean, and one of a round size; the title's baseline starts at `at`.
void draw_force_key(Canvas& canvas, const ArrowScale& scale, PagePoint at, bool alternating,
                    double text_size);

}  // namespace barwall::io
