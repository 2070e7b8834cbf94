#include "verify/run_checks.hpp"

namespace barwall::verify {

std::vector<Check> run_checks(const solver::Solution&, const solver::RecoveredField&,
                              const solver::StressBands&) {
  return {};
}

}  // namespace barwall::verify
