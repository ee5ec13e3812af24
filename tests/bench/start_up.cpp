// What a script pays before any work is done: the whole process of `pilotis --help`, from its start to its exit status.
#include <benchmark/benchmark.h>
#include <fcntl.h>
#include <spawn.h>
#include <sys/wait.h>
#include <unistd.h>

#include <array>
#include <string>

namespace {

// Starts `pilotis --help` with its standard output on `output`. The process number, or -1.
pid_t start(int output) {
  posix_spawn_file_actions_t actions;
  posix_spawn_file_actions_init(&actions);
  posix_spawn_file_actions_adddup2(&actions, output, STDOUT_FILENO);
  std::string program = PILOTIS_PROGRAM, argument = "--help";
  std::array<char*, 3> arguments{program.data(), argument.data(), nullptr};
  pid_t child = -1;
  const int error = posix_spawn(&child, program.c_str(), &actions, nullptr, arguments.data(), environ);
  posix_spawn_file_actions_destroy(&actions);
  return error == 0 ? child : -1;
}

// The exit status; -1 when it did not end by itself.
int wait_for(pid_t child) {
  int status = 0;
  if (child < 0 || waitpid(child, &status, 0) != child || !WIFEXITED(status)) return -1;
  return WEXITSTATUS(status);
}

// What it prints; empty when its exit status is not 0.
std::string help_text() {
  std::array<int, 2> ends{};
  if (pipe2(ends.data(), O_CLOEXEC) != 0) return "";
  const pid_t child = start(ends[1]);
  close(ends[1]);
  std::string text;
  std::array<char, 4096> part{};
  for (ssize_t n; (n = read(ends[0], part.data(), part.size())) > 0;) text.append(part.data(), n);
  close(ends[0]);
  return wait_for(child) == 0 ? text : "";
}

// The first command of apps/commands.hpp that the help does not list; empty when all are there.
std::string missing_command(const std::string& help) {
  for (const char* name : {"check", "run", "modes", "motion", "synth", "fit", "verdict", "export"})
    if (help.find(std::string("\n  ") + name + " ") == std::string::npos) return name;
  return "";
}

void start_up(benchmark::State& state) {
  const std::string missing = missing_command(help_text());
  const int nowhere = open("/dev/null", O_WRONLY | O_CLOEXEC);
  if (!missing.empty()) state.SkipWithError(("pilotis --help does not list " + missing).c_str());
  for (auto _ : state)
    if (wait_for(start(nowhere)) != 0) state.SkipWithError("pilotis --help failed");
  close(nowhere);
}
BENCHMARK(start_up)->Unit(benchmark::kMillisecond)->UseRealTime();

}  // namespace
