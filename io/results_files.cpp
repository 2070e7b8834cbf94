#include "io/results_files.hpp"

#include <chrono>
#include <fstream>

#include "io/results_csv.hpp"
#include "io/results_folder.hpp"
#include "io/results_json.hpp"
#include "io/run_json.hpp"
#include "io/vtk_export.hpp"
#if __has_include("io/picture.hpp")
#include "io/picture.hpp"
#endif
#if __has_include("io/report.hpp")
#include "io/report.hpp"
#endif

namespace barwall::io {

namespace fs = std::filesystem;

void write_results(Results& results, const fs::path& folder, bool replace) {
  const auto start = std::chrono::steady_clock::now();
  std::vector<FileWriter> writers;
  writers.emplace_back([&](const fs::path& to) {
    write_text(to / "figures.json", figures_json(results));
    write_text(to / "figures.csv", figures_csv(results));
    write_text(to / "probes.csv", probes_csv(results));
  });
  writers.emplace_back([&](const fs::path& to) { write_vtk(results, to); });
#if __has_include("io/picture.hpp")
  writers.emplace_back([&](const fs::path& to) { write_pictures(results, to); });
#endif
#if __has_include("io/report.hpp")
  writers.emplace_back([&](const fs::path& to) { write_report(results, to); });
#endif
  writers.emplace_back([&](const fs::path& to) {
    const std::chrono::duration<double> taken = std::chrono::steady_clock::now() - start;
    results.stages.emplace_back("files", taken.count());
    write_text(to / "run.json", run_json(results, folder));
  });
  fill_folder(folder, results.input, Contents::results, replace, writers);
}

#if __has_include("io/picture.hpp")
void write_drawing(const Case& input, const solver::Problem& problem, const fs::path& folder,
                   bool replace) {
  const auto draw = [&](const fs::path& to) {
    draw_section(input, problem, to);
    std::ofstream stream(to / "section.svg", std::ios::binary | std::ios::app);
    stream << drawing_mark();
    stream.close();
    if (!stream) throw WriteError((to / "section.svg").string() + ": cannot be written whole");
  };
  fill_folder(folder, input, Contents::drawing, replace, {draw});
}
#endif

}  // namespace barwall::io
