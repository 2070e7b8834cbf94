#include "io/case_shape.hpp"

#include <fmt/format.h>

#include <cmath>
#include <numbers>

#include "io/polygon_fault.hpp"

namespace barwall::io {

namespace {

using mesh::Point;
using mesh::Shape;

/// A turn in [rad] with |turn| <= 45 degrees, and whether width and height change places:
/// multiples of 90 degrees stay exactly parallel to the axes.
struct Turn {
  double angle = 0.0;
  bool swapped = false;
};

Turn read_turn(const CaseTable& shape) {
  const TomlEntry* entry = shape.find("turn_deg");
  if (entry == nullptr) return {};
  const double degrees = read_number(shape.text(), entry->value, "turn_deg", {});
  const double half_turn = std::remainder(degrees, 180.0);
  const double rest = std::remainder(half_turn, 90.0);
  const bool swapped = std::abs(half_turn - rest) > 45.0;
  return {rest * std::numbers::pi / 180.0, swapped};
}

Point read_size(const CaseTable& shape, std::string_view key) {
  return read_pair(shape.text(), shape.require(key), key, size_mm);
}

double read_thickness(const CaseTable& shape, double smaller_side_mm) {
  const TomlValue& value = shape.require("thickness");
  const double thickness = read_number(shape.text(), value, "thickness", size_mm);
  if (smaller_side_mm - 2.0 * thickness < smallest_mm) {
    shape.text().fail(
        value.place, fmt::format("thickness is {} mm, which leaves no hole; it must be less than "
                                 "{} mm, half of the {} mm across {}",
                                 thickness, 0.5 * smaller_side_mm, smaller_side_mm, shape.title()));
  }
  return thickness;
}

Shape read_form(const CaseTable& shape, const std::string& key) {
  if (key == "rectangle_mm") {
    const Point size = read_size(shape, "size");
    const Turn turn = read_turn(shape);
    mesh::Rectangle rectangle{{}, metres(size.x), metres(size.y), turn.angle};
    if (turn.swapped) std::swap(rectangle.width, rectangle.height);
    return rectangle;
  }
  if (key == "round_mm") {
    const TomlValue& value = shape.require("diameter");
    return mesh::Round{{}, metres(read_number(shape.text(), value, "diameter", size_mm))};
  }
  if (key == "tube_mm") {
    const TomlValue& value = shape.require("outer_diameter");
    const double outer = read_number(shape.text(), value, "outer_diameter", size_mm);
    return mesh::Tube{{}, metres(outer), metres(read_thickness(shape, outer))};
  }
  const Point outer = read_size(shape, "outer");
  const double thickness = read_thickness(shape, std::fmin(outer.x, outer.y));
  const Turn turn = read_turn(shape);
  mesh::Frame frame{{}, metres(outer.x), metres(outer.y), metres(thickness), turn.angle};
  if (turn.swapped) std::swap(frame.width, frame.height);
  return frame;
}

std::vector<Point> read_centres(const CaseTable& shape) {
  const CaseText& text = shape.text();
  const TomlEntry& entry = shape.exactly_one({"centre", "centres"});
  if (entry.key == "centre") return {read_point(text, entry.value, "centre")};
  const TomlArray& array = read_array(text, entry.value, "centres");
  if (array.empty() || array.size() > most_pieces) {
    text.fail(entry.value.place, fmt::format("centres has {} points; it must have 1 to {}",
                                             array.size(), most_pieces));
  }
  std::vector<Point> centres;
  for (const TomlValue& element : array) centres.push_back(read_point(text, element, "centres"));
  return centres;
}

Shape read_polygon(const CaseText& text, const TomlValue& value) {
  const TomlArray& array = read_array(text, value, "polygon_mm");
  if (array.size() < 3 || array.size() > most_corners) {
    text.fail(value.place, fmt::format("polygon_mm has {} corners; it must have 3 to {}",
                                       array.size(), most_corners));
  }
  mesh::Polygon polygon;
  for (const TomlValue& corner : array) {
    polygon.corners.push_back(read_point(text, corner, "polygon_mm"));
  }
  const std::string fault = polygon_fault(polygon.corners, metres(smallest_mm));
  if (!fault.empty()) text.fail(value.place, "the polygon " + fault);
  return polygon;
}

void check_extent(const CaseText& text, Place place, const std::string& key, const Shape& shape) {
  const mesh::Box box = bounds(shape);
  const double limit = metres(farthest_mm) * (1.0 + 1e-12);
  const double extent = std::fmax(std::fmax(-box.low.x, box.high.x),  //
                                  std::fmax(-box.low.y, box.high.y));
  if (extent > limit) {
    text.fail(place, fmt::format("{} reaches to {} mm from the origin; coordinates must stay "
                                 "within {} mm",
                                 key, 1000.0 * extent, farthest_mm));
  }
}

std::vector<std::string> form_keys(const std::string& key) {
  if (key == "rectangle_mm") return {"centre", "centres", "size", "turn_deg"};
  if (key == "round_mm") return {"centre", "centres", "diameter"};
  if (key == "tube_mm") return {"centre", "centres", "outer_diameter", "thickness"};
  return {"centre", "centres", "outer", "thickness", "turn_deg"};
}

}  // namespace

const std::vector<std::string>& shape_keys() {
  static const std::vector<std::string> keys = {"rectangle_mm", "round_mm", "tube_mm", "frame_mm",
                                                "polygon_mm"};
  return keys;
}

ShapeGiven read_shape(const CaseTable& table) {
  const CaseText& text = table.text();
  const TomlEntry& entry = table.exactly_one(shape_keys());
  ShapeGiven given{entry.value.place, {}};
  if (entry.key == "polygon_mm") {
    given.pieces.push_back(read_polygon(text, entry.value));
    return given;
  }
  const CaseTable form_table(text, entry.value, entry.key, form_keys(entry.key));
  const Shape form = read_form(form_table, entry.key);
  for (const Point centre : read_centres(form_table)) {
    given.pieces.push_back(moved(form, centre));
    check_extent(text, given.place, entry.key, given.pieces.back());
  }
  return given;
}

}  // namespace barwall::io
