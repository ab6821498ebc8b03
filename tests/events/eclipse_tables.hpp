#pragma once

#include <cmath>
#include <gtest/gtest.h>
#include <map>
#include <memory>
#include <string>

#include "events/site_sky.hpp"
#include "published.hpp"

namespace duskleaf {

/// "2027-08-02T10:06:41.30Z" as days since J2000.0.
inline double instant_days(std::string_view text) {
  const auto part = [&](std::size_t at, std::size_t n) {
    return static_cast<int>(parse_number(text.substr(at, n)));
  };
  std::string_view seconds = text.substr(17);
  if (seconds.ends_with('Z')) seconds.remove_suffix(1);
  return ut_midnight(make_date(part(0, 4), part(5, 2), part(8, 2))).days() + part(11, 2) / 24.0 +
         part(14, 2) / 1440.0 + parse_number(seconds) / 86400.0;
}
inline Ut instant_of(std::string_view text) { return Ut(Days(instant_days(text))); }
inline Ut midnight_of(std::string_view date) {
  return instant_of(std::string(date.substr(0, 10)) + "T00:00:00");
}
inline int year_of_text(std::string_view date) {
  return static_cast<int>(parse_number(date.substr(0, 4)));
}
inline double seconds_after(Ut a, Ut b) { return (a - b).count() * 86400.0; }

/// One year's ephemeris, kept until another is asked for: the tables are in order of time.
inline const YearEphemeris& year_tables(int year) {
  static std::unique_ptr<YearEphemeris> made;
  static int made_for = 0;
  if (made_for != year) {
    made = std::make_unique<YearEphemeris>(to_tt(ut_midnight(make_date(year, 1, 1)) - Days(3)),
                                           to_tt(ut_midnight(make_date(year + 1, 1, 1)) + Days(3)));
    made_for = year;
  }
  return *made;
}

/// Largest differences by name, recorded with the test.
class Largest {
 public:
  void note(const std::string& name, double difference) {
    Entry& e = entries_[name];
    ++e.count;
    e.worst = std::max(e.worst, std::abs(difference));
  }
  int count(const std::string& name) const {
    const auto found = entries_.find(name);
    return found == entries_.end() ? 0 : found->second.count;
  }
  void record() const {
    for (const auto& [name, e] : entries_)
      testing::Test::RecordProperty(
          name, std::to_string(e.worst) + " at most of " + std::to_string(e.count));
  }

 private:
  struct Entry {
    int count = 0;
    double worst = 0.0;
  };
  std::map<std::string, Entry> entries_;
};

}  // namespace duskleaf
