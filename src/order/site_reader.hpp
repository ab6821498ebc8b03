#pragma once

#include <map>
#include <string>
#include <string_view>

#include "order/yaml_values.hpp"

namespace duskleaf {

/// What reading one site needs to know of the order.
struct SiteContext {
  std::string folder;  // of the order: logos are named relative to it
  std::map<std::string, std::string>
      checked_logos;  // those found whole already: many sites may share one
};

/// One item of `sites`, or one row of the sites' CSV. Throws OrderError.
Site read_site(const YamlValue&, SiteContext&);

/// Sites of a CSV file: a header row of the keys, nested ones with a dot. Messages carry
/// FILE:LINE:COLUMN of the CSV. `named_at` is where the order names it. Throws OrderError.
std::vector<Site> read_sites_csv(const std::string& path, const Location& named_at, SiteContext&);

/// Letters, digits, hyphens, underscores, no more than 64: what may name a folder or file anywhere.
/// Throws OrderError.
std::string read_id(const YamlValue&, std::string_view what);

/// A path named in a file: as it is when absolute, else below `folder`.
std::string path_in(const std::string& folder, const std::string& named);
/// The folder that holds a file: "" for one in the working folder.
std::string folder_of(const std::string& path);

/// Throws OrderError at `where` unless the file is a whole PNG picture (at most 4096 x 4096, 10
/// MB).
void check_logo(const std::string& path, const Location& where);
/// Throws OrderError at `where` unless the file is there and begins as TrueType or OpenType does.
void check_font(const std::string& path, const Location& where);

}  // namespace duskleaf
