#include "io/progress.hpp"

#include <fmt/format.h>

namespace barwall::io {

void Progress::stage(const std::string& name) {
  if (!on_) return;
  line_ += (line_.empty() ? "barwall: " : " > ") + name;
  fmt::print(stream_, "\r{} ...", line_);
  std::fflush(stream_);
}

void Progress::clear() {
  if (!on_ || line_.empty()) return;
  fmt::print(stream_, "\r{}\r", std::string(line_.size() + 4, ' '));
  std::fflush(stream_);
  line_.clear();
}

}  // namespace barwall::io
