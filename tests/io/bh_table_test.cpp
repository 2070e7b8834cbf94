#include "io/bh_table.hpp"

#include <fmt/format.h>
#include <sys/stat.h>

#include <catch2/catch.hpp>
#include <tuple>
#include <utility>

#include "io/case_problem.hpp"
#include "solver/constants.hpp"
#include "tests/io/case_support.hpp"
#include "tests/io/program_support.hpp"

using namespace barwall;
using Catch::Contains;
using Catch::StartsWith;
using test::ScratchFolder;

namespace {

namespace fs = std::filesystem;

const std::string good_curve = "H_A_per_m,B_T\n0,0\n100,0.2\n200,0.4\n1000,1.2\n5000,1.5\n";

const std::string steel_wall =
    "[[wall]]\nname = \"plate\"\nmaterial = \"steel\"\n"
    "rectangle_mm = { centre = [50, 0], size = [5, 80] }\n";

/// A case whose wall has a magnetic law of one line; the law stands in line 2.
std::string case_with(const std::string& law) {
  return "[material.steel]\n" + law + "\n" + test::one_bar + steel_wall;
}

/// What reading a case says, its folder cut off, or "none".
std::string fault_in(const ScratchFolder& folder, const std::string& law,
                     const std::string& name = "case.toml") {
  try {
    io::read_case(folder.write(name, case_with(law)));
  } catch (const io::InputError& error) {
    std::string message = error.what();
    const std::string prefix = folder.path().string() + "/";
    if (message.rfind(prefix, 0) == 0) message.erase(0, prefix.size());
    return message;
  }
  return "none";
}

std::string fault_of_curve(const std::string& curve) {
  const ScratchFolder folder;
  folder.write("steel.csv", curve);
  return fault_in(folder, "bh_curve = \"steel.csv\"");
}

std::string fault_of_points(const std::string& points) {
  return fault_in(ScratchFolder(), "bh_points = " + points);
}

/// The wall's material of a case with a law, and with a curve file where that is given.
solver::Material material_of(const std::string& law, const std::string& curve = "") {
  const ScratchFolder folder;
  if (!curve.empty()) folder.write("steel.csv", curve);
  return io::read_case(folder.write("case.toml", case_with(law))).materials.at(1);
}

std::string sha_of(const ScratchFolder& folder, const std::string& curve) {
  folder.write("steel.csv", curve);
  return io::read_case(folder.write("case.toml", case_with("bh_curve = \"steel.csv\""))).sha256;
}

}  // namespace

TEST_CASE("A B-H table in the case and the same in a file give the same curve") {
  const auto in_file = material_of("bh_curve = \"steel.csv\"", good_curve);
  const auto in_place =
      material_of("bh_points = [[0, 0], [100, 0.2], [200.0, 0.4], [\"10*100\", 1.2], [5e3, 1.5]]");
  const std::vector<solver::BhPoint> rows = {
      {0, 0}, {100, 0.2}, {200, 0.4}, {1000, 1.2}, {5000, 1.5}};
  REQUIRE(in_file.saturable());
  REQUIRE(in_place.saturable());
  CHECK(in_file.name == "steel");
  CHECK(in_file.magnetic());
  CHECK(in_file.curve->points() == rows);
  CHECK(in_place.curve->points() == rows);
  CHECK(in_file.relative_permeability ==
        Approx(in_file.curve->differential_permeability(0.0) / solver::mu_0).epsilon(1e-14));
}

TEST_CASE("A wall of saturable steel has sharp corners, as any steel") {
  const ScratchFolder folder;
  folder.write("steel.csv", good_curve);
  const io::Case read =
      io::read_case(folder.write("case.toml", case_with("bh_curve = \"steel.csv\"")));
  CHECK(read.section.parts[1].sharp_corners);
}

TEST_CASE("A curve file may have comments, blanks, any line ends and a byte order mark") {
  const auto expected = material_of("bh_curve = \"steel.csv\"", good_curve).curve->points();
  std::string windows;
  for (const char c : good_curve) windows += c == '\n' ? std::string("\r\n") : std::string(1, c);
  const std::string dialects[] = {
      windows,
      good_curve.substr(0, good_curve.size() - 1),
      windows.substr(0, windows.size() - 2),
      "\xef\xbb\xbf" + good_curve,
      "\xef\xbb\xbf# a comment\r\n\r\n" + windows,
      "# two lines\n#of comment, with a comma\n\n  \t\n" + good_curve + "\n\n# the end",
      "  H_A_per_m , B_T  # the units\n 0 ,\t0\n100, 0.2 # a row\n+200,4e-1\n1e3,1.20\n5000.,1.5#",
  };
  for (const std::string& dialect : dialects) {
    INFO(dialect);
    CHECK(material_of("bh_curve = \"steel.csv\"", dialect).curve->points() == expected);
  }
}

TEST_CASE("What is wrong in a curve file is told with that file's line and column") {
  struct Fault {
    const char* from;
    const char* to;
    const char* said;
  };
  const Fault faults[] = {
      {"H_A_per_m,B_T", "B_T,H_A_per_m",
       "steel.csv:1:1: the header is \"B_T,H_A_per_m\"; it must be H_A_per_m,B_T"},
      {"H_A_per_m,B_T", "# c\n  h,b", "steel.csv:2:3: the header is \"h,b\""},
      {"H_A_per_m,B_T\n", "", "steel.csv:1:1: the header is \"0,0\""},
      {"H_A_per_m,B_T", "H_A_per_m,B_T,mu", "steel.csv:1:1: the header is"},
      {"100,0.2", "100;0.2",
       "steel.csv:3:1: \"100;0.2\" has 1 field; a row has two: H in A/m, a comma, B in T"},
      {"100,0.2", "  100,0,2", "steel.csv:3:3: \"100,0,2\" has 3 fields"},
      {"100,0.2", "100,0.2,", "steel.csv:3:1: \"100,0.2,\" has 3 fields"},
      {"100,0.2", "100", "steel.csv:3:1: \"100\" has 1 field"},
      {"100,0.2", "100 ,  a lot",
       "steel.csv:3:8: B is \"a lot\"; it must be a number with a decimal point"},
      {"100,0.2", "\xc3\xa9\xc3\xa9 x,0.2", "steel.csv:3:1: H is \"\xc3\xa9\xc3\xa9 x\""},
      {"100,0.2", "100,\xff\x01", "steel.csv:3:5: B is \"? \""},
      {"100,0.2", "100,", "steel.csv:3:5: B is \"\""},
      {"100,0.2", ",0.2", "steel.csv:3:1: H is \"\""},
      {"100,0.2", "100,0.2 0.3", "steel.csv:3:5: B is \"0.2 0.3\""},
      {"100,0.2", "\"100\",0.2", "steel.csv:3:1: H is"},
      {"100,0.2", "0x64,0.2", "steel.csv:3:1: H is \"0x64\""},
      {"100,0.2", "+-100,0.2", "steel.csv:3:1: H is \"+-100\""},
      {"100,0.2", "100,nan", "steel.csv:3:5: B is \"nan\"; it must be a finite number"},
      {"100,0.2", "-inf,0.2", "steel.csv:3:1: H is \"-inf\"; it must be a finite number"},
      {"100,0.2", "1e999,0.2", "steel.csv:3:1: H is \"1e999\"; it must be a finite number"},
      {"0,0", "0,0.1", "steel.csv:2:3: the curve: row 1 is 0 A/m, 0.1 T; the first row must be"},
      {"200,0.4", "200, 0.2",
       "steel.csv:4:6: the curve: rows 2 and 3 are 100 A/m, 0.2 T and 200 A/m, 0.2 T; B must rise"},
      {"200,0.4", " 100,0.4", "steel.csv:4:2: the curve: rows 2 and 3 are"},
      {"1000,1.2", "1000000,1.2",
       "steel.csv:5:9: the curve: rows 3 and 4 are 200 A/m, 0.4 T and 1000000 A/m, 1.2 T; B rises "
       "by 0.8 T, more slowly than in vacuum; it must rise by at least 1.25639 T"},
      {"200,0.4\n1000,1.2\n5000,1.5\n", "# only two\n",
       "steel.csv:1:1: the curve: 2 rows; a B-H table has at least 4"},
  };
  REQUIRE(fault_of_curve(good_curve) == "none");
  for (const Fault& fault : faults) {
    const std::string curve = test::edited(good_curve, fault.from, fault.to);
    INFO(curve);
    REQUIRE_FALSE(curve.empty());
    CHECK_THAT(fault_of_curve(curve), StartsWith(fault.said));
  }
  const std::string no_header = "steel.csv:1:1: the file has no header; its first line must be H";
  CHECK_THAT(fault_of_curve(""), StartsWith(no_header));
  CHECK_THAT(fault_of_curve("\xef\xbb\xbf# nothing\n\n"), StartsWith(no_header));
  CHECK_THAT(fault_of_curve(std::string("\0\x01\x02", 3)), StartsWith("steel.csv:1:1: the header"));
}

TEST_CASE("What is wrong in bh_points is told with the place of the number") {
  struct Fault {
    const char* points;
    const char* said;
  };
  const Fault faults[] = {
      {"7", "case.toml:2:13: bh_points is 7; it must be an array"},
      {"[[0, 0], 5]", "case.toml:2:22: a row of bh_points is 5; it must be a pair of numbers"},
      {"[[0, 0], [1, 2, 3]]", "case.toml:2:22: a row of bh_points is an array of 3"},
      {"[[0, 0], [1, \"x\"]]", "case.toml:2:26: a row of bh_points = \"x\""},
      {"[[0, 0], [1, nan]]", "case.toml:2:26: a row of bh_points is nan"},
      {"[]", "case.toml:2:13: bh_points: 0 rows; a B-H table has at least 4"},
      {"[[1, 0], [2, 1], [3, 2], [4, 3]]",
       "case.toml:2:15: bh_points: row 1 is 1 A/m, 0 T; the first row must be 0, 0"},
      {"[[0, 0], [2, 1], [3, 1], [4, 3]]",
       "case.toml:2:34: bh_points: rows 2 and 3 are 2 A/m, 1 T and 3 A/m, 1 T; B must rise"},
      {"[[0, 0], [2, 1], [-3, 2], [4, 3]]", "case.toml:2:31: bh_points: rows 2 and 3 are"},
      {"[[0, 0], [2, 1], [3, 2], [4e9, 3]]",
       "case.toml:2:44: bh_points: rows 3 and 4 are 3 A/m, 2 T and 4000000000 A/m, 3 T; B rises by "
       "1 T, more slowly than in vacuum"},
  };
  for (const Fault& fault : faults) {
    INFO(fault.points);
    CHECK_THAT(fault_of_points(fault.points), StartsWith(fault.said));
  }
}

TEST_CASE("A curve file lies in the case's folder or below, whatever links and .. say") {
  const ScratchFolder place;
  const fs::path inner = place.path() / "case";
  fs::create_directories(inner / "curves");
  place.write("outside.csv", good_curve);
  place.write("case/inside.csv", good_curve);
  place.write("case/curves/below.csv", good_curve);
  fs::create_directory_symlink("..", inner / "up");
  fs::create_symlink("../outside.csv", inner / "link_out.csv");
  fs::create_symlink("curves/below.csv", inner / "link_in.csv");
  fs::create_symlink("loop.csv", inner / "loop.csv");
  fs::create_directory_symlink("case", place.path() / "other_name");
  const auto fault = [&](const std::string& name) {
    return fault_in(place, "bh_curve = \"" + name + "\"", "case/case.toml");
  };
  const std::string absolute = place.path().string() + "/";
  for (const std::string name :
       {"inside.csv", "./inside.csv", "curves/below.csv", "curves/../inside.csv", "link_in.csv",
        "up/case/inside.csv", "../case/inside.csv"}) {
    INFO(name);
    CHECK(fault(name) == "none");
  }
  CHECK(fault(absolute + "case/inside.csv") == "none");
  for (const std::string name :
       {"../outside.csv", "curves/../../outside.csv", "up/outside.csv", "link_out.csv",
        "../missing.csv", "..", "/dev/zero", "/etc/passwd"}) {
    INFO(name);
    CHECK(fault(name) ==
          "case/case.toml:2:12: bh_curve is \"" + name +
              "\", which lies outside the case's folder; it must be a file in that folder or "
              "below");
  }
  CHECK_THAT(fault(absolute + "outside.csv"), Contains("outside the case's folder"));
  CHECK_THAT(fault("loop.csv"), StartsWith("case/case.toml:2:12: bh_curve is \"loop.csv\""));
  // A folder whose name begins like the case's is another.
  fs::create_directories(place.path() / "case2");
  place.write("case2/near.csv", good_curve);
  CHECK_THAT(fault("../case2/near.csv"), Contains("outside the case's folder"));
  // The case's own folder may be reached by a link.
  CHECK(fault("inside.csv") == "none");
  CHECK_NOTHROW(io::read_case(place.path() / "other_name" / "case.toml"));
}

TEST_CASE("A curve file is a plain file of bounded size") {
  const ScratchFolder folder;
  fs::create_directories(folder.path() / "folder.csv");
  REQUIRE(::mkfifo((folder.path() / "pipe.csv").c_str(), 0600) == 0);
  const auto fault = [&](const std::string& name) {
    return fault_in(folder, "bh_curve = \"" + name + "\"");
  };
  CHECK(fault("missing.csv") == "case.toml:2:12: bh_curve is \"missing.csv\": no such file");
  CHECK(fault("folder.csv") ==
        "case.toml:2:12: bh_curve is \"folder.csv\": this is a folder; a curve is a .csv file");
  CHECK_THAT(fault("."), Contains("this is a folder"));
  CHECK(fault("pipe.csv") == "case.toml:2:12: bh_curve is \"pipe.csv\": this is no plain file");
  CHECK_THAT(fault(std::string(300, 'x')), StartsWith("case.toml:2:12: bh_curve is"));
  CHECK_THAT(fault(""), StartsWith("case.toml:2:12: bh_curve is empty"));
  CHECK_THAT(fault_in(folder, "bh_curve = 5"),
             StartsWith("case.toml:2:12: bh_curve is a number (5); it must be a string"));

  const std::string filling(1'000'000 - good_curve.size(), '#');
  folder.write("full.csv", good_curve + filling);
  CHECK(fault("full.csv") == "none");
  folder.write("huge.csv", good_curve + filling + "#");
  CHECK(fault("huge.csv") ==
        "case.toml:2:12: bh_curve is \"huge.csv\": the file is too large; a curve file has at most "
        "1000000 bytes");
}

TEST_CASE("The rows of one table and of all together are bounded") {
  const auto rows = [](int count, const char* form) {
    std::string text;
    for (int k = 0; k < count; ++k) {
      text += fmt::format(fmt::runtime(form), k, 0.001 * k);
    }
    return text;
  };
  const std::string header = "H_A_per_m,B_T\n";
  CHECK(fault_of_curve(header + rows(10'000, "{},{}\n")) == "none");
  CHECK(fault_of_curve(header + rows(10'001, "{},{}\n")) ==
        "steel.csv:10002:1: more than 10000 rows");
  CHECK(fault_of_points(fmt::format("[{}]", rows(10'000, "[{},{}],"))) == "none");
  CHECK(fault_of_points(fmt::format("[{}]", rows(10'001, "[{},{}],"))) ==
        "case.toml:2:13: bh_points has 10001 rows; it must have at most 10000");

  // One file for many materials counts once; many files count together.
  const ScratchFolder folder;
  std::string one_file;
  std::string many_files;
  for (int k = 0; k < 21; ++k) {
    const std::string name = "steel" + std::to_string(k) + ".csv";
    folder.write(name, header + rows(10'000, "{},{}\n"));
    const std::string material = "[material.m" + std::to_string(k) + "]\n";
    one_file += material + "bh_curve = \"steel0.csv\"\n";
    many_files += material + "bh_curve = \"" + name + "\"\n";
  }
  CHECK_NOTHROW(io::read_case(folder.write("one.toml", one_file + test::one_bar)));
  CHECK_THROWS_WITH(io::read_case(folder.write("many.toml", many_files + test::one_bar)),
                    Contains("many.toml:42:1: more than 200000 rows of B-H tables together"));
}

TEST_CASE("Changed steel is a changed case") {
  const ScratchFolder folder;
  const std::string first = sha_of(folder, good_curve);
  CHECK(sha_of(folder, good_curve) == first);
  CHECK(sha_of(folder, test::edited(good_curve, "1.5", "1.6")) != first);
  CHECK(sha_of(folder, good_curve + "# another comment\n") != first);
  // Two files that change places are changed steel, too.
  const std::string two =
      "[material.a]\nbh_curve = \"a.csv\"\n[material.b]\nbh_curve = \"b.csv\"\n" + test::one_bar;
  const auto digest = [&](const std::string& a, const std::string& b) {
    folder.write("a.csv", a);
    folder.write("b.csv", b);
    return io::read_case(folder.write("two.toml", two)).sha256;
  };
  const std::string other = good_curve + "9000,1.6\n";
  CHECK(digest(good_curve, other) != digest(other, good_curve));
}

TEST_CASE("Every curve file in cases/ is a valid curve and says that it is invented") {
  int count = 0;
  for (const auto& entry : fs::directory_iterator(fs::path(BARWALL_SOURCE_DIR) / "cases")) {
    if (entry.path().extension() != ".csv") continue;
    ++count;
    INFO(entry.path().string());
    const std::string text = test::text_of_file(entry.path());
    CHECK_THAT(text,
               StartsWith("# An invented curve for the example cases, not of any real steel"));
    CHECK(test::text_of_file(fs::path(BARWALL_SOURCE_DIR) / "cases/README.md")
              .find("| `" + entry.path().filename().string() + "` |") != std::string::npos);
    const auto curve = material_of("bh_curve = \"steel.csv\"", text).curve;
    CHECK(curve->points().size() >= 15);
    CHECK(curve->points().size() <= 25);
    CHECK(curve->table_end() > 2.0);
    CHECK(curve->table_end() < 2.2);
    // The largest permeability lies well below saturation; from there on the curve flattens
    // without a wave, and has all but reached vacuum's slope at its end.
    double best = 0.0;
    double best_at = 0.0;
    for (double b = 0.0; b < curve->table_end(); b += 0.001) {
      const double mu = 1.0 / curve->reluctivity(b) / solver::mu_0;
      if (mu > best) std::tie(best, best_at) = std::pair(mu, b);
    }
    CHECK(best > 1500.0);
    CHECK(best < 5500.0);
    CHECK(best_at > 0.6);
    CHECK(best_at < 0.9);
    const auto permeability = [&](double b) {
      return curve->differential_permeability(b) / solver::mu_0;
    };
    for (double b = best_at; b < curve->table_end() - 0.001; b += 0.001) {
      REQUIRE(permeability(b + 0.001) <= permeability(b));
    }
    CHECK(permeability(curve->table_end() - 1e-6) < 2.0);
    CHECK(permeability(curve->table_end() - 1e-6) >= 1.0);
  }
  CHECK(count == 2);
}

TEST_CASE("Saturable steel has a coarse grid to start from, steel of constant permeability none") {
  const ScratchFolder folder;
  folder.write("steel.csv", good_curve);
  const auto grid_of = [&](const std::string& material) {
    const auto input = io::read_case(folder.write("case.toml", case_with(material)));
    return io::problem_of(input)->coarse_grid;
  };
  CHECK(grid_of("bh_curve = \"steel.csv\"") != nullptr);
  CHECK(grid_of("relative_permeability = 500") == nullptr);
}
