#pragma once

#include <map>
#include <optional>
#include <string>
#include <variant>
#include <vector>

#include "almanac/best_nights.hpp"
#include "almanac/site_year.hpp"

namespace duskleaf {

/// A place in a file, for messages: FILE:LINE:COLUMN, both counted from 1.
struct Location {
  std::string file;
  int line = 1, column = 1;
};

/// Bad input. what() reads "FILE:LINE:COLUMN: what is wrong; what was expected".
class OrderError : public std::exception {
 public:
  OrderError(Location where, std::string wrong, std::string expected);
  const char* what() const noexcept override { return text_.c_str(); }
  const Location& where() const { return where_; }

 private:
  Location where_;
  std::string text_;
};

enum class InkMode { colour, grey };
enum class Binding { none, edge, top };
enum class FileSplit { months, year };

struct Publication {
  std::string template_name;  // one of ours, or a path as written
  bool template_is_path = false;
  std::string paper = "A4";  // canonical: A3 A4 A5 letter tabloid ...
  std::vector<int> months;   // 1..12, empty: all
  InkMode ink = InkMode::colour;
  bool large_print = false;
  Binding binding = Binding::none;
  FileSplit files = FileSplit::months;
  std::string name;  // output file's stem
  std::vector<std::pair<std::string, std::string>> pairs;
  std::vector<Date> evenings;
  Location where;
};

struct Session {
  // "first friday" .. "last friday", "every friday", or dates
  struct Rule {
    int nth;  // 0 every, 1..4, -1 last
    std::chrono::weekday weekday;
  };
  std::variant<Rule, std::vector<Date>> when;
  std::optional<std::chrono::minutes> from, to;
  std::string where, text;
  Aim aim = Aim::any;
  Location location;
};
/// The session's dates that fall in the span, in order.
std::vector<Date> session_dates(const Session&, const Span&);

struct OwnDate {
  Date from, to;  // the same day for `on`
  std::string text;
};

struct Masthead {
  std::string group, contact, link;
  std::string logo;  // path, absolute or relative to the working folder; empty: none
};

struct Site {
  std::string name;
  Place place;
  Masthead masthead;
  std::vector<Session> sessions;
  std::vector<OwnDate> dates;
  std::map<int, std::string> notes;  // by month 1..12
  Location where;
};

/// Something that is not wrong, but looks so.
struct Doubt {
  Location where;
  std::string text;
  bool not_printed = false;  // a key that nothing prints yet; pressing need not repeat it
};

struct Order {
  std::string path;    // as given
  std::string folder;  // that holds it
  Span span;
  bool starts_in_january;  // `year:` rather than `start:`
  std::string language = "en";
  Location language_at;  // where it is named; the order's beginning when it is not
  bool clock_12 = false;
  std::vector<Publication> publications;
  std::vector<Site> sites;  // those of the order, then those of sites_from
  struct Fonts {
    std::string regular, bold, italic;  // paths; empty: the built-in faces
  } fonts;
  std::vector<Doubt> noticed;  // while reading: keys that nothing prints yet
};

/// Reads and checks an order (and its sites_from). Throws OrderError at the first mistake,
/// FileError when a file cannot be read.
Order read_order(const std::string& path);
/// The same from text that is not in a file yet; `path` is its name in messages and tells its
/// folder.
Order parse_order(std::string_view text, const std::string& path);
/// Warnings: a zone more than three hours from the longitude's, a site at 0, 0, keys that nothing
/// prints yet.
std::vector<Doubt> doubts(const Order&);

/// A file that could not be read or written.
class FileError : public std::runtime_error {
 public:
  using std::runtime_error::runtime_error;
};

/// Width and height in mm, portrait, of a paper that the order may name; nullopt when unknown.
std::optional<std::pair<double, double>> paper_size(std::string_view name);

}  // namespace duskleaf
