#include <catch2/catch.hpp>

#include "io/degrees.hpp"
#include "io/nearest_name.hpp"
#include "io/sha256.hpp"

using namespace barwall::io;

TEST_CASE("The edit distance counts letters inserted, deleted, replaced and swapped") {
  CHECK(edit_distance("", "") == 0);
  CHECK(edit_distance("", "bar") == 3);
  CHECK(edit_distance("wall", "wal") == 1);
  CHECK(edit_distance("kitten", "sitting") == 3);
  CHECK(edit_distance("centre", "center") == 1);
  CHECK(edit_distance("ab", "cd") == 2);
  CHECK(edit_distance("Copper", "copper") == 0);
}

TEST_CASE("The nearest name is suggested only when it is close") {
  const std::vector<std::string> names = {"copper", "aluminium", "brass", "air"};
  CHECK(nearest_name("coper", names) == "copper");
  CHECK(nearest_name("aluminum", names) == "aluminium");
  CHECK(nearest_name("BRASS", names) == "brass");
  CHECK(nearest_name("wood", names).empty());
  CHECK(nearest_name("x", {"y"}).empty());
  CHECK(nearest_name("pitch", {"pitch_mm"}) == "pitch_mm");
  CHECK(nearest_name("L9", {"L1", "L2"}) == "L1");
  CHECK(nearest_name(std::string(1'000'000, 'a'), names).empty());
  CHECK(suggestion("coper", names) == "; did you mean \"copper\"?");
  CHECK(suggestion("wood", names).empty());
}

TEST_CASE("SHA-256 gives the digests of the examples of FIPS 180") {
  // The three messages of the standard's examples; digests from memory.
  CHECK(sha256("abc") == "ba7816bf8f01cfea414140de5dae2223b00361a396177a9cb410ff61f20015ad");
  CHECK(sha256("abcdbcdecdefdefgefghfghighijhijkijkljklmklmnlmnomnopnopq") ==
        "248d6a61d20638b8e5c026930c3e6039a33ce45964ff2167f6ecedd419db06c1");
  CHECK(sha256(std::string(1'000'000, 'a')) ==
        "cdc76e5c9914fb9281a1c7e284d73e67f1809a48a497200e046d39ccc7112cd0");
  CHECK(sha256("") == "e3b0c44298fc1c149afbf4c8996fb92427ae41e4649b934ca495991b7852b855");
  CHECK(sha256(std::string(64, 'a')) != sha256(std::string(63, 'a')));
}

TEST_CASE("Sine and cosine of degrees are exact where three balanced phasors need it") {
  CHECK(sin_degrees(0.0) == 0.0);
  CHECK(sin_degrees(30.0) == 0.5);
  CHECK(sin_degrees(150.0) == 0.5);
  CHECK(sin_degrees(180.0) == 0.0);
  CHECK(sin_degrees(-90.0) == -1.0);
  CHECK(cos_degrees(120.0) == -0.5);
  CHECK(cos_degrees(-120.0) == -0.5);
  CHECK(cos_degrees(90.0) == 0.0);
  CHECK(cos_degrees(720.0) == 1.0);
  CHECK(sin_degrees(120.0) == -sin_degrees(-120.0));
  CHECK(sin_degrees(37.0) == Approx(0.601815023152048).epsilon(1e-15));
  CHECK(cos_degrees(217.0) == Approx(-0.798635510047293).epsilon(1e-15));
}
