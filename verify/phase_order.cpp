#include "verify/phase_order.hpp"

#include <fmt/format.h>

#include <algorithm>
#include <array>
#include <cctype>
#include <map>
#include <numbers>
#include <optional>
#include <string>
#include <tuple>

namespace barwall::verify {
namespace {

using Triple = std::array<int, 3>;  ///< parts, in phase order

/// A name that ends in its place within a sequence.
struct Label {
  std::tuple<std::string, std::string> sequence;  ///< the name without its end, and the kind of end
  int place = 0;
};

std::optional<Label> label_of(const std::string& name) {
  const std::size_t stem = name.find_last_not_of("0123456789") + 1;
  if (stem < name.size()) {
    if (name.size() - stem > 9) return {};
    return Label{{name.substr(0, stem), "number"}, std::stoi(name.substr(stem))};
  }
  const int end = std::toupper(static_cast<unsigned char>(name.back()));
  for (const std::string letters : {"ABC", "RST", "UVW"}) {
    const std::size_t place = letters.find(static_cast<char>(end));
    if (place == std::string::npos) continue;
    return Label{{name.substr(0, name.size() - 1), letters}, static_cast<int>(place)};
  }
  return {};
}

/// A notice where three bars follow each other against their names.
std::optional<solver::Notice> swapped(const mesh::Section& section, const Triple& order) {
  std::array<Label, 3> labels;
  std::array<std::string, 3> names;
  for (std::size_t k = 0; k < 3; ++k) {
    names[k] = section.parts[static_cast<std::size_t>(order[k])].name;
    const auto label = label_of(names[k]);
    if (!label || (k > 0 && label->sequence != labels[0].sequence)) return {};
    labels[k] = *label;
  }
  std::array<int, 3> places{labels[0].place, labels[1].place, labels[2].place};
  std::sort(places.begin(), places.end());
  // Of three one in its place and two not: these two are swapped. All or none in place is a
  // rotation.
  std::vector<std::string> astray;
  for (std::size_t k = 0; k < 3; ++k) {
    if (labels[k].place != places[k]) astray.push_back(names[k]);
  }
  if (astray.size() != 2) return {};
  std::sort(astray.begin(), astray.end());
  return solver::Notice{
      "phase order",
      fmt::format("the phases follow each other as \"{}\", \"{}\", \"{}\": by their names \"{}\" "
                  "and \"{}\" look swapped",
                  names[0], names[1], names[2], astray[0], astray[1]),
      false};
}

/// Three bars put in phase order, the first nearest to the angle zero; none where their currents
/// are no three phases.
std::optional<Triple> in_phase_order(Triple bars, const solver::Excitation& excitation) {
  const auto current = [&](int bar) { return excitation.current[static_cast<std::size_t>(bar)]; };
  const auto lag = [&](int from, int to) {  // [degrees], from 0 to 360
    const double angle = std::arg(current(from) / current(to)) * 180.0 / std::numbers::pi;
    return angle < 0.0 ? angle + 360.0 : angle;
  };
  std::sort(bars.begin(), bars.end(), [&](int a, int b) {
    return std::abs(std::arg(current(a))) < std::abs(std::arg(current(b)));
  });
  if (lag(bars[0], bars[1]) > lag(bars[0], bars[2])) std::swap(bars[1], bars[2]);
  const auto [least, largest] = std::minmax(
      {std::abs(current(bars[0])), std::abs(current(bars[1])), std::abs(current(bars[2]))});
  const bool three_phases = largest <= 1.01 * least &&
                            std::abs(lag(bars[0], bars[1]) - 120.0) <= 1.0 &&
                            std::abs(lag(bars[0], bars[2]) - 240.0) <= 1.0 &&
                            std::abs(lag(bars[1], bars[2]) - 120.0) <= 1.0;
  return three_phases ? std::optional(bars) : std::nullopt;
}

}  // namespace

std::vector<solver::Notice> phase_order(const mesh::Section& section,
                                        const solver::Excitation& excitation,
                                        const std::vector<solver::Circuit>& circuits) {
  if (!excitation.alternating()) return {};
  std::vector<Triple> triples;
  std::vector<bool> own(section.parts.size(), true);
  for (const solver::Circuit& circuit : circuits) {
    triples.push_back({circuit.bars[0], circuit.bars[1], circuit.bars[2]});
    for (const int bar : circuit.bars) own[static_cast<std::size_t>(bar)] = false;
    if (circuit.neutral >= 0) own[static_cast<std::size_t>(circuit.neutral)] = false;
  }
  std::map<std::tuple<std::string, std::string>, std::vector<int>> sequences;
  for (std::size_t k = 0; k < section.parts.size(); ++k) {
    if (!own[k] || excitation.current[k] == 0.0) continue;
    if (const auto label = label_of(section.parts[k].name)) {
      sequences[label->sequence].push_back(static_cast<int>(k));
    }
  }
  for (const auto& [sequence, bars] : sequences) {
    if (bars.size() != 3) continue;
    if (const auto order = in_phase_order({bars[0], bars[1], bars[2]}, excitation)) {
      triples.push_back(*order);
    }
  }
  std::vector<solver::Notice> notices;
  for (const Triple& order : triples) {
    if (auto notice = swapped(section, order)) notices.push_back(std::move(*notice));
  }
  return notices;
}

}  // namespace barwall::verify
