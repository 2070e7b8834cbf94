#pragma once

#include "io/canvas.hpp"
#include "mesh/point.hpp"

namespace barwall::io {

/// A window of the section [m] shown in a box of the page, x and y to the same scale.
struct Frame {
  mesh::Box window;
  PageBox box;

  double scale() const { return box.width() / window.width(); }  ///< pixels per metre
  PagePoint page(mesh::Point p) const {
    return {box.low.x + (p.x - window.low.x) * scale(),
            box.high.y - (p.y - window.low.y) * scale()};
  }
  mesh::Point section(PagePoint p) const {
    return {window.low.x + (p.x - box.low.x) / scale(),
            window.low.y + (box.high.y - p.y) / scale()};
  }
};

/// A frame of a given width that shows `inner` with a margin round it; where that would be
/// lower than `least_height` or higher than `largest_height`, more of the air shows.
Frame frame_round(const mesh::Box& inner, PagePoint upper_left, int width, int least_height,
                  int largest_height);

/// The frame's border with round ticks in millimetres below and on the left.
void draw_axes(Canvas& canvas, const Frame& frame, double text_size);

}  // namespace barwall::io
