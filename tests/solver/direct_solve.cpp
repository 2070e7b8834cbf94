#include <algorithm>
#include <catch2/catch.hpp>
#include <cmath>
#include <limits>

#include "solver/linear_solve.hpp"
#include "solver/nested_dissection.hpp"

using namespace barwall::solver;

namespace {

/// A nine-point operator with uneven couplings, diagonally dominant.
Stencil<double> uneven_operator(int columns, int rows) {
  Stencil<double> stencil(columns, rows);
  for (int j = 0; j < rows; ++j) {
    for (int i = 0; i < columns; ++i) {
      const int n = j * columns + i;
      const auto couple = [&](int other, double size) {
        stencil.add(n, other, -size);
        stencil.add(n, n, size);
        stencil.add(other, other, size);
      };
      if (i + 1 < columns) couple(n + 1, 1.0 + 0.1 * (n % 7));
      if (j + 1 < rows) couple(n + columns, 3.0 + 0.2 * (n % 5));
      if (i + 1 < columns && j + 1 < rows) couple(n + columns + 1, 0.3 + 0.05 * (n % 3));
      if (i > 0 && j + 1 < rows) couple(n + columns - 1, 0.2);
    }
  }
  return stencil;
}

Eigen::MatrixXd waves(Eigen::Index rows, Eigen::Index columns) {
  Eigen::MatrixXd result(rows, columns);
  for (Eigen::Index c = 0; c < columns; ++c) {
    for (Eigen::Index r = 0; r < rows; ++r) {
      result(r, c) = std::sin(1.7 * static_cast<double>(r) + static_cast<double>(c * c));
    }
  }
  return result;
}

bool on_rim(int n, int columns, int rows) {
  const int i = n % columns;
  const int j = n / columns;
  return i == 0 || j == 0 || i == columns - 1 || j == rows - 1;
}

}  // namespace

TEST_CASE("nested dissection orders every node once") {
  for (const auto& [columns, rows] : {std::pair{1, 1}, {1, 9}, {9, 1}, {2, 3}, {17, 4}, {40, 53}}) {
    auto order = nested_dissection(columns, rows);
    std::sort(order.begin(), order.end());
    REQUIRE(order.size() == static_cast<std::size_t>(columns * rows));
    for (int k = 0; k < columns * rows; ++k) CHECK(order[static_cast<std::size_t>(k)] == k);
  }
}

TEST_CASE("the direct solve agrees with a dense solve for many right-hand sides at once") {
  const int columns = 9;
  const int rows = 7;
  const auto stencil = uneven_operator(columns, rows);
  const Eigen::Index size = columns * rows;
  Eigen::MatrixXd dense(size, size);
  for (Eigen::Index n = 0; n < size; ++n) {
    Eigen::VectorXd unit = Eigen::VectorXd::Unit(size, n);
    Eigen::VectorXd image(size);
    apply(stencil, unit, image);
    dense.col(n) = image;
  }
  const Eigen::MatrixXd rhs = waves(size, 5);
  Eigen::MatrixXd x = waves(size, 5).array() + 0.3;
  Eigen::MatrixXd wanted = rhs;
  for (int n = 0; n < size; ++n) {
    if (!on_rim(n, columns, rows)) continue;
    dense.row(n) = Eigen::RowVectorXd::Unit(size, n);
    wanted.row(n) = x.row(n);
  }
  const Eigen::MatrixXd exact = dense.partialPivLu().solve(wanted);
  const auto report = prepare_direct(stencil)->solve(rhs, x, 1e-12);
  CHECK(report.converged);
  CHECK(report.residuals.back() <= 1e-12);
  CHECK((x - exact).norm() < 1e-12 * exact.norm());
}

TEST_CASE("a prepared system solves again and again, each time from its own boundary values") {
  const auto stencil = uneven_operator(30, 20);
  const auto prepared = prepare(stencil);
  const Eigen::MatrixXd rhs = waves(600, 1);
  Eigen::MatrixXd first = Eigen::MatrixXd::Zero(600, 1);
  Eigen::MatrixXd again = Eigen::MatrixXd::Zero(600, 1);
  Eigen::MatrixXd lifted = Eigen::MatrixXd::Ones(600, 1);
  prepared->solve(rhs, first, 1e-12);
  prepared->solve(rhs, again, 1e-12);
  prepared->solve(rhs, lifted, 1e-12);
  CHECK(first == again);
  // Rows sum to zero: a rim raised by 1 raises everything by 1.
  CHECK((lifted.array() - first.array() - 1.0).abs().maxCoeff() < 1e-12);
  CHECK(prepared->memory() > 0.0);
}

TEST_CASE("nothing given, nothing found") {
  Eigen::MatrixXd x = Eigen::MatrixXd::Zero(42, 2);
  const auto report = prepare(uneven_operator(7, 6))->solve(Eigen::MatrixXd::Zero(42, 2), x, 1e-12);
  CHECK(report.converged);
  CHECK(x.isZero(0.0));
}

TEST_CASE("a right-hand side, a boundary value or an operator that is no number ends in an error") {
  const double none = std::numeric_limits<double>::quiet_NaN();
  auto stencil = uneven_operator(7, 6);
  const auto prepared = prepare(stencil);
  Eigen::MatrixXd rhs = waves(42, 2);
  Eigen::MatrixXd x = Eigen::MatrixXd::Zero(42, 2);
  rhs(16, 1) = none;
  CHECK_THROWS_AS(prepared->solve(rhs, x, 1e-12), SolveError);
  rhs = waves(42, 2);
  x.setZero();
  x(3, 0) = none;
  CHECK_THROWS_AS(prepared->solve(rhs, x, 1e-12), SolveError);
  const auto solve_with_broken_operator = [&] {
    stencil.diagonal[16] = none;
    x.setZero();
    prepare(stencil)->solve(rhs, x, 1e-12);
  };
  CHECK_THROWS_AS(solve_with_broken_operator(), SolveError);
}

TEST_CASE("an operator that is not positive definite ends in an error") {
  auto stencil = uneven_operator(7, 6);
  for (double& value : stencil.diagonal) value = -value;
  CHECK_THROWS_AS(prepare(stencil), SolveError);
}
