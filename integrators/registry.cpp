#include <array>

#include "integrators/catalogue.hpp"

namespace pilotis {

namespace {

constexpr std::array newmark_parameters{
    Parameter{"beta", Dimension::none, "Newmark's beta", 0.25, 0.0, 0.5},
    Parameter{"gamma", Dimension::none, "Newmark's gamma", 0.5, 0.5, 1.0}};
constexpr std::array hht_parameters{
    Parameter{"alpha", Dimension::none, "alpha of Hilber, Hughes and Taylor", -0.05, -1.0 / 3.0, 0.0}};
constexpr std::array tolerance_parameters{
    Parameter{"rtol", Dimension::none, "the relative tolerance of a step", 1e-6, 1e-14, 0.1},
    Parameter{"atol", Dimension::none, "the absolute tolerance of a step (m and m/s)", 1e-9, 1e-16, 1.0}};
constexpr std::array modal_parameters{
    Parameter{"modes", Dimension::none, "the number of modes kept (0: all)", 0.0, 0.0, 1e6, true, true, true}};

constexpr std::array catalogue{
    Method{"newmark", "Newmark beta, gamma; average acceleration unless given", newmark_parameters},
    Method{"average_acceleration", "Newmark, beta = 1/4, gamma = 1/2", {}},
    Method{"linear_acceleration", "Newmark, beta = 1/6, gamma = 1/2", {}},
    Method{"hht_alpha", "Hilber-Hughes-Taylor, second order with numerical damping", hht_parameters},
    Method{"dormand_prince", "adaptive Runge-Kutta 5(4)", tolerance_parameters},
    Method{"fehlberg", "adaptive Runge-Kutta 7(8)", tolerance_parameters},
    Method{"piecewise_exact", "exact for linear buildings and piecewise-linear loads", {}},
    Method{"modal", "modal superposition, each mode marched exactly", modal_parameters}};

}  // namespace

std::span<const Method> scheme_catalogue() { return catalogue; }

}  // namespace pilotis
