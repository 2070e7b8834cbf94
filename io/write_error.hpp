#pragma once

#include <stdexcept>
#include <string>

namespace barwall::io {

/// Results that could not be written: no room, no permission. Nothing half-written is left.
class WriteError : public std::runtime_error {
public:
  using std::runtime_error::runtime_error;
};

/// A run that was asked to stop while it wrote its results.
class Stopped : public WriteError {
public:
  using WriteError::WriteError;
};

}  // namespace barwall::io
