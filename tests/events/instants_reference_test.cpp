// Sun, Moon and Earth against reference/instants_de431.csv and reference/global_instants_de431.csv,
// which hold complete lists made by tests/reference/make with an outside library on DE431-based
// files: every instant there must be found in time, and none besides.
#include <algorithm>
#include <cmath>
#include <fstream>
#include <gtest/gtest.h>
#include <iostream>
#include <map>
#include <sstream>
#include <string>
#include <vector>

#include "base/civil.hpp"
#include "base/csv.hpp"
#include "events/events.hpp"

namespace duskleaf {
namespace {

constexpr double day_s = 86400.0;

std::string read_table(const std::string& name) {
  std::ifstream in(std::string(DUSKLEAF_REFERENCE) + "/" + name);
  std::ostringstream text;
  text << in.rdbuf();
  return text.str();
}

int digits(std::string_view text, std::size_t at, std::size_t count) {
  return static_cast<int>(parse_number(text.substr(at, count)));
}
/// "2027-03-20" as its first instant.
Ut day_of_text(std::string_view text) {
  return ut_midnight(make_date(digits(text, 0, 4), digits(text, 5, 2), digits(text, 8, 2)));
}
/// "20:24:41.31" as a part of the day.
Days clock_of_text(std::string_view text) {
  return Days(digits(text, 0, 2) / 24.0 + digits(text, 3, 2) / 1440.0 +
              parse_number(text.substr(6)) / day_s);
}

double seconds_between(Ut a, Ut b) { return Seconds(a - b).count(); }

/// The tables of one calendar year, and two days on either side.
const YearEphemeris& ephemeris_of(int year) {
  static std::map<int, std::unique_ptr<YearEphemeris>> years;
  auto& made = years[year];
  if (!made)
    made = std::make_unique<YearEphemeris>(to_tt(ut_midnight(make_date(year, 1, 1)) - Days(3)),
                                           to_tt(ut_midnight(make_date(year + 1, 1, 1)) + Days(3)));
  return *made;
}

/// Largest differences by kind of event, printed at the end.
class Differences {
 public:
  void note(EventKind kind, double amount, const std::string& where) {
    Entry& e = entries_[event_name(kind)];
    ++e.count;
    if (std::abs(amount) >= std::abs(e.worst)) e.worst = amount, e.where = where;
  }
  void print(const std::string& title) const {
    std::cout << title << '\n';
    for (const auto& [name, e] : entries_)
      std::cout << "  " << name << ": " << e.count << ", largest " << e.worst << " at " << e.where
                << '\n';
  }
  int count() const {
    int sum = 0;
    for (const auto& [name, e] : entries_) sum += e.count;
    return sum;
  }

 private:
  struct Entry {
    int count = 0;
    double worst = 0;
    std::string where;
  };
  std::map<std::string, Entry> entries_;
};

struct Expected {
  EventKind kind;
  Ut at;
  double slack_s;      // how far it may be off
  bool graze;          // slack is that of an altitude within 0.01 degree
  bool may_be_absent;  // the body turns within 0.01 degree of the level
};
struct SiteDay {
  std::string label;
  int year;
  Observer observer;
  Ut from;
  std::vector<Expected> expected;
  std::vector<std::pair<std::string, Ut>> near_misses;  // level, time of the turn
};

constexpr double ordinary_slack_s = 1.0;
constexpr EventKind day_kinds[] = {EventKind::sunrise,           EventKind::sunset,
                                   EventKind::civil_dawn,        EventKind::civil_dusk,
                                   EventKind::nautical_dawn,     EventKind::nautical_dusk,
                                   EventKind::astronomical_dawn, EventKind::astronomical_dusk,
                                   EventKind::sun_transit,       EventKind::moonrise,
                                   EventKind::moonset,           EventKind::moon_transit};

std::vector<std::string_view> words(std::string_view cell) {
  std::vector<std::string_view> list;
  while (!cell.empty()) {
    const std::size_t end = std::min(cell.find(' '), cell.size());
    list.push_back(cell.substr(0, end));
    cell.remove_prefix(std::min(end + 1, cell.size()));
  }
  return list;
}

std::vector<SiteDay> read_site_days() {
  const std::string text = read_table("instants_de431.csv");
  const CsvTable table(text);
  std::vector<SiteDay> days;
  for (std::size_t r = 0; r < table.rows(); ++r) {
    const std::string_view date = table.cell(r, table.column("date"));
    SiteDay day{std::string(table.cell(r, table.column("site"))) + " " + std::string(date),
                digits(date, 0, 4),
                {Angle::from_degrees(table.number(r, table.column("latitude"))),
                 Angle::from_degrees(table.number(r, table.column("longitude")))},
                day_of_text(date),
                {},
                {}};
    for (const EventKind kind : day_kinds)
      for (const std::string_view word : words(table.cell(r, table.column(event_name(kind))))) {
        const std::size_t mark = word.find('~');
        Expected e{kind, day.from + clock_of_text(word.substr(0, mark)), ordinary_slack_s, false,
                   false};
        if (mark != std::string_view::npos) {
          e.graze = true;
          e.may_be_absent = word.back() == '?';
          e.slack_s = parse_number(word.substr(mark + 1, word.size() - mark - 1 - e.may_be_absent));
        }
        day.expected.push_back(e);
      }
    for (const std::string_view word : words(table.cell(r, table.column("near_misses")))) {
      const std::size_t at = word.find('@');
      day.near_misses.emplace_back(word.substr(0, at),
                                   day.from + clock_of_text(word.substr(at + 1)));
    }
    days.push_back(std::move(day));
  }
  return days;
}

/// The name that near_misses gives the level of an event.
std::string level_of(EventKind kind) {
  switch (kind) {
    case EventKind::sunrise:
    case EventKind::sunset:
      return "sun";
    case EventKind::moonrise:
    case EventKind::moonset:
      return "moon";
    default: {
      const std::string name = event_name(kind);
      return name.substr(0, name.find('-'));
    }
  }
}

bool near_miss_allows(const SiteDay& day, const Event& e) {
  constexpr double pair_s = 900.0;  // 0.01 degree is left again within this at any latitude here
  return std::any_of(day.near_misses.begin(), day.near_misses.end(), [&](const auto& miss) {
    return miss.first == level_of(e.kind) && std::abs(seconds_between(e.at, miss.second)) < pair_s;
  });
}

/// Compares a day's complete list; `found` may reach beyond the day.
void compare(const SiteDay& day, const std::vector<Event>& found, Differences& differences,
             Differences& grazes) {
  std::vector<const Event*> left;
  for (const Event& e : found)
    if (std::find(std::begin(day_kinds), std::end(day_kinds), e.kind) != std::end(day_kinds))
      left.push_back(&e);
  for (const Expected& wanted : day.expected) {
    const auto nearest =
        std::min_element(left.begin(), left.end(), [&](const Event* a, const Event* b) {
          const auto distance = [&](const Event* e) {
            return e->kind == wanted.kind ? std::abs(seconds_between(e->at, wanted.at)) : 1e9;
          };
          return distance(a) < distance(b);
        });
    const bool there = nearest != left.end() && (*nearest)->kind == wanted.kind &&
                       std::abs(seconds_between((*nearest)->at, wanted.at)) < 3600.0;
    if (!there) {
      EXPECT_TRUE(wanted.may_be_absent) << day.label << ": missing " << event_name(wanted.kind);
      continue;
    }
    const double off = seconds_between((*nearest)->at, wanted.at);
    EXPECT_LE(std::abs(off), wanted.slack_s)
        << day.label << ": " << event_name(wanted.kind) << (wanted.graze ? ", a graze" : "");
    (wanted.graze ? grazes : differences).note(wanted.kind, off, day.label);
    left.erase(nearest);
  }
  for (const Event* e : left) {
    const double after = seconds_between(e->at, day.from);
    // An instant at the very edge of the day may fall to the other side of it.
    if (after < ordinary_slack_s || after > day_s - ordinary_slack_s) continue;
    EXPECT_TRUE(near_miss_allows(day, *e)) << day.label << ": one too many, " << event_name(e->kind)
                                           << " " << after << " s into the day";
  }
}

constexpr int fewest_instants = 14000;  // the table holds more: a truncated one must not pass

TEST(InstantsReference, YearAtASiteHoldsEachSampledDay) {
  Differences differences, grazes;
  std::map<std::string, std::vector<Event>> years;
  for (const SiteDay& day : read_site_days()) {
    std::vector<Event>& events =
        years[day.label.substr(0, day.label.find('-', day.label.find(' ')))];
    if (events.empty())
      events = site_events(ephemeris_of(day.year), day.observer,
                           ut_midnight(make_date(day.year, 1, 1)) - Days(1),
                           ut_midnight(make_date(day.year + 1, 1, 1)) + Days(1));
    const auto first = std::lower_bound(events.begin(), events.end(), day.from - Days(0.01),
                                        [](const Event& e, Ut t) { return e.at < t; });
    const auto last = std::lower_bound(first, events.end(), day.from + Days(1.01),
                                       [](const Event& e, Ut t) { return e.at < t; });
    compare(day, {first, last}, differences, grazes);
  }
  differences.print("Instants, whole years: seconds from the reference");
  grazes.print("Grazes, whole years: seconds from the reference (each within 0.01 degree)");
  EXPECT_GE(differences.count() + grazes.count(), fewest_instants);
}

TEST(InstantsReference, DayAloneGivesTheSameList) {
  Differences differences, grazes;
  for (const SiteDay& day : read_site_days())
    compare(day,
            site_events(ephemeris_of(day.year), day.observer, day.from - Days(Seconds(2)),
                        day.from + Days(1) + Days(Seconds(2))),
            differences, grazes);
  differences.print("Instants, day by day: seconds from the reference");
  EXPECT_GE(differences.count() + grazes.count(), fewest_instants);
}

struct Global {
  std::string name;
  Ut at;
  std::string_view value;
};

double largest_difference_s(EventKind kind) {
  switch (kind) {
    case EventKind::perigee:
    case EventKind::apogee:
      return 60.0;
    case EventKind::perihelion:
    case EventKind::aphelion:
      return 240.0;
    default:
      return 1.0;
  }
}

TEST(InstantsReference, PhasesSeasonsApsides) {
  const std::string text = read_table("global_instants_de431.csv");
  const CsvTable table(text);
  std::map<int, std::vector<Global>> years;
  for (std::size_t r = 0; r < table.rows(); ++r) {
    const std::string_view utc = table.cell(r, table.column("utc"));
    years[digits(utc, 0, 4)].push_back({std::string(table.cell(r, table.column("event"))),
                                        day_of_text(utc) + clock_of_text(utc.substr(11, 11)),
                                        table.cell(r, table.column("value"))});
  }
  EXPECT_EQ(years.size(), 15U);
  Differences differences, values;
  for (const auto& [year, wanted] : years) {
    const std::vector<Event> found =
        global_events(ephemeris_of(year), ut_midnight(make_date(year, 1, 1)),
                      ut_midnight(make_date(year + 1, 1, 1)));
    ASSERT_EQ(found.size(), wanted.size()) << year;
    for (std::size_t i = 0; i < found.size(); ++i) {
      const std::string label = std::to_string(year) + " " + wanted[i].name;
      ASSERT_EQ(event_name(found[i].kind), wanted[i].name) << label;
      const double off = seconds_between(found[i].at, wanted[i].at);
      EXPECT_LE(std::abs(off), largest_difference_s(found[i].kind)) << label;
      differences.note(found[i].kind, off, label);
      ASSERT_EQ(found[i].value.has_value(), !wanted[i].value.empty()) << label;
      if (!found[i].value) continue;
      const double value_off = *found[i].value - parse_number(wanted[i].value);
      // The Moon's distance in km, the Earth's in au.
      EXPECT_LE(std::abs(value_off), found[i].body == Body::moon ? 0.2 : 5e-8) << label;
      values.note(found[i].kind, value_off, label);
    }
  }
  differences.print("Phases, seasons, apsides: seconds from the reference");
  values.print("Distances at the apsides: km, au from the reference");
}

}  // namespace
}  // namespace duskleaf
