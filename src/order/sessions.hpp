#pragma once

#include <vector>

#include "order/yaml_values.hpp"

namespace duskleaf {

/// The lists under `sessions` and `dates` of a site. Throw OrderError.
std::vector<Session> read_sessions(const YamlValue&);
std::vector<OwnDate> read_own_dates(const YamlValue&);

}  // namespace duskleaf
