// One group of a result file while it is read. Every miss is an Error (input) that names the file and what is missing.
#pragma once

#include <H5Cpp.h>

#include <string>
#include <vector>

namespace pilotis {

class GroupReader {
 public:
  // `where` is the file's name for messages. Throws when there is no group `path`.
  GroupReader(const H5::H5File& file, const std::string& where, const std::string& path);

  bool has(const std::string& name) const;
  std::size_t length(const std::string& scale) const;  // of a dimension scale; 0 when it is not there

  // As many values as `count`, or an error naming the array and both counts.
  std::vector<double> numbers(const std::string& name, std::size_t count) const;
  std::vector<std::string> texts(const std::string& name, std::size_t count) const;

  // The same arrays opened, to be read by rows.
  H5::DataSet number_array(const std::string& name, std::size_t count) const;
  H5::DataSet text_array(const std::string& name, std::size_t count) const;

  std::string text_attribute(const std::string& name) const;
  double number_attribute(const std::string& name) const;

 private:
  H5::DataSet array(const std::string& name, std::size_t count, H5T_class_t kind) const;
  std::string path_of(const std::string& name) const;

  H5::Group group_;
  std::string where_, path_;
};

}  // namespace pilotis
