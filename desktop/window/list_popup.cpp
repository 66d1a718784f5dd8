#include "desktop/window/list_popup.hpp"

#include <algorithm>
#include <utility>

namespace heatledger::window {
namespace {

constexpr float kRow = 23, kPad = 10;
constexpr int kMostRows = 12;

}  // namespace

void ListPopup::show(std::vector<ListItem> items, int selected) {
  items_ = std::move(items);
  selected_ = std::min(selected, static_cast<int>(items_.size()) - 1);
  first_ = 0;
  shown_ = std::min(kMostRows, static_cast<int>(items_.size()));
  keep_selected_in_view();
}

const ListItem* ListPopup::chosen() const {
  return selected_ >= 0 && selected_ < static_cast<int>(items_.size())
             ? &items_[static_cast<std::size_t>(selected_)]
             : nullptr;
}

void ListPopup::move(int by) {
  const int count = static_cast<int>(items_.size());
  if (count == 0) return;
  if (selected_ < 0) {
    selected_ = by > 0 ? 0 : count - 1;
  } else {
    selected_ = (selected_ + by % count + count) % count;
  }
  keep_selected_in_view();
}

void ListPopup::jump(char32_t letter) {
  const auto lower = [](char32_t c) { return c >= 'A' && c <= 'Z' ? c - 'A' + 'a' : c; };
  const int count = static_cast<int>(items_.size());
  for (int step = 1; step <= count; ++step) {
    const int index = (std::max(selected_, 0) + step) % count;
    const std::string& text = items_[static_cast<std::size_t>(index)].text;
    if (text.empty() || lower(static_cast<unsigned char>(text[0])) != lower(letter)) continue;
    selected_ = index;
    keep_selected_in_view();
    return;
  }
}

void ListPopup::keep_selected_in_view() {
  if (selected_ < 0) return;
  if (selected_ < first_) first_ = selected_;
  if (selected_ >= first_ + shown_) first_ = selected_ - shown_ + 1;
}

std::optional<int> ListPopup::hit(Point at) const {
  if (!contains(at)) return std::nullopt;
  const int index = first_ + static_cast<int>((at.y - area_.y - 4) / kRow);
  if (index < first_ || index >= first_ + shown_ || index >= static_cast<int>(items_.size()))
    return std::nullopt;
  return index;
}

void ListPopup::point_at(Point at) {
  if (const std::optional<int> index = hit(at)) selected_ = *index;
}

void ListPopup::scroll(float lines) {
  first_ = std::clamp(first_ - static_cast<int>(lines * 2), 0,
                      std::max(0, static_cast<int>(items_.size()) - shown_));
}

void ListPopup::draw(Canvas& canvas, Rect anchor, Rect bounds) {
  if (!open()) return;
  float text = 0, remark = 0;
  for (const ListItem& item : items_) {
    text = std::max(text, text_width(canvas.fonts(), Type::Detail, item.text));
    remark = std::max(remark, text_width(canvas.fonts(), Type::Small, item.remark));
  }
  const float below = bounds.bottom() - anchor.bottom(), above = anchor.y - bounds.y;
  const bool under = below >= kRow * 4 || below >= above;
  shown_ = std::clamp(static_cast<int>(((under ? below : above) - 14) / kRow), 1,
                      std::min(kMostRows, static_cast<int>(items_.size())));
  first_ = std::clamp(first_, 0, static_cast<int>(items_.size()) - shown_);
  keep_selected_in_view();
  const float wanted = text + (remark > 0 ? remark + 24 : 0) + 2 * kPad + 6;
  area_.width = std::min(std::max(wanted, anchor.width), bounds.width - 16);
  area_.height = kRow * static_cast<float>(shown_) + 8;
  area_.x = std::clamp(anchor.x, bounds.x + 8, std::max(bounds.x + 8, bounds.right() - 8 - area_.width));
  area_.y = under ? anchor.bottom() + 2 : anchor.y - 2 - area_.height;

  canvas.fill({area_.x + 3, area_.y + 3, area_.width, area_.height}, 0x28000000u);
  canvas.fill(area_, ink::kBox);
  canvas.frame(area_, ink::kEdge);
  for (int i = first_; i < first_ + shown_; ++i) {
    const ListItem& item = items_[static_cast<std::size_t>(i)];
    const Rect row{area_.x + 1, area_.y + 4 + kRow * static_cast<float>(i - first_), area_.width - 2, kRow};
    if (i == selected_) {
      canvas.fill(row, ink::kSelected);
      canvas.fill({row.x, row.y, 3, row.height}, ink::kSelectedEdge);
    }
    const Rect inside{row.x + kPad, row.y, row.width - 2 * kPad, row.height};
    canvas.clip(inside);
    canvas.text_in(inside, Type::Detail, ink::kText, page::Align::Left, item.text);
    canvas.text_in(inside, Type::Small, ink::kQuiet, page::Align::Right, item.remark);
    canvas.unclip();
  }
  if (shown_ < static_cast<int>(items_.size())) {
    const float whole = area_.height - 8,
                part = whole * static_cast<float>(shown_) / static_cast<float>(items_.size());
    const float at = whole * static_cast<float>(first_) / static_cast<float>(items_.size());
    canvas.fill({area_.right() - 4, area_.y + 4 + at, 2, part}, ink::kEdge);
  }
}

}  // namespace heatledger::window
