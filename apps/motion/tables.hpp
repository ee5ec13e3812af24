// Numbers of records as CSV (RFC 4180), in SI, the unit in brackets behind each column's name. A file for each kind of
// table: NAME.csv the measures, NAME-spectrum.csv, NAME-inelastic.csv, NAME-fourier.csv, NAME-histories.csv and
// NAME-rotd.csv what else was asked for.
#pragma once

#include <filesystem>
#include <memory>

#include "apps/motion/pair.hpp"
#include "io/whole_file.hpp"

namespace pilotis {

// A row for each record component, period, frequency or instant. Files are whole or not there.
class MotionTables {
 public:
  // Throws Error when a file cannot be made beside `file`; this holds for all of these functions.
  MotionTables(const std::filesystem::path& file, const MotionRequest& request, bool pair);

  void add(const RecordNumbers& record);
  void add(const PairNumbers& pair);
  void commit();

  // The files, in the order they are listed above.
  const std::vector<std::filesystem::path>& files() const { return files_; }

 private:
  std::unique_ptr<WholeFile> open(const std::filesystem::path& file, const std::string& kind,
                                  const std::string& heading);

  const MotionRequest& request_;
  std::vector<std::filesystem::path> files_;
  std::unique_ptr<WholeFile> measures_, spectrum_, inelastic_, fourier_, histories_, pair_;
};

}  // namespace pilotis
