#pragma once

#include <cstdint>

namespace barwall::io {

/// A colour: parts of red, green and blue from 0 to 1 (sRGB), alpha 1 is opaque.
struct Colour {
  double red = 0.0;
  double green = 0.0;
  double blue = 0.0;
  double alpha = 1.0;
};

/// Colour of 0xRRGGBB.
constexpr Colour colour_of(std::uint32_t rgb) {
  return {((rgb >> 16) & 255u) / 255.0, ((rgb >> 8) & 255u) / 255.0, (rgb & 255u) / 255.0, 1.0};
}
Colour with_alpha(Colour colour, double alpha);

inline constexpr int viridis_count = 256;

/// The colour's number for a position from 0 to 1 on a scale; beyond, the end's; NaN gives 0.
int viridis_index(double position);

/// 0xRRGGBB of colour `index`, 0 <= index < 256: viridis, made for readers of every kind of
/// colour vision and for print in grey (S. van der Walt and N. Smith, 2015; CC0).
std::uint32_t viridis_rgb(int index);

}  // namespace barwall::io
