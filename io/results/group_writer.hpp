// One group of the result file while it is written: arrays with attached dimension scales, units and long names.
#pragma once

#include <H5Cpp.h>

#include <cstdint>
#include <map>
#include <string>
#include <string_view>
#include <vector>

#include "core/response/history_format.hpp"

namespace pilotis {

class GroupWriter {
 public:
  using Axes = std::vector<std::string>;  // names of scales, slowest first; empty: one number

  // Makes the group `path`; parents must be there.
  GroupWriter(H5::H5File& file, const std::string& path);

  // Dimension scales. At least one value; a scale must stand before the arrays that use it.
  void scale(const std::string& name, const std::vector<double>& values, std::string_view units,
             std::string_view long_name);
  // first, first + 1, ...: `count` of them.
  void count_scale(const std::string& name, std::int64_t first, std::size_t count, std::string_view long_name);

  // Row-major; as many values as the scales' lengths multiply to.
  void numbers(const std::string& name, const Axes& axes, const std::vector<double>& values, std::string_view units,
               std::string_view long_name);
  void integers(const std::string& name, const Axes& axes, const std::vector<std::int64_t>& values,
                std::string_view long_name);
  void texts(const std::string& name, const Axes& axes, const std::vector<std::string>& values,
             std::string_view long_name);

  // Arrays to be written later, all of it: numbers have no fill written first.
  H5::DataSet empty_numbers(const std::string& name, const Axes& axes, std::string_view units,
                            std::string_view long_name);
  H5::DataSet empty_texts(const std::string& name, const Axes& axes, std::string_view long_name);
  // Chunked, shuffled and deflated as the format says.
  H5::DataSet empty_history(const std::string& name, const Axes& axes, HistoryFormat format, std::string_view units,
                            std::string_view long_name);

  void attribute(const std::string& name, std::string_view text);
  void attribute(const std::string& name, double number);

 private:
  std::vector<hsize_t> lengths_of(const Axes& axes) const;
  H5::DataSet array(const std::string& name, const Axes& axes, const H5::DataType& type,
                    const H5::DSetCreatPropList& properties);
  void require_count(const std::string& name, const Axes& axes, std::size_t count) const;
  void as_scale(const std::string& name, H5::DataSet& data, std::size_t length);
  void describe(H5::DataSet& data, std::string_view units, std::string_view long_name);

  struct Scale {
    H5::DataSet data;
    hsize_t length;
  };
  H5::Group group_;
  std::string path_;
  std::map<std::string, Scale> scales_;
};

// A variable-length UTF-8 attribute of a file, group or array.
void write_text(H5::H5Object& object, const std::string& name, std::string_view text);

}  // namespace pilotis
