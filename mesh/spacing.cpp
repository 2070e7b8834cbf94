#include "mesh/spacing.hpp"

#include <algorithm>
#include <cmath>
#include <set>

namespace barwall::mesh {
namespace {

/// Integral of dx over a stretch along which the spacing runs linearly from h to k.
double count_on_ramp(double h, double k, double length) {
  const double r = (k - h) / h;
  if (std::abs(r) < 1e-9) return length / h;
  return length / (k - h) * std::log1p(r);
}

/// What the sources say at a knot and up to the next.
struct Bound {
  double x;
  double at = HUGE_VAL;     ///< bound on the spacing at x
  double after = HUGE_VAL;  ///< bound between x and the next knot
  double slope = 0.0;
};

double slope_at(const SlopeRule& rule, double x) {
  for (const SlopeRule::Zone& zone : rule.zones) {
    if (x >= zone.from && x < zone.to) return zone.slope;
  }
  return rule.far;
}

std::vector<Bound> bounds_of(std::vector<SpacingSource> sources, const SlopeRule& rule) {
  std::vector<double> places;
  for (const SlopeRule::Zone& zone : rule.zones) {
    places.push_back(zone.from);
    places.push_back(zone.to);
  }
  for (const SpacingSource& s : sources) {
    places.push_back(s.from);
    places.push_back(s.to);
  }
  std::sort(places.begin(), places.end());
  places.erase(std::unique(places.begin(), places.end()), places.end());
  std::sort(sources.begin(), sources.end(),
            [](const auto& a, const auto& b) { return a.from < b.from; });
  std::multiset<double> active;
  std::multiset<std::pair<double, double>> ends;  // (to, spacing) of the active ones
  std::size_t next = 0;
  std::vector<Bound> result;
  for (double x : places) {
    Bound bound{x};
    bound.slope = slope_at(rule, x);
    for (; next < sources.size() && sources[next].from <= x; ++next) {
      active.insert(sources[next].spacing);
      ends.insert({sources[next].to, sources[next].spacing});
    }
    if (!active.empty()) bound.at = *active.begin();
    while (!ends.empty() && ends.begin()->first <= x) {
      active.erase(active.find(ends.begin()->second));
      ends.erase(ends.begin());
    }
    if (!active.empty()) bound.after = *active.begin();
    result.push_back(bound);
  }
  return result;
}

}  // namespace

SpacingFunction::SpacingFunction(std::vector<Knot> knots, double end_slope)
    : knots_(std::move(knots)), end_slope_(end_slope) {
  for (std::size_t k = 1; k < knots_.size(); ++k) {
    knots_[k].cumulative = knots_[k - 1].cumulative + count_on_ramp(knots_[k - 1].h, knots_[k].h,
                                                                    knots_[k].x - knots_[k - 1].x);
  }
}

SpacingFunction::SpacingFunction(std::vector<SpacingSource> sources, const SlopeRule& rule)
    : end_slope_(rule.far) {
  // Before any source speaks the spacing is unbounded: the whole stretch is one interval.
  const SlopeRule::Zone& outer = rule.zones.back();
  sources.push_back({outer.from, outer.to, outer.to - outer.from});
  auto bounds = bounds_of(std::move(sources), rule);
  for (std::size_t k = 1; k < bounds.size(); ++k) {
    const Bound& before = bounds[k - 1];
    bounds[k].at = std::min(bounds[k].at, before.at + before.slope * (bounds[k].x - before.x));
  }
  for (std::size_t k = bounds.size() - 1; k-- > 0;) {
    Bound& b = bounds[k];
    b.at = std::min(b.at, bounds[k + 1].at + b.slope * (bounds[k + 1].x - b.x));
  }
  // Between knots: up from the left one, along the cap, down to the right one.
  std::vector<Knot> knots;
  for (std::size_t k = 0; k < bounds.size(); ++k) {
    const Bound& a = bounds[k];
    knots.push_back({a.x, a.at});
    if (k + 1 == bounds.size()) break;
    const Bound& b = bounds[k + 1];
    const double width = b.x - a.x;
    const double crest = std::min(a.after, 0.5 * (a.at + b.at + a.slope * width));
    const double up = (crest - a.at) / a.slope;
    const double down = (crest - b.at) / a.slope;
    if (up > 1e-9 * width) knots.push_back({a.x + up, crest});
    if (down > 1e-9 * width && width - up - down > 1e-9 * width) {
      knots.push_back({b.x - down, crest});
    }
  }
  *this = SpacingFunction(std::move(knots), end_slope_);
}

SpacingFunction smaller_of(const SpacingFunction& first, const SpacingFunction& second) {
  std::vector<double> places;
  for (const auto* f : {&first, &second}) {
    for (const auto& knot : f->knots_) places.push_back(knot.x);
  }
  std::sort(places.begin(), places.end());
  places.erase(std::unique(places.begin(), places.end()), places.end());
  std::vector<SpacingFunction::Knot> knots;
  const auto put = [&](double x) { knots.push_back({x, std::min(first(x), second(x))}); };
  for (std::size_t k = 0; k < places.size(); ++k) {
    put(places[k]);
    if (k + 1 == places.size()) break;
    const double d0 = first(places[k]) - second(places[k]);
    const double d1 = first(places[k + 1]) - second(places[k + 1]);
    if (d0 * d1 < 0.0) put(places[k] + d0 / (d0 - d1) * (places[k + 1] - places[k]));
  }
  return SpacingFunction(std::move(knots), std::min(first.end_slope_, second.end_slope_));
}

std::size_t SpacingFunction::gap_of(double x) const {
  const auto above = std::upper_bound(knots_.begin(), knots_.end(), x,
                                      [](double v, const Knot& k) { return v < k.x; });
  return above == knots_.begin() ? 0 : static_cast<std::size_t>(above - knots_.begin()) - 1;
}

double SpacingFunction::operator()(double x) const {
  const std::size_t k = gap_of(x);
  const Knot& a = knots_[k];
  if (x < a.x || k + 1 == knots_.size()) return a.h + end_slope_ * std::abs(x - a.x);
  const Knot& b = knots_[k + 1];
  return a.h + (b.h - a.h) * (x - a.x) / (b.x - a.x);
}

/// Intervals from knot k to x, which lies before knot k + 1; negative before the first knot.
double SpacingFunction::within(std::size_t k, double x) const {
  const double step = x - knots_[k].x;
  if (step == 0.0) return 0.0;
  const double count = count_on_ramp(knots_[k].h, (*this)(x), std::abs(step));
  return step < 0.0 ? -count : count;
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
    // Few cells are counted up, so that no width gets fewer than asked; many to the nearest.
    const double exact = wanted * base / 4.0;
    const double counted = exact > 3.0 ? std::round(exact) : std::max(1.0, std::ceil(exact - 0.02));
    const int number = static_cast<int>(counted) * multiple;
    for (int i = 1; i < number; ++i) {
      lines.push_back(spacing.advance(fixed[k - 1], wanted * i / number));
    }
    lines.push_back(fixed[k]);
  }
  return lines;
}

int interval_of(const std::vector<double>& lines, double x) {
  const auto above = std::upper_bound(lines.begin(), lines.end(), x);
  return std::clamp(static_cast<int>(above - lines.begin()) - 1, 0,
                    static_cast<int>(lines.size()) - 2);
}

}  // namespace barwall::mesh
