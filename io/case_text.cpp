#include "io/case_text.hpp"

#include <fmt/format.h>

#include <algorithm>
#include <cstddef>

#include "io/input_error.hpp"
#include "io/nearest_name.hpp"

namespace barwall::io {

namespace {

constexpr int longest_name = 60;
constexpr int longest_shown = 60;

bool is_control(char c) {
  return (c >= '\0' && c < ' ') || c == '\x7f';
}

/// A text in quotes, its control characters replaced, cut to a readable length.
std::string quoted(std::string_view text) {
  std::string result = "\"";
  int count = 0;
  for (const char c : text) {
    const bool begins_character = (c & 0xc0) != 0x80;
    if (begins_character && ++count > longest_shown) return result + "...\"";
    result += is_control(c) ? '?' : c;
  }
  return result + "\"";
}

std::string allowed_text(const Allowed& allowed) {
  const bool low = std::isfinite(allowed.low);
  const bool high = std::isfinite(allowed.high);
  if (low && high) {
    return fmt::format("{} {}{} and at most {}{}", allowed.or_equal ? "at least" : "greater than",
                       allowed.low, allowed.unit, allowed.high, allowed.unit);
  }
  if (low) {
    return fmt::format("{} {}{}", allowed.or_equal ? "at least" : "greater than", allowed.low,
                       allowed.unit);
  }
  if (high) return fmt::format("at most {}{}", allowed.high, allowed.unit);
  return "a finite number";
}

/// The value of a number, or of the expression in a string.
double value_of(const CaseText& text, const TomlValue& value, std::string_view what) {
  if (const auto* whole = std::get_if<std::int64_t>(&value.content)) {
    return static_cast<double>(*whole);
  }
  if (const auto* number = std::get_if<double>(&value.content)) {
    if (!std::isfinite(*number)) {
      text.fail(value.place, fmt::format("{} is {}; it must be a finite number", what, *number));
    }
    return *number;
  }
  if (const auto* expression = std::get_if<std::string>(&value.content)) {
    try {
      return evaluate(*expression, text.given);
    } catch (const ExpressionError& error) {
      text.fail(value.place, fmt::format("{} = {}: {}", what, shown(value), error.what()));
    }
  }
  text.fail(value.place, fmt::format("{} is {}; it must be a number or an expression in a string",
                                     what, kind_of(value)));
}

/// "-8 mm", or for an expression its text and its value.
std::string shown_number(const TomlValue& value, double number, std::string_view unit) {
  if (std::holds_alternative<std::string>(value.content)) {
    return fmt::format("{} = {}{}", shown(value), number, unit);
  }
  return fmt::format("{}{}", number, unit);
}

}  // namespace

void CaseText::fail(Place place, std::string_view what) const {
  throw InputError(fmt::format("{}:{}:{}: {}", file, place.line, place.column, what));
}

int characters(std::string_view text) {
  return static_cast<int>(
      std::count_if(text.begin(), text.end(), [](char c) { return (c & 0xc0) != 0x80; }));
}

std::string shown(const TomlValue& value) {
  if (const auto* text = std::get_if<std::string>(&value.content)) return quoted(*text);
  if (const auto* whole = std::get_if<std::int64_t>(&value.content)) {
    return fmt::format("{}", *whole);
  }
  if (const auto* number = std::get_if<double>(&value.content)) return fmt::format("{}", *number);
  if (const auto* truth = std::get_if<bool>(&value.content)) return *truth ? "true" : "false";
  return kind_of(value);
}

std::string kind_of(const TomlValue& value) {
  if (std::holds_alternative<std::string>(value.content)) return "a string";
  if (std::holds_alternative<bool>(value.content)) return "true or false";
  if (std::holds_alternative<TomlDate>(value.content)) return "a date or time";
  if (std::holds_alternative<TomlArray>(value.content)) return "an array";
  if (std::holds_alternative<TomlTable>(value.content)) return "a table";
  return "a number";
}

double read_number(const CaseText& text, const TomlValue& value, std::string_view what,
                   const Allowed& allowed) {
  const double number = value_of(text, value, what);
  const bool low_enough = number <= allowed.high;
  const bool high_enough = allowed.or_equal ? number >= allowed.low : number > allowed.low;
  if (!low_enough || !high_enough) {
    text.fail(value.place,
              fmt::format("{} is {}; it must be {}", what,
                          shown_number(value, number, allowed.unit), allowed_text(allowed)));
  }
  return number;
}

int read_whole_number(const CaseText& text, const TomlValue& value, std::string_view what, int low,
                      int high) {
  const double number = value_of(text, value, what);
  // Expressions such as 0.1*30 miss their whole number by rounding alone.
  const double whole = std::round(number);
  const bool fraction = std::abs(number - whole) > 1e-9 * std::abs(number);
  if (fraction || whole < low || whole > high) {
    text.fail(value.place, fmt::format("{} is {}; it must be a whole number from {} to {}", what,
                                       shown_number(value, number, ""), low, high));
  }
  return static_cast<int>(whole);
}

std::string read_line(const CaseText& text, const TomlValue& value, std::string_view what) {
  const auto* line = std::get_if<std::string>(&value.content);
  if (line == nullptr) {
    const std::string kind = kind_of(value);
    const std::string said = shown(value);
    text.fail(value.place, fmt::format("{} is {}{}; it must be a string", what, kind,
                                       said == kind ? "" : " (" + said + ")"));
  }
  if (line->empty()) text.fail(value.place, fmt::format("{} is empty", what));
  if (std::any_of(line->begin(), line->end(), is_control)) {
    text.fail(value.place, fmt::format("{} is {}; it must be one line without control characters",
                                       what, shown(value)));
  }
  return *line;
}

void check_name(const CaseText& text, Place place, std::string_view name, std::string_view what) {
  const bool control = std::any_of(name.begin(), name.end(), is_control);
  const bool slash = name.find('/') != std::string_view::npos;
  if (name.empty() || characters(name) > longest_name || slash || control) {
    text.fail(place, fmt::format("{} is {} ({} characters); a name has 1 to {} characters, none of "
                                 "them \"/\" or a control character",
                                 what, quoted(name), characters(name), longest_name));
  }
}

std::string read_name(const CaseText& text, const TomlValue& value, std::string_view what) {
  if (const auto* name = std::get_if<std::string>(&value.content)) {
    check_name(text, value.place, *name, what);
    return *name;
  }
  return read_line(text, value, what);
}

const TomlArray& read_array(const CaseText& text, const TomlValue& value, std::string_view what) {
  const auto* array = std::get_if<TomlArray>(&value.content);
  if (array == nullptr) {
    text.fail(value.place, fmt::format("{} is {}; it must be an array", what, shown(value)));
  }
  return *array;
}

mesh::Point read_pair(const CaseText& text, const TomlValue& value, std::string_view what,
                      const Allowed& allowed) {
  const auto* array = std::get_if<TomlArray>(&value.content);
  if (array == nullptr || array->size() != 2) {
    const std::string said =
        array == nullptr ? shown(value) : fmt::format("an array of {}", array->size());
    text.fail(value.place, fmt::format("{} is {}; it must be a pair of numbers", what, said));
  }
  const double first = read_number(text, (*array)[0], what, allowed);
  return {first, read_number(text, (*array)[1], what, allowed)};
}

mesh::Point read_point(const CaseText& text, const TomlValue& value, std::string_view what) {
  return metres(read_pair(text, value, what, coordinate_mm));
}

CaseTable::CaseTable(const CaseText& text, const TomlValue& table, std::string title,
                     std::vector<std::string> keys)
    : text_(&text), table_(&table), title_(std::move(title)) {
  const auto* content = std::get_if<TomlTable>(&table.content);
  if (content == nullptr) {
    text.fail(table.place, fmt::format("{} is {}; it must be a table", title_, shown(table)));
  }
  for (const TomlEntry& entry : content->entries) {
    if (std::find(keys.begin(), keys.end(), entry.key) != keys.end()) continue;
    std::string list;
    for (const std::string& key : keys) list += (list.empty() ? "" : ", ") + key;
    text.fail(entry.place, fmt::format("unknown key {} in {}{} (allowed: {})", quoted(entry.key),
                                       title_, suggestion(entry.key, keys), list));
  }
}

const TomlEntry* CaseTable::find(std::string_view key) const {
  for (const TomlEntry& entry : std::get<TomlTable>(table_->content).entries) {
    if (entry.key == key) return &entry;
  }
  return nullptr;
}

const TomlValue& CaseTable::require(std::string_view key) const {
  const TomlEntry* entry = find(key);
  if (entry == nullptr) {
    text_->fail(header(), fmt::format("{} has no {}, which it needs", title_, key));
  }
  return entry->value;
}

const TomlEntry& CaseTable::exactly_one(const std::vector<std::string>& keys) const {
  const TomlEntry* only = nullptr;
  for (const TomlEntry& entry : std::get<TomlTable>(table_->content).entries) {
    if (std::find(keys.begin(), keys.end(), entry.key) == keys.end()) continue;
    if (only != nullptr) {
      text_->fail(entry.place, fmt::format("{} has {} and {}; only one of them is allowed", title_,
                                           only->key, entry.key));
    }
    only = &entry;
  }
  if (only == nullptr) {
    std::string list;
    for (const std::string& key : keys) list += (list.empty() ? "" : ", ") + key;
    text_->fail(header(), fmt::format("{} needs one of {}", title_, list));
  }
  return *only;
}

std::vector<const TomlValue*> tables_of(const CaseTable& root, std::string_view key) {
  std::vector<const TomlValue*> tables;
  const TomlEntry* entry = root.find(key);
  if (entry == nullptr) return tables;
  const auto* array = std::get_if<TomlArray>(&entry->value.content);
  if (array == nullptr) {
    const bool table = std::holds_alternative<TomlTable>(entry->value.content);
    root.text().fail(table ? entry->value.place : entry->place,
                     fmt::format("{} is {}; write [[{}]] above each one", key,
                                 table ? "a single table" : kind_of(entry->value), key));
  }
  for (const TomlValue& element : *array) tables.push_back(&element);
  return tables;
}

}  // namespace barwall::io
