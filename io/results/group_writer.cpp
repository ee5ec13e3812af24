#include "io/results/group_writer.hpp"

#include <fmt/format.h>
#include <hdf5_hl.h>

#include <algorithm>
#include <cmath>
#include <limits>
#include <stdexcept>

namespace pilotis {

namespace {

constexpr hsize_t chunk_values = 16384;  // about 128 KiB of doubles
constexpr unsigned deflate_level = 4;

H5::StrType text_type() {
  H5::StrType type(H5::PredType::C_S1, H5T_VARIABLE);
  type.setCset(H5T_CSET_UTF8);
  return type;
}

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

H5::DSetCreatPropList layout(const std::vector<hsize_t>& lengths, Packing packing) {
  H5::DSetCreatPropList properties;
  H5Pset_obj_track_times(properties.getId(), false);  // the same results give the same bytes
  H5Pset_attr_creation_order(properties.getId(), H5P_CRT_ORDER_TRACKED | H5P_CRT_ORDER_INDEXED);
  if (packing == Packing::plain || lengths.empty()) return properties;
  properties.setChunk(static_cast<int>(lengths.size()), chunk_of(lengths).data());
  properties.setShuffle();
  properties.setDeflate(deflate_level);
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

H5::DataSet GroupWriter::array(const std::string& name, const Axes& axes, const H5::DataType& type, std::size_t count,
                               Packing packing) {
  std::vector<hsize_t> lengths;
  std::size_t expected = 1;
  for (const std::string& axis : axes) {
    lengths.push_back(scales_.at(axis).length);
    expected *= lengths.back();
  }
  if (count != expected)
    throw std::logic_error(fmt::format("{}/{}: {} values where {} are expected", path_, name, count, expected));
  H5::DSetCreatPropList properties = layout(lengths, packing);
  const double unknown = std::numeric_limits<double>::quiet_NaN();
  if (type == H5::PredType::IEEE_F64LE) properties.setFillValue(H5::PredType::NATIVE_DOUBLE, &unknown);
  H5::DataSet data = group_.createDataSet(name, type, space_of(lengths), properties);
  for (std::size_t i = 0; i < axes.size(); ++i)
    check(H5DSattach_scale(data.getId(), scales_.at(axes[i]).data.getId(), static_cast<unsigned>(i)),
          "H5DSattach_scale", name);
  return data;
}

void GroupWriter::as_scale(const std::string& name, H5::DataSet& data, std::size_t length) {
  check(H5DSset_scale(data.getId(), name.c_str()), "H5DSset_scale", name);
  scales_.insert_or_assign(name, Scale{data, length});
}

void GroupWriter::scale(const std::string& name, const std::vector<double>& values, std::string_view units,
                        std::string_view long_name) {
  const std::vector<hsize_t> lengths{values.size()};
  H5::DataSet data =
      group_.createDataSet(name, H5::PredType::IEEE_F64LE, space_of(lengths), layout(lengths, Packing::plain));
  data.write(values.data(), H5::PredType::NATIVE_DOUBLE);
  describe(data, units, long_name);
  as_scale(name, data, values.size());
}

void GroupWriter::count_scale(const std::string& name, std::int64_t first, std::size_t count,
                              std::string_view long_name) {
  std::vector<std::int64_t> values(count);
  for (std::size_t i = 0; i < count; ++i) values[i] = first + static_cast<std::int64_t>(i);
  const std::vector<hsize_t> lengths{count};
  H5::DataSet data =
      group_.createDataSet(name, H5::PredType::STD_I64LE, space_of(lengths), layout(lengths, Packing::plain));
  data.write(values.data(), H5::PredType::NATIVE_INT64);
  describe(data, "1", long_name);
  as_scale(name, data, count);
}

void GroupWriter::numbers(const std::string& name, const Axes& axes, const std::vector<double>& values,
                          std::string_view units, std::string_view long_name, Packing packing) {
  H5::DataSet data = array(name, axes, H5::PredType::IEEE_F64LE, values.size(), packing);
  data.write(values.data(), H5::PredType::NATIVE_DOUBLE);
  describe(data, units, long_name);
}

void GroupWriter::integers(const std::string& name, const Axes& axes, const std::vector<std::int64_t>& values,
                           std::string_view long_name) {
  H5::DataSet data = array(name, axes, H5::PredType::STD_I64LE, values.size(), Packing::plain);
  data.write(values.data(), H5::PredType::NATIVE_INT64);
  describe(data, "1", long_name);
}

void GroupWriter::texts(const std::string& name, const Axes& axes, const std::vector<std::string>& values,
                        std::string_view long_name) {
  std::vector<const char*> pointers;
  for (const std::string& value : values) pointers.push_back(value.c_str());
  H5::DataSet data = array(name, axes, text_type(), values.size(), Packing::plain);
  data.write(pointers.data(), text_type());
  describe(data, "1", long_name);
}

}  // namespace pilotis
