#include "core/motion/processing/baseline.hpp"

#include <fmt/format.h>

#include <Eigen/Dense>
#include <cmath>

#include "core/error.hpp"
#include "core/motion/processing/histories.hpp"

namespace pilotis {

namespace {

constexpr std::array<std::string_view, 2> fits{"velocity", "displacement"};  // in the order of Fit

constexpr std::array<Parameter, 2> parameters{{
    {.key = "fit", .meaning = "what the polynomial is fitted to", .otherwise = 0, .choices = fits},
    {.key = "order",
     .meaning = "the order of the polynomial fitted",
     .otherwise = 3,
     .least = 1,
     .most = 8,
     .whole = true},
}};

using Fit = PolynomialBaseline::Fit;

// Velocity or displacement at the samples.
Eigen::VectorXd integrated(const Accelerogram& record, Fit fit) {
  const std::vector<double> history = fit == Fit::velocity ? velocity_history(record) : displacement_history(record);
  const auto count = static_cast<Eigen::Index>(record.samples.size());
  const auto first = static_cast<Eigen::Index>(history.size() - 1) - count;  // 1 where t = 0 has no sample
  return Eigen::Map<const Eigen::VectorXd>(history.data() + first, count);
}

// The acceleration (2 t / T - 1)^power: spans the same polynomials as t^power, better conditioned.
Accelerogram term(const Accelerogram& like, int power) {
  Accelerogram shape = like;
  const double scale = 2 / static_cast<double>(like.samples.size() - 1);
  for (std::size_t i = 0; i < shape.samples.size(); ++i)
    shape.samples[i] = std::pow(scale * static_cast<double>(i) - 1, power);
  return shape;
}

}  // namespace

const Method PolynomialBaseline::method{
    "baseline", "takes out a polynomial fitted to ground velocity or displacement, zero at t = 0", parameters};

PolynomialBaseline PolynomialBaseline::make(std::span<const double> values) {
  const PolynomialBaseline step{static_cast<Fit>(static_cast<int>(values[0])), static_cast<int>(values[1])};
  if (step.fit == Fit::displacement && step.order < 2)
    throw input_error("order", "found 1 for a displacement",
                      "a displacement that starts from rest has order 2 at least");
  return step;
}

Processed PolynomialBaseline::applied(const Accelerogram& record) const {
  const int terms = fit == Fit::velocity ? order : order - 1;
  if (record.samples.size() <= static_cast<std::size_t>(terms))
    throw input_error("order", fmt::format("found order {} for a record of {} samples", order, record.samples.size()),
                      "more samples than terms are needed");
  Eigen::MatrixXd basis(record.samples.size(), terms);
  for (int k = 0; k < terms; ++k) basis.col(k) = integrated(term(record, k), fit);
  const Eigen::VectorXd numbers = basis.colPivHouseholderQr().solve(integrated(record, fit));
  Processed out{record, ""};
  std::vector<double>& samples = out.record.samples;
  for (int k = 0; k < terms; ++k) {
    const Accelerogram shape = term(record, k);
    for (std::size_t i = 0; i < samples.size(); ++i) samples[i] -= numbers(k) * shape.samples[i];
  }
  out.done = fmt::format(
      "polynomial of order {} fitted to {}, zero at t = 0; its derivative, from {:.4g} to {:.4g} m/s2, subtracted; "
      "velocity at the end {:.4g} m/s, was {:.4g} m/s",
      order, fits[static_cast<std::size_t>(fit)], record.samples.front() - samples.front(),
      record.samples.back() - samples.back(), velocity_history(out.record).back(), velocity_history(record).back());
  return out;
}

}  // namespace pilotis
