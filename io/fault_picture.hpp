#pragma once

#include <filesystem>

#include "io/fault_chart.hpp"
#include "io/picture.hpp"

namespace barwall::io {

/// Height that draw_fault_forces takes [pixels].
inline constexpr double fault_forces_height = 444.0;

/// The forces of a fault over time across a page, headed by what the fault is, from `top` on.
void draw_fault_forces(Canvas& canvas, const FaultChart& chart, double top);

/// The forces of a fault over time, and below them the bars' currents. Only where
/// results.fault_over_time().
/// \throws std::runtime_error when drawing fails
Pictures draw_fault_pictures(const Results& results);

/// Writes draw_fault_pictures to fault.png and fault.svg; nothing where no course is known.
/// \throws std::runtime_error also when a file cannot be written
void write_fault_pictures(const Results& results, const std::filesystem::path& folder);

}  // namespace barwall::io
