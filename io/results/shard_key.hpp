// What a shard belongs to, and the seal by which its file shows that it is whole.
#pragma once

#include <filesystem>
#include <optional>
#include <span>
#include <string>

namespace pilotis {

// What the shards of a folder belong to. Two with equal keys cut the same runs into the same shards.
struct ShardKey {
  std::string study_digest;  // SHA-256 of all that decides the results, 64 hexadecimal digits
  std::string program_version;
  std::size_t runs = 0, shards = 0;
  bool operator==(const ShardKey&) const = default;
};

// The first 512 bytes of a shard file, as text: the user block of HDF5.
struct ShardSeal {
  ShardKey key;
  std::size_t shard = 0, first_run = 0, count = 0;
  std::string content_digest;  // SHA-256 of all that follows
};

inline constexpr std::size_t seal_size = 512;  // bytes
std::string seal_text(const ShardSeal& seal, std::span<const char> content);

// Of a file whose content has the digest it states; otherwise nothing, and `fault` tells why.
std::optional<ShardSeal> read_seal(const std::filesystem::path& file, std::string& fault);

// The key alone, as text lines, and back; nothing when `text` is no key.
std::string key_text(const ShardKey& key);
std::optional<ShardKey> key_from(const std::string& text);

}  // namespace pilotis
