// `heatledger bulk` with short answers on one core: equations a second and peak memory, by kind of input.
#include <fcntl.h>
#include <sys/resource.h>
#include <sys/wait.h>
#include <unistd.h>

#include <algorithm>
#include <array>
#include <chrono>
#include <cstdio>
#include <filesystem>
#include <fstream>
#include <functional>

#include "tests/bench/programs.hpp"

namespace heatledger::bench {
namespace {

struct Run {
  double seconds = 0, cpu_seconds = 0;
  long kilobytes = 0;  ///< 0: the program failed
};

double seconds(const timeval& time) {
  return static_cast<double>(time.tv_sec) + static_cast<double>(time.tv_usec) / 1e6;
}

Run run_bulk(const std::string& input, const char* set) {
  const auto begin = std::chrono::steady_clock::now();
  const pid_t child = ::fork();
  if (child == 0) {
    const int in = ::open(input.c_str(), O_RDONLY), out = ::open("/dev/null", O_WRONLY);
    ::dup2(in, STDIN_FILENO);
    ::dup2(out, STDOUT_FILENO);
    ::execl(HEATLEDGER_PROGRAM, HEATLEDGER_PROGRAM, "bulk", "--set", set, static_cast<char*>(nullptr));
    ::_exit(127);
  }
  int status = 0;
  rusage used{};
  ::wait4(child, &status, 0, &used);
  if (!WIFEXITED(status) || WEXITSTATUS(status) != 0) return {};
  return {std::chrono::duration<double>(std::chrono::steady_clock::now() - begin).count(),
          seconds(used.ru_utime) + seconds(used.ru_stime), used.ru_maxrss};
}

std::string chain(int length) {
  return std::string(static_cast<std::size_t>(length), 'C');
}

/// Named species in a few everyday equations.
std::string named(int line) {
  static const std::array<const char*, 5> kEquations{
      "nitrobenzene(l) + 3 H2 -> aniline(l) + 2 H2O(l)",
      "acetic acid(l) + ethanol(l) -> ethyl acetate(l) + water(l)", "CH4 + 2 O2 -> CO2 + 2 H2O",
      "benzene(l) + Cl2 -> chlorobenzene(l) + HCl", "toluene(l) + 9 O2 -> 7 CO2 + 4 H2O(l)"};
  return kEquations[static_cast<std::size_t>(line) % kEquations.size()];
}

/// Some thousand esterifications: each equation new, its species soon known.
std::string combined(int line) {
  const std::string acid = chain(1 + line % 30), alcohol = chain(1 + line / 30 % 30);
  return "\\\"" + acid + "C(=O)O\\\" + \\\"" + alcohol + "O\\\" -> \\\"" + acid + "C(=O)O" + alcohol +
         "\\\" + H2O";
}

/// Structures that hardly repeat: chains with substituents placed by the line's number.
std::string distinct(int line) {
  static const std::array<const char*, 8> kGroups{"C",     "C(C)",  "C(F)", "C(O)",
                                                  "C(Cl)", "C(CC)", "C(N)", "C(=O)"};
  std::string body;
  for (int rest = line, i = 0; i < 7; ++i, rest /= 8) body += kGroups[static_cast<std::size_t>(rest % 8)];
  return "\\\"C" + body + "C(=O)O\\\" + \\\"CO\\\" -> \\\"C" + body + "C(=O)OC\\\" + H2O";
}

using Input = std::function<std::string(int)>;

void measure(std::vector<BulkFigure>& figures, const char* what, const char* set, int lines,
             const Input& equation) {
  const std::string path =
      (std::filesystem::temp_directory_path() / ("heatledger-bulk-" + std::to_string(::getpid()))).string();
  {
    std::ofstream out(path);
    for (int i = 0; i < lines; ++i) out << "{\"id\":" << i << ",\"equation\":\"" << equation(i) << "\"}\n";
  }
  BulkFigure figure;
  figure.what = std::string("--set ") + set + ", " + what;
  figure.lines = lines;
  std::array<double, 3> rates{};
  for (double& rate : rates) {
    const Run run = run_bulk(path, set);
    if (run.kilobytes == 0) {
      std::filesystem::remove(path);
      return;
    }
    rate = lines / run.seconds;
    figure.per_cpu_second = std::max(figure.per_cpu_second, lines / run.cpu_seconds);
    figure.kilobytes = std::max(figure.kilobytes, run.kilobytes);
  }
  std::filesystem::remove(path);
  std::sort(rates.begin(), rates.end());
  figure.per_second = rates[1];
  figure.least = rates.front();
  figure.most = rates.back();
  figures.push_back(figure);
}

}  // namespace

std::vector<BulkFigure> bulk_figures() {
  std::vector<BulkFigure> figures;
  for (const int lines : {1000, 10000, 100000, 1000000})
    measure(figures, "named species", "average", lines, named);
  measure(figures, "900 esterifications", "average", 200000, combined);
  measure(figures, "structures that hardly repeat", "average", 20000, distinct);
  measure(figures, "structures that hardly repeat", "context", 20000, distinct);
  return figures;
}

std::vector<SheetTime> sheet_times(const std::string& command) {
  std::vector<SheetTime> times;
  std::FILE* lines = ::popen(command.c_str(), "r");
  if (lines == nullptr) return times;
  std::array<char, 512> line{};
  while (std::fgets(line.data(), static_cast<int>(line.size()), lines) != nullptr) {
    const std::string text(line.data());
    const std::size_t tab = text.find('\t');
    SheetTime time;
    if (tab == std::string::npos ||
        std::sscanf(text.c_str() + tab, "\t%lf\t%lf", &time.median, &time.least) != 2)
      continue;
    time.name = text.substr(0, tab);
    times.push_back(time);
  }
  if (::pclose(lines) != 0) times.clear();
  return times;
}

}  // namespace heatledger::bench
