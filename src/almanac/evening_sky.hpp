#pragma once

#include <array>
#include <vector>

#include "almanac/site_year.hpp"
#include "events/site_sky.hpp"

namespace duskleaf {

/// All stars of the catalogue at an instant: apparent directions of date, unit vectors.
std::vector<Eigen::Vector3d> stars_of_date(const YearEphemeris&, Tt);

/// Fills in the twelve evenings and the Moons of each month. `year` has its nights already.
void make_evenings(const SiteSky&, SiteYear& year);

/// How the Moon leans on the date of a night, at the evening's clock time (see MoonLook).
MoonLook moon_look(const SiteSky&, const Zone&, const Night&,
                   std::chrono::minutes clock_after_midnight);

}  // namespace duskleaf
