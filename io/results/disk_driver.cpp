#include "io/results/disk_driver.hpp"

#include <unistd.h>

#include <algorithm>
#include <cerrno>
#include <cstring>

namespace pilotis {

namespace {

// What the library holds of an open file: its own part first.
struct OpenFile {
  H5FD_t library;
  DiskFile* disk;
  haddr_t allocated;  // end of what the library has given out
};

OpenFile* opened(H5FD_t* file) { return reinterpret_cast<OpenFile*>(file); }
const OpenFile* opened(const H5FD_t* file) { return reinterpret_cast<const OpenFile*>(file); }

H5FD_t* open_file(const char*, unsigned, hid_t access, haddr_t) {
  auto* const* disk = static_cast<DiskFile* const*>(H5Pget_driver_info(access));
  return reinterpret_cast<H5FD_t*>(new OpenFile{{}, *disk, 0});
}

herr_t close_file(H5FD_t* file) {
  delete opened(file);
  return 0;
}

herr_t query(const H5FD_t*, unsigned long* flags) {
  *flags = H5FD_FEAT_AGGREGATE_METADATA | H5FD_FEAT_ACCUMULATE_METADATA | H5FD_FEAT_AGGREGATE_SMALLDATA;
  return 0;
}

haddr_t get_allocated(const H5FD_t* file, H5FD_mem_t) { return opened(file)->allocated; }

herr_t set_allocated(H5FD_t* file, H5FD_mem_t, haddr_t end) {
  opened(file)->allocated = end;
  return 0;
}

haddr_t get_end(const H5FD_t* file, H5FD_mem_t) { return opened(file)->disk->end; }

// What is beyond the end reads as zeros.
bool read_disk(int descriptor, haddr_t at, std::size_t size, char* into) {
  while (size > 0) {
    const ssize_t part = ::pread(descriptor, into, size, static_cast<off_t>(at));
    if (part < 0 && errno == EINTR) continue;
    if (part < 0) return false;
    if (part == 0) break;
    at += static_cast<haddr_t>(part);
    into += part;
    size -= static_cast<std::size_t>(part);
  }
  std::memset(into, 0, size);
  return true;
}

// The bytes of `kept` that fall into [at, at + size).
void lay_over(const DiskFile::Kept& kept, haddr_t at, std::size_t size, char* into) {
  const haddr_t from = std::max(at, kept.at), to = std::min(at + size, kept.at + kept.bytes.size());
  if (from < to) std::memcpy(into + (from - at), kept.bytes.data() + (from - kept.at), to - from);
}

herr_t read_bytes(H5FD_t* file, H5FD_mem_t, hid_t, haddr_t at, std::size_t size, void* into) {
  const DiskFile& disk = *opened(file)->disk;
  if (!read_disk(disk.descriptor, at, size, static_cast<char*>(into))) return -1;
  for (const DiskFile::Kept& kept : disk.kept) lay_over(kept, at, size, static_cast<char*>(into));
  return 0;
}

// 0 or errno.
int write_disk(int descriptor, haddr_t at, std::size_t size, const char* from) {
  while (size > 0) {
    const ssize_t part = ::pwrite(descriptor, from, size, static_cast<off_t>(at));
    if (part < 0 && errno == EINTR) continue;
    if (part < 0) return errno;
    at += static_cast<haddr_t>(part);
    from += part;
    size -= static_cast<std::size_t>(part);
  }
  return 0;
}

herr_t write_bytes(H5FD_t* file, H5FD_mem_t, hid_t, haddr_t at, std::size_t size, const void* from) {
  DiskFile& disk = *opened(file)->disk;
  const char* bytes = static_cast<const char*>(from);
  if (disk.error == 0) disk.error = write_disk(disk.descriptor, at, size, bytes);
  if (disk.error != 0) disk.kept.push_back({at, {bytes, bytes + size}});
  disk.end = std::max(disk.end, at + size);
  return 0;
}

herr_t truncate_file(H5FD_t* file, hid_t, hbool_t) {
  OpenFile& open = *opened(file);
  if (open.disk->end == open.allocated) return 0;
  open.disk->end = open.allocated;
  if (::ftruncate(open.disk->descriptor, static_cast<off_t>(open.allocated)) != 0 && open.disk->error == 0)
    open.disk->error = errno;
  return 0;
}

hid_t registered() {
  static const H5FD_class_t driver = [] {
    const H5FD_mem_t map[] = H5FD_FLMAP_DICHOTOMY;
    H5FD_class_t made{};
    made.name = "disk that may be full";
    made.maxaddr = (haddr_t{1} << 62) - 1;
    made.fc_degree = H5F_CLOSE_STRONG;
    made.fapl_size = sizeof(DiskFile*);
    made.open = open_file;
    made.close = close_file;
    made.query = query;
    made.get_eoa = get_allocated;
    made.set_eoa = set_allocated;
    made.get_eof = get_end;
    made.read = read_bytes;
    made.write = write_bytes;
    made.truncate = truncate_file;
    std::copy(std::begin(map), std::end(map), made.fl_map);
    return made;
  }();
  static const hid_t id = H5FDregister(&driver);
  return id;
}

}  // namespace

void use_disk_driver(H5::FileAccPropList& access, DiskFile& file) {
  DiskFile* const pointer = &file;
  access.setDriver(registered(), &pointer);
}

}  // namespace pilotis
