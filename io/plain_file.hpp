#pragma once

#include <cstdint>
#include <filesystem>
#include <stdexcept>
#include <string>
#include <string_view>

namespace barwall::io {

/// What is wrong with a file as a whole; the message names neither the file nor a place.
class PlainFileError : public std::runtime_error {
public:
  using std::runtime_error::runtime_error;
};

/// What a file is to be, for messages: "case" and ".toml", and its largest size [bytes].
struct PlainFileKind {
  std::string_view what;
  std::string_view extension;
  std::uintmax_t largest = 0;
};

/// The bytes of a plain file of bounded size; folders, pipes and devices are not opened.
/// \throws PlainFileError
std::string bytes_of(const std::filesystem::path& file, const PlainFileKind& kind);

}  // namespace barwall::io
