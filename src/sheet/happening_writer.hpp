#pragma once

#include <initializer_list>
#include <map>
#include <memory>
#include <optional>
#include <string>
#include <string_view>
#include <utility>
#include <vector>

#include "almanac/planet_nights.hpp"
#include "events/site_sky.hpp"
#include "events/targets.hpp"
#include "sheet/happening_lines.hpp"

namespace duskleaf {

/// What the files happening_*.cpp share: the month, its words, and the lines written so far.
class HappeningWriter {
 public:
  using Values = std::initializer_list<std::pair<std::string_view, std::string>>;

  explicit HappeningWriter(const BlockContext&);
  const BlockContext& context() const { return c_; }
  const SiteSky& sky() const { return sky_; }
  std::vector<HappeningLine> take() { return std::move(lines_); }

  bool in_month(Date) const;
  Date first_of_month() const { return first_; }
  Date civil_date(Ut) const;
  /// Date of the evening whose night, noon to noon by the printed minute, holds the moment.
  Date evening_of(Ut) const;
  /// The night of a date; nullptr outside the year.
  const Night* night(Date) const;

  /// The words of "happening." + key.
  std::string words(std::string_view key, Values values = {}) const;
  std::string time(Ut) const;
  std::string span(Ut from, Ut to) const;             // 01:00–04:00
  std::string minutes_seconds(Ut from, Ut to) const;  // 1 min 44 s
  std::string place(const Horizontal&) const;         // "34° up in the SW"
  std::string percent(double fraction) const;         // "87 %"; never rounded up to 100
  std::string body(Body) const;                       // "Jupiter"
  std::string target(const Target&) const;            // "Jupiter", "the Pleiades", "δ Scorpii"
  bool behind_skyline(const Horizontal& apparent) const;
  /// Where a night shows a planet, by the rule of the planets' own block: by the bare eye, Uranus
  /// and Neptune by binoculars.
  PlanetSight planet_sight(Body, Date evening) const;
  /// A topocentric place without refraction as it appears.
  static Horizontal apparent(const Horizontal&);

  /// Adds a line where it falls in the month: something to go out for in a night, at `at`; by its
  /// civil date and time; a fact, by its night where the Sun has not risen, else by its civil date;
  /// on a date without a time. nullptr where it is another month's.
  HappeningLine* by_night(Ut at, double rank, std::string text, std::string brief);
  HappeningLine* by_day(Ut at, double rank, std::string text, std::string brief);
  HappeningLine* fact(Ut at, double rank, std::string text, std::string brief);
  HappeningLine* on_date(Date, double rank, std::string text, std::string brief);
  /// Whether a moment counts to the night of the evening before: before noon and before sunrise.
  bool before_sunrise(Ut) const;

 private:
  const BlockContext& c_;
  Date first_, end_;
  SiteSky sky_;
  std::vector<HappeningLine> lines_;
  mutable std::map<Date, std::unique_ptr<const PlanetNight>> planet_nights_;
};

/// The Sun's rise and set that cut a stretch of time at the site.
struct SunCuts {
  std::optional<Ut> sunrise, sunset;
};
SunCuts sun_cuts(const SiteYear&, Ut from, Ut to);

/// Whether an eclipse is told in a panel besides its line: not where it covers less than a
/// twentieth or is never 5 degrees up; a total or annular one always.
bool worth_a_panel(const SiteSolarEclipse&);
bool worth_a_panel(const SiteLunarEclipse&);

void write_calendar(HappeningWriter&);        // seasons, apsides, clock changes, the order's dates
void write_year_extremes(HappeningWriter&);   // the Sun's year at the site
void write_configurations(HappeningWriter&);  // of the planets
void write_showers(HappeningWriter&);
void write_eclipses(HappeningWriter&);  // of Sun and Moon, and transits of the Sun
/// Occultations first: a meeting that ends in one is not told twice.
void write_meetings(HappeningWriter&);

}  // namespace duskleaf
