#include "verify/skin_depth.hpp"

#include <fmt/format.h>

#include <algorithm>
#include <array>
#include <cmath>
#include <numbers>
#include <string>

#include "solver/constants.hpp"
#include "solver/resistivity.hpp"
#include "verify/notice_text.hpp"

namespace barwall::verify {
namespace {

double largest_permeability(const solver::Material& material) {
  double largest = material.relative_permeability;
  if (!material.saturable()) return largest;
  for (const solver::BhPoint& row : material.curve->points()) {
    if (row.field == 0.0) continue;
    largest = std::max(largest, row.flux_density / (solver::mu_0 * row.field));
  }
  return largest;
}

std::string words_for(const solver::Material& material) {
  if (!material.magnetic()) return material.name;
  return fmt::format("steel of mu_r {:.4g}{}", largest_permeability(material),
                     material.saturable() ? ", the largest of its B-H table" : "");
}

/// A part thicker than its skin depth [m].
struct Thick {
  std::string name;
  double thickness = 0.0;
  double depth = 0.0;
  std::string in;
};

constexpr const char* of_bars =
    "current then crowds to the surface instead of filling the bar: forces between close bars "
    "differ, and inductances are usually smaller than given";
constexpr const char* of_walls =
    "eddy currents then shield, which a static field leaves out: the field outside is usually "
    "smaller than given, and their forces on the wall are missing";
constexpr const char* of_steel =
    "flux then keeps to a skin: B at the surface is usually higher than the mean given, a closed "
    "enclosure usually shields better, and the field near slots and edges differs";

bool alike(const Thick& a, const Thick& b) {
  return std::abs(a.thickness - b.thickness) <= 1e-6 * a.thickness && a.in == b.in;
}

solver::Notice notice_of(const std::vector<Thick>& parts, double frequency, const char* errs) {
  std::vector<std::string> names;
  const Thick* worst = &parts.front();
  bool all_alike = true;
  for (const Thick& part : parts) {
    names.push_back(part.name);
    all_alike = all_alike && alike(part, parts.front());
    const double excess = part.thickness / part.depth;
    if (excess > worst->thickness / worst->depth * (1.0 + 1e-6)) worst = &part;
  }
  return {"skin depth",
          fmt::format("{} {} thicker than the skin depth at {:g} Hz{}: {:.3g} mm against {:.3g} mm "
                      "in {}; {}",
                      quoted(names), names.size() == 1 ? "is" : "are", frequency,
                      all_alike ? "" : fmt::format(", most of all \"{}\"", worst->name),
                      1e3 * worst->thickness, 1e3 * worst->depth, worst->in, errs),
          true};
}

}  // namespace

double conductor_thickness(const mesh::Shape& shape) {
  // A polygon's narrowest place may be a mere notch; twice the area over the perimeter is the
  // thickness of a strip and never more than that of its widest place.
  const double narrowest = mesh::thickness(shape);
  if (!std::holds_alternative<mesh::Polygon>(shape)) return narrowest;
  double perimeter = 0.0;
  const auto chains = boundary(shape);
  for (const mesh::Curve& side : chains.front()) perimeter += length(side);
  return std::max(narrowest, 2.0 * area(shape) / perimeter);
}

double conductor_thickness(const mesh::Part& part) {
  double thickest = 0.0;
  for (const mesh::Shape& piece : part.pieces) {
    thickest = std::max(thickest, conductor_thickness(piece));
  }
  return thickest;
}

double skin_depth(double resistivity, double relative_permeability, double frequency_hz) {
  const double w = 2.0 * std::numbers::pi * frequency_hz;
  return std::sqrt(2.0 * resistivity / (w * solver::mu_0 * relative_permeability));
}

std::vector<solver::Notice> skin_depth_notices(const solver::Problem& problem) {
  if (!problem.excitation.alternating()) return {};
  const double frequency = problem.excitation.frequency_hz;
  std::array<std::vector<Thick>, 3> kinds;
  for (const int index : visible_parts(problem.outline)) {
    const auto k = static_cast<std::size_t>(index);
    const mesh::Part& part = problem.section.parts[k];
    const solver::Material& material = problem.materials[k];
    const auto resistivity = resistivity_of(material);
    if (!resistivity) continue;
    const double depth = skin_depth(*resistivity, largest_permeability(material), frequency);
    const double thickest = conductor_thickness(part);
    if (thickest <= depth) continue;
    const bool bar = part.kind == mesh::Part::Kind::bar;
    kinds[bar                   ? 0
          : material.magnetic() ? 2
                                : 1]
        .push_back({part.name, thickest, depth, words_for(material)});
  }
  constexpr std::array errs = {of_bars, of_walls, of_steel};
  std::vector<solver::Notice> notices;
  for (std::size_t kind = 0; kind < kinds.size(); ++kind) {
    if (!kinds[kind].empty()) notices.push_back(notice_of(kinds[kind], frequency, errs[kind]));
  }
  return notices;
}

}  // namespace barwall::verify
