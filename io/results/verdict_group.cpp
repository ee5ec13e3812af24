// /verdict. Limits of different dimensions stand in different columns, so that every array has one unit: value_ratio,
// value_length, value_force, ...; a row is NaN in the columns that are not its own. Columns no row needs are left out.
#include <fmt/format.h>

#include <cmath>
#include <limits>
#include <set>

#include "core/error.hpp"
#include "io/results/group_reader.hpp"
#include "io/results/group_writer.hpp"
#include "io/results/groups.hpp"

namespace pilotis {

namespace {

constexpr double unknown = std::numeric_limits<double>::quiet_NaN();

struct Column {
  Dimension dimension;
  const char* suffix;
};
constexpr Column columns[] = {{Dimension::none, "ratio"},        {Dimension::length, "length"},
                              {Dimension::velocity, "velocity"}, {Dimension::acceleration, "acceleration"},
                              {Dimension::force, "force"},       {Dimension::moment, "moment"}};

// One array per dimension that occurs: `value(i)` in the rows of that dimension, NaN in the others.
template <class Value>
void write_by_dimension(GroupWriter& group, const std::string& name, const std::string& axis,
                        const std::vector<const Limit*>& rows, Value value, const std::string& long_name) {
  for (const Column& column : columns) {
    std::vector<double> values(rows.size(), unknown);
    bool occurs = false;
    for (std::size_t i = 0; i < rows.size(); ++i) {
      if (rows[i]->quantity->dimension != column.dimension) continue;
      values[i] = value(i);
      occurs = true;
    }
    if (occurs)
      group.numbers(fmt::format("{}_{}", name, column.suffix), {axis}, values, si_unit(column.dimension), long_name);
  }
}

template <class T, class Rows, class Get>
std::vector<T> column_of(const Rows& rows, Get get) {
  std::vector<T> values;
  for (const auto& row : rows) values.push_back(T(get(row)));
  return values;
}

// Factors a limit names, padded with NaN; a row of NaN alone means all factors of the study.
void write_factors(GroupWriter& group, const std::vector<Limit>& limits) {
  std::size_t most = 1;
  for (const Limit& limit : limits) most = std::max(most, limit.factors.size());
  group.count_scale("listed", 0, most, "place in the list of factors a limit is for");
  std::vector<double> values;
  for (const Limit& limit : limits) {
    auto row = limit.factors;
    row.resize(most, unknown);
    values.insert(values.end(), row.begin(), row.end());
  }
  group.numbers("limit_factors", {"limit", "listed"}, values, "1",
                "factors on the ground motion the limit is for; NaN throughout: all");
}

void write_limits(GroupWriter& group, const std::vector<Limit>& limits) {
  group.count_scale("limit", 0, limits.size(), "limit of the study, counted from 0");
  const GroupWriter::Axes axes{"limit"};
  group.texts("limit_quantity", axes, column_of<std::string>(limits, [](const Limit& l) { return l.quantity->name; }),
              "quantity the limit is for");
  group.texts("limit_statistic", axes,
              column_of<std::string>(limits, [](const Limit& l) { return statistic_name(l.statistic); }),
              "statistic over the suite: mean, max, median or percentile");
  group.numbers("limit_percentile", axes, column_of<double>(limits, [](const Limit& l) { return l.percentile; }), "1",
                "percentile, 0 to 100, where the statistic is one");
  group.texts("limit_source", axes, column_of<std::string>(limits, [](const Limit& l) { return l.source; }),
              "where the limit comes from, as the study states it");
  std::vector<const Limit*> rows;
  for (const Limit& limit : limits) rows.push_back(&limit);
  write_by_dimension(
      group, "limit_value", "limit", rows, [&](std::size_t i) { return limits[i].value; },
      "what the statistic may reach at most");
  write_factors(group, limits);
}

void write_outcome_numbers(GroupWriter& group, const std::vector<Limit>& limits, const std::vector<Outcome>& outcomes) {
  std::vector<const Limit*> rows;
  for (const Outcome& outcome : outcomes) rows.push_back(&limits.at(static_cast<std::size_t>(outcome.limit)));
  write_by_dimension(
      group, "value", "outcome", rows, [&](std::size_t i) { return outcomes[i].value; },
      "statistic over the suite; infinite when collapsed runs decide it");
  write_by_dimension(
      group, "step_error", "outcome", rows, [&](std::size_t i) { return outcomes[i].step_error; },
      "error of the value from the time step, estimated; NaN when not estimated");
  group.numbers("factor", {"outcome"}, column_of<double>(outcomes, [](const Outcome& o) { return o.factor; }), "1",
                "factor on the ground motion");
  group.numbers("margin", {"outcome"}, column_of<double>(outcomes, [](const Outcome& o) { return o.margin; }), "1",
                "(limit - value) / limit");
}

void write_outcomes(GroupWriter& group, const std::vector<Limit>& limits, const Buildings& buildings,
                    const std::vector<Outcome>& outcomes) {
  group.count_scale("outcome", 0, outcomes.size(), "one limit for one building at one factor, counted from 0");
  const GroupWriter::Axes axes{"outcome"};
  const auto integers = [&](const char* name, int Outcome::*member, const char* long_name) {
    group.integers(name, axes, column_of<std::int64_t>(outcomes, [=](const Outcome& o) { return o.*member; }),
                   long_name);
  };
  integers("limit_index", &Outcome::limit, "which limit");
  group.texts("building", axes,
              column_of<std::string>(
                  outcomes, [&](const Outcome& o) { return buildings.at(static_cast<std::size_t>(o.building)).name; }),
              "name of the building");
  write_outcome_numbers(group, limits, outcomes);
  integers("place", &Outcome::place,
           "story or floor where the statistic is largest; 0 for quantities of the whole run");
  group.texts("motion", axes, column_of<std::string>(outcomes, [](const Outcome& o) { return o.motion; }),
              "motion with the largest peak at that place");
  integers("runs", &Outcome::runs, "runs of this building at this factor");
  integers("collapsed", &Outcome::collapsed, "runs of this building at this factor that collapsed");
  integers("not_converged", &Outcome::not_converged, "runs of this building at this factor that were not completed");
  group.integers("exceeded", axes, column_of<std::int64_t>(outcomes, [](const Outcome& o) { return o.exceeded; }),
                 "1 when the value is above the limit");
  group.texts("finding", axes,
              column_of<std::string>(outcomes, [](const Outcome& o) { return finding_name(o.finding); }),
              "holds, exceeded, too close (within its step error of the limit) or undetermined");
}

Statistic statistic_from(const std::string& name, const std::string& where) {
  for (Statistic statistic : {Statistic::mean, Statistic::max, Statistic::median, Statistic::percentile})
    if (statistic_name(statistic) == name) return statistic;
  throw input_error(where, fmt::format("the array /verdict/limit_statistic holds \"{}\"", name),
                    "allowed are mean, max, median, percentile");
}

const Quantity* quantity_from(const std::string& name, const std::string& where) {
  if (name == residual_drift_ratio().name) return &residual_drift_ratio();
  if (const Quantity* quantity = find_quantity(name)) return quantity;
  throw input_error(where, fmt::format("the array /verdict/limit_quantity holds \"{}\"", name),
                    "give a result file of this version");
}

void read_values(const GroupReader& group, std::vector<Limit>& limits) {
  for (const Column& column : columns) {
    const std::string name = fmt::format("limit_value_{}", column.suffix);
    bool needed = false;
    for (const Limit& limit : limits) needed = needed || limit.quantity->dimension == column.dimension;
    if (!needed) continue;
    const auto values = group.numbers(name, limits.size());
    for (std::size_t i = 0; i < limits.size(); ++i)
      if (limits[i].quantity->dimension == column.dimension) limits[i].value = values[i];
  }
}

void read_factors(const GroupReader& group, std::vector<Limit>& limits) {
  const std::size_t most = group.length("listed");
  const auto factors = group.numbers("limit_factors", limits.size() * most);
  for (std::size_t i = 0; i < factors.size(); ++i)
    if (!std::isnan(factors[i])) limits[i / most].factors.push_back(factors[i]);
}

}  // namespace

void write_verdict(H5::H5File& file, const std::vector<Limit>& limits, const Buildings& buildings,
                   const Verdict& verdict) {
  GroupWriter group(file, "/verdict");
  group.attribute("runs", static_cast<double>(verdict.runs));
  group.attribute("collapsed", static_cast<double>(verdict.collapsed));
  group.attribute("not_converged", static_cast<double>(verdict.not_converged));
  if (!limits.empty()) write_limits(group, limits);
  if (!verdict.outcomes.empty()) write_outcomes(group, limits, buildings, verdict.outcomes);
}

std::vector<Limit> read_limits(const ResultFile& from) {
  const GroupReader group(from.file, from.where, "/verdict");
  const std::size_t count = group.length("limit");
  std::vector<Limit> limits(count);
  if (count == 0) return limits;
  const auto quantity = group.texts("limit_quantity", count), statistic = group.texts("limit_statistic", count),
             source = group.texts("limit_source", count);
  const auto percentile = group.numbers("limit_percentile", count);
  for (std::size_t i = 0; i < count; ++i) {
    limits[i].quantity = quantity_from(quantity[i], from.where);
    limits[i].statistic = statistic_from(statistic[i], from.where);
    limits[i].percentile = percentile[i];
    limits[i].source = source[i];
  }
  read_values(group, limits);
  read_factors(group, limits);
  return limits;
}

}  // namespace pilotis
