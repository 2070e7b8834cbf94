#pragma once

#include <string>
#include <vector>

#include "solver/fault_series.hpp"
#include "solver/figures.hpp"
#include "verify/check.hpp"

namespace barwall::io {

/// A number to 10 significant digits, or to fewer, so that what is written is short; -0 becomes 0,
/// and what is not a number stays so.
double to_ten_digits(double value);
double to_digits(double value, int digits);

/// The shortest text that reads back as the number: "0.1", "2.5e-07"; empty for what is not a
/// number.
std::string number_text(double value);

/// The figures as they are written and shown: to 10 significant digits, and 0 where a value is
/// the rounding error of a quantity that vanishes by symmetry, which is less than 1e-11 of the
/// largest of its kind: among forces, all forces; among flux linkages, all linkages; among the
/// field's components, |B| at the same point. The instant and direction of a peak force that is 0
/// are not given.
solver::Figures tidy(solver::Figures figures);

/// The checks as they are written: the measured error to 4 significant digits, and 0 where it is
/// less than a millionth of its limit, which is the rounding error of an identity.
std::vector<verify::Check> tidy(std::vector<verify::Check> checks);

/// The course of a fault as it is written: to 10 significant digits, and 0 where a current or a
/// force is less than 1e-11 of the largest of its kind.
solver::FaultSeries tidy(solver::FaultSeries series);

}  // namespace barwall::io
