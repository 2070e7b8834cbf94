#include "verify/notices.hpp"

#include "verify/closed_steel_loop.hpp"
#include "verify/conducting_shell.hpp"
#include "verify/end_effect.hpp"
#include "verify/force_end_effect.hpp"
#include "verify/net_current.hpp"
#include "verify/phase_order.hpp"
#include "verify/skin_depth.hpp"

namespace barwall::verify {

std::vector<solver::Notice> notices_of(const solver::Problem& problem,
                                       const solver::Figures& figures,
                                       const std::vector<solver::Circuit>& circuits,
                                       std::optional<double> run_length) {
  std::vector<solver::Notice> notices;
  const auto add = [&](const std::vector<solver::Notice>& more) {
    notices.insert(notices.end(), more.begin(), more.end());
  };
  add(phase_order(problem.section, problem.excitation, circuits));
  add(net_current(problem.excitation));
  add(closed_steel_loops(problem));
  add(skin_depth_notices(problem));
  add(conducting_shells(problem));
  if (run_length) {
    add(force_end_effect(problem.section, problem.excitation, *run_length));
    add(end_effect(problem, figures, *run_length));
  }
  return notices;
}

}  // namespace barwall::verify
