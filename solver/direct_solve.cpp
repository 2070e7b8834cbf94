#include <cholmod.h>
#include <fmt/format.h>
#include <omp.h>

#include <algorithm>
#include <cassert>
#include <cmath>

#include "solver/linear_solve.hpp"
#include "solver/nested_dissection.hpp"

extern "C" {
int openblas_get_num_threads();
void openblas_set_num_threads(int);
}

namespace barwall::solver {
namespace {

/// While it lives, CHOLMOD's own parallel loops, which ask for four threads whatever the number
/// set, run in this thread alone: on the small fronts of a plane grid, waking others takes longer
/// than the work. Within a parallel region they do so anyway.
class OneThread {
public:
  OneThread() : levels_(omp_get_max_active_levels()), set_(omp_in_parallel() == 0) {
    if (set_) omp_set_max_active_levels(0);
  }
  ~OneThread() {
    if (set_) omp_set_max_active_levels(levels_);
  }
  OneThread(const OneThread&) = delete;
  OneThread& operator=(const OneThread&) = delete;

private:
  int levels_;
  bool set_;
};

/// Columns of the interior block in compressed form, lower triangle, for CHOLMOD.
class DirectSystem final : public PreparedSystem<double> {
public:
  explicit DirectSystem(const Stencil<double>& stencil) : stencil_(stencil) {
    // Two threads gain little on the small fronts of a plane grid, and one thread makes the same
    // bytes from the same case whatever --threads says. Setting the number, even to what it is,
    // starts OpenBLAS's threads anew where they were ended, and each takes 128 MiB.
    if (openblas_get_num_threads() != 1) openblas_set_num_threads(1);
    cholmod_start(&common_);
    common_.supernodal = CHOLMOD_SUPERNODAL;
    common_.final_ll = 1;
    common_.print = 0;
    common_.nmethods = 1;
    common_.method[0].ordering = CHOLMOD_GIVEN;
    common_.postorder = 1;
    factor();
  }
  ~DirectSystem() override {
    cholmod_free_factor(&factor_, &common_);
    cholmod_finish(&common_);
  }
  DirectSystem(const DirectSystem&) = delete;
  DirectSystem& operator=(const DirectSystem&) = delete;

  void prepare_again(const Stencil<double>& stencil) override {
    assert(stencil.columns == stencil_.columns && stencil.rows == stencil_.rows);
    stencil_ = stencil;
    factor();
  }

  double memory() const override { return static_cast<double>(common_.memory_inuse); }

  SolveReport solve(const Matrix& rhs, Matrix& x, double tolerance) const override {
    SolveReport report{"direct", false, 0, {}};
    const Eigen::Index columns = rhs.cols();
    Eigen::VectorXd scale(columns);
    Matrix residual(rhs.rows(), columns);
    // The boundary values are data: the first residual with zeros inside gives the scale.
    clear_interior(x);
    compute_residual(rhs, x, residual);
    for (Eigen::Index c = 0; c < columns; ++c) scale[c] = residual.col(c).norm();
    report.residuals.push_back(scale.maxCoeff() > 0.0 ? 1.0 : 0.0);
    for (int step = 0; step < 4; ++step) {
      correct(residual, x);
      compute_residual(rhs, x, residual);
      double worst = 0.0;
      for (Eigen::Index c = 0; c < columns; ++c) {
        if (scale[c] > 0.0) worst = std::max(worst, residual.col(c).norm() / scale[c]);
      }
      report.residuals.push_back(worst);
      report.iterations = step + 1;
      report.converged = worst <= tolerance;  // false for NaN
      // On fine, stretched grids rounding alone may leave more than asked.
      if (!report.converged && step > 0) report.converged = at_rounding(rhs, x, residual);
      if (report.converged) return report;
    }
    throw SolveError(fmt::format("the direct solve left a relative residual of {:.2e}",
                                 report.residuals.back()));
  }

private:
  int interior_columns() const { return stencil_.columns - 2; }
  int interior_rows() const { return stencil_.rows - 2; }
  int full_node(int interior) const {
    return (interior / interior_columns() + 1) * stencil_.columns + interior % interior_columns() +
           1;
  }

  /// Orders and analyses the first time; factors every time.
  void factor() {
    const OneThread serial;
    const int nx = interior_columns();
    const int ny = interior_rows();
    const auto n = static_cast<std::size_t>(nx) * static_cast<std::size_t>(ny);
    cholmod_sparse* a = cholmod_allocate_sparse(n, n, 5 * n, 1, 1, -1, CHOLMOD_REAL, &common_);
    check(a != nullptr);
    auto* start = static_cast<int*>(a->p);
    auto* row = static_cast<int*>(a->i);
    auto* value = static_cast<double*>(a->x);
    int count = 0;
    const auto put = [&](int r, double v) {
      row[count] = r;
      value[count++] = v;
    };
    for (int j = 0; j < ny; ++j) {
      for (int i = 0; i < nx; ++i) {
        const int k = j * nx + i;
        const auto m = static_cast<std::size_t>(full_node(k));
        start[k] = count;
        put(k, stencil_.diagonal[m]);
        if (i + 1 < nx) put(k + 1, stencil_.right[m]);
        if (j + 1 < ny) {
          if (i > 0) put(k + nx - 1, stencil_.up_left[m]);
          put(k + nx, stencil_.up[m]);
          if (i + 1 < nx) put(k + nx + 1, stencil_.up_right[m]);
        }
      }
    }
    start[n] = count;
    if (factor_ == nullptr) {
      std::vector<int> order = nested_dissection(nx, ny);
      factor_ = cholmod_analyze_p(a, order.data(), nullptr, 0, &common_);
    }
    if (factor_ != nullptr) cholmod_factorize(a, factor_, &common_);
    cholmod_free_sparse(&a, &common_);
    check(factor_ != nullptr);
  }

  void check(bool made) const {
    if (common_.status == CHOLMOD_OUT_OF_MEMORY || common_.status == CHOLMOD_TOO_LARGE) {
      throw SolveError("out of memory in the direct solve");
    }
    if (common_.status == CHOLMOD_NOT_POSDEF) {
      throw SolveError("the system's matrix is not positive definite");
    }
    if (!made || common_.status < 0) throw SolveError("the direct solve failed");
  }

  void clear_interior(Matrix& x) const {
    for (int j = 1; j + 1 < stencil_.rows; ++j) {
      x.block(j * stencil_.columns + 1, 0, interior_columns(), x.cols()).setZero();
    }
  }

  void compute_residual(const Matrix& rhs, const Matrix& x, Matrix& residual) const {
    for (Eigen::Index c = 0; c < x.cols(); ++c) {
      auto column = residual.col(c);
      apply(stencil_, x.col(c), column);
      column = rhs.col(c) - column;
    }
    residual.topRows(stencil_.columns).setZero();
    residual.bottomRows(stencil_.columns).setZero();
    for (int j = 0; j < stencil_.rows; ++j) {
      residual.row(j * stencil_.columns).setZero();
      residual.row((j + 1) * stencil_.columns - 1).setZero();
    }
    // Comparisons would pass over them.
    if (!residual.allFinite()) {
      throw SolveError("the direct solve met values that are not finite numbers");
    }
  }

  /// True when no residual exceeds what rounding leaves in the sum of a row's terms.
  bool at_rounding(const Matrix& rhs, const Matrix& x, const Matrix& residual) const {
    Stencil<double> magnitude = stencil_;
    for (auto* couplings : {&magnitude.diagonal, &magnitude.right, &magnitude.up,
                            &magnitude.up_right, &magnitude.up_left}) {
      for (double& value : *couplings) value = std::abs(value);
    }
    Eigen::VectorXd terms(x.rows());
    for (Eigen::Index c = 0; c < x.cols(); ++c) {
      apply(magnitude, Eigen::VectorXd(x.col(c).cwiseAbs()), terms);
      terms += rhs.col(c).cwiseAbs();
      if (!(residual.col(c).norm() <= 1e-15 * terms.norm())) return false;
    }
    return true;
  }

  void correct(const Matrix& residual, Matrix& x) const {
    const OneThread serial;
    const auto n =
        static_cast<std::size_t>(interior_columns()) * static_cast<std::size_t>(interior_rows());
    const auto columns = static_cast<std::size_t>(x.cols());
    cholmod_dense* b = cholmod_allocate_dense(n, columns, n, CHOLMOD_REAL, &common_);
    check(b != nullptr);
    auto* values = static_cast<double*>(b->x);
    for (std::size_t c = 0; c < columns; ++c) {
      for (std::size_t k = 0; k < n; ++k) {
        values[c * n + k] = residual(full_node(static_cast<int>(k)), static_cast<Eigen::Index>(c));
      }
    }
    cholmod_dense* y = cholmod_solve(CHOLMOD_A, factor_, b, &common_);
    cholmod_free_dense(&b, &common_);
    check(y != nullptr);
    const auto* found = static_cast<const double*>(y->x);
    for (std::size_t c = 0; c < columns; ++c) {
      for (std::size_t k = 0; k < n; ++k) {
        x(full_node(static_cast<int>(k)), static_cast<Eigen::Index>(c)) += found[c * n + k];
      }
    }
    cholmod_free_dense(&y, &common_);
  }

  Stencil<double> stencil_;
  mutable cholmod_common common_{};
  cholmod_factor* factor_ = nullptr;
};

}  // namespace

std::unique_ptr<PreparedSystem<double>> prepare_direct(const Stencil<double>& stencil) {
  return std::make_unique<DirectSystem>(stencil);
}

std::unique_ptr<PreparedSystem<double>> prepare(const Stencil<double>& stencil) {
  return prepare_direct(stencil);
}

}  // namespace barwall::solver
