#include "io/bh_table.hpp"

#include <fmt/format.h>

#include <algorithm>
#include <charconv>
#include <cmath>
#include <string>
#include <system_error>

#include "io/printable_text.hpp"

namespace barwall::io {

namespace {

constexpr std::string_view header = "H_A_per_m,B_T";
constexpr std::string_view byte_order_mark = "\xef\xbb\xbf";
constexpr std::string_view blanks = " \t";

/// A stretch of one line, with the column where it begins.
struct Field {
  std::string_view text;
  Place place;
};

/// Without blanks at both ends.
Field trimmed(Field field) {
  const std::size_t from = std::min(field.text.find_first_not_of(blanks), field.text.size());
  field.text.remove_prefix(from);
  field.place.column += static_cast<int>(from);
  field.text = field.text.substr(0, field.text.find_last_not_of(blanks) + 1);
  return field;
}

/// The fields of a line between its commas, each trimmed.
std::vector<Field> fields_of(Field line) {
  std::vector<Field> fields;
  for (;;) {
    const std::size_t comma = line.text.find(',');
    fields.push_back(trimmed({line.text.substr(0, comma), line.place}));
    if (comma == std::string_view::npos) return fields;
    line.place.column += characters(line.text.substr(0, comma + 1));
    line.text.remove_prefix(comma + 1);
  }
}

std::string shown(const Field& field) {
  return shown(TomlValue{field.place, printable(field.text)});
}

void check_header(const CaseText& csv, const Field& line) {
  std::string found;
  for (const Field& field : fields_of(line)) {
    found.append(found.empty() ? "" : ",").append(field.text);
  }
  if (found != header) {
    csv.fail(line.place, fmt::format("the header is {}; it must be {}", shown(line), header));
  }
}

double number_of(const CaseText& csv, const Field& field, std::string_view what) {
  std::string_view text = field.text;
  if (text.size() > 1 && text[0] == '+' && text[1] != '-') text.remove_prefix(1);
  double number = 0.0;
  const auto [end, error] = std::from_chars(text.data(), text.data() + text.size(), number);
  if (error == std::errc::invalid_argument || end != text.data() + text.size()) {
    csv.fail(field.place,
             fmt::format("{} is {}; it must be a number with a decimal point", what, shown(field)));
  }
  if (error != std::errc() || !std::isfinite(number)) {
    csv.fail(field.place, fmt::format("{} is {}; it must be a finite number that is not too small "
                                      "or too large for double precision",
                                      what, shown(field)));
  }
  return number;
}

void read_row(const CaseText& csv, const Field& line, BhTable& table) {
  const std::vector<Field> fields = fields_of(line);
  if (fields.size() != 2) {
    csv.fail(line.place, fmt::format("{} has {} field{}; a row has two: H in A/m, a comma, B in T",
                                     shown(line), fields.size(), fields.size() == 1 ? "" : "s"));
  }
  if (table.points.size() == most_bh_rows) {
    csv.fail(line.place, fmt::format("more than {} rows", most_bh_rows));
  }
  table.points.push_back({number_of(csv, fields[0], "H"), number_of(csv, fields[1], "B")});
  table.places.push_back({fields[0].place, fields[1].place});
}

}  // namespace

BhTable read_curve_file(const CaseText& csv, std::string_view bytes) {
  if (bytes.starts_with(byte_order_mark)) bytes.remove_prefix(byte_order_mark.size());
  BhTable table;
  bool header_read = false;
  for (int number = 1; !bytes.empty(); ++number) {
    const std::size_t end = bytes.find('\n');
    std::string_view text = bytes.substr(0, end);
    bytes.remove_prefix(end == std::string_view::npos ? bytes.size() : end + 1);
    if (text.ends_with('\r')) text.remove_suffix(1);
    const Field line = trimmed({text.substr(0, text.find('#')), {number, 1}});
    if (line.text.empty()) continue;
    if (header_read) {
      read_row(csv, line, table);
    } else {
      check_header(csv, line);
      table.place = line.place;
      header_read = true;
    }
  }
  if (!header_read) {
    csv.fail({}, fmt::format("the file has no header; its first line must be {}", header));
  }
  return table;
}

BhTable read_bh_points(const CaseText& text, const TomlValue& value) {
  const TomlArray& array = read_array(text, value, "bh_points");
  if (array.size() > most_bh_rows) {
    text.fail(value.place, fmt::format("bh_points has {} rows; it must have at most {}",
                                       array.size(), most_bh_rows));
  }
  BhTable table;
  table.place = value.place;
  for (const TomlValue& row : array) {
    const mesh::Point pair = read_pair(text, row, "a row of bh_points", {});
    table.points.push_back({pair.x, pair.y});
    const auto& numbers = std::get<TomlArray>(row.content);
    table.places.push_back({numbers[0].place, numbers[1].place});
  }
  return table;
}

std::shared_ptr<const solver::BhCurve> curve_through(const CaseText& text, const BhTable& table,
                                                     std::string_view what) {
  try {
    return std::make_shared<const solver::BhCurve>(solver::make_bh_curve(table.points));
  } catch (const solver::BhTableError& error) {
    const bool in_b = error.column == solver::BhTableError::Column::flux_density;
    text.fail(error.row < table.places.size() ? table.places[error.row][in_b ? 1 : 0] : table.place,
              fmt::format("{}: {}", what, error.what()));
  }
}

}  // namespace barwall::io
