#pragma once

#include <vector>

namespace barwall::mesh {

/// On [from, to] the spacing is to be no more than `spacing` [m].
struct SpacingSource {
  double from = 0.0;
  double to = 0.0;
  double spacing = 0.0;
};

/// The wanted spacing along one axis: the largest function h(x) that keeps every source and
/// whose slope is at most `growth`, so that neighbouring intervals differ by a factor below
/// exp(growth); beyond `fine_from` .. `fine_to` the slope is `far_growth`.
class SpacingFunction {
 public:
  SpacingFunction(std::vector<SpacingSource> sources, double growth, double far_growth,
                  double fine_from, double fine_to);

  /// Wanted spacing at x [m].
  double operator()(double x) const;

  /// Integral of dx / h from a to b: the number of intervals wanted there.
  double intervals(double a, double b) const;

  /// The x > a with intervals(a, x) = count.
  double advance(double a, double count) const;

 private:
  struct Knot {
    double x;
    double h;           ///< spacing at x
    double cap;         ///< upper bound between this knot and the next
    double slope;       ///< bound on |dh/dx| between this knot and the next
    double cumulative;  ///< intervals from the first knot to this one
  };
  double in_gap(std::size_t k, double x) const;
  double within(std::size_t k, double x) const;
  std::size_t gap_of(double x) const;

  std::vector<Knot> knots_;
};

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

}  // namespace barwall::mesh
