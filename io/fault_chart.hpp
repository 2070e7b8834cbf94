#pragma once

#include <string>

#include "io/line_panel.hpp"
#include "io/results.hpp"

namespace barwall::io {

/// What is drawn of a fault over time.
struct FaultChart {
  std::string fault;    ///< its bars and its current
  std::string closing;  ///< its closing angle, or how a direct current rises
  /// Magnitude of the force on every bar of the fault, or on the body of one whose own share is
  /// not given; the largest marked.
  LinePanel forces;
  LinePanel currents;
  std::string note;  ///< what the reader has to know
};

/// Only where results.fault_over_time().
FaultChart fault_chart(const Results& results);

}  // namespace barwall::io
