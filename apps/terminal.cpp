#include "apps/terminal.hpp"

#include <sys/ioctl.h>
#include <unistd.h>

#include <algorithm>
#include <cctype>
#include <cstdlib>

#include "core/error.hpp"

namespace pilotis {

namespace {

constexpr int usual_width = 100, least_width = 80;

std::string variable(const char* name) {
  const char* value = std::getenv(name);
  return value ? value : "";
}

// LC_ALL over LC_CTYPE over LANG, as POSIX has it.
std::string locale_name() {
  for (const char* name : {"LC_ALL", "LC_CTYPE", "LANG"})
    if (std::string value = variable(name); !value.empty()) return value;
  return "";
}

bool is_utf8(std::string locale) {
  std::transform(locale.begin(), locale.end(), locale.begin(), [](unsigned char c) { return std::tolower(c); });
  return locale.find("utf-8") != std::string::npos || locale.find("utf8") != std::string::npos;
}

}  // namespace

ScreenEnvironment screen_environment() { return {variable("NO_COLOR"), variable("TERM"), locale_name()}; }

ScreenStyle style_for(bool is_terminal, int columns, const ScreenEnvironment& environment) {
  ScreenStyle style;
  style.width = columns > 0 ? std::max(columns, least_width) : usual_width;
  style.color = is_terminal && environment.no_color.empty() && environment.term != "dumb";
  style.unicode = is_utf8(environment.locale);
  return style;
}

bool is_terminal(std::FILE* stream) { return ::isatty(::fileno(stream)) == 1; }

ScreenStyle screen_style(std::FILE* stream) {
  const bool terminal = is_terminal(stream);
  winsize size{};
  const int columns = terminal && ::ioctl(::fileno(stream), TIOCGWINSZ, &size) == 0 ? size.ws_col : 0;
  return style_for(terminal, columns, screen_environment());
}

void print_out(std::string_view text) {
  if (std::fwrite(text.data(), 1, text.size(), stdout) != text.size() || std::fflush(stdout) != 0)
    throw outside_error("standard output", "cannot be written",
                        "check that the disk has room and that the program it is piped to still runs");
}

}  // namespace pilotis
