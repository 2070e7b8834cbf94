#include "io/case_currents.hpp"

#include <fmt/format.h>

#include <complex>
#include <cstddef>
#include <string>

#include "io/degrees.hpp"

namespace barwall::io {

namespace {

constexpr Allowed any_current{-1e12, 1e12, true, " A"};
constexpr Allowed any_frequency{0.0, 1e12, false, " Hz"};

/// The phasor of a magnitude at an angle in degrees, without negative zeros.
std::complex<double> phasor(double magnitude, double degrees) {
  return {magnitude * cos_degrees(degrees) + 0.0, magnitude * sin_degrees(degrees) + 0.0};
}

std::string title_of(const CaseParts& parts, int part) {
  return fmt::format("bar \"{}\"", parts.section.parts[static_cast<std::size_t>(part)].name);
}

/// Collects the currents, each given once.
class Currents {
public:
  Currents(const CaseText& text, const CaseParts& parts)
      : text_(text), parts_(parts), given_(parts.tables.size(), false) {
    result.excitation.current.resize(parts.tables.size());
  }

  CaseCurrents result;

  void set(int part, std::complex<double> current, Place place) {
    if (given(part)) {
      text_.fail(place, fmt::format("the current of {} is given twice", title_of(parts_, part)));
    }
    given_[static_cast<std::size_t>(part)] = true;
    result.excitation.current[static_cast<std::size_t>(part)] = current;
  }

  bool given(int part) const { return given_[static_cast<std::size_t>(part)]; }

private:
  const CaseText& text_;
  const CaseParts& parts_;
  std::vector<bool> given_;
};

void read_circuit(const CaseTable& table, const CaseParts& parts, Currents& currents) {
  const CaseText& text = table.text();
  const TomlValue& bars = table.require("bars");
  solver::Circuit circuit;
  circuit.bars = read_part_list(parts, text, bars, "bars", mesh::Part::Kind::bar);
  if (circuit.bars.size() != 3) {
    text.fail(bars.place, fmt::format("bars names {} bars; a [[three_phase]] has three, in phase "
                                      "order",
                                      circuit.bars.size()));
  }
  const double magnitude = read_number(text, table.require("current_a"), "current_a", any_current);
  std::complex<double> sum;
  const TomlArray& names = std::get<TomlArray>(bars.content);
  for (std::size_t phase = 0; phase < 3; ++phase) {
    const double degrees[] = {0.0, -120.0, 120.0};
    const std::complex<double> current = phasor(magnitude, degrees[phase]);
    sum += current;
    currents.set(circuit.bars[phase], current, names[phase].place);
  }
  if (const TomlEntry* neutral = table.find("neutral")) {
    circuit.neutral = read_part(parts, text, neutral->value, "neutral", mesh::Part::Kind::bar);
    // 0 - sum, not -sum: no negative zero.
    currents.set(circuit.neutral, 0.0 - sum, neutral->value.place);
  }
  currents.result.circuits.push_back(std::move(circuit));
}

bool is_balance(const TomlEntry& entry) {
  const auto* word = std::get_if<std::string>(&entry.value.content);
  return word != nullptr && *word == "balance";
}

/// Reads current_a and phase_deg of one bar.
/// \return true when the current is "balance"
bool read_bar_current(const CaseTable& table, int part, const CaseParts& parts,
                      Currents& currents) {
  const CaseText& text = table.text();
  const bool alternating = currents.result.excitation.alternating();
  const TomlEntry* current = table.find("current_a");
  const TomlEntry* phase = table.find("phase_deg");
  if (phase != nullptr && !alternating) {
    text.fail(phase->place,
              fmt::format("phase_deg of {} needs a frequency_hz", title_of(parts, part)));
  }
  if (current == nullptr) {
    if (!currents.given(part)) {
      text.fail(table.header(), fmt::format("{} has no current; give current_a, or name it in a "
                                            "[[three_phase]]",
                                            title_of(parts, part)));
    }
    if (phase != nullptr) {
      text.fail(phase->place, fmt::format("phase_deg of {}, whose current a [[three_phase]] gives",
                                          title_of(parts, part)));
    }
    return false;
  }
  if (is_balance(*current)) {
    if (phase != nullptr) {
      text.fail(phase->place, fmt::format("phase_deg of {}, whose current is the balance of all "
                                          "others",
                                          title_of(parts, part)));
    }
    currents.set(part, 0.0, current->place);
    return true;
  }
  const double magnitude = read_number(text, current->value, "current_a", any_current);
  const double degrees = phase == nullptr ? 0.0 : read_number(text, phase->value, "phase_deg", {});
  currents.set(part, phasor(magnitude, degrees), current->place);
  return false;
}

}  // namespace

CaseCurrents read_currents(const CaseTable& root, const CaseParts& parts) {
  const CaseText& text = root.text();
  Currents currents(text, parts);
  solver::Excitation& excitation = currents.result.excitation;
  if (const TomlEntry* frequency = root.find("frequency_hz")) {
    excitation.frequency_hz = read_number(text, frequency->value, "frequency_hz", any_frequency);
  }
  for (const TomlValue* value : tables_of(root, "three_phase")) {
    const CaseTable table(text, *value, "[[three_phase]]", {"bars", "current_a", "neutral"});
    if (!excitation.alternating()) {
      text.fail(table.header(), "a [[three_phase]] needs a frequency_hz");
    }
    read_circuit(table, parts, currents);
  }

  int balance = -1;
  for (std::size_t k = 0; k < parts.tables.size(); ++k) {
    const int part = static_cast<int>(k);
    if (!parts.is_bar(part) || !read_bar_current(parts.tables[k], part, parts, currents)) continue;
    if (balance >= 0) {
      text.fail(parts.tables[k].find("current_a")->value.place,
                fmt::format("current_a of {} is \"balance\", as that of {} is already; only one "
                            "bar can balance the others",
                            title_of(parts, part), title_of(parts, balance)));
    }
    balance = part;
  }
  if (balance >= 0) {
    std::complex<double> sum;
    for (const std::complex<double> current : excitation.current) sum += current;
    excitation.current[static_cast<std::size_t>(balance)] = 0.0 - sum;
  }
  return std::move(currents.result);
}

}  // namespace barwall::io
