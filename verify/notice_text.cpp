#include "verify/notice_text.hpp"

#include <fmt/format.h>

#include <algorithm>

namespace barwall::verify {

std::string quoted(const std::vector<std::string>& names) {
  constexpr std::size_t most = 4;
  const std::size_t count = std::min(most, names.size());
  std::string text;
  for (std::size_t k = 0; k < count; ++k) {
    const bool last = k + 1 == names.size();
    text += fmt::format("{}\"{}\"", k == 0 ? "" : last ? " and " : ", ", names[k]);
  }
  if (names.size() > most) text += fmt::format(" and {} more", names.size() - most);
  return text;
}

}  // namespace barwall::verify
