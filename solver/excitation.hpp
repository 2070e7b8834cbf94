#pragma once

#include <complex>
#include <string>
#include <vector>

namespace barwall::solver {

/// The currents of a section: one entry per part (walls carry 0).
///
/// Steady (frequency_hz = 0): the real part is the current [A], out of the page positive.
/// With a frequency: r.m.s. phasors [A], i(t) = sqrt(2) Re(current exp(j w t)).
struct Excitation {
  double frequency_hz = 0.0;
  std::vector<std::complex<double>> current;

  bool alternating() const { return frequency_hz > 0.0; }
};

/// Go and return conductors of a loop, as indices of parts. Each side shares the loop's current
/// by the areas of its bars.
struct Loop {
  std::string name;
  std::vector<int> go;
  std::vector<int> back;
};

/// Three bars in phase order and their optional neutral, as indices of parts.
struct Circuit {
  std::vector<int> bars;
  int neutral = -1;
};

}  // namespace barwall::solver
