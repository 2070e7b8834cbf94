#include "verify/energy_check.hpp"

#include <fmt/format.h>

#include <cmath>

#include "solver/energy.hpp"

namespace barwall::verify {

Check check_energy(const solver::PartIntegrals& integrals) {
  const solver::Pulsation field = field_energy(integrals.solution());
  const solver::TerminalEnergy terminal = terminal_energy(integrals);
  const auto gap = [&](auto part) {
    return std::abs(part(terminal.linkage) + part(terminal.boundary) - part(field));
  };
  const double difference = std::max({gap([](const auto& p) { return p.mean; }),
                                      gap([](const auto& p) { return p.cosine; }),
                                      gap([](const auto& p) { return p.sine; })});
  const double whole = field.mean;
  return make_check("energy", whole > 0.0 ? difference / whole : difference, 1e-6,
                    fmt::format("integral of B.H/2 is {:.6g} J/m", whole));
}

}  // namespace barwall::verify
