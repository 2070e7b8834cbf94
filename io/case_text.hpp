#pragma once

#include <cmath>
#include <initializer_list>
#include <string>
#include <string_view>
#include <vector>

#include "io/expression.hpp"
#include "io/toml_value.hpp"
#include "mesh/point.hpp"

namespace barwall::io {

// Checked access to what a case file says: everything here throws InputError with
// FILE:LINE:COLUMN, the value and what is allowed.

/// What the readers of all tables share.
struct CaseText {
  std::string file;   ///< as the user gave it, for messages
  NamedValues given;  ///< [given], for expressions

  /// Throws InputError `FILE:LINE:COLUMN: what`.
  [[noreturn]] void fail(Place place, std::string_view what) const;
};

/// Numbers allowed at a place: from `low` to `high`, `low` itself only when `or_equal`.
struct Allowed {
  double low = -HUGE_VAL;
  double high = HUGE_VAL;
  bool or_equal = true;
  std::string_view unit{};
};

/// Coordinates stay within this many millimetres of the origin.
inline constexpr double farthest_mm = 1e7;
/// Sizes below this [mm] would vanish in the rounding of the farthest coordinates.
inline constexpr double smallest_mm = 1e-6;

/// Coordinates [mm].
inline constexpr Allowed coordinate_mm{-farthest_mm, farthest_mm, true, " mm"};
/// Widths, diameters and thicknesses [mm].
inline constexpr Allowed size_mm{smallest_mm, 2.0 * farthest_mm, true, " mm"};

/// Number of characters of a UTF-8 text; columns count them.
int characters(std::string_view text);

/// A value as the file says it, shortened, for messages.
std::string shown(const TomlValue& value);

/// "a number", "a string" and so on: the kind of a value, for messages.
std::string kind_of(const TomlValue& value);

/// A number, or the value of an expression in a string.
double read_number(const CaseText& text, const TomlValue& value, std::string_view what,
                   const Allowed& allowed);

/// A number without fraction, or an expression with such a value.
int read_whole_number(const CaseText& text, const TomlValue& value, std::string_view what, int low,
                      int high);

/// One line of text, not empty, without control characters.
std::string read_line(const CaseText& text, const TomlValue& value, std::string_view what);

/// A name: 1 to 60 characters without "/".
std::string read_name(const CaseText& text, const TomlValue& value, std::string_view what);

/// Refuses what is no name; `place` is where it stands.
void check_name(const CaseText& text, Place place, std::string_view name, std::string_view what);

const TomlArray& read_array(const CaseText& text, const TomlValue& value, std::string_view what);

/// A pair of numbers [x, y].
mesh::Point read_pair(const CaseText& text, const TomlValue& value, std::string_view what,
                      const Allowed& allowed);

/// A point given in millimetres, in metres.
mesh::Point read_point(const CaseText& text, const TomlValue& value, std::string_view what);

/// Millimetres in metres; the division rounds correctly, as a product with 0.001 does not.
inline double metres(double millimetres) {
  return millimetres / 1000.0;
}
inline mesh::Point metres(mesh::Point millimetres) {
  return {metres(millimetres.x), metres(millimetres.y)};
}

/// A table whose keys are known: every other key is refused when it is made.
class CaseTable {
public:
  /// \param title how messages call the table, such as [[bar]]
  CaseTable(const CaseText& text, const TomlValue& table, std::string title,
            std::vector<std::string> keys);

  const CaseText& text() const { return *text_; }
  const std::string& title() const { return title_; }
  /// Where the table begins.
  Place header() const { return table_->place; }

  /// The entry of a key, or null.
  const TomlEntry* find(std::string_view key) const;
  /// The value of a key; a missing one is refused at the table's header.
  const TomlValue& require(std::string_view key) const;
  /// The one entry that is there of several keys, of which exactly one is wanted.
  const TomlEntry& exactly_one(const std::vector<std::string>& keys) const;

private:
  const CaseText* text_;
  const TomlValue* table_;
  std::string title_;
};

/// The tables of a [[key]], none when it is absent.
std::vector<const TomlValue*> tables_of(const CaseTable& root, std::string_view key);

}  // namespace barwall::io
