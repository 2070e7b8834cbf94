#pragma once

#include <string>

namespace barwall::io {

/// The SVG with its identifiers renamed to i1, i2, ... in the order of the text. The drawing
/// library numbers them through the life of the process, so that the same drawing would give
/// other bytes the second time.
std::string with_plain_ids(const std::string& svg);

}  // namespace barwall::io
