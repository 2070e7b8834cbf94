#pragma once

#include <string>

#include "solver/cycle.hpp"

namespace barwall::verify {

/// What a handbook's formula gives for a case. It knows nothing of steel, nor of shapes beyond
/// those the formula was made for: the ratio of a figure to it says what those change.
template <class Value>
struct Hand {
  Value value;
  std::string formula;  ///< its name, for the reader
  std::string source;   ///< where it is published
};

using HandValue = Hand<double>;
/// Over the cycle; of steady currents a mean alone.
using HandForce = Hand<solver::PulsatingVector>;

}  // namespace barwall::verify
