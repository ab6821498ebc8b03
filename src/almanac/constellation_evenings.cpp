// Semi-diurnal arc: cos H = (sin h - sin phi sin delta) / (cos phi cos delta), h = -34'
// (Explanatory Supplement to the Astronomical Almanac 1992, ch. 9). States, phases and the rule of
// the half: this project's conventions.
#include "almanac/constellation_evenings.hpp"

#include <algorithm>
#include <cmath>
#include <numbers>

#include "catalogue/constellations.hpp"
#include "events/site_sky.hpp"
#include "sky/horizon.hpp"

namespace duskleaf {
namespace {

constexpr double pi = std::numbers::pi;
constexpr Angle up_altitude = Angle::from_degrees(5);
constexpr Angle sight_altitude = Angle::from_degrees(15);
constexpr double sidereal_day =
    86164.0905 / 86400.0;  // days of UT1 (Explanatory Supplement 1992, ch. 2)

double centred(double radians) { return std::remainder(radians, 2 * pi); }

}  // namespace

DailyArc daily_arc(const Eigen::Vector3d& of_date, Angle latitude) {
  const EquatorialPlace place = to_equatorial(of_date);
  const double above = sin(star_rise_altitude) - sin(latitude) * sin(place.declination);
  const double swing = cos(latitude) * cos(place.declination);
  const double half = above >= swing ? 0.0 : above <= -swing ? pi : std::acos(above / swing);
  return {place.right_ascension.radians(), half};
}

FigureTimes figure_times(const std::vector<DailyArc>& stars, const Eigen::Vector3d& mean,
                         double sidereal_time) {
  FigureTimes times{};
  const auto never_sets = [](const DailyArc& s) { return s.half_arc >= pi; };
  const auto never_rises = [](const DailyArc& s) { return s.half_arc <= 0.0; };
  times.circumpolar = std::all_of(stars.begin(), stars.end(), never_sets);
  times.never_rises = std::all_of(stars.begin(), stars.end(), never_rises);
  times.half_never_sets =
      2 * std::count_if(stars.begin(), stars.end(), never_sets) >= std::ssize(stars);
  if (times.never_rises) return times;
  times.highest = centred(std::atan2(mean.y(), mean.x()) - sidereal_time);
  // Walk through the day's rises and sets in order of sidereal time, counting how many stars are
  // risen.
  struct Step {
    double at;  // sidereal time after the walk's start, [0, 2 pi)
    int change;
  };
  std::vector<Step> steps;
  const double start = sidereal_time - pi;
  int risen = 0;
  for (const DailyArc& s : stars) {
    if (never_sets(s)) ++risen;
    if (never_sets(s) || never_rises(s)) continue;
    if (std::abs(centred(start - s.right_ascension)) < s.half_arc) ++risen;
    const auto after_start = [&](double at) {
      const double turn = std::fmod(at - start, 2 * pi);
      return turn < 0 ? turn + 2 * pi : turn;
    };
    steps.push_back({after_start(s.right_ascension - s.half_arc), 1});
    steps.push_back({after_start(s.right_ascension + s.half_arc), -1});
  }
  std::sort(steps.begin(), steps.end(), [](const Step& a, const Step& b) { return a.at < b.at; });
  const int count = static_cast<int>(stars.size());
  const auto nearer = [](std::optional<double>& best, double at) {
    if (!best || std::abs(at) < std::abs(*best)) best = at;
  };
  for (const Step& step : steps) {
    const bool before = 2 * risen >= count;
    risen += step.change;
    const bool after = 2 * risen >= count;
    if (!before && after) nearer(times.rises, step.at - pi);
    if (before && !after) nearer(times.sets, step.at - pi);
  }
  return times;
}

std::vector<ConstellationEvening> constellation_evenings(
    const std::vector<Eigen::Vector3d>& stars, Angle latitude, Ut moment, Angle local_sidereal_time,
    const std::array<std::optional<Angle>, 12>& evenings) {
  std::vector<ConstellationEvening> rows;
  for (std::size_t f = 0; f < figures().size(); ++f) {
    const Figure& figure = figures()[f];
    const Constellation& constellation =
        constellations()[static_cast<std::size_t>(figure.constellation)];
    if (!constellation.near_equator || figure.figure_stars.empty()) continue;
    ConstellationEvening row{};
    row.figure = static_cast<int>(f);
    row.on_equator = constellation.on_equator;
    Eigen::Vector3d mean = Eigen::Vector3d::Zero();
    std::vector<DailyArc> arcs;
    for (int star : figure.figure_stars) {
      const Eigen::Vector3d& direction = stars[static_cast<std::size_t>(star)];
      mean += direction;
      arcs.push_back(daily_arc(direction, latitude));
    }
    mean.normalize();
    const auto stand_higher = [&](Angle limit, Angle sidereal_time) {
      const double sine = sin(limit);
      return std::count_if(figure.figure_stars.begin(), figure.figure_stars.end(), [&](int star) {
        return sine_of_altitude(stars[static_cast<std::size_t>(star)], sidereal_time, latitude) >=
               sine;
      });
    };
    const auto count = static_cast<std::ptrdiff_t>(figure.figure_stars.size());
    const auto up = stand_higher(up_altitude, local_sidereal_time);
    row.mean_place = to_horizontal(mean, local_sidereal_time, latitude);
    row.state = up == count ? FigureState::up
                : up > 0    ? FigureState::partly_up
                            : FigureState::below;
    const double hours = hour_angle(mean, local_sidereal_time).hours();
    row.mean_place_rises = daily_arc(mean, latitude).half_arc > 0.0;
    if (!row.mean_place_rises)
      row.phase = hours < 0.0 ? FigurePhase::rising : FigurePhase::sinking;
    else
      row.phase = hours < -2.0   ? FigurePhase::rising
                  : hours <= 2.0 ? FigurePhase::high
                                 : FigurePhase::sinking;
    const FigureTimes times = figure_times(arcs, mean, local_sidereal_time.radians());
    const auto instant = [&](const std::optional<double>& difference) -> std::optional<Ut> {
      if (!difference) return {};
      return moment + Days(*difference / (2 * pi) * sidereal_day);
    };
    row.rises = instant(times.rises);
    if (row.mean_place_rises || times.rises || times.half_never_sets)
      row.highest = instant(times.highest);
    row.sets = instant(times.sets);
    row.circumpolar = times.circumpolar;
    row.never_rises = times.never_rises;
    row.half_never_sets = times.half_never_sets;
    for (std::size_t m = 0; m < 12; ++m) {
      const std::optional<Angle>& evening = evenings[m];
      row.evening_sight[m] = evening && 2 * stand_higher(sight_altitude, *evening) >= count;
    }
    rows.push_back(row);
  }
  return rows;
}

}  // namespace duskleaf
