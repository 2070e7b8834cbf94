#include "io/label_placement.hpp"

#include <algorithm>
#include <array>
#include <cmath>

namespace barwall::io {
namespace {

constexpr double label_gap = 4.0;     ///< between labels, and from label to part
constexpr double beside = 6.0;        ///< a label this near to its part is clearly its own
constexpr double leader_from = 14.0;  ///< a label further than this from its part gets a leader
constexpr double sample_step = 6.0;
constexpr double square = 32.0;

PageBox box_at(double left, double top, double width, double height) {
  return {{left, top}, {left + width, top + height}};
}

PagePoint nearest_in(const PageBox& box, PagePoint p) {
  return {std::clamp(p.x, box.low.x, box.high.x), std::clamp(p.y, box.low.y, box.high.y)};
}

/// A candidate and what speaks against it.
struct Candidate {
  PageBox box;
  double cost = 0.0;
};

std::vector<Candidate> candidates(double width, double height, const PageBox& about, bool within) {
  std::vector<Candidate> result;
  const PagePoint middle = about.centre();
  const auto add = [&](double left, double top, double cost) {
    result.push_back({box_at(left, top, width, height), cost});
  };
  if (within && width + 2.0 * label_gap <= about.width() &&
      height + 2.0 * label_gap <= about.height()) {
    const double left = middle.x - 0.5 * width;
    const double room = about.height() - height - 2.0 * label_gap;
    // In the middle, then towards the upper and the lower end.
    for (double share : {0.5, 0.2, 0.8, 0.0, 1.0}) {
      add(left, about.low.y + label_gap + share * room, std::abs(share - 0.5));
    }
  }
  for (int ring = 0; ring < 9; ++ring) {
    const double off = label_gap + (ring == 0 ? 0.0 : 16.0 * ring + 3.0 * ring * ring);
    const double cost = 2.0 + 3.0 * ring;
    const double above = about.low.y - off - height;
    const double below = about.high.y + off;
    const double left = about.low.x - off - width;
    const double right = about.high.x + off;
    add(middle.x - 0.5 * width, above, cost);
    add(middle.x - 0.5 * width, below, cost + 0.3);
    add(right, middle.y - 0.5 * height, cost + 0.2);
    add(left, middle.y - 0.5 * height, cost + 0.4);
    add(about.low.x, above, cost + 0.5);
    add(about.high.x - width, above, cost + 0.6);
    add(about.low.x, below, cost + 0.7);
    add(about.high.x - width, below, cost + 0.8);
    add(right, above, cost + 1.0);
    add(left, above, cost + 1.1);
    add(right, below, cost + 1.2);
    add(left, below, cost + 1.3);
  }
  return result;
}

bool segment_meets(const PageBox& box, PagePoint a, PagePoint b) {
  // Clip the segment to the box (Liang-Barsky).
  double t0 = 0.0;
  double t1 = 1.0;
  const PagePoint d = b - a;
  const auto clip = [&](double p, double q) {
    if (p == 0.0) return q >= 0.0;
    const double t = q / p;
    if (p < 0.0) t0 = std::max(t0, t);
    if (p > 0.0) t1 = std::min(t1, t);
    return t0 <= t1;
  };
  return clip(-d.x, a.x - box.low.x) && clip(d.x, box.high.x - a.x) &&
         clip(-d.y, a.y - box.low.y) && clip(d.y, box.high.y - a.y);
}

}  // namespace

bool close(const PageBox& a, const PageBox& b, double gap) {
  return a.low.x < b.high.x + gap && b.low.x < a.high.x + gap && a.low.y < b.high.y + gap &&
         b.low.y < a.high.y + gap;
}

LabelPlacement::LabelPlacement(const PageBox& bounds)
    : bounds_(bounds),
      columns_(1 + static_cast<int>(bounds.width() / square)),
      rows_(1 + static_cast<int>(bounds.height() / square)),
      avoided_(static_cast<std::size_t>(columns_ * rows_)) {}

template <class Function>
void LabelPlacement::each_avoided(const PageBox& box, const Function& function) const {
  const auto index = [](double offset, int count) {
    return std::clamp(static_cast<int>(std::floor(offset / square)), 0, count - 1);
  };
  const PagePoint low = box.low - bounds_.low;
  const PagePoint high = box.high - bounds_.low;
  for (int row = index(low.y, rows_); row <= index(high.y, rows_); ++row) {
    for (int column = index(low.x, columns_); column <= index(high.x, columns_); ++column) {
      for (PagePoint p : avoided_[static_cast<std::size_t>(row * columns_ + column)]) function(p);
    }
  }
}

void LabelPlacement::block_line(PagePoint from, PagePoint to, double half_width) {
  const int pieces = std::max(1, static_cast<int>(distance(from, to) / sample_step));
  const PagePoint half{half_width, half_width};
  for (int k = 0; k <= pieces; ++k) {
    const PagePoint p = between(from, to, static_cast<double>(k) / pieces);
    blocked_lines_.push_back({p - half, p + half});
  }
}

void LabelPlacement::avoid_line(const std::vector<PagePoint>& points) {
  for (std::size_t k = 1; k < points.size(); ++k) {
    const double length = distance(points[k - 1], points[k]);
    const int pieces = std::clamp(static_cast<int>(length / sample_step), 1, 1000);
    for (int m = 0; m < pieces; ++m) {
      const PagePoint p = between(points[k - 1], points[k], static_cast<double>(m) / pieces);
      if (!bounds_.contains(p)) continue;
      const auto column = static_cast<std::size_t>((p.x - bounds_.low.x) / square);
      const auto row = static_cast<std::size_t>((p.y - bounds_.low.y) / square);
      avoided_[row * static_cast<std::size_t>(columns_) + column].push_back(p);
    }
  }
}

bool LabelPlacement::free(const PageBox& box) const {
  if (box.low.x < bounds_.low.x || box.low.y < bounds_.low.y || box.high.x > bounds_.high.x ||
      box.high.y > bounds_.high.y) {
    return false;
  }
  const auto on_box = [&](const PageBox& other) { return close(box, other, label_gap); };
  return std::none_of(blocked_.begin(), blocked_.end(), on_box) &&
         std::none_of(blocked_lines_.begin(), blocked_lines_.end(), on_box);
}

bool LabelPlacement::nearer_to_another(const PageBox& box, double own,
                                       const std::vector<PagePoint>& edge) const {
  // Points of the part's own outline are among those to avoid.
  constexpr double same = 0.51 * sample_step;
  const PagePoint reach{own, own};
  bool found = false;
  each_avoided({box.low - reach, box.high + reach}, [&](PagePoint p) {
    if (found || distance(nearest_in(box, p), p) >= own - 1.0) return;
    found =
        std::none_of(edge.begin(), edge.end(), [&](PagePoint q) { return distance(p, q) <= same; });
  });
  return found;
}

double LabelPlacement::disturbance(const PageBox& box) const {
  const PagePoint slack{2.0, 2.0};
  const PageBox wider{box.low - slack, box.high + slack};
  int count = 0;
  each_avoided(wider, [&](PagePoint p) { count += wider.contains(p) ? 1 : 0; });
  return std::min(8.0, 0.8 * count);
}

std::optional<LabelPlacement::Label> LabelPlacement::place(double width, double height,
                                                           const PageBox& about, bool within,
                                                           const std::vector<PagePoint>& edge) {
  std::optional<Label> best;
  double best_cost = HUGE_VAL;
  for (const Candidate& candidate : candidates(width, height, about, within)) {
    if (candidate.cost >= best_cost || !free(candidate.box)) continue;
    double cost = candidate.cost + disturbance(candidate.box);
    if (cost >= best_cost) continue;
    Label label{candidate.box, {}};
    if (!edge.empty()) {
      const auto off = [&](PagePoint p) { return distance(nearest_in(candidate.box, p), p); };
      const PagePoint nearest = *std::min_element(
          edge.begin(), edge.end(), [&](PagePoint a, PagePoint b) { return off(a) < off(b); });
      const PagePoint start = nearest_in(candidate.box, nearest);
      const bool inside = about.contains(candidate.box.low) && about.contains(candidate.box.high);
      const bool within_part = within && inside;
      const double own = off(nearest);
      const bool led = !within_part && own > beside &&
                       (own > leader_from || nearer_to_another(candidate.box, own, edge));
      if (led) {
        const auto crossed = [&](const PageBox& box) { return segment_meets(box, start, nearest); };
        if (std::any_of(blocked_.begin(), blocked_.end(), crossed)) continue;
        if (std::any_of(blocked_lines_.begin(), blocked_lines_.end(), crossed)) cost += 1.5;
        cost += 1.5 + 0.01 * own;
        label.leader = {start, nearest};
      }
    }
    if (cost < best_cost) {
      best_cost = cost;
      best = label;
    }
  }
  if (best) {
    block(best->box);
    if (best->leader) block_line((*best->leader)[0], (*best->leader)[1], 1.0);
  }
  return best;
}

}  // namespace barwall::io
