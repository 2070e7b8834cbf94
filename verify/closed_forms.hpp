#pragma once

// Arrangements whose field, force or inductance is known in closed form or as a fast series.

#include "verify/bar_force.hpp"
#include "verify/half_space.hpp"
#include "verify/iron_box.hpp"
#include "verify/iron_slot.hpp"
#include "verify/mean_distance.hpp"
#include "verify/pipe_series.hpp"
#include "verify/round_conductor.hpp"
#include "verify/short_circuit.hpp"
#include "verify/steel_rod.hpp"
#include "verify/steel_wires.hpp"
#include "verify/three_phase_line.hpp"
#include "verify/uniform_field.hpp"
