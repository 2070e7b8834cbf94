#include "io/html_table.hpp"

#include <fmt/format.h>

#include <algorithm>

#include "io/printable_text.hpp"

namespace barwall::io {
namespace {

bool begins_with_number(const std::string& text) {
  if (text.empty()) return false;
  const char first = text[0];
  const bool signed_number = (first == '-' || first == '+') && text.size() > 1;
  const char digit = signed_number ? text[1] : first;
  return (digit >= '0' && digit <= '9') || text == "-";
}

}  // namespace

HtmlTable::HtmlTable(std::string caption, std::vector<std::string> headings,
                     std::vector<std::size_t> words)
    : caption_(std::move(caption)), headings_(std::move(headings)), words_(std::move(words)) {}

bool HtmlTable::number(const std::vector<std::string>& cells, std::size_t column) const {
  const bool worded = std::find(words_.begin(), words_.end(), column) != words_.end();
  return column > 0 && column < cells.size() && !worded && begins_with_number(cells[column]);
}

void HtmlTable::row(const std::vector<std::string>& cells) {
  rows_.push_back(cells);
}

std::string HtmlTable::html() const {
  if (rows_.empty()) return "";
  std::string text = fmt::format("<table>\n<caption>{}</caption>\n<thead><tr>", escaped(caption_));
  for (std::size_t k = 0; k < headings_.size(); ++k) {
    const bool right = number(rows_.front(), k);
    text += fmt::format("<th scope=\"col\"{}>{}</th>", right ? " class=\"number\"" : "",
                        escaped(headings_[k]));
  }
  text += "</tr></thead>\n<tbody>\n";
  for (const auto& cells : rows_) {
    text += "<tr>";
    for (std::size_t k = 0; k < headings_.size(); ++k) {
      const std::string cell = k < cells.size() ? cells[k] : "";
      if (k == 0) {
        text += fmt::format("<th scope=\"row\">{}</th>", escaped(cell));
      } else {
        text += fmt::format("<td{}>{}</td>", number(cells, k) ? " class=\"number\"" : "",
                            escaped(cell));
      }
    }
    text += "</tr>\n";
  }
  return text + "</tbody>\n</table>\n";
}

}  // namespace barwall::io
