#include "io/printable_text.hpp"

#include <cstdint>

namespace barwall::io {
namespace {

struct Character {
  std::size_t length = 0;  ///< bytes, 0 when they are no UTF-8
  std::uint32_t code = 0;
};

Character character_at(std::string_view text, std::size_t at) {
  const auto byte = [&](std::size_t k) -> std::uint32_t {
    return at + k < text.size() ? static_cast<unsigned char>(text[at + k]) : 0u;
  };
  const std::uint32_t lead = byte(0);
  if (lead < 0x80) return {1, lead};
  const std::size_t length = lead >= 0xf0 ? 4 : lead >= 0xe0 ? 3 : 2;
  if (lead < 0xc2 || lead > 0xf4) return {};
  std::uint32_t code = lead & (0xffu >> (length + 1));
  for (std::size_t k = 1; k < length; ++k) {
    if ((byte(k) & 0xc0u) != 0x80u) return {};
    code = (code << 6) | (byte(k) & 0x3fu);
  }
  constexpr std::uint32_t least[] = {0, 0, 0x80, 0x800, 0x10000};
  const bool surrogate = code >= 0xd800 && code <= 0xdfff;
  if (code < least[length] || code > 0x10ffff || surrogate) return {};
  return {length, code};
}

bool control(std::uint32_t code) {
  // The two last are no characters in XML.
  return code < 0x20 || (code >= 0x7f && code < 0xa0) || code == 0xfffe || code == 0xffff;
}

}  // namespace

std::string printable(std::string_view text) {
  std::string result;
  for (std::size_t at = 0; at < text.size();) {
    const Character character = character_at(text, at);
    if (character.length == 0) {
      result += '?';
      ++at;
      continue;
    }
    if (control(character.code)) {
      result += ' ';
    } else {
      result += text.substr(at, character.length);
    }
    at += character.length;
  }
  return result;
}

std::string escaped(std::string_view text) {
  std::string result;
  for (char c : printable(text)) {
    switch (c) {
      case '&':
        result += "&amp;";
        break;
      case '<':
        result += "&lt;";
        break;
      case '>':
        result += "&gt;";
        break;
      case '"':
        result += "&quot;";
        break;
      case '\'':
        result += "&#39;";
        break;
      default:
        result += c;
    }
  }
  return result;
}

std::string base64(std::string_view bytes) {
  constexpr char digits[] = "ABCDEFGHIJKLMNOPQRSTUVWXYZabcdefghijklmnopqrstuvwxyz0123456789+/";
  std::string result;
  result.reserve((bytes.size() + 2) / 3 * 4);
  for (std::size_t k = 0; k < bytes.size(); k += 3) {
    std::uint32_t group = 0;
    for (std::size_t m = 0; m < 3; ++m) {
      group = (group << 8) | (k + m < bytes.size() ? static_cast<unsigned char>(bytes[k + m]) : 0u);
    }
    for (std::size_t m = 0; m < 4; ++m) {
      const bool padding = k + m > bytes.size();
      result += padding ? '=' : digits[(group >> (18 - 6 * m)) & 63u];
    }
  }
  return result;
}

}  // namespace barwall::io
