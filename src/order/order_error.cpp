// Messages in the form that compilers use and editors jump to: FILE:LINE:COLUMN (common practice).
#include <fmt/format.h>

#include "order/order.hpp"

namespace duskleaf {

OrderError::OrderError(Location where, std::string wrong, std::string expected)
    : where_(std::move(where)),
      text_(fmt::format("{}:{}:{}: {}; {}", where_.file, where_.line, where_.column, wrong,
                        expected)) {}

}  // namespace duskleaf
