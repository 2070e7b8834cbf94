#pragma once

#include <vector>

namespace barwall::mesh {

/// On [from, to] the spacing is to be no more than `spacing` [m].
struct SpacingSource {
  double from = 0.0;
  double to = 0.0;
  double spacing = 0.0;
};

/// Bounds on the spacing's slope |dh/dx|: that of the first zone that holds x, beyond all zones
/// `far`. The first zone's and the last zone's stretches bound what the spacing is defined from.
struct SlopeRule {
  struct Zone {
    double from = 0.0;
    double to = 0.0;
    double slope = 0.0;
  };
  std::vector<Zone> zones;  ///< inner ones first; each lies within the next
  double far = 0.0;
};

/// The wanted spacing along one axis as a function h(x), piecewise linear; neighbouring
/// intervals differ by a factor below exp(slope).
class SpacingFunction {
public:
  /// The largest function that keeps every source and whose slope is bounded by the rule.
  SpacingFunction(std::vector<SpacingSource> sources, const SlopeRule& rule);

  /// The smaller of two functions at each x.
  friend SpacingFunction smaller_of(const SpacingFunction& first, const SpacingFunction& second);

  /// Wanted spacing at x [m].
  double operator()(double x) const;

  /// Integral of dx / h from a to b: the number of intervals wanted there.
  double intervals(double a, double b) const;

  /// The x > a with intervals(a, x) = count.
  double advance(double a, double count) const;

private:
  struct Knot {
    double x;
    double h;                 ///< spacing at x
    double cumulative = 0.0;  ///< intervals from the first knot to this one
  };
  SpacingFunction(std::vector<Knot> knots, double end_slope);
  double within(std::size_t k, double x) const;
  std::size_t gap_of(double x) const;

  std::vector<Knot> knots_;
  double end_slope_;  ///< beyond the first and the last knot
};

SpacingFunction smaller_of(const SpacingFunction& first, const SpacingFunction& second);

/// A place where a grid line is wanted; of two that lie much closer than the local spacing the
/// one of larger weight stays.
struct WantedLine {
  double x = 0.0;
  double weight = 0.0;
};

/// Wanted lines thinned: none closer to one of larger weight than `fraction` of the spacing
/// there. Ascending.
std::vector<double> thinned_lines(std::vector<WantedLine> wanted, const SpacingFunction& spacing,
                                  double fraction);

/// Grid lines from `fixed.front()` to `fixed.back()` through every fixed line, spaced as the
/// function asks at `cells_across` = 4 and finer or coarser in proportion otherwise. Doubling
/// `cells_across` halves every interval: the lines of the coarser grid are lines of the finer.
std::vector<double> graded_lines(const std::vector<double>& fixed, const SpacingFunction& spacing,
                                 int cells_across);

/// The interval of ascending lines that holds x, by its lower line; the first or the last one
/// where x lies beyond them all.
int interval_of(const std::vector<double>& lines, double x);

}  // namespace barwall::mesh
