#pragma once

#include <stdexcept>
#include <string>

namespace barwall::io {

/// Something wrong with what the user gave: the message holds file:line:column, the value, what
/// is allowed and, for a mistyped name, the nearest valid one.
class InputError : public std::runtime_error {
public:
  using std::runtime_error::runtime_error;
};

}  // namespace barwall::io
