#include <catch2/catch.hpp>
#include <sstream>

#include "io/plain_table.hpp"
#include "io/quantity_text.hpp"
#include "io/summary.hpp"
#include "tests/io/case_support.hpp"
#include "tests/io/fault_support.hpp"
#include "tests/io/program_support.hpp"

using namespace barwall;

namespace {

/// Results of a small case, made as full as a summary can be.
io::Results crowded(bool alternating) {
  std::string text = test::two_bars;
  if (alternating) text = test::edited(text, "[given]", "frequency_hz = 50\n[given]");
  io::Results results = io::run_case(test::read_text(text));
  results.input.title = std::string(40, 'w') + " title " + std::string(150, 'x');
  const std::string long_name(60, 'N');
  for (int k = 0; k < 30; ++k) {
    const std::string name = long_name.substr(0, 58) + std::to_string(10 + k);
    for (auto* entries : {&results.figures.bars, &results.figures.loops}) {
      entries->push_back(entries->front());
      entries->back().name = name;
    }
    solver::ProbeFigures probe = results.figures.probes.back();
    probe.probe.name = name;
    probe.probe.limit_from =
        "a source with a long name, edition after edition, " + long_name + name;
    probe.figures.push_back({"limit", 2e-4, "T"});
    probe.figures.push_back({"of_limit", 0.5, "1"});
    probe.limit_state = k == 29 ? solver::LimitState::exceeded : solver::LimitState::met;
    probe.largest_at = {-9876.5432, 9876.5432};
    results.figures.probes.push_back(probe);
    results.figures.walls.push_back(
        {name, {}, {{"b_mean", 0.1, "T"}, {"b_high", 0.2, "T"}}, {}, 0.0});
    results.figures.notices.push_back({name, "a remark " + long_name + " " + text, false});
    results.checks.push_back(verify::make_check(name, 0.1, 0.005, "worst: " + long_name + name));
  }
  return results;
}

std::vector<std::string> lines_of(const std::string& text) {
  std::vector<std::string> lines;
  std::istringstream stream(text);
  for (std::string line; std::getline(stream, line);) lines.push_back(line);
  return lines;
}

}  // namespace

TEST_CASE("No line of a summary exceeds its columns or ends in a blank, however long the names") {
  for (const bool alternating : {false, true}) {
    const io::Results results = crowded(alternating);
    for (const bool colour : {false, true}) {
      for (const std::string& line : lines_of(io::summary(results, "results/case", colour))) {
        INFO(line);
        CHECK(io::text_width(line) <= io::summary_width);
        CHECK((line.empty() || line.back() != ' '));
      }
    }
  }
}

TEST_CASE("A fault between bars with long names keeps to the summary's columns") {
  const std::string long_name(60, 'N');
  const std::string text =
      test::edited(test::edited(test::two_round_bars("", "direct_ka = 20\ntime_constant_ms = 12\n"),
                                "\"minus\"]", "\"" + long_name + "\"]"),
                   "\"minus\"", "\"" + long_name + "\"");
  const io::Results results = io::run_case(test::read_text(text));
  const std::string shown = io::summary(results, "results/case", false);
  CHECK(shown.find("Fault between plus, " + long_name) != std::string::npos);
  for (const std::string& line : lines_of(shown)) CHECK(io::text_width(line) <= io::summary_width);
}

TEST_CASE("A summary shows what is exceeded first and says how much is left out") {
  const std::string text = io::summary(crowded(false), "results/case", false);
  CHECK(text.find("EXCEEDED") != std::string::npos);
  CHECK(text.find("and 20 more in figures.csv") != std::string::npos);
  CHECK(text.find("FAILED") != std::string::npos);
  CHECK(
      text.find("Verdict: unsound, do not use the numbers.  Validity: full.  Limits: exceeded.") !=
      std::string::npos);
  CHECK(text.find("Results: results/case\nReport:  results/case/report.html\n") !=
        std::string::npos);
  CHECK(text.find('\x1b') == std::string::npos);
}

TEST_CASE("Verdict, validity and limits stand on one line") {
  io::Results results = io::run_case(test::read_text(test::two_bars));
  results.checks = {verify::make_check("one", 0.1, 1.0, "")};
  CHECK(io::verdict_line(results, false) == "Verdict: sound.  Validity: full.  Limits: none.\n");
  results.checks.push_back(verify::make_check("other", 2.0, 1.0, "here"));
  results.figures.notices.push_back({"short run", "", true});
  CHECK(io::verdict_line(results, false) ==
        "Verdict: unsound, do not use the numbers.  Validity: indicative.  Limits: none.\n");
  CHECK(io::checks_table(results, false).find("other failed: here") != std::string::npos);
  results.checks.clear();
  CHECK(io::verdict_line(results, false).find("unsound") != std::string::npos);
}

TEST_CASE("Quantities are shown with the prefix that fits") {
  CHECK(io::quantity_text(187.34e-6, "T") == "187.3 µT");
  CHECK(io::quantity_text(1.234e-3, "T") == "1.234 mT");
  CHECK(io::quantity_text(-12.345, "N/m") == "-12.35 N/m");
  CHECK(io::quantity_text(23456.0, "N/m") == "23.46 kN/m");
  CHECK(io::quantity_text(0.0, "N/m") == "0 N/m");
  CHECK(io::quantity_text(118.69e-6, "ohm/m") == "118.7 µΩ/m");
  CHECK(io::quantity_text(0.99999e-3, "T") == "1.000 mT");
  CHECK(io::quantity_text(999.96, "T") == "1.000 kT");
  CHECK(io::quantity_text(999.94, "T") == "999.9 T");
  CHECK(io::quantity_text(solver::not_given, "T") == "-");
  CHECK(io::quantity_text({"b", 187.34e-6, "T", 0.41e-6}) == "187.3 ± 0.41 µT");
}

TEST_CASE("Directions are counter-clockwise from the right") {
  CHECK(io::direction_text(0.0) == "right (0°)");
  CHECK(io::direction_text(-0.2) == "right (0°)");
  CHECK(io::direction_text(90.0) == "up (90°)");
  CHECK(io::direction_text(-179.97) == "left (180°)");
  CHECK(io::direction_text(-90.0) == "down (270°)");
  CHECK(io::direction_text(45.0) == "up right (45°)");
  CHECK(io::direction_text(359.6) == "right (0°)");
  CHECK(io::direction_text(solver::not_given).empty());
}

TEST_CASE("Texts are measured in characters, clipped and wrapped") {
  CHECK(io::text_width("µT") == 2);
  CHECK(io::text_width("\x1b[31mred\x1b[0m") == 3);
  CHECK(io::clipped("µµµµ", 4) == "µµµµ");
  CHECK(io::clipped("µµµµµ", 4) == "µµµ…");
  CHECK(io::wrapped("one two three", 2, 9) == "  one two\n  three\n");
  io::PlainTable table("lr");
  table.add({"a", "1.0"});
  table.add({"long", "10.0"});
  CHECK(table.text(80) == "  a      1.0\n  long  10.0\n");
}
