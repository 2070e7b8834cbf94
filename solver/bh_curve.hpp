#pragma once

#include <algorithm>
#include <cstddef>
#include <cstdint>
#include <stdexcept>
#include <string>
#include <vector>

namespace barwall::solver {

/// One row of a B-H table.
struct BhPoint {
  double field = 0.0;         ///< H [A/m]
  double flux_density = 0.0;  ///< B [T]

  friend bool operator==(const BhPoint&, const BhPoint&) = default;
};

/// The state of saturable steel at one flux density B.
struct BhState {
  double field = 0.0;   ///< H [A/m]
  double slope = 0.0;   ///< dH/dB [m/H]
  double energy = 0.0;  ///< w, the integral of H dB from 0 to B [J/m3]
};

/// A row that makes a B-H table unfit; the message names the row, its values and what is allowed.
class BhTableError : public std::invalid_argument {
public:
  enum class Column { field, flux_density };

  BhTableError(const std::string& what, std::size_t row_at_fault, Column column_at_fault)
      : std::invalid_argument(what), row(row_at_fault), column(column_at_fault) {}

  std::size_t row;  ///< from 0; the number of rows when there are too few
  Column column;
};

/// The magnetising curve of saturable steel without remanence: H as a function of B >= 0.
///
/// Between the rows of its table H is a cubic of B with a slope given at each row, beyond the last
/// one H rises with the reluctivity of vacuum. Held everywhere, for the solver's sake:
/// - H is continuous and dH/dB > 0, so that the energy density is strictly convex and a minimum of
///   the whole energy is the only one;
/// - dH/dB is continuous but for the end of the table, where it jumps to vacuum's: Newton's method
///   converges with second order except across that point, where it is semismooth;
/// - H / B is smooth in B^2 at B = 0 (H is continued as an odd function).
///
/// Rows that keep dB/dH >= mu_0 do not keep every point between them from rising more slowly: where
/// the first interval is steeper in H than the next, or one than both its neighbours, dH/dB may
/// reach 1.5 / mu_0, not more. That is harmless: the energy needs dH/dB > 0 only.
///
/// A curve is a plain value: it can be copied, and threads may share it.
class BhCurve {
public:
  /// Everything at a flux density b >= 0 [T], in one look-up.
  BhState at(double b) const {
    const Piece& p = piece(b);
    const double t = b - p.b;
    return {p.h + t * (p.c1 + t * (p.c2 + t * p.c3)),  //
            p.c1 + t * (2.0 * p.c2 + t * 3.0 * p.c3),
            p.w + t * (p.h + t * (p.c1 / 2.0 + t * (p.c2 / 3.0 + t * p.c3 / 4.0)))};
  }

  /// H [A/m] at b >= 0 [T].
  double field(double b) const { return at(b).field; }

  /// dH/dB [m/H] at b >= 0 [T]; at the end of the table already vacuum's.
  double slope(double b) const { return at(b).slope; }

  /// Energy density w, the integral of H dB from 0 to b [J/m3]; exact for the curve.
  double energy(double b) const { return at(b).energy; }

  /// Coenergy density, the integral of B dH from 0 to H(b): H b - w [J/m3].
  double coenergy(double b) const {
    const BhState state = at(b);
    return state.field * b - state.energy;
  }

  /// nu = H / B [m/H]; at b = 0 its limit dH/dB.
  double reluctivity(double b) const {
    if (b < pieces_[1].b) return pieces_[0].c1 + b * b * pieces_[0].c3;
    return at(b).field / b;
  }

  /// d nu / d(B^2) [m/(H T^2)], finite also at b = 0.
  double reluctivity_slope(double b) const {
    if (b < pieces_[1].b) return pieces_[0].c3;
    const BhState state = at(b);
    return (state.slope - state.field / b) / (2.0 * b * b);
  }

  /// dB/dH [H/m] at b >= 0 [T]; at b = 0 the initial permeability.
  double differential_permeability(double b) const { return 1.0 / at(b).slope; }

  /// B of the last row [T].
  double table_end() const { return points_.back().flux_density; }

  const std::vector<BhPoint>& points() const { return points_; }

private:
  friend BhCurve make_bh_curve(std::vector<BhPoint> points);

  /// H = h + c1 t + c2 t^2 + c3 t^3 with t = B - b; w is the energy at b.
  struct Piece {
    double b, h, c1, c2, c3, w;
  };

  BhCurve() = default;

  std::size_t bucket(double b) const {
    const double x = b * buckets_per_tesla_;
    const auto last = static_cast<double>(bucket_begin_.size() - 2);
    return x >= last ? bucket_begin_.size() - 2 : x > 0.0 ? static_cast<std::size_t>(x) : 0;
  }

  /// The piece that begins at b or last before it. `bucket` never decreases with b, so that only
  /// the pieces beginning in the same bucket have to be looked at.
  const Piece& piece(double b) const {
    const std::size_t k = bucket(b);
    const auto from = pieces_.begin() + bucket_begin_[k];
    const auto to = pieces_.begin() + bucket_begin_[k + 1];
    return *(std::upper_bound(from, to, b, [](double x, const Piece& p) { return x < p.b; }) - 1);
  }

  std::vector<BhPoint> points_;
  std::vector<Piece> pieces_;  ///< one per interval of the table, and one beyond it
  /// Uniform buckets of B: the first piece that begins in each, or later; never piece 0, so that a
  /// piece stands before every one of them.
  std::vector<std::int32_t> bucket_begin_;
  double buckets_per_tesla_ = 0.0;
};

/// Fewest rows of a table.
inline constexpr std::size_t fewest_bh_points = 4;
/// Smallest step of B from row to row [T]; below, rounding would make up the slope.
inline constexpr double smallest_bh_step = 1e-9;
/// Largest B of a row [T].
inline constexpr double largest_bh_flux_density = 1000.0;
/// Steepest rise between two rows: dB/dH in vacuum's.
inline constexpr double steepest_bh_rise = 1e9;

/// The curve through rows (H, B): at least 4, the first 0, 0, rising strictly in both, nowhere more
/// slowly than vacuum (to 1e-9, what mu_0's own digits differ by).
///
/// Slopes at inner rows are the weighted harmonic means of the neighbouring secants of F. N.
/// Fritsch and J. Butland, SIAM J. Sci. Stat. Comput. 5, 1984, with K. W. Brodlie's weights (cited
/// from memory): below three times the smaller secant, so that the cubic is monotone by F. N.
/// Fritsch and R. E. Carlson, SIAM J. Numer. Anal. 17, 1980, and never level. The slope at B = 0
/// makes the second derivative vanish there, as an odd function's does; for that the slope at the
/// second row is at most twice the first secant. The slope at the last row is that of the parabola
/// through three rows, at most vacuum's. Both end slopes are at least half the neighbouring secant.
/// \throws BhTableError
BhCurve make_bh_curve(std::vector<BhPoint> points);

}  // namespace barwall::solver
