#include "io/frame.hpp"

#include <algorithm>
#include <cmath>

#include "io/scales.hpp"

namespace barwall::io {
namespace {

/// Margin round the section, as a share of the longer side of its box.
constexpr double margin_share = 0.12;

}  // namespace

Frame frame_round(const mesh::Box& inner, PagePoint upper_left, int width, int least_height,
                  int largest_height) {
  const double margin = margin_share * std::max(inner.width(), inner.height());
  const double across = inner.width() + 2.0 * margin;
  const double up = inner.height() + 2.0 * margin;
  const double wanted = std::clamp(width * up / across, 1.0 * least_height, 1.0 * largest_height);
  const int height = static_cast<int>(std::lround(wanted));
  const double metres = std::max(across / width, up / height);  // per pixel
  Frame frame;
  frame.box = {upper_left, upper_left + PagePoint{1.0 * width, 1.0 * height}};
  const mesh::Point half{0.5 * metres * width, 0.5 * metres * height};
  frame.window = {inner.centre() - half, inner.centre() + half};
  return frame;
}

void draw_axes(Canvas& canvas, const Frame& frame, double text_size) {
  constexpr double millimetre = 1e-3;
  constexpr double tick = 8.0;
  const Pen pen{ink, 1.5, {}};
  const TextStyle below{text_size, Align::middle, false, ink, 0.0, false};
  const TextStyle beside{text_size, Align::end, false, ink, 0.0, false};
  canvas.box(frame.box, pen);

  const mesh::Box& w = frame.window;
  // A label takes about nine letters across and two lines up.
  const int columns = std::max(2, static_cast<int>(frame.box.width() / (6.5 * text_size)));
  const int rows = std::max(2, static_cast<int>(frame.box.height() / (4.0 * text_size)));
  const RoundTicks x_ticks = round_ticks(w.low.x / millimetre, w.high.x / millimetre, columns);
  const RoundTicks y_ticks = round_ticks(w.low.y / millimetre, w.high.y / millimetre, rows);
  // One step for both axes where that leaves enough labels on the shorter one.
  const double step = std::max(x_ticks.step, y_ticks.step);
  const auto places = [&](const RoundTicks& own, double low, double high) {
    return (high - low) / step < 2.0
               ? own
               : round_ticks(low, high, static_cast<int>(std::ceil((high - low) / step)));
  };
  double widest = 0.0;
  for (double x : places(x_ticks, w.low.x / millimetre, w.high.x / millimetre).places) {
    const PagePoint at{frame.page({x * millimetre, 0.0}).x, frame.box.high.y};
    canvas.line({at, at + PagePoint{0.0, tick}}, pen);
    canvas.text(at + PagePoint{0.0, tick + 1.1 * text_size}, plain_number(x), below);
  }
  for (double y : places(y_ticks, w.low.y / millimetre, w.high.y / millimetre).places) {
    const PagePoint at{frame.box.low.x, frame.page({0.0, y * millimetre}).y};
    canvas.line({at, at - PagePoint{tick, 0.0}}, pen);
    canvas.text(at + PagePoint{-tick - 5.0, 0.36 * text_size}, plain_number(y), beside);
    widest = std::max(widest, canvas.text_width(plain_number(y), beside));
  }
  const PagePoint middle = frame.box.centre();
  canvas.text({middle.x, frame.box.high.y + tick + 2.4 * text_size}, "x in mm", below);
  TextStyle upwards = below;
  upwards.upwards = true;
  const double left = frame.box.low.x - tick - 5.0 - widest - 0.55 * text_size;
  canvas.text({std::max(left, text_size), middle.y}, "y in mm", upwards);
}

}  // namespace barwall::io
