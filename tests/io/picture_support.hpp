#pragma once

#include <cairo/cairo.h>

#include <boost/property_tree/xml_parser.hpp>
#include <cstdint>
#include <sstream>
#include <stdexcept>
#include <string>
#include <vector>

#include "case_support.hpp"
#include "io/canvas.hpp"
#include "io/results.hpp"

namespace barwall::test {

/// Decodes a PNG with the image library itself: pixels 0xRRGGBB, rows from the top.
inline io::Bitmap read_png(const std::string& bytes) {
  struct Source {
    const std::string& bytes;
    std::size_t at = 0;
  } source{bytes};
  const auto read = [](void* from, unsigned char* to, unsigned int length) {
    auto& s = *static_cast<Source*>(from);
    if (s.at + length > s.bytes.size()) return CAIRO_STATUS_READ_ERROR;
    s.bytes.copy(reinterpret_cast<char*>(to), length, s.at);
    s.at += length;
    return CAIRO_STATUS_SUCCESS;
  };
  cairo_surface_t* surface = cairo_image_surface_create_from_png_stream(read, &source);
  if (cairo_surface_status(surface) != CAIRO_STATUS_SUCCESS) {
    cairo_surface_destroy(surface);
    throw std::runtime_error("no PNG");
  }
  io::Bitmap bitmap{
      cairo_image_surface_get_width(surface), cairo_image_surface_get_height(surface), {}};
  const unsigned char* data = cairo_image_surface_get_data(surface);
  const int stride = cairo_image_surface_get_stride(surface);
  for (int row = 0; row < bitmap.height; ++row) {
    const auto* pixels =
        reinterpret_cast<const std::uint32_t*>(data + static_cast<std::ptrdiff_t>(row) * stride);
    for (int column = 0; column < bitmap.width; ++column) {
      bitmap.pixels.push_back(pixels[column] & 0xffffffu);
    }
  }
  cairo_surface_destroy(surface);
  return bitmap;
}

inline std::uint32_t pixel(const io::Bitmap& bitmap, io::PagePoint at) {
  const int column = static_cast<int>(at.x);
  const int row = static_cast<int>(at.y);
  return bitmap.pixels.at(static_cast<std::size_t>(row) * static_cast<std::size_t>(bitmap.width) +
                          static_cast<std::size_t>(column));
}

/// Parsed XML; throws where the text is not well-formed.
inline boost::property_tree::ptree parse_xml(const std::string& text) {
  std::istringstream stream(text);
  boost::property_tree::ptree tree;
  boost::property_tree::read_xml(stream, tree);
  return tree;
}

inline std::size_t count_of(const std::string& text, const std::string& what) {
  std::size_t count = 0;
  for (std::size_t at = text.find(what); at != text.npos; at = text.find(what, at + what.size())) {
    ++count;
  }
  return count;
}

/// Two round bars and a steel plate above them, on a coarse grid.
inline const std::string plate_case = R"(title = "Two <b>round</b> bars & a plate"
[given]
pitch_mm = 40
[material.mild]
relative_permeability = 100
[[bar]]
name = "go <script>alert(1)<\u2044script>"
current_a = 500
round_mm = { centre = [-20, 0], diameter = 16 }
[[bar]]
name = "return"
current_a = "balance"
round_mm = { centre = [20, 0], diameter = 16 }
[[wall]]
name = "plate"
material = "mild"
rectangle_mm = { centre = [0, 30], size = [100, 8] }
[[probe]]
name = "sensor"
at_mm = [0, 20]
limit_ut = 100
limit_from = "the maker's \"data\" sheet"
[[probe]]
name = "above"
from_mm = [-50, 60]
to_mm = [50, 60]
points = 11
[grid]
cells_across = 3
reach = 20
)";

inline const io::Results& plate_results() {
  static const io::Results results = io::run_case(read_text(plate_case));
  return results;
}

/// The same bars as a single-phase circuit at 50 Hz.
inline const io::Results& alternating_plate_results() {
  static const io::Results results =
      io::run_case(read_text("frequency_hz = 50\nrun_length_m = 0.2\n" + plate_case));
  return results;
}

}  // namespace barwall::test
