// data: the computed almanac as tables, site by site as they are made.
#include <algorithm>
#include <fmt/format.h>
#include <iostream>
#include <optional>

#include "cli/commands.hpp"
#include "export/tables.hpp"
#include "order/nearest_name.hpp"
#include "run/whole_file.hpp"

namespace duskleaf {
namespace {

TableName read_table(const std::string& name) {
  if (const auto table = find_table(name)) return *table;
  const std::string near = nearest_name(name, table_names());
  throw CommandLineError(fmt::format("--table {}: there is no such table; {}", name,
                                     near.empty() ? "expected " + listed(table_names())
                                                  : fmt::format("did you mean '{}'?", near)));
}

TableFormat read_form(const std::string& name) {
  if (name == "csv") return TableFormat::csv;
  if (name == "json") return TableFormat::json;
  throw CommandLineError(
      fmt::format("--as {}: {}expected csv or json", name,
                  name == "ics" ? "calendars are not made yet by this version; " : ""));
}

void write_table(const Order& order, const std::optional<std::string>& only, TableName table,
                 TableFormat form, std::ostream& out) {
  const auto [from, to] = ephemeris_span(order.span);
  const YearEphemeris ephemeris(from, to);
  TableWriter writer(out, table, form);
  const bool happens = table_needs_happenings(table);
  const SkyYear sky_year = happens ? make_sky_year(ephemeris, order.span) : SkyYear();
  writer.add(global_rows(table, sky_year, order.span));
  for (const Site& site : order.sites) {
    if (only && site.place.id != *only) continue;
    const SiteYear year = make_site_year(ephemeris, site.place, order.span,
                                         AlmanacParts{table_needs_evenings(table)});
    const SiteHappenings happenings =
        happens ? make_site_happenings(ephemeris, year, sky_year, {table == TableName::showers})
                : SiteHappenings();
    writer.add(site_rows(table, ephemeris, year, happenings));
    if (!out) return;  // the reader is gone or the disk is full: the caller tells
  }
  writer.finish();
}

}  // namespace

ExitCode run_data(const DataArguments& arguments) {
  const TableName table = read_table(arguments.table);
  const TableFormat form = read_form(arguments.form);
  Order order = read_order(arguments.file);
  if (arguments.year) change_year(order, *arguments.year);
  if (arguments.site) check_site({order}, *arguments.site);
  say_doubts(doubts(order), false);
  if (arguments.out.empty()) {
    std::ios::sync_with_stdio(false);
    write_table(order, arguments.site, table, form, std::cout);
    std::cout.flush();
    if (!std::cout) throw FileError("standard output cannot be written");
  } else {
    WholeFile file(arguments.out);
    write_table(order, arguments.site, table, form, file.stream());
    file.finish();
  }
  return ExitCode::done;
}

}  // namespace duskleaf
