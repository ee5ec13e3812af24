// Numbers of records as JSON, in SI with the unit at the end of a key.
#pragma once

#include <nlohmann/json.hpp>

#include "apps/motion/pair.hpp"
#include "core/error.hpp"

namespace pilotis {

nlohmann::ordered_json record_json(const RecordNumbers& record, const MotionRequest& request);
nlohmann::ordered_json pair_json(const PairNumbers& pair);
nlohmann::ordered_json failure_json(const std::string& file, const Error& error);
// The unit of every measure asked for.
nlohmann::ordered_json measure_units_json(const MotionRequest& request);

}  // namespace pilotis
