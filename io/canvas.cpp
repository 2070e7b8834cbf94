#include "io/canvas.hpp"

#include <cairo-pdf.h>
#include <cairo-svg.h>
#include <cairo.h>

#include <algorithm>
#include <cstdlib>
#include <new>
#include <stdexcept>

#include "io/printable_text.hpp"
#include "io/svg_ids.hpp"

namespace barwall::io {
namespace {

cairo_status_t append_bytes(void* to, const unsigned char* data, unsigned int length) {
  static_cast<std::string*>(to)->append(reinterpret_cast<const char*>(data), length);
  return CAIRO_STATUS_SUCCESS;
}

void check(cairo_status_t status) {
  if (status == CAIRO_STATUS_NO_MEMORY) throw std::bad_alloc();
  if (status != CAIRO_STATUS_SUCCESS) {
    throw std::runtime_error(std::string("a picture could not be drawn: ") +
                             cairo_status_to_string(status));
  }
}

}  // namespace

void require_memory_for_drawing() {
  // Twice what two pages at once and the fonts take.
  constexpr std::size_t enough = std::size_t{128} << 20;
  void* volatile block = std::malloc(enough);  // volatile: or the compiler may leave it out
  if (block == nullptr) throw std::bad_alloc();
  std::free(block);
}

struct Canvas::State {
  std::string bytes;
  cairo_surface_t* surface = nullptr;
  cairo_t* cairo = nullptr;

  ~State() {
    if (cairo != nullptr) cairo_destroy(cairo);
    if (surface != nullptr) cairo_surface_destroy(surface);
  }
  void colour(const Colour& c) const {
    cairo_set_source_rgba(cairo, c.red, c.green, c.blue, c.alpha);
  }
  void pen(const Pen& p) const {
    colour(p.colour);
    cairo_set_line_width(cairo, p.width);
    cairo_set_dash(cairo, p.dashes.data(), static_cast<int>(p.dashes.size()), 0.0);
  }
  void path(const std::vector<PagePoint>& points, bool closed) const {
    if (points.empty()) return;
    cairo_move_to(cairo, points[0].x, points[0].y);
    for (std::size_t k = 1; k < points.size(); ++k) cairo_line_to(cairo, points[k].x, points[k].y);
    if (closed) cairo_close_path(cairo);
  }
  void font(const TextStyle& style) const {
    cairo_select_font_face(cairo, "sans-serif", CAIRO_FONT_SLANT_NORMAL,
                           style.bold ? CAIRO_FONT_WEIGHT_BOLD : CAIRO_FONT_WEIGHT_NORMAL);
    cairo_set_font_size(cairo, style.size);
  }
};

Canvas::Canvas(Kind kind, int width, int height)
    : kind_(kind), width_(width), height_(height), state_(std::make_unique<State>()) {
  State& s = *state_;
  switch (kind) {
    case Kind::png:
      s.surface = cairo_image_surface_create(CAIRO_FORMAT_RGB24, width, height);
      break;
    case Kind::svg:
      s.surface = cairo_svg_surface_create_for_stream(append_bytes, &s.bytes, width, height);
      cairo_svg_surface_set_document_unit(s.surface, CAIRO_SVG_UNIT_PX);
      break;
    case Kind::pdf:
      s.surface = cairo_pdf_surface_create_for_stream(append_bytes, &s.bytes, width, height);
      break;
  }
  check(cairo_surface_status(s.surface));
  s.cairo = cairo_create(s.surface);
  cairo_font_options_t* options = cairo_font_options_create();
  cairo_font_options_set_antialias(options, CAIRO_ANTIALIAS_GRAY);
  cairo_font_options_set_hint_style(options, CAIRO_HINT_STYLE_NONE);
  cairo_font_options_set_hint_metrics(options, CAIRO_HINT_METRICS_OFF);
  cairo_set_font_options(s.cairo, options);
  cairo_font_options_destroy(options);
  cairo_set_line_join(s.cairo, CAIRO_LINE_JOIN_ROUND);
  s.colour({1.0, 1.0, 1.0, 1.0});
  cairo_paint(s.cairo);
}

Canvas::~Canvas() = default;

void Canvas::line(const std::vector<PagePoint>& points, const Pen& pen, bool closed) {
  state_->path(points, closed);
  state_->pen(pen);
  cairo_stroke(state_->cairo);
}

void Canvas::fill(const std::vector<std::vector<PagePoint>>& chains, const Colour& colour) {
  for (const auto& chain : chains) state_->path(chain, true);
  state_->colour(colour);
  cairo_set_fill_rule(state_->cairo, CAIRO_FILL_RULE_EVEN_ODD);
  cairo_fill(state_->cairo);
}

void Canvas::box(const PageBox& box, const Colour& colour) {
  cairo_rectangle(state_->cairo, box.low.x, box.low.y, box.width(), box.height());
  state_->colour(colour);
  cairo_fill(state_->cairo);
}

void Canvas::box(const PageBox& box, const Pen& pen) {
  cairo_rectangle(state_->cairo, box.low.x, box.low.y, box.width(), box.height());
  state_->pen(pen);
  cairo_stroke(state_->cairo);
}

void Canvas::circle(PagePoint centre, double radius, const Colour& fill_colour, const Pen& pen) {
  cairo_new_sub_path(state_->cairo);
  cairo_arc(state_->cairo, centre.x, centre.y, radius, 0.0, 6.283185307179586);
  cairo_close_path(state_->cairo);
  state_->colour(fill_colour);
  cairo_fill_preserve(state_->cairo);
  state_->pen(pen);
  cairo_stroke(state_->cairo);
}

void Canvas::text(PagePoint at, const std::string& text, const TextStyle& style) {
  const std::string shown = printable(text);
  const double share = style.align == Align::start ? 0.0 : style.align == Align::middle ? 0.5 : 1.0;
  const double shift = -share * text_width(shown, style);
  cairo_t* cairo = state_->cairo;
  state_->font(style);
  cairo_save(cairo);
  cairo_translate(cairo, at.x, at.y);
  if (style.upwards) cairo_rotate(cairo, -1.5707963267948966);
  if (style.backing > 0.0) {
    const double beyond = style.backing;
    cairo_rectangle(cairo, shift - beyond, -0.84 * style.size - beyond,
                    text_width(shown, style) + 2.0 * beyond, 1.12 * style.size + 2.0 * beyond);
    state_->colour({1.0, 1.0, 1.0, 0.85});
    cairo_fill(cairo);
  }
  cairo_move_to(cairo, shift, 0.0);
  state_->colour(style.colour);
  cairo_show_text(cairo, shown.c_str());
  cairo_new_path(cairo);
  cairo_restore(cairo);
}

double Canvas::text_width(const std::string& text, const TextStyle& style) const {
  state_->font(style);
  cairo_text_extents_t extents;
  cairo_text_extents(state_->cairo, printable(text).c_str(), &extents);
  return extents.x_advance;
}

void Canvas::image(const Bitmap& bitmap, PagePoint upper_left) {
  cairo_surface_t* surface =
      cairo_image_surface_create(CAIRO_FORMAT_RGB24, bitmap.width, bitmap.height);
  check(cairo_surface_status(surface));
  cairo_surface_flush(surface);
  unsigned char* data = cairo_image_surface_get_data(surface);
  const int stride = cairo_image_surface_get_stride(surface);
  for (int row = 0; row < bitmap.height; ++row) {
    const auto* from = bitmap.pixels.data() + static_cast<std::ptrdiff_t>(row) * bitmap.width;
    auto* to = reinterpret_cast<std::uint32_t*>(data + static_cast<std::ptrdiff_t>(row) * stride);
    std::copy(from, from + bitmap.width, to);
  }
  cairo_surface_mark_dirty(surface);
  cairo_set_source_surface(state_->cairo, surface, upper_left.x, upper_left.y);
  cairo_pattern_set_filter(cairo_get_source(state_->cairo), CAIRO_FILTER_NEAREST);
  cairo_paint(state_->cairo);
  cairo_surface_destroy(surface);
}

void Canvas::begin_clip(const PageBox& box) {
  cairo_save(state_->cairo);
  cairo_rectangle(state_->cairo, box.low.x, box.low.y, box.width(), box.height());
  cairo_clip(state_->cairo);
}

void Canvas::end_clip() {
  cairo_restore(state_->cairo);
}

std::string Canvas::bytes() {
  State& s = *state_;
  check(cairo_status(s.cairo));
  if (kind_ == Kind::png)
    check(cairo_surface_write_to_png_stream(s.surface, append_bytes, &s.bytes));
  cairo_surface_finish(s.surface);
  check(cairo_surface_status(s.surface));
  return kind_ == Kind::svg ? with_plain_ids(s.bytes) : std::move(s.bytes);
}

}  // namespace barwall::io
