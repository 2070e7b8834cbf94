#include "io/svg_ids.hpp"

#include <map>
#include <string_view>

namespace barwall::io {
namespace {

bool id_letter(char c) {
  return (c >= 'a' && c <= 'z') || (c >= 'A' && c <= 'Z') || (c >= '0' && c <= '9') || c == '-' ||
         c == '_';
}

std::string_view id_at(std::string_view text, std::size_t at) {
  std::size_t end = at;
  while (end < text.size() && id_letter(text[end])) ++end;
  return text.substr(at, end - at);
}

}  // namespace

std::string with_plain_ids(const std::string& svg) {
  const std::string_view text = svg;
  constexpr std::string_view definition = " id=\"";
  std::map<std::string_view, std::string> plain;
  for (std::size_t at = text.find(definition); at != text.npos;
       at = text.find(definition, at + 1)) {
    const auto number = std::to_string(plain.size() + 1);
    plain.emplace(id_at(text, at + definition.size()), "i" + number);
  }
  std::string result;
  std::size_t copied = 0;
  // An identifier follows ' id="' where it is defined and '#' where it is used.
  for (std::size_t at = text.find_first_of("#\""); at != text.npos;
       at = text.find_first_of("#\"", at + 1)) {
    const bool defined = text[at] == '"' && at >= 4 && text.substr(at - 4, 5) == definition;
    if (text[at] != '#' && !defined) continue;
    const auto found = plain.find(id_at(text, at + 1));
    if (found == plain.end()) continue;
    result += text.substr(copied, at + 1 - copied);
    result += found->second;
    copied = at + 1 + found->first.size();
  }
  result += text.substr(copied);
  return result;
}

}  // namespace barwall::io
