// A planet's month in words and numbers, from samples of its nights: this project's own rule
// (header).
#include "almanac/planet_months.hpp"

#include <algorithm>
#include <chrono>
#include <cmath>

#include "almanac/planet_nights.hpp"
#include "almanac/planets.hpp"
#include "sky/planet_magnitude.hpp"

namespace duskleaf {
namespace {

bool in_evening(PlanetSight sight) {
  return sight != PlanetSight::not_visible && sight != PlanetSight::morning;
}
bool in_morning(PlanetSight sight) {
  return sight != PlanetSight::not_visible && sight != PlanetSight::evening;
}
bool in_any(PlanetSight sight) { return sight != PlanetSight::not_visible; }

struct DaySeen {
  double magnitude;
  PlanetSeen seen;
};

/// The day of the month (1 to its last) nearest to the 15th, the earlier of two, whose sight is
/// asked for; 0 where there is none.
int nearest_day(const std::vector<DaySeen>& days, bool (*asked)(PlanetSight)) {
  const auto is_asked = [&](int day) {
    return day >= 1 && day <= static_cast<int>(days.size()) &&
           asked(days[static_cast<std::size_t>(day - 1)].seen.sight);
  };
  for (int away = 0; away <= 16; ++away)
    for (int day : {15 - away, 15 + away})
      if (is_asked(day)) return day;
  return 0;
}

void note_dates(const std::vector<DaySeen>& days, Date first, PlanetMonth& row) {
  const std::size_t last = days.size();
  for (std::size_t i = 0; i < last; ++i) {
    const PlanetSight sight = days[i].seen.sight;
    const Date date = first + std::chrono::days(i);
    if (i == 0 || i == 10 || i == 20 || i + 1 == last) row.sights.emplace_back(date, sight);
    if (in_evening(sight)) {
      if (!row.first_evening) row.first_evening = date;
      row.last_evening = date;
    }
    if (in_morning(sight)) {
      if (!row.first_morning) row.first_morning = date;
      row.last_morning = date;
    }
  }
}

}  // namespace

HeightWord height_word(Angle apparent_altitude) {
  const double h = apparent_altitude.degrees();
  return h < 15.0   ? HeightWord::low
         : h < 30.0 ? HeightWord::fairly_low
         : h < 60.0 ? HeightWord::halfway
         : h < 75.0 ? HeightWord::high
                    : HeightWord::overhead;
}

std::chrono::minutes spoken_length(Days length) {
  const double minutes = length.count() * 24.0 * 60.0, step = minutes < 82.5 ? 15.0 : 30.0;
  return std::chrono::minutes(static_cast<int>(std::max(30.0, step * std::round(minutes / step))));
}

std::vector<PlanetMonth> planet_month(const YearEphemeris& ephemeris, const SiteYear& year,
                                      int index) {
  const auto [y, m] = year.span.month(index);
  const auto last = static_cast<std::size_t>(days_in_month(y, m));
  const Date first = make_date(y, m, 1);
  const auto first_night = static_cast<std::size_t>((first - year.span.first_day()).count());
  const SiteSky sky(ephemeris, year.place.observer, year.nights[first_night].from,
                    year.nights[first_night + last - 1].to);
  const double limit = year.place.limiting_magnitude;
  std::vector<PlanetNight> nights;
  nights.reserve(last);
  for (std::size_t i = 0; i < last; ++i)
    nights.emplace_back(sky, year, year.nights[first_night + i]);

  Angle darkest_sun = nights.front().night().darkest_sun_altitude;
  for (const PlanetNight& night : nights)
    darkest_sun = std::min(darkest_sun, night.night().darkest_sun_altitude);

  std::vector<PlanetMonth> rows;
  for (Body planet : planets) {
    PlanetMonth row{};
    row.planet = planet;
    row.darkest_sun = darkest_sun;
    std::vector<DaySeen> days;
    for (const PlanetNight& night : nights) {
      const double magnitude =
          planet_magnitude(planet, planet_aspect(ephemeris, planet, to_tt(night.night().darkest)));
      days.push_back({magnitude, see_planet(sky, night, planet, magnitude, false)});
    }
    const bool faint = planet == Body::uranus || planet == Body::neptune;
    if (faint && nearest_day(days, in_any) == 0) {
      row.optics_only = true;
      for (std::size_t i = 0; i < last; ++i)
        days[i].seen = see_planet(sky, nights[i], planet, days[i].magnitude, true);
    }
    note_dates(days, first, row);

    const int best_day = nearest_day(days, in_any);
    const auto best = static_cast<std::size_t>((best_day == 0 ? 15 : best_day) - 1);
    const Night& night = nights[best].night();
    row.best_date = night.date;
    row.sight = days[best].seen.sight;
    if (days[best].seen.best) row.best = nights[best].samples()[*days[best].seen.best].at;
    const Ut moment = row.best.value_or(night.darkest);
    const PlanetEvening p = planet_evening(sky, planet, moment, 0.0, {night.from, night.to});
    if (row.best) row.place = p.place;
    row.magnitude = p.magnitude;
    row.elongation = p.elongation;
    row.constellation = p.constellation;
    row.rises = p.rises;
    row.highest = p.highest;
    row.sets = p.sets;
    row.disc = planet_disc(ephemeris, planet, to_tt(moment));

    const auto window =
        [&](bool (*asked)(PlanetSight),
            std::optional<std::size_t> PlanetSeen::*which) -> std::optional<PlanetWindow> {
      const int day = nearest_day(days, asked);
      if (day == 0) return {};
      const auto i = static_cast<std::size_t>(day - 1);
      return planet_window(sky, limit, nights[i], planet, days[i].magnitude, row.optics_only,
                           (days[i].seen.*which).value());
    };
    row.evening_window = window(in_evening, &PlanetSeen::evening);
    row.morning_window = window(in_morning, &PlanetSeen::morning);
    rows.push_back(std::move(row));
  }
  return rows;
}

}  // namespace duskleaf
