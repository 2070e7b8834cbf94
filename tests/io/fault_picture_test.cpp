#include "io/fault_picture.hpp"

#include <catch2/catch.hpp>
#include <iomanip>
#include <map>

#include "fault_support.hpp"
#include "io/quantity_text.hpp"
#include "io/report.hpp"
#include "io/summary.hpp"
#include "picture_support.hpp"

namespace barwall {
namespace {

/// The outlines of all letters of an SVG picture, in the order in which they are written.
std::string letters_of(const std::string& svg) {
  std::map<std::string, std::string> outline;
  std::string letters;
  std::string symbol;
  const auto value_after = [&](std::size_t at) { return svg.substr(at, svg.find('"', at) - at); };
  for (std::size_t at = svg.find('<'); at != std::string::npos; at = svg.find('<', at + 1)) {
    const std::string tag = svg.substr(at, svg.find('>', at) - at);
    const std::size_t id = tag.find(" id=\"");
    const std::size_t path = tag.find(" d=\"");
    const std::size_t use = tag.find("xlink:href=\"#");
    if (tag.rfind("<symbol", 0) == 0) symbol = value_after(at + id + 5);
    if (tag.rfind("</symbol", 0) == 0) symbol.clear();
    if (!symbol.empty() && path != std::string::npos) outline[symbol] = value_after(at + path + 4);
    if (tag.rfind("<use", 0) == 0) letters += "|" + outline[value_after(at + use + 13)];
  }
  return letters;
}

/// How often an SVG picture has a text in letters of a size.
std::size_t written(const std::string& svg, const std::string& text, double size) {
  io::Canvas canvas(io::Canvas::Kind::svg, 1000, 100);
  io::TextStyle style;
  style.size = size;
  canvas.text({10.0, 50.0}, text, style);
  return test::count_of(letters_of(svg), letters_of(canvas.bytes()));
}

constexpr double name_size = 21.0;
constexpr double small_size = 18.0;

double peak_of(const io::Results& results, std::size_t bar) {
  const auto& figures = results.figures.fault->bars[bar].figures;
  return solver::find_figure(figures, "force_peak")->value;
}

}  // namespace

TEST_CASE(
    "The picture of a fault names every bar at its lines, of two bars and three, of AC and DC") {
  for (const io::Results* results :
       {&test::two_bar_fault(), &test::three_bar_fault(), &test::direct_fault()}) {
    const io::Pictures pictures = io::draw_fault_pictures(*results);
    CHECK(test::read_png(pictures.png).width == 1600);
    CHECK(test::parse_xml(pictures.svg).get<std::string>("svg.<xmlattr>.width") == "1600px");
    CHECK(test::count_of(pictures.svg, "href=\"http") == 0);
    for (int bar : results->input.fault->current.bars) {
      const std::string& name = results->input.section.parts[static_cast<std::size_t>(bar)].name;
      INFO(name);
      // Forces and currents; a heading in letters of the same size names the first bar.
      const std::size_t heading = test::count_of(io::fault_chart(*results).closing, name);
      CHECK(written(pictures.svg, name, name_size) == 2 + heading);
    }
    CHECK(written(pictures.svg, "another", name_size) == 0);
    CHECK(io::draw_fault_pictures(*results).svg == pictures.svg);
    CHECK(io::draw_fault_pictures(*results).png == pictures.png);
  }
}

TEST_CASE("The picture of a fault says the largest forces that the figures have") {
  const io::Results& given = test::three_bar_fault();
  const std::string svg = io::draw_fault_pictures(given).svg;
  for (std::size_t bar = 0; bar < 3; ++bar) {
    const auto& figures = given.figures.fault->bars[bar].figures;
    const double after = solver::find_figure(figures, "force_peak_after")->value;
    std::ostringstream remark;
    remark << io::quantity_text(peak_of(given, bar), "N/m") << " at " << std::setprecision(3)
           << 1e3 * after << " ms";
    INFO(remark.str());
    CHECK(written(svg, remark.str(), small_size) == 1);
  }
  // With the worst closing at least the largest of all is reached.
  const io::FaultChart worst = io::fault_chart(test::two_bar_fault());
  CHECK(worst.forces.lines[0].mark->value ==
        Approx(peak_of(test::two_bar_fault(), 0)).epsilon(1e-4));
  // A direct current's force is approached, never reached.
  const io::FaultChart rise = io::fault_chart(test::direct_fault());
  CHECK(rise.forces.lines[0].mark->seconds == Approx(5 * 0.012));
  CHECK(rise.forces.lines[0].mark->value < peak_of(test::direct_fault(), 0));
  CHECK(rise.forces.lines[0].mark->remark.find("N/m and rising at 60 ms") != std::string::npos);
}

TEST_CASE("The picture of a fault says how it was closed") {
  const io::FaultChart given = io::fault_chart(test::three_bar_fault());
  CHECK(given.fault == "Short circuit between L1, L2, \"middle\", L3: force per metre of run");
  CHECK(given.closing ==
        "20.00 kA symmetrical, R/X 0.1; closing at 37\u00b0 of L1's driving voltage");
  CHECK(given.note.find("can belong to another closing") == std::string::npos);
  // Two bars have one current: all forces are largest together.
  const io::FaultChart pair = io::fault_chart(test::two_bar_fault());
  CHECK(pair.closing.find("; worst closing: ") != std::string::npos);
  CHECK(pair.note.find("can belong to another closing") == std::string::npos);
  CHECK(io::fault_chart(test::direct_fault()).closing ==
        "Direct current, rising to 20.00 kA with a time constant of 12 ms");
  io::Results worst = test::three_bar_fault();
  std::get<solver::AlternatingFault>(worst.input.fault->current.course).closing.reset();
  CHECK(io::fault_chart(worst).note.find("can belong to another closing") != std::string::npos);
}

TEST_CASE("Where a bar's own force is not given, that of its body is drawn") {
  const std::string copper_bar =
      test::two_round_bars("[material.mild]\nrelative_permeability = 100",
                           "direct_ka = 20\ntime_constant_ms = 12\n") +
      "[[wall]]\nname = \"plate\"\nmaterial = \"mild\"\n"
      "rectangle_mm = { centre = [65, 0], size = [10, 40] }\n";
  const std::string steel_bar =
      test::edited(copper_bar, "name = \"minus\"", "name = \"minus\"\nmaterial = \"mild\"");
  for (const std::string& text : {copper_bar, steel_bar}) {
    const io::FaultChart chart = io::fault_chart(io::run_case(test::read_text(text)));
    REQUIRE(chart.forces.lines.size() == 2);
    CHECK(chart.forces.lines[0].name == "plus");
    CHECK(chart.forces.lines[1].name == (text == steel_bar ? "minus+plate" : "minus"));
    CHECK(chart.forces.lines[1].values.back() > 0.0);
    CHECK(chart.currents.lines[1].name == "minus");
  }
}

TEST_CASE("A panel draws its lines where their values are, and both of two that coincide") {
  io::LinePanel panel{"Force", "N/m", {0.0, 0.05, 0.1}, {}};
  panel.lines.push_back({"below", 0, {2700.0, 2700.0, 2700.0}});
  const io::PageBox box{{150.0, 20.0}, {650.0, 320.0}};
  // 2.7 kN/m of 2.7 with 8 % of room above.
  const double y = box.high.y - 300.0 / 1.08;
  const auto count = [&](std::uint32_t rgb) {
    io::Canvas canvas(io::Canvas::Kind::png, 900, 400);
    io::draw_panel(canvas, panel, box, true);
    const io::Bitmap bitmap = test::read_png(canvas.bytes());
    int found = 0;
    for (double x = box.low.x + 5.0; x < box.high.x - 5.0; x += 1.0) {
      found += test::pixel(bitmap, {x, y}) == rgb ? 1 : 0;
    }
    return found;
  };
  constexpr std::uint32_t blue = 0x0072b2;
  constexpr std::uint32_t orange = 0xe69f00;
  CHECK(count(blue) == 490);
  CHECK(count(orange) == 0);
  panel.lines.push_back({"above", 1, panel.lines[0].values});
  CHECK(count(blue) > 100);
  CHECK(count(orange) > 200);
}

TEST_CASE("Names at the ends of lines do not overlap, and long ones go on in a second line") {
  io::LinePanel panel{"Force", "N/m", {0.0, 1.0}, {}};
  const std::string first = "feeder from the switchboard of the north wing,";
  panel.lines.push_back({first + " L1", 0, {0.0, 0.0}});
  panel.lines.push_back({first + " L2", 1, {0.0, 1e-3}});
  panel.lines.push_back({"N", 2, {0.0, 5.0}});
  io::Canvas canvas(io::Canvas::Kind::svg, 900, 400);
  CHECK(io::width_of_names(canvas, panel) < 400.0);
  io::draw_panel(canvas, panel, {{150.0, 20.0}, {500.0, 320.0}}, false);
  const std::string svg = canvas.bytes();
  CHECK(written(svg, "L1", small_size) == 1);
  CHECK(written(svg, "L2", small_size) == 1);
  CHECK(written(svg, "N", name_size) == 1);
  // Baselines of the letters beside the box, each line of text once.
  std::vector<double> lines;
  for (std::size_t at = svg.find("<use"); at != std::string::npos; at = svg.find("<use", at + 1)) {
    const double x = std::stod(svg.substr(svg.find(" x=\"", at) + 4));
    const double base = std::stod(svg.substr(svg.find(" y=\"", at) + 4));
    if (x > 520.0 && (lines.empty() || lines.back() != base)) lines.push_back(base);
  }
  std::sort(lines.begin(), lines.end());
  REQUIRE(lines.size() == 5);
  for (std::size_t k = 1; k < lines.size(); ++k) CHECK(lines[k] - lines[k - 1] > small_size);
  CHECK(lines.back() < 320.0);
}

TEST_CASE("The section's picture, the report and the summary show a fault whose course is known") {
  const io::Results& with = test::two_bar_fault();
  const io::Results& unknown = test::fault_without_course();
  const io::Pictures picture = io::draw_pictures(with);
  const io::Pictures plain = io::draw_pictures(unknown);
  CHECK(test::read_png(picture.png).height ==
        test::read_png(plain.png).height + static_cast<int>(io::fault_forces_height));
  CHECK(written(picture.svg, "Time since closing in ms", 20.0) == 1);
  CHECK(written(plain.svg, "Time since closing in ms", 20.0) == 0);

  const std::string page = io::report_html(with, "picture", "fault");
  CHECK_NOTHROW(test::parse_xml(page));
  CHECK(test::count_of(page, "src=\"") == 2);
  CHECK(test::count_of(page, "src=\"data:image/png;base64,ZmF1bHQ=\"") == 1);
  CHECK(test::count_of(page, "no dynamic factor") == 0);  // no supports here
  CHECK(test::count_of(io::report_html(unknown, "picture"), "src=\"") == 1);

  const std::string line = "  over time: fault_forces.csv, fault.png\n";
  CHECK(test::count_of(io::summary(with, "results/case", false), line) == 1);
  CHECK(test::count_of(io::summary(unknown, "results/case", false), line) == 0);
}

TEST_CASE("The report shows the folder's picture of the fault, and draws it where there is none") {
  const test::ScratchFolder folder;
  folder.write("picture.png", "this one");
  const auto page = [&] {
    io::write_report(test::two_bar_fault(), folder.path());
    std::ifstream stream(folder.path() / "report.html", std::ios::binary);
    return std::string(std::istreambuf_iterator<char>(stream), {});
  };
  const std::string drawn = io::draw_fault_pictures(test::two_bar_fault()).png;
  CHECK(page() == io::report_html(test::two_bar_fault(), "this one", drawn));
  folder.write("fault.png", "that one");
  CHECK(page() == io::report_html(test::two_bar_fault(), "this one", "that one"));
}

}  // namespace barwall
