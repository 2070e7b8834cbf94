#include <catch2/catch.hpp>

#include <cmath>

#include "io/expression.hpp"

using namespace barwall::io;

namespace {

const NamedValues names = {{"pitch_mm", 60.0}, {"a", 2.0}, {"e5", 7.0}, {"sinus", 3.0}};

std::string fault(const std::string& expression) {
  try {
    return "none, value " + std::to_string(evaluate(expression, names));
  } catch (const ExpressionError& error) {
    return error.what();
  }
}

}  // namespace

TEST_CASE("Expressions follow the rules of arithmetic") {
  CHECK(evaluate("1 + 2 * 3", names) == 7.0);
  CHECK(evaluate("(1 + 2) * 3", names) == 9.0);
  CHECK(evaluate("7 - 2 - 1", names) == 4.0);
  CHECK(evaluate("12 / 3 / 2", names) == 2.0);
  CHECK(evaluate("-pitch_mm", names) == -60.0);
  CHECK(evaluate("2 * -a", names) == -4.0);
  CHECK(evaluate("-a * a", names) == -4.0);
  CHECK(evaluate("+a", names) == 2.0);
  CHECK(evaluate("1.5e2 + .5", names) == 150.5);
  CHECK(evaluate("2*e5", names) == 14.0);
  CHECK(evaluate("sinus", names) == 3.0);
  CHECK(evaluate("((((1))))", names) == 1.0);
}

TEST_CASE("Expressions know sqrt, and sine and cosine of degrees") {
  CHECK(evaluate("sqrt(2) * sqrt(2)", names) == Approx(2.0).epsilon(1e-15));
  CHECK(evaluate("sin(30)", names) == 0.5);
  CHECK(evaluate("cos(60)", names) == Approx(0.5).epsilon(1e-15));
  CHECK(evaluate("pitch_mm * cos(180)", names) == -60.0);
}

TEST_CASE("Expressions hold nothing else") {
  using Catch::Contains;
  for (const char* expression :
       {"a ^ 2", "a = 3", "a < 3", "a == 2", "a ? 1 : 2", "a && 1", "sqrt(1, 2)", "\"a\"", "a; a",
        "a # b", "a % 2", "{a}", "3!", "a\n", "\xc3\xa9"}) {
    INFO(expression);
    CHECK_THAT(fault(expression), Contains("is not allowed"));
  }
  for (const char* expression : {"exp(1)", "_pi", "_e", "abs(1)", "min(1)", "tan(1)", "ln(2)"}) {
    INFO(expression);
    CHECK_THAT(fault(expression), Contains("unknown name"));
  }
  for (const char* expression : {"1 +", "(1", "1)", "2 3", "2a", "sin", "sin 3", "a(1)", "()", "*",
                                 "1..2", "sqrt()", "a sqrt(2)", "--1"}) {
    INFO(expression);
    CHECK_THAT(fault(expression), Contains("not an expression"));
  }
  CHECK_THAT(fault(""), Contains("empty"));
  CHECK_THAT(fault("  "), Contains("empty"));
}

TEST_CASE("A mistyped name in an expression is answered with the nearest") {
  CHECK(fault("2 * pich_mm") == "unknown name \"pich_mm\"; did you mean \"pitch_mm\"?");
  CHECK(fault("sqr(2)") == "unknown name \"sqr\"; did you mean \"sqrt\"?");
}

TEST_CASE("Every step of an expression is finite") {
  using Catch::Contains;
  CHECK_THAT(fault("1 / 0"), Contains("division by zero"));
  CHECK_THAT(fault("1 / (a - 2)"), Contains("division by zero"));
  CHECK_THAT(fault("1 / (1e300 * 1e300)"), Contains("a multiplication gives no finite number"));
  CHECK_THAT(fault("sqrt(a - 3)"), Contains("sqrt of the negative number -1"));
  CHECK_THAT(fault("1e999"), !Contains("none"));
}

TEST_CASE("An expression has at most 200 characters") {
  const std::string ones = "1" + std::string(199, ' ');
  CHECK(evaluate(ones, names) == 1.0);
  CHECK_THAT(fault(ones + " "), Catch::Contains("at most 200 characters, this one has 201"));
  std::string nested(99, '(');
  nested += '1';
  nested.append(99, ')');
  CHECK(evaluate(nested, names) == 1.0);
}

TEST_CASE("Names of values are words of their own") {
  CHECK(names_a_value("pitch_mm"));
  CHECK(names_a_value("_x2"));
  for (const char* name : {"", "2x", "a-b", "a b", "sqrt", "sin", "cos", "balance", "\xc3\xa9"}) {
    CHECK_FALSE(names_a_value(name));
  }
}
