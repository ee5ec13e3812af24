// How kept histories are stored.
#pragma once

namespace pilotis {

struct HistoryFormat {
  bool single = false;  // values as IEEE 754 single precision (about 7 digits) rather than double
  int compression = 4;  // deflate level, 0 (none) to 9 (smallest, slowest)
};

}  // namespace pilotis
