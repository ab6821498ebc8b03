// Elementary; what counts as dark enough: almanac/evening_moment.hpp; the best night:
// almanac/best_nights.hpp.
#include "sheet/show_moment.hpp"

#include <algorithm>
#include <optional>

#include "almanac/best_nights.hpp"
#include "almanac/evening_moment.hpp"

namespace duskleaf {
namespace {

/// The first session of the month that does not end in daylight.
std::optional<ShowMoment> session_moment(const BlockContext& c, const SiteSky& sky) {
  const auto [year, month] = c.year.span.month(c.month_index);
  const Zone& zone = c.year.place.zone;
  std::optional<ShowMoment> found;
  for (const Session& session : c.site.sessions) {
    if (!session.from) continue;
    for (const Date date : session_dates(session, c.year.span)) {
      if (year_of(date) != year || month_of(date) != month || (found && found->evening <= date))
        continue;
      const auto index = static_cast<std::size_t>((date - c.year.span.first_day()).count());
      // Readings up to noon are of the morning after.
      const auto instant = [&](std::chrono::minutes m) {
        return zone.instant(m <= std::chrono::hours(12) ? date + std::chrono::days(1) : date, m);
      };
      Ut at = instant(*session.from);
      const std::optional<Ut> dusk = c.year.nights[index].nautical_dusk;
      if (dusk && *dusk > at)
        at = session.to ? std::max(at, std::min(*dusk, instant(*session.to))) : *dusk;
      if (sky.altitude(Body::sun, at) > sun_rise_altitude) continue;
      found = ShowMoment{date, at, true, false};
      break;  // its dates ascend
    }
  }
  return found;
}

}  // namespace

ShowMoment show_moment(const BlockContext& c) {
  const auto& nights = c.year.nights;
  const SiteSky sky(c.ephemeris, c.year.place.observer, nights.front().from, nights.back().to);
  if (const auto session = session_moment(c, sky)) return *session;

  const auto [year, month] = c.year.span.month(c.month_index);
  std::vector<Date> dates;
  for (int day = 1; day <= days_in_month(year, month); ++day)
    dates.push_back(make_date(year, month, day));
  const std::vector<NightRank> ranks =
      rank_nights(c.ephemeris, c.year, dates, {}, Aim::any, &c.happenings);
  // Where no night has any darkness, none is better than the charts' own.
  if (ranks.empty() || ranks.front().dark_rounded == 0)
    return {c.evening().date, c.evening().moment, false, false};
  const Date best = ranks.front().date;
  const Night& night = nights[static_cast<std::size_t>((best - nights.front().date).count())];
  const ChartHour& hour = c.year.place.chart_hours[static_cast<std::size_t>(month - 1)];
  return {best, evening_moment(sky, c.year.place.zone, hour, night).moment, false, true};
}

}  // namespace duskleaf
