#include <algorithm>
#include <catch2/catch.hpp>
#include <cmath>
#include <complex>
#include <numbers>

#include "csv_support.hpp"
#include "fault_support.hpp"
#include "io/results_csv.hpp"
#include "io/results_files.hpp"
#include "io/tidy_figures.hpp"
#include "program_support.hpp"

namespace barwall {
namespace {

using Rows = std::vector<std::vector<std::string>>;

const Rows& three_bar_rows() {
  static const Rows rows = test::csv_rows(io::fault_forces_csv(test::three_bar_fault()));
  return rows;
}

/// The numbers below a heading, which occurs once.
std::vector<double> column(const Rows& rows, const std::string& heading) {
  INFO(heading);
  REQUIRE(std::count(rows.front().begin(), rows.front().end(), heading) == 1);
  const auto at = std::find(rows.front().begin(), rows.front().end(), heading);
  const auto k = static_cast<std::size_t>(at - rows.front().begin());
  std::vector<double> numbers;
  for (std::size_t row = 1; row < rows.size(); ++row) numbers.push_back(std::stod(rows[row].at(k)));
  return numbers;
}

/// 20 kA and R/X = 0.1 closed at 37 degrees, in phase `k` of three, at the time t [s]: the solution
/// of the circuit's differential equation.
double phase_current(int k, double t) {
  constexpr double pi = std::numbers::pi;
  const double phi = std::atan(10.0);
  const double start = (37.0 - 120.0 * k) * pi / 180.0 - phi;
  const double wt = 100.0 * pi * t;
  return std::sqrt(2.0) * 20e3 * (std::cos(wt + start) - std::cos(start) * std::exp(-0.1 * wt));
}

}  // namespace

TEST_CASE("fault_forces.csv holds the currents of three phases and the forces between long wires") {
  const Rows& rows = three_bar_rows();
  const std::vector<double> seconds = column(rows, "time_s");
  CHECK(seconds.front() == 0.0);
  CHECK(seconds.back() == Approx(0.1));
  CHECK(seconds.size() >= 5 * 60);
  const std::vector<std::string> names = {"L1", "L2, \"middle\"", "L3"};
  // Round bars with evenly spread currents pull at each other like wires on their axes.
  const std::vector<std::complex<double>> at = {{-0.070, 0.0}, {0.0, 0.030}, {0.060, 0.0}};
  std::vector<std::vector<double>> current;
  std::vector<std::vector<double>> force_x;
  std::vector<std::vector<double>> force_y;
  for (const std::string& name : names) {
    current.push_back(column(rows, "bars/" + name + "/current_a"));
    force_x.push_back(column(rows, "bars/" + name + "/force_x_n_per_m"));
    force_y.push_back(column(rows, "bars/" + name + "/force_y_n_per_m"));
  }
  double largest = 0.0;
  double worst = 0.0;
  double worst_current = 0.0;
  for (std::size_t row = 0; row < seconds.size(); ++row) {
    for (std::size_t k = 0; k < 3; ++k) {
      const double own = phase_current(static_cast<int>(k), seconds[row]);
      worst_current = std::max(worst_current, std::abs(current[k][row] - own));
      std::complex<double> force;
      for (std::size_t j = 0; j < 3; ++j) {
        if (j == k) continue;
        const double other = phase_current(static_cast<int>(j), seconds[row]);
        force += 2e-7 * own * other * (at[j] - at[k]) / std::norm(at[j] - at[k]);
      }
      largest = std::max(largest, std::abs(force));
      worst = std::max(worst, std::abs(std::complex{force_x[k][row], force_y[k][row]} - force));
    }
  }
  CHECK(largest > 1000.0);
  CHECK(worst < 0.005 * largest);
  CHECK(worst_current < 1e-4);  // ten digits of 5e4 A, and of the time
}

TEST_CASE("fault_forces.csv gives bars, pieces and walls by address, and bodies for their parts") {
  const std::vector<std::string> expected = {"time_s",
                                             "bars/L1/current_a",
                                             "bars/L2, \"middle\"/current_a",
                                             "bars/L3/current_a",
                                             "bars/L1/force_x_n_per_m",
                                             "bars/L1/force_y_n_per_m",
                                             "bars/L2, \"middle\"/force_x_n_per_m",
                                             "bars/L2, \"middle\"/force_y_n_per_m",
                                             "bars/L3/force_x_n_per_m",
                                             "bars/L3/force_y_n_per_m",
                                             "bars/N/force_x_n_per_m",
                                             "bars/N/force_y_n_per_m",
                                             "bars/N/pieces/N.1/force_x_n_per_m",
                                             "bars/N/pieces/N.1/force_y_n_per_m",
                                             "bars/N/pieces/N.2/force_x_n_per_m",
                                             "bars/N/pieces/N.2/force_y_n_per_m"};
  CHECK(three_bar_rows().front() == expected);
  for (const auto& row : three_bar_rows()) CHECK(row.size() == expected.size());
  // The quotation of RFC 4180 itself.
  CHECK(io::fault_forces_csv(test::three_bar_fault())
            .rfind("time_s,bars/L1/current_a,\"bars/L2, \"\"middle\"\"/current_a\",", 0) == 0);

  // A plate and a foil in contact, and a wall that stands alone.
  const io::Results walls = io::run_case(
      test::read_text(test::two_round_bars("[material.mild]\nrelative_permeability = 100",
                                           "direct_ka = 20\ntime_constant_ms = 12\n") +
                      "[[wall]]\nname = \"plate\"\nmaterial = \"mild\"\n"
                      "rectangle_mm = { centre = [0, 40], size = [80, 10] }\n"
                      "[[wall]]\nname = \"foot\"\nmaterial = \"mild\"\n"
                      "rectangle_mm = { centre = [0, 50], size = [20, 10] }\n"
                      "[[wall]]\nname = \"floor\"\nmaterial = \"mild\"\n"
                      "rectangle_mm = { centre = [0, -60], size = [80, 10] }\n"));
  const Rows rows = test::csv_rows(io::fault_forces_csv(walls));
  const std::vector<double> body = column(rows, "bodies/plate+foot/force_y_n_per_m");
  const std::vector<double> floor = column(rows, "walls/floor/force_y_n_per_m");
  CHECK(body.back() < 0.0);
  CHECK(floor.back() > 0.0);
  const auto& heads = rows.front();
  CHECK(std::count(heads.begin(), heads.end(), "walls/plate/force_x_n_per_m") == 0);
  CHECK(heads.size() == 1 + 2 + 2 * (2 + 1 + 1));
}

TEST_CASE("The largest force in fault_forces.csv is the figure of a fault with that closing") {
  const auto x = column(three_bar_rows(), "bars/L1/force_x_n_per_m");
  const auto y = column(three_bar_rows(), "bars/L1/force_y_n_per_m");
  double largest = 0.0;
  for (std::size_t k = 0; k < x.size(); ++k) largest = std::max(largest, std::hypot(x[k], y[k]));
  const auto& figures = test::three_bar_fault().figures.fault->bars[0].figures;
  const double peak = solver::find_figure(figures, "force_peak")->value;
  CHECK(largest <= peak * (1.0 + 1e-9));
  CHECK(largest > 0.997 * peak);  // 3 degrees from one time to the next
}

TEST_CASE("A fault's course is written to ten digits, and 0 where only rounding is left") {
  solver::FaultSeries series;
  series.seconds = {0.0, 1.0 / 3.0};
  series.current = {{0.0, 2e4 / 3.0}, {-0.0, 1e-8}};
  series.force.part = {{{{1e3 / 3.0, 1e-9}, {0.0, 2.0}}}, std::nullopt};
  series.force.piece = {{{{-1e-9, 1.0}, {1e-7, 0.0}}}, {}};
  series.force.body = {{{1e-9, 0.0}, {7.0 / 3.0, 0.0}}};
  series.force.push = {{{200.0 / 3.0, 0.0}, {1e-9, 0.0}}};
  const solver::FaultSeries tidied = io::tidy(series);
  CHECK(tidied.seconds[1] == 0.3333333333);
  CHECK(tidied.current[0][1] == 6666.666667);
  CHECK(tidied.current[1][1] == 0.0);
  CHECK(tidied.force.part[0]->at(0).x == 333.3333333);
  CHECK(tidied.force.part[0]->at(0).y == 0.0);
  CHECK_FALSE(tidied.force.part[1]);
  CHECK(tidied.force.piece[0][0][0].x == 0.0);
  CHECK(tidied.force.piece[0][0][1].x == 1e-7);
  CHECK(tidied.force.body[0][0].x == 0.0);
  CHECK(tidied.force.body[0][1].x == 2.333333333);
  CHECK(tidied.force.push[0][0].x == 66.66666667);
  CHECK(tidied.force.push[0][1].x == 0.0);
}

TEST_CASE("The files of a fault over time are written with it and go with it") {
  const test::ScratchFolder scratch;
  const auto out = scratch.path() / "out";
  const auto fault_files = [&] {
    std::vector<std::string> names = test::names_in(out);
    std::erase_if(names, [](const std::string& name) { return name.rfind("fault", 0) != 0; });
    return names;
  };
  io::Results with = test::two_bar_fault();
  io::write_results(with, out, false);
  CHECK(fault_files() == std::vector<std::string>{"fault.png", "fault.svg", "fault_forces.csv"});
  CHECK(test::text_of_file(out / "fault_forces.csv") == io::fault_forces_csv(with));
  io::Results unknown = test::fault_without_course();
  io::write_results(unknown, out, true);
  CHECK(fault_files().empty());
  io::write_results(with, out, true);
  CHECK(fault_files().size() == 3);
  io::Results without = io::run_case(test::read_text(test::two_round_bars("", "")));
  io::write_results(without, out, true);
  CHECK(fault_files().empty());
}

}  // namespace barwall
