#pragma once

#include <unistd.h>

#include <filesystem>
#include <fstream>
#include <string>
#include <vector>

#include "io/case.hpp"
#include "io/input_error.hpp"

namespace barwall::test {

/// A folder of this process alone, removed at the end.
class ScratchFolder {
public:
  ScratchFolder()
      : path_(
            std::filesystem::temp_directory_path() /
            ("barwall-case-test-" + std::to_string(::getpid()) + "-" + std::to_string(count()++))) {
    std::filesystem::create_directories(path_);
  }
  ~ScratchFolder() {
    std::error_code ignored;
    std::filesystem::remove_all(path_, ignored);
  }
  ScratchFolder(const ScratchFolder&) = delete;
  ScratchFolder& operator=(const ScratchFolder&) = delete;

  const std::filesystem::path& path() const { return path_; }

  std::filesystem::path write(const std::string& name, const std::string& text) const {
    std::ofstream(path_ / name, std::ios::binary) << text;
    return path_ / name;
  }

private:
  /// Folders of one process that live at the same time have names of their own.
  static int& count() {
    static int made = 0;
    return made;
  }

  std::filesystem::path path_;
};

inline io::Case read_text(const std::string& text, const std::vector<io::Setting>& settings = {}) {
  const ScratchFolder folder;
  return io::read_case(folder.write("case.toml", text), settings);
}

/// The message of the InputError that a text raises, its folder cut off, or "none".
inline std::string fault_of(const std::string& text,
                            const std::vector<io::Setting>& settings = {}) {
  const ScratchFolder folder;
  const std::filesystem::path file = folder.write("case.toml", text);
  try {
    io::read_case(file, settings);
  } catch (const io::InputError& error) {
    std::string message = error.what();
    const std::string prefix = folder.path().string() + "/";
    if (message.rfind(prefix, 0) == 0) message.erase(0, prefix.size());
    return message;
  }
  return "none";
}

/// `text` with the first `from` replaced by `to`; an absent `from` gives an empty text, which is
/// no case.
inline std::string edited(std::string text, const std::string& from, const std::string& to) {
  const std::size_t found = text.find(from);
  return found == std::string::npos ? std::string() : text.replace(found, from.size(), to);
}

/// A case with every kind of table.
inline const std::string whole_case = R"(title = "Three flat bars in a trunking"
frequency_hz = 50
run_length_m = 3

[given]
pitch_mm = 60
half_mm = "pitch_mm / 2"

[material.trunking]
relative_permeability = 600

[[bar]]
name = "L1"
rectangle_mm = { centre = ["-pitch_mm", 0], size = [8, 80], turn_deg = 0 }

[[wall]]
name = "trunking"
material = "trunking"
frame_mm = { centre = [0, 0], outer = [320, 220], thickness = 3 }

[[bar]]
name = "L2"
rectangle_mm = { centre = [0, 0], size = [8, 80] }

[[bar]]
name = "L3"
round_mm = { centre = ["pitch_mm", 0], diameter = 40 }

[[bar]]
name = "N"
material = "aluminium"
rectangle_mm = { centres = [[-108, 0], [-92, 0]], size = [6, 60] }

[[three_phase]]
bars = ["L1", "L2", "L3"]
current_a = 1000
neutral = "N"

[[bar]]
name = "earth"
current_a = "balance"
tube_mm = { centre = [120, 0], outer_diameter = 20, thickness = 2 }

[[bar]]
name = "aux"
current_a = 10
phase_deg = 30
polygon_mm = [[-150, -100], [-140, -100], [-145, -90]]

[[opening]]
name = "gland slot"
through = ["trunking"]
rectangle_mm = { centre = [0, 108.5], size = [40, 10] }

[[probe]]
name = "sensor"
at_mm = [0, 95]
limit_ut = 200
limit_from = "the limit's own source"

[[probe]]
name = "office side"
from_mm = [-1000, 1000]
to_mm = [1000, 1000]
points = 101

[[probe]]
name = "one metre around"
distance_mm = 1000

[[loop]]
name = "pair"
go = ["L1"]
return = ["L2", "L3"]

[grid]
cells_across = 6
reach = 300

[fault]
between = ["L1", "L2", "L3"]
symmetrical_ka = 25
r_over_x = 0.1
closing_deg = "worst"

[supports]
span_mm = 300
strength_n = 6000
strength_from = "the support's own data sheet"
)";

/// One steady bar of 8 mm by 80 mm at the origin, for cases that add to it.
inline const std::string one_bar = R"([[bar]]
name = "A"
current_a = 100
rectangle_mm = { centre = [0, 0], size = [8, 80] }
)";

}  // namespace barwall::test
