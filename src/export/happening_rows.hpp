#pragma once

#include <vector>

#include "export/tables.hpp"

namespace duskleaf {

/// The showers whose peak falls on the site's civil dates of the span.
std::vector<Row> shower_rows(const SiteYear&, const SiteHappenings&);
/// The contacts of the eclipses whose greatest phase falls on them: those of the Moon all, those of
/// the Sun where it is up for any part.
std::vector<Row> eclipse_rows(const SiteYear&, const SiteHappenings&);

}  // namespace duskleaf
