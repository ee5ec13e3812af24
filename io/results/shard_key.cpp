#include "io/results/shard_key.hpp"

#include <fmt/format.h>

#include <charconv>
#include <fstream>
#include <map>
#include <sstream>
#include <stdexcept>
#include <vector>

#include "io/sha256.hpp"

namespace pilotis {

namespace {

constexpr const char* first_line = "pilotis shards 1";

// Lines "name value" after the first line; empty when that is another.
std::map<std::string, std::string> lines_of(const std::string& text) {
  std::istringstream in(text);
  std::map<std::string, std::string> found;
  std::string line;
  if (!std::getline(in, line) || line != first_line) return found;
  while (std::getline(in, line)) {
    const auto blank = line.find(' ');
    if (blank != std::string::npos) found[line.substr(0, blank)] = line.substr(blank + 1);
  }
  return found;
}

std::optional<std::size_t> count_from(const std::map<std::string, std::string>& lines, const char* name) {
  const auto found = lines.find(name);
  if (found == lines.end()) return {};
  std::size_t value = 0;
  const std::string& text = found->second;
  const auto [end, error] = std::from_chars(text.data(), text.data() + text.size(), value);
  if (error != std::errc() || end != text.data() + text.size()) return {};
  return value;
}

std::optional<ShardSeal> seal_from(const std::string& text) {
  const auto key = key_from(text);
  const auto lines = lines_of(text);
  const auto shard = count_from(lines, "shard"), first = count_from(lines, "first_run"),
             count = count_from(lines, "count");
  const auto digest = lines.find("sha256");
  if (!key || !shard || !first || !count || digest == lines.end()) return {};
  return ShardSeal{*key, *shard, *first, *count, digest->second};
}

std::string digest_of_rest(std::istream& in) {
  Sha256 digest;
  std::vector<char> part(1 << 16);
  while (in.read(part.data(), static_cast<std::streamsize>(part.size())), in.gcount() > 0)
    digest.add(std::span<const char>(part.data(), static_cast<std::size_t>(in.gcount())));
  return digest.finish();
}

}  // namespace

std::string key_text(const ShardKey& key) {
  return fmt::format("{}\nprogram_version {}\nstudy {}\nruns {}\nshards {}\n", first_line, key.program_version,
                     key.study_digest, key.runs, key.shards);
}

std::optional<ShardKey> key_from(const std::string& text) {
  const auto lines = lines_of(text);
  const auto version = lines.find("program_version"), study = lines.find("study");
  const auto runs = count_from(lines, "runs"), shards = count_from(lines, "shards");
  if (version == lines.end() || study == lines.end() || !runs || !shards) return {};
  return ShardKey{study->second, version->second, *runs, *shards};
}

std::string seal_text(const ShardSeal& seal, std::span<const char> content) {
  Sha256 digest;
  digest.add(content);
  std::string text = key_text(seal.key) + fmt::format("shard {}\nfirst_run {}\ncount {}\nsha256 {}\n", seal.shard,
                                                      seal.first_run, seal.count, digest.finish());
  if (text.size() > seal_size) throw std::logic_error("the seal of a shard is too long");
  text.resize(seal_size, '\n');
  return text;
}

std::optional<ShardSeal> read_seal(const std::filesystem::path& file, std::string& fault) {
  std::ifstream in(file, std::ios::binary);
  std::string text(seal_size, '\0');
  if (!in.read(text.data(), seal_size)) {
    fault = "it is cut short or cannot be read";
    return {};
  }
  const auto seal = seal_from(text);
  if (!seal) {
    fault = "it does not begin as a shard does";
    return {};
  }
  if (digest_of_rest(in) != seal->content_digest) {
    fault = "its content is damaged: the digest differs";
    return {};
  }
  return seal;
}

}  // namespace pilotis
