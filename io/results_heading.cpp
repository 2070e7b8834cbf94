#include "io/results_heading.hpp"

#include <fmt/format.h>

#include "io/page.hpp"
#include "io/page_text.hpp"

namespace barwall::io {

void draw_heading_of(Canvas& canvas, const Results& results) {
  const std::string verdict = results.verdict();
  const bool sound = verdict == "sound";
  std::string state = fmt::format("{}:  verdict {},  validity {},  limits {}", results.input.name,
                                  verdict, results.validity(), results.limits());
  if (!sound) state += "  \u2013  a check failed: do not use the numbers";
  draw_heading(canvas, results.input.title, state, sound ? pale_ink : colour_of(0xb03a00),
               left_margin, frame_width);
}

}  // namespace barwall::io
