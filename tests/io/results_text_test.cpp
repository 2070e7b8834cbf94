#include <algorithm>
#include <catch2/catch.hpp>
#include <cmath>
#include <nlohmann/json.hpp>
#include <sstream>

#include "io/results_csv.hpp"
#include "io/results_json.hpp"
#include "io/tidy_figures.hpp"
#include "io/version.hpp"
#include "tests/io/case_support.hpp"
#include "tests/io/csv_support.hpp"
#include "tests/io/program_support.hpp"

using namespace barwall;
using Json = nlohmann::ordered_json;

namespace {

/// Two pieces of one bar, a three-phase circuit, a limit, walls in contact: every kind of entry.
const std::string alternating_case = R"(title = "Every kind of entry, \"quoted\""
frequency_hz = 50
run_length_m = 6
[given]
pitch_mm = 60
[material.trunking]
relative_permeability = 600
[[bar]]
name = "L1"
rectangle_mm = { centre = ["-pitch_mm", 0], size = [8, 80] }
[[bar]]
name = "L2"
rectangle_mm = { centre = [0, 0], size = [8, 80] }
[[bar]]
name = "L3"
rectangle_mm = { centres = [["pitch_mm", 0], ["pitch_mm + 14", 0]], size = [8, 80] }
[[three_phase]]
bars = ["L1", "L2", "L3"]
current_a = 1000
[[wall]]
name = "lid, top"
material = "trunking"
rectangle_mm = { centre = [0, 80], size = [200, 4] }
[[wall]]
name = "side"
material = "trunking"
rectangle_mm = { centre = [98, 60], size = [4, 36] }
[[probe]]
name = "sensor"
at_mm = [0, 95]
limit_ut = 200
limit_from = "the limit's own source"
[[probe]]
name = "line"
from_mm = [-100, 120]
to_mm = [100, 120]
points = 5
limit_ut = 1e6
limit_from = "the limit's own source"
[grid]
cells_across = 2
)";

const io::Results& steady() {
  static const io::Results results = io::run_case(test::read_text(test::two_bars));
  return results;
}

const io::Results& alternating() {
  static const io::Results results = io::run_case(test::read_text(alternating_case));
  return results;
}

/// The name by which an address knows an entry: its own, or its parts' joined.
std::string name_of(const Json& entry) {
  for (const char* key : {"name", "side"}) {
    if (entry.contains(key)) return entry[key].get<std::string>();
  }
  std::string joined;
  for (const char* key : {"parts", "bars", "between"}) {
    if (!entry.contains(key)) continue;
    for (const Json& part : entry[key]) {
      if (!joined.empty()) joined += key == std::string("between") ? '-' : '+';
      joined += part.get<std::string>();
    }
  }
  return joined;
}

const Json* named(const Json& list, const std::string& name) {
  for (const Json& entry : list) {
    if (name_of(entry) == name) return &entry;
  }
  return nullptr;
}

/// The figure at an address: list/name/key, list/name/pieces/piece/key, the same of faces, or key
/// alone.
Json at_address(const Json& json, const std::string& address) {
  std::vector<std::string> steps;
  std::istringstream text(address);
  for (std::string step; std::getline(text, step, '/');) steps.push_back(step);
  const Json* here = &json;
  for (std::size_t k = 0; k + 1 < steps.size(); k += 2) {
    if (!here->contains(steps[k])) return nullptr;
    here = named((*here)[steps[k]], steps[k + 1]);
    if (here == nullptr) return nullptr;
  }
  return here->contains(steps.back()) ? (*here)[steps.back()] : Json(nullptr);
}

/// Every figure object anywhere has exactly a value, a unit and an uncertainty.
void check_figures(const Json& json) {
  if (json.is_object() && json.contains("value")) {
    CHECK(json.size() == 3);
    CHECK((json["value"].is_number() || json["value"].is_null()));
    CHECK(json["unit"].is_string());
    CHECK((json["plus_minus"].is_number() || json["plus_minus"].is_null()));
    return;
  }
  if (json.is_structured()) {
    for (const Json& inner : json) check_figures(inner);
  }
}

}  // namespace

TEST_CASE("Every figure is read back from figures.json at its address, as the number it was") {
  for (const io::Results* results : {&steady(), &alternating()}) {
    const Json json = Json::parse(io::figures_json(*results));
    check_figures(json);
    double largest_force = 0.0;
    for (const auto& [address, figure] : addresses(results->figures)) {
      if (figure->unit == "N/m" && std::isfinite(figure->value)) {
        largest_force = std::max(largest_force, std::abs(figure->value));
      }
    }
    int compared = 0;
    for (const auto& [address, figure] : addresses(results->figures)) {
      INFO(address);
      const Json found = at_address(json, address);
      REQUIRE(found.is_object());
      CHECK(found["unit"] == figure->unit);
      if (!std::isfinite(figure->value)) {
        CHECK(found["value"].is_null());
        continue;
      }
      if (found["value"].is_null()) continue;  // the direction of a force that vanishes
      const double margin = figure->unit == "N/m" ? 1e-11 * largest_force : 1e-14;
      CHECK(found["value"].get<double>() == Approx(figure->value).epsilon(1e-9).margin(margin));
      ++compared;
    }
    CHECK(compared > 10);
  }
}

TEST_CASE("figures.json tells the case, the grid, the checks and the verdict") {
  const io::Results& results = alternating();
  const Json json = Json::parse(io::figures_json(results));
  CHECK(json["format"] == 1);
  CHECK(json["barwall"] == io::version());
  CHECK(json["case"]["title"] == "Every kind of entry, \"quoted\"");
  CHECK(json["case"]["sha256"] == results.input.sha256);
  CHECK(json["case"]["currents"] == "alternating");
  CHECK(json["case"]["frequency_hz"] == 50.0);
  CHECK(json["case"]["given"]["pitch_mm"] == 60.0);
  CHECK(json["grid"]["nodes"] == results.problem->grid->node_count());
  CHECK(json["bars"][1]["current_a"] == 1000.0);
  CHECK(json["bars"][1]["phase_deg"] == -120.0);
  CHECK(json["bars"][2]["pieces"].size() == 2);
  CHECK(json["bodies"][0]["parts"] == Json({"lid, top", "side"}));
  CHECK(json["walls"][0]["force_mean_x"]["value"].is_null());
  CHECK(json["circuits"][0]["bars"] == Json({"L1", "L2", "L3"}));
  CHECK(json["probes"][0]["limit_met"] == false);
  CHECK(json["probes"][1]["limit_met"] == true);
  CHECK(json["probes"][1]["points"].size() == 5);
  CHECK(json["probes"][1]["limit_from"] == "the limit's own source");
  CHECK(json["checks"].size() == results.checks.size());
  CHECK(json["notices"][0]["name"] == results.figures.notices[0].name);
  CHECK(json["verdict"] == results.verdict());
  CHECK(json["validity"] == results.validity());
  CHECK(json["limits"] == "exceeded");

  const Json direct = Json::parse(io::figures_json(steady()));
  CHECK(direct["case"]["currents"] == "steady");
  CHECK_FALSE(direct["case"].contains("frequency_hz"));
  CHECK_FALSE(direct["bars"][0].contains("phase_deg"));
  CHECK(direct["bars"][1]["current_a"] == -100.0);
}

TEST_CASE("The place of a line's largest field is one of its points, where the field is that") {
  const Json json = Json::parse(io::figures_json(alternating()));
  const Json& line = json["probes"][1];
  bool found = false;
  for (const Json& point : line["points"]) {
    if (point["x_mm"] != line["x_mm"] || point["y_mm"] != line["y_mm"]) continue;
    found = true;
    CHECK(point["b_rms"] == line["b_rms_max"]);
  }
  CHECK(found);
}

TEST_CASE("The same case gives the same bytes") {
  const io::Results again = io::run_case(test::read_text(test::two_bars));
  CHECK(io::figures_json(again) == io::figures_json(steady()));
  CHECK(io::figures_csv(again) == io::figures_csv(steady()));
  CHECK(io::probes_csv(again) == io::probes_csv(steady()));
}

TEST_CASE("figures.csv holds the values of figures.json, address by address") {
  for (const io::Results* results : {&steady(), &alternating()}) {
    const Json json = Json::parse(io::figures_json(*results));
    const auto rows = test::csv_rows(io::figures_csv(*results));
    REQUIRE(rows.front() == std::vector<std::string>{"address", "value", "unit", "plus_minus",
                                                     "hand", "ratio", "limit", "of_limit"});
    CHECK(rows.size() == 1 + addresses(results->figures).size() + 2 * results->checks.size());
    for (std::size_t k = 1; k < rows.size(); ++k) {
      REQUIRE(rows[k].size() == 8);
      INFO(rows[k][0]);
      const Json figure = at_address(json, rows[k][0]);
      REQUIRE(figure.is_object());
      CHECK(figure["unit"] == rows[k][2]);
      if (rows[k][1].empty()) {
        CHECK(figure["value"].is_null());
      } else {
        CHECK(std::stod(rows[k][1]) == figure["value"].get<double>());
      }
    }
  }
}

TEST_CASE("figures.csv sets a probe's limit beside its field") {
  const auto rows = test::csv_rows(io::figures_csv(alternating()));
  int seen = 0;
  for (const auto& row : rows) {
    if (row[0] != "probes/sensor/b_rms" && row[0] != "probes/line/b_rms_max") continue;
    ++seen;
    CHECK(std::stod(row[1]) / std::stod(row[6]) == Approx(std::stod(row[7])).epsilon(1e-8));
  }
  CHECK(seen == 2);
}

TEST_CASE("probes.csv has a line for every point of every probe") {
  const auto direct = test::csv_rows(io::probes_csv(steady()));
  REQUIRE(direct.size() == 7);
  CHECK(direct[0] == std::vector<std::string>{"probe", "x_mm", "y_mm", "b_x_t", "b_y_t", "b_t"});
  CHECK(direct[1][0] == "sensor");
  CHECK(direct[2][0] == "beside, above");
  for (std::size_t k = 1; k < direct.size(); ++k) {
    CHECK(std::hypot(std::stod(direct[k][3]), std::stod(direct[k][4])) ==
          Approx(std::stod(direct[k][5])).epsilon(1e-9));
  }
  const auto cycle = test::csv_rows(io::probes_csv(alternating()));
  CHECK(cycle[0] == std::vector<std::string>{"probe", "x_mm", "y_mm", "b_rms_t", "b_peak_t"});
  CHECK(
      std::stod(cycle[1][3]) ==
      Approx(solver::find_figure(alternating().figures.probes[0].points[0].figures, "b_rms")->value)
          .epsilon(1e-9));
}

TEST_CASE("Numbers are written to ten digits, without a minus before zero") {
  CHECK(io::to_ten_digits(1.0 / 3.0) == 0.3333333333);
  CHECK(io::number_text(io::to_ten_digits(2.0e-7 / 3.0)) == "6.666666667e-08");
  CHECK(io::number_text(io::to_ten_digits(-0.0)) == "0");
  CHECK(io::number_text(io::to_ten_digits(-1e-320 * 1e-10)) == "0");
  CHECK(io::number_text(io::to_ten_digits(solver::not_given)).empty());
  CHECK(io::to_digits(0.0123456, 4) == 0.01235);
}

TEST_CASE("What vanishes but for rounding is written as zero, and has no direction") {
  solver::Figures figures;
  figures.bars.push_back({"A", {}, {{"force_x", 3.0, "N/m"}, {"force_y", 2e-12, "N/m"}}, {}, 1.0});
  figures.bars.push_back(
      {"B", {}, {{"force_x", -4e-13, "N/m"}, {"force_y", 1e-9, "N/m"}}, {}, 0.0});
  figures.bars.push_back({"C",
                          {},
                          {{"force_peak", 1e-15, "N/m"},
                           {"force_peak_at", 31.0, "deg"},
                           {"force_peak_direction", 12.0, "deg"}},
                          {},
                          0.0});
  const solver::Figures tidied = io::tidy(figures);
  CHECK(tidied.bars[0].figures[0].value == 3.0);
  CHECK(tidied.bars[0].figures[1].value == 0.0);
  CHECK(tidied.bars[1].figures[0].value == 0.0);
  CHECK(tidied.bars[1].figures[1].value == 1e-9);
  CHECK(tidied.bars[2].figures[0].value == 0.0);
  CHECK(std::isnan(tidied.bars[2].figures[1].value));
  CHECK(std::isnan(tidied.bars[2].figures[2].value));

  const auto checks = io::tidy({verify::make_check("identity", 3e-15, 1e-6, ""),
                                verify::make_check("error", 0.00123456, 0.005, ""),
                                verify::make_check("nothing", solver::not_given, 0.005, "")});
  CHECK(checks[0].measured == 0.0);
  CHECK(checks[1].measured == 0.001235);
  CHECK(std::isnan(checks[2].measured));
}

TEST_CASE("Fields of a CSV line are quoted where they have to be") {
  CHECK(io::csv_field("L1") == "L1");
  CHECK(io::csv_field("a,b") == "\"a,b\"");
  CHECK(io::csv_field("5\" pipe") == "\"5\"\" pipe\"");
}
