// Civil time by the IANA time-zone data, read by Abseil (which follows a zone's last rule past
// 2037).
#include "base/civil.hpp"

#include <absl/time/civil_time.h>
#include <absl/time/time.h>
#include <cmath>
#include <cstdlib>
#include <fmt/format.h>
#include <fstream>
#include <sstream>

namespace duskleaf {
namespace chrono = std::chrono;
namespace {

constexpr double unix_epoch_from_j2000 = -10957.5;  // days

absl::Time to_absl(Ut t) {
  const double seconds = (t.days() - unix_epoch_from_j2000) * 86400.0;
  const double whole = std::floor(seconds);
  return absl::FromUnixSeconds(static_cast<std::int64_t>(whole)) + absl::Seconds(seconds - whole);
}

Ut from_absl(absl::Time t) {
  const std::int64_t whole = absl::ToUnixSeconds(t);
  const std::int64_t whole_days = whole / 86400;
  const double rest = absl::ToDoubleSeconds(t - absl::FromUnixSeconds(whole));
  return Ut(Days(unix_epoch_from_j2000 + static_cast<double>(whole_days)) +
            Days(Seconds(static_cast<double>(whole % 86400) + rest)));
}

absl::CivilSecond to_civil(chrono::local_seconds t) {
  return absl::CivilSecond(1970, 1, 1) + t.time_since_epoch().count();
}

std::string zone_folder() {
  const char* folder = std::getenv("TZDIR");
  return folder != nullptr && *folder != '\0' ? folder : "/usr/share/zoneinfo";
}

}  // namespace

Date make_date(int year, int month, int day) {
  return chrono::local_days(chrono::year(year) / month / day);
}
int year_of(Date d) { return static_cast<int>(chrono::year_month_day(d).year()); }
int month_of(Date d) {
  return static_cast<int>(static_cast<unsigned>(chrono::year_month_day(d).month()));
}
int day_of(Date d) {
  return static_cast<int>(static_cast<unsigned>(chrono::year_month_day(d).day()));
}
int days_in_month(int year, int month) {
  return day_of(chrono::local_days(chrono::year(year) / month / chrono::last));
}
chrono::weekday weekday_of(Date d) { return chrono::weekday(d); }
std::string iso_date(Date d) {
  return fmt::format("{:04}-{:02}-{:02}", year_of(d), month_of(d), day_of(d));
}
Ut ut_midnight(Date d) {
  return Ut(Days(unix_epoch_from_j2000 + static_cast<double>(d.time_since_epoch().count())));
}

int CivilMinute::hour() const { return static_cast<int>((time - date()).count() / 60); }
int CivilMinute::minute() const { return static_cast<int>((time - date()).count() % 60); }
std::string CivilMinute::iso() const {
  const long long seconds = std::llabs(offset.count());
  std::string text = fmt::format("{}T{:02}:{:02}{}{:02}:{:02}", iso_date(date()), hour(), minute(),
                                 offset.count() < 0 ? '-' : '+', seconds / 3600, seconds / 60 % 60);
  if (seconds % 60 != 0) text += fmt::format(":{:02}", seconds % 60);
  return text;
}

struct Zone::Impl {
  std::string name;
  absl::TimeZone zone;
};

std::optional<Zone> Zone::load(std::string_view name) {
  // Abseil would also take "localtime" and file paths: a zone is a name of the data, nothing else.
  if (name.empty() || name.starts_with('/') || name.starts_with('.') || name == "localtime" ||
      name.find("..") != std::string_view::npos)
    return std::nullopt;
  auto impl = std::make_shared<Impl>();
  impl->name = name;
  if (!absl::LoadTimeZone(std::string(name), &impl->zone)) return std::nullopt;
  Zone zone;
  zone.impl_ = std::move(impl);
  return zone;
}

Zone Zone::utc() {
  auto impl = std::make_shared<Impl>();
  impl->name = "UTC";
  impl->zone = absl::UTCTimeZone();
  Zone zone;
  zone.impl_ = std::move(impl);
  return zone;
}

const std::string& Zone::name() const { return impl_->name; }

chrono::seconds Zone::offset_at(Ut t) const {
  return chrono::seconds(impl_->zone.At(to_absl(t)).offset);
}

CivilMinute Zone::civil(Ut t) const {
  const double ut_seconds = (t.days() - unix_epoch_from_j2000) * 86400.0;
  chrono::seconds offset = offset_at(t);
  // Half up, with a microsecond's grace for the arithmetic of days.
  const auto minute_at = [&](chrono::seconds off) {
    return static_cast<std::int64_t>(
        std::floor((ut_seconds + static_cast<double>(off.count()) + 30.0 + 1e-6) / 60.0));
  };
  std::int64_t minutes = minute_at(offset);
  const std::int64_t rounded_ut = minutes * 60 - offset.count();
  const chrono::seconds offset_there(impl_->zone.At(absl::FromUnixSeconds(rounded_ut)).offset);
  if (offset_there != offset) {
    offset = offset_there;
    minutes = static_cast<std::int64_t>(
        std::floor((static_cast<double>(rounded_ut + offset.count()) + 30.0) / 60.0));
  }
  return {chrono::local_time<chrono::minutes>(chrono::minutes(minutes)), offset};
}

Ut Zone::instant(chrono::local_seconds civil) const {
  const auto info = impl_->zone.At(to_civil(civil));
  return from_absl(info.kind == absl::TimeZone::TimeInfo::SKIPPED ? info.trans : info.pre);
}

Ut Zone::instant(Date date, chrono::minutes after_midnight) const {
  return instant(chrono::local_seconds(date) + after_midnight);
}

Ut Zone::start_of(Date date) const { return instant(chrono::local_seconds(date)); }

std::vector<ClockChange> Zone::changes(Ut from, Ut to) const {
  std::vector<ClockChange> list;
  absl::Time at = to_absl(from);
  absl::TimeZone::CivilTransition transition;
  while (impl_->zone.NextTransition(at, &transition)) {
    // Forward, the reading jumped from does not exist; backward, the reading jumped to stands
    // twice.
    const auto from_info = impl_->zone.At(transition.from);
    const auto to_info = impl_->zone.At(transition.to);
    const absl::Time when = from_info.kind == absl::TimeZone::TimeInfo::SKIPPED  ? from_info.trans
                            : to_info.kind == absl::TimeZone::TimeInfo::REPEATED ? to_info.trans
                                                                                 : to_info.pre;
    if (from_absl(when) > to || when <= at) break;
    at = when;
    const chrono::seconds before(impl_->zone.At(when - absl::Seconds(1)).offset);
    const chrono::seconds after(impl_->zone.At(when).offset);
    if (before != after && from_absl(when) > from) list.push_back({from_absl(when), before, after});
  }
  return list;
}

std::string time_zone_data_version() {
  std::ifstream file(zone_folder() + "/tzdata.zi");
  std::string line;
  if (std::getline(file, line) && line.starts_with("# version ")) return line.substr(10);
  return "unknown";
}

std::vector<std::string> known_zone_names() {
  std::vector<std::string> names;
  std::ifstream file(zone_folder() + "/tzdata.zi");
  for (std::string line; std::getline(file, line);) {
    std::istringstream words(line);
    std::string kind, first, second;
    words >> kind >> first >> second;
    if (kind == "Z") names.push_back(first);
    if (kind == "L") names.push_back(second);
  }
  return names;
}

}  // namespace duskleaf
