// The building as equations of motion, ready to march:
//
//   M u'' + C u' + K u + sum_e B_e^T f_e(B_e u, B_e u'; memory_e) = p(t) - M iota a_g(t)
//
// Flat arrays, immutable once assembled, shared by threads. Every kind of building becomes this.
#pragma once

#include <vector>

#include "core/laws/registry.hpp"
#include "core/system/band.hpp"

namespace pilotis {

// Kinematic rows: deformation r = sum over k in [start[r], start[r+1]) of coefficient[k] u[freedom[k]].
struct Rows {
  std::vector<int> start{0};
  std::vector<int> freedom;
  std::vector<double> coefficient;

  int count() const { return static_cast<int>(start.size()) - 1; }
  // Adds a row and gives its number.
  int add(const std::vector<int>& freedoms, const std::vector<double>& coefficients);
};

// Where B_e^T k B_e of each row goes in a band: position[k] += weight[k] k, k in [start[r], start[r+1]).
struct Scatter {
  std::vector<int> start{0};
  std::vector<std::size_t> position;
  std::vector<double> weight;
};

// A row of one or two freedoms, as nearly all are, and where its B^T k B goes in a band: the same as in Rows and
// Scatter, laid out for the hot path. One freedom: the second is the first again, with coefficient and weights 0.
struct PairRow {
  int first = 0, second = 0;
  double a = 0, b = 0;                           // deformation = a u[first] + b u[second]
  int at_first = 0, at_second = 0, at_both = 0;  // places in a band
  double a_a = 0, b_b = 0, a_b = 0;              // += weight k
};

// All elements of one law: element e of the group has laws[e], deforms by row[e] and is number id[e] of the system.
template <class L>
struct ElementGroup {
  std::vector<L> laws;
  std::vector<int> row;
  std::vector<int> id;
  std::vector<PairRow> pairs;  // [element of the group]; empty when some row has more than two freedoms
};

// C's part of low rank: sum over j of weight[j] w_j w_j^T (modal damping). Empty for the other kinds of damping.
struct LowRank {
  std::vector<double> weight;                // N s/m per unit of w
  std::vector<std::vector<double>> columns;  // w_j, [rank][freedom]
};

// What response needs to read stories and floors off the freedoms.
struct StoryGauges {
  std::vector<double> height;  // m, [story]
  std::vector<int> drift_row;  // row that gives the drift, [story]
  std::vector<int> spring;     // element that is the story's spring, [story]
  std::vector<int> floor;      // freedom of each floor, [floor]
};

struct System {
  int freedoms = 0;
  int half = 0;              // half band width of K, C and the elements together
  std::vector<double> mass;  // kg, [freedom], > 0
  Band stiffness;            // K, N/m: elements with the linear law, and P-Delta
  Band damping;              // C less its low-rank part, N s/m
  LowRank modal_damping;
  std::vector<double> influence;  // iota, [freedom]
  Rows rows;
  Scatter scatter;  // per row, into a band of width `half`
  Laws::Tuple<ElementGroup> groups;
  int elements = 0;            // of all groups
  int nonlinear_elements = 0;  // those that are not in K
  StoryGauges stories;

  bool is_linear() const { return nonlinear_elements == 0; }
};

// Calls f(group) for every law's group.
template <class F>
void for_each_group(const System& system, F f) {
  std::apply([&](const auto&... group) { (f(group), ...); }, system.groups);
}

// Adds one element with this law on a row; a linear law also goes into K. Gives the element's number.
int add_element(System& system, const Law& law, int row);

// Fills `scatter` and the groups' pairs from the rows, once they are all there.
void prepare_scatter(System& system);

// K and the initial tangents of all elements, P-Delta included.
Band initial_stiffness(const System& system);

}  // namespace pilotis
