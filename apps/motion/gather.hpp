// From record files to everything that is told of them: tables and JSON are written as records come, the rest is kept.
#pragma once

#include "apps/json_stream.hpp"
#include "apps/motion/many.hpp"
#include "apps/motion/pair.hpp"
#include "apps/motion/tables.hpp"

namespace pilotis {

struct GatherOptions {
  std::vector<std::string> files;
  RecordHints hints;
  MotionRequest computed;  // what is computed and kept
  MotionRequest told;      // what goes into CSV and JSON
  std::string csv;         // file of the measures; empty: no CSV
  bool pictures = false;   // will be drawn
  bool pair = false, json = false, quiet = false;
  int threads = 1;
};

struct Gathered {
  std::vector<RecordNumbers> records;  // in the order of the files
  PairNumbers pair;
  int status = 0;                                // an ExitStatus: that of the worst failure
  std::vector<std::filesystem::path> csv_files;  // written
  bool stopped = false;                          // by Ctrl-C; nothing was written
};

// Failures and notes go to standard error, JSON to standard output. Throws Error when a table cannot be written.
Gathered gather(const GatherOptions& options);

}  // namespace pilotis
