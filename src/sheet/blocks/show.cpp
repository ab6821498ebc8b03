#include "sheet/blocks/blocks.hpp"

namespace duskleaf {

double draw_show(const BlockContext&, const BlockOptions&, const Box&, std::vector<Mark>&) {
  return 0;
}

}  // namespace duskleaf
