// What one year costs before anything is drawn: tables of the bodies, a site's instants.
#include <benchmark/benchmark.h>

#include "almanac/happenings.hpp"
#include "bench_site.hpp"
#include "events/events.hpp"

namespace duskleaf {
namespace {

const Span year{2027, 1};

void BM_YearEphemerisSunMoon(benchmark::State& state) {
  const auto [from, to] = ephemeris_span(year);
  for (auto _ : state) {
    const YearEphemeris ephemeris(from, to);
    benchmark::DoNotOptimize(ephemeris.apparent(Body::sun, from + Days(100)));
    benchmark::DoNotOptimize(ephemeris.apparent(Body::moon, from + Days(100)));
  }
}
BENCHMARK(BM_YearEphemerisSunMoon)->Unit(benchmark::kMillisecond);

void BM_YearEphemerisAllBodies(benchmark::State& state) {
  const auto [from, to] = ephemeris_span(year);
  for (auto _ : state) {
    const YearEphemeris ephemeris(from, to);
    benchmark::DoNotOptimize(ephemeris.apparent(Body::sun, from + Days(100)));
    benchmark::DoNotOptimize(ephemeris.apparent(Body::moon, from + Days(100)));
    for (const Body planet : planets)
      benchmark::DoNotOptimize(ephemeris.apparent(planet, from + Days(100)));
  }
}
BENCHMARK(BM_YearEphemerisAllBodies)->Unit(benchmark::kMillisecond);

const YearEphemeris& shared_ephemeris() {
  static const YearEphemeris ephemeris(ephemeris_span(year).first, ephemeris_span(year).second);
  return ephemeris;
}

void BM_GlobalEventsOfAYear(benchmark::State& state) {
  const Ut from = ut_midnight(make_date(2027, 1, 1)), to = ut_midnight(make_date(2028, 1, 1));
  for (auto _ : state) benchmark::DoNotOptimize(global_events(shared_ephemeris(), from, to));
}
BENCHMARK(BM_GlobalEventsOfAYear)->Unit(benchmark::kMillisecond);

void BM_SiteEventsOfAYear(benchmark::State& state) {
  const Observer observer = bench_order().sites.front().place.observer;
  const Ut from = ut_midnight(make_date(2027, 1, 1)), to = ut_midnight(make_date(2028, 1, 1));
  std::size_t instants = 0;
  for (auto _ : state) {
    const auto events = site_events(shared_ephemeris(), observer, from, to);
    instants = events.size();
  }
  state.counters["instants"] = static_cast<double>(instants);
}
BENCHMARK(BM_SiteEventsOfAYear)->Unit(benchmark::kMillisecond);

void BM_SiteYear(benchmark::State& state) {
  const Place place = bench_order().sites.front().place;
  for (auto _ : state)
    benchmark::DoNotOptimize(
        make_site_year(shared_ephemeris(), place, year, {.evenings = state.range(0) != 0}));
}
BENCHMARK(BM_SiteYear)->ArgName("evenings")->Arg(0)->Arg(1)->Unit(benchmark::kMillisecond);

// What happens in a year: the same everywhere, and for one site. The year's tables exist already.
void BM_SkyYear(benchmark::State& state) {
  for (auto _ : state) benchmark::DoNotOptimize(make_sky_year(shared_ephemeris(), year));
}
BENCHMARK(BM_SkyYear)->Unit(benchmark::kMillisecond);

void BM_SiteHappenings(benchmark::State& state) {
  const SkyYear sky_year = make_sky_year(shared_ephemeris(), year);
  const SiteYear site = make_site_year(shared_ephemeris(), bench_order().sites.front().place, year,
                                       {.evenings = false});
  for (auto _ : state)
    benchmark::DoNotOptimize(make_site_happenings(shared_ephemeris(), site, sky_year));
}
BENCHMARK(BM_SiteHappenings)->Unit(benchmark::kMillisecond);

}  // namespace
}  // namespace duskleaf
