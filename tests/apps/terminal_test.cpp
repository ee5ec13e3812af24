#include "apps/terminal.hpp"

#include <gtest/gtest.h>

#include "apps/text_layout.hpp"

namespace pilotis {
namespace {

const ScreenEnvironment usual{"", "xterm-256color", "en_US.UTF-8"};

TEST(Terminal, ColorOnlyOnATerminalAndNeverWithNoColor) {
  EXPECT_TRUE(style_for(true, 120, usual).color);
  EXPECT_FALSE(style_for(false, 0, usual).color);
  EXPECT_FALSE(style_for(true, 120, {"1", "xterm", "C.UTF-8"}).color);
  EXPECT_FALSE(style_for(true, 120, {"", "dumb", "C.UTF-8"}).color);
}

TEST(Terminal, WidthAndLetters) {
  EXPECT_EQ(style_for(true, 120, usual).width, 120);
  EXPECT_EQ(style_for(true, 40, usual).width, 80);
  EXPECT_EQ(style_for(false, 0, usual).width, 100);
  EXPECT_TRUE(style_for(false, 0, {"", "", "C.utf8"}).unicode);
  EXPECT_FALSE(style_for(false, 0, {"", "", "C"}).unicode);
}

TEST(TextLayout, CountsAndCutsCharactersNotBytes) {
  EXPECT_EQ(columns_of("±×é"), 3u);
  EXPECT_EQ(clipped("Österåker", 5, {100, false, true}), "Öste…");
  EXPECT_EQ(clipped("Österåker", 5, {100, false, false}), "Öst..");
  EXPECT_EQ(clipped("five5", 5, {}), "five5");
}

TEST(TextLayout, SmallErrorsAreNotShownAsNothing) {
  EXPECT_EQ(error_text(0.0004, 2), "<0.01");
  EXPECT_EQ(error_text(0.006, 2), "0.01");
  EXPECT_EQ(error_text(0, 2), "0.00");
}

}  // namespace
}  // namespace pilotis
