#include "catalogue/constellations.hpp"

#include <algorithm>
#include <fmt/format.h>

#include "sheet/blocks/blocks.hpp"
#include "sheet/flow_text.hpp"

namespace duskleaf {
namespace {

constexpr double row_pitch = 2.88, column_gap = 4.5;  // mm

std::string name_of(const BlockContext& c, const ConstellationEvening& row) {
  const Figure& figure = figures()[static_cast<std::size_t>(row.figure)];
  const std::string name(constellations()[static_cast<std::size_t>(figure.constellation)].name);
  return figure.part.empty()
             ? name
             : name + " " + c.words("constellations.part-" + std::string(figure.part));
}

std::string list_of(const BlockContext& c, const std::vector<const ConstellationEvening*>& rows) {
  std::string text;
  for (const ConstellationEvening* row : rows)
    text += (text.empty() ? "" : ", ") + name_of(c, *row);
  return text;
}

/// One of the three columns: a phase's constellations, highest first. Returns the height used.
double draw_phase(const BlockContext& c, Setter& set, FigurePhase phase, const Box& area,
                  std::vector<Mark>& out) {
  std::vector<const ConstellationEvening*> rows;
  for (const ConstellationEvening& row : c.evening().constellations)
    if (row.phase == phase && row.state != FigureState::below) rows.push_back(&row);
  std::stable_sort(rows.begin(), rows.end(), [](const auto* a, const auto* b) {
    return a->mean_place.altitude > b->mean_place.altitude;
  });
  const Zone& zone = c.year.place.zone;
  Style cell = set.table();
  if (c.order.clock_12) cell.size_pt = c.theme.table_pt;
  Style head = cell;
  head.ink = c.theme.soft;
  const bool wide = c.order.clock_12;
  const double time_width = wide ? 10.9 : 9.2, name_width = wide ? 16.2 : 17.5,
               where_width = wide ? 10.8 : 12.0;
  const double where_x = area.x + name_width + where_width, highest_x = where_x + time_width,
               sets_x = highest_x + time_width;
  const double months_x = sets_x + 1.3, month_cell = (area.right() - months_x) / 12;

  double y = area.y;
  set.left(area.x, y + 2.6,
           c.words(fmt::format("constellations.phase-{}", static_cast<int>(phase))),
           {Face::bold, 8, c.theme.blue});
  set.right(where_x, y + 2.6, c.words("constellations.where"), head);
  set.right(highest_x, y + 2.6, c.words("constellations.highest"), head);
  set.right(sets_x, y + 2.6, c.words("constellations.sets"), head);
  set.left(months_x, y + 2.6, c.words("constellations.months"), head);
  y += 3.3;
  if (rows.empty()) set.left(area.x, y + 2.5, c.words("constellations.none"), head);
  const int month = c.year.span.month(c.month_index).second;
  for (const ConstellationEvening* row : rows) {
    const double baseline = y + 2.4;
    Style name = row->on_equator ? set.strong(cell) : cell;
    if (row->state == FigureState::partly_up) name.ink = c.theme.soft;
    set.fitted(area.x, baseline, name_of(c, *row), name, name_width);
    const double altitude = row->mean_place.altitude.degrees();
    const std::string direction = c.words.direction_short(row->mean_place.azimuth);
    set.right(where_x, baseline,
              altitude < 5
                  ? c.words("constellations.low", {{"direction", direction}})
                  : c.words("constellations.at",
                            {{"direction", direction}, {"altitude", c.words.number(altitude, 0)}}),
              cell);
    set.right(highest_x, baseline, row->highest ? c.words.time(zone.civil(*row->highest)) : "–",
              cell);
    set.right(sets_x, baseline,
              row->sets              ? c.words.time(zone.civil(*row->sets))
              : row->half_never_sets ? c.words("constellations.never-sets")
                                     : std::string("–"),
              cell);
    for (std::size_t m = 0; m < 12; ++m) {
      const double x = months_x + month_cell * static_cast<double>(m);
      if (row->evening_sight[m])
        out.push_back(Fill{Path::rectangle({x, baseline - 1.8, month_cell - 0.12, 1.8}),
                           static_cast<int>(m) + 1 == month ? c.theme.blue : c.theme.astronomical});
      else
        out.push_back(
            Fill{Path::rectangle({x, baseline - 0.2, month_cell - 0.12, 0.2}), c.theme.faint});
    }
    y += row_pitch;
  }
  return y - area.y;
}

}  // namespace

double draw_constellations(const BlockContext& c, const BlockOptions&, const Box& area,
                           std::vector<Mark>& out) {
  Setter set(c, out);
  const EveningSky& evening = c.evening();
  const std::string when = c.words(
      "constellations.aside", {{"date", c.words.day_month(evening.date)},
                               {"time", c.words.time(c.year.place.zone.civil(evening.moment))}});
  double y =
      area.y + set.heading(area.x, area.y, area.width, c.words("constellations.title"), when);
  if (evening.shift == EveningShift::no_stars) {
    const std::string text = evening.stars_return
                                 ? c.words("constellations.too-bright-until",
                                           {{"date", c.words.day_month(*evening.stars_return)}})
                                 : c.words("constellations.too-bright");
    return y + set.paragraph(area.x, y, area.width, text, set.body()) - area.y;
  }
  const double width = (area.width - 2 * column_gap) / 3;
  double used = 0, x = area.x;
  for (const FigurePhase phase : {FigurePhase::rising, FigurePhase::high, FigurePhase::sinking}) {
    used = std::max(used, draw_phase(c, set, phase, {x, y, width, area.height}, out));
    x += width + column_gap;
  }
  y += used + 0.3;

  std::vector<const ConstellationEvening*> below, never, circumpolar;
  for (const ConstellationEvening& row : evening.constellations) {
    if (row.circumpolar) circumpolar.push_back(&row);
    if (row.state == FigureState::below) (row.never_rises ? never : below).push_back(&row);
  }
  const Style quiet{Face::condensed, c.theme.table_pt, c.theme.soft};
  std::vector<Run> rest;
  const auto list = [&](std::string_view key,
                        const std::vector<const ConstellationEvening*>& rows) {
    if (rows.empty()) return;
    rest.push_back({c.words(key), set.strong(quiet)});
    rest.push_back({list_of(c, rows) + ".", quiet});
  };
  list("constellations.below", below);
  list("constellations.never", never);
  list("constellations.circumpolar", circumpolar);
  rest.push_back({c.words("constellations.note"), quiet});
  y += flow(set, area.x, y, area.width, rest, 1.18);
  return y - area.y;
}

}  // namespace duskleaf
