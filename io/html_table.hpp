#pragma once

#include <string>
#include <vector>

namespace barwall::io {

/// A table of a page: a caption, headings, and rows whose first cell names the row. All texts
/// are escaped.
class HtmlTable {
public:
  HtmlTable(std::string caption, std::vector<std::string> headings);

  /// A row; it may be shorter than the headings.
  void row(const std::vector<std::string>& cells);
  bool empty() const { return rows_.empty(); }

  /// The element's text; nothing for a table without rows. Cells that begin with a number
  /// stand to the right, and so do the headings of those in the first row.
  std::string html() const;

private:
  std::string caption_;
  std::vector<std::string> headings_;
  std::vector<std::vector<std::string>> rows_;
};

}  // namespace barwall::io
