// Studies with one thing wrong: each error names file, line, key, what was found and what is allowed.
#include <fmt/format.h>
#include <gtest/gtest.h>

#include "core/error.hpp"
#include "tests/io/study/study_fixture.hpp"

namespace pilotis {
namespace {

using test::Folder;
using test::line_starting;
using test::valid_study;

struct Bad {
  const char* line;         // start of the line of valid_study that is replaced
  const char* replacement;  // "" to leave the line empty
  const char* at;           // start of the line (after replacing) that the error names
  const char* path;
  const char* found;    // in the problem
  const char* allowed;  // in the remedy
};

// clang-format off
const std::vector<Bad> bad_studies{
    // Unknown keys, with the nearest.
    {"title", "titel = \"x\"", "titel", "titel", "unknown key \"titel\"", "did you mean \"title\"?"},
    {"[units]", "[unit]", "[unit]", "unit", "unknown key \"unit\"", "did you mean \"units\"?"},
    {"force =", "forces = \"kN\"", "forces", "units.forces", "unknown key", "did you mean \"force\"?"},
    {"p_delta", "pdelta = true", "pdelta", "building.pdelta", "unknown key", "did you mean \"p_delta\"?"},
    {"height = 4.5", "hieght = 4.5", "hieght", "story[1].hieght", "unknown key \"hieght\"", "did you mean \"height\"?"},
    {"dashpot", "dashpots = 10", "dashpots", "story[2].dashpots", "unknown key", "did you mean \"dashpot\"?"},
    {"spring = { law = \"bilinear\"", "spring = { law = \"bilinear\", stiffness = 1, yield_shear = 1, post_yeild_ratio = 0 }",
     "spring", "story[1].spring.post_yeild_ratio", "unknown key", "did you mean \"post_yield_ratio\"? allowed: law, stiffness, yield_shear, post_yield_ratio"},
    {"spring = { law = \"bilinear\"", "spring = { lav = \"linear\", stiffness = 1 }", "spring", "story[1].spring.lav", "unknown key", "did you mean \"law\"?"},
    {"spring = { law = \"bilinear\"", "spring = { law = \"linear\", stiffness = 1, yield_shear = 1 }", "spring",
     "story[1].spring.yield_shear", "unknown key", "allowed: law, stiffness"},
    {"units = \"g\"", "unit = \"g\"", "unit = ", "suite.unit", "unknown key", "did you mean \"units\"?"},
    {"floor = 2", "flor = 2", "flor", "force[1].flor", "unknown key", "did you mean \"floor\"?"},
    {"velocity", "speed = [0, 0, 0]", "speed", "initial.speed", "unknown key", "allowed: displacement, velocity"},
    {"tail", "tial = 10", "tial", "march.tial", "unknown key", "did you mean \"tail\"?"},
    {"scheme", "scheme = { name = \"newmark\", bata = 0.25 }", "scheme", "march.scheme.bata", "unknown key", "did you mean \"beta\"?"},
    {"scheme", "scheme = { name = \"linear_acceleration\", beta = 0.25 }", "scheme", "march.scheme.beta", "unknown key", "allowed: name"},
    {"every", "evry = 4", "evry", "keep.evry", "unknown key", "did you mean \"every\"?"},
    {"statistic = \"max\"", "stat = \"max\"", "stat = ", "limit[2].stat", "unknown key", "did you mean \"statistic\"?"},
    // Missing keys, at the table that lacks them.
    {"[units]", "units = { force = \"kN\" }\n[march.x]", "units", "units.length", "missing", "\"m\""},
    {"kind", "", "[building]", "building.kind", "missing", "stick"},
    {"damping", "", "[building]", "building.damping", "missing", "{ kind = \"none\" }"},
    {"height = 4.5", "", "[[story]]", "story[1].height", "missing", "greater than 0 m"},
    {"spring = { law = \"bilinear\"", "", "[[story]]", "story[1].spring", "missing", "law = \"linear\""},
    {"spring = { law = \"bilinear\"", "spring = { stiffness = 1 }", "spring", "story[1].spring.law", "missing", "bouc_wen"},
    {"spring = { law = \"bilinear\"", "spring = { law = \"bilinear\", yield_shear = 1 }", "spring",
     "story[1].spring.stiffness", "missing", "the elastic stiffness"},
    {"weight", "", "[[story]]", "story[1]", "neither weight nor mass", "exactly one"},
    {"motions", "", "[suite]", "suite.motions", "missing", "motions/*.csv"},
    {"source = \"equipment", "", "[[limit]]\nquantity = \"floor", "limit[2].source", "missing", "where the limit comes from"},
    {"percentile", "", "[[limit]]", "limit[1].percentile", "missing", "at least 0 and at most 100"},
    // Wrong types.
    {"title", "title = 3", "title", "title", "the number 3", "text in quotes"},
    {"title", "title = \"\"", "title", "title", "empty text", "something must be said"},
    {"p_delta", "p_delta = \"yes\"", "p_delta", "building.p_delta", "the text \"yes\"", "true or false"},
    {"p_delta", "p_delta = 1", "p_delta", "building.p_delta", "the number 1", "true or false"},
    {"height = 4.5", "height = true", "height", "story[1].height", "true", "a number (in m) or text with a unit of length"},
    {"height = 4.5", "height = \"tall\"", "height", "story[1].height", "the text \"tall\"", "a number (in m)"},
    {"height = 4.5", "height = [1]", "height", "story[1].height", "a list of 1", "a number (in m)"},
    {"height = 4.5", "height = 2024-01-01", "height", "story[1].height", "the date or time 2024-01-01", "a number (in m)"},
    {"weight", "weight = \"4200\"", "weight", "story[1].weight", "\"4200\" without a unit", "\"1.5 kN\""},
    {"spring = { law = \"bilinear\"", "spring = 5", "spring", "story[1].spring", "the number 5", "a table"},
    {"motions", "motions = \"a.csv\"", "motions", "suite.motions", "the text", "a list in square brackets"},
    {"motions", "motions = [1]", "motions", "suite.motions[1]", "the number 1", "a path, a pattern or a table"},
    {"table", "table = [[0, 0, 0], [1, 1]]", "table", "force[1].table[1]", "a list of 3", "[time, force]"},
    {"histories", "histories = true", "histories", "keep.histories", "true", "\"all\", \"none\" or a list"},
    {"[march]", "[[march]]", "[[march]]", "march", "a list of 1", "a table"},
    {"[[force]]", "[force]", "[force]", "force", "a table", "[[force]] with double brackets"},
    // Wrong units.
    {"force =", "force = \"kg\"", "force", "units.force", "\"kg\"", "such as N, kN"},
    {"length", "length = \"metres per second\"", "length", "units.length", "\"metres per second\"", "such as m, cm"},
    {"height = 4.5", "height = \"4.5 kN\"", "height", "story[1].height", "not a unit of length", "such as m, cm"},
    {"mass", "mass = \"400 ton\"", "mass", "story[2].mass", "\"ton\"", "short_ton"},
    {"spring = { law = \"bouc", "spring = { law = \"linear\", stiffness = \"150 mm/kN\" }", "spring = { law = \"linear",
     "story[2].spring.stiffness", "\"mm/kN\"", "kN/mm"},
    {"units = \"g\"", "units = \"m\"", "units = ", "suite.units", "not a unit of acceleration", "such as g, m/s2"},
    {"value = \"0.8 g\"", "value = \"0.8 kN\"", "value = \"0.8 kN", "limit[2].value", "not a unit of acceleration", "such as g"},
    {"value = 0.02", "value = \"2 m\"", "value = \"2", "limit[1].value", "not a unit of a plain number", "%"},
    // Impossible values.
    {"height = 4.5", "height = 0", "height", "story[1].height", "found 0 m", "greater than 0 m"},
    {"height = 4.5", "height = nan", "height", "story[1].height", "found nan", "finite"},
    {"height = 4.5", "height = \"-3 m\"", "height", "story[1].height", "found \"-3 m\"", "greater than 0 m"},
    {"weight", "weight = -1", "weight", "story[1].weight", "found -1 kN", "greater than 0 N"},
    {"weight", "weight = 1\nmass = 1", "mass = 1", "story[1].mass", "both weight and mass", "exactly one"},
    {"mass", "mass = 0", "mass", "story[2].mass", "found 0 kN s2/m", "greater than 0 kg"},
    {"dashpot", "dashpot = -10", "dashpot", "story[2].dashpot", "found -10 kN s/m", "at least 0 N s/m"},
    {"repeat", "repeat = 1.5", "repeat", "story[2].repeat", "found 1.5", "whole number"},
    {"repeat", "repeat = 0", "repeat", "story[2].repeat", "found 0", "at least 1"},
    {"spring = { law = \"bilinear\"", "spring = { law = \"bilinear\", stiffness = 1, yield_shear = 1, post_yield_ratio = 1 }",
     "spring", "story[1].spring.post_yield_ratio", "found 1", "at least -1 and less than 1"},
    {"spring = { law = \"bouc", "spring = { law = \"bouc_wen\", stiffness = 1, yield_shear = 1, gamma = 0.7 }",
     "spring = { law = \"bouc", "story[2].spring.gamma", "found 0.7", "between -beta and beta"},
    {"kind", "kind = \"frame\"", "kind", "building.kind", "\"frame\" cannot be built yet", "stick"},
    {"kind", "kind = \"stik\"", "kind", "building.kind", "no kind of building \"stik\"", "did you mean \"stick\"?"},
    {"spring = { law = \"bilinear\"", "spring = { law = \"bilinar\", stiffness = 1, yield_shear = 1 }", "spring",
     "story[1].spring.law", "no law \"bilinar\"", "did you mean \"bilinear\"?"},
    {"damping", "damping = { kind = \"rayley\", ratio = 0.05, modes = [1, 2] }", "damping", "building.damping.kind",
     "\"rayley\"", "did you mean \"rayleigh\"?"},
    {"damping", "damping = { kind = \"rayleigh\", ratio = 5, modes = [1, 2] }", "damping", "building.damping.ratio",
     "found 5", "5% is 0.05"},
    {"damping", "damping = { kind = \"rayleigh\", ratio = [0.1, 0.1, 0.1], modes = [1, 2] }", "damping", "building.damping.ratio",
     "a list of 3", "one for each of the two"},
    {"damping", "damping = { kind = \"rayleigh\", ratio = 0.05, modes = [2, 1] }", "damping", "building.damping.modes",
     "not two rising", "[1, 3]"},
    {"damping", "damping = { kind = \"rayleigh\", ratio = 0.05, modes = [1, 4] }", "damping", "building.damping.modes[2]",
     "found 4", "at least 1 and at most 3"},
    {"damping", "damping = { kind = \"rayleigh\", ratio = 0.05, modes = [1, 2], stiffness = \"tangent\" }", "damping",
     "building.damping.stiffness", "\"tangent\"", "allowed: initial"},
    {"damping", "damping = { kind = \"rayleigh\", mass_factor = 0.1, stiffness_factor = 0.1, ratio = 0.05 }", "damping",
     "building.damping.ratio", "unknown key \"ratio\"", "mass_factor"},
    {"damping", "damping = { kind = \"modal\", ratio = [0.1, 0.1, 0.1, 0.1] }", "damping", "building.damping.ratio",
     "a list of 4", "one ratio for all modes"},
    {"damping", "damping = { kind = \"none\", ratio = 0.05 }", "damping", "building.damping.ratio", "unknown key", "allowed: kind"},
    {"motions", "motions = [\"nothing/*.csv\"]", "motions", "suite.motions[1]", "no file matches \"nothing/*.csv\"", "relative to"},
    {"motions", "motions = [\"absent.csv\"]", "motions", "suite.motions[1]", "no file \"absent.csv\"", "relative to"},
    {"motions", "motions = []", "motions", "suite.motions", "empty list", "at least one"},
    {"motions", "motions = [\"site.txt\", \"site.txt\"]", "motions", "suite.motions[2]", "a second motion is called \"site.txt\"", "name ="},
    {"motions", "motions = [{ file = \"motions/*.csv\", name = \"x\" }]", "motions", "suite.motions[1].name", "one name for 2 files", "one file"},
    {"motions", "motions = [{ file = \"site.txt\", factor = 0 }]", "motions", "suite.motions[1].factor", "found 0", "no motion"},
    {"factors = [0.5", "factors = [1, 1.0]", "factors", "suite.factors[2]", "a second time", "once"},
    {"factors = [0.5", "factors = [-1, 1.0]", "factors", "suite.factors[1]", "found -1", "greater than 0"},
    {"factors = [0.5", "factors = { from = 0.1, to = 2 }", "factors", "suite.factors.count", "missing", "how many factors"},
    {"factors = [0.5", "factors = { to = 2, count = 3 }", "factors", "suite.factors.from", "missing", "the least factor"},
    {"factors = [0.5", "factors = { from = 0, to = 2, count = 3 }", "factors", "suite.factors.from", "found 0", "greater than 0"},
    {"factors = [0.5", "factors = { from = 2, to = 2, count = 3 }", "factors", "suite.factors.to", "found 2, from 2", "greater than from"},
    {"factors = [0.5", "factors = { from = 1, to = 2, count = 1 }", "factors", "suite.factors.count", "found 1", "at least 2"},
    {"factors = [0.5", "factors = { from = 1, to = 2, count = 2.5 }", "factors", "suite.factors.count", "found 2.5", "whole number"},
    {"factors = [0.5", "factors = { from = 1, to = 1.0000000000000004, count = 9 }", "factors", "suite.factors.count",
     "found 9 factors", "different numbers"},
    {"factors = [0.5", "factors = { from = 1, to = 2, count = 3, spacing = \"lin\" }", "factors", "suite.factors.spacing",
     "no spacing \"lin\"", "did you mean \"linear\"?"},
    {"factors = [0.5", "factors = { from = 1, to = 2, number = 3 }", "factors", "suite.factors.number", "unknown key", "allowed: from, to, count, spacing"},
    {"factors = [0.5", "factors = 1", "factors", "suite.factors", "the number 1", "{ from = 0.1, to = 2.0, count = 20 }"},
    {"step = 0.01", "step = 0", "step = 0", "suite.step", "found 0 s", "greater than 0 s"},
    {"floor = 2", "floor = 4", "floor", "force[1].floor", "found 4", "at least 1 and at most 3"},
    {"floor = 2", "floor = 0", "floor", "force[1].floor", "found 0", "at least 1 and at most 3"},
    {"table", "table = [[0, 0], [0, 1]]", "table", "force[1].table", "0 s follows 0 s", "must rise"},
    {"table", "table = [[0, 0]]", "table", "force[1].table", "1 point", "at least two"},
    {"table", "table = [[0, 0], [1, 1]]\nfile = \"site.txt\"", "file", "force[1].file", "both table and file", "exactly one"},
    {"table", "table = [[0, 0], [1, 1]]\nunits = \"kN\"", "units = \"kN\"", "force[1].units", "units beside a table", "study's units"},
    {"table", "", "[[force]]", "force[1]", "the force over time is missing", "table = "},
    {"displacement", "displacement = [0.01]", "displacement", "initial.displacement", "1 value(s)", "one for each floor"},
    {"step = \"5 ms\"", "step = \"automatic\"", "step = \"auto", "march.step", "\"automatic\"", "or \"auto\""},
    {"step = \"5 ms\"", "step = -0.1", "step = -0.1", "march.step", "found -0.1 s", "greater than 0 s, or \"auto\""},
    {"tail", "tail = -1", "tail", "march.tail", "found -1 s", "at least 0 s"},
    {"tail", "tail = 1\nduration = 5", "duration", "march.duration", "both duration and tail", "the one"},
    {"scheme", "scheme = { name = \"newmak\" }", "scheme", "march.scheme.name", "no scheme \"newmak\"", "did you mean \"newmark\"?"},
    {"scheme", "scheme = { name = \"newmark\", beta = 0.6 }", "scheme", "march.scheme.beta", "found 0.6", "at least 0 and at most 0.5"},
    {"tolerance", "tolerance = 0", "tolerance", "march.tolerance", "found 0", "greater than 0 and less than 1"},
    {"halvings", "halvings = 2.5", "halvings", "march.halvings", "found 2.5", "whole number"},
    {"histories", "histories = [\"drifts\"]", "histories", "keep.histories[1]", "no quantity \"drifts\"", "did you mean \"drift\"?"},
    {"histories", "histories = [\"drift\", \"drift\"]", "histories", "keep.histories[2]", "a second time", "once"},
    {"histories", "histories = \"some\"", "histories", "keep.histories", "\"some\"", "allowed: all, none"},
    {"every", "precision = \"half\"", "precision", "keep.precision", "no precision of histories \"half\"", "allowed: double, single"},
    {"every", "precision = 64", "precision", "keep.precision", "the number 64", "text in quotes"},
    {"every", "compression = 10", "compression", "keep.compression", "found 10", "at least 0 and at most 9"},
    {"every", "compression = -1", "compression", "keep.compression", "found -1", "at least 0 and at most 9"},
    {"every", "compression = 4.5", "compression", "keep.compression", "found 4.5", "whole number"},
    {"quantity = \"drift_ratio\"", "quantity = \"drift_ratoi\"", "quantity", "limit[1].quantity", "\"drift_ratoi\"", "did you mean \"drift_ratio\"?"},
    {"statistic = \"max\"", "statistic = \"median\"\npercentile = 50", "percentile = 50", "limit[2].percentile", "with another statistic", "\"percentile\""},
    {"statistic = \"max\"", "statistic = \"maximum\"", "statistic = \"maximum", "limit[2].statistic", "\"maximum\"", "did you mean \"max\"?"},
    {"value = 0.02", "value = 0", "value = 0", "limit[1].value", "found 0", "greater than 0"},
    {"source = \"project", "source = \"  \"", "source", "limit[1].source", "empty text", "something must be said"},
    {"factors = [1.0]", "factors = [2.0]", "factors = [2.0]", "limit[1].factors[1]", "found 2", "allowed: 0.5, 1"},
};
// clang-format on

TEST(BadStudy, EachErrorSaysWhereWhatAndHow) {
  const Folder folder;
  test::write_motions(folder);
  for (const Bad& bad : bad_studies) {
    const std::string text = test::with_line(valid_study, bad.line, bad.replacement);
    const auto file = folder.write("study.toml", text);
    try {
      read_study(file, test::schemes);
      ADD_FAILURE() << "accepted: " << bad.replacement;
    } catch (const Error& e) {
      EXPECT_EQ(e.kind(), ErrorKind::input) << e.what();
      EXPECT_EQ(e.where(), fmt::format("{}:{}: {}", file.string(), line_starting(text, bad.at), bad.path)) << e.what();
      EXPECT_NE(e.problem().find(bad.found), std::string::npos) << bad.replacement << "\n" << e.what();
      EXPECT_NE(e.remedy().find(bad.allowed), std::string::npos) << bad.replacement << "\n" << e.what();
    }
  }
}

// What is not TOML, and what is wrong with the study as a whole.
Error error_of(const Folder& folder, const std::string& text) {
  try {
    read_study(folder.write("study.toml", text), test::schemes);
  } catch (const Error& e) {
    return e;
  }
  ADD_FAILURE() << "accepted:\n" << text;
  return input_error("", "", "");
}

TEST(BadStudy, NotToml) {
  const Folder folder;
  test::write_motions(folder);
  const std::string file = (folder.path() / "study.toml").string();
  const std::vector<std::pair<std::string, std::string>> replaced{
      {"height = 4.5", "height = "},                 // no value
      {"height = 4.5", "height = 4.5\nheight = 5"},  // twice
      {"[units]", "[units"},
      {"title", "title = \"never ends"},
      {"height = 4.5", "height 4.5"},
  };
  const std::vector<int> offsets{0, 1, 0, 0, 0};
  for (std::size_t i = 0; i < replaced.size(); ++i) {
    const Error e = error_of(folder, test::with_line(valid_study, replaced[i].first, replaced[i].second));
    const int line = line_starting(valid_study, replaced[i].first) + offsets[i];
    EXPECT_EQ(e.where(), fmt::format("{}:{}", file, line)) << e.what();
    EXPECT_FALSE(e.problem().empty());
    EXPECT_FALSE(e.remedy().empty());
  }
  const Error twice = error_of(folder, test::with_line(valid_study, "[march]", "[keep]"));
  EXPECT_EQ(twice.where(), fmt::format("{}:{}", file, line_starting(valid_study, "[keep]"))) << twice.what();
  EXPECT_NE(twice.problem().find("'keep'"), std::string::npos) << twice.what();
  EXPECT_NE(twice.remedy().find("once"), std::string::npos) << twice.what();
}

const std::string building_only = R"([building]
kind = "stick"
damping = { kind = "none" }
[[story]]
height = 3
mass = 1000
spring = { law = "linear", stiffness = 1e6 }
)";

TEST(BadStudy, NothingToDo) {
  const Folder folder;
  const Error e = error_of(folder, building_only);
  EXPECT_NE(e.problem().find("nothing would move"), std::string::npos) << e.what();
  EXPECT_NE(e.remedy().find("[suite], [[force]] or [initial]"), std::string::npos) << e.what();
  const Error still = error_of(folder, building_only + "[initial]\nvelocity = [0]\n");
  EXPECT_NE(still.problem().find("other than 0"), std::string::npos) << still.what();
  const Error endless = error_of(folder, building_only + "[initial]\nvelocity = [1]\n");
  EXPECT_NE(endless.remedy().find("duration"), std::string::npos) << endless.what();
}

TEST(BadStudy, NoBuildingAndNoStory) {
  const Folder folder;
  EXPECT_NE(error_of(folder, "title = \"x\"\n").where().find(":1: building"), std::string::npos);
  const Error e = error_of(folder, "[building]\nkind = \"stick\"\ndamping = { kind = \"none\" }\n");
  EXPECT_NE(e.where().find("story"), std::string::npos) << e.what();
  const Error none = error_of(folder, "story = []\n[building]\nkind = \"stick\"\ndamping = { kind = \"none\" }\n");
  EXPECT_NE(none.where().find("story"), std::string::npos) << none.what();
}

TEST(BadStudy, OneStoryHasNoTwoModes) {
  const Folder folder;
  const Error e = error_of(folder, test::with_line(building_only, "damping",
                                                   "damping = { kind = \"rayleigh\", ratio = 0.05, modes = [1, 2] }"));
  EXPECT_NE(e.where().find(":3: building.damping.modes"), std::string::npos) << e.what();
  EXPECT_NE(e.remedy().find("mass_factor"), std::string::npos) << e.what();
}

TEST(BadStudy, ForceFiles) {
  const Folder folder;
  const std::string text = building_only + "[[force]]\nfloor = 1\nfile = \"push.txt\"\nunits = \"kN\"\n";
  EXPECT_NE(error_of(folder, text).where().find(":10: force[1].file"), std::string::npos);  // absent
  const std::string file = folder.write("push.txt", "# push\n0 0\n1 x\n").string();
  EXPECT_EQ(error_of(folder, text).where(), file + ":3");
  folder.write("push.txt", "0 0\n1 1 1\n");
  EXPECT_EQ(error_of(folder, text).where(), file + ":2");
  folder.write("push.txt", "0 0\n1 1\n0.5 1\n");
  EXPECT_NE(error_of(folder, text).problem().find("0.5 s follows 1 s"), std::string::npos);
  folder.write("push.txt", "0 0\n1 1\n");
  const Error e = error_of(folder, test::with_line(text, "units", ""));
  EXPECT_NE(e.where().find("force[1].units"), std::string::npos) << e.what();
}

TEST(BadStudy, FilesThatAreNotThere) {
  const Folder folder;
  for (const auto& file : {folder.path() / "absent.toml", folder.path()}) {
    try {
      read_study(file, test::schemes);
      ADD_FAILURE();
    } catch (const Error& e) {
      EXPECT_EQ(e.kind(), ErrorKind::input);
      EXPECT_EQ(e.where(), file.string());
      EXPECT_NE(e.remedy().find("study file"), std::string::npos) << e.what();
    }
  }
}

TEST(BadStudy, WrongRecordsNameTheirFile) {
  const Folder folder;
  const std::string record = folder.write("bad.csv", "0.1\nabc\n0.3\n").string();
  const Error e = error_of(folder, building_only + "[suite]\nunits = \"g\"\nstep = 0.01\nmotions = [\"bad.csv\"]\n");
  EXPECT_NE(e.where().find(record), std::string::npos) << e.what();
}

}  // namespace
}  // namespace pilotis
