#pragma once

#include "order/yaml_values.hpp"

namespace duskleaf {

/// A latitude in [-90, 90], north positive, or a longitude in [-180, 180], east positive (a
/// longitude counted to 360 is refused: it is a slip more often than a habit). Decimal degrees, or
/// degrees, minutes and seconds with a letter: "54 10 48 N", "4°37'12\"W". Throws OrderError.
Angle read_latitude(const YamlValue&);
Angle read_longitude(const YamlValue&);

/// Metres: 35, "35 m", "115 ft"; -450..9000 m.
double read_elevation(const YamlValue&);

}  // namespace duskleaf
