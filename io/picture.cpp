#include "io/picture.hpp"

#include <fmt/format.h>

#include <algorithm>
#include <cmath>
#include <fstream>
#include <future>
#include <numbers>
#include <optional>

#include "io/fault_picture.hpp"
#include "io/field_raster.hpp"
#include "io/flux_lines.hpp"
#include "io/force_arrows.hpp"
#include "io/frame.hpp"
#include "io/page.hpp"
#include "io/page_text.hpp"
#include "io/picture_key.hpp"
#include "io/results_folder.hpp"
#include "io/results_heading.hpp"
#include "io/section_drawing.hpp"

namespace barwall::io {
namespace {

constexpr int least_height = 460;
constexpr int largest_height = 1080;
constexpr int flux_line_count = 40;
constexpr double text_size = 21.0;

/// What the picture shows, found once and drawn in every format.
struct Scene {
  Frame frame;
  FieldRaster raster;
  LogScale scale;
  std::vector<FluxLine> lines;
  double instant = 0.0;  ///< wt of the flux lines and of the currents' signs [rad]
  std::vector<ForceArrow> arrows;
  ArrowScale arrow_scale;
  std::optional<FaultChart> fault;  ///< below the section
};

Scene scene_of(const Results& results) {
  Scene scene;
  scene.frame = picture_frame(results.problem->section);
  scene.raster = field_raster(results, scene.frame.window, frame_width,
                              static_cast<int>(scene.frame.box.height()));
  scene.scale = log_scale_of(scene.raster.magnitude);
  scene.lines = flux_lines(results, scene.frame.window, flux_line_count);
  scene.instant = flux_line_instant(results);
  scene.arrows = force_arrows(results);
  scene.arrow_scale = arrow_scale(scene.arrows, scene.frame.scale());
  if (results.fault_over_time()) scene.fault = fault_chart(results);
  return scene;
}

/// Flux between neighbouring lines [Wb/m], 0 where there are none.
double flux_step(const std::vector<FluxLine>& lines) {
  double least = HUGE_VAL;
  double largest = -HUGE_VAL;
  for (const FluxLine& line : lines) {
    least = std::min(least, line.potential);
    largest = std::max(largest, line.potential);
  }
  return largest > least ? (largest - least) / (flux_line_count - 1) : 0.0;
}

/// The flux lines, but for stretches where they would run together and hide the colours.
void draw_flux_lines(Canvas& canvas, const Scene& scene) {
  constexpr double least_step = 0.8;  // pixels
  constexpr double least_gap = 3.0;   // pixels between neighbouring lines
  const double dense = flux_step(scene.lines) * scene.frame.scale() / least_gap;  // [T]
  const FieldRaster& raster = scene.raster;
  const auto shows = [&](PagePoint p) {
    const PagePoint from_corner = p - scene.frame.box.low;
    const int column = std::clamp(static_cast<int>(from_corner.x), 0, raster.width - 1);
    const int row = std::clamp(static_cast<int>(from_corner.y), 0, raster.height - 1);
    return raster.at(column, row) <= dense;
  };
  const auto stroke = [&](const std::vector<PagePoint>& points, bool closed) {
    if (points.size() < 2) return;
    canvas.line(points, {{0.0, 0.0, 0.0, 0.22}, 2.2, {}}, closed);
    canvas.line(points, {{1.0, 1.0, 1.0, 0.75}, 1.0, {}}, closed);
  };
  canvas.begin_clip(scene.frame.box);
  for (const FluxLine& line : scene.lines) {
    std::vector<PagePoint> stretch;
    bool whole = true;
    const std::size_t count = line.points.size() + (line.closed ? 1 : 0);
    for (std::size_t k = 0; k < count; ++k) {
      const PagePoint p = scene.frame.page(line.points[k % line.points.size()]);
      if (!shows(p)) {
        stroke(stretch, false);
        stretch.clear();
        whole = false;
      } else if (stretch.empty() || k + 1 == count || distance(stretch.back(), p) > least_step) {
        stretch.push_back(p);
      }
    }
    stroke(stretch, whole && line.closed);
  }
  canvas.end_clip();
}

void draw_point_probes(Canvas& canvas, const Results& results, const Frame& frame,
                       LabelPlacement& labels) {
  constexpr std::size_t most = 20;
  constexpr double half = 7.0;
  std::vector<std::pair<std::string, PagePoint>> shown;
  for (const solver::ProbeFigures& found : results.figures.probes) {
    const mesh::Point at = found.probe.points.front();
    if (!found.probe.line && frame.window.contains(at)) {
      shown.emplace_back(found.probe.name, frame.page(at));
    }
  }
  if (shown.size() > most) return;
  const auto box_of = [](PagePoint p) {
    return PageBox{p - PagePoint{half, half}, p + PagePoint{half, half}};
  };
  for (const auto& [name, p] : shown) {
    const std::vector<PagePoint> diamond = {p + PagePoint{half, 0.0}, p + PagePoint{0.0, half},
                                            p - PagePoint{half, 0.0}, p - PagePoint{0.0, half}};
    canvas.fill({diamond}, {1.0, 1.0, 1.0, 1.0});
    canvas.line(diamond, {ink, 1.6, {}}, true);
    labels.block(box_of(p));
  }
  TextStyle style;
  style.size = 0.85 * text_size;
  constexpr double backing = 2.0;
  for (const auto& [name, p] : shown) {
    const auto label = labels.place(canvas.text_width(name, style) + 2.0 * backing,
                                    1.12 * style.size + 2.0 * backing, box_of(p), false,
                                    {p + PagePoint{half, 0.0}, p - PagePoint{half, 0.0}});
    if (!label) continue;
    if (label->leader) canvas.line({(*label->leader)[0], (*label->leader)[1]}, {ink, 1.0, {}});
    canvas.box(label->box, Colour{1.0, 1.0, 1.0, 0.85});
    canvas.text(label->box.low + PagePoint{backing, backing + 0.84 * style.size}, name, style);
  }
}

std::string flux_line_note(const Scene& scene, bool alternating) {
  std::string note = "Thin lines: flux lines";
  if (const double step = flux_step(scene.lines); step > 0.0) {
    const PrefixedUnit unit = prefixed_unit(step, "Wb/m");
    note += fmt::format(", {:.3g} {} between neighbours, not drawn where closest", step / unit.size,
                        unit.name);
  }
  if (alternating) {
    note += fmt::format(
        "; they and the currents' signs at \u03c9t = {:.1f}\u00b0, when the "
        "field's energy is largest",
        std::round(1800.0 * scene.instant / std::numbers::pi) / 10.0 + 0.0);
  }
  return note + ".";
}

std::string drawn(Canvas::Kind kind, const Results& results, const Scene& scene,
                  const Bitmap& bitmap) {
  const bool alternating = results.alternating();
  const Frame& frame = scene.frame;
  const double bottom = frame.box.high.y;
  const double field_bottom = bottom + 256.0;
  Canvas canvas(kind, page_width,
                static_cast<int>(field_bottom + (scene.fault ? fault_forces_height : 0.0)));
  draw_heading_of(canvas, results);

  canvas.image(bitmap, frame.box.low);
  draw_flux_lines(canvas, scene);
  draw_outlines(canvas, *results.problem, frame);
  LabelPlacement labels(frame.box);
  canvas.begin_clip(frame.box);
  draw_forces(canvas, scene.arrows, scene.arrow_scale, frame, labels);
  const int left_out =
      draw_names(canvas, *results.problem, frame,
                 currents_at(results.problem->excitation, scene.instant), labels, text_size + 2.0);
  draw_point_probes(canvas, results, frame, labels);
  canvas.end_clip();
  draw_axes(canvas, frame, text_size - 1.0);

  const double bar_top = bottom + 112.0;
  const double key_left = page_width - 440.0;
  draw_colour_bar(canvas, scene.scale, scene.raster,
                  {{left_margin + 16.0, bar_top}, {key_left - 70.0, bar_top + 28.0}}, alternating,
                  text_size);
  draw_force_key(canvas, scene.arrow_scale, {key_left, bar_top - 12.0}, alternating, text_size);
  TextStyle small;
  small.size = 18.0;
  small.colour = pale_ink;
  std::string note = flux_line_note(scene, alternating) +
                     " Model: 2-D static field, no eddy currents, no skin effect.";
  if (left_out > 0) note += fmt::format(" Names without room: {}.", left_out);
  double y = bar_top + 98.0;
  for (const std::string& line : wrapped(canvas, note, small, frame_width)) {
    canvas.text({left_margin, y}, line, small);
    y += 26.0;
  }
  if (scene.fault) draw_fault_forces(canvas, *scene.fault, field_bottom);
  return canvas.bytes();
}

}  // namespace

Frame picture_frame(const mesh::Section& section) {
  return frame_round(bounds(section), {left_margin, heading_height}, frame_width, least_height,
                     largest_height);
}

Pictures in_both_formats(const std::function<std::string(Canvas::Kind)>& drawn) {
  auto svg = std::async(std::launch::async | std::launch::deferred,
                        [&] { return drawn(Canvas::Kind::svg); });
  std::string png = drawn(Canvas::Kind::png);
  return {std::move(png), svg.get()};
}

Pictures draw_pictures(const Results& results) {
  require_memory_for_drawing();
  const Scene scene = scene_of(results);
  const Bitmap bitmap = coloured(scene.raster, scene.scale);
  return in_both_formats([&](Canvas::Kind kind) { return drawn(kind, results, scene, bitmap); });
}

void write_pictures(const Results& results, const std::filesystem::path& folder) {
  const Pictures pictures = draw_pictures(results);
  write_text(folder / "picture.png", pictures.png);
  write_text(folder / "picture.svg", pictures.svg);
}

}  // namespace barwall::io
