// The spline of TT - UT1 (Morrison et al. 2021) against what the IERS observed
// (tests/reference/delta_t_observed.csv).
#include <cmath>
#include <gtest/gtest.h>
#include <string>

#include "base/csv.hpp"
#include "base/embedded.hpp"
#include "reference_file.hpp"

namespace duskleaf {
namespace {

TEST(DeltaTTable, PiecesJoinAndAgreeWithObservation) {
  const CsvTable spline(embedded_file("data/delta_t_spline.csv"));
  const auto value = [&](std::size_t row, double t) {
    return spline.number(row, 2) +
           t * (spline.number(row, 3) + t * (spline.number(row, 4) + t * spline.number(row, 5)));
  };
  for (std::size_t i = 0; i + 1 < spline.rows(); ++i) {
    EXPECT_EQ(spline.number(i, 1), spline.number(i + 1, 0)) << i;
    EXPECT_NEAR(value(i, 1.0), value(i + 1, 0.0), 0.0021)
        << i;  // coefficients are given to 0.001 s
  }
  const std::string text = reference_text("delta_t_observed.csv");
  const CsvTable observed(text);
  ASSERT_GT(observed.rows(), 80u);
  for (std::size_t r = 0; r < observed.rows(); ++r) {
    const std::string_view date = observed.cell(r, 0);
    const double year =
        parse_number(date.substr(0, 4)) + (date.substr(5, 2) == "07" ? 0.4959 : 0.0);
    std::size_t i = 0;
    while (i + 1 < spline.rows() && spline.number(i, 1) <= year) ++i;
    const double from = spline.number(i, 0), to = spline.number(i, 1);
    ASSERT_LE(year, to) << date;
    // The spline is smooth over some years: largest difference measured 0.256 s, in July 1978.
    EXPECT_NEAR(value(i, (year - from) / (to - from)), observed.number(r, 1), 0.27) << date;
  }
}

}  // namespace
}  // namespace duskleaf
