#include "io/results/group_reader.hpp"

#include <fmt/format.h>

#include "core/error.hpp"
#include "io/results/row_array.hpp"

namespace pilotis {

namespace {

constexpr const char* remedy = "give a result file that `pilotis run` wrote";

// H5Lexists and H5Aexists want every parent to be there; ours are.
H5::Group opened(const H5::H5File& file, const std::string& where, const std::string& path) {
  try {
    return file.openGroup(path);
  } catch (const H5::Exception&) {
    throw input_error(where, fmt::format("the group {} is missing", path), remedy);
  }
}

}  // namespace

GroupReader::GroupReader(const H5::H5File& file, const std::string& where, const std::string& path)
    : group_(opened(file, where, path)), where_(where), path_(path) {}

std::string GroupReader::path_of(const std::string& name) const {
  return path_ == "/" ? "/" + name : path_ + "/" + name;
}

bool GroupReader::has(const std::string& name) const {
  return H5Lexists(group_.getId(), name.c_str(), H5P_DEFAULT) > 0;
}

std::size_t GroupReader::length(const std::string& scale) const {
  if (!has(scale)) return 0;
  return static_cast<std::size_t>(group_.openDataSet(scale).getSpace().getSimpleExtentNpoints());
}

H5::DataSet GroupReader::array(const std::string& name, std::size_t count, H5T_class_t kind) const {
  if (!has(name)) throw input_error(where_, fmt::format("the array {} is missing", path_of(name)), remedy);
  H5::DataSet data = group_.openDataSet(name);
  const bool as_text = kind == H5T_STRING;
  if ((data.getTypeClass() == H5T_STRING) != as_text)
    throw input_error(where_, fmt::format("the array {} does not hold {}", path_of(name), as_text ? "text" : "numbers"),
                      remedy);
  const auto found = static_cast<std::size_t>(data.getSpace().getSimpleExtentNpoints());
  if (found != count)
    throw input_error(
        where_, fmt::format("the array {} has {} values where {} are expected", path_of(name), found, count), remedy);
  return data;
}

std::vector<double> GroupReader::numbers(const std::string& name, std::size_t count) const {
  const H5::DataSet data = array(name, count, H5T_FLOAT);
  std::vector<double> values(count);
  data.read(values.data(), H5::PredType::NATIVE_DOUBLE);
  return values;
}

std::vector<std::string> GroupReader::texts(const std::string& name, std::size_t count) const {
  return read_all_texts(array(name, count, H5T_STRING));
}

H5::DataSet GroupReader::number_array(const std::string& name, std::size_t count) const {
  return array(name, count, H5T_FLOAT);
}

H5::DataSet GroupReader::text_array(const std::string& name, std::size_t count) const {
  return array(name, count, H5T_STRING);
}

std::string GroupReader::text_attribute(const std::string& name) const {
  if (!group_.attrExists(name))
    throw input_error(where_, fmt::format("the attribute {} of {} is missing", name, path_), remedy);
  std::string text;
  const H5::Attribute attribute = group_.openAttribute(name);
  if (attribute.getTypeClass() != H5T_STRING)
    throw input_error(where_, fmt::format("the attribute {} of {} is not text", name, path_), remedy);
  attribute.read(text_type(), text);
  return text;
}

double GroupReader::number_attribute(const std::string& name) const {
  if (!group_.attrExists(name))
    throw input_error(where_, fmt::format("the attribute {} of {} is missing", name, path_), remedy);
  const H5::Attribute attribute = group_.openAttribute(name);
  if (attribute.getTypeClass() == H5T_STRING)
    throw input_error(where_, fmt::format("the attribute {} of {} is not a number", name, path_), remedy);
  double number = 0;
  attribute.read(H5::PredType::NATIVE_DOUBLE, &number);
  return number;
}

}  // namespace pilotis
