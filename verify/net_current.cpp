#include "verify/net_current.hpp"

#include <fmt/format.h>

namespace barwall::verify {

std::vector<solver::Notice> net_current(const solver::Excitation& excitation) {
  std::complex<double> sum;
  double magnitude = 0.0;
  for (const std::complex<double> current : excitation.current) {
    sum += current;
    magnitude += std::abs(current);
  }
  if (std::abs(sum) <= 1e-9 * magnitude) return {};
  return {
      {"net current",
       fmt::format("the bars' currents sum to {:.6g} A{}; they return outside the section, which "
                   "the model takes to be far away, and the field energy is not given",
                   std::abs(sum), excitation.alternating() ? " r.m.s." : ""),
       false}};
}

}  // namespace barwall::verify
