#include "tests/core/support/test_files.hpp"

#include <dirent.h>
#include <gtest/gtest.h>

#include <algorithm>
#include <cstdio>
#include <cstdlib>
#include <fstream>
#include <sstream>

namespace heatledger::test {

std::string read_source_file(const std::string& path) {
  std::ifstream in(std::string(HEATLEDGER_SOURCE_DIR) + "/" + path, std::ios::binary);
  if (!in) {
    ADD_FAILURE() << "cannot read " << path;
    return {};
  }
  std::ostringstream text;
  text << in.rdbuf();
  return text.str();
}

std::vector<std::string> list_source_folder(const std::string& path) {
  std::vector<std::string> names;
  DIR* folder = opendir((std::string(HEATLEDGER_SOURCE_DIR) + "/" + path).c_str());
  if (folder == nullptr) {
    ADD_FAILURE() << "cannot list " << path;
    return names;
  }
  while (const dirent* entry = readdir(folder)) {
    if (entry->d_name[0] != '.') names.emplace_back(entry->d_name);
  }
  closedir(folder);
  std::sort(names.begin(), names.end());
  return names;
}

std::size_t Table::column(const std::string& name) const {
  const auto at = std::find(columns.begin(), columns.end(), name);
  if (at == columns.end()) {
    std::fprintf(stderr, "table has no column %s\n", name.c_str());
    std::abort();
  }
  return static_cast<std::size_t>(at - columns.begin());
}

Table read_table(const std::string& path) {
  Table table;
  std::istringstream lines(read_source_file(path));
  for (std::string line; std::getline(lines, line);) {
    if (line.empty() || line[0] == '#') continue;
    std::vector<std::string> cells;
    std::size_t start = 0;
    for (std::size_t tab; (tab = line.find('\t', start)) != std::string::npos; start = tab + 1) {
      cells.push_back(line.substr(start, tab - start));
    }
    cells.push_back(line.substr(start));
    if (table.columns.empty()) {
      table.columns = cells;
    } else {
      EXPECT_EQ(cells.size(), table.columns.size()) << path << ": " << line;
      table.rows.push_back(cells);
    }
  }
  return table;
}

BadCase read_bad_case(const std::string& path) {
  const std::string content = read_source_file(path);
  const std::size_t line = content.find('\n');
  const std::size_t blank = content.find(' ');
  if (line == std::string::npos || blank >= line || content.back() != '\n') {
    ADD_FAILURE() << path << ": first line is to be \"code offset\", the last to end with a line end";
    return {};
  }
  BadCase bad{content.substr(0, blank), content.substr(blank + 1, line - blank - 1),
              content.substr(line + 1)};
  if (!bad.text.empty()) bad.text.pop_back();
  return bad;
}

}  // namespace heatledger::test
