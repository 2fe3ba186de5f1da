#include "model/phase/linear_program.h"

#include <cmath>

#include <glpk.h>

namespace unstring {

LinearProgram::LinearProgram() : problem_(glp_create_prob()) { glp_set_obj_dir(problem_, GLP_MIN); }
LinearProgram::~LinearProgram() { glp_delete_prob(problem_); }

int LinearProgram::add_row_at_most(double right) {
    const int row = glp_add_rows(problem_, 1);
    glp_set_row_bnds(problem_, row, GLP_UP, 0, right);
    return row;
}

int LinearProgram::add_row_equal(double right) {
    const int row = glp_add_rows(problem_, 1);
    glp_set_row_bnds(problem_, row, GLP_FX, right, right);
    return row;
}

int LinearProgram::add_column(double cost, double low, double high,
                              const std::vector<std::pair<int, double>>& entries) {
    const int column = glp_add_cols(problem_, 1);
    const int kind = std::isinf(high) ? GLP_LO : (high > low ? GLP_DB : GLP_FX);
    glp_set_col_bnds(problem_, column, kind, low, std::isinf(high) ? 0 : high);
    glp_set_obj_coef(problem_, column, cost);
    std::vector<int> rows(1, 0);
    std::vector<double> values(1, 0);
    for (const auto& [row, value] : entries) {
        rows.push_back(row);
        values.push_back(value);
    }
    glp_set_mat_col(problem_, column, static_cast<int>(entries.size()), rows.data(), values.data());
    return column;
}

void LinearProgram::set_cost(int column, double cost) { glp_set_obj_coef(problem_, column, cost); }

bool LinearProgram::solve() {
    glp_smcp options;
    glp_init_smcp(&options);
    options.msg_lev = GLP_MSG_OFF;
    options.meth = GLP_PRIMAL;
    if (glp_simplex(problem_, &options) != 0) {
        glp_adv_basis(problem_, 0); // a singular basis: begin anew
        if (glp_simplex(problem_, &options) != 0) return false;
    }
    return glp_get_status(problem_) == GLP_OPT;
}

double LinearProgram::objective() const { return glp_get_obj_val(problem_); }
double LinearProgram::value(int column) const { return glp_get_col_prim(problem_, column); }
double LinearProgram::price(int row) const { return glp_get_row_dual(problem_, row); }

} // namespace unstring
