// The month's eclipses and transits of the Sun as the site sees them, each with its contacts and a
// drawing; the caution stands with every one of the Sun.
#include <algorithm>
#include <cmath>
#include <functional>
#include <string>

#include "catalogue/stars.hpp"
#include "sheet/blocks/blocks.hpp"
#include "sheet/eclipse_drawing.hpp"
#include "sheet/eclipse_sky.hpp"
#include "sheet/flow_text.hpp"
#include "sheet/happening_writer.hpp"

namespace duskleaf {
namespace {

/// A row of the table of contacts.
struct Row {
  std::string what;
  Ut at;
  Horizontal place;  // apparent
  bool seen;
  bool strong = false;
  bool edge = false;  // a rise or set: on the horizon
};

/// What one panel says; drawn by draw_panel.
struct Panel {
  std::string title, aside;
  std::vector<Row> rows;
  std::string lead;  // in larger type: how long a total or annular one lasts
  std::string text, caution;
  std::string drawn;  // under the drawing
};

Row row(const HappeningWriter& w, std::string_view key, const Sighting& s, bool strong = false) {
  return {w.context().words("eclipse." + std::string(key)), s.at,
          HappeningWriter::apparent(s.place), s.visible, strong};
}

/// Rise or set of the Sun or Moon that cuts an eclipse.
Row edge(const HappeningWriter& w, std::string_view key, Body body, Ut at) {
  const Observer& o = w.sky().observer();
  const Horizontal place = to_horizontal(w.context().ephemeris.apparent(body, to_tt(at)),
                                         w.sky().local_sidereal_time(at), o.latitude);
  return {w.context().words("eclipse." + std::string(key)),
          at,
          {Angle(), place.azimuth},
          true,
          false,
          true};
}

void sort_rows(std::vector<Row>& rows) {
  std::stable_sort(rows.begin(), rows.end(),
                   [](const Row& a, const Row& b) { return a.at < b.at; });
}

std::string date_of_day(const BlockContext& c, Date date) {
  return c.words("date.weekday-day-month", {{"weekday", c.words.weekday_name(weekday_of(date))},
                                            {"date", c.words.day_month(date)}});
}

/// What stands near the Sun in totality: "Venus 15° to the left, Mercury 18° to the lower right".
std::string near_sun(const HappeningWriter& w, Ut at) {
  const BlockContext& c = w.context();
  std::string list;
  const std::vector<NearSun> things = bright_near_sun(w.sky(), at);
  for (const NearSun& thing : things) {
    if (!list.empty())
      list += c.words(&thing == &things.back() ? "happening.list-and" : "happening.list-comma");
    const long eighth = std::lround(thing.side.degrees() / 45.0) % 8;
    list += c.words(
        "eclipse.near-sun-item",
        {{"name", thing.star < 0 ? w.body(thing.planet)
                                 : std::string(stars()[static_cast<std::size_t>(thing.star)].name)},
         {"degrees", c.words.number(thing.distance.degrees(), 0)},
         {"side", c.words("eclipse.side-" + std::to_string(eighth))}});
  }
  return list.empty() ? list : " " + c.words("eclipse.near-sun", {{"list", list}});
}

Panel solar_panel(const HappeningWriter& w, const SiteSolarEclipse& e) {
  const BlockContext& c = w.context();
  const std::string kind(eclipse_name(e.kind));
  const bool central = e.central_begins && e.central_ends;
  // Nobody may be told to take the filter off where the Sun is down for a part of the totality.
  const bool central_seen = central && e.central_begins->visible && e.central_ends->visible;
  const bool totality = central_seen && kind == "total";
  Panel p;
  p.title = c.words("eclipse.solar-" + (central && !central_seen ? "partial" : kind));
  p.aside = date_of_day(c, w.civil_date(e.best.at));
  p.rows.push_back(row(w, "partial-begins", e.partial_begins));
  if (central) p.rows.push_back(row(w, kind + "-begins", *e.central_begins));
  p.rows.push_back(row(w, "greatest", e.greatest, true));
  if (central) p.rows.push_back(row(w, kind + "-ends", *e.central_ends));
  p.rows.push_back(row(w, "partial-ends", e.partial_ends));
  if (e.sunrise) p.rows.push_back(edge(w, "sunrise", Body::sun, *e.sunrise));
  if (e.sunset) p.rows.push_back(edge(w, "sunset", Body::sun, *e.sunset));
  sort_rows(p.rows);
  if (central_seen)
    p.lead = c.words(kind == "total" ? "eclipse.total-lasts" : "eclipse.annular-lasts",
                     {{"duration", w.minutes_seconds(e.central_begins->at, e.central_ends->at)}});
  else
    p.text = c.words("eclipse.solar-size", {{"percent", w.percent(e.best_obscuration)}});
  if (totality) p.text = c.words("eclipse.corona") + near_sun(w, e.best.at);
  if (!e.greatest.visible)
    p.text += " " + c.words("eclipse.solar-cut", {{"percent", w.percent(e.obscuration)}});
  p.caution = c.words("eclipse.sun-caution");
  if (totality) p.caution += " " + c.words("eclipse.totality-caution");
  p.drawn = w.time(e.best.at);
  return p;
}

std::string_view contact_key(EventKind kind) {
  switch (kind) {
    case EventKind::lunar_eclipse_penumbral_begins:
      return "penumbral-begins";
    case EventKind::lunar_eclipse_partial_begins:
      return "partial-begins";
    case EventKind::lunar_eclipse_total_begins:
      return "total-begins";
    case EventKind::lunar_eclipse_total_ends:
      return "total-ends";
    case EventKind::lunar_eclipse_partial_ends:
      return "partial-ends";
    case EventKind::lunar_eclipse_penumbral_ends:
      return "penumbral-ends";
    default:
      return "greatest";
  }
}

Panel lunar_panel(const HappeningWriter& w, const SiteLunarEclipse& e) {
  const BlockContext& c = w.context();
  const LunarEclipse& eclipse = e.eclipse;
  Panel p;
  p.title = c.words("eclipse.lunar-" + std::string(eclipse_name(eclipse.kind)));
  const Date evening = w.evening_of(eclipse.greatest);
  p.aside = c.words.night_of(evening);
  for (const auto& contact : e.contacts)
    p.rows.push_back(row(w, contact_key(contact.kind), contact.moon,
                         contact.kind == EventKind::lunar_eclipse_greatest));
  if (e.moonrise) p.rows.push_back(edge(w, "moonrise", Body::moon, *e.moonrise));
  if (e.moonset) p.rows.push_back(edge(w, "moonset", Body::moon, *e.moonset));
  sort_rows(p.rows);
  if (eclipse.kind == LunarEclipseKind::total)
    p.text =
        c.words("eclipse.lunar-total-size",
                {{"duration", c.words.duration(std::round(
                                  (*eclipse.total_ends - *eclipse.total_begins).count() * 1440))}});
  else
    p.text =
        c.words("eclipse.lunar-partial-size", {{"percent", w.percent(eclipse.umbral_magnitude)}});
  p.text += " " + c.words("eclipse.lunar-safe");
  p.drawn = w.time(e.drawn_at);
  return p;
}

/// The moment of a transit that is drawn: the middle, or the Sun's rise or set where it is down
/// then.
Ut drawn_moment(const HappeningWriter& w, const SiteSunTransit& t) {
  if (t.greatest.visible) return t.greatest.at;
  const SunCuts cuts = sun_cuts(w.context().year, t.begins.at, t.ends.at);
  return (t.begins.visible ? cuts.sunset : cuts.sunrise).value_or(t.greatest.at);
}

Panel transit_panel(const HappeningWriter& w, const SiteSunTransit& t) {
  const BlockContext& c = w.context();
  Panel p;
  p.title = c.words("eclipse.transit", {{"body", w.body(t.planet)}});
  p.aside = date_of_day(c, w.civil_date(t.greatest.at));
  p.rows = {row(w, "transit-begins", t.begins), row(w, "transit-greatest", t.greatest, true),
            row(w, "transit-ends", t.ends)};
  const SunCuts cuts = sun_cuts(c.year, t.begins.at, t.ends.at);
  if (cuts.sunrise) p.rows.push_back(edge(w, "sunrise", Body::sun, *cuts.sunrise));
  if (cuts.sunset) p.rows.push_back(edge(w, "sunset", Body::sun, *cuts.sunset));
  sort_rows(p.rows);
  p.text = c.words(t.planet == Body::mercury ? "eclipse.transit-mercury" : "eclipse.transit-venus");
  p.caution = c.words("eclipse.transit-caution");
  p.drawn = w.time(drawn_moment(w, t));
  return p;
}

using Draw = std::function<void(const Box&, std::vector<Mark>&)>;

/// The contacts as a table at (x, y), in two columns where `split`; returns its right edge and
/// bottom.
Point draw_contacts(const HappeningWriter& w, const Panel& p, double x, double y, bool split,
                    std::vector<Mark>& out) {
  const BlockContext& c = w.context();
  Setter set(c, out);
  const Style cell = set.table();
  const double pitch = 3.35, time_width = c.order.clock_12 ? 14.0 : 9.0;
  const std::size_t in_column = split ? (p.rows.size() + 1) / 2 : p.rows.size();
  double right = x;
  for (std::size_t first = 0; first < p.rows.size(); first += in_column) {
    const std::size_t end = std::min(first + in_column, p.rows.size());
    const double left = first == 0 ? x : right + 6;
    double widest = 0;
    for (std::size_t i = first; i < end; ++i)
      widest = std::max(widest, set.width(p.rows[i].what, set.strong(cell)));
    const double time_right = left + widest + 2.5 + time_width;
    for (std::size_t i = first; i < end; ++i) {
      const Row& r = p.rows[i];
      Style s = r.strong ? set.strong(cell) : cell;
      if (!r.seen) s.ink = c.theme.soft;
      const double baseline = y + static_cast<double>(i - first) * pitch + 2.6;
      set.left(left, baseline, r.what, s);
      set.right(time_right, baseline, w.time(r.at), s);
      std::string where =
          !r.seen
              ? c.words("eclipse.below")
              : c.words("eclipse.where",
                        {{"altitude", c.words.number(std::max(r.place.altitude.degrees(), 0.0), 0)},
                         {"direction", c.words.direction_short(r.place.azimuth)}});
      if (r.seen && !r.edge && w.behind_skyline(r.place)) where = c.words("eclipse.behind-skyline");
      set.left(time_right + 2.5, baseline, where, s);
      right = std::max(right, time_right + 2.5 + set.width(where, s));
    }
  }
  return {right, y + static_cast<double>(in_column) * pitch};
}

/// What a panel says, one paragraph below the other; returns the height used.
double draw_words(const BlockContext& c, const Panel& p, bool with_caution, double x, double top,
                  double width, std::vector<Mark>& out) {
  Setter set(c, out);
  double y = top;
  if (with_caution && !p.caution.empty())
    y += flow(set, x, y, width, {{p.caution, set.strong(set.body())}}, 1.22);
  if (!p.lead.empty()) {
    Style large = set.strong(set.body());
    large.size_pt += 3;
    y += flow(set, x, y, width, {{p.lead, large}}, 1.22);
  }
  std::vector<Run> runs;
  if (!p.text.empty()) runs.push_back({p.text, set.body()});
  runs.push_back({c.words("eclipse.drawn", {{"time", p.drawn}}), set.body()});
  return y - top + flow(set, x, y, width, runs, 1.22);
}

/// The drawing at the left, the contacts beside it, and the words right of them where there is room
/// for that, else below. Contacts in one column or two, whichever makes the panel lower.
double draw_panel(const HappeningWriter& w, const Panel& p, const Draw& drawing, double x,
                  double top, double width, std::vector<Mark>& out) {
  const BlockContext& c = w.context();
  Setter set(c, out);
  double y = top + set.heading(x, top, width, p.title, p.aside);
  const bool wide = width > 115;
  const double side = wide ? 15 : 18, table_x = x + side + 4, between = 6;
  // The caution first: it is read before the times.
  if (!p.caution.empty() && !wide)
    y += flow(set, x, y, width, {{p.caution, set.strong(set.body())}}, 1.2) + 0.6;
  drawing(Box{x, y, side, side}, out);
  const auto rest = [&](bool split, std::vector<Mark>& marks) {
    const Point table = draw_contacts(w, p, table_x, y, split, marks);
    if (!wide)
      return table.y + 0.4 +
             draw_words(c, p, false, table_x, table.y + 0.4, x + width - table_x, marks);
    const double text_x = table.x + between;
    return std::max(table.y, y + draw_words(c, p, true, text_x, y, x + width - text_x, marks));
  };
  std::vector<Mark> one, two;
  double bottom = rest(false, one);
  if (wide) {
    if (const double with_two = rest(true, two); with_two < bottom) {
      bottom = with_two;
      one.swap(two);
    }
  }
  out.insert(out.end(), one.begin(), one.end());
  return std::max(bottom, y + side) - top + 1.0;
}

}  // namespace

double draw_eclipses(const BlockContext& c, const BlockOptions&, const Box& area,
                     std::vector<Mark>& out) {
  const HappeningWriter w(c);
  std::vector<std::pair<Panel, Draw>> panels;
  for (const SiteSolarEclipse& e : c.happenings.solar_eclipses)
    if (worth_a_panel(e) && w.in_month(w.civil_date(e.best.at)))
      panels.emplace_back(solar_panel(w, e), [&](const Box& box, std::vector<Mark>& marks) {
        draw_solar_phase(e, box, c.theme, marks);
      });
  for (const SiteSunTransit& t : c.happenings.sun_transits)
    if (w.in_month(w.civil_date(t.begins.at)))
      panels.emplace_back(transit_panel(w, t), [&](const Box& box, std::vector<Mark>& marks) {
        draw_sun_transit(w.sky(), t, drawn_moment(w, t), box, c.theme, marks);
      });
  for (const SiteLunarEclipse& e : c.happenings.lunar_eclipses)
    if (worth_a_panel(e) && w.in_month(w.evening_of(e.eclipse.greatest)))
      panels.emplace_back(lunar_panel(w, e), [&](const Box& box, std::vector<Mark>& marks) {
        draw_lunar_phase(e, box, c.theme, marks);
      });
  double y = area.y;
  // Two share a wide row.
  const double gap = 6, half = (area.width - gap) / 2;
  const bool pairs = half >= 75;
  for (std::size_t i = 0; i < panels.size();) {
    const auto draw = [&](std::size_t index, double x, double width) {
      return draw_panel(w, panels[index].first, panels[index].second, x, y, width, out);
    };
    if (pairs && i + 1 < panels.size()) {
      const double left = draw(i, area.x, half), right = draw(i + 1, area.x + half + gap, half);
      y += std::max(left, right);
      i += 2;
    } else {
      y += draw(i++, area.x, area.width);
    }
  }
  return y - area.y;
}

}  // namespace duskleaf
