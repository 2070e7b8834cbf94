#pragma once

#include <string>
#include <vector>

#include "io/canvas.hpp"

namespace barwall::io {

/// The text cut off with an ellipsis where it is wider than `width` pixels.
std::string cut_to_width(const Canvas& canvas, const std::string& text, const TextStyle& style,
                         double width);

/// The text broken at spaces into lines of at most `width` pixels.
std::vector<std::string> wrapped(const Canvas& canvas, const std::string& text,
                                 const TextStyle& style, double width);

/// A page's title, smaller or cut off where it is long, and one line below it.
void draw_heading(Canvas& canvas, const std::string& title, const std::string& below,
                  const Colour& below_colour, double left, double width);

}  // namespace barwall::io
