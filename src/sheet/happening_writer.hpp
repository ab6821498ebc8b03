#pragma once

#include <initializer_list>
#include <string>
#include <string_view>
#include <utility>
#include <vector>

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
  std::string place(const Horizontal&) const;         // "34° up in the south-west"
  std::string percent(double fraction) const;         // "87 %"; never rounded up to 100
  std::string body(Body) const;                       // "Jupiter"
  std::string target(const Target&) const;            // "Jupiter", "the Pleiades", "δ Scorpii"
  bool behind_skyline(const Horizontal& apparent) const;
  /// A topocentric place without refraction as it appears.
  static Horizontal apparent(const Horizontal&);

  /// Adds a line where it falls in the month: seen in a night at `at`, or at its civil date and
  /// time. nullptr where it is another month's.
  HappeningLine* by_night(Ut at, int rank, std::string text, std::string brief);
  HappeningLine* by_day(Ut at, int rank, std::string text, std::string brief);
  HappeningLine* on_date(Date, int rank, std::string text, std::string brief);

 private:
  const BlockContext& c_;
  Date first_, end_;
  SiteSky sky_;
  std::vector<HappeningLine> lines_;
};

void write_calendar(HappeningWriter&);        // seasons, apsides, clock changes, the order's dates
void write_year_extremes(HappeningWriter&);   // the Sun's year at the site
void write_configurations(HappeningWriter&);  // of the planets
void write_showers(HappeningWriter&);
void write_eclipses(HappeningWriter&);  // of Sun and Moon, and transits of the Sun
/// Occultations first: a meeting that ends in one is not told twice.
void write_meetings(HappeningWriter&);

}  // namespace duskleaf
