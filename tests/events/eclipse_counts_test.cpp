// How many eclipses there are. 1901-2000: 228 of the Sun (78 partial, 73 annular, 71 total, 6
// hybrid), 229 of the Moon, 81 of them total; 2001-2100: 224 (77, 72, 68, 7), 228, 85: NASA's
// statistics of the canons, from memory; a grazing one of the Moon may belong to another rule of
// the shadow. Two to five a year of either, four to seven in all: common practice.
#include <array>

#include "eclipse_tables.hpp"
#include "events/lunar_eclipses.hpp"
#include "events/solar_eclipses.hpp"

namespace duskleaf {
namespace {

struct Century {
  int first;
  std::array<int, 4> solar;  // partial, annular, total, hybrid
  int lunar, lunar_total;
};

TEST(EclipseCounts, TwoCenturies) {
  for (const Century& century :
       {Century{1901, {78, 73, 71, 6}, 229, 81}, Century{2001, {77, 72, 68, 7}, 228, 85}}) {
    Century found{century.first, {}, 0, 0};
    for (int year = century.first; year < century.first + 100; ++year) {
      const Ut from = ut_midnight(make_date(year, 1, 1)),
               to = ut_midnight(make_date(year + 1, 1, 1));
      const std::vector<SolarEclipse> solar = solar_eclipses(year_tables(year), from, to);
      const std::vector<LunarEclipse> lunar = lunar_eclipses(year_tables(year), from, to);
      EXPECT_TRUE(solar.size() >= 2 && solar.size() <= 5) << year << ": " << solar.size();
      EXPECT_TRUE(lunar.size() >= 2 && lunar.size() <= 5) << year << ": " << lunar.size();
      EXPECT_LE(solar.size() + lunar.size(), 7U) << year;
      for (const SolarEclipse& e : solar) ++found.solar[static_cast<std::size_t>(e.kind)];
      found.lunar += static_cast<int>(lunar.size());
      for (const LunarEclipse& e : lunar) found.lunar_total += e.kind == LunarEclipseKind::total;
    }
    EXPECT_EQ(found.solar, century.solar) << century.first;
    EXPECT_NEAR(found.lunar, century.lunar, 1) << century.first;
    EXPECT_NEAR(found.lunar_total, century.lunar_total, 1) << century.first;
    RecordProperty("lunar_" + std::to_string(century.first), found.lunar);
    RecordProperty("lunar_total_" + std::to_string(century.first), found.lunar_total);
  }
}

}  // namespace
}  // namespace duskleaf
