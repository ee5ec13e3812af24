#include "apps/fit_report.hpp"

#include <fmt/format.h>

#include <cmath>
#include <limits>

#include "apps/record_csv.hpp"
#include "apps/text_table.hpp"
#include "core/units/units.hpp"

namespace pilotis {

namespace {

std::string in_g(double acceleration) { return fmt::format("{:.4f}", acceleration / standard_gravity); }

// The target at the picture's periods; not a number where it is not defined.
std::vector<double> shown_target(const FitTask& task) {
  std::vector<double> ordinates;
  for (const double period : task.shown)
    ordinates.push_back(task.targets[0].defined_at(period) ? task.targets[0].acceleration(period)
                                                           : std::numeric_limits<double>::quiet_NaN());
  return ordinates;
}

FitPicture picture_of(const FitReport& report, const FitTask& task, const std::string& title) {
  FitPicture picture;
  picture.title = title;
  picture.subtitle = task_text(task);
  picture.from = task.from;
  picture.to = task.to;
  picture.periods = task.shown;
  picture.thin = report.shown_each;
  picture.curves = {{"target", PictureLine::target, shown_target(task)},
                    {report.before_name, PictureLine::before, report.shown_before},
                    {report.after_name, PictureLine::after, report.shown_after}};
  return picture;
}

}  // namespace

std::vector<double> mean_of(const std::vector<std::vector<double>>& rows) {
  std::vector<double> mean(rows.front().size(), 0.0);
  for (const std::vector<double>& row : rows)
    for (std::size_t i = 0; i < mean.size(); ++i) mean[i] += row[i] / static_cast<double>(rows.size());
  return mean;
}

std::string task_text(const FitTask& task) {
  return fmt::format("{}; {} periods from {:.4g} to {:.4g} s", task.targets[0].description(), task.periods.size(),
                     task.from, task.to);
}

std::string spectra_text(const FitReport& report, const FitTask& task) {
  constexpr std::size_t most_rows = 15;
  TextTable table({{"period (s)"},
                   {"target (g)"},
                   {fmt::format("{} (g)", report.before_name)},
                   {fmt::format("{} (g)", report.after_name)},
                   {"after/target"}});
  const std::size_t count = task.periods.size(), rows = std::min(count, most_rows);
  for (std::size_t row = 0; row < rows; ++row) {
    const std::size_t i = row * (count - 1) / std::max<std::size_t>(1, rows - 1);
    table.add_row({fmt::format("{:.4g}", task.periods[i]), in_g(task.target_ordinates[i]), in_g(report.before[i]),
                   in_g(report.after[i]), fmt::format("{:.3f}", report.after[i] / task.target_ordinates[i])});
  }
  return table.text();
}

std::string spectra_csv(const FitReport& report, const FitTask& task) {
  std::string text = fmt::format("# pseudo-acceleration, damping {:g} %\n# target: {}\n",
                                 100 * task.targets[0].damping(), task_text(task));
  text += fmt::format("period (s), target (m/s^2), {} (m/s^2), {} (m/s^2), after over target (1)", report.before_name,
                      report.after_name);
  for (const std::string& name : report.names) text += fmt::format(", {} after (m/s^2)", name);
  text += "\n";
  for (std::size_t i = 0; i < task.periods.size(); ++i) {
    text += fmt::format("{:.9g}, {:.9g}, {:.9g}, {:.9g}, {:.9g}", task.periods[i], task.target_ordinates[i],
                        report.before[i], report.after[i], report.after[i] / task.target_ordinates[i]);
    for (const std::vector<double>& spectrum : report.each) text += fmt::format(", {:.9g}", spectrum[i]);
    text += "\n";
  }
  return text;
}

nlohmann::ordered_json report_json(const FitReport& report, const FitTask& task) {
  nlohmann::ordered_json json;
  json["target"] = {{"description", task.targets[0].description()}, {"damping_ratio", task.targets[0].damping()}};
  json["range_s"] = {task.from, task.to};
  json["spectra"] = {{"period_s", task.periods},
                     {"target_m_per_s2", task.target_ordinates},
                     {"before_m_per_s2", report.before},
                     {"after_m_per_s2", report.after}};
  if (!report.findings.empty()) json["clauses"] = findings_json(report.findings);
  return json;
}

void write_files(const FitOptions& options, const FitReport& report, const FitTask& task, const std::string& title) {
  if (!options.csv.empty()) write_text_file(options.csv, spectra_csv(report, task), options.command + " --csv");
  if (!options.svg.empty())
    write_text_file(options.svg, svg_of(picture_of(report, task, title)), options.command + " --svg");
}

}  // namespace pilotis
