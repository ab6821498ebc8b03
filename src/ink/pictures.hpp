#pragma once

#include <map>
#include <memory>
#include <qpdf/QPDF.hh>
#include <qpdf/QPDFObjectHandle.hh>
#include <string>
#include <string_view>
#include <vector>

#include "sheet/marks.hpp"

namespace duskleaf {

/// The pictures of a document; equal bytes are one picture of the file.
class DocumentPictures {
 public:
  /// The picture's resource name, such as "/P0". Throws std::runtime_error when its PNG bytes are
  /// broken.
  std::string name(const Image&);
  /// The resource dictionary's /XObject entry.
  QPDFObjectHandle make(QPDF&) const;

 private:
  struct Packed;
  std::vector<std::shared_ptr<const Packed>> pictures_;
  std::map<std::pair<std::string_view, bool>, std::size_t> index_;  // by PNG bytes and grey
  std::vector<std::shared_ptr<const std::string>> held_;            // keeps the map's bytes alive
  static std::shared_ptr<const Packed> pack(const Image&);
};

}  // namespace duskleaf
