#include <catch2/catch.hpp>

#include <array>
#include <random>
#include <string_view>

#include "tests/io/case_support.hpp"

using namespace barwall;

namespace {

/// A text with a few bytes deleted, doubled, replaced, swapped with other stretches, or with words
/// that mean something to a case put in.
std::string mutated(std::string text, std::mt19937& random) {
  static constexpr std::array<std::string_view, 24> words = {
      "\"",  "[",   "]",    "{",         "}",      "=",   "\n",      ".",
      "nan", "inf", "-",    "1e308",     "0",      "#",   "\\",      "'''",
      "[[",  "]]",  "\xff", "[[bar]]\n", "1e-320", "\0x", "\"1/0\"", "9223372036854775807"};
  const auto below = [&](std::size_t n) { return n == 0 ? 0 : random() % n; };
  const std::size_t changes = 1 + below(2);
  for (std::size_t change = 0; change < changes; ++change) {
    const std::size_t at = below(text.size());
    const std::size_t length = 1 + below(12);
    switch (below(5)) {
      case 0:
        text.erase(at, length);
        break;
      case 1:
        text.insert(below(text.size()), text.substr(at, 4 * length));
        break;
      case 2:
        text[at] = static_cast<char>(below(256));
        break;
      case 3:
        text.insert(at, words[below(words.size())]);
        break;
      default:
        text.replace(at, length, words[below(words.size())]);
        break;
    }
    if (text.empty()) text.push_back('x');
  }
  return text;
}

}  // namespace

TEST_CASE("Whatever happens to a case file, it is read or refused as bad input") {
  const test::ScratchFolder folder;
  std::mt19937 random(20240607);
  int read = 0;
  int refused = 0;
  const int tries = 4000;
  for (int k = 0; k < tries; ++k) {
    const std::string text = mutated(test::whole_case, random);
    const std::filesystem::path file = folder.write("case.toml", text);
    try {
      io::read_case(file);
      ++read;
    } catch (const io::InputError& error) {
      ++refused;
      // Always FILE:LINE:COLUMN.
      const std::string message = error.what();
      const std::string prefix = file.string() + ":";
      REQUIRE(message.rfind(prefix, 0) == 0);
      REQUIRE(message.find_first_not_of("0123456789:", prefix.size()) > prefix.size() + 3);
    } catch (const std::exception& error) {
      FAIL("an exception that is no InputError: " << error.what() << "\n" << text);
    }
  }
  CHECK(read + refused == tries);
  // Both happen, or the mutations are too tame or too wild to say anything.
  CHECK(read > tries / 50);
  CHECK(refused > tries / 2);
}

TEST_CASE("Whatever happens to a curve file, it is read or refused as bad input") {
  const test::ScratchFolder folder;
  const std::filesystem::path file =
      folder.write("case.toml", "[material.steel]\nbh_curve = \"steel.csv\"\n" + test::one_bar);
  const std::string curve =
      "# a comment\nH_A_per_m,B_T\n0,0\n20,0.018\n100,0.1652\n300,0.6632\n1000,1.2706\n"
      "4000,1.6059\n14000,1.8750\n";
  std::mt19937 random(20240608);
  int read = 0;
  int refused = 0;
  const int tries = 4000;
  for (int k = 0; k < tries; ++k) {
    const std::string text = mutated(curve, random);
    folder.write("steel.csv", text);
    try {
      io::read_case(file);
      ++read;
    } catch (const io::InputError& error) {
      ++refused;
      const std::string message = error.what();
      const std::string prefix = (folder.path() / "steel.csv").string() + ":";
      REQUIRE(message.rfind(prefix, 0) == 0);
      REQUIRE(message.find_first_not_of("0123456789:", prefix.size()) > prefix.size() + 3);
    } catch (const std::exception& error) {
      FAIL("an exception that is no InputError: " << error.what() << "\n" << text);
    }
  }
  CHECK(read + refused == tries);
  CHECK(read > tries / 50);
  CHECK(refused > tries / 2);
}
