#pragma once

namespace barwall::io {

/// The program: reads the command line, does what it asks, reports, and returns the exit code.
int run_program(int argc, char** argv);

}  // namespace barwall::io
