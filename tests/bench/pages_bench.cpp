// What one month's handout costs once the site's year is there: setting the sheets, and making them
// a PDF.
#include <benchmark/benchmark.h>

#include "almanac/happenings.hpp"
#include "bench_site.hpp"
#include "ink/pdf.hpp"
#include "sheet/publication.hpp"

namespace duskleaf {
namespace {

struct Desk {
  Order order = bench_order();
  YearEphemeris ephemeris{ephemeris_span(order.span).first, ephemeris_span(order.span).second};
  SiteYear year = make_site_year(ephemeris, order.sites.front().place, order.span);
  SkyYear sky_year = make_sky_year(ephemeris, order.span);
  SiteHappenings happenings = make_site_happenings(ephemeris, year, sky_year);
  TypeSet type;
  Tally tally;

  SheetDocument handout(int month_index) {
    return make_handout(order, order.sites.front(), order.publications.front(), year, sky_year,
                        happenings, ephemeris, {month_index}, type, tally);
  }
};
Desk& desk() {
  static Desk shared;
  return shared;
}

void BM_HandoutSheets(benchmark::State& state) {
  int month = 0;
  for (auto _ : state) {
    benchmark::DoNotOptimize(desk().handout(month));
    month = (month + 1) % 12;
  }
}
BENCHMARK(BM_HandoutSheets)->Unit(benchmark::kMillisecond);

void BM_HandoutPdf(benchmark::State& state) {
  const SheetDocument document = desk().handout(2);
  std::size_t bytes = 0;
  for (auto _ : state) bytes = make_pdf(document, desk().type).size();
  state.counters["bytes"] = static_cast<double>(bytes);
}
BENCHMARK(BM_HandoutPdf)->Unit(benchmark::kMillisecond);

}  // namespace
}  // namespace duskleaf
