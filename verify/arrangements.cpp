#include "verify/arrangements.hpp"

#include <cmath>
#include <string>

#include "verify/bar_force.hpp"
#include "verify/complex_field.hpp"
#include "verify/filled_bar.hpp"
#include "verify/half_space.hpp"
#include "verify/mean_distance.hpp"
#include "verify/pipe_series.hpp"
#include "verify/round_conductor.hpp"
#include "verify/steel_rod.hpp"

namespace barwall::verify {
namespace {

constexpr double mm = 1e-3;

void add_bar(Arrangement& arrangement, mesh::Shape shape, double current) {
  const auto number = arrangement.section.parts.size() + 1;
  arrangement.section.parts.push_back(
      {"bar " + std::to_string(number), mesh::Part::Kind::bar, {std::move(shape)}, false, false});
  arrangement.materials.push_back({});
  arrangement.currents.push_back(current);
}

void add_wall(Arrangement& arrangement, mesh::Shape shape, double relative_permeability) {
  arrangement.section.parts.push_back(
      {"wall", mesh::Part::Kind::wall, {std::move(shape)}, false, false});
  arrangement.materials.push_back({"steel", relative_permeability});
  arrangement.currents.push_back(0.0);
}

/// The region of comparison: the box round all parts, drawn out by a quarter of its size.
void set_region(Arrangement& arrangement, double near) {
  arrangement.near = near;
  const mesh::Box box = bounds(arrangement.section);
  const mesh::Point margin{0.25 * box.width(), 0.25 * box.height()};
  arrangement.region = {box.low - margin, box.high + margin};
}

std::vector<RoundBar> add_round_bars(Arrangement& arrangement, std::vector<RoundBar> bars) {
  for (const RoundBar& bar : bars) {
    add_bar(arrangement, mesh::Round{bar.centre, 2.0 * bar.radius}, bar.current);
  }
  return bars;
}

/// Exact field, force on each bar and inductance of the loop of any two bars, of round bars (parts
/// 0, 1, ...) with some steel.
template <class Steel>
void set_exact(Arrangement& arrangement, const Steel& steel, const std::vector<RoundBar>& bars) {
  arrangement.flux_density = [steel, bars](mesh::Point at) { return field_of(steel, bars, at); };
  for (std::size_t k = 0; k < bars.size(); ++k) {
    arrangement.forces.push_back({static_cast<int>(k), force_on_bar(steel, bars, k)});
    for (std::size_t other = k + 1; other < bars.size(); ++other) {
      std::vector<RoundBar> loop{bars[k], bars[other]};
      loop[0].current = 1.0;
      loop[1].current = -1.0;
      // Of all that comes from elsewhere the mean of A over a disc is the value at its centre; its
      // own current's is less than that by a quarter of mu_0 I / 2 pi.
      const auto mean = [&](const RoundBar& bar) {
        return potential_of(steel, loop, bar.centre) - 0.25 * mu_0_over_2pi * bar.current;
      };
      arrangement.inductances.push_back({{"loop", {static_cast<int>(k)}, {static_cast<int>(other)}},
                                         mean(loop[0]) - mean(loop[1])});
    }
  }
}

/// With nothing else about, the steel bears the opposite of all.
void add_force_on_steel(Arrangement& arrangement, int part) {
  mesh::Point sum;
  for (const Arrangement::Force& force : arrangement.forces) sum += force.exact;
  arrangement.forces.push_back({part, -sum});
}

}  // namespace

Arrangement round_bar_in_air() {
  Arrangement result;
  add_bar(result, mesh::Round{{}, 30 * mm}, 1000.0);
  set_region(result, 3 * mm);
  result.flux_density = [](mesh::Point at) { return field_of_disc({}, 15 * mm, 1000.0, at); };
  return result;
}

Arrangement flat_bar_in_air() {
  Arrangement result;
  const mesh::Rectangle bar{{}, 10 * mm, 60 * mm, 0.0};
  add_bar(result, bar, 1000.0);
  set_region(result, 1.5 * mm);
  result.flux_density = [bar](mesh::Point at) { return field_of(bar, 1000.0, at); };
  return result;
}

Arrangement pair_of_flat_bars() {
  Arrangement result;
  const mesh::Rectangle go{{-15 * mm, 0.0}, 10 * mm, 60 * mm, 0.0};
  const mesh::Rectangle back{{15 * mm, 0.0}, 10 * mm, 60 * mm, 0.0};
  add_bar(result, go, 1000.0);
  add_bar(result, back, -1000.0);
  set_region(result, 1.5 * mm);
  result.flux_density = [go, back](mesh::Point at) {
    return field_of(go, 1000.0, at) + field_of(back, -1000.0, at);
  };
  const double attraction = force_between_bars(1000.0, -1000.0, 10 * mm, 60 * mm, 30 * mm);
  result.forces = {{0, {attraction, 0.0}}, {1, {-attraction, 0.0}}};
  result.inductances = {
      {{"loop", {0}, {1}}, inductance_of_bar_pair({10 * mm, 60 * mm}, 30 * mm, 0.0)}};
  return result;
}

Arrangement bars_before_steel() {
  Arrangement result;
  const double far = 150 * mm;
  const double permeability = 500.0;
  const auto bars = add_round_bars(
      result, {{{-6 * mm, 25 * mm}, 1000.0, 10 * mm}, {{13 * mm, 55 * mm}, -700.0, 10 * mm}});
  add_wall(result, mesh::Rectangle{{0.0, -0.5 * far}, 2.0 * far, far, 0.0}, permeability);
  // A wall of air makes the section, and with it the grid, as high above the steel as it is deep.
  result.section.parts.push_back({"air",
                                  mesh::Part::Kind::wall,
                                  {mesh::Rectangle{{0.0, 0.5 * far}, 2.0 * far, far, 0.0}},
                                  true,
                                  false});
  result.materials.push_back({});
  result.currents.push_back(0.0);
  result.near = 2 * mm;
  result.region = {{-60 * mm, -40 * mm}, {60 * mm, 90 * mm}};
  const HalfSpace steel{{}, {0.0, 1.0}, permeability};
  set_exact(result, steel, bars);
  result.boundary = [steel, bars](mesh::Point at) { return potential_of(steel, bars, at); };
  result.inductances.clear();  // fields of 1 A in a bar would have the open boundary
  return result;
}

Arrangement bars_in_pipe() {
  Arrangement result;
  const auto bars = add_round_bars(result, {{{-22 * mm, -13 * mm}, 1000.0, 12 * mm},
                                            {{24 * mm, -9 * mm}, -800.0, 9 * mm},
                                            {{3 * mm, 27 * mm}, 300.0, 8 * mm}});
  const Pipe pipe{55 * mm, 65 * mm, 200.0};
  add_wall(result, mesh::Tube{{}, 130 * mm, 10 * mm}, pipe.relative_permeability);
  set_region(result, 5 * mm);  // the wall, a few cells thick, is all near its outlines
  set_exact(result, pipe, bars);
  add_force_on_steel(result, 3);
  return result;
}

Arrangement bars_beside_rod() {
  Arrangement result;
  const auto bars = add_round_bars(
      result, {{{50 * mm, 4 * mm}, 1000.0, 10 * mm}, {{21 * mm, 47 * mm}, -600.0, 10 * mm}});
  const SteelRod rod{30 * mm, 100.0};
  add_wall(result, mesh::Round{{}, 60 * mm}, rod.relative_permeability);
  set_region(result, 2 * mm);
  set_exact(result, rod, bars);
  add_force_on_steel(result, 2);
  return result;
}

Arrangement coaxial_line() {
  Arrangement result;
  add_bar(result, mesh::Tube{{}, 30 * mm, 5 * mm}, 1000.0);
  add_bar(result, mesh::Tube{{}, 80 * mm, 5 * mm}, -1000.0);
  set_region(result, 2 * mm);
  result.flux_density = [](mesh::Point at) {
    return field_of_tube({}, 10 * mm, 15 * mm, 1000.0, at) +
           field_of_tube({}, 35 * mm, 40 * mm, -1000.0, at);
  };
  // Mean logarithm of the distance over each tube from itself and from the other, which for
  // points within the sheath is that from its axis.
  const double inner = 35 * mm;
  const double outer = 40 * mm;
  const double between = (outer * outer * std::log(outer) - inner * inner * std::log(inner)) /
                             (outer * outer - inner * inner) -
                         0.5;
  const double inductance =
      mu_0_over_2pi * (2.0 * between - std::log(own_distance_of_ring(10 * mm, 15 * mm)) -
                       std::log(own_distance_of_ring(inner, outer)));
  result.inductances = {{{"loop", {0}, {1}}, inductance}};
  return result;
}

}  // namespace barwall::verify
