#include "core/system/system.hpp"

#include <type_traits>

namespace pilotis {

int Rows::add(const std::vector<int>& freedoms, const std::vector<double>& coefficients) {
  freedom.insert(freedom.end(), freedoms.begin(), freedoms.end());
  coefficient.insert(coefficient.end(), coefficients.begin(), coefficients.end());
  start.push_back(static_cast<int>(freedom.size()));
  return count() - 1;
}

namespace {

// band += k B^T B of one row.
void add_row_stiffness(const Rows& rows, int row, double k, Band& band) {
  for (int a = rows.start[row]; a < rows.start[row + 1]; ++a)
    for (int b = rows.start[row]; b <= a; ++b)
      band.add(rows.freedom[a], rows.freedom[b], k * rows.coefficient[a] * rows.coefficient[b]);
}

}  // namespace

int add_element(System& system, const Law& law, int row) {
  const int id = system.elements++;
  std::visit(
      [&]<class L>(const L& l) {
        auto& group = std::get<ElementGroup<L>>(system.groups);
        group.laws.push_back(l);
        group.row.push_back(row);
        group.id.push_back(id);
        if constexpr (std::is_same_v<L, Linear>)
          add_row_stiffness(system.rows, row, l.stiffness, system.stiffness);
        else
          ++system.nonlinear_elements;
      },
      law);
  return id;
}

namespace {

PairRow pair_row(const Rows& rows, int row, const Band& shape) {
  const int k = rows.start[row];
  const bool two = rows.start[row + 1] - k == 2;
  const int first = rows.freedom[k], second = two ? rows.freedom[k + 1] : first;
  const double a = rows.coefficient[k], b = two ? rows.coefficient[k + 1] : 0.0;
  const auto at = [&](int i, int j) { return static_cast<int>(shape.position(i, j)); };
  return {first, second, a, b, at(first, first), at(second, second), at(first, second), a * a, b * b, a * b};
}

template <class L>
void prepare_pairs(const Rows& rows, const Band& shape, ElementGroup<L>& group) {
  group.pairs.clear();
  for (int row : group.row)
    if (rows.start[row + 1] - rows.start[row] > 2) return;
  for (int row : group.row) group.pairs.push_back(pair_row(rows, row, shape));
}

}  // namespace

void prepare_scatter(System& system) {
  const Rows& rows = system.rows;
  const Band shape(system.freedoms, system.half);
  system.scatter = Scatter{};
  for (int row = 0; row < rows.count(); ++row) {
    for (int a = rows.start[row]; a < rows.start[row + 1]; ++a)
      for (int b = rows.start[row]; b <= a; ++b) {
        system.scatter.position.push_back(shape.position(rows.freedom[a], rows.freedom[b]));
        system.scatter.weight.push_back(rows.coefficient[a] * rows.coefficient[b]);
      }
    system.scatter.start.push_back(static_cast<int>(system.scatter.position.size()));
  }
  std::apply([&](auto&... group) { (prepare_pairs(rows, shape, group), ...); }, system.groups);
}

Band initial_stiffness(const System& system) {
  Band band = system.stiffness;
  for_each_group(system, [&]<class L>(const ElementGroup<L>& group) {
    if constexpr (!std::is_same_v<L, Linear>)
      for (std::size_t e = 0; e < group.laws.size(); ++e)
        add_row_stiffness(system.rows, group.row[e], initial_stiffness(group.laws[e]), band);
  });
  return band;
}

}  // namespace pilotis
