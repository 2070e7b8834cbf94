#include "solver/figures.hpp"

#include <fmt/format.h>

#include <algorithm>
#include <cmath>
#include <map>
#include <numbers>

#include "solver/saturation_notices.hpp"

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
  Collector(const Problem& problem, const ForceGeometry& geometry, const Readings& readings)
      : problem_(problem),
        geometry_(geometry),
        readings_(readings),
        alternating_(problem_.excitation.alternating()),
        visible_(visible_parts(problem_.outline)) {}

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
    append(figures.notices, table_notices(problem_, readings_.levels, "under load"));
    append(figures.notices, saturation_notices(problem_, readings_.levels, "under load"));
    auto force = readings_.forces.body.begin();
    for (const auto& members : geometry_.bands.bodies()) {
      if (members.size() < 2) continue;
      Entry entry;
      for (int part : members) entry.parts.push_back(name_of(part));
      entry.name = joined(entry.parts);
      entry.figures = force_figures(*force++, alternating_);
      figures.bodies.push_back(std::move(entry));
    }
  }

  void loops(Figures& figures) const {
    for (std::size_t k = 0; k < problem_.loops.size(); ++k) {
      const LoopInductance& inductance = readings_.loops[k];
      Entry entry{problem_.loops[k].name, {}, {{"inductance", inductance.value, "H/m"}}, {}, 0.0};
      if (inductance.differential) {
        entry.figures = {{"inductance_secant", inductance.value, "H/m"},
                         {"inductance_differential", *inductance.differential, "H/m"}};
      }
      if (readings_.loops_at) {
        entry.figures.push_back({"inductance_at", *readings_.loops_at / degree, "deg"});
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
    const auto add = [&](const std::string& name, const Pulsation& energy) {
      if (!alternating_) {
        figures.energy.push_back({name, energy.mean, "J/m"});
      } else {
        figures.energy.push_back({name + "_mean", energy.mean, "J/m"});
        figures.energy.push_back({name + "_peak", energy.largest(), "J/m"});
      }
    };
    add("energy", readings_.energy);
    if (readings_.coenergy) add("coenergy", *readings_.coenergy);
    if (has_net_current(problem_.excitation)) figures.energy = without_values(figures.energy);
  }

  void probes(Figures& figures, const std::vector<Probe>& probes) const {
    for (std::size_t k = 0; k < probes.size(); ++k) {
      figures.probes.push_back(probe_figures(probes[k], readings_.probes[k], figures));
    }
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
  std::vector<Figure> part_force(int part) const {
    const auto& force = readings_.forces.part[static_cast<std::size_t>(part)];
    return force ? force_figures(*force, alternating_)
                 : without_values(force_figures({}, alternating_));
  }

  double reactance(int bar) const {
    const std::complex<double> current = problem_.excitation.current[static_cast<std::size_t>(bar)];
    if (current == 0.0) return not_given;
    const std::complex<double> linkage = readings_.linkage[static_cast<std::size_t>(bar)];
    return 2.0 * std::numbers::pi * problem_.excitation.frequency_hz * (linkage / current).real();
  }

  Entry entry_of(int part) const {
    const mesh::Part& p = problem_.section.parts[static_cast<std::size_t>(part)];
    Entry entry{p.name, {}, part_force(part), {}, 0.0};
    const FieldLevel& level = readings_.levels[static_cast<std::size_t>(part)];
    if (is_bar(part)) {
      entry.current = problem_.excitation.current[static_cast<std::size_t>(part)];
      const std::complex<double> linkage = readings_.linkage[static_cast<std::size_t>(part)];
      if (alternating_) {
        append<Figure>(entry.figures, {{"flux_linkage_in_phase", linkage.real(), "Wb/m"},
                                       {"flux_linkage_quadrature", linkage.imag(), "Wb/m"},
                                       {"reactance", reactance(part), "ohm/m"}});
      } else {
        append<Figure>(entry.figures, {{"flux_linkage", linkage.real(), "Wb/m"}});
      }
      append<Figure>(entry.figures, {{"b_high", level.high, "T"}});
      for (std::size_t k = 0; p.pieces.size() > 1 && k < p.pieces.size(); ++k) {
        auto force = magnetic(part)
                         ? without_values(force_figures({}, alternating_))
                         : force_figures(readings_.forces.piece[static_cast<std::size_t>(part)][k],
                                         alternating_);
        entry.pieces.push_back(
            {p.name + "." + std::to_string(k + 1), {}, std::move(force), {}, 0.0});
      }
    } else {
      append<Figure>(entry.figures, {{"b_mean", level.mean, "T"}, {"b_high", level.high, "T"}});
      entry.faces = faces_of(part);
    }
    if (problem_.materials[static_cast<std::size_t>(part)].saturable()) {
      append<Figure>(entry.figures, {{"saturated_share", level.saturated_share, "1"}});
    }
    return entry;
  }

  std::vector<Entry> faces_of(int part) const {
    return face_entries(problem_, geometry_.faces, part,
                        [&](std::size_t k) -> std::vector<FacePush> {
                          const Pulsation& push = readings_.forces.push[k].x;
                          if (!alternating_) return {{"push", "pressure_mean", push.mean}};
                          return {{"push_mean", "pressure_mean", push.mean},
                                  {"push_max", "pressure_mean_max", push.largest()},
                                  {"push_min", "pressure_mean_min", push.smallest()}};
                        });
  }

  std::vector<Figure> field_figures(const FieldReading& reading) const {
    const mesh::Point b = reading.in_phase;
    if (!alternating_) {
      return {{"b_x", b.x, "T"}, {"b_y", b.y, "T"}, {"b", reading.peak, "T"}};
    }
    const mesh::Point q = reading.quadrature;
    return {{"b_x_in_phase", b.x, "T"},  {"b_x_quadrature", q.x, "T"},
            {"b_y_in_phase", b.y, "T"},  {"b_y_quadrature", q.y, "T"},
            {"b_rms", reading.rms, "T"}, {"b_peak", reading.peak, "T"}};
  }

  ProbeFigures probe_figures(const Probe& probe, const std::vector<FieldReading>& readings,
                             Figures& figures) const {
    ProbeFigures result{probe, {}, {}, {}, LimitState::none};
    const std::string key = alternating_ ? "b_rms" : "b";
    double largest = -1.0;
    double largest_peak = 0.0;
    int on_outline = 0;
    for (std::size_t k = 0; k < probe.points.size(); ++k) {
      const mesh::Point point = probe.points[k];
      result.points.push_back({point, field_figures(readings[k])});
      if (readings[k].rms > largest) {
        largest = readings[k].rms;
        result.largest_at = point;
      }
      largest_peak = std::max(largest_peak, readings[k].peak);
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

  const Problem& problem_;
  const ForceGeometry& geometry_;
  const Readings& readings_;
  bool alternating_;
  std::vector<int> visible_;
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

std::vector<Entry> face_entries(
    const Problem& problem, const WallFaces& faces, int part,
    const std::function<std::vector<FacePush>(std::size_t k)>& pushes_on) {
  const auto& pieces = problem.section.parts[static_cast<std::size_t>(part)].pieces;
  std::vector<Entry> entries;
  for (std::size_t k = 0; k < faces.faces().size(); ++k) {
    const WallFace& face = faces.faces()[k];
    if (face.part != part) continue;
    Entry entry;
    entry.name = pieces.size() > 1 ? fmt::format("{} {}", face.piece + 1, face.side) : face.side;
    const std::vector<FacePush> pushes = pushes_on(k);
    for (const FacePush& of : pushes) entry.figures.push_back({of.push_key, of.push, "N/m"});
    for (const FacePush& of : pushes) {
      entry.figures.push_back(
          {of.pressure_key, face.length > 0.0 ? of.push / face.length : not_given, "Pa"});
    }
    entries.push_back(std::move(entry));
  }
  return entries;
}

std::string joined(const std::vector<std::string>& names) {
  std::string result;
  for (const std::string& name : names) result += (result.empty() ? "" : "+") + name;
  return result;
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
      for (const Entry& face : entry.faces) {
        add(kind + "/" + entry.name + "/faces/" + face.name + "/", face.figures);
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

Figures figures_of(const Problem& problem, const ForceGeometry& geometry, const Readings& readings,
                   const std::vector<Probe>& probes, const std::vector<Circuit>& circuits) {
  const Collector collector(problem, geometry, readings);
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
