#include "mesh/spacing.hpp"

#include <algorithm>
#include <cmath>
#include <set>

namespace barwall::mesh {
namespace {

/// Integral of dx / (h + slope x) over [0, length].
double count_on_ramp(double h, double slope, double length) {
  if (length <= 0.0) return 0.0;
  const double r = slope * length / h;
  if (std::abs(r) < 1e-9) return length / h;
  return std::log1p(r) / slope;
}

}  // namespace

SpacingFunction::SpacingFunction(std::vector<SpacingSource> sources, double growth,
                                 double far_growth, double fine_from, double fine_to) {
  std::vector<double> places{fine_from, fine_to};
  for (const SpacingSource& s : sources) {
    places.push_back(s.from);
    places.push_back(s.to);
  }
  std::sort(places.begin(), places.end());
  places.erase(std::unique(places.begin(), places.end()), places.end());
  for (double x : places) {
    const bool fine = x >= fine_from && x < fine_to;
    knots_.push_back({x, HUGE_VAL, HUGE_VAL, fine ? growth : far_growth, 0.0});
  }
  // Caps between knots, and bounds at the knots, from the sources that cover them.
  std::sort(sources.begin(), sources.end(),
            [](const auto& a, const auto& b) { return a.from < b.from; });
  std::multiset<double> active;
  std::multiset<std::pair<double, double>> ends;  // (to, spacing) of the active ones
  std::size_t next = 0;
  for (Knot& knot : knots_) {
    while (next < sources.size() && sources[next].from <= knot.x) {
      active.insert(sources[next].spacing);
      ends.insert({sources[next].to, sources[next].spacing});
      ++next;
    }
    if (!active.empty()) knot.h = *active.begin();
    while (!ends.empty() && ends.begin()->first <= knot.x) {
      active.erase(active.find(ends.begin()->second));
      ends.erase(ends.begin());
    }
    if (!active.empty()) knot.cap = *active.begin();
  }
  for (std::size_t k = 1; k < knots_.size(); ++k) {
    const double step = knots_[k].x - knots_[k - 1].x;
    knots_[k].h = std::min(knots_[k].h, knots_[k - 1].h + knots_[k - 1].slope * step);
  }
  for (std::size_t k = knots_.size() - 1; k-- > 0;) {
    const double step = knots_[k + 1].x - knots_[k].x;
    knots_[k].h = std::min(knots_[k].h, knots_[k + 1].h + knots_[k].slope * step);
  }
  for (std::size_t k = 1; k < knots_.size(); ++k) {
    knots_[k].cumulative = knots_[k - 1].cumulative + within(k - 1, knots_[k].x);
  }
}

std::size_t SpacingFunction::gap_of(double x) const {
  const auto above = std::upper_bound(knots_.begin(), knots_.end(), x,
                                      [](double v, const Knot& k) { return v < k.x; });
  return above == knots_.begin() ? 0 : static_cast<std::size_t>(above - knots_.begin()) - 1;
}

double SpacingFunction::in_gap(std::size_t k, double x) const {
  const Knot& a = knots_[k];
  if (x < a.x) return a.h + a.slope * (a.x - x);
  if (k + 1 == knots_.size()) return a.h + a.slope * (x - a.x);
  const Knot& b = knots_[k + 1];
  return std::min({a.cap, a.h + a.slope * (x - a.x), b.h + a.slope * (b.x - x)});
}

double SpacingFunction::operator()(double x) const { return in_gap(gap_of(x), x); }

/// Intervals from knot k to x, which lies before knot k + 1 (or before the first knot, when the
/// result is negative).
double SpacingFunction::within(std::size_t k, double x) const {
  const Knot& a = knots_[k];
  if (x < a.x) return -count_on_ramp(a.h, a.slope, a.x - x);
  if (k + 1 == knots_.size()) return count_on_ramp(a.h, a.slope, x - a.x);
  // Three stretches: up from a, along the cap, down to b.
  const Knot& b = knots_[k + 1];
  const double width = b.x - a.x;
  const double crest = std::min(a.cap, 0.5 * (a.h + b.h + a.slope * width));
  const double up = std::clamp((crest - a.h) / a.slope, 0.0, width);
  const double down = std::clamp((crest - b.h) / a.slope, 0.0, width - up);
  const double at = x - a.x;
  double sum = count_on_ramp(a.h, a.slope, std::min(at, up));
  if (at > up) sum += (std::min(at, width - down) - up) / crest;
  if (at > width - down) {
    const double gone = at - (width - down);
    sum += count_on_ramp(crest, -a.slope, gone);
  }
  return sum;
}

double SpacingFunction::intervals(double a, double b) const {
  const std::size_t k = gap_of(a);
  const std::size_t m = gap_of(b);
  return knots_[m].cumulative + within(m, b) - knots_[k].cumulative - within(k, a);
}

double SpacingFunction::advance(double a, double count) const {
  double low = a;
  double high = a + (*this)(a);
  while (intervals(a, high) < count) {
    low = high;
    high = a + 2.0 * (high - a);
  }
  for (int i = 0; i < 200 && high - low > 1e-15 * (std::abs(low) + std::abs(high)); ++i) {
    const double middle = 0.5 * (low + high);
    (intervals(a, middle) < count ? low : high) = middle;
  }
  return 0.5 * (low + high);
}

std::vector<double> thinned_lines(std::vector<WantedLine> wanted, const SpacingFunction& spacing,
                                  double fraction) {
  std::stable_sort(wanted.begin(), wanted.end(),
                   [](const auto& a, const auto& b) { return a.weight > b.weight; });
  std::set<double> kept;
  for (const WantedLine& line : wanted) {
    const double clear = fraction * spacing(line.x);
    const auto above = kept.lower_bound(line.x - clear);
    if (above != kept.end() && *above <= line.x + clear) continue;
    kept.insert(line.x);
  }
  return {kept.begin(), kept.end()};
}

std::vector<double> graded_lines(const std::vector<double>& fixed, const SpacingFunction& spacing,
                                 int cells_across) {
  // cells_across = base * 2^k: intervals are counted for the base and multiplied by 2^k.
  int base = cells_across;
  int multiple = 1;
  while (base % 2 == 0 && base > 2) {
    base /= 2;
    multiple *= 2;
  }
  std::vector<double> lines{fixed.front()};
  for (std::size_t k = 1; k < fixed.size(); ++k) {
    const double wanted = spacing.intervals(fixed[k - 1], fixed[k]);
    const double counted = std::max(1.0, std::ceil(wanted * base / 4.0 - 0.02));
    const int number = static_cast<int>(counted) * multiple;
    for (int i = 1; i < number; ++i) {
      lines.push_back(spacing.advance(fixed[k - 1], wanted * i / number));
    }
    lines.push_back(fixed[k]);
  }
  return lines;
}

}  // namespace barwall::mesh
