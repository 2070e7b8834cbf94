#pragma once

#include <string>
#include <vector>

namespace barwall::verify {

/// Names in quotation marks: "L1", "L1" and "L2", or the first four and how many more.
std::string quoted(const std::vector<std::string>& names);

}  // namespace barwall::verify
