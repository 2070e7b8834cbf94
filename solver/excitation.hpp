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

/// What all currents sum to [A].
struct NetCurrent {
  std::complex<double> sum = 0.0;
  double magnitudes = 0.0;  ///< the sum of their magnitudes
};

inline NetCurrent net_current_of(const Excitation& excitation) {
  NetCurrent net;
  for (const std::complex<double>& value : excitation.current) {
    net.sum += value;
    net.magnitudes += std::abs(value);
  }
  return net;
}

/// True when the currents do not sum to zero, at any instant.
inline bool has_net_current(const Excitation& excitation) {
  const NetCurrent net = net_current_of(excitation);
  return std::abs(net.sum) > 1e-12 * net.magnitudes;
}

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
