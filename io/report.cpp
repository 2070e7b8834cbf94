#include "io/report.hpp"

#include <fmt/format.h>

#include <algorithm>
#include <cmath>
#include <fstream>
#include <sstream>

#include "io/fault_picture.hpp"
#include "io/picture.hpp"
#include "io/printable_text.hpp"
#include "io/quantity_text.hpp"
#include "io/report_tables.hpp"
#include "io/results_folder.hpp"
#include "io/version.hpp"

namespace barwall::io {
namespace {

constexpr const char* style = R"(
@page { size: A4; margin: 14mm; }
body { font: 15px/1.45 "Helvetica Neue", Arial, "Liberation Sans", sans-serif; color: #1a1a1f;
       max-width: 62rem; margin: 0 auto; padding: 1rem; }
h1 { font-size: 1.7rem; margin: 0.4rem 0 0.1rem; overflow-wrap: anywhere; }
h2 { font-size: 1.2rem; margin: 1.8rem 0 0.5rem; border-bottom: 2px solid #31688e; }
.of { color: #55555c; margin: 0 0 1rem; overflow-wrap: anywhere; }
.state { display: flex; flex-wrap: wrap; gap: 0.6rem; margin: 0; }
.state div { flex: 1 1 14rem; border: 1px solid #c4c4cc; border-left: 6px solid #31688e;
             padding: 0.4rem 0.8rem; }
.state .bad { border-left-color: #d55e00; }
.state dt { font-size: 0.85rem; color: #55555c; }
.state dd { margin: 0; }
.state strong { font-size: 1.15rem; }
figure { margin: 1.2rem 0; }
img { width: 100%; height: auto; }
figcaption { font-size: 0.9rem; color: #55555c; }
table { border-collapse: collapse; min-width: 45%; max-width: 100%; margin: 0.6rem 0 1.2rem; font-size: 0.88rem; }
caption { text-align: left; font-weight: bold; padding: 0.2rem 0; }
th, td { text-align: left; vertical-align: top; padding: 0.22rem 0.5rem;
         border-bottom: 1px solid #dcdce2; overflow-wrap: break-word; }
thead th { background: #eef2f6; border-bottom: 1px solid #9a9aa4; font-weight: normal; }
tbody th { font-weight: bold; min-width: 4rem; max-width: 18rem; overflow-wrap: anywhere; }
.number { text-align: right; }
td.number { white-space: nowrap; font-variant-numeric: tabular-nums; }
dt { font-weight: bold; }
.wide { overflow-x: auto; }
@media print {
  .state { flex-wrap: nowrap; }
  .state div { flex: 1 1 0; }
  body { font-size: 9.5pt; max-width: none; padding: 0; }
  .wide { overflow: visible; }
  table { font-size: 7.5pt; }
  th, td { padding: 0.15rem 0.3rem; }
  tr, figure, .state div { break-inside: avoid; }
  h2, caption { break-after: avoid; }
  img { max-height: 180mm; object-fit: contain; }
}
)";

std::string state_box(const std::string& what, const std::string& state, const std::string& means,
                      bool bad) {
  return fmt::format("<div{}><dt>{}</dt><dd><strong>{}</strong><br/>{}</dd></div>\n",
                     bad ? " class=\"bad\"" : "", what, escaped(state), escaped(means));
}

std::string state_boxes(const Results& results) {
  const std::string verdict = results.verdict();
  const std::string validity = results.validity();
  const std::string limits = results.limits();
  const auto passed = std::count_if(results.checks.begin(), results.checks.end(),
                                    [](const verify::Check& check) { return check.passed; });
  const std::string count = fmt::format("{} of {} checks passed: ", passed, results.checks.size());
  const std::string limits_mean = limits == "none"  ? "no limit was set"
                                  : limits == "met" ? "every limit is met"
                                  : limits == "exceeded"
                                      ? "at least one limit is exceeded"
                                      : "the numerical uncertainty does not let a limit be decided";
  return "<dl class=\"state\">\n" +
         state_box("Verdict", verdict,
                   count + (verdict == "sound" ? "the numbers are right for the model"
                                               : "do not use the numbers"),
                   verdict != "sound") +
         state_box("Validity", validity,
                   validity == "full" ? "no notice speaks against the model for this case"
                                      : "the model fits this case only roughly: see the notices",
                   validity != "full") +
         state_box("Limits", limits, limits_mean, limits == "exceeded" || limits == "undecided") +
         "</dl>\n";
}

std::string section(const std::string& heading, const std::string& content) {
  if (content.empty()) return "";
  return fmt::format("<section>\n<h2>{}</h2>\n<div class=\"wide\">\n{}</div>\n</section>\n",
                     heading, content);
}

constexpr const char* explanations_of_forces =
    "<p>Forces act per metre of run, x to the right and y up; \"-\" stands for a force that is not "
    "given, such as that on a single part in contact with another, whose body is listed "
    "instead.</p>\n";

/// A picture within the page itself. \param alt says what it shows, escaped
std::string figure(const std::string& alt, const std::string& png) {
  return fmt::format("<figure>\n<img alt=\"{}\" src=\"data:image/png;base64,{}\"/>\n</figure>\n",
                     alt, base64(png));
}

std::string fault_section(const Results& results, const std::string& fault_png) {
  std::string content = fault_tables(results);
  if (results.fault_over_time()) {
    content += figure(
        "Forces on the bars of the short circuit, and their currents, over the time since closing",
        fault_png);
  }
  return content;
}

std::string model(const Results& results) {
  std::string text =
      "<p>The numbers describe a straight, endless run: a two-dimensional magnetostatic field of "
      "the cross-section, every bar's current spread evenly over its area, walls of the stated "
      "permeability or magnetising curve, without hysteresis, open air all round. There are no "
      "eddy currents, no skin and no proximity "
      "effect";
  text += results.alternating()
              ? ", and so no losses: the field follows the currents at every instant, and no heat "
                "figure is given. Real conducting walls at this frequency shield and heat by eddy "
                "currents.</p>\n"
              : ".</p>\n";
  text +=
      "<p>Bends, joints, supports, ends of the run and neighbouring equipment are outside the "
      "model. Forces in a short circuit need the short circuit's own currents and the mechanical "
      "response of the structure.</p>\n"
      "<p>These figures support the judgement of a qualified engineer. They do not replace a "
      "licensed engineer where the law asks for one, the code that applies at the place of "
      "installation, or the type test.</p>\n";
  return text;
}

std::string file_bytes(const std::filesystem::path& file) {
  std::ifstream stream(file, std::ios::binary);
  std::ostringstream bytes;
  bytes << stream.rdbuf();
  return bytes.str();
}

}  // namespace

std::string shown(const solver::Figure& figure) {
  if (!std::isfinite(figure.value)) return "-";
  if (figure.unit == "deg")
    return fmt::format("{:.1f}°", std::round(10.0 * figure.value) / 10.0 + 0.0);
  if (figure.unit == "1") return fmt::format("{:.4g} %", 100.0 * figure.value);
  return quantity_text(figure);
}

std::string report_html(const Results& results, const std::string& picture_png,
                        const std::string& fault_png) {
  const std::string title = escaped(results.input.title);
  std::string page = fmt::format(
      "<!DOCTYPE html>\n<html lang=\"en\">\n<head>\n<meta charset=\"utf-8\"/>\n"
      "<meta http-equiv=\"Content-Security-Policy\" content=\"default-src 'none'; img-src data:; "
      "style-src 'unsafe-inline'\"/>\n"
      "<meta name=\"viewport\" content=\"width=device-width, initial-scale=1\"/>\n"
      "<title>{}</title>\n<style>{}</style>\n</head>\n<body>\n<header>\n<h1>{}</h1>\n"
      "<p class=\"of\">Case {}, solved by barwall {}</p>\n</header>\n<main>\n",
      title, style, title, escaped(results.input.name), escaped(version()));
  page += state_boxes(results);
  page += figure(fmt::format("Section of {} with its magnetic flux density in colours, flux lines, "
                             "forces and names",
                             title),
                 picture_png);
  const std::string forces = force_tables(results);
  page += section("Forces", forces.empty() ? "" : explanations_of_forces + forces);
  page += section("Short circuit", fault_section(results, fault_png));
  page += section("Hand values", hand_table(results));
  page += section("Field and limits", probe_tables(results));
  page += section("Inductance, reactance and energy", circuit_tables(results));
  page += section("Bars, walls and clearances", part_tables(results));
  page += section("Push on the walls", push_tables(results));
  page += section("Checks", check_table(results));
  page += section("Notices", notice_list(results));
  page += section("Case data", case_tables(results));
  page += section("The model and its limits", model(results));
  page += "</main>\n</body>\n</html>\n";
  return page;
}

void write_report(const Results& results, const std::filesystem::path& folder) {
  const auto drawn = [&](const char* name, Pictures (*draw)(const Results&)) {
    const std::filesystem::path file = folder / name;
    return std::filesystem::is_regular_file(file) ? file_bytes(file) : draw(results).png;
  };
  const std::string fault =
      results.fault_over_time() ? drawn("fault.png", draw_fault_pictures) : std::string();
  write_text(folder / "report.html",
             report_html(results, drawn("picture.png", draw_pictures), fault));
}

}  // namespace barwall::io
