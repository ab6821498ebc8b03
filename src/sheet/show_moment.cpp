// Elementary; what counts as dark enough: almanac/evening_moment.hpp.
#include "sheet/show_moment.hpp"

#include <algorithm>
#include <optional>

namespace duskleaf {

ShowMoment show_moment(const BlockContext& c) {
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
        return zone.instant(m < std::chrono::hours(12) ? date + std::chrono::days(1) : date, m);
      };
      Ut at = instant(*session.from);
      const std::optional<Ut> dusk = c.year.nights[index].nautical_dusk;
      if (dusk && *dusk > at)
        at = session.to ? std::max(at, std::min(*dusk, instant(*session.to))) : *dusk;
      found = ShowMoment{date, at, true};
      break;  // its dates ascend
    }
  }
  return found ? *found : ShowMoment{c.evening().date, c.evening().moment, false};
}

}  // namespace duskleaf
