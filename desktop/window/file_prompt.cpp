#include "desktop/window/file_prompt.hpp"

#include <algorithm>
#include <cstdlib>
#include <filesystem>
#include <system_error>
#include <utility>
#include <vector>

namespace heatledger::window {
namespace {

namespace fs = std::filesystem;

constexpr std::size_t kMostEntries = 500;

const char* title_of(FilePrompt::Purpose purpose) {
  switch (purpose) {
    case FilePrompt::Purpose::Open:
      return "Open a worksheet";
    case FilePrompt::Purpose::Save:
      return "Save the worksheet as";
    case FilePrompt::Purpose::Report:
      return "Write a report (HTML, prints as it stands)";
    case FilePrompt::Purpose::Tables:
      return "Write every table (.csv) or the sheet as Markdown (.md)";
    case FilePrompt::Purpose::Compare:
      return "Compare with another worksheet";
  }
  return "";
}

std::string_view ending_of(FilePrompt::Purpose purpose) {
  switch (purpose) {
    case FilePrompt::Purpose::Open:
      return ".json";
    case FilePrompt::Purpose::Save:
      return ".heatledger.json";
    case FilePrompt::Purpose::Report:
      return ".html";
    case FilePrompt::Purpose::Tables:
      return ".csv";
    case FilePrompt::Purpose::Compare:
      return ".json";
  }
  return "";
}

bool ends_with(std::string_view text, std::string_view end) {
  return text.size() >= end.size() && text.substr(text.size() - end.size()) == end;
}

std::string lower(std::string text) {
  for (char& c : text) {
    if (c >= 'A' && c <= 'Z') c = static_cast<char>(c - 'A' + 'a');
  }
  return text;
}

/// "~/x" as the shell reads it.
fs::path expanded(const std::string& path) {
  if (path == "~" || path.substr(0, 2) == "~/") {
    const char* home = std::getenv("HOME");
    if (home != nullptr) return fs::path(home) / path.substr(std::min<std::size_t>(2, path.size()));
  }
  return path;
}

/// What was typed split at the last slash: the folder as typed, and the beginning of a name.
std::pair<std::string, std::string> split(const std::string& typed) {
  const std::size_t slash = typed.rfind('/');
  if (slash == std::string::npos) return {"", typed};
  return {typed.substr(0, slash + 1), typed.substr(slash + 1)};
}

}  // namespace

void FilePrompt::start(Purpose purpose, const std::string& path) {
  purpose_ = purpose;
  active_ = true;
  complaint_.clear();
  replaces_.clear();
  field_.start(path, false);
  view_.reset();
  refresh();
}

void FilePrompt::complain(std::string text) {
  active_ = true;
  complaint_ = std::move(text);
}

void FilePrompt::refresh() {
  const auto [folder, begins] = split(field_.text());
  std::error_code problem;
  const fs::path where = folder.empty() ? fs::path(".") : expanded(folder);
  std::vector<ListItem> folders, files;
  const std::string wanted = lower(begins);
  // An iterator that is stepped by hand: the range form throws where a folder cannot be read.
  fs::directory_iterator entry(where, fs::directory_options::skip_permission_denied, problem);
  for (; !problem && entry != fs::directory_iterator(); entry.increment(problem)) {
    const std::string name = entry->path().filename().string();
    if (name.empty() || (name[0] == '.' && (begins.empty() || begins[0] != '.'))) continue;
    if (lower(name).compare(0, wanted.size(), wanted) != 0) continue;
    std::error_code unreadable;
    if (entry->is_directory(unreadable)) {
      folders.push_back({name + "/", "folder"});
    } else if (ends_with(name, ending_of(purpose_)) && name != begins) {
      files.push_back({name, ""});
    }
    if (folders.size() + files.size() >= kMostEntries) break;
  }
  const auto by_name = [](const ListItem& a, const ListItem& b) { return a.text < b.text; };
  std::sort(folders.begin(), folders.end(), by_name);
  std::sort(files.begin(), files.end(), by_name);
  files.insert(files.end(), folders.begin(), folders.end());
  if (!folder.empty() && begins.empty()) files.push_back({"../", "folder above"});
  list_.show(std::move(files), -1);
  listed_ = folder;
}

FilePrompt::Outcome FilePrompt::take(const ListItem& item) {
  field_.replace(listed_ + item.text);
  complaint_.clear();
  if (!item.text.empty() && item.text.back() == '/') {
    refresh();
    return Outcome::Waiting;
  }
  list_.hide();
  return accept();
}

FilePrompt::Outcome FilePrompt::accept() {
  const std::string typed = one_line(field_.text());
  if (typed.empty()) {
    complaint_ = "Type a file name.";
    return Outcome::Waiting;
  }
  fs::path path = expanded(typed);
  std::error_code problem;
  if (fs::is_directory(path, problem)) {
    field_.replace(typed.back() == '/' ? typed : typed + "/");
    refresh();
    return Outcome::Waiting;
  }
  if (purpose_ == Purpose::Open) {
    if (!fs::exists(path, problem) && fs::exists(path.string() + ".heatledger.json", problem))
      path += ".heatledger.json";
    if (!fs::exists(path, problem)) {
      complaint_ = "There is no such file.";
      return Outcome::Waiting;
    }
  } else {
    if (!path.has_extension()) path += std::string(ending_of(purpose_));
    if (fs::exists(path, problem) && replaces_ != path.string()) {
      replaces_ = path.string();
      complaint_ = path.filename().string() + " exists: press Enter again to replace it.";
      return Outcome::Waiting;
    }
  }
  chosen_ = path.string();
  active_ = false;
  return Outcome::Chosen;
}

FilePrompt::Outcome FilePrompt::key(const KeyPress& press) {
  switch (press.key) {
    case Key::Escape:
      active_ = false;
      return Outcome::Cancelled;
    case Key::Down:
      list_.move(1);
      return Outcome::Waiting;
    case Key::Up:
      list_.move(-1);
      return Outcome::Waiting;
    case Key::PageDown:
      list_.move(8);
      return Outcome::Waiting;
    case Key::PageUp:
      list_.move(-8);
      return Outcome::Waiting;
    case Key::Tab:
      if (list_.chosen() == nullptr) list_.move(1);
      if (const ListItem* item = list_.chosen()) {
        // Tab completes what is typed; Enter goes on.
        field_.replace(listed_ + item->text);
        refresh();
      }
      return Outcome::Waiting;
    case Key::Enter:
      if (const ListItem* item = list_.chosen()) return take(ListItem(*item));
      return accept();
    default:
      break;
  }
  const std::string before = field_.text();
  field_.key(press);
  if (field_.text() != before) {
    complaint_.clear();
    replaces_.clear();
    refresh();
  }
  return Outcome::Waiting;
}

void FilePrompt::character(char32_t code) {
  field_.character(code);
  complaint_.clear();
  replaces_.clear();
  refresh();
}

FilePrompt::Outcome FilePrompt::mouse_down(const Fonts& fonts, Point at, int clicks) {
  if (const std::optional<int> index = list_.hit(at))
    return take(ListItem(list_.items()[static_cast<std::size_t>(*index)]));
  if (view_.box().contains(at)) {
    field_.put_caret(view_.offset_at_point(fonts, field_, at), false);
    if (clicks == 2) field_.select_word(field_.caret());
    if (clicks > 2) field_.select_all();
  }
  return Outcome::Waiting;
}

void FilePrompt::draw(Canvas& canvas, Rect bounds, bool caret_on) {
  canvas.fill(bounds, 0x30202224u);
  const float width = std::min(620.0f, bounds.width - 40);
  Rect panel{bounds.x + (bounds.width - width) / 2, bounds.y + 46, width,
             complaint_.empty() ? 92.0f : 114.0f};
  canvas.fill({panel.x + 4, panel.y + 4, panel.width, panel.height}, 0x28000000u);
  canvas.fill(panel, ink::kPaper);
  canvas.frame(panel, ink::kEdge);
  canvas.text_in({panel.x + 16, panel.y + 10, panel.width - 32, 22}, Type::Strong, ink::kText,
                 page::Align::Left, title_of(purpose_));
  canvas.text_in({panel.x + 16, panel.y + 10, panel.width - 32, 22}, Type::Small, ink::kQuiet,
                 page::Align::Right, "Enter · Tab completes · Esc");
  const Rect field{panel.x + 14, panel.y + 44, panel.width - 28, 30};
  view_.draw(canvas, field_, field, Type::Body, caret_on, "path/name" + std::string(ending_of(purpose_)));
  if (!complaint_.empty()) {
    canvas.text_in({field.x, field.bottom() + 6, field.width, 20}, Type::Small, ink::kCaution,
                   page::Align::Left, complaint_);
  }
  list_.draw(canvas, {field.x, field.y, field.width, complaint_.empty() ? field.height : field.height + 26},
             bounds);
}

}  // namespace heatledger::window
