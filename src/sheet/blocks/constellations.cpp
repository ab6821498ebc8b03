#include <fmt/format.h>

#include <algorithm>

#include "catalogue/constellations.hpp"
#include "sheet/blocks/blocks.hpp"
#include "sheet/setting.hpp"

namespace duskleaf {
namespace {

std::string name_of(const BlockContext& c, const ConstellationEvening& row) {
  const Figure& figure = figures()[static_cast<std::size_t>(row.figure)];
  const std::string name(constellations()[static_cast<std::size_t>(figure.constellation)].name);
  return figure.part.empty() ? name : name + " " + c.words("constellations.part-" + std::string(figure.part));
}

std::string list_of(const BlockContext& c, const std::vector<const ConstellationEvening*>& rows) {
  std::string text;
  for (const ConstellationEvening* row : rows) text += (text.empty() ? "" : ", ") + name_of(c, *row);
  return text;
}

}  // namespace

double draw_constellations(const BlockContext& c, const BlockOptions&, const Box& area, std::vector<Mark>& out) {
  Setter set(c, out);
  const EveningSky& evening = c.evening();
  const Zone& zone = c.year.place.zone;
  const std::string when = c.words("constellations.aside", {{"date", c.words.day_month(evening.date)},
                                                            {"time", c.words.time(zone.civil(evening.moment))}});
  double y = area.y + set.heading(area.x, area.y, area.width, c.words("constellations.title"), when);

  // Columns from the right: the year's months, then sets, highest, rises, then where it stands.
  const double month_cell = 1.35, months_x = area.right() - 12 * month_cell;
  const double time_width = c.order.clock_12 ? 11.6 : 9.4;
  const double sets_x = months_x - 2.0, highest_x = sets_x - time_width, rises_x = highest_x - time_width;
  const double where_x = rises_x - time_width;
  const Style cell = set.table();
  Style head = cell;
  head.ink = c.theme.soft;
  const double pitch = 3.3;
  set.right(where_x, y + 2.4, c.words("constellations.where"), head);
  set.right(rises_x, y + 2.4, c.words("constellations.rises"), head);
  set.right(highest_x, y + 2.4, c.words("constellations.highest"), head);
  set.right(sets_x, y + 2.4, c.words("constellations.sets"), head);
  set.left(months_x, y + 2.4, c.words("constellations.months"), head);
  y += 3.4;

  const auto [year, month] = c.year.span.month(c.month_index);
  std::vector<const ConstellationEvening*> later, not_tonight, never;
  for (const FigurePhase phase : {FigurePhase::rising, FigurePhase::high, FigurePhase::sinking}) {
    std::vector<const ConstellationEvening*> rows;
    for (const ConstellationEvening& row : evening.constellations)
      if (row.phase == phase && row.state != FigureState::below) rows.push_back(&row);
    if (rows.empty()) continue;
    std::stable_sort(rows.begin(), rows.end(), [](const auto* a, const auto* b) {
      return a->mean_place.altitude > b->mean_place.altitude;
    });
    set.left(area.x, y + 3.0, c.words(fmt::format("constellations.phase-{}", static_cast<int>(phase))),
             {Face::bold, 8, c.theme.blue});
    y += 3.7;
    for (const ConstellationEvening* row : rows) {
      const double baseline = y + 2.5;
      std::string name = name_of(c, *row);
      set.fitted(area.x + 1.5, baseline, name, row->on_equator ? set.strong(cell) : cell, where_x - area.x - 13.5);
      const bool partly = row->state == FigureState::partly_up;
      set.right(where_x, baseline,
                c.words(partly ? "constellations.partly" : "constellations.at",
                        {{"direction", c.words.direction_short(row->mean_place.azimuth)},
                         {"altitude", c.words.number(row->mean_place.altitude.degrees(), 0)}}),
                cell);
      const auto time = [&](const std::optional<Ut>& t) {
        return t ? c.words.time(zone.civil(*t)) : row->circumpolar ? c.words("constellations.always") : std::string("–");
      };
      set.right(rises_x, baseline, time(row->rises), cell);
      set.right(highest_x, baseline, row->highest ? c.words.time(zone.civil(*row->highest)) : "–", cell);
      set.right(sets_x, baseline, time(row->sets), cell);
      for (std::size_t m = 0; m < 12; ++m) {
        const Box box{months_x + month_cell * static_cast<double>(m) + 0.12, baseline - 1.75, month_cell - 0.24, 1.75};
        if (row->evening_sight[m])
          out.push_back(Fill{Path::rectangle(box), static_cast<int>(m) + 1 == month ? c.theme.blue : c.theme.nautical});
        else
          out.push_back(Fill{Path::rectangle({box.x, box.bottom() - 0.25, box.width, 0.25}), c.theme.faint});
      }
      y += pitch;
    }
  }
  for (const ConstellationEvening& row : evening.constellations)
    if (row.state == FigureState::below) (row.never_rises ? never : not_tonight).push_back(&row);
  y += 1.0;
  if (!not_tonight.empty())
    y += set.lead_in(area.x, y, area.width, c.words("constellations.below"), list_of(c, not_tonight), set.small());
  if (!never.empty())
    y += set.lead_in(area.x, y, area.width, c.words("constellations.never"), list_of(c, never), set.small());
  std::vector<const ConstellationEvening*> always;
  for (const ConstellationEvening& row : evening.constellations)
    if (row.circumpolar) always.push_back(&row);
  if (!always.empty())
    y += set.lead_in(area.x, y, area.width, c.words("constellations.circumpolar"), list_of(c, always), set.small());
  y += set.paragraph(area.x, y, area.width, c.words("constellations.note"), set.small());
  return y - area.y;
}

}  // namespace duskleaf
