// How fast records are read, in bytes of the file per second: the whole reader (recognising, header, numbers, checks,
// scaling) beside the bare number parser of the standard library (std::from_chars) on the same numbers, already cut out
// of the same file. Invented files of several megabytes, in memory.
#include <benchmark/benchmark.h>
#include <fmt/format.h>

#include <charconv>
#include <cmath>
#include <string>
#include <string_view>
#include <vector>

#include "io/records/record.hpp"
#include "io/records/text.hpp"
#include "tests/support/invented_records.hpp"

namespace pilotis {
namespace {

// A swelling and dying sine of many digits, rounded to three decimals; its mean is not 0.
Samples shaking(double size, std::size_t samples) {
  Samples values;
  for (std::size_t i = 0; i < samples; ++i) {
    const double t = static_cast<double>(i) / static_cast<double>(samples);
    values.push_back(std::round(1e3 * size * std::sin(3.14159265 * t) * std::sin(9e3 * t)) / 1e3);
  }
  return values;
}

std::string plain_two_columns(const Samples& in_cm_s2) {
  std::string text = "time (s), acceleration (cm/s2)\n";
  for (std::size_t i = 0; i < in_cm_s2.size(); ++i)
    text += fmt::format("{:.2f},{:.6f}\n", 0.01 * static_cast<double>(i), in_cm_s2[i]);
  return text;
}

std::string plain_one_column(const Samples& in_cm_s2) {
  std::string text = "# units: cm/s2\n# step: 0.01 s\n";
  for (double value : in_cm_s2) text += fmt::format("{:.7e}\n", value);
  return text;
}

struct Case {
  const char* name;
  std::string (*make)(const Samples&);
  double size;  // of the peak, in the unit of the format
  std::size_t samples = 300'000;
};
constexpr Case cases[] = {
    {"PEER", invented_peer, 1},
    {"COSMOS", invented_cosmos, 400},
    {"CSMIP_volume_2", invented_csmip_volume2, 400},
    {"CSMIP_volume_1_pairs", invented_csmip_volume1_pairs, 5, 90'000} /* times below 1000 s */,
    {"SMC", invented_smc, 400},
    {"K_NET", invented_knet, 400e3},
    {"DYNA_one_value_a_line", invented_esm_dyna, 400},
    {"CWB_table", invented_cwb, 400},
    {"plain_two_columns", plain_two_columns, 400},
    {"plain_one_column", plain_one_column, 400},
};

// All numbers of a text, glued ones too, without a plus in front.
std::vector<std::string_view> numbers_of(std::string_view text) {
  std::vector<std::string_view> numbers;
  for (std::string_view number = first_number_in(text); !number.empty(); number = first_number_in(text)) {
    text.remove_prefix(static_cast<std::size_t>(number.data() + number.size() - text.data()));
    if (number.front() == '+') number.remove_prefix(1);
    numbers.push_back(number);
  }
  return numbers;
}

// Reading it must give as many samples as were written, and a peak of the right size, before any time is taken.
bool reads_right(const std::string& content, const Case& one) {
  const FileOfRecords file = read_record_content(content, "made");
  for (const RecordComponent& component : file.components)
    if (component.record.samples.size() != one.samples) return false;
  return peak_of(file.components.front().record).value != 0;
}

void whole_reader(benchmark::State& state, const Case& one) {
  const std::string content = one.make(shaking(one.size, one.samples));
  if (!reads_right(content, one)) return state.SkipWithError("it is not read as it was written");
  for (auto _ : state) benchmark::DoNotOptimize(read_record_content(content, "made"));
  state.SetBytesProcessed(static_cast<std::int64_t>(state.iterations() * content.size()));
}

void bare_parser(benchmark::State& state, const Case& one) {
  const std::string content = one.make(shaking(one.size, one.samples));
  const std::vector<std::string_view> numbers = numbers_of(content);
  if (numbers.size() < one.samples) return state.SkipWithError("there are too few numbers");
  for (auto _ : state)
    for (std::string_view number : numbers) {
      double value = 0;
      std::from_chars(number.data(), number.data() + number.size(), value);
      benchmark::DoNotOptimize(value);
    }
  state.SetBytesProcessed(static_cast<std::int64_t>(state.iterations() * content.size()));
}

const bool registered = [] {
  for (const Case& one : cases) {
    benchmark::RegisterBenchmark((std::string("whole_reader/") + one.name).c_str(), whole_reader, one);
    benchmark::RegisterBenchmark((std::string("bare_parser/") + one.name).c_str(), bare_parser, one);
  }
  return true;
}();

}  // namespace
}  // namespace pilotis
