#include "desktop/window/layout.hpp"

#include <algorithm>
#include <cmath>
#include <string_view>

#include "desktop/window/table_layout.hpp"

namespace heatledger::window {
namespace {

constexpr float kBeforeHeading = 24, kAfterHeading = 8, kAfterBlock = 8, kBetweenTables = 18, kGap = 26;

/// Goes down the page block by block.
class Builder {
 public:
  Builder(const page::Page& page, const Fonts& fonts, float width) : page_(page), fonts_(fonts) {
    layout_.width = width;
  }

  Layout build() {
    for (std::size_t i = 0; i < page_.blocks.size(); ++i) {
      const page::Block& block = page_.blocks[i];
      const page::Block* next = i + 1 < page_.blocks.size() ? &page_.blocks[i + 1] : nullptr;
      if (const auto* heading = std::get_if<page::Heading>(&block)) add(*heading);
      if (const auto* note = std::get_if<page::Note>(&block)) add(*note);
      if (const auto* table = std::get_if<page::Table>(&block)) {
        const auto* form = next != nullptr ? std::get_if<page::Table>(next) : nullptr;
        if (i == 0 && table->look == page::TableLook::Banner && form != nullptr &&
            form->look == page::TableLook::Form) {
          add_title(*table, *form);
          ++i;
        } else {
          add(*table, 0, layout_.width);
          y_ += form != nullptr ? kBetweenTables : kAfterBlock;
        }
      }
      if (const auto* drawing = std::get_if<page::Drawing>(&block)) {
        const auto* second = next != nullptr ? std::get_if<page::Drawing>(next) : nullptr;
        if (second != nullptr && drawing->width + second->width + kGap <= layout_.width) {
          const float top = y_;
          add(*drawing, 0);
          const float first_bottom = y_;
          y_ = top;
          add(*second, (layout_.width + kGap) / 2);
          y_ = std::max(y_, first_bottom);
          ++i;
        } else {
          add(*drawing, 0);
        }
        y_ += kAfterBlock;
      }
    }
    layout_.height = y_;
    return std::move(layout_);
  }

 private:
  void add(const page::Heading& heading) {
    if (heading.level <= 1) {
      PlacedText title;
      title.lines = wrap(fonts_, Type::Title, heading.text, layout_.width);
      title.type = Type::Title;
      title.area = {0, y_, layout_.width,
                    line_height(Type::Title) * static_cast<float>(title.lines.lines.size())};
      y_ = title.area.bottom() + 6;
      layout_.texts.push_back(std::move(title));
      layout_.fills.push_back({{0, y_, layout_.width, 2}, ink::kText});
      y_ += kAfterBlock;
      return;
    }
    if (y_ > 0) y_ += kBeforeHeading - kAfterBlock;
    const float height = line_height(Type::Heading);
    PlacedText text;
    text.lines.lines = {heading.text};
    // Capitals are wider than the text as written; this is only where the rule begins.
    text.lines.width = capitals_width(heading.text);
    text.type = Type::Heading;
    text.colour = ink::kQuiet;
    text.capitals = true;
    text.area = {0, y_, text.lines.width, height};
    float rule_end = layout_.width;
    if (!heading.aside.empty()) {
      PlacedText aside;
      aside.lines.lines = {heading.aside};
      aside.lines.width = text_width(fonts_, Type::Small, heading.aside);
      aside.type = Type::Small;
      aside.colour = ink::kQuiet;
      aside.align = page::Align::Right;
      aside.area = {layout_.width - aside.lines.width, y_, aside.lines.width, height};
      rule_end = aside.area.x - 10;
      layout_.texts.push_back(std::move(aside));
    }
    const float rule_begin = text.area.right() + 10;
    if (rule_end > rule_begin) {
      layout_.fills.push_back(
          {{rule_begin, y_ + std::round(height / 2), rule_end - rule_begin, 1}, ink::kFaint});
    }
    layout_.texts.push_back(std::move(text));
    y_ += height + kAfterHeading;
  }

  float capitals_width(std::string_view text) const {
    std::string capitals(text);
    std::size_t letters = 0;
    for (char& c : capitals) {
      if (c >= 'a' && c <= 'z') c = static_cast<char>(c - 'a' + 'A');
      if ((static_cast<unsigned char>(c) & 0xC0) != 0x80) ++letters;
    }
    return text_width(fonts_, Type::Heading, capitals) + 1.2f * static_cast<float>(letters);
  }

  void add(const page::Note& note) {
    const bool loud = note.kind == page::NoteKind::Caution || note.kind == page::NoteKind::Disagreement ||
                      note.kind == page::NoteKind::Error;
    const Type type = loud ? Type::Detail : Type::Small;
    const float left = loud ? 13 : 0;
    PlacedText text;
    text.lines = wrap(fonts_, type, note.text, layout_.width - left);
    text.type = type;
    text.colour = note.kind == page::NoteKind::Error ? ink::kError : loud ? ink::kCaution : ink::kQuiet;
    text.area = {left, y_ + 2, layout_.width - left,
                 line_height(type) * static_cast<float>(text.lines.lines.size())};
    if (loud) layout_.fills.push_back({{0, y_, 3, text.area.height + 4}, text.colour});
    y_ = text.area.bottom() + 6;
    layout_.texts.push_back(std::move(text));
  }

  void add(const page::Table& table, float x, float width) {
    y_ = lay_out_table(table, fonts_, {x, y_, width, 0}, layout_);
  }

  /// The title on the left, the boxes of sheet number and names on the right, one heavy rule under both.
  void add_title(const page::Table& banner, const page::Table& form) {
    const float form_width = std::min(natural_form_width(form, fonts_), layout_.width * 0.5f);
    const float top = y_;
    // The title first: reading order is the order in which Tab goes.
    add(banner, 0, layout_.width - form_width - kGap);
    const float banner_bottom = y_;
    y_ = top;
    add(form, layout_.width - form_width, form_width);
    y_ = std::max(y_, banner_bottom) + 10;
    layout_.fills.push_back({{0, y_, layout_.width, 2}, ink::kText});
    y_ += 2 + kAfterBlock;
  }

  void add(const page::Drawing& drawing, float x) {
    const float width = static_cast<float>(drawing.width), height = static_cast<float>(drawing.height);
    const float scale = std::min(1.0f, width > 0 ? (layout_.width - x) / width : 1.0f);
    if (!drawing.title.empty()) {
      PlacedText title;
      title.lines = wrap(fonts_, Type::Small, drawing.title, layout_.width - x);
      title.type = Type::Small;
      title.colour = ink::kQuiet;
      title.area = {x, y_, layout_.width - x,
                    line_height(Type::Small) * static_cast<float>(title.lines.lines.size())};
      y_ = title.area.bottom() + 4;
      layout_.texts.push_back(std::move(title));
    }
    layout_.drawings.push_back({&drawing, {x, y_, width * scale, height * scale}, scale});
    y_ += height * scale;
  }

  const page::Page& page_;
  const Fonts& fonts_;
  Layout layout_;
  float y_ = 0;
};

}  // namespace

const PlacedCell* Layout::find(const std::string& id) const {
  if (id.empty()) return nullptr;
  for (const PlacedCell& placed : cells) {
    if (placed.cell->id == id) return &placed;
  }
  return nullptr;
}

Layout lay_out(const page::Page& page, const Fonts& fonts, float width) {
  return Builder(page, fonts, width).build();
}

}  // namespace heatledger::window
