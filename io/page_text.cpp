#include "io/page_text.hpp"

#include "io/printable_text.hpp"

namespace barwall::io {
namespace {

bool follows(char byte) {
  return (static_cast<unsigned char>(byte) & 0xc0u) == 0x80u;
}

}  // namespace

std::string cut_to_width(const Canvas& canvas, const std::string& text, const TextStyle& style,
                         double width) {
  std::string shown = printable(text);
  if (canvas.text_width(shown, style) <= width) return shown;
  // Drop whole characters; a first guess saves most of the measuring.
  const double share = width / canvas.text_width(shown, style);
  shown.resize(static_cast<std::size_t>(1.2 * share * static_cast<double>(shown.size())) + 4 <
                       shown.size()
                   ? static_cast<std::size_t>(1.2 * share * static_cast<double>(shown.size())) + 4
                   : shown.size());
  const std::string ellipsis = "\u2026";
  const auto drop = [&shown] {
    while (!shown.empty() && follows(shown.back())) shown.pop_back();
    if (!shown.empty()) shown.pop_back();
  };
  drop();
  while (!shown.empty() && canvas.text_width(shown + ellipsis, style) > width) drop();
  return shown + ellipsis;
}

std::vector<std::string> wrapped(const Canvas& canvas, const std::string& text,
                                 const TextStyle& style, double width) {
  std::vector<std::string> lines;
  std::string line;
  std::size_t at = 0;
  while (at < text.size()) {
    const std::size_t space = std::min(text.find(' ', at), text.size());
    const std::string word = text.substr(at, space - at);
    at = space + 1;
    const std::string longer = line.empty() ? word : line + " " + word;
    if (!line.empty() && canvas.text_width(longer, style) > width) {
      lines.push_back(line);
      line = word;
    } else {
      line = longer;
    }
  }
  if (!line.empty()) lines.push_back(line);
  return lines;
}

void draw_heading(Canvas& canvas, const std::string& title, const std::string& below,
                  const Colour& below_colour, double left, double width) {
  TextStyle style;
  style.bold = true;
  style.size = 32.0;
  while (style.size > 22.0 && canvas.text_width(title, style) > width) style.size -= 1.0;
  canvas.text({left, 46.0}, cut_to_width(canvas, title, style, width), style);
  TextStyle second;
  second.size = 21.0;
  second.colour = below_colour;
  canvas.text({left, 80.0}, cut_to_width(canvas, below, second, width), second);
}

}  // namespace barwall::io
