#include "io/plain_table.hpp"

#include <algorithm>
#include <sstream>

namespace barwall::io {
namespace {

bool begins_character(char c) {
  return (static_cast<unsigned char>(c) & 0xC0U) != 0x80U;
}

void trim_end(std::string& line) {
  line.erase(line.find_last_not_of(' ') + 1);
}

}  // namespace

int text_width(const std::string& text) {
  int width = 0;
  bool in_colour = false;
  for (const char c : text) {
    if (c == '\x1b') in_colour = true;
    if (!in_colour && begins_character(c)) ++width;
    if (c == 'm') in_colour = false;
  }
  return width;
}

std::string clipped(const std::string& text, int width) {
  if (text_width(text) <= width) return text;
  std::string result;
  int count = 0;
  for (const char c : text) {
    if (begins_character(c) && ++count >= width) break;
    result += c;
  }
  return result + "…";
}

std::string wrapped(const std::string& text, int indent, int width) {
  std::istringstream words(text);
  const std::string blanks(static_cast<std::size_t>(indent), ' ');
  std::string result;
  std::string line = blanks;
  int used = indent;
  for (std::string word; words >> word;) {
    word = clipped(word, width - indent);
    const int needed = text_width(word) + (used > indent ? 1 : 0);
    if (used + needed > width) {
      result += line + "\n";
      line = blanks;
      used = indent;
    }
    if (used > indent) {
      line += ' ';
      ++used;
    }
    line += word;
    used += text_width(word);
  }
  return used > indent ? result + line + "\n" : result;
}

std::string PlainTable::text(int width) const {
  std::vector<int> widths(alignment_.size(), 0);
  for (const auto& row : rows_) {
    for (std::size_t k = 0; k < row.size(); ++k)
      widths[k] = std::max(widths[k], text_width(row[k]));
  }
  std::string result;
  for (const auto& row : rows_) {
    std::string line;
    int used = 0;
    for (std::size_t k = 0; k < row.size(); ++k) {
      if (widths[k] == 0) continue;
      line += "  ";
      used += 2;
      const std::string cell = clipped(row[k], std::max(1, width - used));
      const std::string blanks(static_cast<std::size_t>(std::max(0, widths[k] - text_width(cell))),
                               ' ');
      line += alignment_[k] == 'r' ? blanks + cell : cell + blanks;
      used += widths[k];
    }
    trim_end(line);
    result += line + "\n";
  }
  return result;
}

}  // namespace barwall::io
