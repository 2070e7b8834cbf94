#pragma once

#include <array>
#include <optional>
#include <vector>

#include "io/canvas.hpp"

namespace barwall::io {

/// True when the two boxes come closer than `gap`.
bool close(const PageBox& a, const PageBox& b, double gap);

/// Finds free places for labels on a page, each in turn: never on another label, a mark or an
/// arrow, and rather not on an outline.
class LabelPlacement {
public:
  /// \param bounds labels stay within it
  explicit LabelPlacement(const PageBox& bounds);

  /// Nothing may be put here.
  void block(const PageBox& box) { blocked_.push_back(box); }
  /// No label may lie on this line; leaders better do not cross it.
  void block_line(PagePoint from, PagePoint to, double half_width);
  /// An outline that labels better do not lie on.
  void avoid_line(const std::vector<PagePoint>& points);

  struct Label {
    PageBox box;
    /// From the label to its part, where it does not lie beside or in it.
    std::optional<std::array<PagePoint, 2>> leader;
  };

  /// A place for a label of width x height: within `about` if `within` and it fits, else beside
  /// it, else further off. Blocks the place found.
  /// \param edge points of the part's outline, from which a leader may start
  std::optional<Label> place(double width, double height, const PageBox& about, bool within,
                             const std::vector<PagePoint>& edge);

private:
  bool free(const PageBox& box) const;
  double disturbance(const PageBox& box) const;
  /// Another outline comes nearer to the box than `own` pixels.
  bool nearer_to_another(const PageBox& box, double own, const std::vector<PagePoint>& edge) const;

  /// Tells a function of every point to avoid in the squares that a box touches.
  template <class Function>
  void each_avoided(const PageBox& box, const Function& function) const;

  PageBox bounds_;
  std::vector<PageBox> blocked_;
  std::vector<PageBox> blocked_lines_;
  int columns_;
  int rows_;
  std::vector<std::vector<PagePoint>> avoided_;  ///< by squares of the page, row by row
};

}  // namespace barwall::io
