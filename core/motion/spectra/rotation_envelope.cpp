#include "core/motion/spectra/rotation_envelope.hpp"

#include <algorithm>
#include <cmath>
#include <limits>
#include <numbers>

namespace pilotis {

namespace {

constexpr int angles = RotationEnvelope::angles;

struct Rows {
  alignas(32) std::array<double, angles> cosine, sine;
};

const Rows& rows() {
  static const Rows made = [] {
    Rows r;
    for (int i = 0; i < angles; ++i) {
      r.cosine[i] = std::cos(i * std::numbers::pi / 180);
      r.sine[i] = std::sin(i * std::numbers::pi / 180);
    }
    r.cosine[90] = 0;  // exactly, so that one component is found again in the other's direction
    return r;
  }();
  return made;
}

// After how many points that passed the test the ellipse is drawn anew; a drawing costs about four of them.
constexpr int points_per_ellipse = 24;

}  // namespace

const std::array<Direction, angles>& directions() {
  static const std::array<Direction, angles> made = [] {
    std::array<Direction, angles> d;
    for (int i = 0; i < angles; ++i) d[i] = {rows().cosine[i], rows().sine[i]};
    return d;
  }();
  return made;
}

void RotationEnvelope::see(const double* x, const double* y, int count, int stride) noexcept {
  for (int i = 0; i < count * stride; i += stride)
    if (!known_ || !(x[i] * (a_ * x[i] + b_ * y[i]) + c_ * y[i] * y[i] <= 1)) see_one(x[i], y[i]);
}

void RotationEnvelope::see_one(double x, double y) noexcept {
  const Rows& r = rows();
  for (int i = 0; i < angles; ++i) {
    const double along = std::abs(x * r.cosine[i] + y * r.sine[i]);
    peaks_[i] = along > peaks_[i] ? along : peaks_[i];
  }
  xx_ += x * x;
  xy_ += x * y;
  yy_ += y * y;
  if (++since_ == points_per_ellipse) refresh_ellipse();
}

// S with a trace of one and a little roundness, so that a path along a line still has an ellipse.
void RotationEnvelope::refresh_ellipse() noexcept {
  since_ = 0;
  const double trace = xx_ + yy_;
  known_ = trace > 0 && trace < std::numeric_limits<double>::infinity();
  if (!known_) return;
  constexpr double roundness = 1e-6;
  const double sxx = xx_ / trace + roundness, sxy = xy_ / trace, syy = yy_ / trace + roundness;
  const Rows& r = rows();
  double scale = std::numeric_limits<double>::infinity();
  for (int i = 0; i < angles; ++i) {
    const double along = r.cosine[i] * (sxx * r.cosine[i] + 2 * sxy * r.sine[i]) + syy * r.sine[i] * r.sine[i];
    scale = std::min(scale, peaks_[i] * peaks_[i] / along);
  }
  // A hair smaller than it may be, for rounding; nothing inside when a direction has seen no motion at all.
  const double size = (sxx * syy - sxy * sxy) * scale * (1 - 1e-9);
  known_ = size > 0;
  a_ = syy / size;
  b_ = -2 * sxy / size;
  c_ = sxx / size;
}

void RotationEnvelope::raise(int degrees, double value) noexcept { peaks_[degrees] = std::max(peaks_[degrees], value); }

}  // namespace pilotis
