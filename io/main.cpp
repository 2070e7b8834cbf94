#include <cstdio>
#include <cstdlib>
#include <exception>
#include <new>

#include "io/command_line.hpp"

namespace {

/// Libraries beneath that get no memory or no thread say so and call exit(1): but 1 is the code of
/// a failed check.
void end_unfinished() {
  std::fputs("barwall: could not finish; a coarser [grid] or --threads 1 needs less memory\n",
             stderr);
  std::_Exit(3);
}

/// No exception leaves a parallel region or a library's thread; memory may run out there, too.
[[noreturn]] void end_uncaught() {
  try {
    if (std::current_exception()) throw;
  } catch (const std::bad_alloc&) {
    std::fputs("barwall: out of memory; a coarser [grid] needs less\n", stderr);
    std::_Exit(3);
  } catch (...) {
  }
  std::abort();
}

}  // namespace

int main(int argc, char** argv) {
  std::atexit(end_unfinished);
  std::set_terminate(end_uncaught);
  const int code = barwall::io::run_program(argc, argv);
  // Where memory is short a thread of OpenBLAS tries for ever to get some, and an orderly end would
  // wait for it.
  std::fflush(nullptr);
  std::_Exit(code);
}
