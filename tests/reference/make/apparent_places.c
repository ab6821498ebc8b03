/* Apparent geocentric places of Sun, Moon and planets from the compressed JPL DE431 of Debian's swe-standard-data, for
 * tests/reference/apparent_places.csv. Debian packages: libswe-dev, swe-standard-data. Run:
 *
 *   cc -O2 -o apparent_places apparent_places.c -lswe -lm
 *   ./apparent_places 60 > ../apparent_places.csv
 *
 * The argument is the number of dates for each body, spread over 1900-2100 by a fixed random sequence. A second argument
 * "geometric" gives geometric places instead (no light-time, aberration, deflection), axes ICRS. Precession IAU 2006 and nutation
 * IAU 2000B are asked for. Dates are TT, which the library takes for TDB (2 ms at most, 0.001" of the Moon). */
#include <stdint.h>
#include <stdio.h>
#include <stdlib.h>
#include <string.h>

#include <swephexp.h>

static uint64_t state = 20270101;

/* The 64-bit congruential sequence of Knuth's MMIX; its upper bits as a fraction of one. */
static double uniform(void) {
  state = state * 6364136223846793005u + 1442695040888963407u;
  return (double)(state >> 11) / 9007199254740992.0;
}

int main(int argc, char **argv) {
  static const struct {
    const char *name;
    int number;
  } bodies[] = {{"sun", SE_SUN},         {"moon", SE_MOON},     {"mercury", SE_MERCURY},
                {"venus", SE_VENUS},     {"mars", SE_MARS},     {"jupiter", SE_JUPITER},
                {"saturn", SE_SATURN},   {"uranus", SE_URANUS}, {"neptune", SE_NEPTUNE}};
  const int dates = argc > 1 ? atoi(argv[1]) : 60;
  const int geometric = argc > 2 && strcmp(argv[2], "geometric") == 0;
  const double first = 2415020.5, last = 2488434.5; /* 1900-01-01, 2101-01-01 less a day or so */
  char models[64], version[256];
  int32_t flags = SEFLG_SWIEPH | SEFLG_EQUATORIAL;
  if (geometric) flags |= SEFLG_TRUEPOS | SEFLG_J2000 | SEFLG_NONUT | SEFLG_ICRS;
  swe_set_ephe_path("/usr/share/libswe/ephe");
  snprintf(models, sizeof models, "0,%d,%d,%d", SEMOD_PREC_IAU_2006, SEMOD_PREC_IAU_2006, SEMOD_NUT_IAU_2000B);
  swe_set_astro_models(models, 0);
  printf("# %s geocentric places, TT dates 1900-2100: right ascension and declination in degrees (%s), distance in au.\n",
         geometric ? "Geometric" : "Apparent",
         geometric ? "ICRS" : "true equator and equinox of date, IAU 2006 precession, IAU 2000B nutation");
  printf("# source: JPL DE431 as compressed in Debian's swe-standard-data, read by libswe %s; made by "
         "tests/reference/make/apparent_places.c.\n",
         swe_version(version));
  printf("body,jd_tt,right_ascension,declination,distance\n");
  for (size_t b = 0; b < sizeof bodies / sizeof bodies[0]; ++b)
    for (int i = 0; i < dates; ++i) {
      const double jd = (double)(int64_t)((first + (last - first) * uniform()) * 1024.0) / 1024.0;
      double place[6];
      char message[AS_MAXCH] = "";
      const int32_t got = swe_calc(jd, bodies[b].number, flags, place, message);
      if (got < 0 || !(got & SEFLG_SWIEPH)) {
        fprintf(stderr, "%s at %.6f: %s\n", bodies[b].name, jd, message);
        return 1;
      }
      printf("%s,%.10f,%.8f,%.8f,%.11f\n", bodies[b].name, jd, place[0], place[1], place[2]);
    }
  swe_close();
  return 0;
}
