#include "io/toml_value.hpp"

// The parser asserts what text can violate ("[[.bar]]") just before it reports the same as an
// error: without the assertions debug builds report it, too.
#define TOML_ASSERT(condition) static_cast<void>(0)

#include <fmt/format.h>
#include <toml++/toml.h>

#include <algorithm>
#include <cstddef>

#include "io/input_error.hpp"

namespace barwall::io {

namespace {

/// Deepest dotted key. The parser nests one table per dot, without a bound of its own.
constexpr int deepest_key = 32;

Place place_of(const toml::source_region& region) {
  return {std::max(1, static_cast<int>(region.begin.line)),
          std::max(1, static_cast<int>(region.begin.column))};
}

[[noreturn]] void fail(const std::string& file, Place place, std::string_view what) {
  throw InputError(fmt::format("{}:{}:{}: {}", file, place.line, place.column, what));
}

/// Walks over a text, skipping comments and strings, and refuses keys with too many dots.
class DotCounter {
public:
  DotCounter(const std::string& file, std::string_view text) : file_(file), text_(text) {}

  void check() {
    int dots = 0;
    while (next_ < text_.size()) {
      const char c = text_[next_];
      if (c == '#') {
        skip_past("\n");
        dots = 0;
      } else if (c == '"' || c == '\'') {
        skip_string(c);
      } else {
        if (c == '.' && ++dots > deepest_key) {
          fail(file_, place(), fmt::format("a key of more than {} parts", deepest_key));
        }
        if (std::string_view("\n=,[]{}").find(c) != std::string_view::npos) dots = 0;
        ++next_;
      }
    }
  }

private:
  void skip_past(std::string_view end) {
    const std::size_t found = text_.find(end, next_);
    next_ = found == std::string_view::npos ? text_.size() : found + end.size();
  }

  void skip_string(char quote) {
    const std::string triple(3, quote);
    const bool long_string = text_.substr(next_, 3) == triple;
    next_ += long_string ? 3 : 1;
    while (next_ < text_.size()) {
      if (quote == '"' && text_[next_] == '\\') {
        next_ += 2;
      } else if (long_string && text_.substr(next_, 3) == triple) {
        next_ += 3;
        // Up to two more quotes may belong to the string's end.
        while (next_ < text_.size() && text_[next_] == quote) ++next_;
        return;
      } else if (!long_string && (text_[next_] == quote || text_[next_] == '\n')) {
        ++next_;
        return;
      } else {
        ++next_;
      }
    }
  }

  Place place() const {
    Place result;
    for (const char c : text_.substr(0, next_)) {
      result = c == '\n' ? Place{result.line + 1, 1} : Place{result.line, result.column + 1};
    }
    return result;
  }

  const std::string& file_;
  std::string_view text_;
  std::size_t next_ = 0;
};

TomlValue converted(const toml::node& node) {
  TomlValue value;
  value.place = place_of(node.source());
  if (const auto* text = node.as_string()) {
    value.content = text->get();
  } else if (const auto* whole = node.as_integer()) {
    value.content = whole->get();
  } else if (const auto* number = node.as_floating_point()) {
    value.content = number->get();
  } else if (const auto* truth = node.as_boolean()) {
    value.content = truth->get();
  } else if (const auto* array = node.as_array()) {
    TomlArray elements;
    elements.reserve(array->size());
    for (const toml::node& element : *array) elements.push_back(converted(element));
    value.content = std::move(elements);
  } else if (const auto* table = node.as_table()) {
    TomlTable entries;
    entries.entries.reserve(table->size());
    for (const auto& [key, element] : *table) {
      entries.entries.push_back(
          {std::string(key.str()), place_of(key.source()), converted(element)});
    }
    std::stable_sort(entries.entries.begin(), entries.entries.end(),
                     [](const TomlEntry& a, const TomlEntry& b) { return a.place < b.place; });
    value.content = std::move(entries);
  } else {
    value.content = TomlDate{};
  }
  return value;
}

}  // namespace

TomlValue parse_toml(const std::string& file, std::string_view text) {
  DotCounter(file, text).check();
  try {
    const toml::table root = toml::parse(text);
    TomlValue value = converted(root);
    value.place = {1, 1};
    return value;
  } catch (const toml::parse_error& error) {
    fail(file, place_of(error.source()), fmt::format("not valid TOML: {}", error.description()));
  }
}

}  // namespace barwall::io
