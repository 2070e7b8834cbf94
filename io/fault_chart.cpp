#include "io/fault_chart.hpp"

#include <fmt/format.h>

#include <algorithm>
#include <cmath>
#include <numbers>

#include "io/quantity_text.hpp"
#include "io/scales.hpp"
#include "io/tidy_figures.hpp"

namespace barwall::io {
namespace {

std::string milliseconds(double seconds) {
  return fmt::format("{:.3g} ms", 1e3 * seconds);
}

/// The largest value [N/m], the first where several are as large: of the parabola through the
/// largest sample and its neighbours in time, which are evenly spaced. None of a force that is 0.
std::optional<LineMark> peak_of(const std::vector<double>& seconds,
                                const std::vector<double>& values) {
  std::size_t k = 0;
  for (std::size_t n = 1; n < values.size(); ++n) {
    if (values[n] > values[k] * (1.0 + 1e-9)) k = n;
  }
  if (k == 0) return {};
  LineMark peak{seconds[k], values[k]};
  const bool at_end = k + 1 == values.size();
  if (!at_end) {
    const double slope = 0.5 * (values[k + 1] - values[k - 1]);
    const double bend = values[k + 1] - 2.0 * values[k] + values[k - 1];
    const double steps = bend < 0.0 ? -slope / bend : 0.0;
    peak.seconds += steps * (seconds[k + 1] - seconds[k]);
    peak.value += 0.5 * steps * slope;
  }
  peak.remark = fmt::format("{}{} at {}", quantity_text(peak.value, "N/m"),
                            at_end ? " and rising" : "", milliseconds(peak.seconds));
  return peak;
}

PanelLine force_line(const std::string& name, int pen, const std::vector<double>& seconds,
                     const std::vector<mesh::Point>& force) {
  PanelLine line{name, pen, {}};
  for (const mesh::Point value : force) line.values.push_back(norm(value));
  line.mark = peak_of(seconds, line.values);
  return line;
}

/// The force on every bar, or on the body that it is in, the body of several bars once.
LinePanel force_panel(const Results& results, const solver::FaultSeries& series) {
  const std::vector<std::string> names = results.fault_bars();
  const std::vector<solver::Entry>& bodies = results.figures.fault->bodies;
  LinePanel panel{"Force", "N/m", series.seconds, {}};
  std::vector<bool> shown(bodies.size(), false);
  for (std::size_t b = 0; b < names.size(); ++b) {
    const int pen = static_cast<int>(b);
    const auto part = static_cast<std::size_t>(results.input.fault->current.bars[b]);
    if (const auto& force = series.force.part[part]) {
      panel.lines.push_back(force_line(names[b], pen, series.seconds, *force));
      continue;
    }
    for (std::size_t k = 0; k < bodies.size(); ++k) {
      const auto& parts = bodies[k].parts;
      if (shown[k] || std::find(parts.begin(), parts.end(), names[b]) == parts.end()) continue;
      shown[k] = true;
      panel.lines.push_back(force_line(bodies[k].name, pen, series.seconds, series.force.body[k]));
    }
  }
  return panel;
}

LinePanel current_panel(const Results& results, const solver::FaultSeries& series) {
  const std::vector<std::string> names = results.fault_bars();
  LinePanel panel{"Current", "A", series.seconds, {}};
  for (std::size_t b = 0; b < names.size(); ++b) {
    panel.lines.push_back({names[b], static_cast<int>(b), series.current[b]});
  }
  return panel;
}

}  // namespace

FaultChart fault_chart(const Results& results) {
  const solver::FaultCurrent& fault = results.input.fault->current;
  const solver::FaultSeries series = tidy(results.fault->series);
  FaultChart chart;
  chart.forces = force_panel(results, series);
  chart.currents = current_panel(results, series);
  chart.fault = fmt::format("Short circuit between {}: force per metre of run",
                            fmt::join(results.fault_bars(), ", "));
  chart.note =
      "Forces are magnitudes and static, without a dynamic factor; positive currents "
      "flow out of the page.";
  if (const auto* alternating = std::get_if<solver::AlternatingFault>(&fault.course)) {
    const double degrees = *series.closing * 180.0 / std::numbers::pi;
    chart.closing = fmt::format("{} symmetrical, R/X {:.3g}; {} {}\u00b0 of {}'s driving voltage",
                                quantity_text(alternating->symmetrical, "A"), alternating->r_over_x,
                                alternating->closing ? "closing at" : "worst closing:",
                                plain_number(std::round(10.0 * degrees) / 10.0),
                                chart.currents.lines.front().name);
    chart.note += " The driving voltage has its crest at 0\u00b0.";
    if (!alternating->closing && fault.bars.size() > 2) {
      chart.note +=
          " The closing is that of the largest force on a bar; another bar's largest "
          "force can belong to another closing.";
    }
  } else if (const auto* rise = std::get_if<solver::DirectRise>(&fault.course)) {
    chart.closing =
        fmt::format("Direct current, rising to {} with a time constant of {}",
                    quantity_text(rise->steady, "A"), milliseconds(rise->time_constant));
  }
  if (results.fault->course) {
    chart.note +=
        fmt::format(" Steel that saturates: {}, a smooth curve through {} solved instants.",
                    fault.alternating() ? "the first cycle" : "five time constants",
                    results.fault->course->size());
  }
  return chart;
}

}  // namespace barwall::io
