#include <fmt/format.h>

#include <algorithm>
#include <catch2/catch.hpp>
#include <filesystem>
#include <fstream>
#include <nlohmann/json.hpp>
#include <regex>

#include "io/results.hpp"
#include "io/results_json.hpp"
#include "tests/io/program_support.hpp"

namespace barwall::io {
namespace {

namespace fs = std::filesystem;

const fs::path root = BARWALL_SOURCE_DIR;

std::vector<fs::path> shipped_cases() {
  std::vector<fs::path> cases;
  for (const auto& entry : fs::directory_iterator(root / "cases")) {
    if (entry.path().extension() == ".toml") cases.push_back(entry.path());
  }
  std::sort(cases.begin(), cases.end());
  return cases;
}

/// The first unit of power of any figure below a node of figures.json, or nothing: watts of losses
/// are no result of a static field.
std::string unit_of_power(const nlohmann::json& node) {
  static const std::regex power(R"((^|[^A-Za-z])[kMGmu]?(W|VA|var)([^A-Za-z]|$)|J/s|N m/s)");
  if (node.is_object() && node.contains("unit")) {
    const auto unit = node["unit"].get<std::string>();
    return std::regex_search(unit, power) ? unit : "";
  }
  if (!node.is_structured()) return "";
  for (const auto& child : node) {
    if (const std::string found = unit_of_power(child); !found.empty()) return found;
  }
  return "";
}

/// Newton's method on the finest grid: no more than so many steps.
void expect_converged(const std::vector<solver::NewtonReport>& reports, int most) {
  const solver::NewtonReport& finest = reports.back();
  INFO(fmt::format("residuals {:.2e}", fmt::join(finest.residuals, ", ")));
  CHECK(finest.converged);
  CHECK(finest.iterations <= most);
}

/// Of steady currents, which are solved to the end: few steps from the coarse grid's start, the
/// last of which squares the error.
void expect_quadratic(const std::vector<solver::NewtonReport>& reports) {
  if (reports.empty()) return;
  expect_converged(reports, 5);
  const auto& r = reports.back().residuals;
  REQUIRE(r.size() >= 3);
  const std::size_t last = r.size() - 1;
  CHECK(r[last] / r[last - 1] < 0.1 * r[last - 1] / r[last - 2]);
}

void expect_converged(const std::optional<solver::Instants>& instants) {
  if (!instants) return;
  for (const auto& solution : instants->solution) expect_converged(solution->newton, 12);
}

void expect_sound(const fs::path& file) {
  INFO(file.string());
  const Results results = run_case(read_case(file));
  for (const verify::Check& check : results.checks) {
    INFO(check.name << ": " << check.measured << ", limit " << check.limit << "; " << check.detail);
    CHECK(check.passed);
  }
  CHECK(results.verdict() == "sound");
  CHECK(results.exit_code() == 0);
  CHECK(results.problem->grid->node_count() < 150000);
  expect_quadratic(results.solution->newton);
  expect_converged(results.instants);
  if (results.fault) {
    expect_converged(results.fault->course);
    for (const auto& reports : results.fault->newton) expect_converged(reports, 12);
  }
  CHECK(unit_of_power(nlohmann::json::parse(figures_json(results))).empty());
}

}  // namespace

TEST_CASE(
    "every shipped case is sound on fewer than 150,000 nodes, keeps its limits and gives no "
    "power") {
  const auto cases = shipped_cases();
  CHECK(cases.size() >= 9);
  for (const fs::path& file : cases) expect_sound(file);
}

TEST_CASE("a unit of power is found wherever it stands in figures.json, and in no other unit") {
  const auto found = [](const std::string& unit) {
    return unit_of_power(
        {{"bars", {{{"name", "L1"}, {"loss", {{"value", 1.0}, {"unit", unit}}}}}}});
  };
  for (const char* unit : {"W", "W/m", "kW", "mW/m", "W/m3", "VA", "kvar", "J/s"}) {
    CHECK(found(unit) == unit);
  }
  for (const char* unit : {"Wb/m", "T", "N/m", "J/m", "H/m", "ohm/m", "A", "deg", "1", "s"}) {
    CHECK(found(unit).empty());
  }
}

TEST_CASE("every shipped case has its line in the list of cases and says that it is invented") {
  const std::string list = test::text_of_file(root / "cases/README.md");
  for (const fs::path& file : shipped_cases()) {
    INFO(file.string());
    CHECK(list.find("| `" + file.filename().string() + "` |") != std::string::npos);
    const std::string text = test::text_of_file(file);
    const std::string first_line = text.substr(0, text.find('\n'));
    CHECK(first_line.starts_with("# An invented "));
  }
}

TEST_CASE("the README's example of a case file is sound") {
  const std::string readme = test::text_of_file(root / "README.md");
  const std::string fence = "```toml\n";
  const std::size_t from = readme.find(fence);
  REQUIRE(from != std::string::npos);
  const std::size_t start = from + fence.size();
  const fs::path file = fs::path(BARWALL_BINARY_DIR) / "tests" / "readme_example.toml";
  std::ofstream(file) << readme.substr(start, readme.find("```", start) - start);
  expect_sound(file);
}

TEST_CASE("the README quotes the command that runs the tests") {
  const std::string script = test::text_of_file(root / ".ci/run");
  const std::size_t from = script.find("bash .ci/install");
  REQUIRE(from != std::string::npos);
  CHECK(test::text_of_file(root / "README.md").find("    " + script.substr(from)) !=
        std::string::npos);
}

}  // namespace barwall::io
