#include "desktop/window/text_field.hpp"

#include <algorithm>
#include <utility>

#include "core/base/utf8.hpp"

namespace heatledger::window {
namespace {

constexpr std::size_t kDeepest = 1000;

bool continues(char c) {
  return (static_cast<unsigned char>(c) & 0xC0) == 0x80;
}
bool is_blank(char c) {
  return c == ' ';
}

}  // namespace

std::string one_line(std::string_view text) {
  std::string out;
  for (const char c : text) {
    const bool control = static_cast<unsigned char>(c) < 0x20 || c == 0x7F;
    if (control && (out.empty() || out.back() == ' ')) continue;
    out += control ? ' ' : c;
  }
  const std::size_t first = out.find_first_not_of(' ');
  if (first == std::string::npos) return {};
  return out.substr(first, out.find_last_not_of(' ') - first + 1);
}

void TextField::start(std::string text, bool select_all_of_it) {
  text_ = std::move(text);
  caret_ = text_.size();
  anchor_ = select_all_of_it ? 0 : caret_;
  past_.clear();
  future_.clear();
  typing_ = false;
}

void TextField::remember(bool typing) {
  if (!(typing && typing_)) {
    past_.push_back({text_, caret_});
    if (past_.size() > kDeepest) past_.erase(past_.begin());
  }
  future_.clear();
  typing_ = typing;
}

void TextField::erase(std::size_t from, std::size_t to) {
  text_.erase(from, to - from);
  caret_ = anchor_ = from;
}

void TextField::erase_selection() {
  erase(std::min(caret_, anchor_), std::max(caret_, anchor_));
}

void TextField::insert(std::string_view text) {
  remember(false);
  erase_selection();
  text_.insert(caret_, text);
  caret_ = anchor_ = caret_ + text.size();
}

void TextField::replace(std::string text) {
  remember(false);
  text_ = std::move(text);
  caret_ = anchor_ = text_.size();
}

void TextField::character(char32_t code) {
  if (code < 0x20 || code == 0x7F) return;
  remember(!has_selection());
  erase_selection();
  std::string bytes;
  utf8::append(bytes, code);
  text_.insert(caret_, bytes);
  caret_ = anchor_ = caret_ + bytes.size();
}

std::size_t TextField::before(std::size_t at) const {
  if (at == 0) return 0;
  do --at;
  while (at > 0 && continues(text_[at]));
  return at;
}

std::size_t TextField::after(std::size_t at) const {
  if (at >= text_.size()) return text_.size();
  do ++at;
  while (at < text_.size() && continues(text_[at]));
  return at;
}

std::size_t TextField::word_before(std::size_t at) const {
  while (at > 0 && is_blank(text_[at - 1])) --at;
  while (at > 0 && !is_blank(text_[at - 1])) --at;
  return at;
}

std::size_t TextField::word_after(std::size_t at) const {
  while (at < text_.size() && !is_blank(text_[at])) ++at;
  while (at < text_.size() && is_blank(text_[at])) ++at;
  return at;
}

void TextField::move(std::size_t to, bool extend) {
  caret_ = to;
  if (!extend) anchor_ = to;
  typing_ = false;
}

void TextField::put_caret(std::size_t offset, bool extend) {
  move(std::min(offset, text_.size()), extend);
}

void TextField::select_word(std::size_t offset) {
  std::size_t from = std::min(offset, text_.size());
  std::size_t to = from;
  while (from > 0 && !is_blank(text_[from - 1])) --from;
  while (to < text_.size() && !is_blank(text_[to])) ++to;
  anchor_ = from;
  caret_ = to;
}

void TextField::select_all() {
  anchor_ = 0;
  caret_ = text_.size();
}

bool TextField::key(const KeyPress& press) {
  if (press.alt) return false;
  const std::size_t low = std::min(caret_, anchor_), high = std::max(caret_, anchor_);
  switch (press.key) {
    case Key::Left:
      if (press.control) {
        move(word_before(caret_), press.shift);
      } else {
        move(has_selection() && !press.shift ? low : before(caret_), press.shift);
      }
      return true;
    case Key::Right:
      if (press.control) {
        move(word_after(caret_), press.shift);
      } else {
        move(has_selection() && !press.shift ? high : after(caret_), press.shift);
      }
      return true;
    case Key::Home:
      move(0, press.shift);
      return true;
    case Key::End:
      move(text_.size(), press.shift);
      return true;
    case Key::Backspace:
      if (has_selection() || caret_ > 0) remember(false);
      if (has_selection()) {
        erase_selection();
      } else {
        erase(press.control ? word_before(caret_) : before(caret_), caret_);
      }
      return true;
    case Key::Delete:
      if (has_selection() || caret_ < text_.size()) remember(false);
      if (has_selection()) {
        erase_selection();
      } else {
        erase(caret_, press.control ? word_after(caret_) : after(caret_));
      }
      return true;
    default:
      break;
  }
  if (!press.control) return false;
  switch (press.letter) {
    case 'a':
      select_all();
      return true;
    case 'c':
    case 'x':
      if (has_selection() && clipboard_.set) {
        clipboard_.set(text_.substr(low, high - low));
        if (press.letter == 'x') {
          remember(false);
          erase_selection();
        }
      }
      return true;
    case 'v':
      if (clipboard_.get) insert(one_line(clipboard_.get()));
      return true;
    case 'z':
    case 'y': {
      const bool forward = press.letter == 'y' || press.shift;
      std::vector<Memory>& from = forward ? future_ : past_;
      std::vector<Memory>& to = forward ? past_ : future_;
      if (from.empty()) return true;
      to.push_back({text_, caret_});
      text_ = std::move(from.back().text);
      caret_ = anchor_ = from.back().caret;
      from.pop_back();
      typing_ = false;
      return true;
    }
    default:
      return false;
  }
}

}  // namespace heatledger::window
