#include "solver/cycle.hpp"

#include <cmath>
#include <numbers>

namespace barwall::solver {

double Pulsation::at(double wt) const {
  return mean + cosine * std::cos(2.0 * wt) + sine * std::sin(2.0 * wt);
}

double Pulsation::largest() const {
  return mean + std::hypot(cosine, sine);
}

double Pulsation::smallest() const {
  return mean - std::hypot(cosine, sine);
}

Pulsation pulsation_of(double in_phase, double quadrature, double mixed) {
  // 2 (a cos - b sin)^2 = (aa + bb) + (aa - bb) cos 2wt - 2 ab sin 2wt
  return {in_phase + quadrature, in_phase - quadrature, -2.0 * mixed};
}

Peak peak_of(const PulsatingVector& vector) {
  // |f|^2 is a trigonometric polynomial of degree 2 in 2 wt: at most four extremes in the cycle,
  // far apart on this scan; the best bracket is then narrowed.
  constexpr int steps = 360;
  constexpr double step = std::numbers::pi / steps;
  const auto size = [&](double wt) { return norm(vector.at(wt)); };
  int best = 0;
  for (int k = 1; k < steps; ++k) {
    if (size(k * step) > size(best * step) * (1.0 + 1e-12)) best = k;
  }
  double low = (best - 1) * step;
  double high = (best + 1) * step;
  constexpr double golden = 0.6180339887498949;
  for (int k = 0; k < 60; ++k) {
    const double a = high - golden * (high - low);
    const double b = low + golden * (high - low);
    (size(a) >= size(b) ? high : low) = size(a) >= size(b) ? b : a;
  }
  double wt = 0.5 * (low + high);
  // Without a pulsation the scan has no crest: the start of the cycle stands for all of it.
  const double swing = std::hypot(std::hypot(vector.x.cosine, vector.x.sine),
                                  std::hypot(vector.y.cosine, vector.y.sine));
  if (swing <= 1e-9 * std::hypot(vector.x.mean, vector.y.mean)) wt = 0.0;
  if (wt < 0.0) wt += std::numbers::pi;
  if (wt >= std::numbers::pi) wt -= std::numbers::pi;
  return {size(wt), wt, vector.at(wt)};
}

double peak_magnitude(mesh::Point in_phase, mesh::Point quadrature) {
  const double a = dot(in_phase, in_phase);
  const double b = dot(quadrature, quadrature);
  const double c = dot(in_phase, quadrature);
  return std::sqrt(pulsation_of(a, b, c).largest());
}

}  // namespace barwall::solver
