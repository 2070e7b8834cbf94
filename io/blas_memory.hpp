#pragma once

namespace barwall::io {

/// Makes OpenBLAS take its working memory now, once and for all. Left to itself it does so in the
/// midst of a factorization, and tries again for ever when there is none left.
/// \throws std::bad_alloc when there is not enough memory
void claim_blas_memory();

}  // namespace barwall::io
