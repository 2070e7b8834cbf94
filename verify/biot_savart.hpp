#pragma once

// Fields of known currents by the law of Biot and Savart, from the thin wire to the filled bar and
// the bound currents of magnetised steel. They share nothing with the difference scheme.

#include "verify/current_sheet.hpp"
#include "verify/filament.hpp"
#include "verify/filled_bar.hpp"
#include "verify/filled_polygon.hpp"
#include "verify/finite_filament.hpp"
#include "verify/finite_run.hpp"
#include "verify/sheet_sum.hpp"
