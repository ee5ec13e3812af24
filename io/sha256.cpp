#include "io/sha256.hpp"

#include <fmt/format.h>
#include <openssl/evp.h>

#include <array>

#include "core/error.hpp"

namespace pilotis {

namespace {

void require(bool worked) {
  if (!worked)
    throw outside_error("SHA-256", "the cryptographic library refused to compute it", "check its configuration");
}

}  // namespace

struct Sha256::State {
  State() : context(EVP_MD_CTX_new()) {}
  ~State() { EVP_MD_CTX_free(context); }
  State(const State&) = delete;
  State& operator=(const State&) = delete;
  EVP_MD_CTX* context;
};

Sha256::Sha256() : state_(std::make_unique<State>()) {
  require(state_->context != nullptr && EVP_DigestInit_ex(state_->context, EVP_sha256(), nullptr) == 1);
}

Sha256::~Sha256() = default;

void Sha256::add(std::span<const char> bytes) {
  require(EVP_DigestUpdate(state_->context, bytes.data(), bytes.size()) == 1);
}

std::string Sha256::finish() {
  std::array<unsigned char, EVP_MAX_MD_SIZE> digest{};
  unsigned int length = 0;
  require(EVP_DigestFinal_ex(state_->context, digest.data(), &length) == 1);
  std::string text;
  for (unsigned int i = 0; i < length; ++i) text += fmt::format("{:02x}", digest[i]);
  return text;
}

}  // namespace pilotis
