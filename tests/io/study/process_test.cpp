// The `process` list as a study writes it.
#include <gtest/gtest.h>

#include "core/error.hpp"
#include "io/study/process_section.hpp"

namespace pilotis {
namespace {

// The study's units are kN and cm, so that a bare acceleration is in cm/s2.
std::vector<ProcessStep> read(const std::string& content) {
  const StudySource source{"study.toml", {"kN", "cm", ""}};
  const Node root = parse_toml(content, source.file);
  const Node::Entry* entry = root.find("process");
  return read_process(ValueReader(source, entry->value, entry->line, "suite.process"));
}

std::string refusal(const std::string& content) {
  try {
    read(content);
  } catch (const Error& e) {
    EXPECT_EQ(e.kind(), ErrorKind::input);
    return e.what();
  }
  return "";
}

void expect_refused(const std::string& content, const std::string& start, const std::string& remedy) {
  const std::string found = refusal(content);
  EXPECT_EQ(found.substr(0, start.size()), start);
  EXPECT_NE(found.find(remedy), std::string::npos) << found;
}

TEST(Process, ReadsStepsInOrderInSi) {
  const auto steps = read(R"(process = [
  { step = "remove_mean" },
  { step = "pad", corner = "100 mHz" },
  { step = "bandpass", low = "0.1 Hz", high = 25, order = 6, pass = "causal" },
  { step = "highpass", corner = "0.2 Hz" },
  { step = "baseline", fit = "displacement", order = 6 },
  { step = "trim", from = "5 %", lead = "500 ms" },
  { step = "resample", to = "5 ms", method = "linear" },
  { step = "scale", pga = "0.3 g" },
  { step = "scale", pga = 30 },
])");
  ASSERT_EQ(steps.size(), 9u);
  const std::vector<std::vector<double>> values{{},     {0, 0, 0.1, 4},       {0.1, 25, 6, 1}, {0.2, 4, 0},
                                                {1, 6}, {0.05, 0.95, 0.5, 0}, {0.005, 1}};
  for (std::size_t i = 0; i < values.size(); ++i) EXPECT_EQ(steps[i].values, values[i]) << steps[i].name;
  EXPECT_EQ(steps[7].values.at(1), 0.3 * 9.80665);
  EXPECT_EQ(steps[8].values.at(1), 0.3);
  EXPECT_EQ(steps[2].name, "bandpass");
  EXPECT_EQ(steps[2].where, "study.toml:4: suite.process[3]");
  EXPECT_TRUE(read("process = []").empty());
}

TEST(Process, EveryStepOfTheCatalogueCanBeWritten) {
  for (const Method& method : process_catalogue()) {
    std::string text = "process = [{ step = \"" + std::string(method.name) + "\"";
    for (const Parameter& parameter : method.parameters) {
      if (parameter.otherwise) continue;
      // Corners one above the other.
      const std::string value = parameter.key == "high" ? "2" : "1";
      text +=
          ", " + std::string(parameter.key) + " = \"" + value + " " + std::string(si_unit(parameter.dimension)) + "\"";
    }
    if (method.name == "taper") text += ", fraction = 0.1";
    if (method.name == "pad") text += ", before = 1";
    if (method.name == "scale") text += ", factor = 2";
    EXPECT_EQ(read(text + " }]").at(0).name, method.name);
  }
}

TEST(Process, RefusalsSayLineKeyFoundAndAllowed) {
  expect_refused("process = 3", "study.toml:1: suite.process: found the number 3", "a list of steps");
  expect_refused("\nprocess = [\"remove_mean\"]", "study.toml:2: suite.process[1]: found the text", "{ step =");
  expect_refused("process = [{ order = 3 }]", "study.toml:1: suite.process[1].step: this key is missing",
                 "remove_mean, ");
  expect_refused("process = [{ stepp = \"taper\" }]", "study.toml:1: suite.process[1].stepp: found the unknown key",
                 "did you mean \"step\"?");
  expect_refused("process = [{ step = \"band_pass\" }]",
                 "study.toml:1: suite.process[1].step: there is no processing step \"band_pass\"",
                 "did you mean \"bandpass\"?");
  expect_refused("process = [\n{ step = \"remove_mean\" },\n{ step = \"bandpass\", low = 1, hihg = 2 }]",
                 "study.toml:3: suite.process[2].hihg: found the unknown key", "did you mean \"high\"?");
  expect_refused("process = [{ step = \"bandpass\", low = 1 }]",
                 "study.toml:1: suite.process[1].high: this key is missing", "give high corner, greater than 0 Hz");
  expect_refused("process = [{ step = \"bandpass\", low = \"1 rad/s\", high = 3 }]",
                 "study.toml:1: suite.process[1].low: found the unit \"rad/s\", which is not a unit of frequency",
                 "Hz");
  expect_refused("process = [{ step = \"bandpass\", low = \"1 s\", high = 3 }]",
                 "study.toml:1: suite.process[1].low: found the unit \"s\"", "a unit of frequency is needed");
  expect_refused("process = [{ step = \"bandpass\", low = 3, high = 1 }]",
                 "study.toml:1: suite.process[1].low: found 3 Hz", "less than high, 1 Hz");
  expect_refused("process = [{ step = \"bandpass\", low = 1, high = 3, order = 40 }]",
                 "study.toml:1: suite.process[1].order: found 40", "at most 10");
  expect_refused("process = [{ step = \"lowpass\", corner = 3, pass = \"acusal\" }]",
                 "study.toml:1: suite.process[1].pass: there is no pass \"acusal\"", "did you mean \"acausal\"?");
  expect_refused("process = [{ step = \"lowpass\", corner = 3, pass = 1 }]",
                 "study.toml:1: suite.process[1].pass: found the number 1", "text in quotes");
  expect_refused("process = [{ step = \"scale\", pga = \"0.3 m\" }]",
                 "study.toml:1: suite.process[1].pga: found the unit", "a unit of acceleration");
  expect_refused("process = [{ step = \"scale\", factor = 2, pgv = 2 }]",
                 "study.toml:1: suite.process[1]: found factor and pgv", "exactly one");
  expect_refused("process = [{ step = \"scale\", mean_period = 2 }]",
                 "study.toml:1: suite.process[1].mean_period: found the unknown key", "allowed: step, factor, pga");
}

}  // namespace
}  // namespace pilotis
