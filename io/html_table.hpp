#pragma once

#include <cstddef>
#include <string>
#include <vector>

namespace barwall::io {

/// A table of a page: a caption, headings, and rows whose first cell names the row. All texts
/// are escaped.
class HtmlTable {
public:
  /// \param words columns, counted from 0, whose cells are words even where they begin with a
  /// number
  HtmlTable(std::string caption, std::vector<std::string> headings,
            std::vector<std::size_t> words = {});

  /// A row; it may be shorter than the headings.
  void row(const std::vector<std::string>& cells);
  bool empty() const { return rows_.empty(); }

  /// The element's text; nothing for a table without rows. Cells that begin with a number
  /// stand to the right, and so do the headings of those in the first row.
  std::string html() const;

private:
  bool number(const std::vector<std::string>& cells, std::size_t column) const;

  std::string caption_;
  std::vector<std::string> headings_;
  std::vector<std::size_t> words_;
  std::vector<std::vector<std::string>> rows_;
};

}  // namespace barwall::io
