#include "solver/fault_current.hpp"

#include <algorithm>
#include <catch2/catch.hpp>
#include <cmath>
#include <numbers>
#include <numeric>

using namespace barwall::solver;

namespace {

constexpr double pi = std::numbers::pi;
constexpr double rms = 25e3;
using std::numbers::sqrt2;

FaultCurrent three_bars(double r_over_x, std::optional<double> closing = {}) {
  return {{0, 2, 1}, AlternatingFault{50.0, rms, r_over_x, closing}};
}

FaultCurrent two_bars(double r_over_x) {
  return {{3, 1}, AlternatingFault{60.0, rms, r_over_x, {}}};
}

/// i(t) of one phase as textbooks write it; `voltage` is its own angle at closing.
double written_out(double r_over_x, double wt, double voltage) {
  const double phi = 0.5 * pi - std::atan(r_over_x);
  return sqrt2 * rms *
         (std::cos(wt + voltage - phi) - std::cos(voltage - phi) * std::exp(-wt * r_over_x));
}

}  // namespace

TEST_CASE("each phase of a fault has its own alternating part and its own decaying part") {
  const double delay[] = {0.0, -2.0 * pi / 3.0, 2.0 * pi / 3.0};
  for (const double r_over_x : {0.0, 0.07, 0.3, 4.0}) {
    for (const double closing : {0.0, 0.9, 2.5, -4.0}) {
      for (const double wt : {0.0, 1e-9, 0.1, 2.0, 3.1, 40.0}) {
        CAPTURE(r_over_x, closing, wt);
        const auto three = fault_currents(three_bars(r_over_x), wt / (100.0 * pi), closing);
        REQUIRE(three.size() == 3);
        for (std::size_t k = 0; k < 3; ++k) {
          CHECK(three[k] == Approx(written_out(r_over_x, wt, closing + delay[k])).margin(1e-7));
        }
        const auto two = fault_currents(two_bars(r_over_x), wt / (120.0 * pi), closing);
        REQUIRE(two.size() == 2);
        CHECK(two[0] == Approx(written_out(r_over_x, wt, closing)).margin(1e-7));
        CHECK(two[1] == -two[0]);
      }
    }
  }
}

TEST_CASE("a fault's current begins at nothing and obeys its circuit's equation") {
  // X/w di/dt + R i = Z sqrt(2) I cos(wt + a), with X = 1.
  const double step = 1e-5;
  for (const double r_over_x : {0.0, 0.25, 3.0}) {
    const FaultCurrent fault = three_bars(r_over_x);
    for (const double closing : {0.4, -1.1}) {
      const auto at = [&](double wt) { return fault_currents(fault, wt / (100.0 * pi), closing); };
      for (const double current : at(0.0)) CHECK(current == 0.0);
      for (const double wt : {0.01, 0.5, 3.0, 9.0}) {
        const double slope = (at(wt + step)[0] - at(wt - step)[0]) / (2.0 * step);
        const double driving = std::hypot(1.0, r_over_x) * sqrt2 * rms * std::cos(wt + closing);
        CHECK(slope + r_over_x * at(wt)[0] == Approx(driving).margin(1e-5 * rms));
        const auto currents = at(wt);
        CHECK(std::accumulate(currents.begin(), currents.end(), 0.0) ==
              Approx(0.0).margin(1e-9 * rms));
      }
    }
  }
}

TEST_CASE("the sustained currents of a fault are an excitation of the parts it names alone") {
  const Excitation three = sustained_excitation(three_bars(0.1), 5);
  CHECK(three.frequency_hz == 50.0);
  REQUIRE(three.current.size() == 5);
  CHECK(three.current[0] == std::complex<double>(rms, 0.0));
  CHECK(std::arg(three.current[2]) == Approx(-2.0 * pi / 3.0));
  CHECK(std::arg(three.current[1]) == Approx(2.0 * pi / 3.0));
  CHECK(std::abs(three.current[1]) == Approx(rms).epsilon(1e-15));
  CHECK(three.current[3] == 0.0);
  CHECK(three.current[4] == 0.0);
  CHECK_FALSE(has_net_current(three));
  const Excitation direct = sustained_excitation({{1, 0}, DirectRise{4e3, 0.02}}, 3);
  CHECK_FALSE(direct.alternating());
  CHECK(direct.current == std::vector<std::complex<double>>{-4e3, 4e3, 0.0});
}

TEST_CASE("kappa follows IEC 60909-0 and is turned back into R/X") {
  // Recomputed digits of the formula, itself read in sources on IEC 60909-0.
  const double rows[][2] = {{0, 2.0},        {0.07, 1.814373}, {0.1, 1.746002}, {0.2, 1.557835},
                            {0.3, 1.418438}, {0.5, 1.238668},  {1, 1.068791}};
  for (const auto& [ratio, kappa] : rows) {
    CHECK(kappa_of(ratio) == Approx(kappa).epsilon(0.0).margin(5.1e-7));
    CHECK(r_over_x_of_kappa(kappa_of(ratio)) == Approx(ratio).margin(1e-14));
  }
  CHECK(r_over_x_of_kappa(largest_kappa) == 0.0);
  CHECK(std::isinf(r_over_x_of_kappa(least_kappa)));
}

TEST_CASE("a peak of 2.1 times the r.m.s. current is kappa 1.485, R/X 0.249, power factor 0.24") {
  const FaultEquivalents same = equivalents_of(r_over_x_of_kappa(2.1 / sqrt2));
  const auto digits = [](double value, double half) {
    return Approx(value).epsilon(0.0).margin(half);
  };
  CHECK(same.peak_over_rms == Approx(2.1).epsilon(1e-14));
  CHECK(same.kappa == digits(1.485, 5e-4));
  CHECK(same.r_over_x == digits(0.249, 5e-4));
  CHECK(same.power_factor == digits(0.24, 5e-3));
  CHECK(same.x_over_r * same.r_over_x == Approx(1.0));
  CHECK(r_over_x_of_power_factor(same.power_factor) == Approx(same.r_over_x).epsilon(1e-14));
  // The waveform itself stays 0.4 % below what the factor says.
  CHECK(same.crest_over_rms == digits(2.092, 5e-4));
}

TEST_CASE("without resistance every guise of the ratio is at its end") {
  const FaultEquivalents same = equivalents_of(0.0);
  CHECK(std::isinf(same.x_over_r));
  CHECK(same.power_factor == 0.0);
  CHECK(same.kappa == 2.0);
  CHECK(same.crest_over_rms == Approx(2.0 * sqrt2).epsilon(1e-15));
  CHECK(equivalents_of(1e9).crest_over_rms == Approx(sqrt2).epsilon(1e-8));
}

TEST_CASE("the crest is the largest current over time and closing angle") {
  for (const double r_over_x : {0.0, 1e-6, 0.02, 0.07, 0.249, 0.5, 1.0, 5.0, 60.0}) {
    CAPTURE(r_over_x);
    // A plain search of the written-out current; its steps leave at most 1e-5 to find.
    double largest = 0.0;
    for (int i = 0; i <= 2000; ++i) {
      const double wt = 2.0 * pi * i / 2000.0;
      for (int k = 0; k < 400; ++k) {
        largest = std::max(largest, std::abs(written_out(r_over_x, wt, pi * k / 400.0)));
      }
    }
    const FaultCurrent fault = three_bars(r_over_x, 0.3);
    const FaultCrest crest = crest_of(fault);
    CHECK(crest.current >= largest * (1.0 - 1e-14));
    CHECK(crest.current == Approx(largest).epsilon(1e-5));
    CHECK(crest.current == Approx(rms * equivalents_of(r_over_x).crest_over_rms));
    REQUIRE(crest.closing.has_value());
    // Known of this circuit (from memory): the worst is to close as the voltage passes through 0.
    CHECK(*crest.closing == Approx(0.5 * pi).epsilon(1e-7));
    const auto then = fault_currents(fault, crest.seconds.value(), *crest.closing);
    CHECK(std::abs(then[0]) == Approx(crest.current).epsilon(1e-13));
  }
}

TEST_CASE("a closing angle is found for every angle of the currents at every time") {
  for (const double r_over_x : {0.0, 0.3}) {
    const FaultCurrent fault = three_bars(r_over_x);
    const auto& course = std::get<AlternatingFault>(fault.course);
    for (const double wt : {0.2, 2.0, 7.0}) {
      for (const double angle : {0.0, 1.0, 2.5, -9.0}) {
        const double closing = closing_for(course, wt, angle);
        CHECK(closing >= 0.0);
        CHECK(closing < pi);
        const double scale = fault_instant(course, wt, closing).scale;
        const auto wanted = fault_currents(fault, FaultInstant{scale, angle});
        const auto found = fault_currents(fault, wt / (100.0 * pi), closing);
        // All of them as wanted, or all reversed.
        const double sign = wanted[0] * found[0] > 0.0 ? 1.0 : -1.0;
        for (std::size_t k = 0; k < 3; ++k) {
          CHECK(found[k] == Approx(sign * wanted[k]).margin(1e-9 * rms));
        }
      }
    }
  }
}

TEST_CASE("the factor kappa keeps within 0.6 % of the waveform's crest up to R/X = 1") {
  double least = 0.0;
  double most = 0.0;
  for (int k = 0; k <= 100; ++k) {
    const FaultEquivalents same = equivalents_of(k / 100.0);
    const double error = same.peak_over_rms / same.crest_over_rms - 1.0;
    least = std::min(least, error);
    most = std::max(most, error);
  }
  CHECK(most < 6e-3);
  CHECK(least > -6e-3);
  // And is another thing than it: a crest taken from the factor would show here.
  CHECK(most > 4e-3);
  CHECK(least < -2e-3);
}

TEST_CASE("a direct fault current rises to its prospective value, or is known by its peak") {
  const FaultCurrent rise{{0, 1}, DirectRise{20e3, 0.03}};
  CHECK(fault_currents(rise, 0.0) == std::vector<double>{0.0, -0.0});
  CHECK(fault_currents(rise, 0.03)[0] == Approx(20e3 * (1.0 - std::exp(-1.0))));
  CHECK(fault_currents(rise, 0.03)[1] == -fault_currents(rise, 0.03)[0]);
  const double start = 1e-9;
  CHECK(fault_currents(rise, start)[0] == Approx(20e3 * start / 0.03).epsilon(1e-7));
  CHECK(crest_of(rise).current == 20e3);
  CHECK_FALSE(crest_of(rise).seconds.has_value());
  CHECK_FALSE(crest_of(rise).closing.has_value());
  const FaultCurrent peak{{0, 1}, DirectPeak{20e3, 33e3}};
  CHECK(crest_of(peak).current == Approx(33e3));
  CHECK(fault_currents(peak, 0.004)[1] == Approx(-33e3));
  CHECK(sustained_currents(peak)[0] == 20e3);
}
