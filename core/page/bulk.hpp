// Many questions in a stream: one line of JSON in, one line out. Reading and writing of the stream is the
// face's part; memory does not grow with the number of lines.
#pragma once

#include <memory>
#include <string>
#include <string_view>

#include "core/page/answers.hpp"

namespace heatledger::page {

struct BulkOptions {
  BondRoute route = BondRoute::Average;
  bool full = false;  ///< the whole answer of `tally` and `species` instead of the short one
};

/// Longest line that is read [bytes]; a longer one is answered with an error.
constexpr std::size_t kLongestBulkLine = std::size_t{1} << 20;

class Bulk {
 public:
  explicit Bulk(const BulkOptions& options);
  ~Bulk();

  /// Answers one line (without its newline): appends one line of JSON, newline included. An empty line gives
  /// nothing. The line is an object with one of "equation", "species", "smiles", and "id" (handed back as it
  /// came) and "estimate_only" where wanted; other keys are passed over.
  /// @errors inside the answer: bulk.not_json, bulk.not_an_object, bulk.duplicate_key, bulk.no_question,
  ///         bulk.several_questions, bulk.wrong_type, and those of answers.hpp
  void answer(std::string_view line, std::string& out);
  /// The answer to a line longer than kLongestBulkLine, of which only the beginning was kept.
  void answer_too_long(std::string_view beginning, std::string& out);

 private:
  struct State;
  std::unique_ptr<State> state_;
};

}  // namespace heatledger::page
