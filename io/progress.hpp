#pragma once

#include <cstdio>
#include <string>

namespace barwall::io {

/// The stages of a run on one line of a terminal, cleared at the end; silent when off.
class Progress {
public:
  explicit Progress(bool on, std::FILE* stream = stderr) : on_(on), stream_(stream) {}
  ~Progress() { clear(); }
  Progress(const Progress&) = delete;
  Progress& operator=(const Progress&) = delete;

  /// A stage begins.
  void stage(const std::string& name);
  void clear();

private:
  bool on_ = false;
  std::FILE* stream_ = nullptr;
  std::string line_;
};

}  // namespace barwall::io
