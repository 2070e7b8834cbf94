#include "verify/pipe_series.hpp"

#include <algorithm>
#include <cassert>
#include <cmath>
#include <complex>
#include <stdexcept>
#include <vector>

#include "verify/complex_field.hpp"

namespace barwall::verify {

using mesh::Point;

namespace {

using Complex = std::complex<double>;

/// D_n = (mu_r + 1)^2 - (mu_r - 1)^2 (a/b)^2n, the denominator of both shares.
double denominator(const Pipe& pipe, double ratio_power) {
  const double mu = pipe.relative_permeability;
  return (mu + 1.0) * (mu + 1.0) - (mu - 1.0) * (mu - 1.0) * ratio_power;
}

double ratio_power(const Pipe& pipe, int n) {
  return std::pow(pipe.inner_radius / pipe.outer_radius, 2 * n);
}

void require_bars_in_bore(const Pipe& pipe, std::span<const RoundBar> bars) {
  if (!(pipe.inner_radius > 0.0 && pipe.outer_radius > pipe.inner_radius &&
        pipe.relative_permeability > 0.0)) {
    throw std::invalid_argument("a pipe needs 0 < inner radius < outer radius and mu_r > 0");
  }
  for (const RoundBar& bar : bars) {
    if (!(norm(bar.centre) + bar.radius < pipe.inner_radius)) {
      throw std::invalid_argument("a bar does not lie wholly in the bore of the pipe");
    }
  }
}

double farthest(std::span<const RoundBar> bars) {
  double d = 0.0;
  for (const RoundBar& bar : bars) d = std::max(d, norm(bar.centre));
  return d;
}

/// Terms of a power series in `ratio` < 1 that leave less than 1e-18 of its sum.
int terms_for(double ratio) {
  if (ratio <= 0.0) return 1;
  return 1 + static_cast<int>(std::ceil((42.0 - std::log1p(-ratio)) / -std::log(ratio)));
}

/// Calls visit(n, m) for n = 1, 2, ... with the moments m_n = sum of I (z_k / scale)^n [A].
template <class Visit>
void for_each_moment(std::span<const RoundBar> bars, double scale, int terms, Visit visit) {
  std::vector<Complex> powers(bars.size());
  for (std::size_t k = 0; k < bars.size(); ++k) powers[k] = bars[k].current;
  for (int n = 1; n <= terms; ++n) {
    Complex moment = 0.0;
    for (std::size_t k = 0; k < bars.size(); ++k) {
      powers[k] *= complex_of(bars[k].centre) / scale;
      moment += powers[k];
    }
    visit(n, moment);
  }
}

double net_current(std::span<const RoundBar> bars) {
  double sum = 0.0;
  for (const RoundBar& bar : bars) sum += bar.current;
  return sum;
}

/// A and b = B_y + i B_x from one series, both over mu_0 / 2 pi.
struct Sum {
  double potential = 0.0;
  Complex field;
};

/// In the bore: sum over n of R_n / n (z conj(z_k) / a^2)^n.
Sum reflection(const Pipe& pipe, std::span<const RoundBar> bars, Point at) {
  const double a = pipe.inner_radius;
  const double mu = pipe.relative_permeability;
  const Complex z = complex_of(at) / a;
  const double q = (a / pipe.outer_radius) * (a / pipe.outer_radius);
  const int terms = terms_for(std::abs(z) * farthest(bars) / a);
  Sum sum;
  sum.potential = net_current(bars) * (mu - 1.0) * std::log(pipe.outer_radius / a);
  Complex power = 1.0;  // z^(n - 1)
  double q_power = 1.0;
  for_each_moment(bars, a, terms, [&](int n, Complex moment) {
    q_power *= q;
    const double reflected = (mu * mu - 1.0) * (1.0 - q_power) / denominator(pipe, q_power);
    const Complex term = reflected * std::conj(moment) * power;
    sum.field -= term / a;
    sum.potential += (term * z).real() / n;
    power *= z;
  });
  return sum;
}

Sum in_wall(const Pipe& pipe, std::span<const RoundBar> bars, Point at) {
  const double b = pipe.outer_radius;
  const double mu = pipe.relative_permeability;
  const double current = net_current(bars);
  const Complex z = complex_of(at);
  const double r = std::abs(z);
  const double d = farthest(bars);
  Sum sum;
  sum.potential = -current * (mu * std::log(r / b) + std::log(b));
  sum.field = mu * current / z;
  // With the moments scaled by d, z^-n and z^n / b^2n become powers of numbers below 1.
  const Complex outward = d / z;
  const Complex inward = z * d / (b * b);
  Complex out = 1.0;
  Complex in = 1.0;
  for_each_moment(bars, d > 0.0 ? d : 1.0, terms_for(d / r), [&](int n, Complex moment) {
    const double transmitted = transmitted_share(pipe, n);
    out *= outward;
    in *= inward;
    const Complex falling = 0.5 * (1.0 + mu) * transmitted * moment * out;
    const Complex rising = 0.5 * (1.0 - mu) * transmitted * std::conj(moment) * in;
    sum.potential += (falling + rising).real() / n;
    sum.field += (falling - rising) / z;
  });
  return sum;
}

Sum outside(const Pipe& pipe, std::span<const RoundBar> bars, Point at) {
  const double current = net_current(bars);
  const Complex z = complex_of(at);
  const double d = farthest(bars);
  Sum sum;
  sum.potential = -current * std::log(std::abs(z));
  sum.field = current / z;
  Complex out = 1.0;
  for_each_moment(bars, d > 0.0 ? d : 1.0, terms_for(d / std::abs(z)), [&](int n, Complex moment) {
    out *= d / z;
    const Complex term = transmitted_share(pipe, n) * moment * out;
    sum.potential += term.real() / n;
    sum.field += term / z;
  });
  return sum;
}

}  // namespace

double transmitted_share(const Pipe& pipe, int n) {
  return 4.0 * pipe.relative_permeability / denominator(pipe, ratio_power(pipe, n));
}

double reflected_share(const Pipe& pipe, int n) {
  const double power = ratio_power(pipe, n);
  const double mu = pipe.relative_permeability;
  return (mu * mu - 1.0) * (1.0 - power) / denominator(pipe, power);
}

Point field_of(const Pipe& pipe, std::span<const RoundBar> bars, Point at) {
  require_bars_in_bore(pipe, bars);
  const double r = norm(at);
  if (r < pipe.inner_radius) {
    return field_of_bars(bars, at) + field_from(mu_0_over_2pi * reflection(pipe, bars, at).field);
  }
  const Sum sum = r <= pipe.outer_radius ? in_wall(pipe, bars, at) : outside(pipe, bars, at);
  return field_from(mu_0_over_2pi * sum.field);
}

double potential_of(const Pipe& pipe, std::span<const RoundBar> bars, Point at) {
  require_bars_in_bore(pipe, bars);
  const double r = norm(at);
  if (r < pipe.inner_radius) {
    return potential_of_bars(bars, at) + mu_0_over_2pi * reflection(pipe, bars, at).potential;
  }
  const Sum sum = r <= pipe.outer_radius ? in_wall(pipe, bars, at) : outside(pipe, bars, at);
  return mu_0_over_2pi * sum.potential;
}

Point reflected_field(const Pipe& pipe, std::span<const RoundBar> bars, Point at) {
  require_bars_in_bore(pipe, bars);
  if (!(norm(at) < pipe.inner_radius)) {
    throw std::invalid_argument("the reflected field is asked for outside the bore");
  }
  return field_from(mu_0_over_2pi * reflection(pipe, bars, at).field);
}

Point force_on_bar(const Pipe& pipe, std::span<const RoundBar> bars, std::size_t index) {
  assert(index < bars.size());
  const Point others = field_of_other_bars(bars, index);
  const Point reflected = reflected_field(pipe, bars, bars[index].centre);
  return force_on(bars[index].current, others + reflected);
}

double added_loop_inductance(const Pipe& pipe, double offset) {
  // 1 A round the loop; A of the pipe alone at one bar less that at the other.
  const RoundBar loop[] = {{{offset, 0.0}, 1.0}, {{-offset, 0.0}, -1.0}};
  require_bars_in_bore(pipe, loop);
  return mu_0_over_2pi * (reflection(pipe, loop, loop[0].centre).potential -
                          reflection(pipe, loop, loop[1].centre).potential);
}

}  // namespace barwall::verify
