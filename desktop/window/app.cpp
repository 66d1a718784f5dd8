#include "desktop/window/app.hpp"

#include <algorithm>
#include <array>
#include <cmath>
#include <ctime>
#include <filesystem>
#include <system_error>
#include <utility>

#include "core/page/comparison.hpp"
#include "core/page/writers.hpp"
#include "desktop/cli/files.hpp"
#include "desktop/window/margin_view.hpp"

namespace heatledger::window {
namespace {

constexpr float kEdge = 22;      // desk around the paper
constexpr float kPaperPad = 32;  // paper around the content
constexpr float kWidestPaper = 960, kNarrowestPaper = 480;
constexpr float kMessageHeight = 28;
constexpr double kBlink = 0.53;  // [s]

std::string file_name(const std::string& path) {
  return std::filesystem::path(path).filename().string();
}

std::string clock_text() {
  const std::time_t now = std::time(nullptr);
  std::tm local{};
  localtime_r(&now, &local);
  std::array<char, 16> text{};
  std::strftime(text.data(), text.size(), "%H:%M", &local);
  return text.data();
}

/// "sheet.heatledger.json" to "sheet.html".
std::string beside(const std::string& path, const std::string& ending) {
  if (path.empty()) return "sheet" + ending;
  constexpr std::string_view kOwn = ".heatledger.json";
  std::string stem = path;
  if (stem.size() > kOwn.size() && stem.compare(stem.size() - kOwn.size(), kOwn.size(), kOwn) == 0) {
    stem.resize(stem.size() - kOwn.size());
  } else {
    stem = std::filesystem::path(path).replace_extension().string();
  }
  return stem + ending;
}

}  // namespace

App::App(Backend& backend)
    : backend_(backend),
      field_({[&backend] { return backend.clipboard(); },
              [&backend](const std::string& text) { backend.set_clipboard(text); }}),
      prompt_({[&backend] { return backend.clipboard(); },
               [&backend](const std::string& text) { backend.set_clipboard(text); }}) {
  update_bar();
}

void App::open(const std::string& path) {
  std::error_code problem;
  if (std::filesystem::exists(path, problem)) {
    load(path);  // a folder is refused there with its reason
    return;
  }
  path_ = path;
  say(file_name(path) + " is new: it is made when you save.");
  page_changed();
}

void App::select(const std::string& cell) {
  select_cell(layout().find(cell));
}

std::string App::cell_places() {
  std::string text;
  layout();
  const Point origin = content_origin();
  for (const PlacedCell& placed : layout_.cells) {
    if (!can_select(placed)) continue;
    text += placed.cell->id;
    for (const float value :
         {placed.area.x + origin.x, placed.area.y + origin.y, placed.area.width, placed.area.height}) {
      text += '\t' + std::to_string(static_cast<int>(std::lround(value * fonts_.scale())));
    }
    text += '\n';
  }
  return text;
}

void App::run() {
  while (!closing_) {
    if (dirty_) {
      dirty_ = false;
      draw();
    }
    const bool blinks = !editing_.empty() || prompt_.active();
    const bool caret = caret_on_;
    backend_.wait(*this, blinks ? kBlink : -1.0);
    if (blinks && !dirty_ && caret == caret_on_) {
      caret_on_ = !caret_on_;  // nothing happened for the length of a blink
      dirty_ = true;
    } else if (dirty_) {
      caret_on_ = true;
    }
  }
}

// --- layout
// -----------------------------------------------------------------------------------------------------------

Rect App::paper() const {
  const Point size = backend_.size();
  const float margin = std::clamp(size.x * 0.235f, 220.0f, 300.0f);
  float width = size.x - 3 * kEdge - margin;
  width = std::clamp(width, kNarrowestPaper, kWidestPaper);
  const float all = width + kEdge + margin;
  return {std::max(kEdge, (size.x - all) / 2), TopBar::kHeight + kEdge, width, 0};
}

Rect App::margin_area() const {
  const Point size = backend_.size();
  const Rect sheet = paper();
  const float x = sheet.right() + kEdge;
  return {x, sheet.y + 8, std::max(0.0f, std::min(300.0f, size.x - x - kEdge)),
          size.y - sheet.y - 8 - kMessageHeight};
}

Point App::content_origin() const {
  const Rect sheet = paper();
  return {sheet.x + kPaperPad, sheet.y + 26 - scroll_};
}

float App::content_width() const {
  return paper().width - 2 * kPaperPad;
}

const Layout& App::layout() {
  const float scale = backend_.scale() * zoom_;
  if (fonts_.scale() != scale) {
    fonts_.load(scale);
    backend_.fonts_changed();
    layout_stale_ = true;
  }
  const float width = content_width();
  if (layout_stale_ || width != laid_out_width_) {
    layout_ = lay_out(session_.page(), fonts_, width);
    laid_out_width_ = width;
    layout_stale_ = false;
    clamp_scroll();
  }
  return layout_;
}

void App::clamp_scroll() {
  const float room = backend_.size().y - TopBar::kHeight - 2 * kEdge;
  scroll_ = std::clamp(scroll_, 0.0f, std::max(0.0f, layout_.height + 70 - room));
}

void App::scroll_to(const PlacedCell* placed) {
  if (placed == nullptr) return;
  const float top = TopBar::kHeight + 8, bottom = backend_.size().y - kMessageHeight - 8;
  const float y = placed->area.y + content_origin().y;
  if (y < top) scroll_ -= top - y + 20;
  if (y + placed->area.height > bottom) scroll_ += y + placed->area.height - bottom + 20;
  clamp_scroll();
}

void App::page_changed() {
  layout_stale_ = true;
  margin_stale_ = true;
  hovered_.clear();
  dirty_ = true;
  update_bar();
}

void App::update_bar() {
  const page::Page& page = session_.page();
  std::vector<TopBar::Button> buttons;
  for (const page::Command& command : page.commands) {
    buttons.push_back({"page:" + command.id, command.text, command.key, command.enabled});
  }
  buttons.push_back({"new", "New", "Ctrl+N", true});
  buttons.push_back({"open", "Open", "Ctrl+O", true});
  buttons.push_back({"save", "Save", "Ctrl+S", true});
  buttons.push_back({"report", "Report", "Ctrl+P", true});
  buttons.push_back({"tables", "Tables", "Ctrl+T", true});
  buttons.push_back({"compare", "Compare", "Ctrl+D", true});
  const bool changed = session_.changed_since_save();
  const std::string file = path_.empty() ? "new sheet" : file_name(path_);
  const std::string state = changed             ? "changed"
                            : saved_at_.empty() ? (path_.empty() ? "empty" : "as opened")
                                                : "saved " + saved_at_;
  const std::string title = (changed ? "● " : "") + page.title + " – Heatledger";
  if (title != title_) {
    title_ = title;
    backend_.set_title(title);
  }
  bar_.set(file, state, std::move(buttons));
}

void App::say(std::string text, bool problem) {
  message_ = std::move(text);
  message_is_problem_ = problem;
  dirty_ = true;
}

void App::say(const Error& error) {
  std::string text = error.message;
  if (!error.where.empty()) text += " (" + error.where + ")";
  if (!error.hint.empty()) text += " " + error.hint;
  say(std::move(text), true);
}

// --- files
// ------------------------------------------------------------------------------------------------------------

bool App::save(const std::string& path) {
  finish_edit();
  // The text first: a sheet counts as saved only when its file has been written.
  const Status written = cli::write_file(path, session_.file_text());
  if (!written.ok()) {
    say(written.error());
    return false;
  }
  (void)session_.save();
  path_ = path;
  saved_at_ = clock_text();
  say("Saved " + path + ".");
  update_bar();
  return true;
}

bool App::save_or_ask() {
  if (!path_.empty()) return save(path_);
  start_prompt(FilePrompt::Purpose::Save);
  return false;
}

void App::load(const std::string& path) {
  const Result<std::string> text = cli::read_file(path);
  if (!text.ok()) return say(text.error());
  Status opened = session_.open(*text);
  if (!opened.ok() && opened.error().code == "file.is_site_table") {
    // Its rows go into the sheet that is open, which keeps its name and place.
    opened = session_.command("import_site_table", {{"text", *text}});
    if (opened.ok()) {
      cancel_edit();
      page_changed();
      return say("Copied the rows of " + file_name(path) + " that this sheet uses.");
    }
  }
  if (!opened.ok()) {
    Error error = opened.error();
    error.where = error.where.empty() ? file_name(path) : file_name(path) + ", " + error.where;
    return say(error);
  }
  cancel_edit();
  path_ = path;
  saved_at_.clear();
  selected_.clear();
  scroll_ = 0;
  message_.clear();
  page_changed();
}

void App::new_sheet() {
  cancel_edit();
  session_ = page::Session();
  path_.clear();
  saved_at_.clear();
  selected_.clear();
  message_.clear();
  scroll_ = 0;
  page_changed();
}

void App::guard(Pending what, const std::string& path) {
  finish_edit();
  pending_ = what;
  pending_path_ = path;
  if (!session_.changed_since_save()) return go_on();
  const std::string name = path_.empty() ? "This sheet" : file_name(path_);
  question_.ask(name + " has changes that are not saved.",
                {{"save", "Save"}, {"drop", "Leave without saving"}, {"stay", "Go back"}});
  dirty_ = true;
}

void App::go_on() {
  const Pending what = std::exchange(pending_, Pending::None);
  switch (what) {
    case Pending::None:
      break;
    case Pending::Close:
      closing_ = true;
      break;
    case Pending::New:
      new_sheet();
      break;
    case Pending::Open:
      if (pending_path_.empty()) {
        start_prompt(FilePrompt::Purpose::Open);
      } else {
        load(pending_path_);
      }
      break;
  }
}

void App::answer_question(const std::string& answer) {
  if (answer.empty()) return;
  question_.close();
  dirty_ = true;
  if (answer == "stay") {
    pending_ = Pending::None;
  } else if (answer == "drop" || save_or_ask()) {
    go_on();
  }
  // Where a name is asked for first, what was pending goes on after the saving.
}

void App::start_prompt(FilePrompt::Purpose purpose) {
  finish_edit();
  std::string text;
  switch (purpose) {
    case FilePrompt::Purpose::Compare:
    case FilePrompt::Purpose::Open: {
      const std::filesystem::path folder = std::filesystem::path(path_).parent_path();
      text = folder.empty() ? "" : folder.string() + "/";
      break;
    }
    case FilePrompt::Purpose::Save:
      text = path_.empty() ? "sheet.heatledger.json" : path_;
      break;
    case FilePrompt::Purpose::Report:
      text = beside(path_, ".html");
      break;
    case FilePrompt::Purpose::Tables:
      text = beside(path_, ".csv");
      break;
  }
  prompt_.start(purpose, text);
  dirty_ = true;
}

void App::finish_prompt(FilePrompt::Outcome outcome) {
  dirty_ = true;
  if (outcome == FilePrompt::Outcome::Cancelled) pending_ = Pending::None;
  if (outcome != FilePrompt::Outcome::Chosen) return;
  switch (prompt_.purpose()) {
    case FilePrompt::Purpose::Open:
      load(prompt_.path());
      break;
    case FilePrompt::Purpose::Save:
      if (save(prompt_.path())) {
        go_on();
      } else {
        pending_ = Pending::None;
      }
      break;
    case FilePrompt::Purpose::Report:
      write_report(prompt_.path());
      break;
    case FilePrompt::Purpose::Tables:
      write_tables(prompt_.path());
      break;
    case FilePrompt::Purpose::Compare:
      write_comparison(prompt_.path());
      break;
  }
}

void App::write_report(const std::string& path) {
  const Status written = cli::write_file(path, page::write_html(session_.page(), session_.workings()));
  written.ok() ? say("Wrote " + path + ": open it in a browser to print.") : say(written.error());
}

void App::write_tables(const std::string& path) {
  const bool markdown = path.size() > 3 && path.compare(path.size() - 3, 3, ".md") == 0;
  const Status written = cli::write_file(
      path, markdown ? page::write_markdown(session_.page()) : page::write_csv(session_.page()));
  written.ok() ? say("Wrote " + path + ".") : say(written.error());
}

void App::write_comparison(const std::string& other) {
  const Result<std::string> text = cli::read_file(other);
  if (!text.ok()) return say(text.error());
  const Result<page::Comparison> comparison = page::compare_sheets(*text, session_.file_text());
  if (!comparison.ok()) return say(comparison.error());
  const std::string path = beside(path_.empty() ? other : path_, "-compared.html");
  const Status written = cli::write_file(path, page::write_html(page::comparison_page(*comparison), {}));
  written.ok() ? say("Wrote " + path + ": how this sheet differs from " + other + ".") : say(written.error());
}

// --- frame
// ------------------------------------------------------------------------------------------------------------

void App::draw() {
  layout();
  if (margin_stale_) {
    margin_stale_ = false;
    margin_scroll_ = 0;
    margin_ = {};
    if (!selected_.empty()) {
      if (Result<page::Margin> margin = session_.margin(selected_); margin.ok())
        margin_ = std::move(margin.value());
    }
  }
  if (!backend_.begin_frame()) return;
  Canvas canvas(fonts_);
  const Point size = backend_.size();
  const Rect bounds{0, 0, size.x, size.y};
  const Rect desk{0, TopBar::kHeight, size.x, size.y - TopBar::kHeight};
  canvas.fill(bounds, ink::kDesk);

  canvas.clip(desk);
  const Rect sheet = paper();
  const Rect page_box{sheet.x, sheet.y - scroll_, sheet.width,
                      std::max(layout_.height + 26 + 44, size.y - sheet.y - kEdge)};
  canvas.fill(page_box, ink::kPaper);
  canvas.frame(page_box, ink::kEdge);
  draw_sheet(canvas, layout_, content_origin(), {selected_, hovered_, editing_});
  if (!editing_.empty()) {
    const PlacedCell* placed = layout_.find(editing_);
    const Type type = placed != nullptr ? placed->type : Type::Body;
    field_view_.draw(canvas, field_, edit_box(), type, caret_on_,
                     placed != nullptr ? placed->cell->hint : std::string());
  }
  canvas.unclip();

  const Rect margin = margin_area();
  if (margin.width > 150) {
    canvas.clip(margin);
    margin_height_ = draw_margin(canvas, margin_, margin, margin_scroll_);
    canvas.unclip();
  }
  draw_scroll_bars(canvas);
  bar_.draw(canvas, size.x);
  draw_message(canvas);
  if (list_.open() && (!editing_.empty() || !choosing_.empty())) list_.draw(canvas, edit_box(), desk);
  if (prompt_.active()) prompt_.draw(canvas, desk, caret_on_);
  if (question_.active()) question_.draw(canvas, desk);
  backend_.end_frame();
}

void App::draw_message(Canvas& canvas) {
  if (message_.empty()) return;
  const Point size = backend_.size();
  const Wrapped lines = wrap(fonts_, Type::Detail, message_, size.x - 60);
  const float height = line_height(Type::Detail) * static_cast<float>(lines.lines.size()) + 10;
  const Rect strip{0, size.y - height, size.x, height};
  canvas.fill(strip, ink::kPaper);
  canvas.line({0, strip.y}, {size.x, strip.y}, ink::kEdge);
  const Colour colour = message_is_problem_ ? ink::kError : ink::kText;
  if (message_is_problem_) canvas.fill({0, strip.y, 4, height}, colour);
  canvas.lines_in({20, strip.y + 5, size.x - 40, height - 10}, Type::Detail, colour, page::Align::Left,
                  lines);
}

void App::draw_scroll_bars(Canvas& canvas) {
  const Point size = backend_.size();
  const float room = size.y - TopBar::kHeight - 2 * kEdge, whole = layout_.height + 70;
  if (whole <= room) return;
  const float track = size.y - TopBar::kHeight - 8;
  const float thumb = std::max(30.0f, track * room / whole);
  const float at = (track - thumb) * scroll_ / std::max(1.0f, whole - room);
  canvas.fill({size.x - 9, TopBar::kHeight + 4 + at, 5, thumb}, drag_from_ >= 0 ? ink::kQuiet : ink::kEdge,
              2.5f);
}

}  // namespace heatledger::window
