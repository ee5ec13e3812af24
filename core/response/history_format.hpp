// How histories are stored.
#pragma once

namespace pilotis {

enum class HistoryPrecision { double_precision, single_precision };  // 8 or 4 bytes a value in the file

struct HistoryFormat {
  HistoryPrecision precision = HistoryPrecision::double_precision;
  int compression = 4;  // deflate level, 0 (none) to 9
};

}  // namespace pilotis
