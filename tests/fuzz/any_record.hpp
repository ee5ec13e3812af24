// What must hold for any bytes handed to the readers of records.
#pragma once

#include <string_view>

namespace pilotis {

// Reads `content` with no hints, then with every hint. It must be refused with an Error, or be accepted with at least
// one component, each of finite samples, a step above 0, and as many samples as its header promises where it promises
// any. Anything else ends the program with a message.
void read_any_record(std::string_view content);

}  // namespace pilotis
