// The largest |x cos a + y sin a| of a path (x, y) for every angle a = 0, 1, ... 179 degrees.
//
// Most points of a path lie inside and cannot matter; they are told by one quadratic form. With S any positive definite
// matrix (here the path's own scatter) Cauchy-Schwarz gives (p e)^2 <= (p' S^-1 p)(e' S e). So a point with
// p' S^-1 p <= min over the angles of peak(a)^2 / (e' S e) raises no peak.
#pragma once

#include <array>

namespace pilotis {

class RotationEnvelope {
 public:
  static constexpr int angles = 180;

  // Points x[i * stride], y[i * stride], i < count, in the unit of the peaks; they go on from those seen before.
  void see(const double* x, const double* y, int count, int stride) noexcept;
  // The magnitude `value` at the angle of `degrees`, from elsewhere.
  void raise(int degrees, double value) noexcept;

  const std::array<double, angles>& peaks() const { return peaks_; }

 private:
  void see_one(double x, double y) noexcept;
  void refresh_ellipse() noexcept;

  std::array<double, angles> peaks_{};
  double xx_ = 0, xy_ = 0, yy_ = 0;  // scatter of the points that were looked at
  double a_ = 0, b_ = 0, c_ = 0;     // a x^2 + b x y + c y^2 <= 1: inside
  bool known_ = false;               // whether the ellipse holds anything yet
  int since_ = 0;                    // points looked at since the ellipse was last drawn
};

struct Direction {
  double cosine, sine;
};
// Of 0 to 179 degrees.
const std::array<Direction, RotationEnvelope::angles>& directions();

}  // namespace pilotis
