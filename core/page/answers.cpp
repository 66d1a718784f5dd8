#include "core/page/answers.hpp"

#include "core/page/json_text.hpp"

namespace heatledger::page {

std::string error_json(const Error& error) {
  std::string text;
  JsonText json(text);
  json.open_object().key("error");
  write_error(json, error);
  json.close_object();
  text += '\n';
  return text;
}

std::string error_text(const Error& error) {
  std::string text = error.message;
  if (!error.where.empty()) text += " (" + error.where + ")";
  text += '\n';
  if (!error.hint.empty()) text += error.hint + '\n';
  return text;
}

}  // namespace heatledger::page
