#include "core/page/requests.hpp"

#include <map>

#include "core/base/number_text.hpp"
#include "core/file/json.hpp"
#include "core/page/comparison.hpp"
#include "core/page/page_json.hpp"
#include "core/page/session.hpp"
#include "core/page/writers.hpp"

namespace heatledger::page {
namespace {

/// Faces open a handful of sheets; a caller that opens more without closing any is at fault and must not fill
/// memory.
constexpr std::size_t kMostSheets = 64;

struct Sheets {
  std::map<int, Session> open;
  int last = 0;
};

Sheets& sheets() {
  static Sheets all;
  return all;
}

std::string ok(std::string_view value) {
  return "{\"ok\":true,\"value\":" + std::string(value) + "}";
}

std::string ok_text(std::string_view text) {
  std::string value;
  file::append_json_string(value, text);
  return ok(value);
}

std::string failed(const Error& error) {
  std::string out = "{\"ok\":false,\"error\":{\"code\":";
  file::append_json_string(out, error.code);
  out += ",\"message\":";
  file::append_json_string(out, error.message);
  out += ",\"where\":";
  file::append_json_string(out, error.where);
  out += ",\"hint\":";
  file::append_json_string(out, error.hint);
  return out + "}}";
}

Error not_understood(const std::string& message, const std::string& where) {
  return {"request.not_understood", message, where,
          "Requests and their members stand in core/page/requests.hpp."};
}

/// A whole number from 0 to 2^53 as JSON spells it.
std::optional<std::uint64_t> whole_number(const file::Json* value) {
  if (value == nullptr || value->kind() != file::Json::Kind::Number) return std::nullopt;
  const std::optional<double> number = parse_number(value->text());
  constexpr double kMost = 9007199254740992.0;
  if (!number || *number < 0 || *number > kMost) return std::nullopt;
  const auto whole = static_cast<std::uint64_t>(*number);
  if (static_cast<double>(whole) != *number) return std::nullopt;
  return whole;
}

class Request {
 public:
  explicit Request(const file::Json& json) : json_(json) {}

  std::string answer() {
    const file::Json* verb = json_.find("do");
    if (verb == nullptr || !verb->is_string())
      return failed(not_understood("A request names what to do.", "do"));
    const std::string& name = verb->text();
    if (name == "new") return open_new();
    if (name == "open") return open_file();
    const std::optional<std::uint64_t> number = whole_number(json_.find("sheet"));
    const auto found =
        number && *number < 0x7fffffff ? sheets().open.find(static_cast<int>(*number)) : sheets().open.end();
    if (found == sheets().open.end()) {
      return failed({"request.no_such_sheet", "There is no open sheet of that number.", "sheet",
                     "\"new\" and \"open\" answer the number of a sheet."});
    }
    if (name == "close") {
      sheets().open.erase(found);
      return ok("true");
    }
    return answer_about(found->second, name);
  }

 private:
  std::string open_new() {
    if (sheets().open.size() >= kMostSheets) return failed(too_many());
    return take(Session());
  }

  std::string open_file() {
    if (sheets().open.size() >= kMostSheets) return failed(too_many());
    std::string text;
    if (!required("text", text)) return failed(problem_);
    Session session;
    const Status status = session.open(text);
    return status ? take(std::move(session)) : failed(status.error());
  }

  static std::string take(Session session) {
    const int number = ++sheets().last;
    sheets().open.emplace(number, std::move(session));
    return ok("{\"sheet\":" + std::to_string(number) + "}");
  }

  static Error too_many() {
    return {"request.too_many_sheets", "Too many sheets are open at once.", "sheet", "Close one first."};
  }

  /// A member that must be a text.
  bool required(const char* key, std::string& out) {
    const file::Json* value = json_.find(key);
    if (value == nullptr || !value->is_string()) {
      problem_ = not_understood("\"" + std::string(key) + "\" should be a text.", key);
      return false;
    }
    out = value->text();
    return true;
  }

  std::string answer_about(Session& sheet, const std::string& name) {
    if (name == "page") return page(sheet);
    if (name == "edit") return edit(sheet);
    if (name == "command") return command(sheet);
    if (name == "margin") return margin(sheet);
    if (name == "suggest") return suggest(sheet);
    if (name == "save") return ok_text(sheet.save());
    if (name == "export") return ok_text(sheet.file_text());
    if (name == "state") {
      return ok("{\"changed\":" + std::string(sheet.changed_since_save() ? "true" : "false") +
                ",\"revision\":" + std::to_string(sheet.page().revision) + "}");
    }
    if (name == "report") return ok_text(write_html(sheet.page(), sheet.workings()));
    if (name == "text") {
      const std::uint64_t width = whole_number(json_.find("width")).value_or(100);
      return ok_text(write_text(sheet.page(), static_cast<int>(std::min<std::uint64_t>(width, 1000))));
    }
    if (name == "csv") return ok_text(write_csv(sheet.page()));
    if (name == "markdown") return ok_text(write_markdown(sheet.page()));
    if (name == "compare") return compare(sheet);
    if (name == "svg") return svg(sheet);
    return failed(not_understood("There is no request \"" + name.substr(0, 80) + "\".", "do"));
  }

  /// The sheet as it was, or is, in another file against this one.
  std::string compare(Session& sheet) {
    const file::Json* text = json_.find("text");
    if (text == nullptr || !text->is_string())
      return failed(not_understood("A comparison needs the text of the other file.", "text"));
    const Result<Comparison> comparison = compare_sheets(text->text(), sheet.file_text());
    if (!comparison.ok()) return failed(comparison.error());
    return ok_text(write_html(comparison_page(*comparison), {}));
  }

  /// The page, or what changed since the revision that the caller has.
  std::string page(Session& sheet) {
    const Page& now = sheet.page();
    const std::optional<std::uint64_t> since = whole_number(json_.find("since"));
    if (!since || *since > now.revision) return ok(write_json(now));
    return ok(write_changes(now, *since, *since >= sheet.order_changed()));
  }

  std::string edit(Session& sheet) {
    std::string cell, text;
    if (!required("cell", cell) || !required("text", text)) return failed(problem_);
    const Status status = sheet.edit(cell, text);
    return status ? page(sheet) : failed(status.error());
  }

  std::string command(Session& sheet) {
    std::string name;
    if (!required("name", name)) return failed(problem_);
    std::map<std::string, std::string> arguments;
    if (const file::Json* list = json_.find("arguments")) {
      if (!list->is_object())
        return failed(not_understood("\"arguments\" should be an object of texts.", "arguments"));
      for (const file::Json::Member& member : list->members()) {
        if (!member.second.is_string()) {
          return failed(
              not_understood("An argument should be a text.", "arguments." + member.first.substr(0, 80)));
        }
        arguments[member.first] = member.second.text();
      }
    }
    const Status status = sheet.command(name, arguments);
    return status ? page(sheet) : failed(status.error());
  }

  std::string margin(Session& sheet) {
    std::string cell;
    if (!required("cell", cell)) return failed(problem_);
    const Result<Margin> found = sheet.margin(cell);
    return found ? ok(write_json(*found)) : failed(found.error());
  }

  std::string suggest(Session& sheet) {
    std::string text;
    if (!required("text", text)) return failed(problem_);
    constexpr std::uint64_t kMost = 50;
    const std::uint64_t limit = std::min(whole_number(json_.find("limit")).value_or(8), kMost);
    std::string out = "[";
    for (const Session::Suggestion& suggestion : sheet.suggest(text, static_cast<std::size_t>(limit))) {
      if (out.size() > 1) out += ',';
      out += "{\"text\":";
      file::append_json_string(out, suggestion.insert);
      out += ",\"name\":";
      file::append_json_string(out, suggestion.name);
      out += ",\"remark\":";
      file::append_json_string(out, suggestion.remark);
      out += '}';
    }
    return ok(out + "]");
  }

  std::string svg(Session& sheet) {
    std::string id;
    if (!required("drawing", id)) return failed(problem_);
    for (const Block& block : sheet.page().blocks) {
      const Drawing* drawing = std::get_if<Drawing>(&block);
      if (drawing != nullptr && drawing->id == id) return ok_text(write_svg(*drawing));
    }
    return failed(not_understood("The page has no drawing \"" + id.substr(0, 80) + "\".", "drawing"));
  }

  const file::Json& json_;
  Error problem_;
};

}  // namespace

std::string handle_request(std::string_view request) {
  const Result<file::Json> json = file::read_json(request);
  if (!json) {
    Error error = json.error();
    error.code = "request.not_understood";
    return failed(error);
  }
  if (!json->is_object()) return failed(not_understood("A request is a JSON object.", "top level"));
  return Request(*json).answer();
}

}  // namespace heatledger::page
