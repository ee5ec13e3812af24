// Reading accelerograms from files. One file per format beside this one; each is listed once in registry.cpp.
#pragma once

#include <cstddef>
#include <filesystem>
#include <optional>
#include <span>
#include <string>
#include <string_view>
#include <vector>

#include "core/motion/accelerogram.hpp"

namespace pilotis {

// What a study says about a file that the file may not say itself. Saying what the file says differently is an error.
struct RecordHints {
  std::optional<std::string> unit = {};        // acceleration unit by name, e.g. "g", "cm/s2"
  std::optional<double> step = {};             // s
  std::optional<double> first_sample_at = {};  // s
  std::optional<std::string> component = {};   // which one is wanted; see chosen_component in components.hpp
};

// One component as it stands in a file.
struct RecordComponent {
  std::string name;               // as the file calls it, e.g. "90 DEG", "N-S", "UP"; empty when it does not say
  std::optional<int> channel;     // its number in the file, where the file numbers its channels
  std::optional<double> azimuth;  // degrees clockwise from north, in [0, 360); empty when vertical or not said
  std::string unit;               // the unit it was in
  std::optional<std::size_t> stated_samples;  // how many the header promises; empty where it promises none
  Accelerogram record;                        // m/s2
  std::vector<std::string> notes;             // what was assumed of this component, one line each
};

// A whole file.
struct FileOfRecords {
  std::string format;                       // name of the format
  std::vector<RecordComponent> components;  // at least one, in the order of the file
  std::vector<std::string> notes;           // what was assumed of all of them, one line each
};

// One component as read, in m/s2.
struct RecordFile {
  Accelerogram record;
  std::string format;              // name of the format
  std::string unit;                // the unit it was in
  std::vector<std::string> notes;  // what was assumed, one line each
  std::string component;           // its name; empty when the file does not say
};

struct RecordFormat {
  std::string_view name;     // as shown
  std::string_view summary;  // one line
  bool (*recognises)(std::string_view content);
  FileOfRecords (*read)(std::string_view content, const std::string& where, const RecordHints& hints);
};

// In the order they are tried; the last (plain text) takes what no other recognises.
std::span<const RecordFormat> record_formats();

// All components of a file, recognised by content, never by extension. hints.component is not looked at. Throws Error
// naming file, line, what was found and what is allowed.
FileOfRecords read_record_file(const std::filesystem::path& file, const RecordHints& hints = {});
// The same for content that is already in memory; `where` names it in messages.
FileOfRecords read_record_content(std::string_view content, const std::string& where, const RecordHints& hints = {});

// One component: the only one, or the one that hints.component names. Throws Error as read_record_file does, and one
// that lists the components when there are several and none is named, or none of that name.
RecordFile read_record(const std::filesystem::path& file, const RecordHints& hints = {});

}  // namespace pilotis
