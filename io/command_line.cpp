#include "io/command_line.hpp"

#include <CLI/CLI.hpp>
#include <fmt/format.h>

#include "io/input_error.hpp"
#include "io/results.hpp"

namespace barwall::io {

int run_program(int argc, char** argv) {
  CLI::App app{"The magnetic field of a busbar cross-section", "barwall"};
  std::string file;
  CLI::App* solve = app.add_subcommand("solve", "Solve a case and write its results");
  solve->add_option("CASE", file, "The case file (.toml)")->required();
  app.require_subcommand(1);
  try {
    app.parse(argc, argv);
  } catch (const CLI::ParseError& error) {
    return app.exit(error) == 0 ? 0 : 2;
  }
  try {
    const Results results = run_case(read_case(file));
    for (const auto& [address, figure] : addresses(results.figures)) {
      fmt::print("{} {:.6g} {}\n", address, figure->value, figure->unit);
    }
    for (const auto& check : results.checks) fmt::print("{:20} {:.3e} <= {:g} {} {}\n", check.name, check.measured, check.limit, check.passed, check.detail);
    for (const auto& [stage, seconds] : results.stages) fmt::print("{} {:.3f} s\n", stage, seconds);
    return results.exit_code();
  } catch (const InputError& error) {
    fmt::print(stderr, "{}\n", error.what());
    return 2;
  } catch (const solver::SolveError& error) {
    fmt::print(stderr, "{}\n", error.what());
    return 3;
  }
}

}  // namespace barwall::io
