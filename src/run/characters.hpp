#pragma once

#include <memory>
#include <vector>

#include "order/order.hpp"
#include "sheet/type.hpp"

namespace duskleaf {

/// The faces of an order. Throws FileError naming the file when a font cannot be set.
std::unique_ptr<TypeSet> load_type(const Order::Fonts&);

/// Characters of the order's own words that neither its fonts nor the built-in ones have, one doubt
/// for each site: they come out as question marks. Throws FileError as load_type does.
std::vector<Doubt> missing_characters(const Order&);

}  // namespace duskleaf
