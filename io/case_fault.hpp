#pragma once

#include <optional>

#include "io/case.hpp"
#include "io/case_parts.hpp"
#include "io/case_text.hpp"

namespace barwall::io {

/// Reads [fault]. `frequency_hz` is 0 for steady currents.
/// \throws InputError
std::optional<FaultRequest> read_fault(const CaseTable& root, const CaseParts& parts,
                                       double frequency_hz);

/// Reads [supports].
/// \throws InputError; also where the case has no [fault]
std::optional<SupportRequest> read_supports(const CaseTable& root);

}  // namespace barwall::io
