#include <algorithm>

#include "almanac/nights.hpp"
#include "sheet/blocks/blocks.hpp"
#include "sheet/setting.hpp"

namespace duskleaf {
namespace {

/// "Fri 5 March", or "Fri 5, 12, 19 March" where all are the same weekday.
std::string dates_text(const BlockContext& c, const std::vector<Date>& dates) {
  const bool one_weekday = std::all_of(dates.begin(), dates.end(), [&](Date d) {
    return weekday_of(d) == weekday_of(dates.front());
  });
  std::string text;
  for (std::size_t i = 0; i < dates.size(); ++i) {
    const std::string day =
        i + 1 == dates.size() ? c.words.day_month(dates[i]) : std::to_string(day_of(dates[i]));
    const std::string weekday = c.words.weekday_short(weekday_of(dates[i]));
    text += (i == 0 ? "" : ", ") +
            (one_weekday && i > 0
                 ? day
                 : c.words("date.weekday-day-month", {{"weekday", weekday}, {"date", day}}));
  }
  return text;
}

/// "(the Sun sets at 21:17)" where a session begins before the first date's sunset; with a word of
/// the stars where it ends before the Sun is 6 degrees down.
std::string daylight(const BlockContext& c, const Session& session,
                     const std::vector<Date>& dates) {
  if (!session.from || *session.from < std::chrono::hours(12)) return {};
  for (const Night& night : c.year.nights)
    if (night.date == dates.front() && night.sun == Presence::up_throughout)
      return c.words("sessions.sun-up");
  const auto sunset = sunset_after(c.year, dates.front(), *session.from);
  if (!sunset) return {};
  const auto night = std::find_if(c.year.nights.begin(), c.year.nights.end(),
                                  [&](const Night& n) { return n.date == dates.front(); });
  bool stars = true;
  if (session.to && night != c.year.nights.end()) {
    const bool next_day = *session.to < *session.from;
    const Ut ends =
        c.year.place.zone.instant(dates.front() + std::chrono::days(next_day ? 1 : 0), *session.to);
    stars = night->civil_dusk && *night->civil_dusk < ends;
  }
  return c.words(stars ? "sessions.sunset" : "sessions.no-stars",
                 {{"time", c.words.time(c.year.place.zone.civil(*sunset))}});
}

}  // namespace

// The group's own evenings of the month, when and where, and its own words.
double draw_sessions(const BlockContext& c, const BlockOptions&, const Box& area,
                     std::vector<Mark>& out) {
  const auto [year, month] = c.year.span.month(c.month_index);
  struct Entry {
    Date date;
    const Session* session;
  };
  std::vector<Entry> entries;
  for (const Session& session : c.site.sessions)
    for (Date date : session_dates(session, c.year.span))
      if (year_of(date) == year && month_of(date) == month) entries.push_back({date, &session});
  std::stable_sort(entries.begin(), entries.end(),
                   [](const Entry& a, const Entry& b) { return a.date < b.date; });
  const auto note = c.site.notes.find(month);
  if (entries.empty() && note == c.site.notes.end()) return 0;

  Setter set(c, out);
  const std::string& group = c.site.masthead.group;
  double y =
      area.y + set.heading(area.x, area.y, area.width,
                           c.words(entries.empty() ? "sessions.words-title" : "sessions.title"),
                           entries.empty() ? group : std::string());
  const Style body = set.body();
  // Sessions of one rule share their place and words: name these once, with all dates.
  std::vector<const Session*> seen;
  for (const Entry& entry : entries) {
    if (std::find(seen.begin(), seen.end(), entry.session) != seen.end()) continue;
    seen.push_back(entry.session);
    std::vector<Date> dates;
    for (const Entry& other : entries)
      if (other.session == entry.session)
        // Hours up to noon are of the morning after: they are announced by its date.
        dates.push_back(entry.session->from && *entry.session->from <= std::chrono::hours(12)
                            ? other.date + std::chrono::days(1)
                            : other.date);
    std::string rest;
    const Session& s = *entry.session;
    if (s.from && s.to)
      rest = c.words("sessions.from-to",
                     {{"from", c.words.time_of_day(*s.from)}, {"to", c.words.time_of_day(*s.to)}});
    else if (s.from)
      rest = c.words("sessions.from", {{"from", c.words.time_of_day(*s.from)}});
    if (const std::string light = daylight(c, s, dates); !light.empty()) rest += " " + light;
    if (!s.where.empty()) rest += (rest.empty() ? "" : ", ") + s.where;
    if (!rest.empty()) rest += ". ";
    if (!s.text.empty()) rest += s.text;
    y += set.lead_in(area.x, y, area.width, dates_text(c, dates), rest, body) + 0.5;
  }
  if (note != c.site.notes.end())
    y += set.paragraph(area.x, y, area.width, note->second, body) + 0.5;
  return y - area.y;
}

}  // namespace duskleaf
