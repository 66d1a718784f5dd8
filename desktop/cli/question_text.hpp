// A question given as an argument, or on standard input when the argument is "-".
#pragma once

#include <string>

#include "core/base/result.hpp"
#include "desktop/cli/files.hpp"

namespace heatledger::cli {

/// @errors question.several_lines: standard input holds more than one question
inline Result<std::string> question_text(const std::string& argument) {
  if (argument != "-") return argument;
  Result<std::string> text = read_file("-");
  if (!text.ok()) return text.error();
  std::string& question = text.value();
  const std::size_t first = question.find_first_not_of(" \t\r\n");
  if (first == std::string::npos) return std::string();
  question = question.substr(first, question.find_last_not_of(" \t\r\n") - first + 1);
  if (question.find('\n') != std::string::npos) {
    return Error{"question.several_lines", "Standard input holds more than one line.", "line 2",
                 "Ask one question at a time, or use `heatledger bulk` for many."};
  }
  return question;
}

}  // namespace heatledger::cli
