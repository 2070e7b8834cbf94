#include "verify/hand_figures.hpp"

#include <algorithm>

#include "verify/hand_force.hpp"
#include "verify/hand_inductance.hpp"
#include "verify/short_circuit.hpp"

namespace barwall::verify {
namespace {

int part_of(const mesh::Section& section, const std::string& name) {
  const auto found = std::find_if(section.parts.begin(), section.parts.end(),
                                  [&](const mesh::Part& part) { return part.name == name; });
  return static_cast<int>(found - section.parts.begin());
}

template <class Value>
void name_formula(solver::Entry& entry, const Hand<Value>& hand) {
  entry.hand_formula = hand.formula;
  entry.hand_source = hand.source;
}

}  // namespace

void add_hand_values(solver::Figures& figures, const solver::Problem& problem,
                     const solver::FaultCurrent* fault) {
  const bool alternating = problem.excitation.alternating();
  for (solver::Entry& bar : figures.bars) {
    const auto hand =
        hand_force(problem.section, problem.excitation, part_of(problem.section, bar.name));
    if (!hand) continue;
    name_formula(bar, *hand);
    for (const solver::Figure& value : solver::force_figures(hand->value, alternating)) {
      // With a frequency the peak alone: a ratio of means that nearly cancel says nothing.
      if (value.unit != "N/m" || (alternating && value.key != "force_peak")) continue;
      for (solver::Figure& figure : bar.figures) {
        if (figure.key == value.key) figure.hand = value.value;
      }
    }
  }
  for (std::size_t k = 0; k < figures.loops.size(); ++k) {
    const solver::Loop& loop = problem.loops[k];
    const auto hand = hand_inductance(problem.section, loop.go, loop.back);
    if (!hand) continue;
    name_formula(figures.loops[k], *hand);
    for (solver::Figure& figure : figures.loops[k].figures) figure.hand = hand->value;
  }
  if (fault == nullptr || !figures.fault) return;
  for (solver::Entry& bar : figures.fault->bars) {
    const auto hand = standard_fault_force(problem.section, *fault, standard_peak(*fault),
                                           part_of(problem.section, bar.name));
    if (!hand) continue;
    name_formula(bar, *hand);
    for (solver::Figure& figure : bar.figures) {
      if (figure.key == "force_peak") figure.hand = hand->value;
    }
  }
}

}  // namespace barwall::verify
