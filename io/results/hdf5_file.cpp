#include "io/results/hdf5_file.hpp"

#include <fmt/format.h>

#include <system_error>

#include "core/error.hpp"
#include "io/results/held_file.hpp"

namespace pilotis {

namespace {

constexpr const char* room = "check that the disk has room and that you may write there";

H5::FileCreatPropList creation() {
  H5::FileCreatPropList properties;
  H5Pset_link_creation_order(properties.getId(), H5P_CRT_ORDER_TRACKED | H5P_CRT_ORDER_INDEXED);
  H5Pset_attr_creation_order(properties.getId(), H5P_CRT_ORDER_TRACKED | H5P_CRT_ORDER_INDEXED);
  H5Pset_obj_track_times(properties.getId(), false);  // the same results give the same bytes
  return properties;
}

// Closing the file closes everything in it, also after a failure half way. The library's cache of its own structures
// stays small, however many runs there are.
H5::FileAccPropList access() {
  H5::FileAccPropList properties;
  properties.setFcloseDegree(H5F_CLOSE_STRONG);
  H5AC_cache_config_t cache{};
  cache.version = H5AC__CURR_CACHE_CONFIG_VERSION;
  H5Pget_mdc_config(properties.getId(), &cache);
  cache.set_initial_size = true;
  cache.initial_size = cache.min_size = 512 << 10;
  cache.max_size = 2 << 20;
  H5Pset_mdc_config(properties.getId(), &cache);
  return properties;
}

H5::H5File made_file(MadeIn where, DiskFile& disk) {
  constexpr std::size_t grow_by = 1 << 20;  // bytes
  H5::FileAccPropList properties = access();
  if (where == MadeIn::memory)
    properties.setCore(grow_by, false);
  else
    use_disk_driver(properties, disk);
  // The library takes in-memory files of one name for one file: each needs a name of its own while it is open.
  const std::string name = fmt::format("in the making {}", disk.descriptor);
  return H5::H5File(name, H5F_ACC_TRUNC, creation(), properties);
}

// The bytes of an in-memory file that has been flushed; they live as long as it stays open.
std::span<const char> image_of(const H5::H5File& file) {
  void* handle = nullptr;
  file.getVFDHandle(&handle);  // of an in-memory file: the address of the pointer to its bytes
  const ssize_t size = H5Fget_file_image(file.getId(), nullptr, 0);  // without the room kept to grow
  if (size < 0) throw H5::FileIException("H5Fget_file_image", "");
  return {*static_cast<const char* const*>(handle), static_cast<std::size_t>(size)};
}

}  // namespace

NewFile::NewFile(const std::filesystem::path& target, MadeIn where) : target_(target), where_(where), whole_(target) {
  disk_.descriptor = whole_.descriptor();
  work([&](H5::H5File& file) { file = made_file(where_, disk_); });
}

NewFile::~NewFile() {
  const Hdf5Quiet quiet;
  try {
    file_.close();
  } catch (const H5::Exception&) {
    // The file is thrown away.
  }
}

void NewFile::work(const std::function<void(H5::H5File&)>& act) {
  const Hdf5Quiet quiet;
  try {
    act(file_);
  } catch (const H5::Exception&) {
    require_no_failure();  // the disk's own words, where it was the disk
    throw outside_error(target_.string(), fmt::format("cannot be written: {}", quiet.reason()),
                        "check that there is memory enough");
  }
  require_no_failure();
}

void NewFile::require_no_failure() const {
  if (disk_.error == 0) return;
  const std::string reason = std::generic_category().message(disk_.error);
  throw outside_error(target_.string(), fmt::format("cannot be written: {}", reason), room);
}

void NewFile::write_image(const std::function<std::string(std::span<const char>)>& preamble) {
  work([&](H5::H5File& file) {
    file.flush(H5F_SCOPE_GLOBAL);
    const std::span<const char> image = image_of(file);
    if (preamble) whole_.write(preamble(image));
    whole_.write(image);
  });
}

void NewFile::commit(const std::function<std::string(std::span<const char>)>& preamble) {
  if (where_ == MadeIn::memory) write_image(preamble);
  work([](H5::H5File& file) { file.close(); });
  refuse_if_held(target_);
  whole_.commit();
}

H5::H5File open_hdf5(const std::filesystem::path& path) {
  return H5::H5File(path.string(), H5F_ACC_RDONLY, H5::FileCreatPropList::DEFAULT, access());
}

void reading(const std::filesystem::path& path, const std::function<void()>& act) {
  const Hdf5Quiet quiet;
  try {
    act();
  } catch (const H5::Exception&) {
    throw input_error(path.string(), fmt::format("is damaged: {}", quiet.reason()),
                      "give a result file that `pilotis run` wrote");
  }
}

}  // namespace pilotis
