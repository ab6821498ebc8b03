/* Phase angles and magnitudes of the planets from the compressed JPL DE431 of Debian's swe-standard-data, for
 * tests/reference/planet_aspects.csv. Debian packages: libswe-dev, swe-standard-data. Run:
 *
 *   cc -O2 -o planet_aspects planet_aspects.c -lswe -lm && ./planet_aspects > ../planet_aspects.csv */
#include <stdio.h>

#include <swephexp.h>

int main(void) {
  static const char *const names[] = {"mercury", "venus", "mars", "jupiter", "saturn", "uranus", "neptune"};
  char version[256];
  swe_set_ephe_path("/usr/share/libswe/ephe");
  printf("# Phase angle (degrees) and V magnitude of the planets from the Earth's centre; Mallama & Hilton (2018), Mars without its\n");
  printf("# rotation and orbit terms, the latitudes of Saturn and Uranus as that library simplifies them.\n");
  printf("# source: JPL DE431 as compressed in Debian's swe-standard-data, read by libswe %s; made by "
         "tests/reference/make/planet_aspects.c.\n",
         swe_version(version));
  printf("planet,jd_tt,phase_angle,magnitude\n");
  for (int p = 0; p < 7; ++p)
    for (int i = 0; i < 12; ++i) {
      const double jd = 2444239.5 + 2611.375 * i; /* 1980-01-01 to 2058 */
      double attributes[20];
      char message[AS_MAXCH] = "";
      if (swe_pheno(jd, SE_MERCURY + p, SEFLG_SWIEPH, attributes, message) < 0) {
        fprintf(stderr, "%s\n", message);
        return 1;
      }
      printf("%s,%.4f,%.5f,%.4f\n", names[p], jd, attributes[0], attributes[4]);
    }
  swe_close();
  return 0;
}
