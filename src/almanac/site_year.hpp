#pragma once

#include <array>
#include <chrono>
#include <memory>
#include <optional>
#include <string>
#include <vector>

#include "base/civil.hpp"
#include "events/events.hpp"
#include "sky/horizon.hpp"

namespace duskleaf {

/// When the evening charts are drawn: a civil time of the evening, or dusk (the Sun 12 degrees
/// down, to the next five minutes).
struct ChartHour {
  std::optional<std::chrono::minutes>
      after_midnight;  // empty: dusk. Up to 12:00 it counts to the following civil date.
};

/// A point of the local skyline: apparent altitude at an azimuth.
struct SkylinePoint {
  Angle azimuth, altitude;
};

/// What the almanac needs to know of a site.
struct Place {
  std::string id;
  Observer observer;
  Zone zone = Zone::utc();
  std::array<ChartHour, 12> chart_hours;  // by month, January first
  double limiting_magnitude = 5.0;
  std::vector<SkylinePoint> skyline;
};

/// Twelve months from a first one.
struct Span {
  int first_year, first_month;
  Date first_day() const;
  Date end_day() const;  // the day after the last
  /// Index 0..11 -> year and month.
  std::pair<int, int> month(int index) const;
};

/// Sun or Moon through some stretch of time in which it neither rises nor sets.
enum class Presence { rises_or_sets, up_throughout, down_throughout };

struct TimeSpan {
  Ut from, to;
};

/// One night, from 12:00 civil time of its date to 12:00 of the next (the next that the zone has; a
/// skipped date's night is empty). Times are empty when they do not happen in it; the first dusk
/// and the last dawn where a graze gives more.
struct Night {
  Date date;
  Ut from, to;
  std::optional<Ut> sunset, civil_dusk, nautical_dusk, astronomical_dusk;
  std::optional<Ut> astronomical_dawn, nautical_dawn, civil_dawn, sunrise;
  std::vector<Ut> moonrises, moonsets;  // within the night's 24 hours, in order
  bool moon_up_at_start;                // at the night's first moment (12:00)
  Presence sun;                         // over the 24 hours
  std::vector<TimeSpan>
      sun_down;   // Sun below -50', in order; all of the night where the Sun does not rise
  Presence moon;  // between sunset and sunrise (over the 24 hours where the Sun does neither)
  bool moon_up_at_dusk;  // at sunset; at the darkest moment where there is none
  double moon_lit;       // fraction at the night's middle
  Ut darkest;            // when the Sun is lowest
  Angle darkest_sun_altitude;
  std::vector<TimeSpan> dark;  // Sun below -18 degrees and the Moon down, in order
  Angle dark_limit;  // Sun's altitude that `dark_or_darkest` uses: -18, or -12, -6 where the month
                     // has none
  std::vector<TimeSpan> dark_or_darkest;  // as dark, with dark_limit
  std::vector<Event>
      events;  // every instant of the night, global ones too, in order (a graze can set twice)
  std::vector<std::string> notes;  // keys: see note_keys below
};
// Note keys, each a word of words/LANG.yaml: sun-up-all-night, sun-down-all-day, no-civil-dark
// (never below -6), no-nautical-dark (never below -12), no-astronomical-dark (never below -18),
// moon-up-all-night, moon-down-all-night, no-moonrise, no-moonset, two-moonrises, two-moonsets (in
// the 24 hours), clock-change, short-date (the zone skipped this date). Of the first and the three
// lacks of darkness only the greatest is given.

/// Civil days, for daily tables of Sun and Moon.
struct CivilDay {
  Date date;
  bool skipped = false;  // the zone skipped this date
  std::vector<Event>
      events;  // those (global ones too) whose civil minute, rounded, falls on this date; in order
};

enum class FigureState { up, partly_up, below };
enum class FigurePhase { rising, high, sinking };

struct ConstellationEvening {
  int figure;  // index into figures()
  bool on_equator;
  Horizontal mean_place;  // of its figure's stars
  FigureState state;
  FigurePhase phase;  // by the mean place's hour angle; where that place never rises, rising when
                      // it is in the east, else sinking (never high)
  bool mean_place_rises;                   // ever above -34' at this latitude
  std::optional<Ut> rises, highest, sets;  // nearest to the chart's moment, within the sidereal day
                                           // about it; empty where it does not
                                           // (highest: where neither the mean place nor
                                           // half of the stars ever rises)
  bool half_never_sets;                    // half or more of its stars never set: only then may a
                                           // page say "never sets" of an empty `sets`
  bool circumpolar;                        // all stars of its figure never set
  bool never_rises;                        // none ever rises
  std::array<bool, 12> evening_sight;  // months of the year (January first) in whose middle half of
                                       // it stands 15 degrees high
};

struct PlanetEvening {
  Body planet;
  Horizontal place;  // at the evening's moment, refracted
  double magnitude;
  bool visible;      // by conventions.md, at the evening's moment
  Angle elongation;  // from the Sun, positive in the evening sky (east)
  int constellation;
  std::optional<Ut> rises, highest, sets;  // in the night of the evening
};

/// Why the chart shows another moment than the order's chart hour.
enum class EveningShift { none, waits_for_dark, darkest_moment, no_stars };

/// "These charts also show the sky of `date` at `clock`": the same sidereal time. Both sides of a
/// clock change are given.
struct ChartFit {
  Date date;
  CivilMinute clock;
};

struct EveningSky {
  int year, month;
  Date date;        // the middle of the month (the 15th)
  Ut chart_moment;  // the order's chart hour
  Ut moment;        // what is drawn
  EveningShift shift;
  Angle local_sidereal_time;  // at moment
  Angle sun_altitude;
  double faintest_star;
  std::vector<Horizontal> stars;  // by index into stars(): true altitude, azimuth
  Horizontal moon;                // topocentric, true altitude, at moment
  double moon_lit;
  std::vector<PlanetEvening> planets;
  std::vector<ConstellationEvening>
      constellations;                // figures near the equator (36 rows: Serpens is two)
  std::optional<Date> stars_return;  // where shift is no_stars: the first later date whose Sun
                                     // sinks below -6 degrees
  std::vector<ChartFit>
      fits;  // when this same sky stands there through the month, in order of date
};

/// The Moon as it leans in the site's sky: at the evening's clock time if it is up then (so it
/// agrees with the chart on its date); else at the nearest moment of the night at which it is up
/// and the Sun is down (its rise or set, or the Sun's), so that the tilt changes little from one
/// night to the next; else, near new Moon, at the nearest at which it is up. Where it is not up in
/// the night's 24 hours, at the evening's clock time all the same.
struct MoonLook {
  Ut at;
  double lit;
  Angle bright_limb_from_zenith;  // position angle of the bright limb's middle, counterclockwise
                                  // from the zenith as the observer faces it
  bool up;                        // at the evening's clock time; false: `at` is another moment
};

struct SiteYear {
  Place place;
  Span span;
  std::vector<Event> global;  // in the local span, ±1 month at its ends
  std::vector<Event>
      local;  // the site's, clock changes too; sorted; a day more at both ends of the span
  std::vector<ClockChange> clock_changes;
  std::vector<CivilDay> days;
  std::vector<Night> nights;  // one for each date of the span
  std::array<EveningSky, 12> evenings;
  std::array<std::vector<MoonLook>, 12>
      month_moons;  // for each date of the month, at the evening's clock time
};

/// The time span that a YearEphemeris must cover for sites anywhere.
std::pair<Tt, Tt> ephemeris_span(const Span&);

/// Only nights, days and instants are always made; the evening skies on demand, as they cost most.
struct AlmanacParts {
  bool evenings = true;
};
SiteYear make_site_year(const YearEphemeris&, const Place&, const Span&, AlmanacParts = {});

}  // namespace duskleaf
