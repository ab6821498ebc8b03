/* Distances, lit parts and disc diameters of the planets, and the tilt of Saturn's rings, from the compressed JPL DE431 of
 * Debian's swe-standard-data, for tests/reference/planet_discs.csv. Debian packages: libswe-dev, swe-standard-data. Run:
 *
 *   cc -O2 -o /tmp/planet_discs planet_discs.c -lswe -lm && /tmp/planet_discs > ../planet_discs.csv */
#include <math.h>
#include <stdio.h>

#include <swephexp.h>

#define DEGREE (3.14159265358979323846 / 180.0)

int main(void) {
  static const char *const names[] = {"mercury", "venus", "mars", "jupiter", "saturn", "uranus", "neptune"};
  char version[256];
  swe_set_ephe_path("/usr/share/libswe/ephe");
  printf("# Light-time distance (au) of the planets from the Earth's centre, lit fraction, diameter (arcseconds) by that library's mean radii,\n");
  printf("# and for Saturn the latitude of the Earth over the rings (degrees, north positive), from the pole at RA 40.589, Dec 83.537 degrees\n");
  printf("# (J2000; IAU working group on cartographic coordinates), by the generator itself.\n");
  printf("# source: JPL DE431 as compressed in Debian's swe-standard-data, read by libswe %s; made by tests/reference/make/planet_discs.c.\n",
         swe_version(version));
  printf("planet,jd_tt,distance,lit,mean_diameter,ring_tilt\n");
  for (int p = 0; p < 7; ++p)
    for (int i = 0; i < 24; ++i) {
      const double jd = 2451544.5 + 608.4375 * i; /* 2000-01-01 to 2038 */
      double attributes[20], place[6];
      char message[AS_MAXCH] = "";
      const int flags = SEFLG_SWIEPH | SEFLG_EQUATORIAL | SEFLG_J2000 | SEFLG_NONUT | SEFLG_NOABERR | SEFLG_NOGDEFL;
      if (swe_pheno(jd, SE_MERCURY + p, SEFLG_SWIEPH, attributes, message) < 0 ||
          swe_calc(jd, SE_MERCURY + p, flags, place, message) < 0) {
        fprintf(stderr, "%s\n", message);
        return 1;
      }
      double tilt = 0.0;
      if (p == 4) {
        const double a = place[0] * DEGREE, d = place[1] * DEGREE, pa = 40.589 * DEGREE, pd = 83.537 * DEGREE;
        tilt = -asin(sin(d) * sin(pd) + cos(d) * cos(pd) * cos(a - pa)) / DEGREE;
      }
      printf("%s,%.4f,%.7f,%.6f,%.4f,%.4f\n", names[p], jd, place[2], attributes[1], attributes[3] * 3600.0, tilt);
    }
  swe_close();
  return 0;
}
