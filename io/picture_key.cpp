#include "io/picture_key.hpp"

#include <fmt/format.h>

#include <algorithm>
#include <cmath>

namespace barwall::io {
namespace {

/// The prefix in which the middle of the scale reads best.
PrefixedUnit unit_of(const LogScale& scale) {
  return prefixed_unit(std::sqrt(scale.low * scale.high) * 5.0, "T");
}

}  // namespace

void draw_colour_bar(Canvas& canvas, const LogScale& scale, const FieldRaster& raster,
                     const PageBox& box, bool alternating, double text_size) {
  const PrefixedUnit unit = unit_of(scale);
  TextStyle style;
  style.size = text_size;
  canvas.text({box.low.x, box.low.y - 12.0},
              fmt::format("{} in {}", alternating ? "Flux density B, r.m.s.," : "Flux density |B|",
                          unit.name),
              style);
  const int width = static_cast<int>(box.width());
  const int height = static_cast<int>(box.height());
  Bitmap bitmap{width, height, {}};
  for (int row = 0; row < height; ++row) {
    for (int column = 0; column < width; ++column) {
      bitmap.pixels.push_back(viridis_rgb(viridis_index((column + 0.5) / width)));
    }
  }
  canvas.image(bitmap, box.low);
  const Pen pen{ink, 1.5, {}};
  canvas.box(box, pen);
  // Values beyond the ends have the ends' colours: triangles say so.
  const double middle = box.centre().y;
  const double tip = 16.0;
  const auto [least, largest] =
      std::minmax_element(raster.magnitude.begin(), raster.magnitude.end());
  for (const bool right : {false, true}) {
    if (right ? *largest <= scale.high : *least >= scale.low) continue;
    const double x = right ? box.high.x : box.low.x;
    const std::vector<PagePoint> triangle = {
        {x, box.low.y}, {right ? x + tip : x - tip, middle}, {x, box.high.y}};
    canvas.fill({triangle}, colour_of(viridis_rgb(right ? viridis_count - 1 : 0)));
    canvas.line(triangle, pen, true);
  }
  style.align = Align::middle;
  const std::vector<ScaleMark> marks = scale_marks(scale);
  const auto place = [&](double value) { return box.low.x + scale.position(value) * box.width(); };
  const auto label = [&](double value) { return plain_number(value / unit.size); };
  // All labels where they fit, else the decades alone.
  bool all_fit = true;
  double last = -HUGE_VAL;
  for (const ScaleMark& mark : marks) {
    const double half = 0.5 * canvas.text_width(label(mark.value), style) + 7.0;
    all_fit = all_fit && place(mark.value) - half > last;
    last = place(mark.value) + half;
  }
  for (const ScaleMark& mark : marks) {
    const double x = place(mark.value);
    const bool labelled = all_fit || mark.decade;
    canvas.line({{x, box.high.y}, {x, box.high.y + (labelled ? 9.0 : 5.0)}}, pen);
    if (labelled) canvas.text({x, box.high.y + 31.0}, label(mark.value), style);
  }
}

void draw_force_key(Canvas& canvas, const ArrowScale& scale, PagePoint at, bool alternating,
                    double text_size) {
  TextStyle style;
  style.size = text_size;
  if (!(scale.reference > 0.0)) {
    canvas.text(at, "No forces", style);
    return;
  }
  canvas.text(at, alternating ? "Peak force per metre of run" : "Force per metre of run", style);
  const PagePoint from = at + PagePoint{0.0, 26.0};
  const PagePoint to = from + PagePoint{scale.pixels * scale.reference, 0.0};
  draw_arrow(canvas, from, to);
  const PrefixedUnit unit = prefixed_unit(scale.reference, "N/m");
  canvas.text(to + PagePoint{14.0, 7.0},
              fmt::format("{} {}", plain_number(scale.reference / unit.size), unit.name), style);
}

}  // namespace barwall::io
