#include "io/results_files.hpp"

#include <chrono>
#include <fstream>

#include "io/fault_picture.hpp"
#include "io/memory.hpp"
#include "io/picture.hpp"
#include "io/report.hpp"
#include "io/results_csv.hpp"
#include "io/results_folder.hpp"
#include "io/results_json.hpp"
#include "io/run_json.hpp"
#include "io/vtk_export.hpp"

namespace barwall::io {

namespace fs = std::filesystem;

namespace {

/// What the libraries for fonts, pictures and grid files need at most while one file is made.
void require_room_to_write(const mesh::FittedGrid& grid) {
  constexpr std::size_t base = std::size_t{64} << 20U;
  constexpr std::size_t per_node = 600;
  require_memory(base + per_node * static_cast<std::size_t>(grid.node_count()));
}

}  // namespace

void write_results(Results& results, const fs::path& folder, bool replace) {
  const auto start = std::chrono::steady_clock::now();
  std::vector<FileWriter> writers;
  writers.emplace_back([&](const fs::path& to) {
    write_text(to / "figures.json", figures_json(results));
    write_text(to / "figures.csv", figures_csv(results));
    write_text(to / "probes.csv", probes_csv(results));
    if (results.fault_over_time()) {
      write_text(to / "fault_forces.csv", fault_forces_csv(results));
    }
  });
  for (const auto write : {write_vtk, write_pictures, write_fault_pictures, write_report}) {
    writers.emplace_back([&results, write](const fs::path& to) {
      require_room_to_write(*results.problem->grid);
      write(results, to);
    });
  }
  writers.emplace_back([&](const fs::path& to) {
    const std::chrono::duration<double> taken = std::chrono::steady_clock::now() - start;
    results.stages.emplace_back("files", taken.count());
    write_text(to / "run.json", run_json(results, folder));
  });
  fill_folder(folder, results.input, Contents::results, replace, writers);
}

void write_drawing(const Case& input, const solver::Problem& problem, const fs::path& folder,
                   bool replace) {
  const auto draw = [&](const fs::path& to) {
    require_room_to_write(*problem.grid);
    draw_section(input, problem, to);
    std::ofstream stream(to / "section.svg", std::ios::binary | std::ios::app);
    stream << drawing_mark();
    stream.close();
    if (!stream) throw WriteError((to / "section.svg").string() + ": cannot be written whole");
  };
  fill_folder(folder, input, Contents::drawing, replace, {draw});
}

}  // namespace barwall::io
