#include "catalogue/constellations.hpp"

#include <algorithm>
#include <array>
#include <fmt/format.h>
#include <numeric>

#include "sheet/blocks/blocks.hpp"
#include "sheet/flow_text.hpp"

namespace duskleaf {
namespace {

constexpr double row_pitch = 2.88, column_gap = 4.0, least_gap = 1.2, most_gap = 4.0;  // mm

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

using Months = std::array<bool, 12>;

/// The months whose evenings show none of the constellations: too bright.
Months bright_months(const BlockContext& c) {
  Months bright;
  bright.fill(true);
  for (const ConstellationEvening& row : c.evening().constellations)
    for (std::size_t m = 0; m < 12; ++m) bright[m] = bright[m] && !row.evening_sight[m];
  return bright;
}

/// A break that is of bright months alone counts as none: the block's note names these.
Months without_bright_breaks(Months sight, const Months& bright) {
  for (std::size_t first = 0; first < 12; ++first) {
    if (!sight[first]) continue;
    std::size_t next = first + 1;
    while (bright[next % 12] && next < first + 12) ++next;
    if (next < first + 12 && sight[next % 12])
      for (std::size_t m = first + 1; m < next; ++m) sight[m % 12] = true;
  }
  return sight;
}

/// "Nov–Mar", "Aug–Oct, Feb".
std::string months_text(const BlockContext& c, const Months& sight) {
  const auto seen = [&](std::size_t month) { return sight[month % 12]; };
  if (std::all_of(sight.begin(), sight.end(), [](bool s) { return s; }))
    return c.words("constellations.all-year");
  std::string text;
  // Spans that cross the turn of the year are whole: begun where a month of no sight is before.
  for (std::size_t first = 0; first < 12; ++first) {
    if (!seen(first) || seen(first + 11)) continue;
    std::size_t last = first;
    while (seen(last + 1)) ++last;
    const auto name = [&](std::size_t month) {
      return c.words.month_short(static_cast<int>(month % 12) + 1);
    };
    if (!text.empty()) text += c.words("happening.list-comma");
    text += first == last ? name(first)
                          : c.words("happening.span", {{"from", name(first)}, {"to", name(last)}});
  }
  return text.empty() ? "–" : text;
}

/// The cells of a row: its name, then the numbers.
constexpr std::size_t cells = 5;
struct Row {
  std::array<std::string, cells> text;
  bool strong;
};

Row row_of(const BlockContext& c, const ConstellationEvening& e, const Months& bright) {
  const Zone& zone = c.year.place.zone;
  const double altitude = e.mean_place.altitude.degrees();
  const std::string direction = c.words.direction_short(e.mean_place.azimuth);
  std::string name = name_of(c, e);
  if (e.state == FigureState::partly_up) name = c.words("constellations.partly", {{"name", name}});
  return {{name,
           altitude < 5 ? c.words("constellations.low", {{"direction", direction}})
                        : c.words("constellations.at", {{"direction", direction},
                                                        {"altitude", c.words.number(altitude, 0)}}),
           e.highest ? c.words.time(zone.civil(*e.highest)) : "–",
           e.sets              ? c.words.time(zone.civil(*e.sets))
           : e.half_never_sets ? c.words("constellations.never-sets")
                               : std::string("–"),
           months_text(c, without_bright_breaks(e.evening_sight, bright))},
          e.on_equator};
}

/// A phase's constellations, highest first.
std::vector<const ConstellationEvening*> rows_of(const BlockContext& c, FigurePhase phase,
                                                 bool with_low) {
  std::vector<const ConstellationEvening*> rows;
  for (const ConstellationEvening& row : c.evening().constellations)
    if (row.phase == phase &&
        (row.state == FigureState::up || (with_low && row.state == FigureState::partly_up)))
      rows.push_back(&row);
  std::stable_sort(rows.begin(), rows.end(), [](const auto* a, const auto* b) {
    return a->mean_place.altitude > b->mean_place.altitude;
  });
  return rows;
}

std::string phase_title(const BlockContext& c, FigurePhase phase) {
  return c.words(fmt::format("constellations.phase-{}", static_cast<int>(phase)));
}

/// One of the three tables, with its columns as wide as their widest cells.
struct PhaseTable {
  std::vector<Row> rows;  // the heads first
  std::array<double, cells> widths{};
  double sum() const { return std::accumulate(widths.begin(), widths.end(), 0.0); }
  double least_width() const { return sum() + least_gap * (cells - 1); }
};

struct TableStyles {
  Style title, head, cell, strong;
  const Style& of(std::size_t row, std::size_t k, bool bold) const {
    return row == 0 ? (k == 0 ? title : head) : k == 0 && bold ? strong : cell;
  }
};

PhaseTable phase_table(const BlockContext& c, const Setter& set, const TableStyles& styles,
                       FigurePhase phase, bool with_low) {
  PhaseTable table;
  table.rows.push_back(
      {{phase_title(c, phase), c.words("constellations.where"), c.words("constellations.highest"),
        c.words("constellations.sets"), c.words("constellations.months")},
       false});
  const Months bright = bright_months(c);
  for (const ConstellationEvening* e : rows_of(c, phase, with_low))
    table.rows.push_back(row_of(c, *e, bright));
  for (std::size_t i = 0; i < table.rows.size(); ++i)
    for (std::size_t k = 0; k < cells; ++k)
      table.widths[k] = std::max(
          table.widths[k], set.width(table.rows[i].text[k], styles.of(i, k, table.rows[i].strong)));
  return table;
}

/// Returns the height used.
double draw_phase(const BlockContext& c, Setter& set, const TableStyles& styles, PhaseTable table,
                  const Box& area) {
  // Where room is short the months are set smaller, and names where that is not enough.
  const double short_of = std::max(0.0, table.least_width() - area.width);
  double& months = table.widths[cells - 1];
  const double taken =
      std::min(short_of, months - set.width(table.rows[0].text[cells - 1], styles.head));
  months -= taken;
  table.widths[0] -= short_of - taken;
  const double gap = std::clamp((area.width - table.sum()) / (cells - 1), least_gap, most_gap);
  std::array<double, cells> right{};
  right[0] = area.x + table.widths[0];
  for (std::size_t k = 1; k < cells; ++k) right[k] = right[k - 1] + gap + table.widths[k];
  double y = area.y;
  for (std::size_t i = 0; i < table.rows.size(); ++i) {
    const double baseline = i == 0 ? y + 2.6 : y + 2.4;
    for (std::size_t k = 0; k < cells; ++k) {
      const std::string& text = table.rows[i].text[k];
      const Style& style = styles.of(i, k, table.rows[i].strong);
      const double width = std::min(table.widths[k] + 0.01, set.width(text, style));
      set.fitted(k == 0 ? area.x : right[k] - width, baseline, text, style, table.widths[k] + 0.01);
    }
    y += i == 0 ? 3.3 : row_pitch;
  }
  if (table.rows.size() == 1)
    set.left(area.x, y + 2.5, c.words("constellations.none"), styles.head);
  return y - area.y;
}

}  // namespace

double draw_constellations(const BlockContext& c, const BlockOptions& options, const Box& area,
                           std::vector<Mark>& out) {
  Setter set(c, out);
  const EveningSky& evening = c.evening();
  const CivilMinute moment = c.year.place.zone.civil(evening.moment);
  const int left_out = options.number("leave-out");
  // The table's key stands beside the table alone.
  const bool table_drawn = evening.shift != EveningShift::no_stars && left_out < 3;
  const std::string when =
      c.words(table_drawn ? "constellations.aside" : "constellations.aside-plain",
              {{"date", c.words.day_month(moment.date())}, {"time", c.words.time(moment)}});
  double y =
      area.y + set.heading(area.x, area.y, area.width, c.words("constellations.title"), when);
  if (evening.shift == EveningShift::no_stars) {
    const std::string text = evening.stars_return
                                 ? c.words("constellations.too-bright-until",
                                           {{"date", c.words.day_month(*evening.stars_return)}})
                                 : c.words("constellations.too-bright");
    return y + set.paragraph(area.x, y, area.width, text, set.body()) - area.y;
  }
  const Style quiet{Face::condensed, c.theme.table_pt, c.theme.soft};
  std::vector<Run> rest;
  const auto list = [&](const std::string& title,
                        const std::vector<const ConstellationEvening*>& rows) {
    if (rows.empty()) return;
    rest.push_back({title, set.strong(quiet)});
    rest.push_back({list_of(c, rows) + ".", quiet});
  };
  constexpr std::array phases{FigurePhase::rising, FigurePhase::high, FigurePhase::sinking};
  if (left_out >= 3) {
    for (const FigurePhase phase : phases)
      list(phase_title(c, phase) + ":", rows_of(c, phase, false));
    return y + flow(set, area.x, y, area.width, rest, 1.18) - area.y;
  }
  const bool with_low = left_out < 2;
  Style cell = set.table();
  cell.size_pt = c.theme.table_pt;
  Style head = cell;
  head.ink = c.theme.soft;
  const TableStyles styles{{Face::bold, 8, c.theme.blue}, head, cell, set.strong(cell)};
  std::vector<PhaseTable> tables;
  double spare = area.width - 2 * column_gap;
  for (const FigurePhase phase : phases) {
    tables.push_back(phase_table(c, set, styles, phase, with_low));
    spare -= tables.back().least_width();
  }
  double used = 0, x = area.x;
  for (const PhaseTable& table : tables) {
    const double width = table.least_width() + spare / 3;
    used = std::max(used, draw_phase(c, set, styles, table, {x, y, width, area.height}));
    x += width + column_gap;
  }
  y += used + 0.3;

  std::vector<const ConstellationEvening*> below, never, circumpolar;
  bool partly = false;
  for (const ConstellationEvening& row : evening.constellations) {
    if (row.circumpolar) circumpolar.push_back(&row);
    if (row.state == FigureState::below) (row.never_rises ? never : below).push_back(&row);
    partly = partly || row.state == FigureState::partly_up;
  }
  if (left_out < 1) {
    list(c.words("constellations.below"), below);
    list(c.words("constellations.never"), never);
  }
  list(c.words("constellations.circumpolar"), circumpolar);
  if (partly && with_low) rest.push_back({c.words("constellations.partly-note"), quiet});
  const Months bright = bright_months(c);
  if (std::any_of(bright.begin(), bright.end(), [](bool b) { return b; }))
    rest.push_back(
        {c.words("constellations.bright-note", {{"months", months_text(c, bright)}}), quiet});
  rest.push_back({c.words("constellations.note"), quiet});
  y += flow(set, area.x, y, area.width, rest, 1.18);
  return y - area.y;
}

}  // namespace duskleaf
