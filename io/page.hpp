#pragma once

#include "io/colour_map.hpp"

namespace barwall::io {

// What all pages have in common. Lengths in pixels.

inline constexpr int page_width = 1600;
/// Beside the frame, for the numbers of its upright axis.
inline constexpr int left_margin = 122;
inline constexpr int frame_width = 1442;
/// The page's height that a heading takes.
inline constexpr double heading_height = 100.0;

/// Text, axes and lines.
inline constexpr Colour ink{0.1, 0.1, 0.12, 1.0};
/// Text that stands back.
inline constexpr Colour pale_ink{0.3, 0.3, 0.33, 1.0};
/// What the eye is to find: vermilion of M. Okabe and K. Ito's palette for every kind of colour
/// vision, 2008.
inline constexpr Colour marking_ink = colour_of(0xd55e00);

}  // namespace barwall::io
