#pragma once

namespace barwall::io {

/// The program's version, such as "0.1.0".
const char* version();

}  // namespace barwall::io
