#include "io/plain_file.hpp"

#include <fmt/format.h>

#include <fstream>
#include <system_error>

namespace barwall::io {

std::string bytes_of(const std::filesystem::path& file, const PlainFileKind& kind) {
  std::error_code error;
  const auto status = std::filesystem::status(file, error);
  if (!std::filesystem::exists(status)) throw PlainFileError("no such file");
  if (std::filesystem::is_directory(status)) {
    throw PlainFileError(
        fmt::format("this is a folder; a {} is a {} file", kind.what, kind.extension));
  }
  if (!std::filesystem::is_regular_file(status)) throw PlainFileError("this is no plain file");
  std::ifstream stream(file, std::ios::binary);
  if (!stream) throw PlainFileError("the file cannot be read");
  std::string bytes(kind.largest + 1, '\0');
  stream.read(bytes.data(), static_cast<std::streamsize>(bytes.size()));
  if (stream.bad()) throw PlainFileError("the file cannot be read");
  bytes.resize(static_cast<std::size_t>(stream.gcount()));
  if (bytes.size() > kind.largest) {
    throw PlainFileError(fmt::format("the file is too large; a {} file has at most {} bytes",
                                     kind.what, kind.largest));
  }
  return bytes;
}

}  // namespace barwall::io
