#include "verify/net_current.hpp"

#include <fmt/format.h>

namespace barwall::verify {

std::vector<solver::Notice> net_current(const solver::Excitation& excitation) {
  const solver::NetCurrent net = net_current_of(excitation);
  if (std::abs(net.sum) <= 1e-9 * net.magnitudes) return {};
  return {
      {"net current",
       fmt::format("the bars' currents sum to {:.6g} A{}; they return outside the section, which "
                   "the model takes to be far away, and the field energy is not given",
                   std::abs(net.sum), excitation.alternating() ? " r.m.s." : ""),
       false}};
}

}  // namespace barwall::verify
