#include "solver/cycle_recovery.hpp"

#include <cassert>
#include <cmath>
#include <numbers>

#include "solver/field_peak.hpp"

namespace barwall::solver {

CycleRecovery::CycleRecovery(int instants) : instants_(instants) {}

void CycleRecovery::add(const RecoveredField& field) {
  const auto places = static_cast<std::size_t>(field.place_count());
  if (gathered_.empty()) {
    gathered_.push_back(field);
    gathered_[0].field_.assign(2, std::vector<RecoveredField::Local>(places));
    gathered_[0].strength_.assign(2, std::vector<mesh::Point>(places));
  }
  // What this instant adds to the fundamental's r.m.s. in phase and in quadrature.
  const double wt = std::numbers::pi * static_cast<double>(b_.size()) / instants_;
  const double share = std::numbers::sqrt2 / instants_;
  const double factor[2] = {share * std::cos(wt), -share * std::sin(wt)};
  b_.emplace_back(places);
  for (std::size_t place = 0; place < places; ++place) {
    const RecoveredField::Local& now = field.field_[0][place];
    const mesh::Point h = field.field_strength(static_cast<int>(place), 0);
    b_.back()[place] = now.b;
    for (std::size_t pattern = 0; pattern < 2; ++pattern) {
      RecoveredField::Local& sum = gathered_[0].field_[pattern][place];
      sum.b += factor[pattern] * now.b;
      sum.b_dx += factor[pattern] * now.b_dx;
      sum.b_dy += factor[pattern] * now.b_dy;
      gathered_[0].strength_[pattern][place] += factor[pattern] * h;
    }
  }
}

RecoveredField CycleRecovery::over_cycle(const Solution& fundamental) {
  assert(static_cast<int>(b_.size()) == instants_);
  RecoveredField result = std::move(gathered_.front());
  result.solution_ = &fundamental;
  const auto places = static_cast<std::size_t>(result.place_count());
  result.rms_.resize(places);
  result.peak_.resize(places);
  const PeakFinder peaks;
#pragma omp parallel
  {
    std::vector<mesh::Point> b(b_.size());
#pragma omp for schedule(static)
    for (std::size_t place = 0; place < places; ++place) {
      double square = 0.0;
      for (std::size_t k = 0; k < b.size(); ++k) {
        b[k] = b_[k][place];
        square += dot(b[k], b[k]);
      }
      result.rms_[place] = std::sqrt(square / instants_);
      result.peak_[place] = peaks.peak(b);
    }
  }
  return result;
}

}  // namespace barwall::solver
