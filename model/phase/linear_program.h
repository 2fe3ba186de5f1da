#pragma once
// The small linear programmes of the bound: GLPK behind one wall. Minimises; columns may be added between
// solves.

#include <utility>
#include <vector>

struct glp_prob;

namespace unstring {

class LinearProgram {
public:
    LinearProgram();
    ~LinearProgram();
    LinearProgram(const LinearProgram&) = delete;
    LinearProgram& operator=(const LinearProgram&) = delete;

    int add_row_at_most(double right);
    int add_row_equal(double right);
    /// @param entries  (row, coefficient); @param high  may be infinite
    int add_column(double cost, double low, double high, const std::vector<std::pair<int, double>>& entries);
    void set_cost(int column, double cost);

    /// Simplex from the last basis. False when no optimum was reached (infeasible, unbounded, numerics).
    [[nodiscard]] bool solve();
    [[nodiscard]] double objective() const;
    [[nodiscard]] double value(int column) const;
    [[nodiscard]] double price(int row) const; ///< dual value: objective per unit of the right side

private:
    glp_prob* problem_;
};

} // namespace unstring
