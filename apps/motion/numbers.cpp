#include "apps/motion/numbers.hpp"

#include <cmath>
#include <numbers>

#include "core/motion/processing/histories.hpp"

namespace pilotis {

namespace {

std::vector<double> measures_of(const Accelerogram& record, const MotionRequest& request, const std::string& where) {
  const PseudoVelocities pseudo_velocities = [&](std::span<const double> periods) {
    return response_spectrum(ground_of(record), periods, std::vector{0.05}, where).curves[0].pseudo_velocity;
  };
  std::vector<double> values;
  for (const Measure* measure : request.measures)
    values.push_back(measure->of_record ? measure->of_record(record) : measure->of_spectrum(pseudo_velocities));
  return values;
}

std::vector<Oscillator> yielding_oscillators(const MotionRequest& request, double damping_ratio) {
  std::vector<double> periods;
  for (const double period : request.periods)
    if (period > 0) periods.push_back(period);
  return oscillators_of(periods, std::vector{damping_ratio});
}

InelasticCurve of_ductility(const Ground& ground, const std::vector<Oscillator>& oscillators,
                            const InelasticRequest& inelastic, const std::string& where) {
  InelasticCurve curve{};
  const auto found =
      constant_ductility_spectrum(ground, inelastic.post_yield_ratio, oscillators, inelastic.value, where);
  for (std::size_t i = 0; i < oscillators.size(); ++i)
    curve.points.push_back(
        {oscillators[i].period, found[i].yield_acceleration, found[i].strength_ratio, found[i].peak, found[i].found});
  return curve;
}

// omega^2 times the largest elastic displacement at the same steps, m/s2.
std::vector<double> elastic_strengths(const Ground& ground, const std::vector<Oscillator>& oscillators,
                                      const std::string& where) {
  std::vector<OscillatorExtremes> extremes(oscillators.size());
  oscillator_extremes(ground, oscillators, bilinear_rule, extremes, where);
  std::vector<double> strengths;
  for (std::size_t i = 0; i < oscillators.size(); ++i) {
    const double omega = 2 * std::numbers::pi / oscillators[i].period;
    strengths.push_back(omega * omega * extremes[i].displacement.largest());
  }
  return strengths;
}

InelasticCurve of_strength(const Ground& ground, const std::vector<Oscillator>& oscillators,
                           const InelasticRequest& inelastic, const std::string& where) {
  const std::vector<double> elastic = elastic_strengths(ground, oscillators, where);
  const bool ratio = inelastic.held == InelasticRequest::Held::strength_ratio;
  std::vector<BilinearOscillator> yielding;
  for (std::size_t i = 0; i < oscillators.size(); ++i)
    yielding.push_back(
        {oscillators[i].period, oscillators[i].damping_ratio, ratio ? inelastic.value * elastic[i] : inelastic.value});
  std::vector<BilinearPeak> peaks(yielding.size());
  bilinear_peaks(ground, inelastic.post_yield_ratio, yielding, peaks, where);
  InelasticCurve curve{};
  for (std::size_t i = 0; i < peaks.size(); ++i)
    curve.points.push_back(
        {yielding[i].period, yielding[i].yield_acceleration, yielding[i].yield_acceleration / elastic[i], peaks[i]});
  return curve;
}

std::vector<InelasticCurve> inelastic_of(const Ground& ground, const MotionRequest& request, const std::string& where) {
  std::vector<InelasticCurve> curves;
  for (const double damping_ratio : request.damping_ratios) {
    const std::vector<Oscillator> oscillators = yielding_oscillators(request, damping_ratio);
    if (oscillators.empty()) break;
    curves.push_back(request.inelastic->held == InelasticRequest::Held::ductility
                         ? of_ductility(ground, oscillators, *request.inelastic, where)
                         : of_strength(ground, oscillators, *request.inelastic, where));
    curves.back().damping_ratio = damping_ratio;
  }
  return curves;
}

}  // namespace

const char* word_of(StrengthFound found) {
  switch (found) {
    case StrengthFound::one:
      return "one";
    case StrengthFound::largest:
      return "largest of several";
    case StrengthFound::jumped:
      return "jumped over";
    case StrengthFound::none:
      break;
  }
  return "not reached";
}

RecordNumbers numbers_of(const std::string& file, ReadComponent component, const MotionRequest& request) {
  const Accelerogram& record = component.record;
  RecordNumbers numbers{file,
                        component.name,
                        component.format,
                        component.unit,
                        std::move(component.notes),
                        {record.step, record.first_sample_at, {}},
                        record.samples.size(),
                        peak_of(record),
                        measures_of(record, request, file),
                        {},
                        {},
                        {},
                        {}};
  if (request.spectrum)
    numbers.spectrum = response_spectrum(ground_of(record), request.periods, request.damping_ratios, file);
  if (request.histories)
    numbers.histories = {record.step, acceleration_history(record), velocity_history(record),
                         displacement_history(record)};
  if (request.fourier)
    numbers.fourier = fourier_amplitudes(record, 1 / (record.step * static_cast<double>(record.samples.size())));
  if (request.inelastic) numbers.inelastic = inelastic_of(ground_of(record), request, file);
  if (request.samples) numbers.record = std::move(component.record);
  return numbers;
}

}  // namespace pilotis
