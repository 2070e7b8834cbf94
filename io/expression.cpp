#include "io/expression.hpp"

#include <fmt/format.h>
#include <muParser.h>

#include <algorithm>
#include <array>
#include <cmath>
#include <cstddef>
#include <vector>

#include "io/degrees.hpp"
#include "io/nearest_name.hpp"

namespace barwall::io {

namespace {

constexpr std::array<std::string_view, 3> functions = {"sqrt", "sin", "cos"};

bool is_digit(char c) {
  return c >= '0' && c <= '9';
}
bool begins_name(char c) {
  return (c >= 'a' && c <= 'z') || (c >= 'A' && c <= 'Z') || c == '_';
}
bool continues_name(char c) {
  return begins_name(c) || is_digit(c);
}

double finite(double value, std::string_view operation) {
  if (!std::isfinite(value)) {
    throw ExpressionError(fmt::format("{} gives no finite number", operation));
  }
  return value;
}

double add(double a, double b) {
  return finite(a + b, "an addition");
}
double subtract(double a, double b) {
  return finite(a - b, "a subtraction");
}
double multiply(double a, double b) {
  return finite(a * b, "a multiplication");
}
double divide(double a, double b) {
  if (b == 0.0) throw ExpressionError("division by zero");
  return finite(a / b, "a division");
}
double minus(double a) {
  return -a;
}
double plus(double a) {
  return a;
}
double square_root(double a) {
  if (a < 0.0) throw ExpressionError(fmt::format("sqrt of the negative number {}", a));
  return std::sqrt(a);
}

/// Refuses every character that no expression holds.
void check_characters(std::string_view expression) {
  if (expression.size() > longest_expression) {
    throw ExpressionError(fmt::format("an expression has at most {} characters, this one has {}",
                                      longest_expression, expression.size()));
  }
  for (std::size_t i = 0; i < expression.size(); ++i) {
    const char c = expression[i];
    const bool allowed =
        continues_name(c) || std::string_view(" \t.+-*/()").find(c) != std::string_view::npos;
    if (allowed) continue;
    const bool printable = c > ' ' && c < '\x7f';
    throw ExpressionError(fmt::format(
        "{} at character {} is not allowed; an expression holds numbers, names of [given], "
        "+ - * / ( ), sqrt, sin and cos",
        printable ? fmt::format("\"{}\"", c) : "the character", i + 1));
  }
}

/// The names in an expression, functions left out.
std::vector<std::string> names_in(std::string_view expression) {
  std::vector<std::string> names;
  std::size_t i = 0;
  const auto skip = [&](auto&& belongs) {
    while (i < expression.size() && belongs(expression[i])) ++i;
  };
  while (i < expression.size()) {
    if (begins_name(expression[i])) {
      const std::size_t start = i;
      skip(continues_name);
      const std::string_view name = expression.substr(start, i - start);
      if (std::find(functions.begin(), functions.end(), name) == functions.end()) {
        names.emplace_back(name);
      }
    } else if (is_digit(expression[i]) || expression[i] == '.') {
      skip([](char c) { return is_digit(c) || c == '.'; });
      const std::size_t exponent = i;
      if (i < expression.size() && (expression[i] == 'e' || expression[i] == 'E')) {
        ++i;
        if (i < expression.size() && (expression[i] == '+' || expression[i] == '-')) ++i;
        if (i < expression.size() && is_digit(expression[i])) {
          skip(is_digit);
        } else {
          i = exponent;
        }
      }
    } else {
      ++i;
    }
  }
  return names;
}

/// A parser that knows the operators and functions of the case file and nothing else.
mu::Parser bare_parser() {
  mu::Parser parser;
  parser.ClearFun();
  parser.ClearConst();
  parser.ClearInfixOprt();
  parser.ClearPostfixOprt();
  parser.EnableBuiltInOprt(false);
  parser.DefineOprt("+", add, mu::prADD_SUB, mu::oaLEFT, true);
  parser.DefineOprt("-", subtract, mu::prADD_SUB, mu::oaLEFT, true);
  parser.DefineOprt("*", multiply, mu::prMUL_DIV, mu::oaLEFT, true);
  parser.DefineOprt("/", divide, mu::prMUL_DIV, mu::oaLEFT, true);
  parser.DefineInfixOprt("-", minus);
  parser.DefineInfixOprt("+", plus);
  parser.DefineFun("sqrt", square_root);
  parser.DefineFun("sin", sin_degrees);
  parser.DefineFun("cos", cos_degrees);
  return parser;
}

}  // namespace

bool names_a_value(std::string_view name) {
  if (name.empty() || !begins_name(name.front()) || name == "balance") return false;
  return std::all_of(name.begin(), name.end(), continues_name) &&
         std::find(functions.begin(), functions.end(), name) == functions.end();
}

double evaluate(std::string_view expression, const NamedValues& names) {
  check_characters(expression);
  if (expression.find_first_not_of(" \t") == std::string_view::npos) {
    throw ExpressionError("an expression cannot be empty");
  }
  try {
    mu::Parser parser = bare_parser();
    for (const std::string& name : names_in(expression)) {
      const auto found = names.find(name);
      if (found == names.end()) {
        std::vector<std::string> known;
        for (const auto& entry : names) known.push_back(entry.first);
        known.insert(known.end(), functions.begin(), functions.end());
        throw ExpressionError(fmt::format("unknown name \"{}\"{}", name, suggestion(name, known)));
      }
      parser.DefineConst(name, found->second);
    }
    parser.SetExpr(std::string(expression));
    return finite(parser.Eval(), "the expression");
  } catch (const mu::ParserError& error) {
    throw ExpressionError(fmt::format("not an expression: {}", error.GetMsg()));
  }
}

}  // namespace barwall::io
