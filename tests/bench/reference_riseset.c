/* The outside reference library's own calls for the instants of one site-year: rise, set, transit
 * of Sun and Moon and the three twilights. Prints how many it found; tests/bench/whole_process
 * takes its time. For comparison alone. */
#include <math.h>
#include <stdio.h>
#include <string.h>
#include <swephexp.h>

static long count_events(double from, double to, int body, int kind, double* place) {
  long found = 0;
  double t = from;
  while (t < to) {
    double at = 0;
    char message[AS_MAXCH] = "";
    const int status =
        swe_rise_trans(t, body, NULL, SEFLG_SWIEPH, kind, place, 0.0, 0.0, &at, message);
    if (status == -2 ||
        at <= t) { /* it does not happen within a day or so: ask again from the next day */
      t += 1.0;
      continue;
    }
    if (status < 0) {
      fprintf(stderr, "%s\n", message);
      return -1;
    }
    if (at < to) ++found;
    t = at + 0.01;
  }
  return found;
}

int main(void) {
  double place[3] = {-4.62, 54.18, 0.0};
  const int kinds[] = {SE_CALC_RISE,
                       SE_CALC_SET,
                       SE_CALC_MTRANSIT,
                       SE_CALC_RISE | SE_BIT_CIVIL_TWILIGHT,
                       SE_CALC_SET | SE_BIT_CIVIL_TWILIGHT,
                       SE_CALC_RISE | SE_BIT_NAUTIC_TWILIGHT,
                       SE_CALC_SET | SE_BIT_NAUTIC_TWILIGHT,
                       SE_CALC_RISE | SE_BIT_ASTRO_TWILIGHT,
                       SE_CALC_SET | SE_BIT_ASTRO_TWILIGHT};
  const double from = swe_julday(2027, 1, 1, 0.0, SE_GREG_CAL);
  const double to = swe_julday(2028, 1, 1, 0.0, SE_GREG_CAL);
  long found = 0;
  swe_set_ephe_path("/usr/share/libswe/ephe");
  for (unsigned i = 0; i < sizeof kinds / sizeof *kinds; ++i) {
    const long n = count_events(from, to, SE_SUN, kinds[i], place);
    if (n < 0) return 1;
    found += n;
  }
  const int moon_kinds[] = {SE_CALC_RISE, SE_CALC_SET, SE_CALC_MTRANSIT};
  for (unsigned i = 0; i < 3; ++i) {
    const long n = count_events(from, to, SE_MOON, moon_kinds[i], place);
    if (n < 0) return 1;
    found += n;
  }
  printf("%ld\n", found);
  return 0;
}
