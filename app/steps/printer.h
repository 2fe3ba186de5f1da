#pragma once
// Paper, handed in from outside so that the steps need no Qt.

#include <string>
#include <vector>

#include "model/fault.h"
#include "model/orders/work_order.h"

namespace unstring {

class Printer {
public:
    virtual ~Printer() = default;
    /// One PDF with these orders. @param paper "a4" or "letter"
    [[nodiscard]] virtual Expected<void> print_orders(const std::vector<WorkOrder>& orders,
                                                      const std::string& path, const std::string& paper) = 0;
};

} // namespace unstring
