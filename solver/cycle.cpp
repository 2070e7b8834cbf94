#include "solver/cycle.hpp"

#include <algorithm>
#include <cassert>
#include <cmath>
#include <numbers>

#include "solver/largest_value.hpp"

namespace barwall::solver {
namespace {

/// Steps of a scan over the cycle for every even harmonic, enough to tell its crests apart.
constexpr int scan_per_harmonic = 12;

}  // namespace

double Pulsation::at(double wt) const {
  double sum = mean + cosine * std::cos(2.0 * wt) + sine * std::sin(2.0 * wt);
  for (std::size_t k = 0; k < higher.size(); ++k) {
    const double angle = 2.0 * static_cast<double>(k + 2) * wt;
    sum += higher[k][0] * std::cos(angle) + higher[k][1] * std::sin(angle);
  }
  return sum;
}

double Pulsation::swing() const {
  double sum = std::hypot(cosine, sine);
  for (const auto& [c, s] : higher) sum += std::hypot(c, s);
  return sum;
}

Pulsation::Crest Pulsation::largest_at() const {
  if (higher.empty()) {
    const double wt = 0.5 * std::atan2(sine, cosine);
    return {wt < 0.0 ? wt + std::numbers::pi : wt, mean + std::hypot(cosine, sine)};
  }
  const LargestValue found =
      largest_value([this](double wt) { return at(wt); }, 0.0, std::numbers::pi,
                    scan_per_harmonic * static_cast<int>(higher.size() + 1));
  return {found.at < std::numbers::pi ? found.at : 0.0, found.value};
}

double Pulsation::smallest() const {
  return -sum_of({}, *this, -1.0).largest();
}

Pulsation sum_of(const Pulsation& a, const Pulsation& b, double factor) {
  Pulsation sum{a.mean + factor * b.mean, a.cosine + factor * b.cosine, a.sine + factor * b.sine,
                a.higher};
  sum.higher.resize(std::max(a.higher.size(), b.higher.size()));
  for (std::size_t k = 0; k < b.higher.size(); ++k) {
    for (std::size_t c = 0; c < 2; ++c) sum.higher[k][c] += factor * b.higher[k][c];
  }
  return sum;
}

PulsatingVector sum_of(const PulsatingVector& a, const PulsatingVector& b, double factor) {
  return {sum_of(a.x, b.x, factor), sum_of(a.y, b.y, factor)};
}

Pulsation pulsation_through(std::span<const double> values) {
  assert(!values.empty() && values.size() % 2 == 0);
  const auto n = static_cast<double>(values.size());
  const auto harmonic = [&](std::size_t h) {
    std::array<double, 2> sum{};
    for (std::size_t k = 0; k < values.size(); ++k) {
      const double angle =
          2.0 * std::numbers::pi * static_cast<double>((h * k) % values.size()) / n;
      sum[0] += values[k] * std::cos(angle);
      sum[1] += values[k] * std::sin(angle);
    }
    // The last harmonic that the values can tell has no sine, and half of it belongs to its mirror.
    const bool last = 2 * h == values.size();
    return std::array{(last ? 1.0 : 2.0) / n * sum[0], last ? 0.0 : 2.0 / n * sum[1]};
  };
  Pulsation result;
  for (double value : values) result.mean += value / n;
  const auto [cosine, sine] = harmonic(1);
  result.cosine = cosine;
  result.sine = sine;
  for (std::size_t h = 2; 2 * h <= values.size(); ++h) result.higher.push_back(harmonic(h));
  return result;
}

std::vector<mesh::Point> means_of(std::span<const PulsatingVector> vectors) {
  std::vector<mesh::Point> means;
  for (const PulsatingVector& vector : vectors) means.push_back(vector.mean());
  return means;
}

PulsatingVector over_half_cycle(std::span<const PulsatingVector> instants) {
  const auto [x, y] = mesh::components(means_of(instants));
  return {pulsation_through(x), pulsation_through(y)};
}

Pulsation pulsation_of(double in_phase, double quadrature, double mixed) {
  // 2 (a cos - b sin)^2 = (aa + bb) + (aa - bb) cos 2wt - 2 ab sin 2wt
  return {in_phase + quadrature, in_phase - quadrature, -2.0 * mixed};
}

Peak peak_of(const PulsatingVector& vector) {
  // Without a pulsation there is no crest: the start of the cycle stands for all of it.
  const double swing = std::hypot(vector.x.swing(), vector.y.swing());
  if (swing <= 1e-9 * std::hypot(vector.x.mean, vector.y.mean)) {
    return {norm(vector.at(0.0)), 0.0, vector.at(0.0)};
  }
  // |f|^2 has twice the harmonics of f: its extremes lie far apart on this scan.
  const auto harmonics =
      static_cast<int>(std::max(vector.x.higher.size(), vector.y.higher.size())) + 1;
  const LargestValue found =
      largest_value([&](double wt) { return norm(vector.at(wt)); }, 0.0, std::numbers::pi,
                    std::max(180, scan_per_harmonic * harmonics));
  const double wt = found.at < std::numbers::pi ? found.at : 0.0;
  return {found.value, wt, vector.at(wt)};
}

double peak_magnitude(mesh::Point in_phase, mesh::Point quadrature) {
  const double a = dot(in_phase, in_phase);
  const double b = dot(quadrature, quadrature);
  const double c = dot(in_phase, quadrature);
  return std::sqrt(pulsation_of(a, b, c).largest());
}

std::complex<double> fundamental_through(std::span<const double> values) {
  const auto n = static_cast<double>(values.size());
  std::complex<double> sum = 0.0;
  for (std::size_t k = 0; k < values.size(); ++k) {
    const double wt = std::numbers::pi * static_cast<double>(k) / n;
    sum += values[k] * std::complex(std::cos(wt), -std::sin(wt));
  }
  return std::numbers::sqrt2 / n * sum;
}

}  // namespace barwall::solver
