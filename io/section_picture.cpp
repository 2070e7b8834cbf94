#include <fmt/format.h>

#include <algorithm>
#include <array>
#include <cmath>
#include <numbers>

#include "io/frame.hpp"
#include "io/grid_drawing.hpp"
#include "io/page.hpp"
#include "io/page_text.hpp"
#include "io/picture.hpp"
#include "io/results_folder.hpp"
#include "io/scales.hpp"
#include "io/section_drawing.hpp"

namespace barwall::io {
namespace {

constexpr int detail_width = 640;
constexpr int detail_height = 480;
constexpr double text_size = 20.0;

/// Tints by material, in the order in which the case's parts name them: M. Okabe and K. Ito's
/// palette for every kind of colour vision, 2008, lightened.
struct Tints {
  std::vector<std::string> materials;

  explicit Tints(const Case& input) {
    for (const solver::Material& material : input.materials) {
      if (std::find(materials.begin(), materials.end(), material.name) == materials.end()) {
        materials.push_back(material.name);
      }
    }
  }
  static Colour at(std::size_t k) {
    constexpr std::array<std::uint32_t, 7> palette = {0xf3c98b, 0x9fbfd8, 0xf5efb0, 0xa5d8c6,
                                                      0xe3b9cf, 0xc9e4f6, 0xe9b08e};
    return colour_of(palette[k % palette.size()]);
  }
  Colour of(const std::string& material) const {
    const auto found = std::find(materials.begin(), materials.end(), material);
    return at(static_cast<std::size_t>(found - materials.begin()));
  }
};

/// A dimension line with the overall size between two places, `offset` pixels off the section.
void draw_dimension(Canvas& canvas, PagePoint from, PagePoint to, PagePoint offset,
                    const std::string& size, LabelPlacement& labels) {
  const Pen pen{ink, 1.2, {}};
  const PagePoint a = from + offset;
  const PagePoint b = to + offset;
  const PagePoint beyond = (8.0 / norm(offset)) * offset;
  const PagePoint along = (1.0 / distance(a, b)) * (b - a);
  const PagePoint aside = quarter_turn(along);
  canvas.line({from + beyond, a + beyond}, pen);
  canvas.line({to + beyond, b + beyond}, pen);
  canvas.line({a, b}, pen);
  for (const auto& [tip, back] : {std::pair{a, along}, std::pair{b, -1.0 * along}}) {
    const double head = std::min(13.0, 0.4 * distance(a, b));
    const PagePoint base = tip + head * back;
    canvas.fill({{tip, base + 0.28 * head * aside, base - 0.28 * head * aside}}, ink);
  }
  TextStyle style;
  style.size = text_size;
  style.align = Align::middle;
  style.upwards = std::abs(along.y) > std::abs(along.x);
  style.backing = 3.0;
  const double half = 0.5 * canvas.text_width(size, style);
  // Beside the middle of the line; beyond its end where it is too short for that.
  const bool fits = distance(a, b) > 2.0 * half + 30.0;
  const PagePoint beside = style.upwards ? PagePoint{-7.0, 0.0} : PagePoint{0.0, 26.0};
  const PagePoint past_end = style.upwards ? PagePoint{7.0, 0.0} : PagePoint{0.0, 7.0};
  const PagePoint at = fits ? between(a, b, 0.5) + beside : b + (half + 16.0) * along + past_end;
  canvas.text(at, size, style);
  labels.block_line(a, b, 3.0);
  labels.block(style.upwards ? PageBox{at - PagePoint{text_size, half}, at + PagePoint{4.0, half}}
                             : PageBox{at - PagePoint{half, text_size}, at + PagePoint{half, 4.0}});
}

void draw_overall_size(Canvas& canvas, const mesh::Box& box, const Frame& frame,
                       LabelPlacement& labels) {
  constexpr double millimetre = 1e-3;
  const auto text = [](double metres) {
    return fmt::format("{} mm", plain_number(std::round(metres / millimetre * 1e3) / 1e3));
  };
  const PagePoint low_left = frame.page(box.low);
  const PagePoint low_right = frame.page({box.high.x, box.low.y});
  const PagePoint high_left = frame.page({box.low.x, box.high.y});
  draw_dimension(canvas, low_left, low_right, {0.0, 40.0}, text(box.width()), labels);
  draw_dimension(canvas, low_left, high_left, {-40.0, 0.0}, text(box.height()), labels);
}

std::string spaced(int number) {
  std::string text = std::to_string(number);
  for (int at = static_cast<int>(text.size()) - 3; at > 0; at -= 3) {
    text.insert(static_cast<std::size_t>(at), "\u2009");
  }
  return text;
}

std::string current_text(const Case& input, std::size_t part) {
  const std::complex<double> current = input.excitation.current[part];
  const auto number = [](double value) { return plain_number(std::round(value * 1e3) / 1e3); };
  if (!input.excitation.alternating()) return number(current.real()) + " A";
  const double angle = std::arg(current) * 180.0 / std::numbers::pi;
  return fmt::format("{} A, {}\u00b0", number(std::abs(current)),
                     number(current == 0.0 ? 0.0 : angle));
}

/// Grid size, materials, and every part's material and current, in a column of the page.
void draw_key(Canvas& canvas, const Case& input, const solver::Problem& problem, const Tints& tints,
              const PageBox& column) {
  const mesh::FittedGrid& grid = *problem.grid;
  constexpr double row = 29.0;
  double y = column.low.y + text_size;
  TextStyle style;
  style.size = text_size;
  TextStyle head = style;
  head.bold = true;
  const auto put = [&](const std::string& text, const TextStyle& how, double indent) {
    canvas.text({column.low.x + indent, y},
                cut_to_width(canvas, text, how, column.width() - indent), how);
    y += row;
  };
  put("Grid", head, 0.0);
  put(fmt::format("{} \u00d7 {} lines, {} nodes, {} triangles", grid.columns, grid.rows,
                  spaced(grid.node_count()), spaced(grid.triangle_count())),
      style, 0.0);
  const double half_side = 0.5 * (grid.x_lines.back() - grid.x_lines.front());
  put(fmt::format("at least {} cells across every part and gap", input.grid.cells_across), style,
      0.0);
  put(fmt::format("outer boundary {:.3g} m from the middle", half_side), style, 0.0);
  y += 0.4 * row;

  put(input.excitation.alternating() ? fmt::format("Parts; currents r.m.s. at {} Hz",
                                                   plain_number(input.excitation.frequency_hz))
                                     : "Parts; steady currents",
      head, 0.0);
  const std::vector<int> parts = visible_parts(problem.outline);
  const auto rows = static_cast<std::size_t>(std::max(1.0, (column.high.y - y) / row + 1.0));
  const std::size_t columns = parts.size() > rows ? 2 : 1;
  const double width = column.width() / static_cast<double>(columns);
  const std::size_t room = rows * columns;
  const std::size_t shown = parts.size() > room ? room - 1 : parts.size();
  const double top = y;
  for (std::size_t k = 0; k < std::min(room, parts.size()); ++k) {
    const std::size_t side = k / rows;
    const double left = column.low.x + width * static_cast<double>(side);
    const double base = top + row * static_cast<double>(k % rows);
    if (k == shown) {
      canvas.text({left, base}, fmt::format("and {} more", parts.size() - shown), style);
      break;
    }
    const auto p = static_cast<std::size_t>(parts[k]);
    const std::string& material = input.materials[p].name;
    const PageBox swatch{{left, base - 0.8 * text_size}, {left + 26.0, base + 2.0}};
    canvas.box(swatch, tints.of(material));
    canvas.box(swatch, Pen{ink, 1.0, {}});
    const mesh::Part& part = problem.section.parts[p];
    std::string text = part.name + ": " + material;
    if (input.materials[p].saturable()) {
      text += ", B-H table";
    } else if (input.materials[p].magnetic()) {
      text += fmt::format(", \u00b5r {}", plain_number(input.materials[p].relative_permeability));
    }
    if (part.kind == mesh::Part::Kind::bar) text += ", " + current_text(input, p);
    canvas.text({left + 36.0, base}, cut_to_width(canvas, text, style, width - 50.0), style);
  }
}

std::string drawn(Canvas::Kind kind, const Case& input, const solver::Problem& problem) {
  const Tints tints(input);
  std::vector<Colour> colours;
  for (const solver::Material& material : input.materials)
    colours.push_back(tints.of(material.name));
  const mesh::Box box = bounds(problem.section);
  const Frame whole = frame_round(box, {left_margin, heading_height}, frame_width, 460, 900);
  const double detail_top = whole.box.high.y + 130.0;
  const Frame detail =
      finest_detail(problem, {{1.0 * left_margin, detail_top},
                              {1.0 * left_margin + detail_width, detail_top + detail_height}});
  Canvas canvas(kind, page_width, static_cast<int>(detail.box.high.y) + 84);
  draw_heading(canvas, input.title, input.name + ":  section and grid, not solved", pale_ink,
               left_margin, frame_width);

  fill_parts(canvas, problem.outline, whole, colours);
  draw_grid(canvas, *problem.grid, whole, false);
  draw_outlines(canvas, problem, whole);
  LabelPlacement labels(whole.box);
  canvas.begin_clip(whole.box);
  draw_overall_size(canvas, box, whole, labels);
  const PageBox marked{whole.page({detail.window.low.x, detail.window.high.y}),
                       whole.page({detail.window.high.x, detail.window.low.y})};
  canvas.box(marked, Pen{marking_ink, 2.5, {}});
  const PagePoint corners[] = {
      marked.low, {marked.high.x, marked.low.y}, marked.high, {marked.low.x, marked.high.y}};
  for (std::size_t k = 0; k < 4; ++k) labels.block_line(corners[k], corners[(k + 1) % 4], 2.0);
  draw_names(canvas, problem, whole, {}, labels, text_size + 2.0);
  canvas.end_clip();
  draw_axes(canvas, whole, text_size);

  fill_parts(canvas, problem.outline, detail, colours);
  draw_grid(canvas, *problem.grid, detail, true);
  draw_outlines(canvas, problem, detail);
  draw_axes(canvas, detail, text_size);
  canvas.box(detail.box, Pen{marking_ink, 2.5, {}});
  TextStyle style;
  style.size = text_size;
  canvas.text({detail.box.low.x, detail.box.low.y - 12.0}, "The marked detail", style);
  draw_key(canvas, input, problem, tints,
           {{detail.box.high.x + 60.0, detail.box.low.y}, {page_width - 36.0, detail.box.high.y}});
  return canvas.bytes();
}

}  // namespace

Pictures draw_section(const Case& input, const solver::Problem& problem) {
  require_memory_for_drawing();
  return in_both_formats([&](Canvas::Kind kind) { return drawn(kind, input, problem); });
}

void draw_section(const Case& input, const solver::Problem& problem,
                  const std::filesystem::path& folder) {
  const Pictures pictures = draw_section(input, problem);
  write_text(folder / "section.png", pictures.png);
  write_text(folder / "section.svg", pictures.svg);
}

}  // namespace barwall::io
