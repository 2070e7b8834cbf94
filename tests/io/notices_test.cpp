#include <algorithm>
#include <catch2/catch.hpp>
#include <nlohmann/json.hpp>
#include <sstream>

#include "io/printable_text.hpp"
#include "io/report.hpp"
#include "io/results_json.hpp"
#include "io/summary.hpp"
#include "tests/io/picture_support.hpp"
#include "tests/io/program_support.hpp"

using namespace barwall;
using test::edited;
using test::read_text;

namespace {

/// Three round bars whose order is against their names, the last one in a steel pipe; what they
/// leave of a net current comes with a fourth.
const std::string busy_case = R"(frequency_hz = 50
run_length_m = 1
[material.mild]
relative_permeability = 300
resistivity_ohm_m = 1.6e-7
[[bar]]
name = "L1"
round_mm = { centre = [-80, 0], diameter = 24 }
[[bar]]
name = "L2"
round_mm = { centre = [0, 0], diameter = 24 }
[[bar]]
name = "L3"
round_mm = { centre = [80, 0], diameter = 24 }
[[three_phase]]
bars = ["L1", "L3", "L2"]
current_a = 100
[[bar]]
name = "earth"
current_a = 5
round_mm = { centre = [0, 60], diameter = 8 }
[[wall]]
name = "pipe"
material = "mild"
tube_mm = { centre = [80, 0], outer_diameter = 60, thickness = 4 }
[[wall]]
name = "cover"
material = "aluminium"
rectangle_mm = { centre = [0, -60], size = [200, 13] }
[[probe]]
name = "sensor"
at_mm = [0, 30]
[grid]
cells_across = 3
reach = 20
)";

/// All blanks and line ends as one blank, so that wrapping does not count.
std::string one_line(const std::string& text) {
  std::istringstream words(text);
  std::string line;
  for (std::string word; words >> word;) line += word + " ";
  return line;
}

std::vector<std::string> names_of(const io::Results& results) {
  std::vector<std::string> names;
  for (const solver::Notice& notice : results.figures.notices) names.push_back(notice.name);
  return names;
}

}  // namespace

TEST_CASE("Every notice stands in the summary, the report and figures.json with its place") {
  const io::Results results = io::run_case(read_text(busy_case));
  CHECK(names_of(results) ==
        std::vector<std::string>{"phase order", "net current", "closed steel loop", "skin depth",
                                 "skin depth", "skin depth", "end effect", "end effect"});
  CHECK(results.validity() == "indicative");
  const std::string summary = one_line(io::summary(results, "results/busy", false));
  const std::string report = io::report_html(results, "");
  const auto json = nlohmann::json::parse(io::figures_json(results));
  REQUIRE(json["notices"].size() == results.figures.notices.size());
  for (std::size_t k = 0; k < results.figures.notices.size(); ++k) {
    const solver::Notice& notice = results.figures.notices[k];
    INFO(notice.name << ": " << notice.detail);
    CHECK(summary.find(notice.name + ": " + notice.detail + " ") != std::string::npos);
    CHECK(test::count_of(report, "<dd>" + io::escaped(notice.detail) + "</dd>") == 1);
    CHECK(json["notices"][k]["name"] == notice.name);
    CHECK(json["notices"][k]["detail"] == notice.detail);
    const bool names_a_place = notice.detail.find('"') != std::string::npos;
    CHECK(names_a_place == (notice.name != "net current"));
  }
}

TEST_CASE("No notice takes more than four lines of the summary") {
  const io::Results results = io::run_case(read_text(busy_case));
  const std::string text = io::summary(results, "results/busy", false);
  const std::size_t from = text.find("\nNotices\n");
  REQUIRE(from != std::string::npos);
  int lines = 0;
  std::istringstream stream(text.substr(from + 9));
  for (std::string line; std::getline(stream, line) && !line.empty();) {
    const bool begins = std::any_of(
        results.figures.notices.begin(), results.figures.notices.end(),
        [&](const auto& notice) { return line.rfind("  " + notice.name + ": ", 0) == 0; });
    lines = begins ? 1 : lines + 1;
    INFO(line);
    CHECK(lines <= 4);
  }
  CHECK(lines > 0);
}

TEST_CASE("Two bars of 8 mm with a balanced steady current raise no notice") {
  const io::Results results = io::run_case(read_text(test::two_bars));
  CHECK(results.figures.notices.empty());
  CHECK(results.validity() == "full");
}

TEST_CASE("A net current has its notice, a balanced one has none") {
  const std::string net = edited(test::two_bars, "\"balance\"", "-40");
  CHECK(names_of(io::run_case(read_text(net))) == std::vector<std::string>{"net current"});
}

TEST_CASE("A material's resistivity is read, shown with its origin, and moves the skin depth") {
  const io::Case read = read_text(busy_case);
  CHECK(read.materials[4].name == "mild");
  CHECK(read.materials[4].resistivity == 1.6e-7);
  CHECK_FALSE(read.materials[0].resistivity.has_value());

  const io::Results results = io::run_case(read);
  const std::string report = io::report_html(results, "");
  CHECK(test::count_of(report, "<td>160.0 n\u03a9 m</td>") == 1);
  CHECK(test::count_of(report, "<td>17.24 n\u03a9 m, typical at 20 \u00b0C</td>") == 4);
  CHECK(test::count_of(io::report_html(test::plate_results(), ""), "Resistivity") == 0);

  const io::Results poor =
      io::run_case(read_text(edited(busy_case, "ohm_m = 1.6e-7", "ohm_m = \"1/10\"")));
  for (const solver::Notice& notice : poor.figures.notices) {
    CHECK(notice.detail.find("\"pipe\" is thicker") == std::string::npos);
  }
}
