// Every format of a public archive, on invented files: all samples come back as they were written, damage is refused.
// The list of formats is tests/support/invented_records.hpp; a format of the registry that is not in it fails here.
#include <gtest/gtest.h>

#include <algorithm>
#include <cmath>

#include "core/error.hpp"
#include "core/units/units.hpp"
#include "io/records/components.hpp"
#include "io/records/record.hpp"
#include "tests/support/invented_records.hpp"

namespace pilotis {
namespace {

// 23 samples, so that no last row is full, of few digits; most are negative and as wide as the columns allow, so that
// values run together. Their mean is 0, for K-NET. Scaled to what the format can print.
Samples samples_for(const InventedFormat& format) {
  Samples samples{-8.5, -7.25, -9.5,  30,   -9.75, 8.5,   -2.25, -1.5, 0.25,
                  0,    4.5,   -6.25, -5.5, 20.25, -9.75, 1.5,   2.5,  -3.25};
  samples.insert(samples.end(), {0.5, -0.25, 0.75, -2.5, 0});
  double sum = 0;
  for (double sample : samples) sum += sample;
  samples.back() -= sum;
  const double scale = format.unit == "g" ? 0.01 : format.unit == "g/10" ? 0.1 : format.unit == "gal/1000" ? 1000 : 1;
  // Rounded to what ASA, with two decimals, and the pairs of volume 1, with three, print.
  for (double& sample : samples) sample = std::round(sample * scale * 1e4) / 1e4;
  return samples;
}

class ArchiveFormats : public testing::TestWithParam<InventedFormat> {
 protected:
  const InventedFormat& format() const { return GetParam(); }
  std::string whole() const { return format().make(samples_for(format())); }

  void expect_as_written(const std::string& content) const {
    const FileOfRecords file = read_record_content(content, "made");
    const Samples written = samples_for(format());
    EXPECT_EQ(file.format, format().format);
    ASSERT_EQ(file.components.size(), format().components);
    // g/10 prints 4 decimals at most 3 of which are kept by the pairs; half a last digit.
    const double digit = format().unit == "g/10"    ? 0.5e-3
                         : format().unit == "mm/s2" ? 0.05
                         : format().unit == "gal"   ? 0.005
                                                    : 0;
    const double factor = format().unit == "gal/1000" ? 1e-5 : si_factor(format().unit, Dimension::acceleration, "");
    for (const RecordComponent& component : file.components) {
      EXPECT_EQ(component.record.step, format().step);
      ASSERT_EQ(component.record.samples.size(), written.size());
      for (std::size_t i = 0; i < written.size(); ++i)
        EXPECT_NEAR(component.record.samples[i], written[i] * factor,
                    digit * factor * (1 + 1e-9) + 1e-15 * std::abs(written[i] * factor) + 1e-17)
            << "sample " << i + 1;
    }
  }

  void expect_refused(const std::string& content, const std::string& what) const {
    try {
      const FileOfRecords file = read_record_content(content, "made", {{}, 0.01, {}, {}});
      ADD_FAILURE() << what << ": read as " << file.format << ", " << file.components.size() << " component(s) of "
                    << file.components.front().record.samples.size();
    } catch (const Error& error) {
      EXPECT_EQ(error.kind(), ErrorKind::input) << error.what();
      EXPECT_TRUE(error.where().starts_with("made")) << error.what();
      EXPECT_FALSE(error.remedy().empty()) << error.what();
    }
  }
};

TEST_P(ArchiveFormats, ReadWhatWasWritten) { expect_as_written(whole()); }
TEST_P(ArchiveFormats, ReadWithCrLf) { expect_as_written(with_cr_lf(whole())); }
TEST_P(ArchiveFormats, ReadWithControlZAtTheEnd) { expect_as_written(whole() + "\x1A\x1A\x1A\x1A"); }
TEST_P(ArchiveFormats, ReadWithByteOrderMark) { expect_as_written("\xEF\xBB\xBF" + whole()); }

// Cut after every line but those behind which all numbers stand: after an end mark of a channel the rest of the file
// may be missing without a trace, so a file of several components is cut within its first one.
TEST_P(ArchiveFormats, RefuseFilesThatAreCutAtALine) {
  const std::string text = whole();
  const std::size_t numbers_end = text.find_last_of("0123456789", text.find("/&"));
  std::size_t end = text.rfind('\n', numbers_end);
  if (format().format == "GeoNet volume 2") end = text.find("Corrected", 10) - 1;
  for (std::size_t cut = text.find('\n'); cut < end; cut = text.find('\n', cut + 1)) {
    SCOPED_TRACE(cut);
    EXPECT_THROW(read_record_content(std::string_view(text).substr(0, cut + 1), "made"), Error);
  }
}

// Where the first row of samples begins: the first line that differs in a file with the same samples backward, whose
// header is the same.
std::size_t place_of_row(const std::string& text, const InventedFormat& format) {
  Samples backward = samples_for(format);
  std::reverse(backward.begin(), backward.end());
  const std::string other = format.make(backward);
  const auto differs = std::mismatch(text.begin(), text.end(), other.begin(), other.end()).first - text.begin();
  return text.rfind('\n', static_cast<std::size_t>(differs)) + 1;
}

TEST_P(ArchiveFormats, RefuseALostRow) {
  std::string text = whole();
  const std::size_t row = place_of_row(text, format());
  ASSERT_LT(row, text.size());
  expect_refused(text.erase(row, text.find('\n', row) + 1 - row), "a row is gone");
}

TEST_P(ArchiveFormats, RefuseWordsAndInfinityAmongTheNumbers) {
  const std::string text = whole();
  const std::size_t row = place_of_row(text, format());
  const std::size_t end = text.find('\n', row);
  for (const char* bad : {"***", "nan", "inf", "1e999", "..."}) {
    std::string damaged = text;
    const std::string_view word = bad;
    if (end - row < word.size()) continue;
    expect_refused(damaged.replace(end - word.size(), word.size(), word), bad);
  }
}

INSTANTIATE_TEST_SUITE_P(Archives, ArchiveFormats, testing::ValuesIn(invented_formats()), [](const auto& info) {
  std::string name(info.param.format);
  std::erase_if(name, [](char c) { return std::isalnum(static_cast<unsigned char>(c)) == 0; });
  return name + (info.param.unit == "g/10" ? "Tenths" : "");
});

TEST(ArchiveFormatList, HasEveryFormatOfTheRegistry) {
  for (const RecordFormat& format : record_formats()) {
    const bool here = std::any_of(invented_formats().begin(), invented_formats().end(),
                                  [&](const InventedFormat& made) { return made.format == format.name; });
    EXPECT_TRUE(here || format.name == "plain text") << format.name << " has no invented file: add one";
  }
}

}  // namespace
}  // namespace pilotis
