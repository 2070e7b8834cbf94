#include "io/case_problem.hpp"
#include "io/picture.hpp"

#include <catch2/catch.hpp>
#include <cmath>
#include <map>

#include "io/field_raster.hpp"
#include "io/force_arrows.hpp"
#include "io/section_drawing.hpp"
#include "mesh/sampling.hpp"
#include "picture_support.hpp"

namespace barwall {
namespace {

using test::alternating_plate_results;
using test::plate_results;

const io::Pictures& plate_pictures() {
  static const io::Pictures pictures = io::draw_pictures(plate_results());
  return pictures;
}

double lightness(std::uint32_t rgb) {
  return (0.299 * ((rgb >> 16) & 255u) + 0.587 * ((rgb >> 8) & 255u) + 0.114 * (rgb & 255u)) /
         255.0;
}

/// Magnitude of the recovered field where a pixel of the picture has its middle.
double field_at(const io::Results& results, mesh::Point point) {
  const auto at = locate(*results.problem->grid, results.problem->section, point);
  const double b = norm(results.field->flux_density(at, point, 0));
  return results.alternating() ? std::hypot(b, norm(results.field->flux_density(at, point, 1))) : b;
}

/// Of points spread over the frame, how many have a colour of the scale, and how many of these
/// are not within one step of the scale of `factor` times the field there.
struct ColourCount {
  int coloured = 0;
  int wrong = 0;
};

ColourCount count_colours(const io::Results& results, const std::string& png, double factor) {
  const io::Bitmap bitmap = test::read_png(png);
  const io::Frame frame = io::picture_frame(results.problem->section);
  const io::LogScale scale =
      io::log_scale_of(io::field_raster(results, frame.window, static_cast<int>(frame.box.width()),
                                        static_cast<int>(frame.box.height()))
                           .magnitude);
  std::map<std::uint32_t, int> index_of;
  for (int k = 0; k < io::viridis_count; ++k) index_of[io::viridis_rgb(k)] = k;
  ColourCount count;
  for (int k = 0; k < 400; ++k) {
    const mesh::Point share = mesh::low_discrepancy_point(k);
    const io::PagePoint middle{
        std::floor(frame.box.low.x + 5.0 + share.x * (frame.box.width() - 10.0)) + 0.5,
        std::floor(frame.box.low.y + 5.0 + share.y * (frame.box.height() - 10.0)) + 0.5};
    const auto found = index_of.find(test::pixel(bitmap, middle));
    if (found == index_of.end()) continue;  // a line, a name
    ++count.coloured;
    const double position = scale.position(factor * field_at(results, frame.section(middle)));
    count.wrong += std::abs(io::viridis_index(position) - found->second) > 1 ? 1 : 0;
  }
  return count;
}

}  // namespace

TEST_CASE("The picture's colours map back to the field within a step of the scale") {
  const ColourCount steady = count_colours(plate_results(), plate_pictures().png, 1.0);
  CHECK(steady.coloured > 240);
  CHECK(steady.wrong == 0);
  const auto pictures = io::draw_pictures(alternating_plate_results());
  const ColourCount alternating = count_colours(alternating_plate_results(), pictures.png, 1.0);
  CHECK(alternating.coloured > 240);
  CHECK(alternating.wrong == 0);
  // A field a tenth larger would not pass.
  CHECK(count_colours(plate_results(), plate_pictures().png, 1.1).wrong > 100);
}

TEST_CASE("The picture is 1600 pixels wide and has its frame where picture_frame says") {
  const io::Bitmap bitmap = test::read_png(plate_pictures().png);
  CHECK(bitmap.width == 1600);
  const io::Frame frame = io::picture_frame(plate_results().problem->section);
  CHECK(frame.box.high.y < bitmap.height);
  CHECK(lightness(test::pixel(bitmap, {frame.box.low.x + 30.0, frame.box.low.y})) < 0.45);
  CHECK(test::pixel(bitmap, {3.0, 3.0}) == 0xffffff);
}

TEST_CASE("The outlines are drawn where the section has them") {
  const io::Bitmap bitmap = test::read_png(plate_pictures().png);
  const solver::Problem& problem = *plate_results().problem;
  const io::Frame frame = io::picture_frame(problem.section);
  int samples = 0;
  int dark_on = 0;
  int dark_beside = 0;
  for (const mesh::OutlinePiece& piece : problem.outline.pieces) {
    for (int k = 0; k < 40; ++k) {
      const double t = (k + 0.5) / 40;
      const mesh::Point aside = (8.0 / frame.scale()) * left_normal(piece.curve, t);
      const auto dark = [&](mesh::Point p) {
        return lightness(test::pixel(bitmap, frame.page(p))) < 0.3 ? 1 : 0;
      };
      ++samples;
      dark_on += dark(at(piece.curve, t));
      dark_beside += dark(at(piece.curve, t) + aside);
    }
  }
  CHECK(dark_on > 0.85 * samples);
  CHECK(dark_beside < 0.25 * samples);
}

TEST_CASE("The SVG picture is well-formed, sized in pixels, and refers to nothing outside") {
  const auto tree = test::parse_xml(plate_pictures().svg);
  CHECK(tree.get<std::string>("svg.<xmlattr>.width") == "1600px");
  CHECK(test::count_of(plate_pictures().svg, "href=\"http") == 0);
  CHECK(test::count_of(plate_pictures().svg, "<image") == 2);  // the field and the colour bar
}

TEST_CASE("The same results give the same picture, byte for byte") {
  const io::Pictures again = io::draw_pictures(plate_results());
  CHECK(again.png == plate_pictures().png);
  CHECK(again.svg == plate_pictures().svg);
}

TEST_CASE("write_pictures writes what draw_pictures draws") {
  const test::ScratchFolder folder;
  io::write_pictures(plate_results(), folder.path());
  const auto bytes = [&](const char* name) {
    std::ifstream stream(folder.path() / name, std::ios::binary);
    return std::string(std::istreambuf_iterator<char>(stream), {});
  };
  CHECK(bytes("picture.png") == plate_pictures().png);
  CHECK(bytes("picture.svg") == plate_pictures().svg);
}

TEST_CASE("A case without any current is drawn too") {
  const auto results = io::run_case(test::read_text(test::edited(
      test::edited(test::plate_case, "current_a = 500", "current_a = 0"), "\"balance\"", "0")));
  CHECK(test::read_png(io::draw_pictures(results).png).width == 1600);
}

TEST_CASE("The section's picture shows parts in their materials' tints and names the grid") {
  const io::Case input = test::read_text(test::plate_case);
  const auto problem = io::problem_of(input);
  const io::Pictures pictures = draw_section(input, *problem);
  const io::Bitmap bitmap = test::read_png(pictures.png);
  CHECK(bitmap.width == 1600);
  CHECK(test::parse_xml(pictures.svg).get<std::string>("svg.<xmlattr>.width") == "1600px");
  CHECK(draw_section(input, *problem).svg == pictures.svg);
  CHECK(draw_section(input, *problem).png == pictures.png);
  // Tints of two materials and the paper are the commonest colours.
  std::map<std::uint32_t, int> count;
  for (std::uint32_t rgb : bitmap.pixels) ++count[rgb];
  CHECK(count[0xffffff] > 100000);
  CHECK(count[0xf3c98b] > 300);
  CHECK(count[0x9fbfd8] > 300);
}

TEST_CASE("A current's sign is that of its instant, and zero but for rounding is zero") {
  solver::Excitation excitation{50.0, {{3.0, 0.0}, {0.0, 3.0}, {-1.5, 1e-12}}};
  const auto at_start = io::currents_at(excitation, 0.0);
  CHECK(at_start[0] == Approx(3.0));
  CHECK(at_start[1] == 0.0);
  CHECK(at_start[2] == Approx(-1.5));
  const auto later = io::currents_at(excitation, 1.5707963267948966);
  CHECK(later[0] == 0.0);
  CHECK(later[1] == Approx(-3.0));
}

TEST_CASE("Force arrows start on their parts and carry the figures' forces") {
  const auto arrows = io::force_arrows(plate_results());
  REQUIRE(arrows.size() == 3);
  CHECK(arrows[0].at.x == Approx(-0.020));
  CHECK(arrows[0].force.x ==
        find_figure(plate_results().figures.bars[0].figures, "force_x")->value);
  // The plate is pulled down to the bars: its arrow starts on its lower side.
  CHECK(arrows[2].name == "plate");
  CHECK(arrows[2].force.y < 0.0);
  CHECK(arrows[2].at.y == Approx(0.026));
  const io::ArrowScale scale = io::arrow_scale(arrows, 1e4);
  for (const io::ForceArrow& arrow : arrows) CHECK(norm(arrow.force) * scale.pixels <= 120.001);
  const auto peaks = io::force_arrows(alternating_plate_results());
  CHECK(norm(peaks[0].force) ==
        Approx(
            find_figure(alternating_plate_results().figures.bars[0].figures, "force_peak")->value));
}

}  // namespace barwall
