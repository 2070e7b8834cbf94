#pragma once

#include <optional>
#include <string>
#include <vector>

#include "io/canvas.hpp"

namespace barwall::io {

/// A place on a line to be marked, and what is said of it below the line's name.
struct LineMark {
  double seconds = 0.0;
  double value = 0.0;
  std::string remark = {};
};

/// One line of a panel.
struct PanelLine {
  std::string name;  ///< written at the line's end
  int pen = 0;       ///< 0, 1 or 2: its colour and dashes
  std::vector<double> values;
  std::optional<LineMark> mark = {};
};

/// Quantities over time.
struct LinePanel {
  std::string quantity;         ///< what is shown, such as "Current"
  std::string unit;             ///< SI, without prefix
  std::vector<double> seconds;  ///< ascending, two or more
  std::vector<PanelLine> lines;
};

/// Width that the names at the lines' ends take beside a panel's box [pixels].
double width_of_names(const Canvas& canvas, const LinePanel& panel);

/// Draws a panel: its axes in fitting prefixes round the box, the quantity's in the left margin,
/// the lines, and their names on the right.
/// \param time_below the times stand below the box; else another panel's are to be read
void draw_panel(Canvas& canvas, const LinePanel& panel, const PageBox& box, bool time_below);

}  // namespace barwall::io
