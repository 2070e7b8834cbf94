#include "io/memory.hpp"

#include <cstdlib>
#include <new>

extern "C" {
void openblas_set_num_threads(int);
int blas_thread_shutdown_() __attribute__((weak));  // not in OpenBLAS without threads
void dpotrf_(const char* triangle, const int* size, double* matrix, const int* leading, int* info);
}

namespace barwall::io {

void require_memory(std::size_t bytes) {
  // Volatile: an allocation that is never used may be optimized away.
  void* volatile trial = std::malloc(bytes);
  if (trial == nullptr) throw std::bad_alloc();
  std::free(trial);
}

void claim_blas_memory() {
  // OpenBLAS takes 128 MiB and a page; asked for first with some room beside it.
  require_memory(std::size_t{160} << 20U);
  openblas_set_num_threads(1);
  // Its threads take as much each, and one that comes late would take what is claimed here.
  if (blas_thread_shutdown_ != nullptr) blas_thread_shutdown_();
  const int size = 1;
  double matrix = 1.0;
  int info = 0;
  dpotrf_("L", &size, &matrix, &size, &info);
}

}  // namespace barwall::io
