#pragma once

#include <csignal>
#include <vector>

namespace barwall::io {

/// While it lives, SIGINT, SIGTERM and SIGHUP are noted and take effect at its end, so that what
/// is written meanwhile is either finished or cleaned up; a file that outgrows its allowed size
/// fails to be written instead of ending the program. One at a time.
class DeferredStop {
public:
  DeferredStop();
  ~DeferredStop();
  DeferredStop(const DeferredStop&) = delete;
  DeferredStop& operator=(const DeferredStop&) = delete;

  /// \throws Stopped when the program was asked to stop
  void check() const;

private:
  struct Saved {
    int signal = 0;
    struct sigaction action {};
  };
  std::vector<Saved> saved_;
};

}  // namespace barwall::io
