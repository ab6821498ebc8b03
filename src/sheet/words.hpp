#pragma once

#include <initializer_list>
#include <map>
#include <string>
#include <string_view>
#include <utility>

#include "base/angle.hpp"
#include "base/civil.hpp"

namespace duskleaf {

/// The words of one language (templates/words/LANG.yaml) and its forms of dates, times and numbers.
class Words {
 public:
  /// Throws std::out_of_range when there is no such language.
  explicit Words(std::string_view language, bool clock_12 = false);
  const std::string& language() const { return language_; }

  /// The text of a key, such as "dome.facing-south"; throws std::out_of_range for a key that the
  /// language lacks.
  const std::string& operator()(std::string_view key) const;
  /// The same with each {name} replaced; throws std::out_of_range for a name that is not given.
  std::string operator()(std::string_view key,
                         std::initializer_list<std::pair<std::string_view, std::string>>) const;
  bool has(std::string_view key) const;

  std::string time(const CivilMinute&) const;  // 21:30 or 9:30 pm; noon, midnight
  std::string time_of_day(std::chrono::minutes after_midnight) const;
  std::string duration(double minutes) const;  // 8 h 04
  std::string whole_hour(int hour) const;      // 21:00 or 9 pm
  std::string month_name(int month) const;     // March
  std::string month_short(int month) const;    // Mar
  std::string weekday_name(std::chrono::weekday) const;
  std::string weekday_short(std::chrono::weekday) const;  // two or three letters
  std::string day_month(Date) const;                      // 15 March
  std::string night_of(Date evening) const;               // night of 2-3 March
  /// One of 8 directions as a word ("south-west"); one of 16 in short form ("SSW").
  std::string direction(Angle azimuth) const;
  std::string direction_short(Angle azimuth) const;
  /// Decimal number with the language's mark and a true minus sign.
  std::string number(double value, int decimals) const;

 private:
  std::string language_;
  bool clock_12_;
  std::map<std::string, std::string, std::less<>> text_;
};

}  // namespace duskleaf
