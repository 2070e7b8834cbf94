#include "io/report_tables.hpp"

#include <fmt/format.h>

#include <algorithm>
#include <cmath>
#include <functional>
#include <map>
#include <numbers>

#include "io/html_table.hpp"
#include "io/printable_text.hpp"
#include "io/quantity_text.hpp"
#include "io/report.hpp"
#include "io/tidy_figures.hpp"
#include "solver/resistivity.hpp"

namespace barwall::io {
namespace {

using solver::Entry;
using solver::Figure;

/// The last part of a figure's address in words.
std::string in_words(const std::string& key) {
  static const std::map<std::string, std::string> words = {
      {"force_x", "Fx"},
      {"force_y", "Fy"},
      {"force_mean_x", "Fx, mean"},
      {"force_mean_y", "Fy, mean"},
      {"force_x_max", "Fx, largest"},
      {"force_x_min", "Fx, smallest"},
      {"force_y_max", "Fy, largest"},
      {"force_y_min", "Fy, smallest"},
      {"force_peak", "|F|, peak"},
      {"force_peak_at", "at ωt"},
      {"force_peak_direction", "direction"},
      {"force_peak_after", "after closing"},
      {"force_peak_closing", "closing angle"},
      {"support_force", "on a support"},
      {"support_share", "of its strength"},
      {"symmetrical_current", "Symmetrical current, r.m.s."},
      {"r_over_x", "R/X"},
      {"x_over_r", "X/R"},
      {"power_factor", "Power factor"},
      {"kappa", "Factor kappa of IEC 60909-0"},
      {"peak_over_rms", "Peak over r.m.s. by kappa"},
      {"crest_over_rms", "Crest of the waveform over r.m.s."},
      {"crest_current", "Crest of the waveform"},
      {"crest_at", "Crest, after closing"},
      {"flux_linkage", "Flux linkage"},
      {"flux_linkage_in_phase", "Flux linkage, in phase"},
      {"flux_linkage_quadrature", "Flux linkage, quadrature"},
      {"inductance", "Inductance"},
      {"inductance_secant", "Inductance, secant"},
      {"inductance_differential", "Inductance, differential"},
      {"saturated_share", "share of the area with dB/dH below 10 µ0"},
      {"reactance", "Reactance"},
      {"reactance_mean", "Reactance, mean"},
      {"b_mean", "|B|, mean over the area"},
      {"b_high", "|B| exceeded on 1 % of the area"},
      {"b_x", "Bx"},
      {"b_y", "By"},
      {"b", "|B|"},
      {"b_x_in_phase", "Bx, in phase"},
      {"b_x_quadrature", "Bx, quadrature"},
      {"b_y_in_phase", "By, in phase"},
      {"b_y_quadrature", "By, quadrature"},
      {"b_rms", "B, r.m.s."},
      {"b_peak", "|B|, peak"},
      {"b_max", "|B|, largest"},
      {"b_rms_max", "B r.m.s., largest"},
      {"b_peak_max", "|B| peak, largest"},
      {"energy", "Field energy"},
      {"energy_mean", "Field energy, mean"},
      {"energy_peak", "Field energy, peak"},
      {"coenergy", "Field coenergy"},
      {"coenergy_mean", "Field coenergy, mean"},
      {"coenergy_peak", "Field coenergy, peak"},
      {"inductance_at", "at wt"},
      {"push", "Push outward"},
      {"push_mean", "Push outward, mean"},
      {"push_max", "Push, most outward"},
      {"push_min", "Push, most inward"},
      {"pressure_mean", "Mean pressure"},
      {"pressure_mean_max", "Mean pressure, most outward"},
      {"pressure_mean_min", "Mean pressure, most inward"},
      {"gap", "Clearance"},
      {"limit", "Limit"},
      {"of_limit", "Share of the limit"}};
  const auto found = words.find(key);
  if (found != words.end()) return found->second;
  std::string text = key;
  std::replace(text.begin(), text.end(), '_', ' ');
  return text;
}

bool is_force(const Figure& figure) {
  return figure.key.rfind("force_", 0) == 0;
}

/// One table of entries: a column for each key that any of them has and `wanted` accepts.
template <class Wanted>
std::string entry_table(const std::string& caption, const std::string& what,
                        const std::vector<Entry>& entries, const Wanted& wanted,
                        const std::vector<std::string>& second_column = {}) {
  std::vector<std::string> keys;
  const auto collect = [&](const Entry& entry) {
    for (const Figure& figure : entry.figures) {
      if (wanted(figure) && std::find(keys.begin(), keys.end(), figure.key) == keys.end()) {
        keys.push_back(figure.key);
      }
    }
  };
  for (const Entry& entry : entries) {
    collect(entry);
    for (const Entry& piece : entry.pieces) collect(piece);
  }
  if (keys.empty()) return "";
  std::vector<std::string> headings = {what};
  if (!second_column.empty()) headings.push_back("Current");
  for (const std::string& key : keys) headings.push_back(in_words(key));
  HtmlTable table(caption, headings);
  const auto add = [&](const Entry& entry, const std::string& second) {
    const bool any = std::any_of(entry.figures.begin(), entry.figures.end(), wanted);
    if (!any) return;
    std::vector<std::string> cells = {entry.name};
    if (!second_column.empty()) cells.push_back(second);
    for (const std::string& key : keys) {
      const Figure* figure = find_figure(entry.figures, key);
      cells.push_back(figure == nullptr ? "" : shown(*figure));
    }
    table.row(cells);
  };
  for (std::size_t k = 0; k < entries.size(); ++k) {
    add(entries[k], k < second_column.size() ? second_column[k] : "");
    for (const Entry& piece : entries[k].pieces) add(piece, "");
  }
  return table.html();
}

std::string millimetres(mesh::Point p) {
  return fmt::format("({:.6g}, {:.6g}) mm", p.x * 1e3 + 0.0, p.y * 1e3 + 0.0);
}

std::string in_words(solver::LimitState state) {
  switch (state) {
    case solver::LimitState::none:
      return "";
    case solver::LimitState::met:
      return "met";
    case solver::LimitState::exceeded:
      return "exceeded";
    case solver::LimitState::undecided:
      return "undecided";
  }
  return "";
}

std::string current_text(const Results& results, const Entry& bar) {
  std::string size = quantity_text(std::abs(bar.current), "A");
  if (!results.alternating()) return quantity_text(bar.current.real(), "A");
  if (bar.current == 0.0) return size;
  return fmt::format("{}, {:.4g}°", size, std::arg(bar.current) * 180.0 / std::numbers::pi + 0.0);
}

std::string resistivity_text(const solver::Material& material) {
  const auto resistivity = resistivity_of(material);
  if (!resistivity) return "not known";
  return quantity_text(*resistivity, "ohm m") + (material.resistivity ? "" : ", typical at 20 °C");
}

}  // namespace

std::string force_tables(const Results& results) {
  const solver::Figures& f = results.figures;
  return entry_table("Forces on bars, per metre of run", "Bar", f.bars, is_force) +
         entry_table("Forces on walls, per metre of run", "Wall", f.walls, is_force) +
         entry_table("Forces on bodies of parts in contact, per metre of run", "Body", f.bodies,
                     is_force);
}

std::string fault_tables(const Results& results) {
  if (!results.figures.fault) return "";
  const solver::FaultFigures fault = *tidy(results.figures).fault;
  HtmlTable circuit("The short circuit", {"Quantity", "Value"});
  for (const Figure& figure : fault.circuit) {
    circuit.row({in_words(figure.key), figure.unit == "1" && std::isfinite(figure.value)
                                           ? fmt::format("{:.4g}", figure.value)
                                           : shown(figure)});
  }
  std::string text = circuit.html();
  if (results.input.supports) {
    const SupportRequest& supports = *results.input.supports;
    text += fmt::format("<p>Supports every {:.6g} mm", 1e3 * supports.span);
    if (supports.strength) {
      text += fmt::format(", strength {} (from: {})", quantity_text(*supports.strength, "N"),
                          escaped(supports.strength_from));
    }
    text += "; force on a support: force per metre times span, static, no dynamic factor.</p>\n";
  }
  const auto all = [](const Figure&) { return true; };
  text += entry_table("Largest forces on bars, per metre of run", "Bar", fault.bars, all);
  text += entry_table("Largest forces on walls, per metre of run", "Wall", fault.walls, all);
  text += entry_table("Largest forces on bodies, per metre of run", "Body", fault.bodies, all);
  return text;
}

std::string hand_table(const Results& results) {
  const solver::Figures figures = tidy(results.figures);
  HtmlTable table("Computed and by hand",
                  {"Of", "Figure", "Computed", "By hand", "Ratio", "Formula", "Source"},
                  {1, 2, 6, 7});
  const std::function<void(const std::string&, const std::vector<Entry>&)> add =
      [&](const std::string& what, const std::vector<Entry>& entries) {
        for (const Entry& entry : entries) {
          add(what, entry.pieces);
          for (const Figure& figure : entry.figures) {
            if (!std::isfinite(figure.hand)) continue;
            table.row({entry.name + what, in_words(figure.key), shown(figure),
                       quantity_text(figure.hand, figure.unit),
                       fmt::format("{:.3f}", figure.value / figure.hand), entry.hand_formula,
                       entry.hand_source});
          }
        }
      };
  add("", figures.bars);
  add("", figures.loops);
  if (figures.fault) add(", fault", figures.fault->bars);
  return table.html();
}

std::string probe_tables(const Results& results) {
  const std::string key = results.alternating() ? "b_rms" : "b";
  const std::string what = results.alternating() ? "B, r.m.s." : "|B|";
  HtmlTable table("Field at the probes",
                  {"Probe", "Where", what, "Limit", "Share", "Limit is", "The limit's source"},
                  {1, 5, 6});
  HtmlTable peaks("Peak over the cycle on probe lines", {"Probe", in_words("b_peak_max")});
  std::vector<Entry> points;
  for (const solver::ProbeFigures& found : results.figures.probes) {
    const auto cell = [&found](const std::string& name) {
      const Figure* figure = find_figure(found.figures, name);
      return figure == nullptr ? std::string() : shown(*figure);
    };
    const bool line = found.probe.line;
    const std::string where =
        line ? fmt::format("line of {} points; largest at {}", found.probe.points.size(),
                           millimetres(found.largest_at))
             : millimetres(found.probe.points.front());
    const Figure* at_point = find_figure(found.points.front().figures, key);
    table.row({found.probe.name, where,
               line                  ? cell(key + "_max")
               : at_point == nullptr ? ""
                                     : shown(*at_point),
               cell("limit"), cell("of_limit"), in_words(found.limit_state),
               found.probe.limit_from});
    if (line && find_figure(found.figures, "b_peak_max") != nullptr) {
      peaks.row({found.probe.name, cell("b_peak_max")});
    }
    if (!line) points.push_back({found.probe.name, {}, found.points.front().figures, {}, 0.0});
  }
  return table.html() +
         entry_table("Field at point probes", "Probe", points, [](const Figure&) { return true; }) +
         peaks.html();
}

std::string circuit_tables(const Results& results) {
  const solver::Figures& f = results.figures;
  const auto all = [](const Figure&) { return true; };
  const Entry energy{"whole field", {}, f.energy, {}, 0.0};
  return entry_table("Inductances, per metre of run", "Loop", f.loops, all) +
         entry_table("Three-phase circuits, per metre of run", "Circuit", f.circuits, all) +
         entry_table("Energy, per metre of run", "Field", {energy}, all);
}

std::string part_tables(const Results& results) {
  const solver::Figures& f = results.figures;
  const auto others = [](const Figure& figure) { return !is_force(figure); };
  std::vector<std::string> currents;
  for (const Entry& bar : f.bars) currents.push_back(current_text(results, bar));
  HtmlTable gaps("Clearances", {"Between", "and", "Clearance"}, {1});
  for (const solver::Clearance& clearance : f.clearances) {
    gaps.row({clearance.between[0], clearance.between[1], shown(clearance.gap)});
  }
  return entry_table("Bars", "Bar", f.bars, others, currents) +
         entry_table("Walls", "Wall", f.walls, others) + gaps.html();
}

std::string push_tables(const Results& results) {
  const auto flat = [](const std::vector<Entry>& walls) {
    std::vector<Entry> faces;
    for (const Entry& wall : walls) {
      for (const Entry& face : wall.faces) {
        faces.push_back(face);
        faces.back().name = wall.name + ", " + face.name;
      }
    }
    return faces;
  };
  const auto all = [](const Figure&) { return true; };
  std::string tables = entry_table("Push on the sides of the walls, per metre of run", "Side",
                                   flat(results.figures.walls), all);
  if (const auto& fault = results.figures.fault) {
    tables += entry_table("The same in the short circuit", "Side", flat(fault->walls), all);
  }
  return tables.empty() ? "" : fmt::format("<p>{}</p>\n", solver::wall_face_rule) + tables;
}

std::string check_table(const Results& results) {
  HtmlTable table("Self-checks of this run",
                  {"Check", "Measured", "Limit", "Passed", "Where and what"}, {3, 4});
  for (const verify::Check& check : results.checks) {
    const auto number = [&check](double value) {
      return fmt::format("{:.3g}{}{}", value, check.unit == "1" ? "" : " ",
                         check.unit == "1" ? "" : check.unit);
    };
    table.row({check.name, number(check.measured), number(check.limit), check.passed ? "yes" : "NO",
               check.detail});
  }
  return table.html();
}

std::string notice_list(const Results& results) {
  if (results.figures.notices.empty()) return "<p>None.</p>\n";
  std::string text = "<dl>\n";
  for (const solver::Notice& notice : results.figures.notices) {
    text += fmt::format("<dt>{}{}</dt>\n<dd>{}</dd>\n", escaped(notice.name),
                        notice.indicative ? " (makes the validity indicative)" : "",
                        escaped(notice.detail));
  }
  return text + "</dl>\n";
}

std::string case_tables(const Results& results) {
  const Case& input = results.input;
  const mesh::FittedGrid& grid = *results.problem->grid;
  HtmlTable table("The case", {"What", "Value"}, {1});
  table.row({"Case file", input.file});
  table.row({"SHA-256", input.sha256});
  table.row({"Currents", results.alternating()
                             ? fmt::format("r.m.s. phasors at {:.6g} Hz",
                                           results.problem->excitation.frequency_hz)
                             : "steady"});
  if (input.run_length_m)
    table.row({"Length of the run", fmt::format("{:.6g} m", *input.run_length_m)});
  table.row({"Grid", fmt::format("{} x {} lines, {} nodes, {} triangles", grid.columns, grid.rows,
                                 grid.node_count(), grid.triangle_count())});
  table.row({"Cells across",
             fmt::format("at least {} across every part and gap", input.grid.cells_across)});
  table.row(
      {"Reach", fmt::format("{:.6g} half-sizes asked; outer boundary {:.4g} m from the middle",
                            input.grid.reach, 0.5 * (grid.x_lines.back() - grid.x_lines.front()))});
  HtmlTable given("Given dimensions", {"Name", "Value"});
  for (const auto& [name, value] : input.given) given.row({name, fmt::format("{:.10g}", value)});
  std::vector<std::string> columns = {"Part", "Kind", "Material", "Relative permeability"};
  if (results.alternating()) columns.emplace_back("Resistivity");
  HtmlTable materials("Materials", columns, {1, 2, 4});
  for (int part : visible_parts(results.problem->outline)) {
    const auto k = static_cast<std::size_t>(part);
    const mesh::Part& p = results.problem->section.parts[k];
    const solver::Material& material = input.materials[k];
    std::vector<std::string> cells = {
        p.name, p.kind == mesh::Part::Kind::bar ? "bar" : "wall", material.name,
        material.saturable() ? std::string("B-H table")
                             : fmt::format("{:.6g}", material.relative_permeability)};
    if (results.alternating()) cells.push_back(resistivity_text(material));
    materials.row(cells);
  }
  return table.html() + given.html() + materials.html();
}

}  // namespace barwall::io
