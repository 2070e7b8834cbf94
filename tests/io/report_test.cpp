#include "io/report.hpp"

#include <catch2/catch.hpp>

#include "io/html_table.hpp"
#include "io/printable_text.hpp"
#include "picture_support.hpp"

namespace barwall {
namespace {

const std::string& plate_report() {
  static const std::string page = io::report_html(test::plate_results(), "not a picture");
  return page;
}

}  // namespace

TEST_CASE("The report is well-formed") {
  CHECK_NOTHROW(test::parse_xml(plate_report()));
  CHECK_NOTHROW(test::parse_xml(io::report_html(test::alternating_plate_results(), "")));
  // The parser does find a fault.
  CHECK_THROWS(test::parse_xml(test::edited(plate_report(), "</main>", "")));
}

TEST_CASE("The report holds every figure's value") {
  for (const io::Results* results : {&test::plate_results(), &test::alternating_plate_results()}) {
    const std::string page = io::report_html(*results, "");
    for (const auto& [address, figure] : addresses(results->figures)) {
      INFO(address);
      const std::string value = io::escaped(io::shown(*figure));
      CHECK(test::count_of(page, value + "</td>") > 0);
    }
  }
  const std::string without = io::report_html(test::plate_results(), "");
  CHECK(test::count_of(without, ">123.4 mT</td>") == 0);
}

TEST_CASE("The report prints verdict, validity and limits together, above the picture") {
  const io::Results& results = test::plate_results();
  const std::size_t verdict = plate_report().find("<strong>" + results.verdict() + "</strong>");
  const std::size_t validity = plate_report().find("<strong>" + results.validity() + "</strong>");
  const std::size_t limits = plate_report().find("<strong>" + results.limits() + "</strong>");
  const std::size_t picture = plate_report().find("<img");
  CHECK(results.limits() == "exceeded");
  CHECK(verdict < validity);
  CHECK(validity < limits);
  CHECK(limits < picture);
  CHECK(picture != std::string::npos);
}

TEST_CASE("The report tells an unsound result not to be used") {
  io::Results results = test::plate_results();
  results.checks = {verify::make_check("invented check", 2.0, 1.0, "a test's own <check>")};
  const std::string page = io::report_html(results, "");
  CHECK(test::count_of(page, "do not use the numbers") == 1);
  CHECK(test::count_of(page, "a test&#39;s own &lt;check&gt;") == 1);
  CHECK(test::count_of(page, ">NO</td>") == 1);
}

TEST_CASE("The report escapes every text of the case") {
  CHECK(test::count_of(plate_report(), "<script") == 0);
  CHECK(test::count_of(plate_report(), "go &lt;script&gt;alert(1)&lt;\u2044script&gt;") > 2);
  CHECK(test::count_of(plate_report(), "<b>") == 0);
  CHECK(test::count_of(plate_report(), "Two &lt;b&gt;round&lt;/b&gt; bars &amp; a plate") == 3);
  CHECK(test::count_of(plate_report(), "the maker&#39;s &quot;data&quot; sheet") == 1);
}

TEST_CASE("The report refers to nothing outside itself") {
  for (const char* reference : {"http:", "https:", "href", "url(", "@import", "<link", "<iframe"}) {
    CHECK(test::count_of(plate_report(), reference) == 0);
  }
  CHECK(test::count_of(plate_report(), "src=\"") == 1);
  CHECK(test::count_of(plate_report(), "src=\"data:image/png;base64,bm90IGEgcGljdHVyZQ==\"") == 1);
}

TEST_CASE("The report names the model's limits, the notices and the case's data") {
  CHECK(test::count_of(plate_report(), test::plate_results().input.sha256) == 1);
  CHECK(test::count_of(plate_report(), "no skin") == 1);
  CHECK(test::count_of(plate_report(), "licensed engineer") == 1);
  const io::Results& short_run = test::alternating_plate_results();
  REQUIRE(short_run.validity() == "indicative");
  const std::string page = io::report_html(short_run, "");
  CHECK(test::count_of(page, "no losses") == 1);
  CHECK(test::count_of(page, "no heat figure is given") == 1);
  CHECK(test::count_of(plate_report(), "no heat figure is given") == 0);
  for (const solver::Notice& notice : short_run.figures.notices) {
    CHECK(test::count_of(page, io::escaped(notice.detail)) == 1);
  }
}

TEST_CASE("write_report sets the folder's picture into the page, the same bytes each time") {
  const test::ScratchFolder folder;
  folder.write("picture.png", "this one");
  io::write_report(test::plate_results(), folder.path());
  std::ifstream stream(folder.path() / "report.html", std::ios::binary);
  const std::string page(std::istreambuf_iterator<char>(stream), {});
  CHECK(page == io::report_html(test::plate_results(), "this one"));
}

TEST_CASE("Figures are shown with prefixes, degrees and shares, and as a dash when not given") {
  CHECK(io::shown({"b", 1.5e-4, "T"}) == "150.0 \u00b5T");
  CHECK(io::shown({"force_peak_at", 29.96, "deg"}) == "30.0\u00b0");
  CHECK(io::shown({"force_peak_direction", -0.01, "deg"}) == "0.0\u00b0");
  CHECK(io::shown({"of_limit", 0.63, "1"}) == "63 %");
  CHECK(io::shown({"force_x", solver::not_given, "N/m"}) == "-");
}

TEST_CASE("A table puts numbers to the right and is nothing without rows") {
  io::HtmlTable table("T", {"name", "value", "word"});
  CHECK(table.html().empty());
  table.row({"<a>", "-1.5 mT", "-x"});
  const std::string html = table.html();
  CHECK(test::count_of(html, "<th scope=\"row\">&lt;a&gt;</th>") == 1);
  CHECK(test::count_of(html, "<td class=\"number\">-1.5 mT</td><td>-x</td>") == 1);
  io::HtmlTable worded("T", {"name", "detail"}, {1});
  worded.row({"a", "240 points"});
  CHECK(test::count_of(worded.html(), "<td>240 points</td>") == 1);
}

}  // namespace barwall
