// Equations a second and peak memory of `heatledger bulk --set average`, short answers, on one core: the real
// program reads a file of lines and writes to /dev/null. Four species in each equation; three kinds of input.
#include <fcntl.h>
#include <sys/resource.h>
#include <sys/wait.h>
#include <unistd.h>

#include <algorithm>
#include <array>
#include <chrono>
#include <cstdio>
#include <cstdlib>
#include <filesystem>
#include <fstream>
#include <functional>
#include <string>

namespace {

struct Run {
  double seconds = 0;
  long kilobytes = 0;
};

Run run_bulk(const std::string& input) {
  const auto begin = std::chrono::steady_clock::now();
  const pid_t child = ::fork();
  if (child == 0) {
    const int in = ::open(input.c_str(), O_RDONLY), out = ::open("/dev/null", O_WRONLY);
    ::dup2(in, STDIN_FILENO);
    ::dup2(out, STDOUT_FILENO);
    ::execl(HEATLEDGER_PROGRAM, HEATLEDGER_PROGRAM, "bulk", "--set", "average", static_cast<char*>(nullptr));
    ::_exit(127);
  }
  int status = 0;
  rusage used{};
  ::wait4(child, &status, 0, &used);
  if (!WIFEXITED(status) || WEXITSTATUS(status) != 0) {
    std::fprintf(stderr, "bulk failed\n");
    std::exit(1);
  }
  return {std::chrono::duration<double>(std::chrono::steady_clock::now() - begin).count(), used.ru_maxrss};
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

void measure(const char* what, int lines, const std::function<std::string(int)>& equation) {
  const std::string path =
      (std::filesystem::temp_directory_path() / ("heatledger-bulk-" + std::to_string(::getpid()))).string();
  {
    std::ofstream out(path);
    for (int i = 0; i < lines; ++i) out << "{\"id\":" << i << ",\"equation\":\"" << equation(i) << "\"}\n";
  }
  std::array<double, 5> rates{};
  long kilobytes = 0;
  for (double& rate : rates) {
    const Run run = run_bulk(path);
    rate = lines / run.seconds;
    kilobytes = std::max(kilobytes, run.kilobytes);
  }
  std::filesystem::remove(path);
  std::sort(rates.begin(), rates.end());
  std::printf("%-34s %8d lines  %9.0f a second (%.0f to %.0f)  %6ld kB\n", what, lines, rates[2],
              rates.front(), rates.back(), kilobytes);
  std::fflush(stdout);
}

}  // namespace

int main() {
  measure("named species", 1000, named);
  measure("named species", 100000, named);
  measure("named species", 1000000, named);
  measure("900 esterifications", 200000, combined);
  measure("structures that hardly repeat", 50000, distinct);
  return 0;
}
