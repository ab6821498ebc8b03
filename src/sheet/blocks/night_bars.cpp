#include <algorithm>
#include <cmath>
#include <fmt/format.h>
#include <set>

#include "sheet/blocks/blocks.hpp"
#include "sheet/moon_mark.hpp"
#include "sheet/night_tones.hpp"
#include "sheet/setting.hpp"

namespace duskleaf {
namespace {

/// Hours of the clock since the midnight that begins the night's date: 12 to 36.
double clock_hours(const Zone& zone, const Night& night, Ut t) {
  const double offset_hours = static_cast<double>(zone.offset_at(t).count()) / 3600.0;
  return (t - ut_midnight(night.date)).count() * 24.0 + offset_hours;
}

std::vector<const Night*> nights_of_month(const BlockContext& c) {
  const auto [year, month] = c.year.span.month(c.month_index);
  std::vector<const Night*> nights;
  for (const Night& night : c.year.nights)
    if (year_of(night.date) == year && month_of(night.date) == month) nights.push_back(&night);
  return nights;
}

/// The bars' axis: whole hours that hold every sunset and sunrise of the month; all 24 where the
/// Sun does not rise or set.
struct Axis {
  double from = 12, to = 36;  // hours
  double x = 0, width = 0;    // mm
  double at(double hours) const {
    return x + width * (std::clamp(hours, from, to) - from) / (to - from);
  }
};

Axis axis_of(const BlockContext& c, const std::vector<const Night*>& nights) {
  double earliest = 24, latest = 24;
  bool whole = false;
  for (const Night* night : nights) {
    if (night->sun == Presence::down_throughout || !night->sunset || !night->sunrise) {
      whole = whole || night->sun != Presence::up_throughout || nights.size() == 1;
      continue;
    }
    earliest = std::min(earliest, clock_hours(c.year.place.zone, *night, *night->sunset));
    latest = std::max(latest, clock_hours(c.year.place.zone, *night, *night->sunrise));
  }
  Axis axis;
  if (!whole && latest > earliest + 1) {
    axis.from = std::max(12.0, std::floor(earliest - 0.15));
    axis.to = std::min(36.0, std::ceil(latest + 0.15));
  }
  return axis;
}

/// Cuts a span at the zone's clock changes, so that each piece has one offset.
std::vector<TimeSpan> by_offset(const BlockContext& c, TimeSpan span) {
  std::vector<TimeSpan> pieces;
  for (const ClockChange& change : c.year.clock_changes)
    if (change.at > span.from && change.at < span.to) {
      pieces.push_back({span.from, change.at - Days(Seconds(1))});
      span.from = change.at;
    }
  pieces.push_back(span);
  return pieces;
}

struct Row {
  const Night& night;
  double top, height;
};

void draw_bar(const BlockContext& c, const Axis& axis, const Row& row, std::vector<Mark>& out) {
  const Zone& zone = c.year.place.zone;
  const double top = row.top + row.height * 0.12, height = row.height * 0.76;
  const auto box = [&](const TimeSpan& piece) {
    const double x1 = axis.at(clock_hours(zone, row.night, piece.from));
    const double x2 = axis.at(clock_hours(zone, row.night, piece.to));
    return Box{x1, top, x2 - x1, height};
  };
  for (const ToneSpan& span : tone_spans(row.night)) {
    if (span.tone == SkyTone::day) continue;
    for (const TimeSpan& piece : by_offset(c, {span.from, span.to}))
      if (const Box b = box(piece); b.width > 0.01)
        out.push_back(Fill{Path::rectangle(b), tone_ink(c.theme, span.tone)});
  }
  // The Moon's time up: a light band whose thickness follows the lit part, with edges so that it
  // shows on every tone.
  const double thick = height * (0.16 + 0.36 * row.night.moon_lit);
  for (const TimeSpan& up : moon_spans(row.night))
    for (const ToneSpan& tone : tone_spans(row.night)) {
      if (tone.tone == SkyTone::day) continue;
      const TimeSpan common{std::max(up.from, tone.from), std::min(up.to, tone.to)};
      if (!(common.from < common.to)) continue;
      for (const TimeSpan& piece : by_offset(c, common)) {
        Box b = box(piece);
        if (b.width < 0.05) continue;
        b.y = top + (height - thick) / 2;
        b.height = thick;
        out.push_back(Fill{Path::rectangle(b), c.theme.paper});
        for (double y : {b.y, b.bottom()})
          out.push_back(Stroke{Path::polyline({{b.x, y}, {b.right(), y}}),
                               c.theme.hairline_mm,
                               c.theme.blue_soft,
                               {},
                               false});
      }
    }
}

/// What a row says on its bar when the night is out of the ordinary.
std::string bar_note(const BlockContext& c, const Night& night) {
  for (const char* key : {"sun-up-all-night", "short-date", "no-civil-dark"})
    if (std::find(night.notes.begin(), night.notes.end(), key) != night.notes.end())
      return c.words("night-note." + std::string(key));
  return {};
}

double dark_minutes(const std::vector<TimeSpan>& spans) {
  double sum = 0;
  for (const TimeSpan& span : spans) sum += (span.to - span.from).count() * 1440.0;
  return sum;
}

std::string dark_hours(const BlockContext& c, const Night& night) {
  const double total = dark_minutes(night.dark_or_darkest);
  return total < 0.5 ? std::string("–") : c.words.duration(total);
}

/// Moon cells: a time where it happens between sunset and sunrise, else whether the Moon is up at
/// that end of the night.
std::string moon_cell(const BlockContext& c, const Night& night, bool rise) {
  if (night.from == night.to) return "–";  // a date that the zone skipped
  const Ut begin = night.sunset.value_or(night.from), end = night.sunrise.value_or(night.to);
  for (Ut t : rise ? night.moonrises : night.moonsets)
    if (t >= begin && t <= end) return c.words.time(c.year.place.zone.civil(t));
  bool up_at_end = night.moon_up_at_dusk;
  for (const Event& event : night.events) {
    if (event.at < begin || event.at > end) continue;
    if (event.kind == EventKind::moonrise) up_at_end = true;
    if (event.kind == EventKind::moonset) up_at_end = false;
  }
  return (rise ? night.moon_up_at_dusk : up_at_end) ? c.words("night-bars.up") : "–";
}

/// A clock change within the night: a line across its bar with the step, "+1 h", beside it.
void mark_clock_change(const BlockContext& c, Setter& set, const Axis& axis, const Row& row,
                       std::vector<Mark>& out) {
  for (const ClockChange& change : c.year.clock_changes) {
    if (change.at < row.night.from || !(change.at < row.night.to)) continue;
    const double hours =
        std::chrono::duration<double, std::ratio<3600>>(change.after - change.before).count();
    const std::string step =
        (hours > 0 ? "+" : "") +
        c.words("night-bars.hours",
                {{"n", c.words.number(hours, hours == std::round(hours) ? 0 : 1)}});
    Style style = set.table();
    style.face = Face::condensed_bold;
    const double x =
        axis.at(clock_hours(c.year.place.zone, row.night, change.at - Days(Seconds(1))));
    const double width = set.width(step, style) + 1.2;
    out.push_back(
        Fill{Path::rectangle({x - width, row.top + 0.15, width, row.height - 0.3}), c.theme.paper});
    set.left(x - width + 0.6,
             row.top + row.height / 2 + c.type.cap_height(style.face, style.size_pt) / 2, step,
             style);
  }
}

/// Neighbouring rows with the same note share one label.
void label_bars(const BlockContext& c, Setter& set, const Axis& axis,
                const std::vector<const Night*>& nights, double bars_top, double pitch,
                std::vector<Mark>& out) {
  const Style quiet = set.table();
  for (std::size_t i = 0; i < nights.size();) {
    const std::string note = bar_note(c, *nights[i]);
    std::size_t end = i + 1;
    while (end < nights.size() && bar_note(c, *nights[end]) == note) ++end;
    if (!note.empty()) {
      const double width = set.width(note, quiet), x = axis.x + (axis.width - width) / 2;
      const double middle = bars_top + pitch * static_cast<double>(i + end) / 2;
      out.push_back(Fill{Path::rectangle({x - 1, middle - pitch / 2 + 0.2, width + 2, pitch - 0.4}),
                         c.theme.paper});
      set.left(x, middle + c.type.cap_height(quiet.face, quiet.size_pt) / 2, note, quiet);
    }
    i = end;
  }
}

/// What the bars' tones mean, right-aligned; returns the width used.
double draw_key(const BlockContext& c, Setter& set, const Style& style, double right, double y,
                std::vector<Mark>& out) {
  constexpr double swatch = 4, gap = 1, between = 2;  // mm
  struct Entry {
    Ink ink;
    std::string label;
  };
  std::vector<Entry> entries;
  for (SkyTone tone : {SkyTone::civil, SkyTone::nautical, SkyTone::astronomical, SkyTone::dark})
    entries.push_back({tone_ink(c.theme, tone),
                       c.words(fmt::format("night-bars.tone-{}", static_cast<int>(tone)))});
  entries.push_back({c.theme.dark, c.words("night-bars.moon-up")});
  double width = -between;
  for (const Entry& entry : entries)
    width += swatch + gap + set.width(entry.label, style) + between;
  double x = right - width;
  for (std::size_t i = 0; i < entries.size(); ++i) {
    out.push_back(Fill{Path::rectangle({x, y, swatch, 2.8}), entries[i].ink});
    if (i + 1 == entries.size())
      out.push_back(Fill{Path::rectangle({x, y + 0.8, swatch, 1.2}), c.theme.paper});
    set.left(x + swatch + gap, y + 2.5, entries[i].label, style);
    x += swatch + gap + set.width(entries[i].label, style) + between;
  }
  return width;
}

/// Under the times: what "dark" means this month, and the "up" of the Moon's columns.
std::string foot_note(const BlockContext& c, const std::vector<const Night*>& nights) {
  const bool always_day = std::all_of(nights.begin(), nights.end(), [](const Night* n) {
    return n->sun == Presence::up_throughout;
  });
  if (always_day) return c.words("night-bars.no-night");
  const double limit = nights.front()->dark_limit.degrees();
  return c.words(limit < -15 ? "night-bars.limit" : "night-bars.limit-shallow",
                 {{"degrees", c.words.number(-limit, 0)}});
}

}  // namespace

double draw_night_bars(const BlockContext& c, const BlockOptions&, const Box& area,
                       std::vector<Mark>& out) {
  Setter set(c, out);
  const Zone& zone = c.year.place.zone;
  const std::vector<const Night*> nights = nights_of_month(c);
  set.rule(area.x, area.right(), area.y, c.theme.blue, 0.25);
  const double title = 0.8;
  const double head = 6.8, foot = 4.4;
  const double rows = static_cast<double>(nights.size());
  const double pitch = std::clamp((area.height - title - head - foot) / rows, 2.9, 4.4);
  const bool wide = c.order.clock_12;
  const double time_column = wide ? 13.0 : 10.4;

  // Columns: date, four times of the Sun, two of the Moon, lit part with its picture, dark hours,
  // then the bar.
  const double date_width = 11.5, lit_width = 12.0, dark_width = 9.5;
  std::vector<double> centres;
  double x = area.x + date_width;
  for (int i = 0; i < 6; ++i, x += time_column) centres.push_back(x + time_column / 2);
  const double lit_right = x + 6.6, moon_x = x + 9.4;
  x += lit_width;
  const double dark_right = x + dark_width - 1.5;
  x += dark_width + 1.5;
  Axis axis = axis_of(c, nights);
  axis.x = x;
  axis.width = area.right() - x;

  const Style cell = set.table();
  Style head_style = cell;
  head_style.ink = c.theme.soft;
  const double top = area.y + title;
  const std::string_view heads[] = {"sunset",  "dark-from", "dark-to",
                                    "sunrise", "moonrise",  "moonset"};
  for (std::size_t i = 0; i < 6; ++i) {
    const std::string key(heads[i]);
    set.centre(centres[i], top + 2.7, c.words("night-bars." + key + "-1"), head_style);
    set.centre(centres[i], top + 5.7, c.words("night-bars." + key + "-2"), head_style);
  }
  set.centre((lit_right + moon_x) / 2 - 0.8, top + 2.7, c.words("night-bars.lit-1"), head_style);
  set.centre((lit_right + moon_x) / 2 - 0.8, top + 5.7, c.words("night-bars.lit-2"), head_style);
  set.right(dark_right, top + 2.7, c.words("night-bars.hours-1"), head_style);
  set.right(dark_right, top + 5.7, c.words("night-bars.hours-2"), head_style);

  // Hour marks behind the bars.
  const double bars_top = top + head, bars_bottom = bars_top + pitch * rows;
  const int step = axis.to - axis.from > 16 ? 3 : axis.to - axis.from > 9 ? 2 : 1;
  std::vector<std::pair<double, double>> labels;  // taken: left and right ends
  const auto label = [&](int hour, const std::string& words) {
    const double width = set.width(words, head_style);
    const double from = std::clamp(axis.at(hour) - width / 2, axis.x, area.right() - width);
    for (const auto& [taken_from, taken_to] : labels)
      if (from < taken_to + 1 && from + width > taken_from - 1) return;
    set.left(from, top + 5.2, words, head_style);
    labels.emplace_back(from, from + width);
  };
  label(24, c.words("night-bars.midnight"));
  for (int hour = static_cast<int>(std::ceil(axis.from)); hour <= static_cast<int>(axis.to);
       ++hour) {
    const bool named = hour % step == 0;
    const double at = axis.at(hour);
    out.push_back(Stroke{Path::polyline({{at, bars_top - (named ? 1.2 : 0.4)}, {at, bars_bottom}}),
                         c.theme.hairline_mm,
                         c.theme.faint,
                         {},
                         false});
    if (named && hour != 24) label(hour, c.words.whole_hour(hour));
  }

  std::set<Date> session_nights;
  for (const Session& session : c.site.sessions)
    for (Date date : session_dates(session, c.year.span)) session_nights.insert(date);

  double y = bars_top;
  for (std::size_t i = 0; i < nights.size(); ++i, y += pitch) {
    const Night& night = *nights[i];
    const Row row{night, y, pitch};
    const double baseline = y + pitch / 2 + c.type.cap_height(cell.face, cell.size_pt) / 2;
    const bool session = session_nights.contains(night.date);
    const auto weekday = weekday_of(night.date);
    if (i > 0 && weekday == std::chrono::Monday)
      set.rule(area.x, axis.x - 1.5, y, c.theme.faint, c.theme.hairline_mm);
    const bool weekend = weekday == std::chrono::Friday || weekday == std::chrono::Saturday;
    const Style date_style = weekend || session ? set.strong(cell) : cell;
    set.left(area.x, baseline, c.words.weekday_short(weekday), date_style);
    set.right(area.x + 10.0, baseline, std::to_string(day_of(night.date)), date_style);
    if (session) {
      const double h = 0.95;  // a filled lozenge: the group's own night
      const Point p{area.x + 11.3, y + pitch / 2};
      out.push_back(Fill{
          Path::polyline({{p.x, p.y - h}, {p.x + h, p.y}, {p.x, p.y + h}, {p.x - h, p.y}}, true),
          c.theme.blue});
    }
    const auto time_or_dash = [&](const std::optional<Ut>& t) {
      return t ? c.words.time(zone.civil(*t)) : std::string("–");
    };
    const bool deep = night.dark_limit.degrees() < -15, middle = night.dark_limit.degrees() < -9;
    const auto& dusk = deep     ? night.astronomical_dusk
                       : middle ? night.nautical_dusk
                                : night.civil_dusk;
    const auto& dawn = deep     ? night.astronomical_dawn
                       : middle ? night.nautical_dawn
                                : night.civil_dawn;
    set.centre(centres[0], baseline, time_or_dash(night.sunset), cell);
    set.centre(centres[1], baseline, time_or_dash(dusk), cell);
    set.centre(centres[2], baseline, time_or_dash(dawn), cell);
    set.centre(centres[3], baseline, time_or_dash(night.sunrise), cell);
    set.centre(centres[4], baseline, moon_cell(c, night, true), cell);
    set.centre(centres[5], baseline, moon_cell(c, night, false), cell);
    set.right(lit_right, baseline,
              c.words("night-bars.percent", {{"n", c.words.number(100 * night.moon_lit, 0)}}),
              cell);
    const auto& looks = c.year.month_moons[static_cast<std::size_t>(c.month_index)];
    if (i < looks.size())
      draw_moon({moon_x, y + pitch / 2}, std::min(1.45, pitch * 0.42), looks[i].lit,
                looks[i].bright_limb_from_zenith, c.theme, out);
    set.right(dark_right, baseline, dark_hours(c, night), set.strong(cell));
    draw_bar(c, axis, row, out);
    mark_clock_change(c, set, axis, row, out);
  }
  label_bars(c, set, axis, nights, bars_top, pitch, out);

  // The key under the bars, and what the dark hours count.
  const double key_y = bars_bottom + 1.2, key_baseline = key_y + 2.5;
  const double key_width = draw_key(c, set, head_style, area.right(), key_y, out);
  std::string foot_words = foot_note(c, nights);
  if (!session_nights.empty()) foot_words.append(" ").append(c.words("night-bars.own"));
  set.fitted(area.x, key_baseline, foot_words, head_style, area.width - key_width - 3);
  return bars_bottom + foot - area.y;
}

}  // namespace duskleaf
