// One bad file per case in tests/data/file/bad: its name begins with the code it must be refused with.
#include <gtest/gtest.h>

#include "core/file/worksheet_file.hpp"
#include "tests/core/support/test_files.hpp"

namespace heatledger::file {
namespace {

/// tests/data/file/bad_expected.tsv: file, code, where.
TEST(BadFiles, AreRefusedWithCodeAndPlace) {
  const std::string folder = "tests/data/file/bad";
  const test::Table expected = test::read_table("tests/data/file/bad_expected.tsv");
  const std::vector<std::string> names = test::list_source_folder(folder);
  EXPECT_EQ(names.size(), expected.rows.size())
      << "every file of the folder has its line, and every line its file";
  for (const auto& row : expected.rows) {
    const std::string& name = row[expected.column("file")];
    const Result<Opened> opened = read_worksheet(test::read_source_file(folder + "/" + name));
    ASSERT_FALSE(opened.ok()) << name;
    EXPECT_EQ(opened.error().code, row[expected.column("code")]) << name;
    EXPECT_EQ(opened.error().where, row[expected.column("where")]) << name;
    EXPECT_FALSE(opened.error().message.empty()) << name;
    EXPECT_FALSE(opened.error().hint.empty()) << name;
  }
}

}  // namespace
}  // namespace heatledger::file
