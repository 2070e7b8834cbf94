#include "io/version.hpp"

namespace barwall::io {

const char* version() {
  return BARWALL_VERSION;
}

}  // namespace barwall::io
