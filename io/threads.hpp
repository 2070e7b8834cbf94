#pragma once

namespace barwall::io {

/// Makes all that follows compute with `count` threads, as many as there are processors where it
/// is 0. Where the system does not give as many, it computes with one and says so on the standard
/// error: OpenMP by itself would end the program.
void set_threads(int count);

}  // namespace barwall::io
