#pragma once

#include <map>
#include <stdexcept>
#include <string>
#include <string_view>

namespace barwall::io {

/// Names of [given] and their values, in the file's own units.
using NamedValues = std::map<std::string, double, std::less<>>;

/// What is wrong with an expression, without its place.
class ExpressionError : public std::runtime_error {
public:
  using std::runtime_error::runtime_error;
};

/// Longest expression [characters].
inline constexpr int longest_expression = 200;

/// True when a name can stand in an expression: a letter or "_", then letters, digits or "_", and
/// none of the words that mean something of their own (sqrt, sin, cos, balance).
bool names_a_value(std::string_view name);

/// Value of an expression of numbers and names with + - * / ( ), sqrt, and sin and cos of
/// degrees; finite at every step.
/// \throws ExpressionError when it says anything else.
double evaluate(std::string_view expression, const NamedValues& names);

}  // namespace barwall::io
