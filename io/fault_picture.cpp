#include "io/fault_picture.hpp"

#include <algorithm>

#include "io/page.hpp"
#include "io/page_text.hpp"
#include "io/results_folder.hpp"
#include "io/results_heading.hpp"

namespace barwall::io {
namespace {

constexpr double caption_height = 76.0;
constexpr double time_axis_height = 66.0;
constexpr double right_edge = left_margin + frame_width;

/// Two lines: which fault, and how it runs.
void draw_caption(Canvas& canvas, const FaultChart& chart, double top) {
  TextStyle style;
  style.size = 23.0;
  style.bold = true;
  canvas.text({left_margin, top + 24.0}, cut_to_width(canvas, chart.fault, style, frame_width),
              style);
  style.size = 21.0;
  style.bold = false;
  canvas.text({left_margin, top + 54.0}, cut_to_width(canvas, chart.closing, style, frame_width),
              style);
}

std::string drawn(Canvas::Kind kind, const Results& results, const FaultChart& chart) {
  constexpr double forces_top = heading_height + caption_height;
  constexpr double forces_bottom = forces_top + 430.0;
  constexpr double currents_top = forces_bottom + 34.0;
  constexpr double currents_bottom = currents_top + 270.0;
  Canvas canvas(kind, page_width, static_cast<int>(currents_bottom + time_axis_height) + 112);
  draw_heading_of(canvas, results);
  draw_caption(canvas, chart, heading_height);
  const double names =
      std::max(width_of_names(canvas, chart.forces), width_of_names(canvas, chart.currents));
  const double right = right_edge - names;
  draw_panel(canvas, chart.forces, {{left_margin, forces_top}, {right, forces_bottom}}, false);
  draw_panel(canvas, chart.currents, {{left_margin, currents_top}, {right, currents_bottom}}, true);
  TextStyle small;
  small.size = 18.0;
  small.colour = pale_ink;
  double y = currents_bottom + time_axis_height + 28.0;
  for (const std::string& line : wrapped(canvas, chart.note, small, frame_width)) {
    canvas.text({left_margin, y}, line, small);
    y += 26.0;
  }
  return canvas.bytes();
}

}  // namespace

void draw_fault_forces(Canvas& canvas, const FaultChart& chart, double top) {
  draw_caption(canvas, chart, top);
  const double names = width_of_names(canvas, chart.forces);
  draw_panel(canvas, chart.forces,
             {{left_margin, top + caption_height},
              {right_edge - names, top + fault_forces_height - time_axis_height - 14.0}},
             true);
}

Pictures draw_fault_pictures(const Results& results) {
  require_memory_for_drawing();
  const FaultChart chart = fault_chart(results);
  return in_both_formats([&](Canvas::Kind kind) { return drawn(kind, results, chart); });
}

void write_fault_pictures(const Results& results, const std::filesystem::path& folder) {
  if (!results.fault_over_time()) return;
  const Pictures pictures = draw_fault_pictures(results);
  write_text(folder / "fault.png", pictures.png);
  write_text(folder / "fault.svg", pictures.svg);
}

}  // namespace barwall::io
