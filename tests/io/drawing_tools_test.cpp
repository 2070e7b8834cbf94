#include <catch2/catch.hpp>
#include <cmath>

#include "io/frame.hpp"
#include "io/label_placement.hpp"
#include "io/page_text.hpp"
#include "io/printable_text.hpp"
#include "io/scales.hpp"
#include "io/svg_ids.hpp"
#include "picture_support.hpp"

namespace barwall {

TEST_CASE("viridis begins and ends as published and grows lighter throughout") {
  // S. van der Walt and N. Smith, 2015: the table's ends (0.267004, 0.004874, 0.329415) and
  // (0.993248, 0.906157, 0.143936), from memory.
  const io::Colour first = io::colour_of(io::viridis_rgb(0));
  const io::Colour last = io::colour_of(io::viridis_rgb(io::viridis_count - 1));
  const double half_step = 0.5 / 255.0 + 1e-9;
  CHECK(std::abs(first.red - 0.267004) <= half_step);
  CHECK(std::abs(first.green - 0.004874) <= half_step);
  CHECK(std::abs(first.blue - 0.329415) <= half_step);
  CHECK(std::abs(last.red - 0.993248) <= half_step);
  CHECK(std::abs(last.green - 0.906157) <= half_step);
  CHECK(std::abs(last.blue - 0.143936) <= half_step);
  const auto lightness = [](int k) {
    const io::Colour c = io::colour_of(io::viridis_rgb(k));
    return 0.2126 * std::pow(c.red, 2.2) + 0.7152 * std::pow(c.green, 2.2) +
           0.0722 * std::pow(c.blue, 2.2);
  };
  for (int k = 4; k < io::viridis_count; ++k) CHECK(lightness(k) > lightness(k - 4));
}

TEST_CASE("Positions on the colour scale keep to its ends") {
  CHECK(io::viridis_index(-3.0) == 0);
  CHECK(io::viridis_index(std::nan("")) == 0);
  CHECK(io::viridis_index(-HUGE_VAL) == 0);
  CHECK(io::viridis_index(0.5) == 128);
  CHECK(io::viridis_index(1.0) == 255);
  CHECK(io::viridis_index(HUGE_VAL) == 255);
}

TEST_CASE("Round numbers are 1, 2 and 5 times powers of ten") {
  CHECK(io::round_down_125(1.0) == 1.0);
  CHECK(io::round_down_125(0.0499) == 0.02);
  CHECK(io::round_down_125(999.0) == 500.0);
  CHECK(io::round_up_125(999.0) == 1000.0);
  CHECK(io::round_up_125(0.011) == 0.02);
  CHECK(io::round_up_125(1e-7) == 1e-7);
  CHECK(io::plain_number(0.05) == "0.05");
  CHECK(io::plain_number(2e6) == "2000000");
  CHECK(io::plain_number(2e-7) == "0.0000002");
  CHECK(io::plain_number(-150.0) == "\u2212150");
  CHECK(io::plain_number(-0.0) == "0");
  const io::RoundTicks ticks = io::round_ticks(-160.0, 160.0, 8);
  CHECK(ticks.step == 50.0);
  REQUIRE(ticks.places.size() == 7);
  CHECK(ticks.places.front() == -150.0);
  CHECK(io::prefixed_unit(0.02, "T").name == "mT");
  CHECK(io::prefixed_unit(1e-3, "T").name == "mT");
  CHECK(io::prefixed_unit(0.0, "T").name == "T");
}

TEST_CASE("A field's scale has round ends, holds nearly all values and at most four decades") {
  std::vector<float> values;
  for (int k = 1; k <= 10000; ++k) values.push_back(1e-6f * static_cast<float>(k));
  values.push_back(7.0f);  // a corner's peak
  values.push_back(0.0f);
  const io::LogScale scale = io::log_scale_of(values);
  CHECK(scale.high == Approx(1e-2));
  CHECK(scale.low == Approx(1e-4));
  CHECK(scale.position(scale.low) == 0.0);
  CHECK(scale.position(scale.high) == Approx(1.0));
  CHECK(scale.value(scale.position(3e-4)) == Approx(3e-4));
  const auto marks = io::scale_marks(scale);
  REQUIRE(marks.size() == 7);
  CHECK(marks[1].value == Approx(2e-4));
  CHECK(marks[3].decade);
  const io::LogScale wide = io::log_scale_of({1e-12f, 1e-12f, 1.0f, 1.0f});
  CHECK(wide.high / wide.low == Approx(1e4));
  const io::LogScale narrow = io::log_scale_of({1.0f, 1.0f, 1.0f});
  CHECK(narrow.high / narrow.low == Approx(10.0));
  CHECK(io::log_scale_of({0.0f}).high > io::log_scale_of({}).low);
}

TEST_CASE("A frame keeps the aspect, holds the section and maps both ways") {
  for (const mesh::Box& box : {mesh::Box{{-1.0, -0.01}, {1.0, 0.01}},
                               mesh::Box{{3.0, 4.0}, {3.01, 5.0}}, mesh::Box{{0, 0}, {1, 0.7}}}) {
    const io::Frame frame = io::frame_round(box, {100.0, 50.0}, 1400, 460, 1080);
    CHECK(frame.box.width() == 1400.0);
    CHECK(frame.box.height() >= 460.0);
    CHECK(frame.box.height() <= 1080.0);
    CHECK(frame.window.contains(box.low));
    CHECK(frame.window.contains(box.high));
    CHECK(frame.box.height() / frame.window.height() == Approx(frame.scale()));
    const mesh::Point there = frame.section(frame.page(box.high));
    CHECK(there.x == Approx(box.high.x));
    CHECK(there.y == Approx(box.high.y));
    CHECK(frame.page(box.high).y < frame.page(box.low).y);
  }
}

TEST_CASE("Labels overlap neither each other nor what is blocked, and far ones have leaders") {
  const io::PageBox page{{0.0, 0.0}, {600.0, 400.0}};
  io::LabelPlacement labels(page);
  const io::PageBox mark{{280.0, 180.0}, {320.0, 220.0}};
  labels.block(mark);
  std::vector<io::PageBox> placed = {mark};
  int leaders = 0;
  for (int k = 0; k < 25; ++k) {
    const io::PageBox about{{270.0 + k % 5, 170.0}, {330.0 - k % 5, 230.0}};
    const std::vector<io::PagePoint> edge = {
        about.low, {about.high.x, about.low.y}, about.high, {about.low.x, about.high.y}};
    const auto label = labels.place(60.0, 20.0, about, true, edge);
    if (!label) continue;
    for (const io::PageBox& other : placed) CHECK_FALSE(io::close(label->box, other, 0.0));
    CHECK(label->box.low.x >= 0.0);
    CHECK(label->box.high.y <= 400.0);
    leaders += label->leader ? 1 : 0;
    placed.push_back(label->box);
  }
  CHECK(placed.size() > 8);
  CHECK(leaders > 4);
}

TEST_CASE("A label that fits stands within its part, and none is forced where there is no room") {
  io::LabelPlacement labels({{0.0, 0.0}, {300.0, 300.0}});
  const io::PageBox about{{100.0, 100.0}, {200.0, 200.0}};
  const auto label = labels.place(60.0, 20.0, about, true, {about.low, about.high});
  REQUIRE(label);
  CHECK(about.contains(label->box.low));
  CHECK(about.contains(label->box.high));
  CHECK_FALSE(label->leader);
  CHECK_FALSE(labels.place(400.0, 20.0, about, true, {}));
}

TEST_CASE("Texts are printable whatever bytes they hold") {
  CHECK(io::printable("a\nb\tc") == "a b c");
  CHECK(io::printable("\xff\xc3") == "??");
  CHECK(io::printable("\xc0\xaf") == "??");       // overlong
  CHECK(io::printable("\xed\xa0\x80") == "???");  // a surrogate
  CHECK(io::printable("M\u00fcller \u26a1") == "M\u00fcller \u26a1");
  CHECK(io::escaped("<a href=\"x\">'&") == "&lt;a href=&quot;x&quot;&gt;&#39;&amp;");
}

TEST_CASE("base64 gives the test vectors of RFC 4648") {
  CHECK(io::base64("") == "");
  CHECK(io::base64("f") == "Zg==");
  CHECK(io::base64("fo") == "Zm8=");
  CHECK(io::base64("foo") == "Zm9v");
  CHECK(io::base64("foob") == "Zm9vYg==");
  CHECK(io::base64("fooba") == "Zm9vYmE=");
  CHECK(io::base64("foobar") == "Zm9vYmFy");
}

TEST_CASE("One drawing gives PNG, SVG and PDF, also of texts that are no UTF-8") {
  for (const auto kind : {io::Canvas::Kind::png, io::Canvas::Kind::svg, io::Canvas::Kind::pdf}) {
    io::Canvas canvas(kind, 120, 80);
    canvas.text({10.0, 40.0}, "\xff bad \xc3", {});
    canvas.line({{0.0, 0.0}, {120.0, 80.0}}, {{1.0, 0.0, 0.0, 1.0}, 3.0, {}});
    const std::string bytes = canvas.bytes();
    switch (kind) {
      case io::Canvas::Kind::png: {
        const io::Bitmap bitmap = test::read_png(bytes);
        CHECK(bitmap.height == 80);
        CHECK(test::pixel(bitmap, {60.5, 40.5}) == 0xff0000);
        break;
      }
      case io::Canvas::Kind::svg:
        CHECK_NOTHROW(test::parse_xml(bytes));
        break;
      case io::Canvas::Kind::pdf:
        CHECK(bytes.rfind("%PDF", 0) == 0);
        break;
    }
  }
}

TEST_CASE("SVG identifiers are renamed where they are defined and used, and nothing else is") {
  CHECK(
      io::with_plain_ids("<g id=\"clip17\"/><u x=\"#clip17\" y=\"url(#clip17)\" z=\"#clip1\"/>") ==
      "<g id=\"i1\"/><u x=\"#i1\" y=\"url(#i1)\" z=\"#clip1\"/>");
}

TEST_CASE("Long texts are cut at whole characters and broken at spaces") {
  const io::Canvas canvas(io::Canvas::Kind::png, 10, 10);
  const io::TextStyle style;
  std::string long_text;
  for (int k = 0; k < 200; ++k) long_text += "\u00e4\u00f6 ";
  const std::string cut = io::cut_to_width(canvas, long_text, style, 300.0);
  CHECK(canvas.text_width(cut, style) <= 300.0);
  CHECK(canvas.text_width(cut, style) > 260.0);
  CHECK(io::printable(cut) == cut);
  CHECK(io::cut_to_width(canvas, "short", style, 300.0) == "short");
  for (const std::string& line : io::wrapped(canvas, long_text, style, 200.0)) {
    CHECK(canvas.text_width(line, style) <= 200.0);
  }
}

}  // namespace barwall
