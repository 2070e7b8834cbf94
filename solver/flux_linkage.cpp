#include "solver/flux_linkage.hpp"

#include <algorithm>

namespace barwall::solver {
namespace {

struct Share {
  int bar = 0;
  double current = 0.0;  ///< of 1 A through the loop; negative on the way back
};

/// A unit of current among the bars of a loop, shared by their areas on the grid.
std::vector<Share> shares(const PartIntegrals& integrals, const Loop& loop) {
  std::vector<Share> result;
  const auto add = [&](const std::vector<int>& bars, double direction) {
    double whole = 0.0;
    for (int bar : bars) whole += integrals.area(bar);
    for (int bar : bars) result.push_back({bar, direction * integrals.area(bar) / whole});
  };
  add(loop.go, 1.0);
  add(loop.back, -1.0);
  return result;
}

/// The loop's own flux linkage per ampere, from the mean of A over a part (first) for 1 A in the
/// bar of a unit field (second).
template <class MeanOfUnit>
double linkage_of_loop(const PartIntegrals& integrals, const Loop& loop, MeanOfUnit mean) {
  const auto all = shares(integrals, loop);
  const auto& units = integrals.solution().unit_bars;
  double linkage = 0.0;
  for (const Share& source : all) {
    const auto unit = std::find(units.begin(), units.end(), source.bar) - units.begin();
    for (const Share& seen : all) {
      linkage += source.current * seen.current * mean(seen.bar, static_cast<int>(unit));
    }
  }
  return linkage;
}

}  // namespace

double loop_inductance(const PartIntegrals& integrals, const Loop& loop) {
  return linkage_of_loop(integrals, loop, [&](int part, int unit) {
    return integrals.mean_unit_potential(part, unit);
  });
}

double differential_inductance(const PartIntegrals& integrals, const Loop& loop) {
  return linkage_of_loop(
      integrals, loop, [&](int part, int unit) { return integrals.mean_unit_change(part, unit); });
}

}  // namespace barwall::solver
