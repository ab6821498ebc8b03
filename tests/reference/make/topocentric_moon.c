/* The Moon's apparent place from the ground, from the compressed JPL DE431 of Debian's swe-standard-data, for
 * tests/reference/topocentric_moon.csv. Debian packages: libswe-dev, swe-standard-data. Run:
 *
 *   cc -O2 -o topocentric_moon topocentric_moon.c -lswe -lm && ./topocentric_moon > ../topocentric_moon.csv
 *
 * TT - UT1 is set to 69.184 s, what UTC gives from 2017 on. Diurnal aberration is in the values. */
#include <stdint.h>
#include <stdio.h>

#include <swephexp.h>

int main(void) {
  static const struct {
    double latitude, longitude, elevation;
  } sites[] = {{69.65, 18.96, 10}, {47.5, 8.5, 1200}, {0.5, 36.8, 1800}, {-33.9, 151.2, 0}, {-62.1, -58.4, 30}};
  char version[256], models[64];
  swe_set_ephe_path("/usr/share/libswe/ephe");
  snprintf(models, sizeof models, "0,%d,%d,%d", SEMOD_PREC_IAU_2006, SEMOD_PREC_IAU_2006, SEMOD_NUT_IAU_2000B);
  swe_set_astro_models(models, 0);
  swe_set_delta_t_userdef(69.184 / 86400.0);
  printf("# The Moon's topocentric apparent place: right ascension and declination, degrees (true equator and equinox of date).\n");
  printf("# source: JPL DE431 as compressed in Debian's swe-standard-data, read by libswe %s; made by "
         "tests/reference/make/topocentric_moon.c.\n",
         swe_version(version));
  printf("jd_ut,latitude,longitude,elevation_m,right_ascension,declination\n");
  for (int i = 0; i < 40; ++i) {
    const int s = i % 5;
    const double jd = 2458000.5 + 151.359375 * i; /* 2017-09-04 to 2033 */
    double place[6];
    char message[AS_MAXCH] = "";
    swe_set_topo(sites[s].longitude, sites[s].latitude, sites[s].elevation);
    if (swe_calc(jd + 69.184 / 86400.0, SE_MOON, SEFLG_SWIEPH | SEFLG_EQUATORIAL | SEFLG_TOPOCTR, place, message) < 0) {
      fprintf(stderr, "%s\n", message);
      return 1;
    }
    printf("%.6f,%g,%g,%g,%.7f,%.7f\n", jd, sites[s].latitude, sites[s].longitude, sites[s].elevation, place[0], place[1]);
  }
  swe_close();
  return 0;
}
