#pragma once

#include <optional>
#include <string>
#include <string_view>
#include <vector>

#include "order/order.hpp"

namespace duskleaf {

/// Every paper that an order may name, as it is spelt.
std::vector<std::string_view> paper_names();
/// The usual spelling of a paper's name given in any case; nullopt when unknown.
std::optional<std::string> canonical_paper(std::string_view name);

}  // namespace duskleaf
