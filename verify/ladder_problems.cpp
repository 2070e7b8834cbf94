#include <string>
#include <utility>

#include "verify/arrangements.hpp"
#include "verify/ladder.hpp"
#include "verify/manufactured.hpp"

namespace barwall::verify {
namespace {

LadderProblem problem_of(std::string name, Arrangement arrangement, int cells_across,
                         std::vector<LadderQuantity> quantities) {
  LadderProblem problem;
  problem.name = std::move(name);
  problem.section = arrangement.section;
  problem.grid.cells_across = cells_across;
  problem.quantities = std::move(quantities);
  problem.errors = [arrangement = std::move(arrangement)](auto grid) {
    return errors_of(arrangement, std::move(grid));
  };
  return problem;
}

LadderProblem manufactured() {
  constexpr double mm = 1e-3;
  ManufacturedField field{{}, 20 * mm, 30.0, 10.0, 1e-3};
  LadderProblem problem;
  problem.name = "made-up potential, two permeabilities";
  problem.section.parts = {
      {"disc",
       mesh::Part::Kind::wall,
       {mesh::Round{field.centre, 2.0 * field.radius}},
       false,
       false},
      {"bar", mesh::Part::Kind::bar, {mesh::Round{{33 * mm, 14 * mm}, 10 * mm}}, false, false}};
  problem.grid.cells_across = 4;
  problem.grid.reach = 4.0;
  problem.quantities = {{"A", 1e-3}};
  problem.errors = [field](const std::shared_ptr<const mesh::FittedGrid>& grid) {
    return std::vector<double>{error_of(field, 0, *grid)};
  };
  return problem;
}

}  // namespace

std::vector<LadderProblem> ladder_problems() {
  std::vector<LadderProblem> problems;
  const LadderQuantity b{"B", 1e-3};
  const LadderQuantity bn{"B near", 1e-3};
  const LadderQuantity force{"force, J x B", 1e-3};
  const LadderQuantity stress{"force, stress", 1e-3};
  const LadderQuantity inductance{"inductance", 1e-3};
  problems.push_back(problem_of("round bar in open air", round_bar_in_air(), 3, {b, bn}));
  problems.push_back(problem_of("flat bar in open air", flat_bar_in_air(), 3, {b, bn}));
  problems.push_back(
      problem_of("pair of flat bars", pair_of_flat_bars(), 3, {b, bn, force, stress, inductance}));
  problems.push_back(problem_of("round bars before steel", bars_before_steel(), 3, {b, bn, force}));
  problems.back().grid.reach = 1.0;
  problems.push_back(problem_of("round bars in steel pipe", bars_in_pipe(), 3,
                                {b, bn, force, stress, inductance}));
  problems.push_back(problem_of("round bars beside steel rod", bars_beside_rod(), 3,
                                {b, bn, force, stress, inductance}));
  problems.push_back(problem_of("coaxial tubes", coaxial_line(), 3, {b, bn, inductance}));
  problems.push_back(manufactured());
  return problems;
}

}  // namespace barwall::verify
