#include <fmt/format.h>

#include "io/results/axes.hpp"
#include "io/results/group_reader.hpp"
#include "io/results/group_writer.hpp"
#include "io/results/groups.hpp"

namespace pilotis {

namespace {

std::string path_of(std::size_t run) { return fmt::format("/histories/{}", run); }

// What stands beside the responses of a run.
struct HistoryHead {
  std::string building, motion;
  double factor = 1;
  std::vector<double> times;
  std::size_t stories = 0;
};

GroupWriter made_group_of(H5::H5File& file, const std::string& path, const HistoryHead& head) {
  GroupWriter group(file, path);
  group.attribute("building", head.building);
  group.attribute("motion", head.motion);
  group.attribute("factor", head.factor);
  group.scale("time", head.times, "s", "time since the start of the run");
  write_places(group, head.stories);
  return group;
}

H5::DataSet made_array(GroupWriter& group, const Quantity& quantity, HistoryFormat format) {
  return group.empty_history(std::string(quantity.name), axes_of("time", quantity), format, si_unit(quantity.dimension),
                             quantity.long_name);
}

void write_one(H5::H5File& file, std::size_t number, const RunResult& run, const BuildingSummary& building,
               HistoryFormat format) {
  GroupWriter group =
      made_group_of(file, path_of(number), {building.name, run.motion, run.factor, run.times, building.heights.size()});
  for (const History& history : run.histories)
    made_array(group, *history.quantity, format).write(history.values.data(), H5::PredType::NATIVE_DOUBLE);
}

void check(herr_t status, const char* function) {
  if (status < 0) throw H5::DataSetIException(function, "");
}

HistoryFormat format_of(const H5::DataSet& array) {
  HistoryFormat format{array.getDataType().getSize() == sizeof(float), 0};
  const H5::DSetCreatPropList properties = array.getCreatePlist();
  for (unsigned i = 0; i < static_cast<unsigned>(properties.getNfilters()); ++i) {
    unsigned flags = 0, level = 0, configuration = 0;
    std::size_t values = 1;
    const H5Z_filter_t filter =
        H5Pget_filter2(properties.getId(), i, &flags, &values, &level, 0, nullptr, &configuration);
    if (filter == H5Z_FILTER_DEFLATE) format.compression = static_cast<int>(level);
  }
  return format;
}

// Chunk by chunk as it is stored: nothing is inflated. Both arrays have the same shape, type, chunks and filters.
void copy_chunks(const H5::DataSet& from, H5::DataSet& to, std::vector<char>& buffer) {
  const H5::DataSpace space = from.getSpace();
  std::vector<hsize_t> at(static_cast<std::size_t>(space.getSimpleExtentNdims()));
  hsize_t chunks = 0;
  check(H5Dget_num_chunks(from.getId(), space.getId(), &chunks), "H5Dget_num_chunks");
  for (hsize_t i = 0; i < chunks; ++i) {
    unsigned mask = 0;
    haddr_t address = 0;
    hsize_t size = 0;
    check(H5Dget_chunk_info(from.getId(), space.getId(), i, at.data(), &mask, &address, &size), "H5Dget_chunk_info");
    buffer.resize(size);
    std::uint32_t filters = 0;
    check(H5Dread_chunk(from.getId(), H5P_DEFAULT, at.data(), &filters, buffer.data()), "H5Dread_chunk");
    check(H5Dwrite_chunk(to.getId(), H5P_DEFAULT, filters, at.data(), size, buffer.data()), "H5Dwrite_chunk");
  }
}

HistoryHead head_of(const GroupReader& group) {
  HistoryHead head{group.text_attribute("building"),
                   group.text_attribute("motion"),
                   group.number_attribute("factor"),
                   {},
                   group.length("story")};
  head.times = group.numbers("time", group.length("time"));
  return head;
}

void copy_one(H5::H5File& file, const ResultFile& from, std::size_t run, std::vector<char>& buffer) {
  const std::string path = path_of(run);
  const GroupReader source(from.file, from.where, path);
  const HistoryHead head = head_of(source);
  GroupWriter group = made_group_of(file, path, head);
  for (const Quantity& quantity : quantities()) {
    const std::string name(quantity.name);
    if (!source.has(name)) continue;
    const std::size_t places = quantity.per == Per::run ? 1 : head.stories;
    const H5::DataSet stored = source.number_array(name, head.times.size() * places);
    H5::DataSet copy = made_array(group, quantity, format_of(stored));
    copy_chunks(stored, copy, buffer);
  }
}

}  // namespace

void make_histories(H5::H5File& file) { const GroupWriter parent(file, "/histories"); }

void write_histories(H5::H5File& file, std::size_t first, std::span<const RunResult> results,
                     const Buildings& buildings, HistoryFormat format) {
  for (std::size_t i = 0; i < results.size(); ++i)
    if (!results[i].times.empty())
      write_one(file, first + i, results[i], buildings.at(static_cast<std::size_t>(results[i].building)), format);
}

void copy_histories(H5::H5File& file, const ResultFile& from, RunRange runs) {
  const GroupReader parent(from.file, from.where, "/histories");
  std::vector<char> buffer;
  for (std::size_t run = runs.first; run < runs.first + runs.count; ++run)
    if (parent.has(std::to_string(run))) copy_one(file, from, run, buffer);
}

bool has_history(const ResultFile& from, std::size_t run) {
  return GroupReader(from.file, from.where, "/histories").has(std::to_string(run));
}

void read_history(const ResultFile& from, std::size_t run, RunResult& into) {
  into.times.clear();
  into.histories.clear();
  if (!has_history(from, run)) return;
  const GroupReader group(from.file, from.where, path_of(run));
  const std::size_t instants = group.length("time");
  into.times = group.numbers("time", instants);
  const ResponseLayout layout(static_cast<int>(group.length("story")));
  for (const Quantity& quantity : quantities()) {
    const std::string name(quantity.name);
    if (!group.has(name)) continue;
    into.histories.push_back({&quantity, group.numbers(name, instants * layout.count(quantity))});
  }
}

}  // namespace pilotis
