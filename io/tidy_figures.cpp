#include "io/tidy_figures.hpp"

#include <fmt/format.h>

#include <algorithm>
#include <cmath>
#include <cstdlib>

namespace barwall::io {
namespace {

constexpr double smallest_share = 1e-11;

double largest(const std::vector<solver::Figure>& figures, const std::string& unit) {
  double result = 0.0;
  for (const solver::Figure& figure : figures) {
    if (figure.unit == unit && std::isfinite(figure.value)) {
      result = std::max(result, std::abs(figure.value));
    }
  }
  return result;
}

double largest(const std::vector<solver::Entry>& entries, const std::string& unit) {
  double result = 0.0;
  for (const solver::Entry& entry : entries) {
    result = std::max({result, largest(entry.figures, unit), largest(entry.pieces, unit),
                       largest(entry.faces, unit)});
  }
  return result;
}

void drop_below(std::vector<solver::Figure>& figures, const std::string& unit, double floor) {
  for (solver::Figure& figure : figures) {
    if (figure.unit != unit) continue;
    if (std::abs(figure.value) < floor) figure.value = 0.0;
    if (std::abs(figure.hand) < floor) figure.hand = solver::not_given;
  }
}

void round_all(std::vector<solver::Figure>& figures) {
  const solver::Figure* peak = solver::find_figure(figures, "force_peak");
  const bool no_peak = peak != nullptr && peak->value == 0.0;
  for (solver::Figure& figure : figures) {
    if (no_peak && (figure.key == "force_peak_at" || figure.key == "force_peak_direction" ||
                    figure.key == "force_peak_after" || figure.key == "force_peak_closing")) {
      figure.value = solver::not_given;
    }
    figure.value = to_ten_digits(figure.value);
    figure.plus_minus = to_ten_digits(figure.plus_minus);
    figure.hand = to_ten_digits(figure.hand);
  }
}

struct Floors {
  double force = 0.0;
  double linkage = 0.0;
};

/// A pressure is a push over a length: both are rounding's together.
void tidy_faces(std::vector<solver::Entry>& faces, const Floors& floors) {
  for (solver::Entry& face : faces) {
    for (solver::Figure& figure : face.figures) {
      if (figure.unit != "N/m" || std::abs(figure.value) >= floors.force) continue;
      figure.value = 0.0;
      const std::string pressure = "pressure_mean" + figure.key.substr(std::string("push").size());
      for (solver::Figure& other : face.figures) {
        const bool own =
            other.key == pressure || (figure.key == "push_mean" && other.key == "pressure_mean");
        if (own && std::isfinite(other.value)) other.value = 0.0;
      }
    }
    round_all(face.figures);
  }
}

void tidy_entries(std::vector<solver::Entry>& entries, const Floors& floors) {
  for (solver::Entry& entry : entries) {
    drop_below(entry.figures, "N/m", floors.force);
    drop_below(entry.figures, "Wb/m", floors.linkage);
    round_all(entry.figures);
    tidy_entries(entry.pieces, floors);
    tidy_faces(entry.faces, floors);
  }
}

void tidy_fault(solver::FaultFigures& fault) {
  Floors floors;
  for (const auto* entries : {&fault.bars, &fault.walls, &fault.bodies}) {
    floors.force = std::max(floors.force, smallest_share * largest(*entries, "N/m"));
  }
  for (auto* entries : {&fault.bars, &fault.walls, &fault.bodies}) tidy_entries(*entries, floors);
  round_all(fault.circuit);
}

/// Tells a function of every course of a force.
template <class Function>
void each_force(solver::PartForces<std::vector<mesh::Point>>& forces, const Function& function) {
  for (auto& force : forces.part) {
    if (force) function(*force);
  }
  for (auto& pieces : forces.piece) {
    for (auto& force : pieces) function(force);
  }
  for (auto* list : {&forces.body, &forces.push}) {
    for (auto& force : *list) function(force);
  }
}

}  // namespace

double to_digits(double value, int digits) {
  if (!std::isfinite(value)) return solver::not_given;
  const double rounded = std::strtod(fmt::format("{:.{}e}", value, digits - 1).c_str(), nullptr);
  return rounded == 0.0 ? 0.0 : rounded;
}

double to_ten_digits(double value) {
  return to_digits(value, 10);
}

std::string number_text(double value) {
  return std::isfinite(value) ? fmt::format("{}", value) : std::string();
}

solver::Figures tidy(solver::Figures figures) {
  if (figures.fault) tidy_fault(*figures.fault);
  Floors floors;
  for (const auto* entries : {&figures.bars, &figures.walls, &figures.bodies}) {
    floors.force = std::max(floors.force, smallest_share * largest(*entries, "N/m"));
    floors.linkage = std::max(floors.linkage, smallest_share * largest(*entries, "Wb/m"));
  }
  for (auto* entries :
       {&figures.bars, &figures.walls, &figures.bodies, &figures.loops, &figures.circuits}) {
    tidy_entries(*entries, floors);
  }
  round_all(figures.energy);
  for (solver::ProbeFigures& probe : figures.probes) {
    for (solver::ProbePoint& point : probe.points) {
      drop_below(point.figures, "T", smallest_share * largest(point.figures, "T"));
      round_all(point.figures);
    }
    round_all(probe.figures);
  }
  for (solver::Clearance& clearance : figures.clearances) {
    clearance.gap.value = to_ten_digits(clearance.gap.value);
  }
  return figures;
}

std::vector<verify::Check> tidy(std::vector<verify::Check> checks) {
  for (verify::Check& check : checks) {
    check.measured = check.measured < 1e-6 * check.limit ? 0.0 : to_digits(check.measured, 4);
  }
  return checks;
}

solver::FaultSeries tidy(solver::FaultSeries series) {
  const auto tidied = [](double value, double floor) {
    return std::abs(value) < floor ? 0.0 : to_ten_digits(value);
  };
  for (double& seconds : series.seconds) seconds = to_ten_digits(seconds);
  double current = 0.0;
  for (const auto& course : series.current) {
    for (double value : course) current = std::max(current, std::abs(value));
  }
  for (auto& course : series.current) {
    for (double& value : course) value = tidied(value, smallest_share * current);
  }
  double force = 0.0;
  each_force(series.force, [&](const std::vector<mesh::Point>& course) {
    for (mesh::Point value : course)
      force = std::max({force, std::abs(value.x), std::abs(value.y)});
  });
  each_force(series.force, [&](std::vector<mesh::Point>& course) {
    for (mesh::Point& value : course) {
      value = {tidied(value.x, smallest_share * force), tidied(value.y, smallest_share * force)};
    }
  });
  return series;
}

}  // namespace barwall::io
