#pragma once

#include <string>
#include <string_view>

namespace barwall::io {

/// SHA-256 digest of `bytes` as 64 small hexadecimal digits (FIPS 180-4, sections 5.1.1 and
/// 6.2).
std::string sha256(std::string_view bytes);

}  // namespace barwall::io
