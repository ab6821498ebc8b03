// What is allowed and yet looks like a slip. The Sun's mean time at a longitude is longitude / 15
// hours from Greenwich's; civil clocks seldom stray three hours from it (common practice).
#include <algorithm>
#include <chrono>
#include <cmath>
#include <fmt/format.h>

#include "order/order.hpp"

namespace duskleaf {
namespace {

/// Hours between a zone's offset and the longitude's, the date line apart; the smaller of two
/// half-years, so that summer time alone raises no doubt.
double hours_apart(const Place& place, const Span& span) {
  const double by_longitude = place.observer.longitude.hours();
  double least = 24;
  for (const int month : {0, 6}) {
    const auto [year, number] = span.month(month);
    const double offset =
        static_cast<double>(place.zone.offset_at(ut_midnight(make_date(year, number, 1))).count()) /
        3600;
    least = std::min(least, std::abs(std::remainder(offset - by_longitude, 24.0)));
  }
  return least;
}

void doubt_place(const Site& site, const Span& span, std::vector<Doubt>& out) {
  const Observer& observer = site.place.observer;
  const double apart = hours_apart(site.place, span);
  if (apart > 3)
    out.push_back(
        {site.where,
         fmt::format("{}: the clock of {} is {:.1f} hours from the Sun's at this longitude; "
                     "is the longitude's sign right (east positive)?",
                     site.place.id, site.place.zone.name(), apart)});
  if (std::abs(observer.latitude.degrees()) < 0.01 && std::abs(observer.longitude.degrees()) < 0.01)
    out.push_back({site.where,
                   fmt::format("{}: latitude 0, longitude 0 is in the sea; is the place filled in?",
                               site.place.id)});
}

/// "9:30" for half past nine in the evening is a slip of those who read twelve hours.
bool by_day(std::chrono::minutes clock) {
  return clock >= std::chrono::hours(5) && clock < std::chrono::hours(14);
}
std::string by_day_text(const std::string& whose, std::chrono::minutes clock) {
  const auto minutes = clock.count();
  std::string text = fmt::format("{} {:02}:{:02} is by day", whose, minutes / 60, minutes % 60);
  if (clock < std::chrono::hours(12))
    text += fmt::format("; is {:02}:{:02} meant?", minutes / 60 + 12, minutes % 60);
  return text;
}

void doubt_hours(const Site& site, std::vector<Doubt>& out) {
  const auto& all = site.place.chart_hours;
  const auto hour = std::find_if(all.begin(), all.end(), [](const ChartHour& h) {
    return h.after_midnight && by_day(*h.after_midnight);
  });
  if (hour != all.end())
    out.push_back({site.where, by_day_text(site.place.id + ": chart_hour", *hour->after_midnight)});
  for (const Session& session : site.sessions)
    if (session.from && by_day(*session.from))
      out.push_back(
          {session.location, by_day_text(site.place.id + ": a session from", *session.from)});
}

void doubt_dates(const Site& site, const Span& span, std::vector<Doubt>& out) {
  for (const Session& session : site.sessions) {
    const auto* dates = std::get_if<std::vector<Date>>(&session.when);
    if (dates == nullptr) continue;
    const std::size_t inside = session_dates(session, span).size();
    if (inside < dates->size())
      out.push_back({session.location,
                     fmt::format("{}: {} of the session's {} dates fall outside the order's months",
                                 site.place.id, dates->size() - inside, dates->size())});
  }
  for (const OwnDate& date : site.dates)
    if (date.to < span.first_day() || date.from >= span.end_day())
      out.push_back({site.where, fmt::format("{}: '{}' ({}) falls outside the order's months",
                                             site.place.id, date.text, iso_date(date.from))});
}

}  // namespace

std::vector<Doubt> doubts(const Order& order) {
  std::vector<Doubt> list = order.noticed;
  for (const Site& site : order.sites) {
    doubt_place(site, order.span, list);
    doubt_hours(site, list);
    doubt_dates(site, order.span, list);
  }
  return list;
}

}  // namespace duskleaf
