#pragma once

#include <vector>

#include "almanac/site_year.hpp"
#include "sheet/theme.hpp"

namespace duskleaf {

/// How deep the twilight is, from day to full darkness.
enum class SkyTone { day, civil, nautical, astronomical, dark };

struct ToneSpan {
  Ut from, to;
  SkyTone tone;
};

/// The night's 24 hours cut at every twilight instant, in order, without gaps.
std::vector<ToneSpan> tone_spans(const Night&);
/// When the Moon is up in the night's 24 hours.
std::vector<TimeSpan> moon_spans(const Night&);
const Ink& tone_ink(const Theme&, SkyTone);

}  // namespace duskleaf
