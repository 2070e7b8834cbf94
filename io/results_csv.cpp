#include "io/results_csv.hpp"

#include <fmt/format.h>

#include <unordered_map>
#include <vector>

#include "io/tidy_figures.hpp"

namespace barwall::io {
namespace {

/// Limit and share of it that stand beside a figure.
struct Limit {
  double value = solver::not_given;
  double share = solver::not_given;
};

std::string text_of(double value) {
  return number_text(to_ten_digits(value));
}

std::string row(const std::string& address, const solver::Figure& figure, const Limit& limit = {}) {
  return fmt::format("{},{},{},{},{},{},{},{}\n", csv_field(address), text_of(figure.value),
                     csv_field(figure.unit), text_of(figure.plus_minus), text_of(figure.hand),
                     text_of(figure.value / figure.hand), text_of(limit.value),
                     text_of(limit.share));
}

/// The limits beside the figures they bound, by address: the field at a point, or the largest on
/// a line.
std::unordered_map<std::string, Limit> limits_by_address(const solver::Figures& figures) {
  std::unordered_map<std::string, Limit> limits;
  for (const solver::ProbeFigures& probe : figures.probes) {
    const solver::Figure* limit = solver::find_figure(probe.figures, "limit");
    const solver::Figure* share = solver::find_figure(probe.figures, "of_limit");
    if (limit == nullptr || share == nullptr) continue;
    for (const char* key : {"b", "b_rms", "b_max", "b_rms_max"}) {
      limits["probes/" + probe.probe.name + "/" + key] = {limit->value, share->value};
    }
  }
  return limits;
}

/// Columns of a table of numbers, each as long as the first.
struct Columns {
  std::string head;
  std::vector<std::vector<double>> values;

  void add(const std::string& name, const std::vector<double>& column) {
    if (!head.empty()) head += ',';
    head += csv_field(name);
    values.push_back(column);
  }
  void add_force(const std::string& address, const std::vector<mesh::Point>& force) {
    const auto [x, y] = mesh::components(force);
    add(address + "/force_x_n_per_m", x);
    add(address + "/force_y_n_per_m", y);
  }
  std::string text() const {
    std::string text = head + "\n";
    for (std::size_t k = 0; k < values.front().size(); ++k) {
      for (const auto& column : values) {
        if (&column != &values.front()) text += ',';
        text += number_text(column[k]);
      }
      text += '\n';
    }
    return text;
  }
};

}  // namespace

std::string csv_field(const std::string& text) {
  if (text.find_first_of(",\"\r\n") == std::string::npos) return text;
  std::string quoted = "\"";
  for (char c : text) quoted += c == '"' ? std::string("\"\"") : std::string(1, c);
  return quoted + "\"";
}

std::string figures_csv(const Results& results) {
  const solver::Figures figures = tidy(results.figures);
  std::string text = "address,value,unit,plus_minus,hand,ratio,limit,of_limit\n";
  const auto limits = limits_by_address(figures);
  for (const auto& [address, figure] : addresses(figures)) {
    const auto found = limits.find(address);
    text += row(address, *figure, found == limits.end() ? Limit{} : found->second);
  }
  for (const verify::Check& check : tidy(results.checks)) {
    text += row("checks/" + check.name + "/measured", {"measured", check.measured, check.unit},
                {check.limit, check.measured / check.limit});
    text += row("checks/" + check.name + "/limit", {"limit", check.limit, check.unit});
  }
  return text;
}

std::string probes_csv(const Results& results) {
  const solver::Figures figures = tidy(results.figures);
  const bool alternating = results.alternating();
  std::string text =
      alternating ? "probe,x_mm,y_mm,b_rms_t,b_peak_t\n" : "probe,x_mm,y_mm,b_x_t,b_y_t,b_t\n";
  for (const solver::ProbeFigures& probe : figures.probes) {
    for (const solver::ProbePoint& point : probe.points) {
      text += fmt::format("{},{},{}", csv_field(probe.probe.name), text_of(1e3 * point.at.x),
                          text_of(1e3 * point.at.y));
      const std::vector<const char*> keys =
          alternating ? std::vector{"b_rms", "b_peak"} : std::vector{"b_x", "b_y", "b"};
      for (const char* key : keys) {
        const solver::Figure* figure = solver::find_figure(point.figures, key);
        text += ',';
        if (figure != nullptr) text += text_of(figure->value);
      }
      text += "\n";
    }
  }
  return text;
}

std::string fault_forces_csv(const Results& results) {
  const solver::FaultSeries series = tidy(results.fault->series);
  const std::vector<mesh::Part>& parts = results.problem->section.parts;
  const std::vector<int>& bars = results.input.fault->current.bars;
  Columns columns;
  columns.add("time_s", series.seconds);
  for (std::size_t b = 0; b < bars.size(); ++b) {
    columns.add("bars/" + parts[static_cast<std::size_t>(bars[b])].name + "/current_a",
                series.current[b]);
  }
  for (const auto kind : {mesh::Part::Kind::bar, mesh::Part::Kind::wall}) {
    for (std::size_t k = 0; k < parts.size(); ++k) {
      if (parts[k].kind != kind) continue;
      const std::string& name = parts[k].name;
      const std::string address =
          fmt::format("{}/{}", kind == mesh::Part::Kind::bar ? "bars" : "walls", name);
      if (series.force.part[k]) columns.add_force(address, *series.force.part[k]);
      for (std::size_t p = 0; p < series.force.piece[k].size(); ++p) {
        columns.add_force(fmt::format("{}/pieces/{}.{}", address, name, p + 1),
                          series.force.piece[k][p]);
      }
    }
  }
  for (std::size_t b = 0; b < series.force.body.size(); ++b) {
    columns.add_force("bodies/" + results.figures.fault->bodies[b].name, series.force.body[b]);
  }
  return columns.text();
}

}  // namespace barwall::io
