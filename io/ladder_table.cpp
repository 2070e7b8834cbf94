#include "io/ladder_table.hpp"

#include <fmt/format.h>

#include <string>

namespace barwall::io {
namespace {

// One layout for the heading and for the rows.
constexpr const char* heading_layout = "  {:<18} {:>9} {:>9} {:>9}  {:>17}  {:>5}  {:>7}\n";
constexpr const char* row_layout =
    "  {:<18} {:>9.2e} {:>9.2e} {:>9.2e}  {:>17}  {:>5.2f}  {:>7}  {}\n";

std::string heading() {
  const auto across = [](std::size_t k) {
    return fmt::format("{} cells", verify::ladder_cells[k]);
  };
  return fmt::format(heading_layout, "relative error", across(0), across(1), across(2),
                     across(1) + " within", "order", "within");
}

std::string line_of(const verify::LadderRow& row) {
  const auto& [name, error, order] = row.quantity;
  return fmt::format(row_layout, name, row.error[0], row.error[1], row.error[2],
                     fmt::format("{:.1e}-{:.1e}", error.least, error.most), row.order(),
                     fmt::format("{:.1f}-{:.1f}", order.least, order.most),
                     row.in_band() ? "in band" : "OUT OF BAND");
}

}  // namespace

int print_ladder(std::FILE* out, std::span<const verify::LadderProblem> problems) {
  fmt::print(out,
             "Accuracy ladder: known solutions on three grids, cells across every bar, wall and"
             " gap\n\n{}",
             heading());
  int rows = 0;
  int outside = 0;
  for (const verify::LadderProblem& problem : problems) {
    fmt::print(out, "{}\n", problem.name);
    std::fflush(out);
    for (const verify::LadderRow& row : climb(problem)) {
      fmt::print(out, "{}", line_of(row));
      ++rows;
      if (!row.in_band()) ++outside;
    }
  }
  if (outside == 0 && rows > 0) {
    fmt::print(out, "\nAll {} errors and their orders are within their bands.\n", rows);
    return 0;
  }
  fmt::print(out, "\n{} of {} are out of band.\n", outside, rows);
  return 1;
}

int print_ladder(std::FILE* out) {
  return print_ladder(out, verify::ladder_problems());
}

}  // namespace barwall::io
