#pragma once

#include "io/canvas.hpp"
#include "io/results.hpp"

namespace barwall::io {

/// A page's heading for pictures of results: the case's title, its verdict, validity and limits.
void draw_heading_of(Canvas& canvas, const Results& results);

}  // namespace barwall::io
