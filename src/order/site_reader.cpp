// A site of an order: where it is, when and how dark its evenings are, and what its group adds to
// the page. Latitude is geodetic, longitude east positive (ISO 6709); time zones by their IANA
// names.
#include "order/site_reader.hpp"

#include <algorithm>
#include <fmt/format.h>

#include "order/angles.hpp"
#include "order/nearest_name.hpp"
#include "order/sessions.hpp"

namespace duskleaf {
namespace {

Zone read_zone(const YamlValue& value) {
  const std::string name = read_text(value, "time_zone");
  // right/ and posix/ are other countings of the same names: right/ has leap seconds, which civil
  // clocks do not show.
  const bool other_counting =
      name.starts_with("right/") || name.starts_with("posix/") || name.starts_with("Fixed/");
  if (!other_counting)
    if (std::optional<Zone> zone = Zone::load(name)) return *zone;
  const std::vector<std::string> known = known_zone_names();
  std::string near = nearest_name(name, known);
  for (const std::string& candidate : known) {  // "London" is a town of one zone
    const std::size_t slash = candidate.rfind('/');
    if (slash != std::string::npos && edit_distance(candidate.substr(slash + 1), name) == 0)
      near = candidate;
  }
  throw OrderError(value.at, fmt::format("unknown time zone {}", described(value)),
                   near.empty() ? "expected an IANA name such as Europe/London"
                                : fmt::format("did you mean '{}'?", near));
}

ChartHour read_chart_hour(const YamlValue& value) {
  if (value.kind == YamlValue::Kind::scalar && value.text == "dusk") return {};
  try {
    return {read_clock(value, "chart_hour")};
  } catch (const OrderError&) {
    throw OrderError(
        value.at, fmt::format("chart_hour is {}", described(value)),
        "expected a time of day from 00:00 to 23:59, dusk, or a list of twelve of them");
  }
}

std::array<ChartHour, 12> read_chart_hours(const YamlValue& value) {
  std::array<ChartHour, 12> hours;
  if (value.kind != YamlValue::Kind::list) {
    hours.fill(read_chart_hour(value));
    return hours;
  }
  if (value.items.size() != hours.size())
    throw OrderError(value.at, fmt::format("chart_hour has {} items", value.items.size()),
                     "expected twelve, January first");
  std::transform(value.items.begin(), value.items.end(), hours.begin(), read_chart_hour);
  return hours;
}

std::vector<SkylinePoint> read_skyline(const YamlValue& value) {
  std::vector<SkylinePoint> points;
  for (const YamlValue& item : read_list(value, "skyline")) {
    if (item.kind != YamlValue::Kind::list || item.items.size() != 2)
      throw OrderError(item.at, fmt::format("a point of the skyline is {}", described(item)),
                       "expected [azimuth, altitude] in degrees");
    const double azimuth = read_number(item.items[0], "the azimuth", 0, 360);
    const double altitude = read_number(item.items[1], "the altitude", -10, 90);
    points.push_back(
        {Angle::from_degrees(azimuth == 360 ? 0 : azimuth), Angle::from_degrees(altitude)});
    for (std::size_t i = 0; i + 1 < points.size(); ++i)
      if (points[i].azimuth == points.back().azimuth)
        throw OrderError(item.at, fmt::format("the skyline has azimuth {} twice", azimuth),
                         "keep one point");
  }
  std::sort(points.begin(), points.end(),
            [](const SkylinePoint& a, const SkylinePoint& b) { return a.azimuth < b.azimuth; });
  return points;
}

constexpr std::size_t longest_link = 300;  // bytes

Masthead read_masthead(const YamlValue& value, SiteContext& context) {
  const MapReader map(value, "a masthead", {"group", "contact", "link", "logo"});
  Masthead masthead;
  if (const YamlValue* group = map.find("group")) masthead.group = read_text(*group, "group");
  if (const YamlValue* contact = map.find("contact"))
    masthead.contact = read_text(*contact, "contact");
  if (const YamlValue* link = map.find("link")) {
    masthead.link = read_text(*link, "link");
    const bool known = masthead.link.starts_with("https://") ||
                       masthead.link.starts_with("http://") || masthead.link.starts_with("mailto:");
    if (masthead.link.size() > longest_link)
      throw OrderError(
          link->at, fmt::format("link has {} characters", masthead.link.size()),
          fmt::format("expected at most {}, for a code that phones can read from paper",
                      longest_link));
    if (!known || masthead.link.find_first_of(" \n\t") != std::string::npos)
      throw OrderError(
          link->at, fmt::format("link is {}", described(*link)),
          "expected an address that begins with https://, http:// or mailto:, without spaces");
  }
  if (const YamlValue* logo = map.find("logo")) {
    masthead.logo = path_in(context.folder, read_text(*logo, "logo"));
    if (!context.checked_logos.contains(masthead.logo)) {
      check_logo(masthead.logo, logo->at);
      context.checked_logos.emplace(masthead.logo, "");
    }
  }
  return masthead;
}

std::map<int, std::string> read_notes(const YamlValue& value) {
  const MapReader map(value, "notes",
                      {"1", "2", "3", "4", "5", "6", "7", "8", "9", "10", "11", "12"});
  std::map<int, std::string> notes;
  for (int month = 1; month <= 12; ++month)
    if (const YamlValue* note = map.find(std::to_string(month)))
      notes[month] = read_text(*note, "a note");
  return notes;
}

}  // namespace

std::string read_id(const YamlValue& value, std::string_view what) {
  const auto allowed = [](char c) {
    return (c >= 'a' && c <= 'z') || (c >= 'A' && c <= 'Z') || (c >= '0' && c <= '9') || c == '-' ||
           c == '_';
  };
  std::string text = read_text(value, what);
  if (text.size() > 64 || !std::all_of(text.begin(), text.end(), allowed))
    throw OrderError(value.at, fmt::format("{} is {}", what, described(value)),
                     "expected at most 64 letters (a to z), digits, hyphens and underscores");
  return text;
}

Site read_site(const YamlValue& value, SiteContext& context) {
  const MapReader map(
      value, "a site",
      {"id", "name", "latitude", "longitude", "elevation", "time_zone", "chart_hour",
       "limiting_magnitude", "skyline", "masthead", "sessions", "dates", "notes"});
  Site site;
  const YamlValue& id = map.require("id");
  site.where = id.at;
  site.place.id = read_id(id, "id");
  if (site.place.id == "pairs")
    throw OrderError(id.at, "id is 'pairs'",
                     "expected another: the folder pairs/ is taken by paired places");
  site.name = read_text(map.require("name"), "name");
  site.place.observer.latitude = read_latitude(map.require("latitude"));
  site.place.observer.longitude = read_longitude(map.require("longitude"));
  if (const YamlValue* elevation = map.find("elevation"))
    site.place.observer.elevation_m = read_elevation(*elevation);
  site.place.zone = read_zone(map.require("time_zone"));
  site.place.chart_hours.fill({std::chrono::minutes(21 * 60 + 30)});
  if (const YamlValue* hour = map.find("chart_hour"))
    site.place.chart_hours = read_chart_hours(*hour);
  if (const YamlValue* limit = map.find("limiting_magnitude"))
    site.place.limiting_magnitude = read_number(*limit, "limiting_magnitude", 1, 8);
  if (const YamlValue* skyline = map.find("skyline")) site.place.skyline = read_skyline(*skyline);
  if (const YamlValue* masthead = map.find("masthead"))
    site.masthead = read_masthead(*masthead, context);
  if (const YamlValue* sessions = map.find("sessions")) site.sessions = read_sessions(*sessions);
  if (const YamlValue* dates = map.find("dates")) site.dates = read_own_dates(*dates);
  if (const YamlValue* notes = map.find("notes")) site.notes = read_notes(*notes);
  return site;
}

}  // namespace duskleaf
