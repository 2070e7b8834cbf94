#pragma once

#include <string>

#include "solver/figures.hpp"

namespace barwall::io {

/// A value to four significant digits with the prefix that fits it: "187.3 µT", "12.34 mΩ/m",
/// "0 N/m". What is not given is "-".
std::string quantity_text(double value, const std::string& unit);

/// The same of a figure, with its uncertainty where it is known: "187.3 ± 0.4 µT".
std::string quantity_text(const solver::Figure& figure);

/// Direction of a vector in words and degrees, counter-clockwise from the right: "left (180°)".
std::string direction_text(double degrees);

}  // namespace barwall::io
