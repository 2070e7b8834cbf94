#include "io/ladder_table.hpp"

#include <catch2/catch.hpp>
#include <cmath>
#include <cstdlib>
#include <memory>
#include <sstream>
#include <string>
#include <vector>

using namespace barwall;

namespace {

/// A problem whose errors are given powers of the number of lines, nothing solved.
verify::LadderProblem sham(std::string name, double size, double power) {
  verify::LadderProblem problem;
  problem.name = std::move(name);
  problem.section.parts = {
      {"bar", mesh::Part::Kind::bar, {mesh::Rectangle{{}, 0.01, 0.02, 0.0}}, false, false}};
  problem.grid.reach = 5.0;
  const auto lines = static_cast<double>(grid_of(problem, 6)->columns - 1);
  problem.quantities = {{"B off outlines", verify::error_band(1e-3)},
                        {"force on currents", verify::error_band(1e-3)}};
  problem.errors = [=](const std::shared_ptr<const mesh::FittedGrid>& grid) {
    const double error = size * std::pow(lines / (grid->columns - 1), power);
    return std::vector<double>{1e-3 * std::pow(lines / (grid->columns - 1), 2.0), error};
  };
  return problem;
}

struct Printed {
  int code;
  std::vector<std::string> lines;
};

Printed print(const std::vector<verify::LadderProblem>& problems) {
  char* text = nullptr;
  std::size_t size = 0;
  std::FILE* out = open_memstream(&text, &size);
  const int code = io::print_ladder(out, problems);
  std::fclose(out);
  std::istringstream stream(std::string(text, size));
  std::free(text);
  Printed printed{code, {}};
  for (std::string line; std::getline(stream, line);) printed.lines.push_back(line);
  return printed;
}

}  // namespace

TEST_CASE("the ladder's table is aligned and at most 100 columns wide") {
  const auto [code, lines] = print({sham("one", 1e-3, 2.0), sham("two", 1.9e-3, 1.8)});
  CHECK(code == 0);
  std::vector<std::size_t> ends;
  for (const std::string& line : lines) {
    CHECK(line.size() <= 100);
    CHECK((line.empty() || line.back() != ' '));
    if (line.ends_with("in band")) ends.push_back(line.size());
  }
  REQUIRE(ends.size() == 4);
  for (std::size_t end : ends) CHECK(end == ends.front());
  CHECK(lines.back() == "All 4 errors and their orders are within their bands.");
}

TEST_CASE("one row out of its band makes the ladder fail and is marked") {
  for (const auto& bad : {sham("large", 2.1e-3, 2.0), sham("small", 2e-4, 2.0),
                          sham("first order", 1e-3, 1.0), sham("third order", 1e-3, 3.0)}) {
    const auto [code, lines] = print({sham("good", 1e-3, 2.0), bad});
    CHECK(code == 1);
    int marked = 0;
    for (const std::string& line : lines) marked += line.ends_with("OUT OF BAND") ? 1 : 0;
    CHECK(marked == 1);
    CHECK(lines.back() == "1 of 4 are out of band.");
  }
}

TEST_CASE("a ladder without problems proves nothing and fails") {
  CHECK(print({}).code == 1);
}
