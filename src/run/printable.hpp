#pragma once

#include <vector>

#include "order/order.hpp"

namespace duskleaf {

/// Checks what pressing needs beyond the order itself: words in its language, templates that this
/// version prints and that are right. Throws OrderError, FileError.
void check_printable(const Order&);

/// For proof: what this version cannot print yet, as doubts; a mistake in a template that it does
/// print throws as above.
std::vector<Doubt> unprinted(const Order&);

}  // namespace duskleaf
