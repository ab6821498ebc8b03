// proof: reads orders as press would, and tells what would come of them.
#include <fmt/format.h>

#include "cli/commands.hpp"
#include "order/outputs.hpp"
#include "run/characters.hpp"
#include "run/printable.hpp"

namespace duskleaf {
namespace {

std::string degrees(double value, char positive, char negative) {
  return fmt::format("{:.4f} {}", value < 0 ? -value : value, value < 0 ? negative : positive);
}

std::string chart_hours(const std::array<ChartHour, 12>& hours) {
  const auto text = [](const ChartHour& hour) {
    if (!hour.after_midnight) return std::string("dusk");
    const auto minutes = hour.after_midnight->count();
    return fmt::format("{:02}:{:02}", minutes / 60, minutes % 60);
  };
  std::string list = text(hours[0]);
  bool same = true;
  for (std::size_t i = 1; i < hours.size(); ++i) same = same && text(hours[i]) == text(hours[0]);
  if (!same)
    for (std::size_t i = 1; i < hours.size(); ++i) list.append(" ").append(text(hours[i]));
  return list;
}

std::string summary(const Order& order) {
  std::string text = fmt::format(
      "{}\n  twelve months from {}-{:02}, language {}, {}-hour clock\n  publications\n", order.path,
      order.span.first_year, order.span.first_month, order.language, order.clock_12 ? 12 : 24);
  std::size_t per_site = 0, pairs = 0;
  for (const Publication& publication : order.publications) {
    const auto files = output_files(order, publication);
    const bool in_sites = publication.pairs.empty();
    (in_sites ? per_site : pairs) += files.size();
    text += fmt::format("    {} ({}): {}, {}, {} {}{}, {}{}\n", publication.name,
                        publication.template_name, publication.paper,
                        publication.ink == InkMode::grey ? "grey" : "colour", files.size(),
                        files.size() == 1 ? "file" : "files", in_sites ? " for each site" : "",
                        files.front().path, files.size() > 1 ? " to " + files.back().path : "");
  }
  text += fmt::format("  sites\n");
  for (const Site& site : order.sites) {
    const Observer& at = site.place.observer;
    text += fmt::format("    {}: {}, {}, {}, {}, charts at {}, stars to magnitude {:.1f}\n",
                        site.place.id, site.name, degrees(at.latitude.degrees(), 'N', 'S'),
                        degrees(at.longitude.degrees(), 'E', 'W'), site.place.zone.name(),
                        chart_hours(site.place.chart_hours), site.place.limiting_magnitude);
  }
  const std::size_t files = per_site * order.sites.size() + pairs;
  return text + fmt::format("  {} {} in all\n", files, files == 1 ? "file" : "files");
}

}  // namespace

ExitCode run_proof(const ProofArguments& arguments) {
  ExitCode code = ExitCode::done;
  for (const std::string& file :
       arguments.files) {  // a wrong order does not hide the mistakes of the next
    try {
      const Order order = read_order(file);
      const std::vector<Doubt> later = unprinted(order), missing = missing_characters(order);
      print(summary(order));
      say_doubts(doubts(order), true);
      say_doubts(missing, true);
      say_doubts(later, true);
    } catch (const OrderError& error) {
      say(error.what());
      code = ExitCode::bad_order;
    } catch (const FileError& error) {
      say(error.what());
      if (code == ExitCode::done) code = ExitCode::file_trouble;
    }
  }
  return code;
}

}  // namespace duskleaf
