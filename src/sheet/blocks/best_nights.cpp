#include "almanac/best_nights.hpp"

#include <algorithm>

#include "sheet/blocks/blocks.hpp"
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

std::string reason_text(const BlockContext& c, const NightReason& reason) {
  const std::string key = "best-nights.reason-" + reason.key;
  if (reason.at) return c.words(key, {{"time", c.words.time(c.year.place.zone.civil(*reason.at))}});
  if (!reason.number) return c.words(key);
  const double n = *reason.number;
  if (reason.key == "planets-visible" && n < 0.5) return {};
  if (reason.key == "planets-visible" && n < 1.5) return c.words("best-nights.reason-one-planet");
  return c.words(key, {{"n", c.words.number(reason.key == "darkest-limit" ? -n : n,
                                            reason.key == "dark-hours" ? 1 : 0)}});
}

}  // namespace

double draw_best_nights(const BlockContext& c, const BlockOptions&, const Box& area,
                        std::vector<Mark>& out) {
  const Choice choice = choose(c);
  const std::vector<NightRank> ranks =
      rank_nights(c.ephemeris, c.year, choice.nights, choice.window, choice.aim);
  if (ranks.empty()) return 0;
  Setter set(c, out);
  const std::string aim_key[] = {"best-nights.aim-any", "best-nights.aim-dark",
                                 "best-nights.aim-moon"};
  std::string aside = c.words(aim_key[static_cast<std::size_t>(choice.aim)]);
  if (choice.window)
    aside = c.words("best-nights.aside-window", {{"aim", aside},
                                                 {"from", c.words.time_of_day(choice.window->from)},
                                                 {"to", c.words.time_of_day(choice.window->to)}});
  double y = area.y + set.heading(area.x, area.y, area.width, choice.title, aside);
  const Style body = set.body();
  if (std::none_of(ranks.begin(), ranks.end(),
                   [](const NightRank& r) { return r.dark_minutes > 0 || r.moon_minutes > 0; }))
    return y + set.paragraph(area.x, y, area.width, c.words("best-nights.none"), body) - area.y;
  const std::size_t shown = std::min<std::size_t>(ranks.size(), 3);
  for (std::size_t i = 0; i < shown; ++i) {
    const NightRank& night = ranks[i];
    std::string reasons;
    for (const NightReason& reason : night.reasons) {
      if (reason.key == "darkest-limit" && night.dark_minutes <= 0)
        continue;  // says what "dark" meant: nothing was
      const std::string text = reason_text(c, reason);
      if (!text.empty()) reasons += (reasons.empty() ? "" : ", ") + text;
    }
    const std::string date =
        c.words("date.weekday-day", {{"weekday", c.words.weekday_short(weekday_of(night.date))},
                                     {"day", std::to_string(day_of(night.date))}});
    set.left(area.x, y + body.size_pt * mm_per_pt * 0.95, date, set.strong(body));
    y += set.paragraph(area.x + 14.5, y, area.width - 14.5, reasons, body);
  }
  return y - area.y + 0.8;
}

}  // namespace duskleaf
