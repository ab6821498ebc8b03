// Columns and spelling are this project's own; times as in table_rows.cpp. Altitudes are
// topocentric without refraction.
#include "export/happening_rows.hpp"

#include <algorithm>
#include <iterator>
#include <string>
#include <string_view>

namespace duskleaf {
namespace {

bool in_span(const SiteYear& year, Ut t) {
  const Date date = year.place.zone.civil(t).date();
  return date >= year.span.first_day() && date < year.span.end_day();
}

Cell local(const Zone& zone, const std::optional<Ut>& t) {
  if (!t) return {};
  return zone.civil(*t).iso();
}

// "solar-eclipse-partial-begins" without its first two words.
std::string contact_name(EventKind kind) {
  const std::string name = event_name(kind);
  return name.substr(name.find("eclipse-") + std::string_view("eclipse-").size());
}

}  // namespace

std::vector<Row> shower_rows(const SiteYear& year, const SiteHappenings& happenings) {
  std::vector<Row> rows;
  const Zone& zone = year.place.zone;
  for (const SiteShower& s : happenings.showers) {
    if (!in_span(year, s.peak)) continue;
    const Shower& shower = showers()[static_cast<std::size_t>(s.shower)];
    const bool seen = s.best.has_value();
    rows.push_back({year.place.id, std::string(shower.code), std::string(shower.name),
                    local(zone, s.peak), Number{shower.peak_longitude.degrees(), 2},
                    shower.zhr ? Cell{Number{*shower.zhr, 0}} : Cell{},
                    Number{s.radiant.altitude.degrees(), 1}, local(zone, s.best_from),
                    local(zone, s.best_to), seen ? Cell{Number{100.0 * s.moon_lit, 0}} : Cell{},
                    shower.zhr ? Cell{Number{s.expected_per_hour, 1}} : Cell{},
                    std::string(verdict_name(s.verdict))});
  }
  return rows;
}

std::vector<Row> eclipse_rows(const SiteYear& year, const SiteHappenings& happenings) {
  struct Dated {
    Ut at;
    std::vector<Row> rows;
  };
  std::vector<Dated> eclipses;
  const Zone& zone = year.place.zone;
  const auto row = [&](std::string_view kind, std::string_view body, EventKind contact,
                       const Sighting& seen, Cell magnitude, Cell obscuration) {
    return Row{year.place.id,
               std::string(kind),
               std::string(body),
               contact_name(contact),
               utc_text(seen.at),
               local(zone, seen.at),
               Number{seen.place.altitude.degrees(), 1},
               Number{seen.place.azimuth.degrees(), 1},
               std::move(magnitude),
               std::move(obscuration),
               seen.visible};
  };
  for (const SiteLunarEclipse& e : happenings.lunar_eclipses) {
    if (!in_span(year, e.eclipse.greatest)) continue;
    Dated dated{e.eclipse.greatest, {}};
    const double magnitude = e.eclipse.kind == LunarEclipseKind::penumbral
                                 ? e.eclipse.penumbral_magnitude
                                 : e.eclipse.umbral_magnitude;
    for (const SiteLunarEclipse::Contact& c : e.contacts)
      dated.rows.push_back(row(
          eclipse_name(e.eclipse.kind), "moon", c.kind, c.moon,
          c.kind == EventKind::lunar_eclipse_greatest ? Cell{Number{magnitude, 4}} : Cell{}, {}));
    eclipses.push_back(std::move(dated));
  }
  for (const SiteSolarEclipse& e : happenings.solar_eclipses) {
    if (!in_span(year, e.greatest.at)) continue;
    Dated dated{e.greatest.at, {}};
    const auto add = [&](EventKind kind, const Sighting& seen, Cell magnitude = {},
                         Cell obscuration = {}) {
      dated.rows.push_back(row(eclipse_name(e.kind), "sun", kind, seen, std::move(magnitude),
                               std::move(obscuration)));
    };
    add(EventKind::solar_eclipse_partial_begins, e.partial_begins);
    if (e.central_begins) add(EventKind::solar_eclipse_central_begins, *e.central_begins);
    add(EventKind::solar_eclipse_greatest, e.greatest, Number{e.magnitude, 4},
        Number{100.0 * e.obscuration, 1});
    if (e.central_ends) add(EventKind::solar_eclipse_central_ends, *e.central_ends);
    add(EventKind::solar_eclipse_partial_ends, e.partial_ends);
    eclipses.push_back(std::move(dated));
  }
  std::stable_sort(eclipses.begin(), eclipses.end(),
                   [](const Dated& a, const Dated& b) { return a.at < b.at; });
  std::vector<Row> rows;
  for (Dated& eclipse : eclipses)
    rows.insert(rows.end(), std::make_move_iterator(eclipse.rows.begin()),
                std::make_move_iterator(eclipse.rows.end()));
  return rows;
}

}  // namespace duskleaf
