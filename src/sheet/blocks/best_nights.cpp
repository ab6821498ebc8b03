#include "almanac/best_nights.hpp"

#include <algorithm>

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

std::string reason_text(const BlockContext& c, const NightRank& night, const NightReason& reason) {
  if (reason.key == "darkest-limit") return {};  // said once, beside the title
  if (reason.happening) return happening_text(c, reason);
  if (reason.key == "planets-visible") return planet_names(c, night.planets);
  const std::string key = "best-nights.reason-" + reason.key;
  if (reason.key == "dark-hours")
    return c.words(key, {{"n", c.words.duration(night.dark_rounded)}});
  if (reason.at) return c.words(key, {{"time", c.words.time(c.year.place.zone.civil(*reason.at))}});
  if (!reason.number) return c.words(key);
  return c.words(key, {{"n", c.words.number(*reason.number, 0)}});
}

std::string aside(const BlockContext& c, const Choice& choice, Angle dark_limit) {
  const std::string aim_key[] = {"best-nights.aim-any", "best-nights.aim-dark",
                                 "best-nights.aim-moon"};
  std::string text = c.words(aim_key[static_cast<std::size_t>(choice.aim)]);
  if (dark_limit.degrees() > -15)
    text = c.words("best-nights.dark-limit",
                   {{"aim", text}, {"n", c.words.number(-dark_limit.degrees(), 0)}});
  if (choice.window)
    text = c.words("best-nights.aside-window", {{"aim", text},
                                                {"from", c.words.time_of_day(choice.window->from)},
                                                {"to", c.words.time_of_day(choice.window->to)}});
  return text;
}

}  // namespace

double draw_best_nights(const BlockContext& c, const BlockOptions&, const Box& area,
                        std::vector<Mark>& out) {
  const Choice choice = choose(c);
  std::vector<NightRank> ranks =
      rank_nights(c.ephemeris, c.year, choice.nights, choice.window, choice.aim, &c.happenings);
  if (ranks.empty()) return 0;
  Setter set(c, out);
  double y = area.y + set.heading(area.x, area.y, area.width, choice.title,
                                  aside(c, choice, ranks.front().dark_limit));
  const Style body = set.body(), narrow{Face::condensed, body.size_pt, body.ink};
  const auto dark = [](const NightRank& r) { return r.dark_minutes >= 1; };
  if (std::none_of(ranks.begin(), ranks.end(),
                   [&](const NightRank& r) { return dark(r) || r.moon_minutes > 0; }))
    return y + set.paragraph(area.x, y, area.width, c.words("best-nights.none"), body) - area.y;
  // Where darkness is asked for, a night without it is no good night; where none has any, the least
  // bright one is named.
  if (choice.aim != Aim::moon) {
    if (std::any_of(ranks.begin(), ranks.end(), dark)) {
      std::erase_if(ranks, [&](const NightRank& r) { return !dark(r); });
    } else {
      y += set.paragraph(area.x, y, area.width, c.words("best-nights.none-dark"), body);
      ranks.resize(1);
    }
  }
  const std::size_t shown = std::min<std::size_t>(ranks.size(), 3);
  for (std::size_t i = 0; i < shown; ++i) {
    const NightRank& night = ranks[i];
    std::string reasons;
    for (const NightReason& reason : night.reasons) {
      const std::string text = reason_text(c, night, reason);
      if (!text.empty()) reasons += (reasons.empty() ? "" : ", ") + text;
    }
    const std::string date =
        c.words("date.weekday-day", {{"weekday", c.words.weekday_short(weekday_of(night.date))},
                                     {"day", std::to_string(day_of(night.date))}});
    set.left(area.x, y + body.size_pt * mm_per_pt * 0.95, date, set.strong(body));
    y += set.paragraph(area.x + 14.5, y, area.width - 14.5, reasons, narrow);
  }
  return y - area.y + 0.8;
}

}  // namespace duskleaf
