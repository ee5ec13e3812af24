#include "apps/motion/gather.hpp"

#include <fmt/format.h>

#include <algorithm>
#include <cstdio>

#include "apps/batch/interrupt.hpp"
#include "apps/commands.hpp"
#include "apps/motion/charts.hpp"
#include "apps/motion/json.hpp"
#include "apps/progress.hpp"
#include "apps/terminal.hpp"

namespace pilotis {

namespace {

constexpr std::size_t most_notes = 20;

class Gatherer {
 public:
  explicit Gatherer(const GatherOptions& options)
      : options_(options),
        progress_(is_terminal(stderr), options.quiet, 0, "files"),
        json_([this](std::string_view part) { text_ += part; }) {
    if (!options.csv.empty()) tables_ = std::make_unique<MotionTables>(options.csv, options.told, options.pair);
    if (options.json) json_.member("measure_units", measure_units_json(options.told));
  }

  Gathered run() {
    if (options_.json)
      json_.array("records", [this] { take_all(); });
    else
      take_all();
    progress_.finish();
    gathered_.stopped = InterruptWatch::asked();
    if (gathered_.stopped) return std::move(gathered_);
    if (options_.pair) add_pair();
    if (options_.json) finish_json();
    if (notes_ > most_notes) fmt::print(stderr, "and {} more notes\n", notes_ - most_notes);
    if (tables_) {
      tables_->commit();
      gathered_.csv_files = tables_->files();
    }
    return std::move(gathered_);
  }

 private:
  void take_all() {
    const InterruptWatch watch;
    each_file(options_.files, options_.hints, options_.computed, options_.threads, [this](FileNumbers file) {
      take(std::move(file));
      return !InterruptWatch::asked();
    });
  }

  void take(FileNumbers file) {
    if (file.failure) add_failure(file.file, *file.failure);
    for (RecordNumbers& record : file.components) add_record(std::move(record));
    ++done_;
    progress_.show(static_cast<double>(done_), static_cast<long>(options_.files.size()),
                   static_cast<long>(failures_.size()));
  }

  void add_failure(const std::string& file, const Error& error) {
    progress_.finish();
    fmt::print(stderr, "pilotis: {}\n", error.what());
    failures_.push_back(failure_json(file, error));
    gathered_.status = std::max<int>(gathered_.status, exit_status_of(error));
  }

  void add_record(RecordNumbers record) {
    for (const std::string& note : record.notes) tell_note(record.file, note);
    if (tables_) tables_->add(record);
    if (options_.json) {
      json_.element(record_json(record, options_.told));
      flush_json();
    }
    // What will not be drawn is let go; the tables have theirs already.
    if (!options_.pictures || gathered_.records.size() >= most_drawn_apart) record.histories = {};
    if (!options_.pictures) record.fourier = {};
    gathered_.records.push_back(std::move(record));
  }

  void tell_note(const std::string& file, const std::string& note) {
    if (options_.quiet || ++notes_ > most_notes) return;
    progress_.finish();
    fmt::print(stderr, "note: {}: {}\n", file, note);
  }

  // A pair that cannot be taken together is told of as a file that cannot be used.
  void add_pair() {
    try {
      gathered_.pair = pair_of(gathered_.records, options_.computed);
      if (tables_) tables_->add(gathered_.pair);
    } catch (const Error& error) {
      add_failure("", error);
    }
  }

  void finish_json() {
    if (!gathered_.pair.spectra.empty()) json_.member("rotd", pair_json(gathered_.pair));
    json_.member("failed", failures_);
    json_.finish();
    flush_json();
  }

  void flush_json() {
    print_out(text_);
    text_.clear();
  }

  const GatherOptions& options_;
  Progress progress_;
  std::string text_;  // JSON not yet printed
  JsonStream json_;
  std::unique_ptr<MotionTables> tables_;
  Gathered gathered_;
  nlohmann::ordered_json failures_ = nlohmann::ordered_json::array();
  std::size_t notes_ = 0;
  long done_ = 0;
};

}  // namespace

Gathered gather(const GatherOptions& options) { return Gatherer(options).run(); }

}  // namespace pilotis
