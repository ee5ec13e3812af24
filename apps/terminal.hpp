// What the screen can show.
#pragma once

#include <cstdio>
#include <string>
#include <string_view>

namespace pilotis {

struct ScreenStyle {
  int width = 100;  // columns
  bool color = false;
  bool unicode = true;  // bars and marks beyond ASCII
};

// The environment variables a screen is judged by; empty where unset.
struct ScreenEnvironment {
  std::string no_color, term, locale;
};
ScreenEnvironment screen_environment();

// Color only on a terminal, never with NO_COLOR set to anything (no-color.org) or TERM=dumb; unicode where the locale
// is UTF-8; `columns` is the terminal's width, 0 where unknown: then 100.
ScreenStyle style_for(bool is_terminal, int columns, const ScreenEnvironment& environment);

bool is_terminal(std::FILE* stream);

// For a stream of this process.
ScreenStyle screen_style(std::FILE* stream);

// Writes all of `text` to standard output and flushes it. Throws Error (outside) when it cannot be written.
void print_out(std::string_view text);

}  // namespace pilotis
