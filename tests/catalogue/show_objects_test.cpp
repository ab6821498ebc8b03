// The table of what to show against second sources: lists of Messier numbers and ICRS places
// (tests/reference/deep_sky_places.csv), The Astronomical Almanac for 2016 for the doubles
// (bright_stars_2016.csv); their first lines name them.
#include "catalogue/show_objects.hpp"

#include <cmath>
#include <erfa.h>
#include <gtest/gtest.h>
#include <map>
#include <set>
#include <string>

#include "base/csv.hpp"
#include "catalogue/constellations.hpp"
#include "catalogue/stars.hpp"
#include "reference_file.hpp"

namespace duskleaf {
namespace {

Eigen::Vector3d direction(double ra_degrees, double dec_degrees) {
  const Angle a = Angle::from_degrees(ra_degrees), d = Angle::from_degrees(dec_degrees);
  return {cos(d) * cos(a), cos(d) * sin(a), sin(d)};
}
double arcminutes_between(const Eigen::Vector3d& p, const Eigen::Vector3d& q) {
  return arctan2(p.cross(q).norm(), p.dot(q)).arcminutes();
}
const ShowObject* object(std::string_view code) {
  for (const ShowObject& o : show_objects())
    if (o.code == code) return &o;
  return nullptr;
}

TEST(ShowObjects, EachIsWhole) {
  ASSERT_GE(show_objects().size(), 100u);
  std::set<std::string_view> codes;
  std::map<ShowClass, int> north, south;
  for (const ShowObject& o : show_objects()) {
    EXPECT_TRUE(codes.insert(o.code).second) << o.code;
    EXPECT_NEAR(o.direction.norm(), 1.0, 1e-12) << o.code;
    EXPECT_GE(o.constellation, 0) << o.code;
    EXPECT_GE(o.rank, 1) << o.code;
    EXPECT_LE(o.rank, 3) << o.code;
    EXPECT_GT(o.magnitude, -0.1) << o.code;
    EXPECT_LT(o.magnitude, 10.0) << o.code;
    EXPECT_GT(o.size.arcseconds(), 2.0) << o.code;
    EXPECT_GT(o.axis_ratio, 0.1) << o.code;
    EXPECT_LE(o.axis_ratio, 1.0) << o.code;
    const bool is_double = o.sort == ShowClass::double_star;
    EXPECT_EQ(std::isnan(o.second_magnitude), !is_double) << o.code;
    EXPECT_EQ(o.star < 0, !is_double) << o.code;
    if (is_double) {
      EXPECT_GE(o.second_magnitude, o.magnitude) << o.code;
    }
    ++(o.direction.z() > 0 ? north : south)[o.sort];
  }
  for (const ShowClass sort : {ShowClass::double_star, ShowClass::open_cluster,
                               ShowClass::globular_cluster, ShowClass::galaxy}) {
    EXPECT_GE(north[sort], 4) << show_class_name(sort);
    EXPECT_GE(south[sort], 4) << show_class_name(sort);
  }
}

// Clusters have no sharp middle: lists differ by up to 3 arcminutes. A mistaken equinox (B1950)
// would show as 30 and more.
TEST(ShowObjects, PlacesAndMagnitudesAgreeWithOtherLists) {
  const std::string text = reference_text("deep_sky_places.csv");
  const CsvTable table(text);
  int places = 0, icrs = 0, magnitudes = 0;
  for (std::size_t i = 0; i < table.rows(); ++i) {
    const std::string_view code = table.cell(i, table.column("code"));
    const ShowObject* o = object(code);
    if (o == nullptr) continue;
    const Eigen::Vector3d other = direction(table.number(i, table.column("ra_deg")),
                                            table.number(i, table.column("dec_deg")));
    EXPECT_LT(arcminutes_between(o->direction, other), 3.0) << code;
    ++places;
    icrs += table.cell(i, table.column("source")) == "icrs";
    if (table.cell(i, table.column("magnitude")).empty()) continue;
    EXPECT_NEAR(o->magnitude, table.number(i, table.column("magnitude")), 0.75) << code;
    ++magnitudes;
  }
  EXPECT_GE(places, 50);
  EXPECT_EQ(icrs, 6);
  EXPECT_GE(magnitudes, 45);
}

TEST(ShowObjects, DoublesStandWhereTheAlmanacHasThem) {
  double day0 = 0.0, day = 0.0, bias[3][3], precession[3][3], both[3][3];
  eraEpj2jd(2016.5, &day0, &day);
  eraBp06(day0, day, bias, precession, both);
  const std::string text = reference_text("bright_stars_2016.csv");
  const CsvTable table(text);
  const std::vector<Eigen::Vector3d> moved = star_directions(16.5);
  int compared = 0;
  for (const ShowObject& o : show_objects()) {
    if (o.star < 0) continue;
    const Star& star = stars()[static_cast<std::size_t>(o.star)];
    EXPECT_LT(arcminutes_between(o.direction, star.direction), 0.001) << o.code;
    EXPECT_EQ(o.constellation, star.constellation) << o.code;
    for (std::size_t i = 0; i < table.rows(); ++i) {
      if (table.integer(i, table.column("hr")) != star.hr) continue;
      Eigen::Vector3d p = moved[static_cast<std::size_t>(o.star)], of_date;
      for (int r = 0; r < 3; ++r)
        of_date(r) = precession[r][0] * p.x() + precession[r][1] * p.y() + precession[r][2] * p.z();
      const Eigen::Vector3d almanac = direction(table.number(i, table.column("ra_2016_5_deg")),
                                                table.number(i, table.column("dec_2016_5_deg")));
      EXPECT_LT(arcminutes_between(of_date, almanac), 0.35) << o.code;
      // The pair's light together, or the brighter star's.
      EXPECT_LT(table.number(i, table.column("v")), o.magnitude + 0.1) << o.code;
      EXPECT_GT(table.number(i, table.column("v")), o.magnitude - 0.8) << o.code;
      ++compared;
    }
  }
  EXPECT_GE(compared, 30);
}

// Where everyone finds them (common practice).
TEST(ShowObjects, InTheirConstellations) {
  const std::pair<const char*, const char*> rows[] = {
      {"M31", "And"},      {"M42", "Ori"},      {"M13", "Her"},      {"M45", "Tau"},
      {"M44", "Cnc"},      {"M57", "Lyr"},      {"M27", "Vul"},      {"M33", "Tri"},
      {"M8", "Sgr"},       {"M11", "Sct"},      {"M7", "Sco"},       {"NGC 869", "Per"},
      {"M81", "UMa"},      {"M51", "CVn"},      {"M104", "Vir"},     {"LMC", "Dor"},
      {"NGC 292", "Tuc"},  {"NGC 104", "Tuc"},  {"NGC 5139", "Cen"}, {"NGC 3372", "Car"},
      {"M52", "Cas"},      {"NGC 4755", "Cru"}, {"NGC 253", "Scl"},  {"NGC 7293", "Aqr"},
      {"NGC 6543", "Dra"}, {"β Cyg", "Cyg"},    {"α Cen", "Cen"},    {"ζ UMa", "UMa"},
      {"Cr 399", "Vul"},   {"Mel 111", "Com"}};
  for (const auto& [code, area] : rows) {
    const ShowObject* o = object(code);
    ASSERT_NE(o, nullptr) << code;
    EXPECT_EQ(constellations()[static_cast<std::size_t>(o->constellation)].abbreviation, area)
        << code;
  }
  for (const ShowObject& o : show_objects())
    EXPECT_EQ(o.constellation, constellation_at(o.direction)) << o.code;
}

// Separations and magnitudes that every observer's handbook gives (common practice).
TEST(ShowObjects, WellKnownDoubles) {
  struct Row {
    const char* code;
    double separation, first, second;
  };
  for (const Row& r :
       {Row{"β Cyg", 34.5, 3.1, 5.1}, Row{"γ And", 9.7, 2.3, 4.8}, Row{"ζ UMa", 14.4, 2.3, 4.0},
        Row{"α CVn", 19.4, 2.9, 5.6}, Row{"θ Eri", 8.3, 3.2, 4.3}, Row{"ε Lyr", 208, 5.0, 5.2}}) {
    const ShowObject* o = object(r.code);
    ASSERT_NE(o, nullptr) << r.code;
    EXPECT_NEAR(o->size.arcseconds(), r.separation, 1.5) << r.code;
    EXPECT_NEAR(o->magnitude, r.first, 0.15) << r.code;
    EXPECT_NEAR(o->second_magnitude, r.second, 0.15) << r.code;
  }
}

// B-V of gold and orange stars is above 1.1, of yellow ones 0.6 to 1.1, and blue is what is below
// 0.1 beside a warm one (common practice); what is from memory says so.
TEST(ShowObjects, ColoursOfDoublesFollowTheCatalogue) {
  const std::map<std::string, std::pair<double, double>> range = {
      {"gold", {1.1, 1.5}}, {"orange", {1.1, 1.8}}, {"yellow", {0.6, 1.1}}, {"blue", {-0.3, 0.1}}};
  int pairs = 0;
  for (const ShowObject& o : show_objects()) {
    if (o.look.empty()) continue;
    EXPECT_EQ(o.sort, ShowClass::double_star) << o.code;
    if (o.by_memory && !std::set<std::string_view>{"61 Cyg", "β Cap", "α Cen"}.contains(o.code))
      continue;  // of these the separation is from memory, the colours are not
    ++pairs;
    // The other star: nearest to the first among those of its brightness.
    const Star& first = stars()[static_cast<std::size_t>(o.star)];
    const Star* second = nullptr;
    double nearest = 15.0;
    for (const Star& star : stars()) {
      const double distance = arcminutes_between(star.direction, o.direction);
      if (star.hr == first.hr || distance > nearest) continue;
      nearest = distance;
      second = &star;
    }
    ASSERT_NE(second, nullptr) << o.code;
    const std::string look(o.look);
    const std::size_t dash = look.find('-');
    const auto& [least, most] = range.at(look.substr(0, dash));
    const auto& [other_least, other_most] = range.at(look.substr(dash + 1));
    EXPECT_GE(first.colour_index, least) << o.code;
    EXPECT_LE(first.colour_index, most) << o.code;
    EXPECT_GE(second->colour_index, other_least) << o.code;
    EXPECT_LE(second->colour_index, other_most) << o.code;
  }
  EXPECT_GE(pairs, 8);
}

}  // namespace
}  // namespace duskleaf
