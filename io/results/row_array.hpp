// Rows of an array: written and read without the rest of it. Rows count from 0 along the first axis and hold the
// product of the other axes.
#pragma once

#include <H5Cpp.h>

#include <span>
#include <string>
#include <utility>
#include <vector>

namespace pilotis {

H5::StrType text_type();  // UTF-8 of variable length

std::size_t row_width(const H5::DataSet& array);

// As many rows as `values` fill.
void write_rows(H5::DataSet& array, std::size_t first, std::span<const double> values);
void write_rows(H5::DataSet& array, std::size_t first, const std::vector<const char*>& texts);

// As many rows as fill `values`.
void read_rows(const H5::DataSet& array, std::size_t first, std::span<double> values);
std::vector<std::string> read_texts(const H5::DataSet& array, std::size_t first, std::size_t rows);
std::vector<std::string> read_all_texts(const H5::DataSet& array);

// The arrays of a group that have one row per run.
class RowArrays {
 public:
  void add(std::string name, H5::DataSet array) { arrays_.emplace_back(std::move(name), std::move(array)); }
  bool empty() const { return arrays_.empty(); }
  H5::DataSet& at(const std::string& name);  // std::out_of_range

  // Writes all `rows` rows of the arrays of the same names in `from`, from row `first` on here.
  void copy(const H5::Group& from, std::size_t first, std::size_t rows);

 private:
  std::vector<std::pair<std::string, H5::DataSet>> arrays_;
};

}  // namespace pilotis
