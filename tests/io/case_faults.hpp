#pragma once

#include <catch2/catch.hpp>

#include <string>
#include <vector>

#include "tests/io/case_support.hpp"

namespace barwall::test {

/// The case of every table with one thing changed, and what the message must say.
struct Fault {
  const char* from;
  const char* to;
  const char* place;  ///< LINE:COLUMN
  std::vector<const char*> said;
};

inline void check_faults(const std::vector<Fault>& faults) {
  REQUIRE(fault_of(whole_case) == "none");
  for (const Fault& fault : faults) {
    const std::string text = edited(whole_case, fault.from, fault.to);
    INFO("from: " << fault.from << "\n  to: " << fault.to);
    REQUIRE_FALSE(text.empty());
    const std::string message = fault_of(text);
    CHECK_THAT(message, Catch::StartsWith(std::string("case.toml:") + fault.place + ": "));
    for (const char* said : fault.said) CHECK_THAT(message, Catch::Contains(said));
  }
}

}  // namespace barwall::test
