// Civil dates by rounded minute: an instant at 23:59:40 prints as 00:00 and so belongs to the next
// date (header).
#include "almanac/civil_days.hpp"

#include <chrono>

#include "almanac/nights.hpp"

namespace duskleaf {

std::vector<CivilDay> make_civil_days(const Zone& zone, const std::vector<Event>& events,
                                      Date first, Date end) {
  std::vector<CivilDay> days;
  for (Date date = first; date < end; date += std::chrono::days(1))
    days.push_back({date, is_skipped(zone, date), {}});
  for (const Event& event : events) {
    const Date date = zone.civil(event.at).date();
    if (date >= first && date < end)
      days[static_cast<std::size_t>((date - first).count())].events.push_back(event);
  }
  return days;
}

std::vector<Event> clock_change_events(const std::vector<ClockChange>& changes) {
  std::vector<Event> events;
  for (const ClockChange& c : changes)
    events.push_back({EventKind::clock_change, Body::sun, c.at,
                      static_cast<double>((c.after - c.before).count()) / 3600.0});
  return events;
}

}  // namespace duskleaf
