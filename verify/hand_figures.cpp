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

/// Sets a hand value beside the peak force.
void set_peak(solver::Entry& entry, const HandValue& hand) {
  name_formula(entry, hand);
  for (solver::Figure& figure : entry.figures) {
    if (figure.key == "force_peak") figure.hand = hand.value;
  }
}

/// True for the pieces at the ends of a row: none is farther from all others together.
bool outermost(const mesh::Part& bar, std::size_t piece) {
  const auto from = [&](const mesh::Shape& one) {
    double sum = 0.0;
    for (const mesh::Shape& other : bar.pieces) {
      sum += distance(bounds(one).centre(), bounds(other).centre());
    }
    return sum;
  };
  const double own = from(bar.pieces[piece]);
  return std::all_of(bar.pieces.begin(), bar.pieces.end(),
                     [&](const mesh::Shape& other) { return from(other) <= own * (1.0 + 1e-9); });
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
    for (solver::Figure& figure : figures.loops[k].figures) {
      if (figure.unit == "H/m") figure.hand = hand->value;
    }
  }
  if (fault == nullptr || !figures.fault) return;
  const double peak = standard_peak(*fault);
  for (solver::Entry& bar : figures.fault->bars) {
    const int part = part_of(problem.section, bar.name);
    if (const auto hand = standard_fault_force(problem.section, *fault, peak, part)) {
      set_peak(bar, *hand);
    }
    const bool in_fault = std::count(fault->bars.begin(), fault->bars.end(), part) > 0;
    const mesh::Part& whole = problem.section.parts[static_cast<std::size_t>(part)];
    const auto between = in_fault ? standard_piece_force(whole, peak) : std::nullopt;
    for (std::size_t k = 0; between && k < bar.pieces.size(); ++k) {
      if (outermost(whole, k)) set_peak(bar.pieces[k], *between);
    }
  }
}

}  // namespace barwall::verify
