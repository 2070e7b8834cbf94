#include <cstdio>
#include <cstdlib>

#include "io/command_line.hpp"

int main(int argc, char** argv) {
  const int code = barwall::io::run_program(argc, argv);
  // Out of memory, a thread of OpenBLAS tries for ever to get some, and an orderly end would wait
  // for it.
  if (code == 3) {
    std::fflush(nullptr);
    std::_Exit(code);
  }
  return code;
}
