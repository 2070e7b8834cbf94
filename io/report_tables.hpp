#pragma once

#include <string>

#include "io/results.hpp"

namespace barwall::io {

// The report's tables, as HTML; a table without rows is an empty text.

std::string force_tables(const Results& results);
std::string fault_tables(const Results& results);
/// What handbooks' formulas give, with their names, sources and the ratio to them.
std::string hand_table(const Results& results);
std::string probe_tables(const Results& results);
std::string circuit_tables(const Results& results);
std::string part_tables(const Results& results);
/// The pushes on the sides of walls, in the fault too, and the rule of what a side is; empty
/// without any.
std::string push_tables(const Results& results);
std::string check_table(const Results& results);
std::string notice_list(const Results& results);
std::string case_tables(const Results& results);

}  // namespace barwall::io
