#pragma once

#include <string>
#include <string_view>

namespace barwall::io {

/// The text as valid UTF-8 on one line: control characters become spaces, bytes that are no
/// UTF-8 question marks.
std::string printable(std::string_view text);

/// Printable text for HTML and XML, inside elements and quoted attributes: & < > " ' escaped.
std::string escaped(std::string_view text);

/// The bytes in base64 (RFC 4648), on one line.
std::string base64(std::string_view bytes);

}  // namespace barwall::io
