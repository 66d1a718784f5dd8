#include "desktop/window/top_bar.hpp"

#include <utility>

namespace heatledger::window {

void TopBar::set(std::string file, std::string state, std::vector<Button> buttons) {
  file_ = std::move(file);
  state_ = std::move(state);
  buttons_ = std::move(buttons);
}

void TopBar::draw(Canvas& canvas, float width) {
  canvas.fill({0, 0, width, kHeight}, ink::kBar);
  const Fonts& fonts = canvas.fonts();
  canvas.text_in({20, 0, 120, kHeight}, Type::Strong, ink::kBarText, page::Align::Left, "Heatledger");
  places_.assign(buttons_.size(), {});
  // From the right edge inwards; what finds no room is still reached by its key.
  float right = width - 14;
  const float file_left = 122, file_room = 170;
  for (std::size_t i = buttons_.size(); i-- > 0;) {
    const float wanted = text_width(fonts, Type::Detail, buttons_[i].text) + 18;
    if (right - wanted < file_left + file_room) break;
    right -= wanted;
    places_[i] = {right, 5, wanted, kHeight - 10};
    const bool hovered = buttons_[i].enabled && places_[i].contains(pointer_);
    if (hovered) canvas.fill(places_[i], ink::kBarHover, 3);
    canvas.text_in(places_[i], Type::Detail, buttons_[i].enabled ? ink::kBarText : ink::rgb(112, 115, 124),
                   page::Align::Centre, buttons_[i].text);
  }
  const Rect room{file_left, 0, right - file_left - 10, kHeight};
  canvas.clip(room);
  canvas.text_in(room, Type::Detail, ink::kBarText, page::Align::Left, file_);
  const float after = text_width(fonts, Type::Detail, file_) + 7;
  canvas.text_in({room.x + after, 0, room.width, kHeight}, Type::Detail, ink::kBarQuiet, page::Align::Left,
                 "· " + state_);
  canvas.unclip();
  for (std::size_t i = 0; i < buttons_.size(); ++i) {
    if (!places_[i].contains(pointer_) || buttons_[i].key.empty()) continue;
    const float tip = text_width(fonts, Type::Small, buttons_[i].key) + 14;
    const Rect box{std::min(places_[i].x, width - tip - 6), kHeight + 3, tip, 22};
    canvas.fill(box, ink::kBar, 3);
    canvas.text_in(box, Type::Small, ink::kBarText, page::Align::Centre, buttons_[i].key);
  }
}

std::string TopBar::hit(Point at) const {
  for (std::size_t i = 0; i < places_.size(); ++i) {
    if (buttons_[i].enabled && places_[i].contains(at)) return buttons_[i].id;
  }
  return {};
}

}  // namespace heatledger::window
