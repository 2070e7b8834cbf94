#include "solver/figures.hpp"

#include <fmt/format.h>

#include <algorithm>
#include <cmath>
#include <map>
#include <numbers>

#include "solver/energy.hpp"
#include "solver/flux_linkage.hpp"

namespace barwall::solver {
namespace {

/// With more parts than this, only the gaps to each part's nearest neighbours are listed.
constexpr std::size_t most_parts_with_all_gaps = 40;

constexpr double degree = std::numbers::pi / 180.0;

template <class T>
void append(std::vector<T>& to, std::vector<T> more) {
  to.insert(to.end(), more.begin(), more.end());
}

class Collector {
public:
  Collector(const PartIntegrals& integrals, const RecoveredField& field, const StressBands& bands)
      : integrals_(integrals),
        solution_(integrals.solution()),
        problem_(*solution_.problem),
        field_(field),
        bands_(bands),
        alternating_(problem_.excitation.alternating()),
        saturable_(saturable(problem_)),
        visible_(visible_parts(problem_.outline)),
        levels_(field_levels(solution_)) {}

  void parts(Figures& figures) const {
    for (int part : visible_) {
      const mesh::Part& p = problem_.section.parts[static_cast<std::size_t>(part)];
      (p.kind == mesh::Part::Kind::bar ? figures.bars : figures.walls).push_back(entry_of(part));
    }
    for (int part : visible_) {
      const mesh::Part& p = problem_.section.parts[static_cast<std::size_t>(part)];
      const bool carries = problem_.excitation.current[static_cast<std::size_t>(part)] != 0.0;
      if (!alternating_ || !carries || p.pieces.size() < 2) continue;
      figures.notices.push_back(
          {"equal sharing",
           "bar \"" + p.name + "\": its " + std::to_string(p.pieces.size()) +
               " pieces are taken to share the current by area; with alternating current they "
               "seldom do, which makes forces between them and field nearby indicative",
           true});
    }
    for (int part : visible_) add_table_notice(figures, part);
    append(figures.notices, saturation_notices(problem_, levels_, 1.0, "under load"));
    for (std::size_t b = 0; b < bands_.bodies().size(); ++b) {
      const auto& members = bands_.bodies()[b];
      if (members.size() < 2) continue;
      Entry entry;
      for (int part : members) entry.parts.push_back(name_of(part));
      entry.name = joined(entry.parts);
      entry.figures =
          force_figures(bands_.force(solution_, static_cast<int>(b), whole_band), alternating_);
      figures.bodies.push_back(std::move(entry));
    }
  }

  void loops(Figures& figures) const {
    for (const Loop& loop : problem_.loops) {
      const double inductance = loop_inductance(integrals_, loop);
      Entry entry{loop.name, {}, {{"inductance", inductance, "H/m"}}, {}, 0.0};
      if (saturable_) {
        entry.figures = {
            {"inductance_secant", inductance, "H/m"},
            {"inductance_differential", differential_inductance(integrals_, loop), "H/m"}};
      }
      figures.loops.push_back(std::move(entry));
    }
  }

  void circuits(Figures& figures, const std::vector<Circuit>& circuits) const {
    for (const Circuit& circuit : circuits) {
      Entry entry;
      double sum = 0.0;
      for (int bar : circuit.bars) {
        entry.parts.push_back(name_of(bar));
        sum += reactance(bar);
      }
      entry.name = joined(entry.parts);
      entry.figures = {{"reactance_mean", sum / static_cast<double>(circuit.bars.size()), "ohm/m"}};
      figures.circuits.push_back(std::move(entry));
    }
  }

  void energy(Figures& figures) const {
    bool net = false;
    for (const CurrentPattern& pattern : solution_.patterns) net = net || pattern.net != 0.0;
    const Pulsation energy = field_energy(solution_);
    if (saturable_) {
      const SaturableEnergy both = saturable_energy(solution_);
      figures.energy = {{"energy", both.energy, "J/m"}, {"coenergy", both.coenergy, "J/m"}};
    } else if (!alternating_) {
      figures.energy = {{"energy", energy.mean, "J/m"}};
    } else {
      figures.energy = {{"energy_mean", energy.mean, "J/m"},
                        {"energy_peak", energy.largest(), "J/m"}};
    }
    if (net) figures.energy = without_values(figures.energy);
  }

  void probes(Figures& figures, const std::vector<Probe>& probes) const {
    for (const Probe& probe : probes) figures.probes.push_back(probe_figures(probe, figures));
  }

  void clearances(Figures& figures) const {
    auto pairs = gaps(problem_.outline);
    std::erase_if(pairs,
                  [&](const auto& pair) { return !is_bar(pair.first) && !is_bar(pair.second); });
    if (visible_.size() > most_parts_with_all_gaps) {
      std::map<int, double> least;
      for (const auto& pair : pairs) {
        for (int part : {pair.first, pair.second}) {
          const auto known = least.try_emplace(part, HUGE_VAL).first;
          known->second = std::min(known->second, pair.gap.width);
        }
      }
      std::erase_if(pairs, [&](const auto& pair) {
        return pair.gap.width > std::max(least[pair.first], least[pair.second]);
      });
    }
    for (const auto& pair : pairs) {
      figures.clearances.push_back(
          {{name_of(pair.first), name_of(pair.second)}, {"gap", pair.gap.width, "m"}});
    }
  }

private:
  const std::string& name_of(int part) const {
    return problem_.section.parts[static_cast<std::size_t>(part)].name;
  }
  bool is_bar(int part) const {
    return problem_.section.parts[static_cast<std::size_t>(part)].kind == mesh::Part::Kind::bar;
  }
  bool magnetic(int part) const {
    return problem_.materials[static_cast<std::size_t>(part)].magnetic();
  }
  /// Says how much of a part lies beyond its material's B-H table.
  void add_table_notice(Figures& figures, int part) const {
    const double share = levels_[static_cast<std::size_t>(part)].share_beyond_table;
    if (share == 0.0) return;
    const BhCurve& curve = *problem_.materials[static_cast<std::size_t>(part)].curve;
    const std::string text = fmt::format(
        "\"{}\": {:.3g} % of its area lies above {:.4g} T, where its B-H table ends; there B is "
        "taken to rise as in vacuum",
        name_of(part), 100.0 * share, curve.table_end());
    figures.notices.push_back({"beyond the B-H table", text, false});
  }
  std::vector<Figure> part_force(int part) const {
    const auto force = force_on_part(integrals_, bands_, part);
    return force ? force_figures(*force, alternating_)
                 : without_values(force_figures({}, alternating_));
  }

  double reactance(int bar) const {
    const std::complex<double> current = problem_.excitation.current[static_cast<std::size_t>(bar)];
    if (current == 0.0) return not_given;
    const std::complex<double> linkage{integrals_.mean_potential(bar, 0),
                                       integrals_.mean_potential(bar, 1)};
    return 2.0 * std::numbers::pi * problem_.excitation.frequency_hz * (linkage / current).real();
  }

  Entry entry_of(int part) const {
    const mesh::Part& p = problem_.section.parts[static_cast<std::size_t>(part)];
    Entry entry{p.name, {}, part_force(part), {}, 0.0};
    const FieldLevel& level = levels_[static_cast<std::size_t>(part)];
    if (is_bar(part)) {
      entry.current = problem_.excitation.current[static_cast<std::size_t>(part)];
      const double in_phase = integrals_.mean_potential(part, 0);
      if (alternating_) {
        const double quadrature = integrals_.mean_potential(part, 1);
        append<Figure>(entry.figures, {{"flux_linkage_in_phase", in_phase, "Wb/m"},
                                       {"flux_linkage_quadrature", quadrature, "Wb/m"},
                                       {"reactance", reactance(part), "ohm/m"}});
      } else {
        append<Figure>(entry.figures, {{"flux_linkage", in_phase, "Wb/m"}});
      }
      append<Figure>(entry.figures, {{"b_high", level.high, "T"}});
      for (std::size_t k = 0; p.pieces.size() > 1 && k < p.pieces.size(); ++k) {
        auto force =
            magnetic(part)
                ? without_values(force_figures({}, alternating_))
                : force_figures(lorentz_force(integrals_, part, static_cast<int>(k)), alternating_);
        entry.pieces.push_back(
            {p.name + "." + std::to_string(k + 1), {}, std::move(force), {}, 0.0});
      }
    } else {
      append<Figure>(entry.figures, {{"b_mean", level.mean, "T"}, {"b_high", level.high, "T"}});
    }
    if (problem_.materials[static_cast<std::size_t>(part)].saturable()) {
      append<Figure>(entry.figures, {{"saturated_share", level.saturated_share, "1"}});
    }
    return entry;
  }

  std::vector<Figure> field_figures(mesh::Point point) const {
    const mesh::Location at = locate(solution_.grid(), problem_.section, point);
    const mesh::Point b = field_.flux_density(at, point, 0);
    if (!alternating_) return {{"b_x", b.x, "T"}, {"b_y", b.y, "T"}, {"b", norm(b), "T"}};
    const mesh::Point q = field_.flux_density(at, point, 1);
    return {{"b_x_in_phase", b.x, "T"},
            {"b_x_quadrature", q.x, "T"},
            {"b_y_in_phase", b.y, "T"},
            {"b_y_quadrature", q.y, "T"},
            {"b_rms", std::hypot(norm(b), norm(q)), "T"},
            {"b_peak", peak_magnitude(b, q), "T"}};
  }

  ProbeFigures probe_figures(const Probe& probe, Figures& figures) const {
    ProbeFigures result{probe, {}, {}, {}, LimitState::none};
    const std::string key = alternating_ ? "b_rms" : "b";
    double largest = -1.0;
    double largest_peak = 0.0;
    int on_outline = 0;
    for (mesh::Point point : probe.points) {
      result.points.push_back({point, field_figures(point)});
      const auto& found = result.points.back().figures;
      const double b = find_figure(found, key)->value;
      if (b > largest) {
        largest = b;
        result.largest_at = point;
      }
      if (alternating_) largest_peak = std::max(largest_peak, find_figure(found, "b_peak")->value);
      on_outline += lies_on_outline(point) ? 1 : 0;
    }
    if (on_outline > 0) {
      figures.notices.push_back(
          {"probe on an outline",
           "probe \"" + probe.name + "\" lies on an outline" +
               (probe.line ? " at " + std::to_string(on_outline) + " of its points" : "") +
               "; the value is that of the part painted later",
           false});
    }
    if (probe.line) {
      result.figures.push_back({key + "_max", largest, "T"});
      if (alternating_) result.figures.push_back({"b_peak_max", largest_peak, "T"});
    }
    if (probe.limit) {
      result.figures.push_back({"limit", *probe.limit, "T"});
      result.figures.push_back({"of_limit", largest / *probe.limit, "1"});
      result.limit_state = largest <= *probe.limit ? LimitState::met : LimitState::exceeded;
    }
    return result;
  }

  bool lies_on_outline(mesh::Point point) const {
    return std::any_of(problem_.outline.pieces.begin(), problem_.outline.pieces.end(),
                       [&](const mesh::OutlinePiece& piece) {
                         return distance(piece.curve, point) <= problem_.outline.contact;
                       });
  }

  const PartIntegrals& integrals_;
  const Solution& solution_;
  const Problem& problem_;
  const RecoveredField& field_;
  const StressBands& bands_;
  bool alternating_;
  bool saturable_;
  std::vector<int> visible_;
  std::vector<FieldLevel> levels_;  ///< per part
};

}  // namespace

std::vector<Figure> force_figures(const PulsatingVector& force, bool alternating) {
  if (!alternating) {
    return {{"force_x", force.x.mean, "N/m"}, {"force_y", force.y.mean, "N/m"}};
  }
  const Peak peak = peak_of(force);
  return {{"force_mean_x", force.x.mean, "N/m"},
          {"force_mean_y", force.y.mean, "N/m"},
          {"force_x_max", force.x.largest(), "N/m"},
          {"force_x_min", force.x.smallest(), "N/m"},
          {"force_y_max", force.y.largest(), "N/m"},
          {"force_y_min", force.y.smallest(), "N/m"},
          {"force_peak", peak.magnitude, "N/m"},
          {"force_peak_at", peak.wt / degree, "deg"},
          {"force_peak_direction", std::atan2(peak.value.y, peak.value.x) / degree, "deg"}};
}

std::vector<Figure> without_values(std::vector<Figure> figures) {
  for (Figure& figure : figures) figure.value = not_given;
  return figures;
}

std::string joined(const std::vector<std::string>& names) {
  std::string result;
  for (const std::string& name : names) result += (result.empty() ? "" : "+") + name;
  return result;
}

std::vector<Notice> saturation_notices(const Problem& problem,
                                       const std::vector<FieldLevel>& levels, double scale,
                                       const std::string& when) {
  std::vector<Notice> notices;
  for (std::size_t k = 0; k < levels.size(); ++k) {
    const Material& material = problem.materials[k];
    const double high = scale * levels[k].high;
    if (!material.magnetic() || material.saturable() || high <= steel_saturates_at) continue;
    notices.push_back(
        {"saturation",
         fmt::format("\"{}\" {}: B above {:.3g} T on 1 % of its area at a constant permeability; "
                     "steel saturates near {:.1f} T, which weakens its effect on forces and lets "
                     "more field through: give it a B-H table, or a lower permeability",
                     problem.section.parts[k].name, when, high, steel_saturates_at),
         true});
  }
  return notices;
}

const Figure* find_figure(const std::vector<Figure>& figures, const std::string& key) {
  const auto found = std::find_if(figures.begin(), figures.end(),
                                  [&](const Figure& figure) { return figure.key == key; });
  return found == figures.end() ? nullptr : &*found;
}

std::vector<std::pair<std::string, const Figure*>> addresses(const Figures& figures) {
  std::vector<std::pair<std::string, const Figure*>> result;
  const auto add = [&](const std::string& prefix, const std::vector<Figure>& list) {
    for (const Figure& figure : list) result.emplace_back(prefix + figure.key, &figure);
  };
  const auto add_entries = [&](const std::string& kind, const std::vector<Entry>& entries) {
    for (const Entry& entry : entries) {
      add(kind + "/" + entry.name + "/", entry.figures);
      for (const Entry& piece : entry.pieces) {
        add(kind + "/" + entry.name + "/pieces/" + piece.name + "/", piece.figures);
      }
    }
  };
  add_entries("bars", figures.bars);
  add_entries("walls", figures.walls);
  add_entries("bodies", figures.bodies);
  add_entries("loops", figures.loops);
  add_entries("circuits", figures.circuits);
  add("", figures.energy);
  if (figures.fault) {
    add("fault/", figures.fault->circuit);
    add_entries("fault/bars", figures.fault->bars);
    add_entries("fault/walls", figures.fault->walls);
    add_entries("fault/bodies", figures.fault->bodies);
  }
  for (const ProbeFigures& probe : figures.probes) {
    const std::string prefix = "probes/" + probe.probe.name + "/";
    if (!probe.probe.line) add(prefix, probe.points.front().figures);
    add(prefix, probe.figures);
  }
  for (const Clearance& clearance : figures.clearances) {
    result.emplace_back("clearances/" + clearance.between[0] + "-" + clearance.between[1] + "/gap",
                        &clearance.gap);
  }
  return result;
}

LimitState limits_of(const Figures& figures) {
  LimitState worst = LimitState::none;
  const auto rank = [](LimitState state) {
    switch (state) {
      case LimitState::none:
        return 0;
      case LimitState::met:
        return 1;
      case LimitState::undecided:
        return 2;
      case LimitState::exceeded:
        return 3;
    }
    return 0;
  };
  for (const ProbeFigures& probe : figures.probes) {
    if (rank(probe.limit_state) > rank(worst)) worst = probe.limit_state;
  }
  return worst;
}

Figures figures_of(const PartIntegrals& integrals, const RecoveredField& field,
                   const StressBands& bands, const std::vector<Probe>& probes,
                   const std::vector<Circuit>& circuits) {
  const Collector collector(integrals, field, bands);
  Figures figures;
  collector.parts(figures);
  collector.loops(figures);
  collector.circuits(figures, circuits);
  collector.energy(figures);
  collector.probes(figures, probes);
  collector.clearances(figures);
  return figures;
}

}  // namespace barwall::solver
