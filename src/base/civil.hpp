#pragma once

#include <chrono>
#include <memory>
#include <optional>
#include <string>
#include <string_view>
#include <vector>

#include "base/time.hpp"

namespace duskleaf {

/// A date of the Gregorian civil calendar at some place. Arithmetic in days; year_month_day for its
/// parts.
using Date = std::chrono::local_days;
Date make_date(int year, int month, int day);
int year_of(Date);
int month_of(Date);  // 1..12
int day_of(Date);    // 1..31
int days_in_month(int year, int month);
std::chrono::weekday weekday_of(Date);
std::string iso_date(Date);  // 2027-03-20

/// Midnight UT at the start of the date, and the date in UT.
Ut ut_midnight(Date);

/// A reading of a civil clock to the minute, with the offset from UT in force.
struct CivilMinute {
  std::chrono::local_time<std::chrono::minutes> time;
  std::chrono::seconds offset{0};

  Date date() const { return std::chrono::floor<std::chrono::days>(time); }
  int hour() const;    // 0..23
  int minute() const;  // 0..59
  bool operator==(const CivilMinute&) const = default;
  /// 2027-03-20T20:24+00:00; an offset with seconds (local mean time of old) as +00:19:32.
  std::string iso() const;
};

/// One change of a zone's offset: at `at`, clocks go from `before` to `after` (seconds east of UT).
struct ClockChange {
  Ut at;
  std::chrono::seconds before, after;
};

/// An IANA time zone, by the rules of this machine's time-zone data. Cheap to copy.
class Zone {
 public:
  /// nullopt when the data does not know the name.
  static std::optional<Zone> load(std::string_view name);
  static Zone utc();

  const std::string& name() const;
  std::chrono::seconds offset_at(Ut t) const;
  /// The clock's reading, to the nearest minute, half up. Near a clock change the offset is that of
  /// the rounded instant.
  CivilMinute civil(Ut t) const;
  /// The instant of a civil clock reading: the first of the two where it repeats; where clocks skip
  /// it, the instant of the jump.
  Ut instant(std::chrono::local_seconds) const;
  Ut instant(Date date, std::chrono::minutes after_midnight) const;
  /// First instant of the civil date, and of the following one. Equal when the zone skips the date
  /// (line changes).
  Ut start_of(Date) const;
  /// Changes of offset in (from, to], in order. Changes of name alone are left out.
  std::vector<ClockChange> changes(Ut from, Ut to) const;

 private:
  struct Impl;
  std::shared_ptr<const Impl> impl_;
};

/// Version of the time-zone data in use, such as "2026b"; "unknown" when the machine does not say.
std::string time_zone_data_version();
/// All zone names that the machine knows, for offering the nearest; may be empty.
std::vector<std::string> known_zone_names();

}  // namespace duskleaf
