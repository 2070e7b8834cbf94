#include "solver/fault_figures.hpp"

#include <cmath>
#include <numbers>

namespace barwall::solver {
namespace {

constexpr double degree = std::numbers::pi / 180.0;

std::vector<Figure> extreme_figures(const FaultExtremes& extremes) {
  const FaultPeak& peak = extremes.peak;
  return {{"force_x_max", extremes.x_max.value, "N/m"},
          {"force_x_min", extremes.x_min.value, "N/m"},
          {"force_y_max", extremes.y_max.value, "N/m"},
          {"force_y_min", extremes.y_min.value, "N/m"},
          {"force_peak", peak.magnitude, "N/m"},
          {"force_peak_direction", std::atan2(peak.value.y, peak.value.x) / degree, "deg"},
          {"force_peak_after", peak.seconds.value_or(not_given), "s"},
          {"force_peak_closing", peak.closing ? *peak.closing / degree : not_given, "deg"}};
}

std::vector<Figure> circuit_figures(const FaultCurrent& fault) {
  const FaultCrest crest = crest_of(fault);
  std::vector<Figure> figures;
  if (const auto* alternating = std::get_if<AlternatingFault>(&fault.course)) {
    const FaultEquivalents equal = equivalents_of(alternating->r_over_x);
    figures = {{"symmetrical_current", alternating->symmetrical, "A"},
               {"r_over_x", equal.r_over_x, "1"},
               {"x_over_r", equal.x_over_r, "1"},
               {"power_factor", equal.power_factor, "1"},
               {"kappa", equal.kappa, "1"},
               {"peak_over_rms", equal.peak_over_rms, "1"},
               {"crest_over_rms", equal.crest_over_rms, "1"}};
  }
  figures.push_back({"crest_current", crest.current, "A"});
  figures.push_back({"crest_at", crest.seconds.value_or(not_given), "s"});
  return figures;
}

}  // namespace

FaultFigures fault_figures(const FaultCurrent& fault, const Problem& problem,
                           const ForceGeometry& geometry, const FaultSolution& solution,
                           const std::optional<Supports>& supports) {
  const PartForces<FaultExtremes>& forces = solution.extremes;
  const auto figures_of = [&](const std::optional<FaultExtremes>& extremes) {
    return extremes ? extreme_figures(*extremes) : without_values(extreme_figures({}));
  };
  const auto pushes_on = [&](std::size_t face) -> std::vector<FacePush> {
    return {{"push_max", "pressure_mean_max", forces.push[face].x_max.value},
            {"push_min", "pressure_mean_min", forces.push[face].x_min.value}};
  };
  FaultFigures result;
  result.circuit = circuit_figures(fault);
  for (int part : visible_parts(problem.outline)) {
    const auto index = static_cast<std::size_t>(part);
    const mesh::Part& p = problem.section.parts[index];
    Entry entry{p.name, {}, figures_of(forces.part[index]), {}, 0.0};
    if (p.kind == mesh::Part::Kind::wall) {
      const FieldLevel& level = solution.levels[index];
      entry.figures.push_back({"b_mean", level.mean, "T"});
      entry.figures.push_back({"b_high", level.high, "T"});
      if (problem.materials[index].saturable()) {
        entry.figures.push_back({"saturated_share", level.saturated_share, "1"});
      }
      entry.faces = face_entries(problem, geometry.faces, part, pushes_on);
      result.walls.push_back(std::move(entry));
      continue;
    }
    if (supports) {
      const double force = find_figure(entry.figures, "force_peak")->value * supports->span;
      entry.figures.push_back({"support_force", force, "N"});
      if (supports->strength) {
        entry.figures.push_back({"support_share", force / *supports->strength, "1"});
      }
    }
    for (std::size_t k = 0; p.pieces.size() > 1 && k < p.pieces.size(); ++k) {
      std::optional<FaultExtremes> extremes;
      if (!forces.piece[index].empty()) extremes = forces.piece[index][k];
      entry.pieces.push_back(
          {p.name + "." + std::to_string(k + 1), {}, figures_of(extremes), {}, 0.0});
    }
    result.bars.push_back(std::move(entry));
  }
  auto extremes = forces.body.begin();
  for (const auto& members : geometry.bands.bodies()) {
    if (members.size() < 2) continue;
    Entry entry;
    for (int part : members) {
      entry.parts.push_back(problem.section.parts[static_cast<std::size_t>(part)].name);
    }
    entry.name = joined(entry.parts);
    entry.figures = figures_of(*extremes++);
    result.bodies.push_back(std::move(entry));
  }
  return result;
}

}  // namespace barwall::solver
