#include <string>
#include <utility>

#include "verify/arrangements.hpp"
#include "verify/ladder.hpp"
#include "verify/manufactured.hpp"

namespace barwall::verify {
namespace {

LadderProblem problem_of(std::string name, Arrangement arrangement,
                         std::vector<LadderQuantity> quantities) {
  LadderProblem problem;
  problem.name = std::move(name);
  problem.section = arrangement.section;
  problem.quantities = std::move(quantities);
  problem.errors = [arrangement = std::move(arrangement)](auto grid) {
    return errors_of(arrangement, std::move(grid));
  };
  return problem;
}

LadderQuantity off_outlines(double error) {
  return {"B off outlines", error_band(error)};
}
LadderQuantity near_straight_outlines(double error) {
  return {"B near outlines", error_band(error)};
}
LadderQuantity near_curved_outlines(double error) {
  return {"B near outlines", error_band(error), layer_order};
}
LadderQuantity force_on_currents(double error) {
  return {"force on currents", error_band(error)};
}
LadderQuantity force_by_stress(double error) {
  return {"force by stress", error_band(error)};
}
LadderQuantity inductance(double error) {
  return {"inductance", error_band(error)};
}

LadderProblem half_space() {
  auto problem =
      problem_of("round bars before a half-space of steel", bars_before_steel(),
                 {off_outlines(9.8e-5), near_curved_outlines(3.3e-4), force_on_currents(1.2e-4)});
  problem.grid.reach = 1.0;  // the steel reaches the boundary
  return problem;
}

LadderProblem made_up_potential() {
  constexpr double mm = 1e-3;
  const ManufacturedField field{{}, 20 * mm, 30.0, 10.0, 1e-3};
  LadderProblem problem;
  problem.name = "made-up potential, two permeabilities, stretched grid";
  problem.section.parts = {
      {"disc",
       mesh::Part::Kind::wall,
       {mesh::Round{field.centre, 2.0 * field.radius}},
       false,
       false},
      // As air; it is there to make the grid uneven.
      {"bar", mesh::Part::Kind::bar, {mesh::Round{{33 * mm, 14 * mm}, 10 * mm}}, false, false}};
  problem.grid.reach = 4.0;
  problem.quantities = {{"A at nodes", error_band(3.0e-4)}};
  problem.errors = [field](const std::shared_ptr<const mesh::FittedGrid>& grid) {
    return std::vector<double>{error_of(field, 0, *grid)};
  };
  return problem;
}

}  // namespace

std::vector<LadderProblem> ladder_problems() {
  return {problem_of("round bar in open air", round_bar_in_air(),
                     {off_outlines(2.4e-4), near_curved_outlines(4.3e-4)}),
          problem_of("flat bar in open air", flat_bar_in_air(),
                     {off_outlines(2.1e-4), near_straight_outlines(7.5e-4)}),
          problem_of("pair of flat bars", pair_of_flat_bars(),
                     {off_outlines(2.5e-4), near_straight_outlines(9.2e-4),
                      force_on_currents(4.7e-4), force_by_stress(4.7e-4), inductance(5.1e-4)}),
          half_space(),
          problem_of("off-centre round bars in a steel pipe", bars_in_pipe(),
                     {off_outlines(8.8e-5), near_curved_outlines(5.1e-4), force_on_currents(6.2e-5),
                      force_by_stress(7.9e-5), inductance(2.9e-5)}),
          problem_of("round bars beside a steel rod", bars_beside_rod(),
                     {off_outlines(3.2e-4), near_curved_outlines(5.5e-4), force_on_currents(6.5e-4),
                      force_by_stress(4.4e-4), inductance(2.2e-4)}),
          problem_of("coaxial tubes, go and return", coaxial_line(),
                     {off_outlines(2.5e-4), near_curved_outlines(1.5e-3), inductance(4.8e-4)}),
          made_up_potential()};
}

}  // namespace barwall::verify
