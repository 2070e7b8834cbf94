#include "io/line_panel.hpp"

#include <fmt/format.h>

#include <algorithm>
#include <array>
#include <cmath>
#include <numeric>

#include "io/page_text.hpp"
#include "io/scales.hpp"

namespace barwall::io {
namespace {

constexpr double text_size = 20.0;
constexpr double name_size = 21.0;
/// Of a name too long for one line, and of what is said of a mark.
constexpr double small_size = 18.0;
constexpr double widest_name = 330.0;
constexpr double line_width = 3.0;
/// From the box to the names: what leads from a line's end to its name.
constexpr double lead = 62.0;
constexpr double lead_gap = 8.0;

/// Of M. Okabe and K. Ito's palette for every kind of colour vision, 2008, three that differ in
/// grey as well; where lines lie on each other, the dashes of the later let the earlier show.
const std::array<Pen, 3> pens = {Pen{colour_of(0x0072b2), line_width, {}},
                                 Pen{colour_of(0xe69f00), line_width, {15.0, 9.0}},
                                 Pen{colour_of(0x000000), line_width, {4.0, 6.0}}};

/// Marks are rings; those of lines that lie on each other lie within each other.
constexpr std::array<double, 3> ring_radius = {10.0, 7.0, 4.0};
constexpr double ring_width = 2.5;
/// From the left of a mark to what is said of it.
constexpr double beside_ring = 2.0 * ring_radius[0] + 7.0;

const Pen& pen_of(const PanelLine& line) {
  return pens[static_cast<std::size_t>(line.pen)];
}

/// The scales of a panel's box.
struct Scales {
  PageBox box;
  double end = 1.0;   ///< [s]
  double low = 0.0;   ///< of the quantity
  double high = 1.0;  ///< of the quantity

  Scales(const LinePanel& panel, const PageBox& shown) : box(shown), end(panel.seconds.back()) {
    double least = 0.0;
    double largest = 0.0;
    for (const PanelLine& line : panel.lines) {
      for (double value : line.values) {
        least = std::min(least, value);
        largest = std::max(largest, value);
      }
    }
    if (least == largest) largest = 1.0;
    const double room = 0.08 * (largest - least);
    low = least < 0.0 ? least - room : 0.0;
    high = largest > 0.0 ? largest + room : 0.0;
  }
  PagePoint page(double seconds, double value) const {
    return {box.low.x + seconds / end * box.width(),
            box.high.y - (value - low) / (high - low) * box.height()};
  }
};

void draw_scales(Canvas& canvas, const LinePanel& panel, const Scales& scales, bool time_below) {
  constexpr double tick = 8.0;
  constexpr double beside_tick = 5.0;
  const PageBox& box = scales.box;
  const Pen thin{{0.85, 0.85, 0.87, 1.0}, 1.0, {}};
  const Pen pen{ink, 1.5, {}};
  TextStyle below;
  below.size = text_size;
  below.align = Align::middle;
  TextStyle beside = below;
  beside.align = Align::end;

  const PrefixedUnit time = prefixed_unit(scales.end, "s");
  for (double x : round_ticks(0.0, scales.end / time.size, 10).places) {
    const PagePoint at = scales.page(x * time.size, scales.low);
    canvas.line({at, {at.x, box.low.y}}, thin);
    canvas.line({at, at + PagePoint{0.0, tick}}, pen);
    if (time_below) {
      canvas.text(at + PagePoint{0.0, tick + 1.1 * text_size}, plain_number(x), below);
    }
  }
  const PrefixedUnit unit = prefixed_unit(std::max(scales.high, -scales.low), panel.unit);
  double widest = 0.0;
  const int rows = std::max(2, static_cast<int>(box.height() / (2.6 * text_size)));
  for (double y : round_ticks(scales.low / unit.size, scales.high / unit.size, rows).places) {
    const PagePoint at = scales.page(0.0, y * unit.size);
    canvas.line({at, {box.high.x, at.y}}, y == 0.0 ? Pen{pale_ink, 1.0, {}} : thin);
    canvas.line({at, at - PagePoint{tick, 0.0}}, pen);
    const std::string number = plain_number(y);
    canvas.text(at + PagePoint{-tick - beside_tick, 0.36 * text_size}, number, beside);
    widest = std::max(widest, canvas.text_width(number, beside));
  }
  canvas.box(box, pen);
  if (time_below) {
    canvas.text({box.centre().x, box.high.y + tick + 2.4 * text_size},
                "Time since closing in " + time.name, below);
  }
  TextStyle upwards = below;
  upwards.upwards = true;
  const double left = box.low.x - tick - beside_tick - widest - 0.55 * text_size;
  canvas.text({std::max(left, text_size), box.centre().y},
              fmt::format("{} in {}", panel.quantity, unit.name), upwards);
}

void draw_ring(Canvas& canvas, const PanelLine& line, PagePoint at) {
  canvas.circle(at, ring_radius[static_cast<std::size_t>(line.pen)], {1.0, 1.0, 1.0, 1.0},
                {pen_of(line).colour, ring_width, {}});
}

TextStyle style_of(double size, const Colour& colour) {
  TextStyle style;
  style.size = size;
  style.colour = colour;
  return style;
}

/// What stands at a line's end: its name, in two smaller lines where it is long, and its remark.
struct NamePlate {
  TextStyle style = style_of(name_size, ink);
  std::vector<std::string> name;
  double width = 0.0;
  double height = 0.0;

  NamePlate(const Canvas& canvas, const PanelLine& line) {
    if (canvas.text_width(line.name, style) > widest_name) style.size = small_size;
    name = wrapped(canvas, line.name, style, widest_name);
    if (name.size() > 2) {
      for (std::size_t k = 2; k < name.size(); ++k) name[1] += " " + name[k];
      name.resize(2);
    }
    for (std::string& text : name) {
      text = cut_to_width(canvas, text, style, widest_name);
      width = std::max(width, canvas.text_width(text, style));
    }
    height = (1.2 * static_cast<double>(name.size()) + 0.5) * style.size;
    if (!line.mark) return;
    width = std::max(width, beside_ring + canvas.text_width(line.mark->remark, remark()));
    height += 1.5 * small_size;
  }
  static TextStyle remark() { return style_of(small_size, pale_ink); }

  void draw(Canvas& canvas, const PanelLine& line, PagePoint upper_left) const {
    PagePoint at = upper_left;
    for (const std::string& text : name) {
      at.y += 1.1 * style.size;
      canvas.text(at, text, style);
    }
    if (!line.mark) return;
    at.y += 1.4 * small_size;
    draw_ring(canvas, line, at + PagePoint{ring_radius[0], -0.36 * small_size});
    canvas.text(at + PagePoint{beside_ring, 0.0}, line.mark->remark, remark());
  }
};

/// Upper ends of the plates on the right, their middles as near to their lines' ends as they do
/// not overlap.
std::vector<double> plate_places(const LinePanel& panel, const std::vector<NamePlate>& plates,
                                 const Scales& scales) {
  const auto wanted = [&](std::size_t k) {
    return scales.page(scales.end, panel.lines[k].values.back()).y - 0.5 * plates[k].height;
  };
  std::vector<std::size_t> order(plates.size());
  std::iota(order.begin(), order.end(), std::size_t{0});
  std::stable_sort(order.begin(), order.end(),
                   [&](std::size_t a, std::size_t b) { return wanted(a) < wanted(b) - 0.5; });
  std::vector<double> top(plates.size());
  double free_from = scales.box.low.y;
  for (std::size_t k : order) {
    top[k] = std::max(wanted(k), free_from);
    free_from = top[k] + plates[k].height;
  }
  double free_to = scales.box.high.y;
  for (std::size_t n = order.size(); n-- > 0;) {
    const std::size_t k = order[n];
    top[k] = std::min(top[k], free_to - plates[k].height);
    free_to = top[k];
  }
  return top;
}

}  // namespace

double width_of_names(const Canvas& canvas, const LinePanel& panel) {
  double width = 0.0;
  for (const PanelLine& line : panel.lines) {
    width = std::max(width, NamePlate(canvas, line).width);
  }
  return lead + width;
}

void draw_panel(Canvas& canvas, const LinePanel& panel, const PageBox& box, bool time_below) {
  const Scales scales(panel, box);
  draw_scales(canvas, panel, scales, time_below);
  for (const PanelLine& line : panel.lines) {
    std::vector<PagePoint> points;
    for (std::size_t k = 0; k < line.values.size(); ++k) {
      points.push_back(scales.page(panel.seconds[k], line.values[k]));
    }
    canvas.line(points, pen_of(line));
  }
  std::vector<NamePlate> plates;
  for (const PanelLine& line : panel.lines) {
    if (line.mark) draw_ring(canvas, line, scales.page(line.mark->seconds, line.mark->value));
    plates.emplace_back(canvas, line);
  }
  const std::vector<double> tops = plate_places(panel, plates, scales);
  for (std::size_t k = 0; k < plates.size(); ++k) {
    const PanelLine& line = panel.lines[k];
    const PagePoint end = scales.page(scales.end, line.values.back());
    const double left = box.high.x + lead;
    canvas.line({end, {left - lead_gap, tops[k] + 0.5 * plates[k].height}}, pen_of(line));
    plates[k].draw(canvas, line, {left, tops[k]});
  }
}

}  // namespace barwall::io
