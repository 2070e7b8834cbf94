#include "io/summary.hpp"

#include <fmt/format.h>

#include <algorithm>
#include <cmath>
#include <numbers>

#include "io/plain_table.hpp"
#include "io/quantity_text.hpp"
#include "io/tidy_figures.hpp"

namespace barwall::io {
namespace {

constexpr int name_width = 26;
constexpr std::size_t most_rows = 12;
constexpr double degree = std::numbers::pi / 180.0;

std::string red(const std::string& text, bool colour) {
  return colour ? "\x1b[31m" + text + "\x1b[0m" : text;
}

double value_of(const std::vector<solver::Figure>& figures, const char* key) {
  const solver::Figure* figure = solver::find_figure(figures, key);
  return figure == nullptr ? solver::not_given : figure->value;
}

std::string text_of(const std::vector<solver::Figure>& figures, const char* key) {
  const solver::Figure* figure = solver::find_figure(figures, key);
  return figure == nullptr ? "-" : quantity_text(*figure);
}

std::string name_of(const std::string& name) {
  return clipped(name, name_width);
}

std::string more_rows(std::size_t all) {
  return all > most_rows ? fmt::format("  and {} more in figures.csv\n", all - most_rows) : "";
}

std::string place_text(mesh::Point at) {
  const auto shown = [](double mm) { return to_ten_digits(std::round(mm * 10.0) / 10.0); };
  return fmt::format("({}, {}) mm", number_text(shown(1e3 * at.x)), number_text(shown(1e3 * at.y)));
}

std::string percent_text(double share) {
  const double percent = 100.0 * share;
  return percent >= 999.5 ? fmt::format("{:.0f} %", percent) : fmt::format("{:.3g} %", percent);
}

/// A limit as the case file gives it.
std::string limit_text(double tesla) {
  return fmt::format("{:g} µT", to_ten_digits(1e6 * tesla));
}

/// A vector's size and direction in two cells.
void add_vector(std::vector<std::string>& cells, double x, double y) {
  const double size = std::hypot(x, y);
  cells.push_back(quantity_text(size, "N/m"));
  cells.push_back(size > 0.0 ? direction_text(std::atan2(y, x) / degree) : "");
}

class Summary {
public:
  Summary(const Results& results, bool colour)
      : results_(results),
        figures_(tidy(results.figures)),
        alternating_(results.alternating()),
        colour_(colour) {}

  std::string head() const {
    std::string text = wrapped(results_.input.title, 0, summary_width);
    std::string line =
        alternating_
            ? fmt::format("alternating currents, {:g} Hz, r.m.s. values unless said otherwise",
                          results_.problem->excitation.frequency_hz)
            : std::string("steady currents");
    for (const auto& [name, value] : results_.input.given) {
      line += fmt::format(", {} = {:g}", name, value);
    }
    return text + wrapped(line, 0, summary_width);
  }

  std::string forces() const {
    struct Row {
      double size;
      std::vector<std::string> cells;
    };
    std::vector<Row> rows;
    bool any_hand = false;
    const auto add = [&](const solver::Entry& entry, const std::string& current) {
      const bool given =
          std::isfinite(value_of(entry.figures, alternating_ ? "force_peak" : "force_x"));
      if (!given) return;
      Row row{0.0, {name_of(entry.name), current}};
      if (alternating_) {
        row.size = value_of(entry.figures, "force_peak");
        row.cells.push_back(text_of(entry.figures, "force_peak"));
        row.cells.push_back(direction_text(value_of(entry.figures, "force_peak_direction")));
        const double at = value_of(entry.figures, "force_peak_at");
        row.cells.push_back(std::isfinite(at) ? fmt::format("{:.0f}°", at) : "");
        row.cells.push_back(quantity_text(std::hypot(value_of(entry.figures, "force_mean_x"),
                                                     value_of(entry.figures, "force_mean_y")),
                                          "N/m"));
      } else {
        row.size =
            std::hypot(value_of(entry.figures, "force_x"), value_of(entry.figures, "force_y"));
        add_vector(row.cells, value_of(entry.figures, "force_x"),
                   value_of(entry.figures, "force_y"));
      }
      const double by_hand = hand_size(entry);
      row.cells.push_back(by_hand > 0.0 ? fmt::format("{:.2f}", row.size / by_hand) : "");
      any_hand = any_hand || by_hand > 0.0;
      rows.push_back(std::move(row));
    };
    for (const solver::Entry& bar : figures_.bars) add(bar, current_text(bar.current));
    for (const solver::Entry& wall : figures_.walls) add(wall, "");
    for (const solver::Entry& body : figures_.bodies) add(body, "in contact");
    if (rows.empty()) return "";
    std::stable_sort(rows.begin(), rows.end(),
                     [](const Row& a, const Row& b) { return a.size > b.size; });
    PlainTable table(alternating_ ? "lrrlrrr" : "lrrlr");
    const std::string hand = any_hand ? "× hand" : "";
    if (alternating_) {
      table.add({"", "", "peak", "", "at wt", "mean", hand});
    } else if (any_hand) {
      table.add({"", "", "", "", hand});
    }
    for (std::size_t k = 0; k < std::min(rows.size(), most_rows); ++k) table.add(rows[k].cells);
    return section("Forces, per metre of run", table, rows.size());
  }

  /// The largest forces of the fault beside the standard's hand value.
  std::string fault() const {
    if (!figures_.fault) return "";
    const solver::FaultFigures& fault = *figures_.fault;
    const std::string names = fmt::format("{}", fmt::join(results_.fault_bars(), ", "));
    const auto given = [&](const char* key) { return value_of(fault.circuit, key); };
    std::string text = "\n";
    text += wrapped("Fault between " + names + ", largest forces per metre of run" + closing_text(),
                    0, summary_width);
    if (std::isfinite(given("r_over_x"))) {
      text += wrapped(
          fmt::format("{} symmetrical, R/X {:.3g}, power factor {:.3g}, kappa {:.4g}, peak over "
                      "r.m.s. {:.4g}; the waveform's own crest, worst closing, {}",
                      text_of(fault.circuit, "symmetrical_current"), given("r_over_x"),
                      given("power_factor"), given("kappa"), given("peak_over_rms"),
                      text_of(fault.circuit, "crest_current")),
          2, summary_width);
    } else {
      text += "  largest current " + text_of(fault.circuit, "crest_current") + "\n";
    }
    PlainTable table("lrlrrrr");
    table.add({"", "peak", "", "hand", "ratio", "a support", "of its strength"});
    std::size_t count = 0;
    const auto add = [&](const solver::Entry& entry) {
      const solver::Figure* peak = find_figure(entry.figures, "force_peak");
      if (!std::isfinite(peak->value) || ++count > most_rows) return;
      const bool hand = std::isfinite(peak->hand);
      const double share = value_of(entry.figures, "support_share");
      table.add(
          {name_of(entry.name), quantity_text(*peak),
           peak->value > 0.0 ? direction_text(value_of(entry.figures, "force_peak_direction")) : "",
           hand ? quantity_text(peak->hand, peak->unit) : "",
           hand ? fmt::format("{:.3g}", peak->value / peak->hand) : "",
           std::isfinite(value_of(entry.figures, "support_force"))
               ? text_of(entry.figures, "support_force")
               : "",
           std::isfinite(share) ? percent_text(share) : ""});
    };
    for (const auto* entries : {&fault.bars, &fault.walls, &fault.bodies}) {
      for (const solver::Entry& entry : *entries) {
        add(entry);
        for (const solver::Entry& piece : entry.pieces) add(piece);
      }
    }
    text += table.text(summary_width) + more_rows(count);
    if (results_.input.supports) {
      text += wrapped("a support: force times span, static, no dynamic factor", 2, summary_width);
    }
    if (results_.fault_over_time()) text += "  over time: fault_forces.csv, fault.png\n";
    return text;
  }

  std::string probes() const {
    std::vector<const solver::ProbeFigures*> order;
    for (const solver::ProbeFigures& probe : figures_.probes) order.push_back(&probe);
    std::stable_partition(order.begin(), order.end(), [](const solver::ProbeFigures* probe) {
      return probe->limit_state == solver::LimitState::exceeded ||
             probe->limit_state == solver::LimitState::undecided;
    });
    PlainTable table("lrlrrll");
    std::string sources;
    for (std::size_t k = 0; k < std::min(order.size(), most_rows); ++k) {
      const solver::ProbeFigures& probe = *order[k];
      const std::string key = alternating_ ? "b_rms" : "b";
      const bool line = probe.probe.line;
      const bool limited = probe.limit_state != solver::LimitState::none;
      std::vector<std::string> cells = {name_of(probe.probe.name)};
      cells.push_back(line ? text_of(probe.figures, (key + "_max").c_str())
                           : text_of(probe.points.front().figures, key.c_str()));
      cells.push_back(state_text(probe.limit_state));
      cells.push_back(limited ? percent_text(value_of(probe.figures, "of_limit")) : "");
      cells.push_back(limited ? "of " + limit_text(value_of(probe.figures, "limit")) : "");
      cells.push_back(line ? "largest," : "");
      cells.push_back("at " + place_text(line ? probe.largest_at : probe.points.front().at));
      if (limited) {
        const std::string source = "limit from: " + probe.probe.limit_from;
        if (sources.find(source + "\n") == std::string::npos) sources += source + "\n";
      }
      table.add(std::move(cells));
    }
    std::string text = section("Magnetic flux density", table, order.size());
    for (std::size_t from = 0; from < sources.size();) {
      const std::size_t to = sources.find('\n', from);
      text += wrapped(sources.substr(from, to - from), 2, summary_width);
      from = to + 1;
    }
    return text;
  }

  std::string inductances() const {
    PlainTable loops("lrrr");
    if (!figures_.loops.empty() && figures_.loops.front().figures.size() > 1) {
      loops.add(
          {"", "secant", "differential", figures_.loops.front().figures.size() > 2 ? "at wt" : ""});
    }
    for (std::size_t k = 0; k < std::min(figures_.loops.size(), most_rows); ++k) {
      const solver::Entry& loop = figures_.loops[k];
      std::vector<std::string> cells{name_of(loop.name)};
      for (const solver::Figure& figure : loop.figures) cells.push_back(quantity_text(figure));
      loops.add(std::move(cells));
    }
    PlainTable bars("lr");
    std::size_t count = 0;
    const auto add = [&](const std::string& name, const solver::Entry& entry, const char* key) {
      if (!std::isfinite(value_of(entry.figures, key))) return;
      if (++count <= most_rows) bars.add({name, text_of(entry.figures, key)});
    };
    for (const solver::Entry& circuit : figures_.circuits) {
      std::string names;
      for (const std::string& part : circuit.parts) names += (names.empty() ? "" : ", ") + part;
      add("mean of " + clipped(names, name_width), circuit, "reactance_mean");
    }
    for (const solver::Entry& bar : figures_.bars) add(name_of(bar.name), bar, "reactance");
    return section("Inductance of the loops, per metre of run", loops, figures_.loops.size()) +
           section("Reactance, per metre of run", bars, count);
  }

  std::string walls() const {
    const bool saturable =
        std::any_of(figures_.walls.begin(), figures_.walls.end(), [](const solver::Entry& wall) {
          return find_figure(wall.figures, "saturated_share") != nullptr;
        });
    const bool fault = figures_.fault.has_value();
    PlainTable table("lrrrrr");
    if (!figures_.walls.empty()) {
      table.add({"", "mean", "exceeded on 1 %", saturable ? "saturated" : "",
                 fault ? "in the fault" : "", fault && saturable ? "saturated" : ""});
    }
    const auto saturated = [](const solver::Entry& wall) {
      const double share = value_of(wall.figures, "saturated_share");
      return std::isfinite(share) ? fmt::format("{:.0f} %", 100.0 * share) : "";
    };
    for (std::size_t k = 0; k < std::min(figures_.walls.size(), most_rows); ++k) {
      const solver::Entry& wall = figures_.walls[k];
      table.add({name_of(wall.name), text_of(wall.figures, "b_mean"),
                 text_of(wall.figures, "b_high"), saturated(wall),
                 fault ? text_of(figures_.fault->walls[k].figures, "b_high") : "",
                 fault ? saturated(figures_.fault->walls[k]) : ""});
    }
    std::string text = section(alternating_ ? "Flux density in the walls, largest in the cycle"
                                            : "Flux density in the walls",
                               table, figures_.walls.size());
    if (saturable) text += "  saturated: the share of the area with dB/dH below 10 mu_0\n";
    return text;
  }

  /// The sides of the walls with the largest pushes, outward positive.
  std::string pushes() const {
    struct Row {
      double size;
      std::vector<std::string> cells;
    };
    std::vector<Row> rows;
    const auto range = [](Row& row, const solver::Entry& face) {
      for (const char* key : {"push_max", "push_min"}) {
        row.size = std::max(row.size, std::abs(value_of(face.figures, key)));
        row.cells.push_back(text_of(face.figures, key));
      }
    };
    for (std::size_t k = 0; k < figures_.walls.size(); ++k) {
      const solver::Entry& wall = figures_.walls[k];
      for (std::size_t f = 0; f < wall.faces.size(); ++f) {
        const solver::Entry& face = wall.faces[f];
        Row row{0.0, {name_of(wall.name), face.name}};
        if (alternating_) {
          range(row, face);
        } else {
          row.size = std::abs(value_of(face.figures, "push"));
          row.cells.push_back(text_of(face.figures, "push"));
          row.cells.push_back(text_of(face.figures, "pressure_mean"));
        }
        if (figures_.fault) range(row, figures_.fault->walls[k].faces[f]);
        rows.push_back(std::move(row));
      }
    }
    if (rows.empty()) return "";
    std::stable_sort(rows.begin(), rows.end(),
                     [](const Row& a, const Row& b) { return a.size > b.size; });
    PlainTable table("llrrrr");
    std::vector<std::string> head =
        alternating_ ? std::vector<std::string>{"", "", "most outward", "most inward"}
                     : std::vector<std::string>{"", "", "push", "mean pressure"};
    if (figures_.fault) head.insert(head.end(), {"outward in the fault", "inward"});
    table.add(head);
    for (std::size_t k = 0; k < std::min(rows.size(), most_rows); ++k) table.add(rows[k].cells);
    return section("Push on the sides of the walls, outward positive, per metre of run", table,
                   rows.size());
  }

  std::string notices() const {
    if (figures_.notices.empty()) return "";
    std::string text = "\nNotices\n";
    for (const solver::Notice& notice : figures_.notices) {
      text += wrapped(fmt::format("{}: {}", notice.name, notice.detail), 2, summary_width);
    }
    return text;
  }

private:
  static std::string section(const std::string& title, const PlainTable& table, std::size_t all) {
    if (table.empty()) return "";
    return "\n" + title + "\n" + table.text(summary_width) + more_rows(all);
  }

  /// For which closing of an alternating fault the forces are.
  std::string closing_text() const {
    const auto& course = results_.input.fault->current.course;
    const auto* alternating = std::get_if<solver::AlternatingFault>(&course);
    if (alternating == nullptr) return "";
    return alternating->closing ? fmt::format(", closing at {:g}° of the first bar's voltage",
                                              to_ten_digits(*alternating->closing / degree))
                                : ", each at its worst closing";
  }

  /// Magnitude of an entry's force by a handbook's formula, of the peak with a frequency [N/m].
  double hand_size(const solver::Entry& entry) const {
    if (entry.hand_formula.empty()) return 0.0;
    const auto hand = [&](const char* key) {
      const solver::Figure* figure = find_figure(entry.figures, key);
      return figure != nullptr && std::isfinite(figure->hand) ? figure->hand : 0.0;
    };
    return alternating_ ? hand("force_peak") : std::hypot(hand("force_x"), hand("force_y"));
  }

  std::string current_text(std::complex<double> current) const {
    if (!alternating_) return fmt::format("{:.6g} A", to_ten_digits(current.real()));
    const double size = std::abs(current);
    double largest = 0.0;
    for (const solver::Entry& bar : figures_.bars)
      largest = std::max(largest, std::abs(bar.current));
    if (size < 1e-12 * largest || size == 0.0) return "0 A";
    const double phase = to_ten_digits(std::round(10.0 * std::arg(current) / degree) / 10.0);
    return fmt::format("{:.6g} A at {:g}°", size, phase);
  }

  std::string state_text(solver::LimitState state) const {
    switch (state) {
      case solver::LimitState::none:
        return "";
      case solver::LimitState::met:
        return "met";
      case solver::LimitState::exceeded:
        return red("EXCEEDED", colour_);
      case solver::LimitState::undecided:
        return red("UNDECIDED", colour_);
    }
    return "";
  }

  const Results& results_;
  solver::Figures figures_;
  bool alternating_;
  bool colour_;
};

std::string check_value(double value, const std::string& unit) {
  return fmt::format("{:.3g}{}", value, unit == "1" ? "" : " " + unit);
}

}  // namespace

std::string checks_table(const Results& results, bool colour) {
  if (results.checks.empty()) return "  no check was made\n";
  PlainTable table("llrl");
  std::string details;
  for (const verify::Check& check : tidy(results.checks)) {
    table.add({check.passed ? "passed" : red("FAILED", colour), check.name,
               check_value(check.measured, check.unit),
               "limit " + check_value(check.limit, check.unit)});
    if (!check.passed) {
      details += wrapped(fmt::format("{} failed: {}", check.name, check.detail), 2, summary_width);
    }
  }
  return table.text(summary_width) + details;
}

std::string verdict_line(const Results& results, bool colour) {
  const bool sound = results.verdict() == "sound";
  const std::string verdict = sound ? "sound" : red("unsound, do not use the numbers", colour);
  const std::string limits = results.limits();
  const bool good = limits == "none" || limits == "met";
  return fmt::format("Verdict: {}.  Validity: {}.  Limits: {}.\n", verdict, results.validity(),
                     good ? limits : red(limits, colour));
}

std::string summary(const Results& results, const std::filesystem::path& folder, bool colour) {
  const Summary parts(results, colour);
  return parts.head() + parts.forces() + parts.fault() + parts.probes() + parts.inductances() +
         parts.walls() + parts.pushes() + "\nChecks\n" + checks_table(results, colour) +
         parts.notices() + "\n" + verdict_line(results, colour) +
         fmt::format("Results: {}\nReport:  {}\n", folder.string(),
                     (folder / "report.html").string()) +
         wrapped(
             "A computed figure supports but does not replace a licensed engineer, the local "
             "code and type tests.",
             0, summary_width);
}

}  // namespace barwall::io
