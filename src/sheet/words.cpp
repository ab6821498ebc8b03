// The words of a language are one flat YAML map, so that a translator sees every sentence whole and
// may order its parts freely.
#include "sheet/words.hpp"

#include <cmath>
#include <fmt/format.h>
#include <stdexcept>
#include <yaml-cpp/yaml.h>

#include "base/embedded.hpp"

namespace duskleaf {

Words::Words(std::string_view language, bool clock_12) : language_(language), clock_12_(clock_12) {
  const auto file = find_embedded_file("templates/words/" + language_ + ".yaml");
  if (!file) throw std::out_of_range("no words for language " + language_);
  const YAML::Node root = YAML::Load(std::string(*file));
  for (const auto& entry : root)
    text_.emplace(entry.first.as<std::string>(), entry.second.as<std::string>());
}

bool Words::has(std::string_view key) const { return text_.find(key) != text_.end(); }

const std::string& Words::operator()(std::string_view key) const {
  const auto found = text_.find(key);
  if (found == text_.end())
    throw std::out_of_range("language " + language_ + " lacks the words '" + std::string(key) +
                            "'");
  return found->second;
}

std::string Words::operator()(
    std::string_view key,
    std::initializer_list<std::pair<std::string_view, std::string>> values) const {
  const std::string& pattern = (*this)(key);
  std::string text;
  for (std::size_t at = 0; at < pattern.size();) {
    const std::size_t open = pattern.find('{', at);
    text.append(pattern, at, open == std::string::npos ? open : open - at);
    if (open == std::string::npos) break;
    const std::size_t close = pattern.find('}', open);
    if (close == std::string::npos)
      throw std::out_of_range("open brace in the words '" + std::string(key) + "'");
    const std::string_view name = std::string_view(pattern).substr(open + 1, close - open - 1);
    const std::string* value = nullptr;
    for (const auto& [known, replacement] : values)
      if (known == name) value = &replacement;
    if (value == nullptr)
      throw std::out_of_range("the words '" + std::string(key) + "' ask for {" + std::string(name) +
                              "}");
    text += *value;
    at = close + 1;
  }
  return text;
}

std::string Words::time_of_day(std::chrono::minutes after_midnight) const {
  const long total = ((after_midnight.count() % 1440) + 1440) % 1440;
  const long hour = total / 60, minute = total % 60;
  if (!clock_12_) return fmt::format("{:02}:{:02}", hour, minute);
  if (total == 0) return (*this)("time.midnight");
  if (total == 720) return (*this)("time.noon");
  return (*this)(hour < 12 ? "time.am" : "time.pm",
                 {{"time", fmt::format("{}:{:02}", hour % 12 == 0 ? 12 : hour % 12, minute)}});
}

std::string Words::time(const CivilMinute& t) const {
  return time_of_day(std::chrono::minutes(t.hour() * 60 + t.minute()));
}

std::string Words::duration(double minutes) const {
  const long rounded = std::lround(minutes);
  return (*this)("time.duration", {{"hours", std::to_string(rounded / 60)},
                                   {"minutes", fmt::format("{:02}", rounded % 60)}});
}

std::string Words::whole_hour(int hour) const {
  const int of_day = ((hour % 24) + 24) % 24;
  if (!clock_12_) return fmt::format("{:02}:00", of_day);
  if (of_day == 0) return (*this)("time.midnight");
  if (of_day == 12) return (*this)("time.noon");
  return (*this)(of_day < 12 ? "time.am" : "time.pm",
                 {{"time", std::to_string(of_day % 12 == 0 ? 12 : of_day % 12)}});
}

std::string Words::month_name(int month) const { return (*this)(fmt::format("month.{}", month)); }
std::string Words::month_short(int month) const {
  return (*this)(fmt::format("month-short.{}", month));
}
std::string Words::weekday_name(std::chrono::weekday day) const {
  return (*this)(fmt::format("weekday.{}", day.iso_encoding()));
}
std::string Words::weekday_short(std::chrono::weekday day) const {
  return (*this)(fmt::format("weekday-short.{}", day.iso_encoding()));
}

std::string Words::day_month(Date d) const {
  return (*this)("date.day-month",
                 {{"day", std::to_string(day_of(d))}, {"month", month_name(month_of(d))}});
}

std::string Words::night_of(Date evening) const {
  const Date morning = evening + std::chrono::days(1);
  const auto day = [](Date d) { return std::to_string(day_of(d)); };
  if (month_of(evening) == month_of(morning))
    return (*this)("date.night-of", {{"evening", day(evening)},
                                     {"morning", day(morning)},
                                     {"month", month_name(month_of(evening))}});
  return (*this)("date.night-across",
                 {{"evening", day_month(evening)}, {"morning", day_month(morning)}});
}

std::string Words::direction(Angle azimuth) const {
  const int sector = static_cast<int>(std::floor(azimuth.positive().degrees() / 45.0 + 0.5)) % 8;
  return (*this)(fmt::format("direction.{}", sector));
}

std::string Words::direction_short(Angle azimuth) const {
  const int sector = static_cast<int>(std::floor(azimuth.positive().degrees() / 22.5 + 0.5)) % 16;
  return (*this)(fmt::format("direction-short.{}", sector));
}

std::string Words::number(double value, int decimals) const {
  std::string text = fmt::format("{:.{}f}", std::abs(value), decimals);
  const bool zero = text.find_first_not_of("0.") == std::string::npos;
  if (const std::size_t dot = text.find('.'); dot != std::string::npos)
    text.replace(dot, 1, (*this)("number.decimal"));
  return value < 0 && !zero ? "\u2212" + text : text;
}

}  // namespace duskleaf
