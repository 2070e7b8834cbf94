#pragma once

#include <sys/wait.h>

#include <algorithm>
#include <cstdlib>
#include <filesystem>
#include <fstream>
#include <sstream>
#include <string>
#include <vector>

namespace barwall::test {

inline std::string text_of_file(const std::filesystem::path& file) {
  std::ifstream stream(file, std::ios::binary);
  std::ostringstream text;
  text << stream.rdbuf();
  return text.str();
}

/// What a run of the built program did.
struct Run {
  int code = -1;  ///< exit code, or 1000 + signal
  std::string out;
  std::string err;
};

/// Runs the built program in a folder, through a shell: `before` stands in front of it, such as
/// "ulimit -f 8;".
inline Run run_barwall(const std::filesystem::path& folder, const std::string& arguments,
                       const std::string& before = "") {
  const std::string out = (folder / "stdout.txt").string();
  const std::string err = (folder / "stderr.txt").string();
  const std::string command = "cd '" + folder.string() + "' && { " + before + " '" +
                              BARWALL_BINARY_DIR "/io/barwall' " + arguments + "; } > '" + out +
                              "' 2> '" + err + "'";
  const int status = std::system(command.c_str());
  Run run;
  run.code = WIFEXITED(status) ? WEXITSTATUS(status) : 1000 + WTERMSIG(status);
  run.out = text_of_file(out);
  run.err = text_of_file(err);
  std::filesystem::remove(out);
  std::filesystem::remove(err);
  return run;
}

/// Names of what lies in a folder, sorted.
inline std::vector<std::string> names_in(const std::filesystem::path& folder) {
  std::vector<std::string> names;
  for (const auto& entry : std::filesystem::directory_iterator(folder)) {
    names.push_back(entry.path().filename().string());
  }
  std::sort(names.begin(), names.end());
  return names;
}

/// Two flat bars with opposite currents: small, quick and sound.
inline const std::string two_bars = R"(title = "Two flat bars"

[given]
gap_mm = 32

[[bar]]
name = "A"
current_a = 100
rectangle_mm = { centre = [0, 0], size = [8, 80] }

[[bar]]
name = "B"
current_a = "balance"
rectangle_mm = { centre = ["gap_mm + 8", 0], size = [8, 80] }

[[probe]]
name = "sensor"
at_mm = [20, 95]

[[probe]]
name = "beside, above"
from_mm = [-100, 120]
to_mm = [100, 120]
points = 5
)";

/// The same on a grid too coarse to pass its checks.
inline const std::string coarse_bars = two_bars + "\n[grid]\ncells_across = 2\n";

}  // namespace barwall::test
