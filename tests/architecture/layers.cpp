#include <catch2/catch.hpp>
#include <fstream>

#include "tests/architecture/source_files.hpp"

namespace barwall::support {
namespace {

namespace fs = std::filesystem;

/// A folder of sample sources, removed at the end.
class Samples {
public:
  explicit Samples(const std::string& name)
      : root_(fs::path(BARWALL_BINARY_DIR) / "tests" / ("samples_" + name)) {
    fs::remove_all(root_);
    for (const char* layer : layers) fs::create_directories(root_ / layer);
  }
  ~Samples() { fs::remove_all(root_); }
  Samples(const Samples&) = delete;
  Samples& operator=(const Samples&) = delete;

  fs::path write(const std::string& file, const std::string& text) const {
    std::ofstream(root_ / file) << text;
    return root_ / file;
  }
  const fs::path& root() const { return root_; }

private:
  fs::path root_;
};

TEST_CASE("no include climbs from a layer to a later one") {
  const auto climbing = climbing_includes(BARWALL_SOURCE_DIR);
  for (const std::string& include : climbing) UNSCOPED_INFO(include);
  CHECK(climbing.empty());
}

TEST_CASE("an include that climbs is found in each of its spellings") {
  const Samples samples("climbing");
  samples.write("mesh/a.hpp", "#include \"solver/problem.hpp\"\n");
  samples.write("solver/b.cpp", "#  include <io/case.hpp>\n");
  samples.write("verify/c.cpp", "#include \"verify/../io/case.hpp\"\n");
  samples.write("mesh/d.cpp", "#include \"../verify/check.hpp\"\n");
  samples.write("solver/e.hpp", "#if __has_include(\"verify/check.hpp\")\n#endif\n");
  CHECK(climbing_includes(samples.root()) ==
        std::vector<std::string>{"mesh/a.hpp: solver/problem.hpp",
                                 "mesh/d.cpp: ../verify/check.hpp", "solver/b.cpp: io/case.hpp",
                                 "solver/e.hpp: verify/check.hpp",
                                 "verify/c.cpp: verify/../io/case.hpp"});
}

TEST_CASE("includes within a layer, downwards and of others' headers do not climb") {
  const Samples samples("downwards");
  samples.write("io/a.cpp",
                "#include \"io/a.hpp\"\n#include \"mesh/point.hpp\"\n#include <vector>\n");
  samples.write("verify/b.cpp", "#include \"../solver/problem.hpp\"\n#include <io.h>\n");
  samples.write("mesh/c.hpp", "// #include \"io/case.hpp\" stands here as words only\n");
  CHECK(climbing_includes(samples.root()).empty());
}

TEST_CASE("every header compiles alone") {
  // Where a header's own source file begins with it, the build has compiled it alone already.
  for (const std::string layer : layers) {
    for (const fs::path& header :
         headers_not_first_anywhere(fs::path(BARWALL_SOURCE_DIR) / layer)) {
      INFO(header.string());
      CHECK(compiles_alone(header, layer));
    }
  }
}

TEST_CASE("a header that leans on others is found, whether or not a source file has its name") {
  const Samples samples("headers");
  const auto leaning =
      samples.write("solver/leaning.hpp", "inline std::string name() { return {}; }\n");
  samples.write("solver/leaning.cpp", "#include <string>\n\n#include \"solver/leaning.hpp\"\n");
  const auto sound = samples.write("solver/sound.hpp",
                                   "#include <string>\ninline std::string word() { return {}; }\n");
  samples.write("solver/first.hpp", "");
  samples.write("solver/first.cpp", "#include \"solver/first.hpp\"\n\n#include <string>\n");
  CHECK(headers_not_first_anywhere(samples.root() / "solver") ==
        std::vector<fs::path>{leaning, sound});
  CHECK_FALSE(compiles_alone(leaning, "solver"));
  CHECK(compiles_alone(sound, "solver"));
}

}  // namespace
}  // namespace barwall::support
