#include "verify/finite_run.hpp"

#include <stdexcept>

#include "verify/complex_field.hpp"
#include "verify/filled_bar.hpp"
#include "verify/finite_filament.hpp"

namespace barwall::verify {

using mesh::Point;

namespace {

/// Endless minus finite field of a filament at mid-span: (mu_0 I / 2 pi rho) times the deficit,
/// which is 2 (rho / L)^2 (1 - ...) near the wire, so the quotient has no pole.
Point missing_field(const Filament& filament, double run_length, Point at) {
  const Point r = at - filament.at;
  const double r2 = dot(r, r);
  if (r2 == 0.0) return {};
  return (mu_0_over_2pi * filament.current * mid_span_deficit(run_length, norm(r)) / r2) *
         quarter_turn(r);
}

}  // namespace

RunField field_of_run(std::span<const BarCurrent> bars, double run_length, Point at) {
  if (!(run_length > 0.0)) throw std::invalid_argument("a run needs a length above 0");
  RunField field;
  for (const BarCurrent& bar : bars) {
    const Point endless = field_of(bar.shape, bar.current, at);
    Point missing;
    for (const Filament& filament : filaments_of(bar.shape, bar.current, 6)) {
      missing += missing_field(filament, run_length, at);
    }
    field.endless += endless;
    field.mid_span += endless - missing;
  }
  return field;
}

}  // namespace barwall::verify
