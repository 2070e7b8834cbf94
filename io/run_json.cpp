#include "io/run_json.hpp"

#include <omp.h>
#include <sys/resource.h>

#include <cmath>
#include <nlohmann/json.hpp>
#include <numbers>

#include "io/version.hpp"

namespace barwall::io {
namespace {

using Json = nlohmann::ordered_json;

Json milliseconds(double seconds) {
  return std::round(1e3 * seconds) / 1e3;
}

/// The histories of nonlinear solves, coarse grid to fine.
Json newton_json(const std::vector<solver::NewtonReport>& reports) {
  Json json = Json::array();
  for (const solver::NewtonReport& newton : reports) {
    json.push_back({{"nodes", newton.nodes},
                    {"converged", newton.converged},
                    {"iterations", newton.iterations},
                    {"residuals", newton.residuals},
                    {"steps", newton.steps}});
  }
  return json;
}

Json instants_json(const solver::Instants& instants) {
  Json json = {{"count", instants.size()}, {"surprise", instants.surprise}};
  for (std::size_t k = 0; k < instants.size(); ++k) {
    json["at"].push_back({{"wt_deg", instants.wt[k] * 180.0 / std::numbers::pi},
                          {"newton", newton_json(instants.solution[k]->newton)}});
  }
  return json;
}

}  // namespace

double peak_memory() {
  rusage usage{};
  getrusage(RUSAGE_SELF, &usage);
  return 1024.0 * static_cast<double>(usage.ru_maxrss);
}

std::string place_of_case(const Case& input, const std::filesystem::path& folder) {
  std::error_code error;
  const auto file = std::filesystem::weakly_canonical(input.file, error);
  if (error) return {};
  const auto from = std::filesystem::weakly_canonical(folder, error);
  return error ? std::string() : file.lexically_relative(from).generic_string();
}

std::string run_json(const Results& results, const std::filesystem::path& folder) {
  const solver::Solution& solution = *results.solution;
  const mesh::FittedGrid& grid = solution.grid();
  Json json;
  json["format"] = 1;
  json["barwall"] = version();
  json["case"] = {{"name", results.input.name},
                  {"file", place_of_case(results.input, folder)},
                  {"sha256", results.input.sha256}};
  json["nodes"] = grid.node_count();
  json["triangles"] = grid.triangle_count();
  json["seconds"] = Json::object();
  double whole = 0.0;
  for (const auto& [stage, seconds] : results.stages) {
    json["seconds"][stage] = milliseconds(seconds);
    whole += seconds;
  }
  json["seconds"]["total"] = milliseconds(whole);
  json["solver"] = {
      {"method", solution.report.method},
      {"converged", solution.report.converged},
      {"right_hand_sides", solution.pattern_count() + static_cast<int>(solution.unit_bars.size())},
      {"seconds", milliseconds(solution.linear_seconds)},
      {"iterations", solution.report.iterations},
      {"residuals", solution.report.residuals}};
  if (!solution.newton.empty()) json["newton"] = newton_json(solution.newton);
  if (results.instants) json["instants"] = instants_json(*results.instants);
  if (results.fault) {
    if (results.fault->course) json["fault"]["course"] = instants_json(*results.fault->course);
    for (const auto& reports : results.fault->newton) {
      json["fault"]["newton"].push_back(newton_json(reports));
    }
  }
  json["threads"] = omp_get_max_threads();
  json["peak_memory_bytes"] = static_cast<std::int64_t>(peak_memory());
  return json.dump(1, ' ', false, Json::error_handler_t::replace) + "\n";
}

}  // namespace barwall::io
