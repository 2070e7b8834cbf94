#pragma once

#include <cstdint>
#include <string>
#include <string_view>
#include <variant>
#include <vector>

namespace barwall::io {

/// A place in a text: line and column, both from 1; columns count characters.
struct Place {
  int line = 1;
  int column = 1;

  friend auto operator<=>(const Place&, const Place&) = default;
};

struct TomlValue;
struct TomlEntry;

using TomlArray = std::vector<TomlValue>;

/// A table; its entries stand in the order of the file.
struct TomlTable {
  std::vector<TomlEntry> entries;
};

/// A date or a time: valid TOML, but no value of a case.
struct TomlDate {};

/// A value with the place where it begins; of a table with a header, the header.
struct TomlValue {
  Place place;
  std::variant<std::string, std::int64_t, double, bool, TomlDate, TomlArray, TomlTable> content;
};

struct TomlEntry {
  std::string key;
  Place place;
  TomlValue value;
};

/// Parses a TOML text into its root table.
/// \param file name of the file, for messages
/// \throws InputError with the place when the text is no TOML, or a dotted key is too deep.
TomlValue parse_toml(const std::string& file, std::string_view text);

}  // namespace barwall::io
