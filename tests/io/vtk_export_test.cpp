#include "io/vtk_export.hpp"

#include <catch2/catch.hpp>
#include <fstream>
#include <iterator>

#include "io/version.hpp"
#include "tests/io/vtk_support.hpp"

namespace barwall {
namespace {

const std::vector<std::string> files{"field.vtu",      "field_far.vtu", "outlines.vtp",
                                     "flux_lines.vtp", "forces.vtp",    "probes.vtp"};

std::string bytes_of(const std::filesystem::path& file) {
  std::ifstream in(file, std::ios::binary);
  return {std::istreambuf_iterator<char>(in), {}};
}

TEST_CASE("Every VTK file says what it belongs to", "[vtk]") {
  for (const io::Results* results : {&test::steady_results(), &test::alternating_results()}) {
    for (const std::string& name : files) {
      INFO(name);
      const auto field = test::read_vtk(test::folder_of(*results) / name).field_data;
      using Texts = std::vector<std::string>;
      CHECK(field.texts.at("title") == Texts{results->input.title});
      CHECK(field.texts.at("version") == Texts{io::version()});
      CHECK(field.texts.at("case_hash") == Texts{results->input.sha256});
      CHECK(field.texts.at("verdict") == Texts{results->verdict()});
      CHECK(field.texts.at("validity") == Texts{results->validity()});
      CHECK(field.texts.at("limits") == Texts{results->limits()});
      CHECK(field.texts.at("part_names").front() == "air");
      CHECK(field.numbers.count("frequency_hz") == (results->alternating() ? 1 : 0));
    }
  }
}

TEST_CASE("The same results give the same VTK files, byte by byte", "[vtk]") {
  const io::Results& results = test::steady_results();
  const test::NewFolder again;
  write_vtk(results, again.path);
  for (const std::string& name : files) {
    INFO(name);
    const std::string first = bytes_of(test::folder_of(results) / name);
    CHECK(!first.empty());
    CHECK(first == bytes_of(again.path / name));
  }
  CHECK(std::distance(std::filesystem::directory_iterator(again.path), {}) ==
        static_cast<std::ptrdiff_t>(files.size()));
}

TEST_CASE("A VTK file that cannot be written whole is an error", "[vtk]") {
  const io::Results& results = test::steady_results();
  const test::NewFolder folder;
  SECTION("no such folder") {
    CHECK_THROWS_AS(write_vtk(results, folder.path / "missing"), io::WriteError);
  }
  SECTION("no room, whichever file runs into it") {
    for (const std::string& name : files) {
      INFO(name);
      const test::NewFolder full;
      std::filesystem::create_symlink("/dev/full", full.path / name);
      CHECK_THROWS_WITH(write_vtk(results, full.path),
                        Catch::Contains(name) && Catch::Contains("space"));
    }
  }
}

}  // namespace
}  // namespace barwall
