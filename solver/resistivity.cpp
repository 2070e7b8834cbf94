#include "solver/resistivity.hpp"

#include <string_view>

namespace barwall::solver {
namespace {

struct Typical {
  std::string_view material;
  double resistivity;  ///< [ohm m] at 20 degrees Celsius
};

constexpr Typical typical[] = {
    {"copper", 1.7241e-8},     // IEC 60028, annealed copper
    {"aluminium", 2.8264e-8},  // IEC 60889, hard-drawn wire
    {"brass", 6.5e-8},         // with some 37 % zinc; typical, from memory
    {"stainless", 7.2e-7},     // austenitic, 1.4301; typical of data sheets, from memory
};

constexpr double typical_of_steel = 1.5e-7;  // mild steel; typical, from memory

}  // namespace

std::optional<double> resistivity_of(const Material& material) {
  if (material.resistivity) return material.resistivity;
  if (material.magnetic()) return typical_of_steel;
  for (const Typical& row : typical) {
    if (row.material == material.name) return row.resistivity;
  }
  return {};
}

}  // namespace barwall::solver
