#include "io/command_line.hpp"

#include <fmt/format.h>
#include <unistd.h>

#include <CLI/CLI.hpp>
#include <cstdio>
#include <cstdlib>
#include <filesystem>
#include <memory>
#include <new>

#include "io/case_problem.hpp"
#include "io/input_error.hpp"
#include "io/ladder_table.hpp"
#include "io/memory.hpp"
#include "io/plain_table.hpp"
#include "io/progress.hpp"
#include "io/results.hpp"
#include "io/results_files.hpp"
#include "io/results_folder.hpp"
#include "io/summary.hpp"
#include "io/threads.hpp"
#include "io/version.hpp"

namespace barwall::io {
namespace {

/// What the user asks for.
struct Request {
  std::string file;
  std::string out;
  std::vector<std::string> settings;
  bool replace = false;
  bool quiet = false;
  int threads = 0;
};

std::vector<Setting> settings_of(const Request& request) {
  std::vector<Setting> settings;
  for (const std::string& text : request.settings) {
    const std::size_t equals = text.find('=');
    if (equals == std::string::npos || equals == 0) {
      throw InputError(fmt::format("--set {}: must be NAME=VALUE", text));
    }
    settings.push_back({text.substr(0, equals), text.substr(equals + 1)});
  }
  return settings;
}

std::filesystem::path folder_of(const Request& request, const Case& input) {
  return request.out.empty() ? default_folder(input) : std::filesystem::path(request.out);
}

bool colour_wanted() {
  return ::isatty(STDOUT_FILENO) == 1 && std::getenv("NO_COLOR") == nullptr;
}

/// Prints to the standard output; what does not arrive there is an error.
void print(const std::string& text) {
  fmt::print("{}", text);
  if (std::fflush(stdout) != 0) throw WriteError("cannot write to the standard output");
}

void print_outcome(const Request& request, const Results& results, const std::string& text) {
  if (!request.quiet) {
    print(text);
  } else if (results.exit_code() != 0) {
    fmt::print(stderr, "{}: {}", results.input.file, verdict_line(results, false));
  }
}

Progress progress_for(const Request& request) {
  return Progress(!request.quiet && ::isatty(STDERR_FILENO) == 1);
}

int solve_case(const Request& request) {
  Case input = read_case(request.file, settings_of(request));
  const auto folder = folder_of(request, input);
  check_folder(folder, input, Contents::results, request.replace);
  claim_blas_memory();
  Progress progress = progress_for(request);
  Results results = run_case(std::move(input), [&](const std::string& s) { progress.stage(s); });
  progress.stage("files");
  write_results(results, folder, request.replace);
  progress.clear();
  print_outcome(request, results, summary(results, folder, colour_wanted()));
  return results.exit_code();
}

int draw_case(const Request& request) {
  const Case input = read_case(request.file, settings_of(request));
  const auto folder = folder_of(request, input);
  check_folder(folder, input, Contents::drawing, request.replace);
  Progress progress = progress_for(request);
  progress.stage("grid");
  const auto problem = problem_of(input);
  progress.stage("drawing");
  write_drawing(input, *problem, folder, request.replace);
  progress.clear();
  if (!request.quiet) {
    print(fmt::format("{}: {} nodes in {} columns and {} rows\nDrawing: {} and section.svg\n",
                      input.title, problem->grid->node_count(), problem->grid->columns,
                      problem->grid->rows, (folder / "section.png").string()));
  }
  return 0;
}

int verify_case(const Request& request) {
  Case input = read_case(request.file, settings_of(request));
  claim_blas_memory();
  Progress progress = progress_for(request);
  const Results results =
      run_case(std::move(input), [&](const std::string& s) { progress.stage(s); });
  progress.clear();
  const bool colour = colour_wanted();
  print_outcome(
      request, results,
      results.input.title + "\n" + checks_table(results, colour) + verdict_line(results, colour));
  return results.exit_code();
}

int verify_ladder(const Request& request) {
  claim_blas_memory();
  if (!request.quiet) return print_ladder(stdout);
  const std::unique_ptr<std::FILE, int (*)(std::FILE*)> nowhere(std::fopen("/dev/null", "w"),
                                                                std::fclose);
  if (!nowhere) throw WriteError("/dev/null cannot be opened");
  return print_ladder(nowhere.get());
}

/// The exit code of a run, its errors reported.
template <class Run>
int guarded(const Run& run) {
  try {
    return run();
  } catch (const InputError& error) {
    fmt::print(stderr, "{}\n", error.what());
    return 2;
  } catch (const std::bad_alloc&) {
    fmt::print(stderr, "barwall: out of memory; a coarser [grid] needs less\n");
    return 3;
  } catch (const std::exception& error) {  // SolveError, WriteError
    fmt::print(stderr, "barwall: could not finish: {}\n", error.what());
    return 3;
  }
}

void add_settings(CLI::App& command, Request& request) {
  command.add_option("--set", request.settings, "Replace the value of a name of [given]")
      ->option_text("NAME=VALUE ...")
      ->type_size(1)
      ->allow_extra_args(false);
}

void add_destination(CLI::App& command, Request& request) {
  command.add_option("--out", request.out, "Folder for the files; results/NAME where absent")
      ->option_text("DIR")
      ->check([](const std::string& text) {
        return text.empty() ? std::string("must name a folder") : std::string();
      });
  command.add_flag("--replace", request.replace, "Replace another case's results");
}

}  // namespace

int run_program(int argc, char** argv) {
  CLI::App app{
      "The magnetic field of a busbar cross-section: forces, stray field, inductances.\n"
      "Exit code: 0 sound, 1 a check failed, 2 wrong input, 3 could not finish, 4 sound but a "
      "limit is\nexceeded or undecided.",
      "barwall"};
  Request request;
  app.set_help_flag("--help", "Print this help and end");
  app.set_version_flag("--version", fmt::format("barwall {}", version()),
                       "Print the version and end");
  app.add_flag("--quiet", request.quiet, "Print nothing unless something is wrong");
  app.add_option("--threads", request.threads, "Threads to compute with; all where absent")
      ->option_text("N")
      ->check(CLI::Range(1, 1024));
  app.require_subcommand(1);
  app.fallthrough();
  CLI::App* solve = app.add_subcommand("solve", "Solve a case and write its results");
  solve->add_option("CASE", request.file, "The case file (.toml)")->required();
  add_destination(*solve, request);
  add_settings(*solve, request);
  CLI::App* draw = app.add_subcommand("draw", "Draw a case's section and grid, without solving it");
  draw->add_option("CASE", request.file, "The case file (.toml)")->required();
  add_destination(*draw, request);
  add_settings(*draw, request);
  CLI::App* verify = app.add_subcommand(
      "verify", "Without a case, the built-in accuracy ladder; with one, its checks alone");
  CLI::Option* verify_file = verify->add_option("CASE", request.file, "The case file (.toml)");
  add_settings(*verify, request);
  for (CLI::App* command : {solve, draw, verify}) {
    command->footer("Every command takes --quiet, --threads N and --version, too.");
  }
  try {
    app.parse(argc, argv);
  } catch (const CLI::ParseError& error) {
    if (error.get_exit_code() == 0) return app.exit(error);  // help or version
    fmt::print(stderr, "barwall: {}; barwall --help shows the commands and their options\n",
               error.what());
    return 2;
  }
  return guarded([&] {
    set_threads(request.threads);
    if (solve->parsed()) return solve_case(request);
    if (draw->parsed()) return draw_case(request);
    if (!verify_file->empty()) return verify_case(request);
    return verify_ladder(request);
  });
}

}  // namespace barwall::io
