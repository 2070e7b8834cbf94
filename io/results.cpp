#include "io/results.hpp"

#include <algorithm>

namespace barwall::io {

std::string Results::verdict() const {
  return verify::sound(checks) ? "sound" : "unsound";
}

std::vector<std::string> Results::fault_bars() const {
  std::vector<std::string> names;
  for (const int bar : input.fault->current.bars) {
    names.push_back(input.section.parts[static_cast<std::size_t>(bar)].name);
  }
  return names;
}

std::string Results::validity() const {
  const bool indicative = std::any_of(figures.notices.begin(), figures.notices.end(),
                                      [](const solver::Notice& n) { return n.indicative; });
  return indicative ? "indicative" : "full";
}

std::string Results::limits() const {
  switch (limits_of(figures)) {
    case solver::LimitState::none:
      return "none";
    case solver::LimitState::met:
      return "met";
    case solver::LimitState::exceeded:
      return "exceeded";
    case solver::LimitState::undecided:
      return "undecided";
  }
  return "none";
}

int Results::exit_code() const {
  if (verdict() != "sound") return 1;
  const std::string state = limits();
  return state == "exceeded" || state == "undecided" ? 4 : 0;
}

}  // namespace barwall::io
