#pragma once

#include <cstddef>

namespace barwall::io {

/// Asks for memory and gives it back: for the sake of libraries that crash or wait for ever when
/// there is none left.
/// \throws std::bad_alloc when there is not as much
void require_memory(std::size_t bytes);

/// Makes OpenBLAS take its working memory now, once and for all. Left to itself it does so in the
/// midst of a factorization, and tries again for ever when there is none left. Ends its threads.
/// \throws std::bad_alloc when there is not enough memory
void claim_blas_memory();

}  // namespace barwall::io
