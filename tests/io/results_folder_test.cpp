#include <algorithm>
#include <catch2/catch.hpp>
#include <csignal>

#include "io/results_folder.hpp"
#include "tests/io/case_support.hpp"
#include "tests/io/program_support.hpp"

using namespace barwall;
namespace fs = std::filesystem;

namespace {

/// The files of a results folder of a case: figures.json with the least that tells whose it is.
std::string figures_of_case(const io::Case& input) {
  return R"({"barwall": "0.1.0", "case": {"title": ")" + input.title + R"(", "sha256": ")" +
         input.sha256 + "\"}}\n";
}

io::FileWriter writer(const std::string& name, const std::string& text) {
  return [=](const fs::path& to) { io::write_text(to / name, text); };
}

void fill(const fs::path& folder, const io::Case& input, const std::vector<io::FileWriter>& writers,
          bool replace = false) {
  io::fill_folder(folder, input, io::Contents::results, replace, writers);
}

struct TwoCases {
  test::ScratchFolder scratch;
  io::Case first = io::read_case(scratch.write("first.toml", test::two_bars));
  io::Case second = io::read_case(scratch.write("second.toml", test::coarse_bars));
  fs::path out = scratch.path() / "deep" / "er" / "out";
};

}  // namespace

TEST_CASE("A results folder is made with its parents and holds complete files alone") {
  TwoCases cases;
  fill(cases.out, cases.first,
       {writer("figures.json", figures_of_case(cases.first)), writer("probes.csv", "text")});
  CHECK(test::names_in(cases.out) == std::vector<std::string>{"figures.json", "probes.csv"});
  CHECK(test::text_of_file(cases.out / "probes.csv") == "text");
}

TEST_CASE("A later run replaces its files, removes what it no longer writes, leaves foreign ones") {
  TwoCases cases;
  const auto figures = writer("figures.json", figures_of_case(cases.first));
  fill(cases.out, cases.first, {figures, writer("probes.csv", "old"), writer("field.vtu", "old")});
  io::write_text(cases.out / "notes.txt", "mine");
  fill(cases.out, cases.first, {figures, writer("probes.csv", "new")});
  CHECK(test::names_in(cases.out) ==
        std::vector<std::string>{"figures.json", "notes.txt", "probes.csv"});
  CHECK(test::text_of_file(cases.out / "probes.csv") == "new");
  CHECK(test::text_of_file(cases.out / "notes.txt") == "mine");
}

TEST_CASE("Another case's results are refused, and replaced on request") {
  TwoCases cases;
  fill(cases.out, cases.first, {writer("figures.json", figures_of_case(cases.first))});
  const std::string before = test::text_of_file(cases.out / "figures.json");
  const auto figures = writer("figures.json", figures_of_case(cases.second));
  CHECK_THROWS_AS(fill(cases.out, cases.second, {figures}), io::InputError);
  CHECK(test::text_of_file(cases.out / "figures.json") == before);
  fill(cases.out, cases.second, {figures}, true);
  CHECK(test::text_of_file(cases.out / "figures.json") == figures_of_case(cases.second));
}

TEST_CASE("Foreign files of barwall's names are never replaced") {
  TwoCases cases;
  fs::create_directories(cases.out);
  const auto figures = writer("figures.json", figures_of_case(cases.first));
  for (const char* name : {"report.html", "figures.json", "run.json"}) {
    io::write_text(cases.out / name, "{\"mine\": 1}");
    CHECK_THROWS_AS(fill(cases.out, cases.first, {figures}), io::InputError);
    CHECK_THROWS_AS(fill(cases.out, cases.first, {figures}, true), io::InputError);
    CHECK(test::names_in(cases.out) == std::vector<std::string>{name});
    CHECK(test::text_of_file(cases.out / name) == "{\"mine\": 1}");
    fs::remove(cases.out / name);
  }
  io::write_text(cases.out / "section.svg", "<svg/>");
  CHECK_THROWS_AS(io::fill_folder(cases.out, cases.first, io::Contents::drawing, false,
                                  {writer("section.svg", "new")}),
                  io::InputError);
  fill(cases.out, cases.first, {figures});
  CHECK(test::text_of_file(cases.out / "section.svg") == "<svg/>");
}

TEST_CASE("barwall's own drawing is drawn anew, beside results too") {
  TwoCases cases;
  const auto draw = [&](const std::string& text) {
    io::fill_folder(
        cases.out, cases.first, io::Contents::drawing, false,
        {writer("section.svg", text + io::drawing_mark()), writer("section.png", text)});
  };
  draw("one");
  fill(cases.out, cases.first, {writer("figures.json", figures_of_case(cases.first))});
  draw("two");
  CHECK(test::names_in(cases.out) ==
        std::vector<std::string>{"figures.json", "section.png", "section.svg"});
  CHECK(test::text_of_file(cases.out / "section.png") == "two");
}

TEST_CASE("A run that fails while writing leaves the folder as it was") {
  TwoCases cases;
  const auto figures = writer("figures.json", figures_of_case(cases.first));
  const io::FileWriter fails = [](const fs::path&) { throw io::WriteError("no room"); };
  CHECK_THROWS_AS(fill(cases.out, cases.first, {figures, fails}), io::WriteError);
  CHECK_FALSE(fs::exists(cases.scratch.path() / "deep"));

  fill(cases.out, cases.first, {figures, writer("probes.csv", "old")});
  const auto before = test::names_in(cases.out);
  CHECK_THROWS_AS(fill(cases.out, cases.first, {figures, writer("probes.csv", "new"), fails}),
                  io::WriteError);
  CHECK(test::names_in(cases.out) == before);
  CHECK(test::text_of_file(cases.out / "probes.csv") == "old");
}

TEST_CASE("A signal to stop while writing takes effect with the folder as it was") {
  static volatile std::sig_atomic_t arrived = 0;
  struct sigaction own {};
  struct sigaction before {};
  own.sa_handler = [](int) { arrived = 1; };
  sigaction(SIGTERM, &own, &before);
  TwoCases cases;
  fill(cases.out, cases.first,
       {writer("probes.csv", "old"), writer("figures.json", figures_of_case(cases.first))});
  const auto names = test::names_in(cases.out);
  bool seen_while_writing = false;
  const io::FileWriter stopped = [&](const fs::path& to) {
    io::write_text(to / "probes.csv", "new");
    std::raise(SIGTERM);
    seen_while_writing = arrived != 0;
  };
  CHECK_THROWS_AS(fill(cases.out, cases.first, {stopped}), io::Stopped);
  sigaction(SIGTERM, &before, nullptr);
  CHECK_FALSE(seen_while_writing);
  CHECK(arrived == 1);
  CHECK(test::names_in(cases.out) == names);
  CHECK(test::text_of_file(cases.out / "probes.csv") == "old");
}

TEST_CASE("What a killed run left behind is cleared by the next, other hidden files are not") {
  TwoCases cases;
  const int dead = 999'999'999;  // above the largest process id of Linux, 4194304
  const fs::path left = cases.out / (".barwall-unfinished-" + std::to_string(dead));
  fs::create_directories(left);
  io::write_text(left / "figures.json", "half");
  fs::create_directories(cases.out / ".barwall-unfinished-notes");
  fill(cases.out, cases.first, {writer("figures.json", figures_of_case(cases.first))});
  CHECK(test::names_in(cases.out) ==
        std::vector<std::string>{".barwall-unfinished-notes", "figures.json"});
}

TEST_CASE("A folder name that a file holds, or a file name that a folder holds, is refused") {
  TwoCases cases;
  CHECK_THROWS_AS(fill(cases.scratch.path() / "first.toml", cases.first, {}), io::InputError);
  CHECK_THROWS_AS(fill(cases.scratch.path() / "first.toml" / "out", cases.first, {}),
                  io::InputError);
  fs::create_directories(cases.out / "run.json");
  CHECK_THROWS_AS(fill(cases.out, cases.first, {}, true), io::InputError);
}
