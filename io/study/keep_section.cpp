#include <fmt/format.h>

#include <algorithm>
#include <array>

#include "io/study/sections.hpp"

namespace pilotis {

namespace {

const Quantity* kept_quantity(const ValueReader& item, const std::vector<const Quantity*>& already) {
  const Quantity* quantity = find_quantity(item.choice("quantity", quantity_names()));
  if (std::find(already.begin(), already.end(), quantity) != already.end())
    throw item.wrong(fmt::format("found \"{}\" a second time", quantity->name), "name each quantity once");
  return quantity;
}

std::vector<const Quantity*> read_histories(const ValueReader& value) {
  std::vector<const Quantity*> kept;
  if (value.node().kind == NodeKind::text) {
    const std::array<std::string_view, 2> words{"all", "none"};
    if (value.choice("choice of histories", words) == "all")
      for (const Quantity& quantity : quantities()) kept.push_back(&quantity);
    return kept;
  }
  if (value.node().kind != NodeKind::array)
    throw value.wrong_type("\"all\", \"none\" or a list of quantities is needed");
  for (const ValueReader& item : value.items()) kept.push_back(kept_quantity(item, kept));
  return kept;
}

HistoryFormat read_format(const TableReader& table) {
  const std::array<std::string_view, 2> precisions{"double", "single"};
  HistoryFormat format;
  if (const auto precision = table.find("precision"))
    format.single = precision->choice("precision of histories", precisions) == "single";
  format.compression = static_cast<int>(table.quantity(
      whole_number("compression", "how hard histories are compressed, from none to most,", 0, 9, format.compression)));
  return format;
}

}  // namespace

KeepSettings read_keep(TableReader table) {
  table.known_keys({"histories", "every", "precision", "compression"});
  KeepSettings keep;
  keep.histories = read_histories(table.at("histories", "say \"all\", \"none\" or a list of quantities"));
  keep.every =
      static_cast<int>(table.quantity(whole_number("every", "how many steps apart instants are kept", 1, 1e6, 1.0)));
  keep.format = read_format(table);
  return keep;
}

}  // namespace pilotis
