// The night bars' drawing: each row's twilights as tones, and the Moon's time up over them.
#include "sheet/night_bar_drawing.hpp"

#include <algorithm>
#include <array>
#include <cmath>
#include <fmt/format.h>

#include "sheet/night_tones.hpp"

namespace duskleaf {
namespace {

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

/// What a row says on its bar when the night is out of the ordinary.
std::string bar_note(const BlockContext& c, const Night& night) {
  for (const char* key : {"sun-up-all-night", "short-date", "no-civil-dark"})
    if (std::find(night.notes.begin(), night.notes.end(), key) != night.notes.end())
      return c.words("night-note." + std::string(key));
  return {};
}

}  // namespace

double clock_hours(const Zone& zone, const Night& night, Ut t) {
  const double offset_hours = static_cast<double>(zone.offset_at(t).count()) / 3600.0;
  return (t - ut_midnight(night.date)).count() * 24.0 + offset_hours;
}

double NightAxis::at(double hours) const {
  return x + width * (std::clamp(hours, from, to) - from) / (to - from);
}

NightAxis night_axis(const BlockContext& c, const std::vector<const Night*>& nights) {
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
  NightAxis axis;
  if (!whole && latest > earliest + 1) {
    axis.from = std::max(12.0, std::floor(earliest - 0.15));
    axis.to = std::min(36.0, std::ceil(latest + 0.15));
  }
  return axis;
}

void draw_night_bar(const BlockContext& c, const NightAxis& axis, const NightRow& row,
                    std::vector<Mark>& out) {
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
  // Where the Sun stays up the Moon is shown by day: it is all that the night has to show.
  const bool by_day = row.night.sun == Presence::up_throughout;
  for (const TimeSpan& up : moon_spans(row.night))
    for (const ToneSpan& tone : tone_spans(row.night)) {
      if (tone.tone == SkyTone::day && !by_day) continue;
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

void mark_clock_change(const BlockContext& c, Setter& set, const NightAxis& axis,
                       const NightRow& row, std::vector<Mark>& out) {
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

void draw_hour_lines(const BlockContext& c, Setter& set, const NightAxis& axis, const Style& style,
                     double baseline, double bars_top, double bars_bottom, std::vector<Mark>& out) {
  const double right = axis.x + axis.width;
  const auto words = [&](int hour) {
    return hour == 24 ? c.words("night-bars.midnight") : c.words.whole_hour(hour);
  };
  const auto half = [&](int hour) { return set.width(words(hour), style) / 2; };
  const int first = static_cast<int>(std::ceil(axis.from)), last = static_cast<int>(axis.to);
  // The labelled hours are evenly spaced from midnight, as closely as their words have room; one
  // that would hang over an end of the axis has none.
  constexpr double apart = 2.2;  // mm
  const auto has_room = [&](int hour) {
    return axis.at(hour) - half(hour) >= axis.x - 0.5 && axis.at(hour) + half(hour) <= right + 0.01;
  };
  const auto all_clear = [&](int step) {
    double taken = axis.x - 10;
    for (int hour = first; hour <= last; ++hour) {
      if (hour % step != 0 || !has_room(hour)) continue;
      if (axis.at(hour) - half(hour) < taken + apart) return false;
      taken = axis.at(hour) + half(hour);
    }
    return true;
  };
  constexpr std::array steps{1, 2, 3, 4, 6, 12};
  const int step = *std::find_if(steps.begin(), steps.end() - 1, all_clear);
  for (int hour = first; hour <= last; ++hour) {
    const bool named = hour % step == 0 && has_room(hour);
    const double at = axis.at(hour);
    out.push_back(Stroke{Path::polyline({{at, bars_top - (named ? 1.2 : 0.4)}, {at, bars_bottom}}),
                         c.theme.hairline_mm,
                         c.theme.faint,
                         {},
                         false});
    if (named) set.centre(at, baseline, words(hour), style);
  }
}

void label_night_bars(const BlockContext& c, Setter& set, const NightAxis& axis,
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

double draw_night_key(const BlockContext& c, Setter& set, const Style& style, double right,
                      double y, std::vector<Mark>& out) {
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

}  // namespace duskleaf
