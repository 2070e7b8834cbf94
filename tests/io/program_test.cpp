#include <algorithm>
#include <catch2/catch.hpp>
#include <nlohmann/json.hpp>

#include "tests/io/case_support.hpp"
#include "tests/io/program_support.hpp"

using namespace barwall;
using test::run_barwall;
namespace fs = std::filesystem;

namespace {

const std::string with_limit =
    test::edited(test::two_bars, "at_mm = [20, 95]",
                 "at_mm = [20, 95]\nlimit_ut = 1\nlimit_from = \"the limit's own source\"");

nlohmann::json figures_in(const fs::path& folder) {
  return nlohmann::json::parse(test::text_of_file(folder / "figures.json"));
}

}  // namespace

TEST_CASE("A sound case exits with 0 and writes results/NAME") {
  const test::ScratchFolder scratch;
  scratch.write("pair.toml", test::two_bars);
  const auto run = run_barwall(scratch.path(), "solve pair.toml");
  CHECK(run.code == 0);
  CHECK(run.err.empty());
  CHECK(run.out.find("Verdict: sound.  Validity: full.  Limits: none.") != std::string::npos);
  const fs::path folder = scratch.path() / "results" / "pair";
  for (const char* name : {"figures.json", "figures.csv", "run.json", "probes.csv"}) {
    CHECK(fs::file_size(folder / name) > 0);
  }
  const auto record = nlohmann::json::parse(test::text_of_file(folder / "run.json"));
  CHECK(record["nodes"] == figures_in(folder)["grid"]["nodes"]);
  CHECK(record["solver"]["converged"] == true);
  CHECK(record["peak_memory_bytes"] > 1e6);
  CHECK(record["case"]["file"] == "../../pair.toml");
}

TEST_CASE("A failed check exits with 1, its results written") {
  const test::ScratchFolder scratch;
  scratch.write("coarse.toml", test::coarse_bars);
  const auto run = run_barwall(scratch.path(), "solve coarse.toml --out out");
  CHECK(run.code == 1);
  CHECK(run.out.find("unsound, do not use the numbers") != std::string::npos);
  CHECK(figures_in(scratch.path() / "out")["verdict"] == "unsound");
}

TEST_CASE("An exceeded limit exits with 4") {
  const test::ScratchFolder scratch;
  scratch.write("limit.toml", with_limit);
  CHECK(run_barwall(scratch.path(), "solve limit.toml --out out --quiet").code == 4);
  CHECK(figures_in(scratch.path() / "out")["limits"] == "exceeded");
}

TEST_CASE("Wrong input and wrong usage exit with 2 and write nothing") {
  const test::ScratchFolder scratch;
  scratch.write("pair.toml", test::two_bars);
  scratch.write("bad.toml", test::two_bars + "\n[grid]\ncells_acros = 3\n");
  const auto before = test::names_in(scratch.path());
  for (const char* arguments :
       {"", "solve", "solve none.toml", "solve bad.toml", "solve pair.toml --set gap_mm",
        "solve pair.toml --set gap=3", "solve pair.toml --set gap_mm=-5",
        "solve pair.toml --threads 0", "solve pair.toml --out ''",
        "solve pair.toml --out pair.toml", "solve pair.toml --colour", "solve pair.toml bad.toml",
        "weigh pair.toml", "verify bad.toml"}) {
    INFO(arguments);
    const auto run = run_barwall(scratch.path(), arguments);
    CHECK(run.code == 2);
    CHECK(run.out.empty());
    CHECK_FALSE(run.err.empty());
    CHECK(test::names_in(scratch.path()) == before);
  }
  CHECK(run_barwall(scratch.path(), "solve bad.toml").err.find("bad.toml:27:1") !=
        std::string::npos);
}

TEST_CASE("Without room for its files a run exits with 3 and leaves no trace") {
  const test::ScratchFolder scratch;
  scratch.write("pair.toml", test::two_bars);
  const auto before = test::names_in(scratch.path());
  const auto run = run_barwall(scratch.path(), "solve pair.toml --out a/b", "ulimit -f 4;");
  CHECK(run.code == 3);
  CHECK(run.err.find("a/b/figures.json: cannot be written whole: ") != std::string::npos);
  CHECK(test::names_in(scratch.path()) == before);
  CHECK(run_barwall(scratch.path(), "solve pair.toml --out a --quiet").code == 0);
  const std::string figures = test::text_of_file(scratch.path() / "a" / "figures.json");
  const auto names = test::names_in(scratch.path() / "a");
  CHECK(
      run_barwall(scratch.path(), "solve pair.toml --out a --set gap_mm=40", "ulimit -f 4;").code ==
      3);
  CHECK(test::names_in(scratch.path() / "a") == names);
  CHECK(test::text_of_file(scratch.path() / "a" / "figures.json") == figures);
}

TEST_CASE("Out of memory exits with 3 and leaves no trace") {
  const test::ScratchFolder scratch;
  scratch.write("pair.toml", test::two_bars);
  const auto before = test::names_in(scratch.path());
  // From ample room down to little more than the program takes to start.
  bool refused = false;
  for (int megabytes = 640; megabytes >= 160; megabytes -= 80) {
    for (const char* threads : {" --threads 1", " --threads 2"}) {
      const auto run =
          run_barwall(scratch.path(), std::string("solve pair.toml --out out") + threads,
                      "ulimit -v " + std::to_string(1024 * megabytes) + ";");
      INFO(megabytes << " MB" << threads << ": " << run.err);
      if (run.code == 0) {
        fs::remove_all(scratch.path() / "out");
        continue;
      }
      CHECK(run.code == 3);
      refused = true;
      CHECK(run.err.find("memory") != std::string::npos);
      CHECK(test::names_in(scratch.path()) == before);
    }
  }
  CHECK(refused);
}

TEST_CASE("Where the system does not give the threads asked for, one does the work") {
  const test::ScratchFolder scratch;
  scratch.write("pair.toml", test::two_bars);
  // The stacks of a thousand threads take more than that.
  const auto run =
      run_barwall(scratch.path(), "solve pair.toml --out out --threads 1000", "ulimit -v 2000000;");
  CHECK(run.code == 0);
  CHECK(run.err == "barwall: the system does not give 1000 threads; computing with one\n");
  const auto record = nlohmann::json::parse(test::text_of_file(scratch.path() / "out/run.json"));
  CHECK(record["threads"] == 1);
}

TEST_CASE("Another case's folder is refused with 2 until it may be replaced") {
  const test::ScratchFolder scratch;
  scratch.write("pair.toml", test::two_bars);
  scratch.write("other.toml", test::edited(test::two_bars, "Two flat bars", "Other bars"));
  REQUIRE(run_barwall(scratch.path(), "solve pair.toml --out out --quiet").code == 0);
  const auto refused = run_barwall(scratch.path(), "solve other.toml --out out");
  CHECK(refused.code == 2);
  CHECK(refused.err.find("another case, \"Two flat bars\"") != std::string::npos);
  CHECK(figures_in(scratch.path() / "out")["case"]["title"] == "Two flat bars");
  CHECK(run_barwall(scratch.path(), "solve other.toml --out out --replace --quiet").code == 0);
  CHECK(figures_in(scratch.path() / "out")["case"]["title"] == "Other bars");

  // The same file may change its contents, its title too.
  scratch.write("other.toml", test::edited(test::two_bars, "Two flat bars", "Renamed bars"));
  CHECK(run_barwall(scratch.path(), "solve other.toml --out out --quiet").code == 0);
  CHECK(figures_in(scratch.path() / "out")["case"]["title"] == "Renamed bars");
}

TEST_CASE("The option --set changes the figures, and the case's digest with them") {
  const test::ScratchFolder scratch;
  scratch.write("pair.toml", test::two_bars);
  REQUIRE(run_barwall(scratch.path(), "solve pair.toml --out near --quiet").code == 0);
  REQUIRE(run_barwall(scratch.path(), "solve pair.toml --out far --set gap_mm=64 --quiet").code ==
          0);
  const auto near = figures_in(scratch.path() / "near");
  const auto far = figures_in(scratch.path() / "far");
  CHECK(far["case"]["given"]["gap_mm"] == 64.0);
  CHECK(far["case"]["sha256"] != near["case"]["sha256"]);
  CHECK(far["clearances"][0]["gap"]["value"] == 0.064);
  CHECK(near["bars"][1]["force_x"]["value"].get<double>() >
        1.2 * far["bars"][1]["force_x"]["value"].get<double>());
}

TEST_CASE("The number of threads changes no byte of the figures") {
  const test::ScratchFolder scratch;
  scratch.write("pair.toml", test::two_bars);
  REQUIRE(run_barwall(scratch.path(), "solve pair.toml --out one --threads 1 --quiet").code == 0);
  REQUIRE(run_barwall(scratch.path(), "--threads 3 --quiet solve pair.toml --out three").code == 0);
  for (const char* name : {"figures.json", "figures.csv", "probes.csv"}) {
    CHECK(test::text_of_file(scratch.path() / "one" / name) ==
          test::text_of_file(scratch.path() / "three" / name));
  }
}

TEST_CASE("The option --quiet prints nothing on success and one line otherwise") {
  const test::ScratchFolder scratch;
  scratch.write("pair.toml", test::two_bars);
  scratch.write("coarse.toml", test::coarse_bars);
  const auto good = run_barwall(scratch.path(), "solve pair.toml --quiet");
  CHECK((good.out + good.err).empty());
  const auto bad = run_barwall(scratch.path(), "solve coarse.toml --quiet");
  CHECK(bad.out.empty());
  CHECK(std::count(bad.err.begin(), bad.err.end(), '\n') == 1);
}

TEST_CASE("verify prints a case's checks alone and writes nothing") {
  const test::ScratchFolder scratch;
  scratch.write("pair.toml", test::two_bars);
  scratch.write("coarse.toml", test::coarse_bars);
  const auto before = test::names_in(scratch.path());
  const auto good = run_barwall(scratch.path(), "verify pair.toml");
  CHECK(good.code == 0);
  CHECK(good.out.find("biot-savart-rms") != std::string::npos);
  CHECK(good.out.find("Forces") == std::string::npos);
  CHECK(run_barwall(scratch.path(), "verify coarse.toml").code == 1);
  CHECK(test::names_in(scratch.path()) == before);
}

TEST_CASE("Help and version exit with 0") {
  const test::ScratchFolder scratch;
  CHECK(run_barwall(scratch.path(), "--version").out == "barwall 0.1.0\n");
  for (const char* arguments :
       {"--help", "--version", "solve --help", "draw --help", "verify --help"}) {
    CHECK(run_barwall(scratch.path(), arguments).code == 0);
  }
}

TEST_CASE("A summary that cannot be printed is an error") {
  const test::ScratchFolder scratch;
  scratch.write("pair.toml", test::two_bars);
  const auto run = run_barwall(scratch.path(), "solve pair.toml > /dev/full");
  CHECK(run.code == 3);
  CHECK(run.err.find("standard output") != std::string::npos);
}

TEST_CASE("draw writes the section's pictures alone, again and beside results") {
  const test::ScratchFolder scratch;
  scratch.write("pair.toml", test::two_bars);
  const fs::path folder = scratch.path() / "results" / "pair";
  CHECK(run_barwall(scratch.path(), "draw pair.toml").code == 0);
  CHECK(test::names_in(folder) == std::vector<std::string>{"section.png", "section.svg"});
  CHECK(run_barwall(scratch.path(), "solve pair.toml --quiet").code == 0);
  CHECK(run_barwall(scratch.path(), "draw pair.toml --quiet").code == 0);
  CHECK(fs::exists(folder / "figures.json"));
  CHECK(fs::exists(folder / "section.png"));
}

TEST_CASE("A run writes every file of a results folder") {
  const test::ScratchFolder scratch;
  scratch.write("pair.toml", test::two_bars);
  REQUIRE(run_barwall(scratch.path(), "solve pair.toml --out out --quiet").code == 0);
  CHECK(test::names_in(scratch.path() / "out") ==
        std::vector<std::string>{"field.vtu", "field_far.vtu", "figures.csv", "figures.json",
                                 "flux_lines.vtp", "forces.vtp", "outlines.vtp", "picture.png",
                                 "picture.svg", "probes.csv", "probes.vtp", "report.html",
                                 "run.json"});
}
