#pragma once

#include <string>
#include <vector>

namespace barwall::io {

/// Characters that a UTF-8 text takes on a terminal, colour sequences not counted.
int text_width(const std::string& text);

/// A text cut to a width, its end marked by an ellipsis.
std::string clipped(const std::string& text, int width);

/// A text broken at blanks into lines of at most `width` characters, each begun by `indent`
/// blanks.
std::string wrapped(const std::string& text, int indent, int width);

/// Rows of cells in columns as wide as their widest cell, two blanks apart.
class PlainTable {
public:
  /// \param alignment one letter per column: l to the left, r to the right
  explicit PlainTable(std::string alignment) : alignment_(std::move(alignment)) {}

  void add(std::vector<std::string> cells) { rows_.push_back(std::move(cells)); }
  bool empty() const { return rows_.empty(); }

  /// The rows, each begun by two blanks, none ended by a blank. A row wider than `width` loses
  /// what is too much from its last cell.
  std::string text(int width) const;

private:
  std::string alignment_;
  std::vector<std::vector<std::string>> rows_;
};

}  // namespace barwall::io
