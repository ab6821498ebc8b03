#pragma once

#include <optional>
#include <ostream>
#include <string>
#include <string_view>
#include <variant>
#include <vector>

#include "almanac/happenings.hpp"

namespace duskleaf {

enum class TableName { instants, nights, constellations, planet_places, showers, eclipses };
enum class TableFormat { csv, json };

std::optional<TableName> find_table(std::string_view name);
/// All names, for messages: "instants", "nights", "constellations", "planets", "showers",
/// "eclipses".
std::vector<std::string_view> table_names();
/// Whether the table needs a site year's evening skies (AlmanacParts::evenings).
bool table_needs_evenings(TableName);
/// Whether it needs what happens in the year.
bool table_needs_happenings(TableName);

/// A number printed with so many decimals.
struct Number {
  double value;
  int decimals;
};
/// std::monostate is a cell for what does not happen: empty in CSV, null in JSON.
using Cell = std::variant<std::monostate, std::string, Number, bool>;
using Row = std::vector<Cell>;

const std::vector<std::string_view>& table_columns(TableName);
/// The rows of what is the same everywhere (site "-"): instants on the UT dates of the span; no
/// rows of the other tables.
std::vector<Row> global_rows(TableName, const SkyYear&, const Span&);
/// One site's rows: instants of its civil dates, nights, constellations, planets, showers' peaks
/// and eclipses of its span. `happenings` may be empty for tables that do not need them.
std::vector<Row> site_rows(TableName, const YearEphemeris&, const SiteYear&,
                           const SiteHappenings& happenings);

/// Writes a table piece by piece, so that many sites need no more memory than one. CSV by RFC 4180:
/// UTF-8, header row, lines end in CR LF; JSON: an array of objects with the columns as keys, in
/// their order. Nothing depends on the locale.
class TableWriter {
 public:
  /// Writes the beginning. The stream must outlive the writer; its state tells of failures.
  TableWriter(std::ostream&, TableName, TableFormat);
  void add(const std::vector<Row>&);
  /// Writes the end; nothing may be added after it.
  void finish();

 private:
  std::ostream& out_;
  TableName name_;
  TableFormat format_;
  bool any_ = false;
};

/// 2027-03-20T20:24:41.3Z, rounded to a tenth of a second.
std::string utc_text(Ut);

}  // namespace duskleaf
