#include "sheet/template.hpp"

#include <gtest/gtest.h>

#include "base/embedded.hpp"

namespace duskleaf {
namespace {

struct BadTemplate {
  const char* label;
  const char* text;
  const char* message;  // begins so
};

class Template : public testing::TestWithParam<BadTemplate> {};

TEST_P(Template, SaysWhatIsWrongAndWhere) {
  try {
    parse_template(GetParam().text, "page.yaml");
    FAIL() << GetParam().label << ": accepted";
  } catch (const OrderError& error) {
    EXPECT_EQ(std::string(error.what()).substr(0, std::string(GetParam().message).size()),
              GetParam().message);
  }
}

#define HEAD "title: handout.title\nsubject: handout.subject\npapers: [A4]\n"

INSTANTIATE_TEST_SUITE_P(
    Mistakes, Template,
    testing::Values(
        BadTemplate{"a block that is none",
                    HEAD "pages:\n  - bands:\n      - blocks:\n          - block: domes\n",
                    "page.yaml:7:20: "},
        BadTemplate{"an option that the block has not",
                    HEAD "pages:\n  - bands:\n      - blocks:\n          - block: dome\n           "
                         " side: pole\n",
                    "page.yaml:8:13: "},
        BadTemplate{"an option's value that is none",
                    HEAD "pages:\n  - bands:\n      - blocks:\n          - block: dome\n           "
                         " facing: east\n",
                    "page.yaml:8:21: "},
        BadTemplate{"steps and share at once",
                    HEAD
                    "pages:\n  - bands:\n      - steps: 3\n        share: 2\n        blocks: []\n",
                    "page.yaml:7:16: a band with both steps and share"},
        BadTemplate{"a block over another that fills the room",
                    HEAD "pages:\n  - bands:\n      - blocks:\n          - block: dome\n           "
                         " over: true\n            fill: true\n",
                    "page.yaml:9:19: a block with both over and fill"},
        BadTemplate{
            "columns that overlap",
            HEAD "pages:\n  - bands:\n      - columns:\n          - {from: 1, to: 6, blocks: []}\n"
                 "          - {from: 6, to: 12, blocks: []}\n",
            "page.yaml:8:13: a column that overlaps the one before it"},
        BadTemplate{
            "a column past the grid",
            HEAD
            "pages:\n  - bands:\n      - columns:\n          - {from: 1, to: 13, blocks: []}\n",
            "page.yaml:7:27: "},
        BadTemplate{"no such paper", "title: a\nsubject: b\npapers: [A11]\npages: []\n",
                    "page.yaml:3:10: unknown paper 'A11'"},
        BadTemplate{"no pages", HEAD, "page.yaml:1:1: "}),
    [](const auto& row) {
      std::string name = row.param.label;
      for (char& ch : name)
        if (!std::isalnum(static_cast<unsigned char>(ch))) ch = '_';
      return name;
    });

#undef HEAD

TEST(TemplateFiles, EveryBundledTemplateReads) {
  int count = 0;
  for (std::string_view name : embedded_names("templates/")) {
    if (name.starts_with("templates/words/")) continue;
    EXPECT_NO_THROW(parse_template(embedded_file(name), std::string(name))) << name;
    ++count;
  }
  EXPECT_GE(count, 1);
}

TEST(TemplateFiles, OptionsNotGivenTakeTheirDefaults) {
  const PageTemplate page = parse_template(
      "title: t\nsubject: s\npapers: [A4]\npages:\n  - bands:\n      - blocks: [{block: dome}]\n",
      "page.yaml");
  EXPECT_EQ(page.pages.at(0).bands.at(0).columns.at(0).blocks.at(0).options.get("facing"),
            "equator");
}

}  // namespace
}  // namespace duskleaf
