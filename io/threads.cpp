#include "io/threads.hpp"

#include <fmt/format.h>
#include <omp.h>
#include <pthread.h>

#include <cstdio>
#include <mutex>
#include <vector>

namespace barwall::io {
namespace {

void* wait_at(void* gate) {
  const std::lock_guard<std::mutex> pass(*static_cast<std::mutex*>(gate));
  return nullptr;
}

/// True when so many threads can run beside this one. Plain POSIX threads: those of the standard
/// library free memory of their own, for which each would take an address space to keep.
bool can_run(int count) {
  std::mutex gate;
  std::vector<pthread_t> threads(static_cast<std::size_t>(count));
  std::size_t started = 0;
  {
    const std::lock_guard<std::mutex> closed(gate);
    while (started < threads.size() &&
           pthread_create(&threads[started], nullptr, wait_at, &gate) == 0) {
      ++started;
    }
  }
  for (std::size_t k = 0; k < started; ++k) pthread_join(threads[k], nullptr);
  return started == threads.size();
}

}  // namespace

void set_threads(int count) {
  if (count == 0) count = omp_get_max_threads();
  if (count > 1 && !can_run(count - 1)) {
    fmt::print(stderr, "barwall: the system does not give {} threads; computing with one\n", count);
    count = 1;
  }
  omp_set_num_threads(count);
  // Serial even where a library asks for a number of its own.
  if (count == 1) omp_set_max_active_levels(0);
}

}  // namespace barwall::io
