#pragma once

#include <cstdint>
#include <memory>
#include <string>
#include <vector>

#include "io/page.hpp"
#include "mesh/point.hpp"

namespace barwall::io {

/// A point of a page: pixels from its upper left corner, y downwards.
using PagePoint = mesh::Point;

/// A rectangle of a page, low.y at its top.
using PageBox = mesh::Box;

struct Pen {
  Colour colour;
  double width = 1.0;
  std::vector<double> dashes;  ///< lengths on and off; empty for a solid line
};

enum class Align { start, middle, end };

struct TextStyle {
  double size = 20.0;
  Align align = Align::start;
  bool bold = false;
  Colour colour = ink;
  double backing = 0.0;  ///< a white box behind the text, so far beyond it
  bool upwards = false;  ///< turned by a quarter, to be read from the right
};

/// A picture of opaque pixels 0x00RRGGBB, rows from the top.
struct Bitmap {
  int width = 0;
  int height = 0;
  std::vector<std::uint32_t> pixels;
};

/// Makes sure that there is memory for a drawing: the libraries beneath may crash where it runs
/// out while they read the system's fonts. \throws std::bad_alloc
void require_memory_for_drawing();

/// A page to draw on; one drawing code serves bitmaps, SVG and PDF.
class Canvas {
public:
  enum class Kind { png, svg, pdf };

  /// A white page of width x height pixels.
  /// \throws std::runtime_error when the page cannot be made, std::bad_alloc
  Canvas(Kind kind, int width, int height);
  ~Canvas();
  Canvas(const Canvas&) = delete;
  Canvas& operator=(const Canvas&) = delete;

  int width() const { return width_; }
  int height() const { return height_; }

  void line(const std::vector<PagePoint>& points, const Pen& pen, bool closed = false);
  /// Fills closed chains together, by the even-odd rule.
  void fill(const std::vector<std::vector<PagePoint>>& chains, const Colour& colour);
  void box(const PageBox& box, const Colour& colour);
  void box(const PageBox& box, const Pen& pen);
  void circle(PagePoint centre, double radius, const Colour& fill_colour, const Pen& pen);
  /// Text with its baseline's start, middle or end at `at`.
  void text(PagePoint at, const std::string& text, const TextStyle& style);
  /// Width of a text when written in a style.
  double text_width(const std::string& text, const TextStyle& style) const;
  /// The bitmap, one of its pixels to one of the page.
  void image(const Bitmap& bitmap, PagePoint upper_left);
  /// What follows is drawn within the box only, until end_clip().
  void begin_clip(const PageBox& box);
  void end_clip();

  /// Ends the page and gives the file's bytes, the same for the same drawing. \throws
  /// std::runtime_error when drawing failed, std::bad_alloc
  std::string bytes();

private:
  struct State;
  Kind kind_;
  int width_;
  int height_;
  std::unique_ptr<State> state_;
};

}  // namespace barwall::io
