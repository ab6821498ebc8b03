// A group's own nights: rules by weekday as clubs announce them ("first friday", "last saturday",
// "every friday"; common practice), or plain dates.
#include "order/sessions.hpp"

#include <algorithm>
#include <fmt/format.h>
#include <sstream>

#include "order/nearest_name.hpp"

namespace duskleaf {
namespace {

const std::vector<std::string_view> weekdays = {"sunday",   "monday", "tuesday", "wednesday",
                                                "thursday", "friday", "saturday"};
const std::vector<std::string_view> ordinals = {"every", "first",  "second",
                                                "third", "fourth", "last"};

Session::Rule read_rule(const YamlValue& value) {
  constexpr std::string_view expected =
      "expected 'first friday' to 'fourth friday', 'last friday', 'every friday', or a list of "
      "dates";
  std::string folded = value.text;
  std::transform(folded.begin(), folded.end(), folded.begin(),
                 [](char c) { return c >= 'A' && c <= 'Z' ? static_cast<char>(c + 32) : c; });
  std::istringstream words(folded);
  std::string ordinal, day, rest;
  words >> ordinal >> day;
  const auto nth = std::find(ordinals.begin(), ordinals.end(), ordinal);
  const auto weekday = std::find(weekdays.begin(), weekdays.end(), day);
  if (nth == ordinals.end() || weekday == weekdays.end() || words >> rest) {
    std::string near_nth = nearest_name(ordinal, ordinals), near_day = nearest_name(day, weekdays);
    const bool guess = !near_nth.empty() && !near_day.empty() && rest.empty();
    throw OrderError(
        value.at, fmt::format("when is {}", described(value)),
        std::string(expected) +
            (guess ? fmt::format(" (did you mean '{} {}'?)", near_nth, near_day) : ""));
  }
  const int index = static_cast<int>(nth - ordinals.begin());
  return {index == 5 ? -1 : index,
          std::chrono::weekday(static_cast<unsigned>(weekday - weekdays.begin()))};
}

std::variant<Session::Rule, std::vector<Date>> read_when(const YamlValue& value) {
  if (value.kind == YamlValue::Kind::scalar && !value.text.empty() && value.text[0] >= '0' &&
      value.text[0] <= '9')
    return std::vector<Date>{read_date(value, "when")};
  if (value.kind == YamlValue::Kind::scalar) return read_rule(value);
  std::vector<Date> dates;
  for (const YamlValue& item : read_list(value, "when"))
    dates.push_back(read_date(item, "a date of when"));
  std::sort(dates.begin(), dates.end());
  dates.erase(std::unique(dates.begin(), dates.end()), dates.end());
  return dates;
}

/// The rule's date in a month; the nth weekday counts from the month's first day, -1 from its last.
void add_rule_dates(const Session::Rule& rule, int year, int month, std::vector<Date>& out) {
  const int days = days_in_month(year, month);
  std::vector<Date> all;
  for (int day = 1; day <= days; ++day)
    if (const Date date = make_date(year, month, day); weekday_of(date) == rule.weekday)
      all.push_back(date);
  if (rule.nth == 0)
    out.insert(out.end(), all.begin(), all.end());
  else
    out.push_back(rule.nth < 0 ? all.back() : all[static_cast<std::size_t>(rule.nth - 1)]);
}

}  // namespace

std::vector<Session> read_sessions(const YamlValue& value) {
  std::vector<Session> sessions;
  for (const YamlValue& item : read_list(value, "sessions")) {
    const MapReader map(item, "a session", {"when", "from", "to", "where", "aim", "text"});
    Session session;
    session.location = item.at;
    session.when = read_when(map.require("when"));
    if (const YamlValue* from = map.find("from")) session.from = read_clock(*from, "from");
    if (const YamlValue* to = map.find("to")) session.to = read_clock(*to, "to");
    if (session.to && !session.from)
      throw OrderError(map.where("to"), "a session has 'to' but no 'from'",
                       "give both, or 'from' alone");
    if (const YamlValue* where = map.find("where")) session.where = read_text(*where, "where");
    if (const YamlValue* text = map.find("text")) session.text = read_text(*text, "text");
    if (const YamlValue* aim = map.find("aim"))
      session.aim = static_cast<Aim>(read_choice(*aim, "aim", {"any", "dark", "moon"}));
    sessions.push_back(std::move(session));
  }
  return sessions;
}

std::vector<OwnDate> read_own_dates(const YamlValue& value) {
  std::vector<OwnDate> dates;
  for (const YamlValue& item : read_list(value, "dates")) {
    const MapReader map(item, "a date", {"on", "from", "to", "text"});
    OwnDate date;
    if (const YamlValue* on = map.find("on")) {
      if (map.find("from") != nullptr || map.find("to") != nullptr)
        throw OrderError(item.at, "a date has 'on' beside 'from' or 'to'",
                         "give one day, or both ends");
      date.from = date.to = read_date(*on, "on");
    } else if (map.find("from") == nullptr) {
      throw OrderError(item.at, "a date has neither 'on' nor 'from' and 'to'",
                       "one of them is needed");
    } else {
      date.from = read_date(map.require("from"), "from");
      date.to = read_date(map.require("to"), "to");
      if (date.to < date.from)
        throw OrderError(map.require("to").at, "'to' is before 'from'",
                         "the last day was expected");
    }
    date.text = read_text(map.require("text"), "text");
    dates.push_back(std::move(date));
  }
  return dates;
}

std::vector<Date> session_dates(const Session& session, const Span& span) {
  std::vector<Date> dates;
  if (const auto* list = std::get_if<std::vector<Date>>(&session.when)) {
    for (const Date date : *list)
      if (date >= span.first_day() && date < span.end_day()) dates.push_back(date);
    return dates;
  }
  for (int i = 0; i < 12; ++i) {
    const auto [year, month] = span.month(i);
    add_rule_dates(std::get<Session::Rule>(session.when), year, month, dates);
  }
  return dates;
}

}  // namespace duskleaf
