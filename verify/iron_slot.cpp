#include "verify/iron_slot.hpp"

#include <algorithm>
#include <cmath>
#include <numbers>

#include "solver/constants.hpp"

namespace barwall::verify {

using solver::mu_0;
using std::numbers::pi;

double field_in_slot(const Slot& slot, double current, double height) {
  return -mu_0 * current / slot.width * std::min(height / slot.filled_height, 1.0);
}

double inductance_of_slot(const Slot& slot, double gap) {
  return mu_0 * (slot.filled_height / 3.0 + gap) / slot.width;
}

double force_into_slot(const Slot& slot, double current) {
  return 0.5 * mu_0 * current * current / slot.width;
}

double field_between_plates(double current, double gap, double distance) {
  return 0.5 * mu_0 * current / (gap * std::tanh(pi * distance / gap));
}

double force_to_plate(double current, double gap, double height) {
  return 0.25 * mu_0 * current * current / (gap * std::tan(pi * height / gap));
}

}  // namespace barwall::verify
