#include "io/digest.hpp"

#include <fmt/format.h>
#include <openssl/evp.h>

#include <array>
#include <bit>
#include <cstdint>
#include <vector>

#include "core/error.hpp"

namespace pilotis {

namespace {

void append(std::vector<unsigned char>& bytes, double value) {
  const auto bits = std::bit_cast<std::uint64_t>(value);
  for (int shift = 0; shift < 64; shift += 8) bytes.push_back(static_cast<unsigned char>(bits >> shift));
}

std::vector<unsigned char> bytes_of(const Accelerogram& record) {
  std::vector<unsigned char> bytes;
  bytes.reserve(8 * (record.samples.size() + 2));
  append(bytes, record.step);
  append(bytes, record.first_sample_at);
  for (double sample : record.samples) append(bytes, sample);
  return bytes;
}

std::string sha256(const void* bytes, std::size_t count) {
  std::array<unsigned char, EVP_MAX_MD_SIZE> digest{};
  unsigned int length = 0;
  if (EVP_Digest(bytes, count, digest.data(), &length, EVP_sha256(), nullptr) != 1)
    throw outside_error("digest", "the cryptographic library refused SHA-256", "check its configuration");
  std::string text;
  for (unsigned int i = 0; i < length; ++i) text += fmt::format("{:02x}", digest[i]);
  return text;
}

}  // namespace

std::string digest_of(const Accelerogram& record) {
  const std::vector<unsigned char> bytes = bytes_of(record);
  return sha256(bytes.data(), bytes.size());
}

std::string digest_of(std::string_view bytes) { return sha256(bytes.data(), bytes.size()); }

}  // namespace pilotis
