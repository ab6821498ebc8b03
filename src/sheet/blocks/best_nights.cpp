#include "almanac/best_nights.hpp"

#include <algorithm>
#include <array>

#include "almanac/time_spans.hpp"
#include "catalogue/showers.hpp"
#include "sheet/blocks/blocks.hpp"
#include "sheet/happening_writer.hpp"
#include "sheet/setting.hpp"

namespace duskleaf {
namespace {

/// Which nights are ranked, and under which title.
struct Choice {
  std::vector<Date> nights;
  std::optional<ClockWindow> window;
  Aim aim = Aim::any;
  std::string title;
  bool of_month = false;  // every night
};

std::vector<Date> dates_of_month(const BlockContext& c) {
  const auto [year, month] = c.year.span.month(c.month_index);
  std::vector<Date> dates;
  for (int day = 1; day <= days_in_month(year, month); ++day)
    dates.push_back(make_date(year, month, day));
  return dates;
}

/// The group's weekday where a session has one, else every night of the month.
Choice choose(const BlockContext& c) {
  Choice choice;
  for (const Session& session : c.site.sessions) {
    const auto* rule = std::get_if<Session::Rule>(&session.when);
    if (rule == nullptr) continue;
    for (Date date : dates_of_month(c))
      if (weekday_of(date) == rule->weekday) choice.nights.push_back(date);
    if (session.from && session.to) choice.window = ClockWindow{*session.from, *session.to};
    choice.aim = session.aim;
    choice.title =
        c.words("best-nights.title-weekday", {{"weekday", c.words.weekday_name(rule->weekday)}});
    return choice;
  }
  choice.nights = dates_of_month(c);
  choice.of_month = true;
  choice.title = c.words("best-nights.title");
  return choice;
}

/// What happens in a night, in a few words: the list of happenings tells it whole.
std::string happening_text(const BlockContext& c, const NightReason& reason) {
  const SiteHappenings& site = c.happenings;
  const HappeningWriter writer(c);
  const std::string key =
      "best-nights.happens-" + std::string(night_happening_name(*reason.happening));
  const auto name = [&](int target) {
    return writer.target(targets()[static_cast<std::size_t>(target)]);
  };
  switch (*reason.happening) {
    case NightHappening::lunar_eclipse:
      return c.words(key);
    case NightHappening::shower:
      return c.words(
          key,
          {{"name",
            std::string(
                showers()[static_cast<std::size_t>(site.showers[reason.index].shower)].name)}});
    case NightHappening::meeting: {
      const Approach& closest = site.meetings[reason.index].closest;
      return c.words(key, {{"a", name(closest.a)}, {"b", name(closest.b)}});
    }
    case NightHappening::occultation:
      return c.words(key, {{"name", name(site.occultations[reason.index].target)}});
  }
  return {};
}

std::string planet_names(const BlockContext& c, const std::vector<Body>& planets) {
  std::string names;
  for (Body planet : planets)
    names += (names.empty() ? "" : ", ") + c.words("body." + std::string(body_name(planet)));
  return names;
}

const NightReason* find(const NightRank& night, std::string_view key) {
  const auto at = std::find_if(night.reasons.begin(), night.reasons.end(),
                               [&](const NightReason& r) { return r.key == key; });
  return at == night.reasons.end() ? nullptr : &*at;
}

double window_minutes(const BlockContext& c, const Choice& choice, const NightRank& night) {
  if (!choice.window) return 1e9;
  const TimeSpan span = window_span(c.year.place.zone, night.date, *choice.window);
  return (span.to - span.from).count() * 1440.0;
}

/// "7 h 36 of dark", and where the month has no night at -18 degrees nothing is called dark.
std::string dark_text(const BlockContext& c, const Choice& choice, const NightRank& night) {
  if (night.dark_rounded == 0) return c.words("best-nights.not-dark");
  const bool throughout = night.dark_rounded >= window_minutes(c, choice, night) - 1;
  std::string key = find(night, "darkest-limit") ? "best-nights.darkest" : "best-nights.dark";
  key += throughout ? "-throughout" : "-hours";
  return c.words(key, {{"n", c.words.duration(night.dark_rounded)}});
}

std::string moon_text(const BlockContext& c, const NightRank& night) {
  if (find(night, "moon-down")) return c.words("best-nights.no-moon");
  std::string text = c.words("best-nights.moon", {{"n", c.words.number(100 * night.moon_lit, 0)}});
  if (find(night, "moon-up")) return c.words("best-nights.moon-up", {{"moon", text}});
  for (const NightReason& r : night.reasons) {
    if (r.key != "moon-rises-at" && r.key != "moon-sets-at") continue;
    text = c.words(r.key == "moon-rises-at" ? "best-nights.moon-rises" : "best-nights.moon-sets",
                   {{"moon", text}, {"time", c.words.time(c.year.place.zone.civil(*r.at))}});
  }
  return text;
}

/// "7 h 36 of dark, no Moon; Mars, Jupiter; Perseids".
std::string night_text(const BlockContext& c, const Choice& choice, const NightRank& night) {
  std::string text = c.words(
      "best-nights.sky", {{"dark", dark_text(c, choice, night)}, {"moon", moon_text(c, night)}});
  std::string happens;
  for (const NightReason& r : night.reasons)
    if (r.happening) happens += (happens.empty() ? "" : ", ") + happening_text(c, r);
  for (const std::string& then : {planet_names(c, night.planets), happens})
    if (!then.empty()) text = c.words("best-nights.and", {{"first", text}, {"then", then}});
  return text;
}

/// "19:30-21:30", "8:30-10:30 pm".
std::string window_text(const BlockContext& c, const ClockWindow& window) {
  std::string from = c.words.time_of_day(window.from);
  const std::string to = c.words.time_of_day(window.to);
  // What stands after a no-break space is said once.
  const std::string_view space = "\u00A0";
  const std::size_t cut = from.rfind(space), other = to.rfind(space);
  if (cut != std::string::npos && other != std::string::npos &&
      from.substr(cut) == to.substr(other))
    from.erase(cut);
  return c.words("best-nights.window", {{"from", from}, {"to", to}});
}

std::string aside(const BlockContext& c, const Choice& choice, Angle dark_limit, bool brief) {
  const bool darkest = dark_limit.degrees() > -15 && choice.aim != Aim::moon;
  constexpr std::array<std::string_view, 3> aims = {"any", "dark", "moon"};
  std::string key = darkest ? "best-nights.darkest-" : "best-nights.aim-";
  key += aims[static_cast<std::size_t>(choice.aim)];
  if (brief) key += "-brief";
  std::string text = c.words(key, {{"n", c.words.number(-dark_limit.degrees(), 0)}});
  if (!choice.window) return text;
  return c.words("best-nights.aside-window",
                 {{"window", window_text(c, *choice.window)}, {"aim", text}});
}

/// Whether the Sun, not the Moon, keeps the hours of all these nights from being dark.
bool too_bright(const BlockContext& c, const Choice& choice) {
  const auto& nights = c.year.nights;
  const SiteSky sky(c.ephemeris, c.year.place.observer, nights.front().from, nights.back().to);
  return std::all_of(choice.nights.begin(), choice.nights.end(), [&](Date date) {
    const Night& night = nights[static_cast<std::size_t>((date - nights.front().date).count())];
    const TimeSpan span = window_span(c.year.place.zone, date, *choice.window);
    const bool holds_darkest = span.from < night.darkest && night.darkest < span.to;
    const Ut middle = holds_darkest ? night.darkest : span.from + (span.to - span.from) / 2;
    return !(span.from < span.to) ||
           std::min({sky.altitude(Body::sun, span.from), sky.altitude(Body::sun, middle),
                     sky.altitude(Body::sun, span.to)}) > night.dark_limit;
  });
}

/// "Too bright at 19:00-21:00 all month. Darkest: Thu 1, 22:26-03:05."
std::string none_dark_text(const BlockContext& c, const Choice& choice) {
  std::string text =
      c.words(too_bright(c, choice) ? "best-nights.too-bright" : "best-nights.never-dark",
              {{"window", window_text(c, *choice.window)}});
  const std::vector<NightRank> ranks =
      rank_nights(c.ephemeris, c.year, choice.nights, {}, Aim::dark, &c.happenings);
  if (ranks.empty() || ranks.front().dark_rounded == 0) return text;
  const Date date = ranks.front().date;
  const auto& spans =
      c.year.nights[static_cast<std::size_t>((date - c.year.nights.front().date).count())]
          .dark_or_darkest;
  const TimeSpan& longest = *std::max_element(
      spans.begin(), spans.end(),
      [](const TimeSpan& a, const TimeSpan& b) { return a.to - a.from < b.to - b.from; });
  const auto time = [&](Ut t) { return c.words.time(c.year.place.zone.civil(t)); };
  return text + " " +
         c.words("best-nights.darkest-night", {{"weekday", c.words.weekday_short(weekday_of(date))},
                                               {"day", std::to_string(day_of(date))},
                                               {"from", time(longest.from)},
                                               {"to", time(longest.to)}});
}

bool at_weekend(const NightRank& night) {
  const std::chrono::weekday day = weekday_of(night.date);
  return day == std::chrono::Friday || day == std::chrono::Saturday;
}

/// Title and aside: a brief one where the whole has no room, else below the title.
double titled(const BlockContext& c, const Choice& choice, Angle dark_limit, const Box& area,
              std::vector<Mark>& out) {
  Setter set(c, out);
  const std::size_t before = out.size();
  double used = set.heading(area.x, area.y, area.width, choice.title);
  const std::size_t without = out.size();
  for (const bool brief : {false, true}) {
    out.resize(before, Mark{});
    used =
        set.heading(area.x, area.y, area.width, choice.title, aside(c, choice, dark_limit, brief));
    if (out.size() > without) return used;
  }
  return used + set.paragraph(area.x, area.y + used, area.width,
                              aside(c, choice, dark_limit, false), set.small(), 1.2);
}

}  // namespace

double draw_best_nights(const BlockContext& c, const BlockOptions&, const Box& area,
                        std::vector<Mark>& out) {
  const Choice choice = choose(c);
  std::vector<NightRank> ranks =
      rank_nights(c.ephemeris, c.year, choice.nights, choice.window, choice.aim, &c.happenings);
  if (ranks.empty()) return 0;
  Setter set(c, out);
  const Style body = set.body(), narrow{Face::condensed, body.size_pt, body.ink};
  const auto dark = [](const NightRank& r) { return r.dark_minutes >= 1; };
  const bool any_dark = std::any_of(ranks.begin(), ranks.end(), dark);
  const bool in_window = choice.window && choice.aim != Aim::moon;
  if (!any_dark && (in_window || std::none_of(ranks.begin(), ranks.end(), [](const NightRank& r) {
                      return r.moon_minutes > 0;
                    }))) {
    const double y = area.y + set.heading(area.x, area.y, area.width, choice.title);
    const std::string text = in_window ? none_dark_text(c, choice) : c.words("best-nights.none");
    return y + set.paragraph(area.x, y, area.width, text, body) - area.y + 0.8;
  }
  double y = area.y + titled(c, choice, ranks.front().dark_limit, area, out);
  // Where darkness is asked for, a night without it is no good night; where none has any, the least
  // bright one is named.
  if (choice.aim != Aim::moon) {
    if (any_dark) {
      std::erase_if(ranks, [&](const NightRank& r) { return !dark(r); });
    } else {
      y += set.paragraph(area.x, y, area.width, c.words("best-nights.none-dark"), body);
      ranks.resize(1);
    }
  }
  const auto row = [&](const NightRank& night, const std::string& text) {
    const std::string date =
        c.words("date.weekday-day", {{"weekday", c.words.weekday_short(weekday_of(night.date))},
                                     {"day", std::to_string(day_of(night.date))}});
    set.left(area.x, y + body.size_pt * mm_per_pt * 0.95, date, set.strong(body));
    y += set.paragraph(area.x + 14.5, y, area.width - 14.5, text, narrow);
  };
  const auto shown = ranks.begin() + std::min<std::ptrdiff_t>(std::ssize(ranks), 3);
  for (auto night = ranks.begin(); night != shown; ++night)
    row(*night, night_text(c, choice, *night));
  // Who has no evening of their own goes out when the next day is free.
  const auto free = std::find_if(ranks.begin(), ranks.end(), at_weekend);
  if (choice.of_month && free >= shown && free != ranks.end())
    row(*free, c.words("best-nights.at-weekend", {{"night", night_text(c, choice, *free)}}));
  return y - area.y + 0.8;
}

}  // namespace duskleaf
