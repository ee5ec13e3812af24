// SHA-256 (FIPS 180-4) of bytes that come piece by piece.
#pragma once

#include <memory>
#include <span>
#include <string>

namespace pilotis {

class Sha256 {
 public:
  Sha256();  // throws Error (outside) when the cryptographic library refuses to work, as the others do
  ~Sha256();
  void add(std::span<const char> bytes);
  std::string finish();  // 64 lower-case hexadecimal digits; once

 private:
  struct State;
  std::unique_ptr<State> state_;
};

}  // namespace pilotis
