#include "io/results/row_array.hpp"

#include <algorithm>
#include <stdexcept>

namespace pilotis {

namespace {

constexpr std::size_t values_at_once = 32768;  // of a copy: 256 KiB of doubles

std::vector<hsize_t> lengths_of(const H5::DataSpace& space) {
  std::vector<hsize_t> lengths(static_cast<std::size_t>(space.getSimpleExtentNdims()));
  space.getSimpleExtentDims(lengths.data());
  return lengths;
}

// `rows` rows from `first` on chosen in the file, and what holds them in memory.
struct Selection {
  H5::DataSpace file, memory;
};

Selection selection_of(const H5::DataSet& array, std::size_t first, std::size_t rows) {
  H5::DataSpace space = array.getSpace();
  std::vector<hsize_t> count = lengths_of(space), start(count.size(), 0);
  count.at(0) = rows;
  start[0] = first;
  space.selectHyperslab(H5S_SELECT_SET, count.data(), start.data());
  return {space, H5::DataSpace(static_cast<int>(count.size()), count.data())};
}

// Texts the library allocated, given back to it at the end.
class LentTexts {
 public:
  LentTexts(std::size_t count, H5::DataSpace space) : pointers_(count, nullptr), space_(std::move(space)) {}
  ~LentTexts() { H5Dvlen_reclaim(text_type().getId(), space_.getId(), H5P_DEFAULT, pointers_.data()); }
  LentTexts(const LentTexts&) = delete;
  LentTexts& operator=(const LentTexts&) = delete;
  std::vector<char*>& pointers() { return pointers_; }

 private:
  std::vector<char*> pointers_;
  H5::DataSpace space_;
};

std::vector<std::string> owned(const std::vector<char*>& pointers) {
  std::vector<std::string> texts;
  texts.reserve(pointers.size());
  for (const char* pointer : pointers) texts.emplace_back(pointer ? pointer : "");
  return texts;
}

void copy_numbers(const H5::DataSet& from, H5::DataSet& to, std::size_t first, std::size_t rows) {
  const std::size_t width = row_width(to), step = std::max<std::size_t>(values_at_once / width, 1);
  std::vector<double> values;
  for (std::size_t row = 0; row < rows; row += step) {
    values.resize(std::min(step, rows - row) * width);
    read_rows(from, row, values);
    write_rows(to, first + row, std::span<const double>(values));
  }
}

void copy_texts(const H5::DataSet& from, H5::DataSet& to, std::size_t first, std::size_t rows) {
  constexpr std::size_t step = 1024;
  for (std::size_t row = 0; row < rows; row += step) {
    const std::vector<std::string> texts = read_texts(from, row, std::min(step, rows - row));
    std::vector<const char*> pointers;
    for (const std::string& text : texts) pointers.push_back(text.c_str());
    write_rows(to, first + row, pointers);
  }
}

}  // namespace

H5::StrType text_type() {
  H5::StrType type(H5::PredType::C_S1, H5T_VARIABLE);
  type.setCset(H5T_CSET_UTF8);
  return type;
}

std::size_t row_width(const H5::DataSet& array) {
  const std::vector<hsize_t> lengths = lengths_of(array.getSpace());
  std::size_t width = 1;
  for (std::size_t i = 1; i < lengths.size(); ++i) width *= lengths[i];
  return width;
}

void write_rows(H5::DataSet& array, std::size_t first, std::span<const double> values) {
  const Selection chosen = selection_of(array, first, values.size() / row_width(array));
  array.write(values.data(), H5::PredType::NATIVE_DOUBLE, chosen.memory, chosen.file);
}

void write_rows(H5::DataSet& array, std::size_t first, const std::vector<const char*>& texts) {
  const Selection chosen = selection_of(array, first, texts.size() / row_width(array));
  array.write(texts.data(), text_type(), chosen.memory, chosen.file);
}

void read_rows(const H5::DataSet& array, std::size_t first, std::span<double> values) {
  const Selection chosen = selection_of(array, first, values.size() / row_width(array));
  array.read(values.data(), H5::PredType::NATIVE_DOUBLE, chosen.memory, chosen.file);
}

std::vector<std::string> read_texts(const H5::DataSet& array, std::size_t first, std::size_t rows) {
  const Selection chosen = selection_of(array, first, rows);
  LentTexts lent(rows * row_width(array), chosen.memory);
  array.read(lent.pointers().data(), text_type(), chosen.memory, chosen.file);
  return owned(lent.pointers());
}

std::vector<std::string> read_all_texts(const H5::DataSet& array) {
  LentTexts lent(static_cast<std::size_t>(array.getSpace().getSimpleExtentNpoints()), array.getSpace());
  array.read(lent.pointers().data(), text_type());
  return owned(lent.pointers());
}

H5::DataSet& RowArrays::at(const std::string& name) {
  for (auto& [known, array] : arrays_)
    if (known == name) return array;
  throw std::out_of_range("no array " + name);
}

void RowArrays::copy(const H5::Group& from, std::size_t first, std::size_t rows) {
  for (auto& [name, array] : arrays_) {
    const H5::DataSet source = from.openDataSet(name);
    if (array.getTypeClass() == H5T_STRING)
      copy_texts(source, array, first, rows);
    else
      copy_numbers(source, array, first, rows);
  }
}

}  // namespace pilotis
