#include "core/motion/fit/select_motions.hpp"

#include <fmt/format.h>

#include <algorithm>
#include <cmath>
#include <limits>

#include "core/error.hpp"

namespace pilotis {

namespace {

constexpr std::size_t most_starts = 50;

double own_factor(const FitProblem& problem, const SelectionWish& wish, std::size_t motion) {
  if (!wish.scale_each) return 1;
  const FitProblem alone{{problem.ordinates[motion]}, problem.target, problem.weights};
  return scale_suite(alone, Factors::each_motion, 0, "").factors.front();
}

// ln(k_m s_mp / t_p) of every motion, and sums over the chosen ones, by which a choice costs one pass over the periods.
class Choice {
 public:
  Choice(const FitProblem& problem, const SelectionWish& wish, const std::vector<double>& factors)
      : problem_(problem), wish_(wish), sum_(problem.target.size(), 0.0), square_(problem.target.size(), 0.0) {
    for (std::size_t m = 0; m < factors.size(); ++m) {
      logs_.emplace_back();
      for (std::size_t p = 0; p < problem.target.size(); ++p)
        logs_[m].push_back(std::log(factors[m] * problem.ordinates[m][p] / problem.target[p]));
    }
  }

  void add(std::size_t motion) { change(motion, 1); }
  void remove(std::size_t motion) { change(motion, -1); }

  // Of the chosen motions and one more.
  double cost_with(std::size_t motion) {
    add(motion);
    const double result = cost();
    remove(motion);
    return result;
  }

  double cost() const {
    double sum = 0, weights = 0;
    for (std::size_t p = 0; p < sum_.size(); ++p) {
      const double mean = sum_[p] / count_;
      const double variance = count_ > 1 ? std::max(0.0, square_[p] - count_ * mean * mean) / (count_ - 1) : 0;
      const double wanted = wish_.deviation.empty() ? 0 : wish_.deviation[p];
      const double spread = std::sqrt(variance) - wanted;
      const double weight = problem_.weights.empty() ? 1 : problem_.weights[p];
      sum += weight * (mean * mean + wish_.spread_weight * spread * spread);
      weights += weight;
    }
    return sum / weights;
  }

 private:
  void change(std::size_t motion, int sign) {
    count_ += sign;
    for (std::size_t p = 0; p < sum_.size(); ++p) {
      sum_[p] += sign * logs_[motion][p];
      square_[p] += sign * logs_[motion][p] * logs_[motion][p];
    }
  }

  const FitProblem& problem_;
  const SelectionWish& wish_;
  std::vector<std::vector<double>> logs_;  // [motion][period]
  std::vector<double> sum_, square_;       // [period]
  double count_ = 0;
};

void validate(const FitProblem& problem, const SelectionWish& wish, const std::string& where) {
  validate(problem, where);
  if (wish.count < 1 || wish.count > problem.ordinates.size())
    throw input_error(where, fmt::format("{} motions are to be chosen", wish.count),
                      fmt::format("it must be 1 to {}, as many as there are", problem.ordinates.size()));
  const bool usable =
      std::all_of(wish.deviation.begin(), wish.deviation.end(), [](double d) { return std::isfinite(d) && d >= 0; });
  if (!usable || (!wish.deviation.empty() && wish.deviation.size() != problem.target.size()))
    throw input_error(where,
                      fmt::format("found {} deviations for {} periods", wish.deviation.size(), problem.target.size()),
                      "give one of at least 0 for each period, or none");
  if (!std::isfinite(wish.spread_weight) || wish.spread_weight < 0)
    throw input_error(where, fmt::format("found the weight {:g} of the spread", wish.spread_weight),
                      "it must be at least 0");
}

std::vector<std::size_t> allowed_motions(const SelectionWish& wish, const std::vector<double>& factors,
                                         const std::string& where) {
  std::vector<std::size_t> allowed;
  for (std::size_t m = 0; m < factors.size(); ++m)
    if (factors[m] >= wish.least_factor && (wish.most_factor <= 0 || factors[m] <= wish.most_factor))
      allowed.push_back(m);
  if (allowed.size() < wish.count)
    throw input_error(where,
                      fmt::format("{} of {} motions have a factor within the limits", allowed.size(), factors.size()),
                      fmt::format("{} are to be chosen: offer more motions or widen the limits", wish.count));
  return allowed;
}

bool among(const std::vector<std::size_t>& list, std::size_t motion) {
  return std::find(list.begin(), list.end(), motion) != list.end();
}

// Adds to `first` what makes the cost least, one after the other.
std::vector<std::size_t> greedy(Choice& choice, const std::vector<std::size_t>& allowed, std::size_t first,
                                std::size_t count) {
  std::vector<std::size_t> chosen{first};
  choice.add(first);
  while (chosen.size() < count) {
    double least = std::numeric_limits<double>::infinity();
    std::size_t best = 0;
    for (const std::size_t motion : allowed) {
      if (among(chosen, motion)) continue;
      const double cost = choice.cost_with(motion);
      if (cost >= least) continue;
      least = cost;
      best = motion;
    }
    choice.add(best);
    chosen.push_back(best);
  }
  return chosen;
}

// The exchange that makes the cost least, done; false when none makes it less.
bool exchange_once(Choice& choice, const std::vector<std::size_t>& allowed, std::vector<std::size_t>& chosen) {
  constexpr double worth = 1e-10;  // of the cost: less is rounding and could go round in circles
  const double now = choice.cost();
  double least = now - worth * (1 + now);
  std::size_t place = chosen.size(), incoming = 0;
  for (std::size_t i = 0; i < chosen.size(); ++i) {
    choice.remove(chosen[i]);
    for (const std::size_t motion : allowed) {
      if (among(chosen, motion)) continue;
      const double cost = choice.cost_with(motion);
      if (cost >= least) continue;
      least = cost;
      place = i;
      incoming = motion;
    }
    choice.add(chosen[i]);
  }
  if (place == chosen.size()) return false;
  choice.remove(chosen[place]);
  choice.add(incoming);
  chosen[place] = incoming;
  return true;
}

}  // namespace

Selection select_motions(const FitProblem& problem, const SelectionWish& wish, const std::string& where) {
  validate(problem, wish, where);
  std::vector<double> factors;
  for (std::size_t m = 0; m < problem.ordinates.size(); ++m) factors.push_back(own_factor(problem, wish, m));
  const std::vector<std::size_t> allowed = allowed_motions(wish, factors, where);
  Selection selection;
  selection.cost = std::numeric_limits<double>::infinity();
  const Choice none(problem, wish, factors);
  const std::size_t stride = (allowed.size() + most_starts - 1) / most_starts;
  for (std::size_t start = 0; start < allowed.size(); start += stride) {
    Choice choice = none;
    std::vector<std::size_t> motions = greedy(choice, allowed, allowed[start], wish.count);
    while (exchange_once(choice, allowed, motions)) {
    }
    if (choice.cost() >= selection.cost) continue;
    selection.cost = choice.cost();
    selection.motions = std::move(motions);
  }
  std::sort(selection.motions.begin(), selection.motions.end());
  for (const std::size_t motion : selection.motions) selection.factors.push_back(factors[motion]);
  selection.cost = selection_cost(problem, wish, selection.motions);
  return selection;
}

double selection_cost(const FitProblem& problem, const SelectionWish& wish, const std::vector<std::size_t>& motions) {
  std::vector<double> factors;
  for (std::size_t m = 0; m < problem.ordinates.size(); ++m) factors.push_back(own_factor(problem, wish, m));
  Choice choice(problem, wish, factors);
  for (const std::size_t motion : motions) choice.add(motion);
  return choice.cost();
}

}  // namespace pilotis
