#include "io/results/group_writer.hpp"

#include <fmt/format.h>
#include <hdf5_hl.h>

#include <algorithm>
#include <limits>
#include <stdexcept>

#include "io/results/row_array.hpp"

namespace pilotis {

namespace {

constexpr hsize_t chunk_values = 16384;  // about 128 KiB of doubles

// Links and attributes keep the order they were made in: readers of netCDF-4 ask for it.
H5::Group made_group(H5::H5File& file, const std::string& path) {
  const hid_t properties = H5Pcreate(H5P_GROUP_CREATE);
  H5Pset_link_creation_order(properties, H5P_CRT_ORDER_TRACKED | H5P_CRT_ORDER_INDEXED);
  H5Pset_attr_creation_order(properties, H5P_CRT_ORDER_TRACKED | H5P_CRT_ORDER_INDEXED);
  H5Pset_obj_track_times(properties, false);
  const hid_t id = H5Gcreate2(file.getId(), path.c_str(), H5P_DEFAULT, properties, H5P_DEFAULT);
  H5Pclose(properties);
  if (id < 0) throw H5::GroupIException("H5Gcreate2", path);
  H5::Group group(id);
  H5Gclose(id);  // `group` holds its own reference
  return group;
}

// Rows along the first axis together, as many as a chunk holds.
std::vector<hsize_t> chunk_of(const std::vector<hsize_t>& lengths) {
  std::vector<hsize_t> chunk = lengths;
  hsize_t row = 1;
  for (std::size_t i = 1; i < lengths.size(); ++i) row *= lengths[i];
  chunk[0] = std::clamp<hsize_t>(chunk_values / row, 1, lengths[0]);
  return chunk;
}

// The same results give the same bytes: no times of day. Attributes keep their order, as readers of netCDF-4 ask.
H5::DSetCreatPropList plain() {
  H5::DSetCreatPropList properties;
  H5Pset_obj_track_times(properties.getId(), false);
  H5Pset_attr_creation_order(properties.getId(), H5P_CRT_ORDER_TRACKED | H5P_CRT_ORDER_INDEXED);
  return properties;
}

// NaN is the fill value readers are told of; nothing is filled, because all is written.
H5::DSetCreatPropList plain_numbers() {
  const double unknown = std::numeric_limits<double>::quiet_NaN();
  H5::DSetCreatPropList properties = plain();
  properties.setFillValue(H5::PredType::NATIVE_DOUBLE, &unknown);
  properties.setFillTime(H5D_FILL_TIME_NEVER);
  return properties;
}

H5::DSetCreatPropList packed_numbers(const std::vector<hsize_t>& lengths, HistoryFormat format) {
  H5::DSetCreatPropList properties = plain_numbers();
  properties.setChunk(static_cast<int>(lengths.size()), chunk_of(lengths).data());
  if (format.compression == 0) return properties;
  properties.setShuffle();
  properties.setDeflate(static_cast<unsigned>(format.compression));
  return properties;
}

H5::DataSpace space_of(const std::vector<hsize_t>& lengths) {
  return lengths.empty() ? H5::DataSpace(H5S_SCALAR) : H5::DataSpace(static_cast<int>(lengths.size()), lengths.data());
}

void check(herr_t status, const char* function, const std::string& name) {
  if (status < 0) throw H5::DataSetIException(function, name);
}

}  // namespace

void write_text(H5::H5Object& object, const std::string& name, std::string_view text) {
  const std::string owned(text);
  const char* pointer = owned.c_str();
  const H5::StrType type = text_type();
  object.createAttribute(name, type, H5::DataSpace(H5S_SCALAR)).write(type, &pointer);
}

GroupWriter::GroupWriter(H5::H5File& file, const std::string& path) : group_(made_group(file, path)), path_(path) {}

void GroupWriter::attribute(const std::string& name, std::string_view text) { write_text(group_, name, text); }

void GroupWriter::attribute(const std::string& name, double number) {
  group_.createAttribute(name, H5::PredType::IEEE_F64LE, H5::DataSpace(H5S_SCALAR))
      .write(H5::PredType::NATIVE_DOUBLE, &number);
}

void GroupWriter::describe(H5::DataSet& data, std::string_view units, std::string_view long_name) {
  write_text(data, "units", units);
  write_text(data, "long_name", long_name);
}

std::vector<hsize_t> GroupWriter::lengths_of(const Axes& axes) const {
  std::vector<hsize_t> lengths;
  for (const std::string& axis : axes) lengths.push_back(scales_.at(axis).length);
  return lengths;
}

void GroupWriter::require_count(const std::string& name, const Axes& axes, std::size_t count) const {
  std::size_t expected = 1;
  for (hsize_t length : lengths_of(axes)) expected *= length;
  if (count != expected)
    throw std::logic_error(fmt::format("{}/{}: {} values where {} are expected", path_, name, count, expected));
}

H5::DataSet GroupWriter::array(const std::string& name, const Axes& axes, const H5::DataType& type,
                               const H5::DSetCreatPropList& properties) {
  H5::DataSet data = group_.createDataSet(name, type, space_of(lengths_of(axes)), properties);
  for (std::size_t i = 0; i < axes.size(); ++i)
    check(H5DSattach_scale(data.getId(), scales_.at(axes[i]).data.getId(), static_cast<unsigned>(i)),
          "H5DSattach_scale", name);
  return data;
}

H5::DataSet GroupWriter::empty_numbers(const std::string& name, const Axes& axes, std::string_view units,
                                       std::string_view long_name) {
  H5::DataSet data = array(name, axes, H5::PredType::IEEE_F64LE, plain_numbers());
  describe(data, units, long_name);
  return data;
}

H5::DataSet GroupWriter::empty_texts(const std::string& name, const Axes& axes, std::string_view long_name) {
  H5::DataSet data = array(name, axes, text_type(), plain());
  describe(data, "1", long_name);
  return data;
}

H5::DataSet GroupWriter::empty_history(const std::string& name, const Axes& axes, HistoryFormat format,
                                       std::string_view units, std::string_view long_name) {
  H5::DataSet data = array(name, axes, format.single ? H5::PredType::IEEE_F32LE : H5::PredType::IEEE_F64LE,
                           packed_numbers(lengths_of(axes), format));
  describe(data, units, long_name);
  return data;
}

void GroupWriter::as_scale(const std::string& name, H5::DataSet& data, std::size_t length) {
  check(H5DSset_scale(data.getId(), name.c_str()), "H5DSset_scale", name);
  scales_.insert_or_assign(name, Scale{data, length});
}

void GroupWriter::scale(const std::string& name, const std::vector<double>& values, std::string_view units,
                        std::string_view long_name) {
  const std::vector<hsize_t> lengths{values.size()};
  H5::DataSet data = group_.createDataSet(name, H5::PredType::IEEE_F64LE, space_of(lengths), plain());
  data.write(values.data(), H5::PredType::NATIVE_DOUBLE);
  describe(data, units, long_name);
  as_scale(name, data, values.size());
}

void GroupWriter::count_scale(const std::string& name, std::int64_t first, std::size_t count,
                              std::string_view long_name) {
  std::vector<std::int64_t> values(count);
  for (std::size_t i = 0; i < count; ++i) values[i] = first + static_cast<std::int64_t>(i);
  const std::vector<hsize_t> lengths{count};
  H5::DataSet data = group_.createDataSet(name, H5::PredType::STD_I64LE, space_of(lengths), plain());
  data.write(values.data(), H5::PredType::NATIVE_INT64);
  describe(data, "1", long_name);
  as_scale(name, data, count);
}

void GroupWriter::numbers(const std::string& name, const Axes& axes, const std::vector<double>& values,
                          std::string_view units, std::string_view long_name) {
  require_count(name, axes, values.size());
  empty_numbers(name, axes, units, long_name).write(values.data(), H5::PredType::NATIVE_DOUBLE);
}

void GroupWriter::integers(const std::string& name, const Axes& axes, const std::vector<std::int64_t>& values,
                           std::string_view long_name) {
  require_count(name, axes, values.size());
  H5::DataSet data = array(name, axes, H5::PredType::STD_I64LE, plain());
  data.write(values.data(), H5::PredType::NATIVE_INT64);
  describe(data, "1", long_name);
}

void GroupWriter::texts(const std::string& name, const Axes& axes, const std::vector<std::string>& values,
                        std::string_view long_name) {
  require_count(name, axes, values.size());
  std::vector<const char*> pointers;
  for (const std::string& value : values) pointers.push_back(value.c_str());
  empty_texts(name, axes, long_name).write(pointers.data(), text_type());
}

}  // namespace pilotis
