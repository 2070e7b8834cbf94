#include "verify/iron_box.hpp"

#include <algorithm>
#include <cassert>
#include <cmath>
#include <numbers>
#include <stdexcept>
#include <vector>

#include "solver/constants.hpp"

namespace barwall::verify {

using mesh::Point;
using solver::mu_0;
using std::numbers::pi;

namespace {

constexpr int harmonics = 20000;

void require_solvable(const IronBox& box, std::span<const BoxBar> bars) {
  double net = 0.0;
  double gross = 0.0;
  for (const BoxBar& bar : bars) {
    net += bar.current;
    gross += std::abs(bar.current);
    const double x = 0.5 * bar.width;
    const double y = 0.5 * bar.height;
    if (!(x > 0.0 && y > 0.0 && bar.centre.x - x >= 0.0 && bar.centre.x + x <= box.width &&
          bar.centre.y - y >= 0.0 && bar.centre.y + y <= box.height)) {
      throw std::invalid_argument("a bar does not lie in the box");
    }
  }
  if (std::abs(net) > 1e-12 * gross) {
    throw std::invalid_argument("the net current in a closed iron box must be 0");
  }
}

double density(const BoxBar& bar) {
  return bar.current / (bar.width * bar.height);
}

/// Integral of cos(k y) over a bar's height; k = 0 gives the height itself.
double height_integral(const BoxBar& bar, double k) {
  if (k == 0.0) return bar.height;
  return 2.0 * std::cos(k * bar.centre.y) * std::sin(0.5 * k * bar.height) / k;
}

/// One term of the cosine series over the height: value and slope in x [Wb/m, T], in the bar's
/// own current only.
struct Mode {
  double value = 0.0;
  double slope = 0.0;
};

/// -A'' + k^2 A = source for x1 < x < x2, A' = 0 at x = 0 and x = width, k > 0. Written with
/// exponentials of negative arguments only.
Mode solve_mode(double width, double x1, double x2, double k, double source, double x) {
  const auto even = [&](double u) { return 1.0 + std::exp(-2.0 * k * u); };  // 2 e^-ku cosh ku
  const auto odd = [&](double u) { return -std::expm1(-2.0 * k * u); };      // 2 e^-ku sinh ku
  const double scale = source / (k * k);
  const double whole = 2.0 * odd(width);
  Mode mode;
  // What lies to the left of x: the integral of cosh(k x') cosh(k (width - x)).
  const double left_end = std::min(x, x2);
  if (left_end > x1) {
    const double right = width - x;
    const double high = std::exp(-k * (x - left_end)) * odd(left_end);
    const double low = std::exp(-k * (x - x1)) * odd(x1);
    mode.value += scale * even(right) * (high - low) / whole;
    mode.slope -= scale * k * odd(right) * (high - low) / whole;
  }
  const double right_end = std::max(x, x1);
  if (right_end < x2) {
    const double high = std::exp(-k * (right_end - x)) * odd(width - right_end);
    const double low = std::exp(-k * (x2 - x)) * odd(width - x2);
    mode.value += scale * even(x) * (high - low) / whole;
    mode.slope += scale * k * odd(x) * (high - low) / whole;
  }
  return mode;
}

double low_x(const BoxBar& bar) {
  return bar.centre.x - 0.5 * bar.width;
}
double high_x(const BoxBar& bar) {
  return bar.centre.x + 0.5 * bar.width;
}

/// The term of all bars at x, harmonic n of cos(n pi y / height).
Mode mode_at(const IronBox& box, std::span<const BoxBar> bars, int n, double x) {
  Mode sum;
  const double k = n * pi / box.height;
  for (const BoxBar& bar : bars) {
    const double source =
        mu_0 * density(bar) * height_integral(bar, k) * (n == 0 ? 1.0 : 2.0) / box.height;
    if (n > 0) {
      const Mode one = solve_mode(box.width, low_x(bar), high_x(bar), k, source, x);
      sum.value += one.value;
      sum.slope += one.slope;
    } else {
      const double after = std::max(x - low_x(bar), 0.0);
      const double past = std::max(x - high_x(bar), 0.0);
      sum.value -= 0.5 * source * (after - past) * (after + past);
      sum.slope -= source * (after - past);
    }
  }
  return sum;
}

/// Integral over x from x1 to x2 of the term's value. A'' = k^2 A - source turns it into slopes;
/// for n = 0 the value is a parabola between the bars' ends and Simpson's rule is exact.
double width_integral(const IronBox& box, std::span<const BoxBar> bars, int n, double x1,
                      double x2) {
  const double k = n * pi / box.height;
  if (n > 0) {
    double sources = 0.0;
    for (const BoxBar& bar : bars) {
      const double overlap = std::min(x2, high_x(bar)) - std::max(x1, low_x(bar));
      if (overlap > 0.0) {
        sources += overlap * mu_0 * density(bar) * height_integral(bar, k) * 2.0 / box.height;
      }
    }
    return (mode_at(box, bars, n, x2).slope - mode_at(box, bars, n, x1).slope + sources) / (k * k);
  }
  std::vector<double> ends{x1, x2};
  for (const BoxBar& bar : bars) {
    for (const double x : {low_x(bar), high_x(bar)}) {
      if (x > x1 && x < x2) ends.push_back(x);
    }
  }
  std::sort(ends.begin(), ends.end());
  double sum = 0.0;
  for (std::size_t i = 0; i + 1 < ends.size(); ++i) {
    const double middle = 0.5 * (ends[i] + ends[i + 1]);
    sum += (ends[i + 1] - ends[i]) / 6.0 *
           (mode_at(box, bars, 0, ends[i]).value + 4.0 * mode_at(box, bars, 0, middle).value +
            mode_at(box, bars, 0, ends[i + 1]).value);
  }
  return sum;
}

}  // namespace

Point field_of(const IronBox& box, std::span<const BoxBar> bars, Point at) {
  require_solvable(box, bars);
  Point field;
  for (int n = 0; n <= harmonics; ++n) {
    const double k = n * pi / box.height;
    const Mode mode = mode_at(box, bars, n, at.x);
    field.x -= k * std::sin(k * at.y) * mode.value;
    field.y -= std::cos(k * at.y) * mode.slope;
  }
  return field;
}

Point force_on_bar(const IronBox& box, std::span<const BoxBar> bars, std::size_t index) {
  assert(index < bars.size());
  require_solvable(box, bars);
  const BoxBar& bar = bars[index];
  const double top = bar.centre.y + 0.5 * bar.height;
  const double bottom = bar.centre.y - 0.5 * bar.height;
  // J x B = J grad A, so the force needs A only along the bar's outline.
  Point force;
  for (int n = 0; n <= harmonics; ++n) {
    const double k = n * pi / box.height;
    const double across =
        mode_at(box, bars, n, high_x(bar)).value - mode_at(box, bars, n, low_x(bar)).value;
    force.x += density(bar) * height_integral(bar, k) * across;
    if (n > 0) {
      force.y += density(bar) * (std::cos(k * top) - std::cos(k * bottom)) *
                 width_integral(box, bars, n, low_x(bar), high_x(bar));
    }
  }
  return force;
}

double energy_of(const IronBox& box, std::span<const BoxBar> bars) {
  require_solvable(box, bars);
  double energy = 0.0;
  for (int n = 0; n <= harmonics; ++n) {
    const double k = n * pi / box.height;
    for (const BoxBar& bar : bars) {
      energy += 0.5 * density(bar) * height_integral(bar, k) *
                width_integral(box, bars, n, low_x(bar), high_x(bar));
    }
  }
  return energy;
}

}  // namespace barwall::verify
