#include <unistd.h>

#include <cerrno>
#include <cstring>
#include <memory>
#include <string>
#include <string_view>
#include <vector>

#include "core/page/bulk.hpp"
#include "desktop/cli/command.hpp"
#include "desktop/cli/output.hpp"

namespace heatledger::cli {
namespace {

struct Options {
  std::string set = "average";
  bool full = false;
};

constexpr std::size_t kChunk = 1 << 16;

/// Standard input in lines, with one buffer that is never longer than the longest line allowed plus one
/// chunk.
class Lines {
 public:
  enum class Got : std::uint8_t { Line, TooLong, WouldWait, End };

  /// The next line, or WouldWait when the buffer holds no whole line: the caller then flushes and calls
  /// fill().
  Got next(std::string_view& line) {
    while (true) {
      const std::string_view rest(buffer_.data() + from_, filled_ - from_);
      const std::size_t length = rest.substr(searched_).find('\n');
      if (length != std::string_view::npos) {
        line = rest.substr(0, searched_ + length);
        from_ += searched_ + length + 1;
        searched_ = 0;
        if (skipping_) {
          skipping_ = false;
          continue;
        }
        return Got::Line;
      }
      if (skipping_) {
        from_ = filled_;
        searched_ = 0;
      } else if (rest.size() > page::kLongestBulkLine) {
        line = rest;
        from_ = filled_;
        searched_ = 0;
        skipping_ = true;
        return Got::TooLong;
      } else {
        searched_ = rest.size();
      }
      if (!ended_) return Got::WouldWait;
      if (from_ == filled_) return Got::End;
      line = std::string_view(buffer_.data() + from_, filled_ - from_);
      from_ = filled_;
      searched_ = 0;
      return Got::Line;
    }
  }

  bool fill() {
    if (from_ > 0) {
      std::memmove(buffer_.data(), buffer_.data() + from_, filled_ - from_);
      filled_ -= from_;
      from_ = 0;
    }
    if (buffer_.size() < filled_ + kChunk) buffer_.resize(filled_ + kChunk);
    ssize_t got = 0;
    do {
      got = ::read(STDIN_FILENO, buffer_.data() + filled_, kChunk);
    } while (got < 0 && errno == EINTR);
    if (got < 0) return false;
    ended_ = got == 0;
    filled_ += static_cast<std::size_t>(got);
    return true;
  }

 private:
  std::vector<char> buffer_;
  std::size_t from_ = 0, filled_ = 0;
  std::size_t searched_ = 0;  ///< bytes behind from_ known to hold no newline
  bool skipping_ = false, ended_ = false;
};

bool write_out(std::string& text) {
  std::string_view rest = text;
  while (!rest.empty()) {
    const ssize_t written = ::write(STDOUT_FILENO, rest.data(), rest.size());
    if (written < 0 && errno == EINTR) continue;
    if (written <= 0) {
      complain({"file.cannot_write",
                std::string("Standard output cannot be written: ") + std::strerror(errno) + ".", "", ""});
      return false;
    }
    rest.remove_prefix(static_cast<std::size_t>(written));
  }
  text.clear();
  return true;
}

int run(const Options& options) {
  page::BulkOptions how;
  how.route = options.set == "context" ? page::BondRoute::Context : page::BondRoute::Average;
  how.full = options.full;
  page::Bulk bulk(how);
  Lines lines;
  std::string answers;
  std::string_view line;
  while (true) {
    switch (lines.next(line)) {
      case Lines::Got::Line:
        bulk.answer(line, answers);
        break;
      case Lines::Got::TooLong:
        bulk.answer_too_long(line, answers);
        break;
      case Lines::Got::WouldWait:
        // A program that asks line by line through a pipe gets its answers before more is read.
        if (!write_out(answers)) return kWrongInput;
        if (!lines.fill()) {
          complain({"file.cannot_read",
                    std::string("Standard input cannot be read: ") + std::strerror(errno) + ".", "", ""});
          return kWrongInput;
        }
        break;
      case Lines::Got::End:
        return write_out(answers) ? kDone : kWrongInput;
    }
    if (answers.size() >= kChunk && !write_out(answers)) return kWrongInput;
  }
}

}  // namespace

void add_bulk(CLI::App& app, Chosen& chosen) {
  CLI::App* command = app.add_subcommand(
      "bulk", "Answers questions from standard input, one JSON object a line in, one out, in order");
  const auto options = std::make_shared<Options>();
  command
      ->add_option("--set", options->set,
                   "Whose figures to state: average bonds (routes.context is left out), or bonds in context")
      ->check(CLI::IsMember({"average", "context"}))
      ->capture_default_str();
  command->add_flag("--full", options->full,
                    "Whole answers, as `tally --json` and `species --json` give them");
  command->footer(
      "Lines:  {\"id\": 1, \"equation\": \"H2 + Cl2 -> 2 HCl\"}\n"
      "        {\"id\": 2, \"species\": \"ethyl acetate\", \"estimate_only\": true}\n"
      "        {\"id\": 3, \"smiles\": \"CCO\"}\n"
      "A line that cannot be answered gives {\"id\", \"error\"} in its place; the run goes on and ends with "
      "status 0.");
  command->callback([options, &chosen] { chosen = [options] { return run(*options); }; });
}

}  // namespace heatledger::cli
