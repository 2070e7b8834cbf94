#include "io/deferred_stop.hpp"

#include "io/write_error.hpp"

namespace barwall::io {
namespace {

volatile std::sig_atomic_t noted_signal = 0;

extern "C" void barwall_note_signal(int signal) {
  noted_signal = signal;
}

}  // namespace

DeferredStop::DeferredStop() {
  noted_signal = 0;
  for (const int signal : {SIGINT, SIGTERM, SIGHUP, SIGXFSZ}) {
    Saved saved{signal, {}};
    sigaction(signal, nullptr, &saved.action);
    if (saved.action.sa_handler == SIG_IGN) continue;
    struct sigaction action {};
    action.sa_handler = signal == SIGXFSZ ? SIG_IGN : barwall_note_signal;
    action.sa_flags = SA_RESTART;
    sigaction(signal, &action, nullptr);
    saved_.push_back(saved);
  }
}

DeferredStop::~DeferredStop() {
  for (const Saved& saved : saved_) sigaction(saved.signal, &saved.action, nullptr);
  if (noted_signal != 0) std::raise(noted_signal);
}

void DeferredStop::check() const {
  if (noted_signal != 0) throw Stopped("stopped while writing; the folder is as it was");
}

}  // namespace barwall::io
