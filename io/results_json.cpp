#include "io/results_json.hpp"

#include <cmath>
#include <functional>
#include <nlohmann/json.hpp>
#include <numbers>

#include "io/tidy_figures.hpp"
#include "io/version.hpp"

namespace barwall::io {
namespace {

using Json = nlohmann::ordered_json;

Json number(double value) {
  const double rounded = to_ten_digits(value);
  return std::isfinite(rounded) ? Json(rounded) : Json(nullptr);
}

Json figure_json(double value, const std::string& unit, double plus_minus = solver::not_given) {
  return {{"value", number(value)}, {"unit", unit}, {"plus_minus", number(plus_minus)}};
}

void add_figures(Json& to, const std::vector<solver::Figure>& figures) {
  for (const solver::Figure& figure : figures) {
    to[figure.key] = figure_json(figure.value, figure.unit, figure.plus_minus);
  }
}

void add_place(Json& to, mesh::Point place) {
  to["x_mm"] = number(1e3 * place.x);
  to["y_mm"] = number(1e3 * place.y);
}

/// A current as current_a, the r.m.s. value with a frequency, and phase_deg. What is below
/// 1e-12 of `largest` is the rounding error of a balance.
void add_current(Json& to, std::complex<double> current, double largest, bool alternating) {
  if (std::abs(current) < 1e-12 * largest) current = 0.0;
  to["current_a"] = number(alternating ? std::abs(current) : current.real());
  if (!alternating) return;
  const double phase = current == 0.0 ? 0.0 : std::arg(current) * 180.0 / std::numbers::pi;
  to["phase_deg"] = number(phase);
}

Json case_json(const Results& results) {
  const Case& input = results.input;
  Json json;
  json["title"] = input.title;
  json["sha256"] = input.sha256;
  json["currents"] = results.alternating() ? "alternating" : "steady";
  if (results.alternating()) {
    json["frequency_hz"] = number(results.problem->excitation.frequency_hz);
  }
  if (input.run_length_m) json["run_length_m"] = number(*input.run_length_m);
  json["given"] = Json::object();
  for (const auto& [name, value] : input.given) json["given"][name] = number(value);
  return json;
}

Json bars_json(const solver::Figures& figures, bool alternating) {
  double largest = 0.0;
  for (const solver::Entry& bar : figures.bars) largest = std::max(largest, std::abs(bar.current));
  Json list = Json::array();
  for (const solver::Entry& bar : figures.bars) {
    Json json{{"name", bar.name}};
    add_current(json, bar.current, largest, alternating);
    add_figures(json, bar.figures);
    json["pieces"] = Json::array();
    for (const solver::Entry& piece : bar.pieces) {
      Json piece_json{{"name", piece.name}};
      add_figures(piece_json, piece.figures);
      json["pieces"].push_back(std::move(piece_json));
    }
    list.push_back(std::move(json));
  }
  return list;
}

/// Entries under the name of their single part, or of the list of their parts.
Json entries_json(const std::vector<solver::Entry>& entries, const char* parts_key = nullptr) {
  Json list = Json::array();
  for (const solver::Entry& entry : entries) {
    Json json;
    if (parts_key == nullptr) {
      json["name"] = entry.name;
    } else {
      json[parts_key] = entry.parts;
    }
    add_figures(json, entry.figures);
    for (const solver::Entry& face : entry.faces) {
      Json face_json{{"side", face.name}};
      add_figures(face_json, face.figures);
      json["faces"].push_back(std::move(face_json));
    }
    list.push_back(std::move(json));
  }
  return list;
}

Json probe_json(const solver::ProbeFigures& probe) {
  Json json{{"name", probe.probe.name}};
  if (probe.probe.line) {
    Json points = Json::array();
    for (const solver::ProbePoint& point : probe.points) {
      Json point_json;
      add_place(point_json, point.at);
      add_figures(point_json, point.figures);
      points.push_back(std::move(point_json));
    }
    json["points"] = std::move(points);
    add_place(json, probe.largest_at);
  } else if (!probe.points.empty()) {
    add_place(json, probe.points.front().at);
    add_figures(json, probe.points.front().figures);
  }
  add_figures(json, probe.figures);
  switch (probe.limit_state) {
    case solver::LimitState::none:
      return json;
    case solver::LimitState::met:
      json["limit_met"] = true;
      break;
    case solver::LimitState::exceeded:
      json["limit_met"] = false;
      break;
    case solver::LimitState::undecided:
      json["limit_met"] = nullptr;
      break;
  }
  json["limit_from"] = probe.probe.limit_from;
  return json;
}

Json fault_json(const Results& results, const solver::FaultFigures& fault) {
  Json json{{"between", results.fault_bars()}};
  add_figures(json, fault.circuit);
  json["bars"] = Json::array();
  for (const solver::Entry& bar : fault.bars) {
    Json entry{{"name", bar.name}};
    add_figures(entry, bar.figures);
    entry["pieces"] = entries_json(bar.pieces);
    json["bars"].push_back(std::move(entry));
  }
  json["walls"] = entries_json(fault.walls);
  json["bodies"] = entries_json(fault.bodies, "parts");
  if (results.input.supports) {
    const SupportRequest& supports = *results.input.supports;
    json["supports"] = {{"span_mm", number(1e3 * supports.span)},
                        {"note", "static, no dynamic factor"}};
    if (supports.strength) {
      json["supports"]["strength_n"] = number(*supports.strength);
      json["supports"]["strength_from"] = supports.strength_from;
    }
  }
  return json;
}

/// Every figure beside which a handbook's formula has a value, by address.
Json hand_json(const solver::Figures& figures) {
  Json list = Json::array();
  const std::function<void(const std::string&, const std::vector<solver::Entry>&)> add =
      [&](const std::string& prefix, const std::vector<solver::Entry>& entries) {
        for (const solver::Entry& entry : entries) {
          add(prefix + entry.name + "/pieces/", entry.pieces);
          for (const solver::Figure& figure : entry.figures) {
            if (!std::isfinite(figure.hand)) continue;
            list.push_back({{"address", prefix + entry.name + "/" + figure.key},
                            {"hand", figure_json(figure.hand, figure.unit)},
                            {"ratio", number(figure.value / figure.hand)},
                            {"formula", entry.hand_formula},
                            {"source", entry.hand_source}});
          }
        }
      };
  add("bars/", figures.bars);
  add("loops/", figures.loops);
  if (figures.fault) add("fault/bars/", figures.fault->bars);
  return list;
}

Json checks_json(const std::vector<verify::Check>& checks) {
  Json list = Json::array();
  for (const verify::Check& check : checks) {
    list.push_back({{"name", check.name},
                    {"measured", figure_json(check.measured, check.unit)},
                    {"limit", figure_json(check.limit, check.unit)},
                    {"passed", check.passed},
                    {"detail", check.detail}});
  }
  return list;
}

}  // namespace

std::string figures_json(const Results& results) {
  const solver::Figures figures = tidy(results.figures);
  const mesh::FittedGrid& grid = *results.problem->grid;
  Json json;
  json["format"] = 1;
  json["barwall"] = version();
  json["case"] = case_json(results);
  json["grid"] = {{"columns", grid.columns},
                  {"rows", grid.rows},
                  {"nodes", grid.node_count()},
                  {"triangles", grid.triangle_count()}};
  json["bars"] = bars_json(figures, results.alternating());
  json["walls"] = entries_json(figures.walls);
  json["bodies"] = entries_json(figures.bodies, "parts");
  json["loops"] = entries_json(figures.loops);
  json["circuits"] = entries_json(figures.circuits, "bars");
  add_figures(json, figures.energy);
  if (figures.fault) json["fault"] = fault_json(results, *figures.fault);
  json["hand"] = hand_json(figures);
  json["probes"] = Json::array();
  for (const solver::ProbeFigures& probe : figures.probes) {
    json["probes"].push_back(probe_json(probe));
  }
  json["clearances"] = Json::array();
  for (const solver::Clearance& clearance : figures.clearances) {
    Json entry{{"between", clearance.between}};
    add_figures(entry, {clearance.gap});
    json["clearances"].push_back(std::move(entry));
  }
  json["checks"] = checks_json(tidy(results.checks));
  json["notices"] = Json::array();
  for (const solver::Notice& notice : figures.notices) {
    json["notices"].push_back(
        {{"name", notice.name}, {"detail", notice.detail}, {"indicative", notice.indicative}});
  }
  json["verdict"] = results.verdict();
  json["validity"] = results.validity();
  json["limits"] = results.limits();
  return json.dump(1, ' ', false, Json::error_handler_t::replace) + "\n";
}

}  // namespace barwall::io
