#include "desktop/window/text_field.hpp"

#include <gtest/gtest.h>

namespace heatledger::window {
namespace {

KeyPress press(Key key, bool shift = false, bool control = false) {
  KeyPress made;
  made.key = key;
  made.shift = shift;
  made.control = control;
  return made;
}

KeyPress control(char letter, bool shift = false) {
  KeyPress made;
  made.key = Key::Other;
  made.letter = letter;
  made.control = true;
  made.shift = shift;
  return made;
}

void type(TextField& field, const std::u32string& text) {
  for (const char32_t code : text) field.character(code);
}

TEST(TextField, TypesAndErasesWholeCharacters) {
  TextField field;
  field.start("", false);
  type(field, U"3 H₂ → H₂O");
  EXPECT_EQ(field.text(), "3 H₂ → H₂O");
  field.key(press(Key::Backspace));
  field.key(press(Key::Backspace));
  EXPECT_EQ(field.text(), "3 H₂ → H");
  field.key(press(Key::Home));
  field.key(press(Key::Delete));
  EXPECT_EQ(field.text(), " H₂ → H");
}

TEST(TextField, ReplacesWhatIsSelected) {
  TextField field;
  field.start("aniline", true);
  type(field, U"x");
  EXPECT_EQ(field.text(), "x");
  field.start("acetic acid + water", false);
  field.key(press(Key::Left, true, true));
  type(field, U"ethanol");
  EXPECT_EQ(field.text(), "acetic acid + ethanol");
}

TEST(TextField, MovesByWordsAndToTheEndsOfASelection) {
  TextField field;
  field.start("benzene + chlorine", false);
  field.key(press(Key::Left, false, true));
  EXPECT_EQ(field.caret(), 10u);
  field.key(press(Key::Left, false, true));
  EXPECT_EQ(field.caret(), 8u);
  field.key(press(Key::Right, true, true));
  EXPECT_EQ(field.caret(), 10u);
  EXPECT_EQ(field.anchor(), 8u);
  field.key(press(Key::Left));
  EXPECT_EQ(field.caret(), 8u);
  EXPECT_FALSE(field.has_selection());
}

TEST(TextField, UndoesTypingAsOneStepAndRedoes) {
  TextField field;
  field.start("H2", false);
  type(field, U" + Cl2");
  field.key(press(Key::Backspace));
  field.key(control('z'));
  EXPECT_EQ(field.text(), "H2 + Cl2");
  field.key(control('z'));
  EXPECT_EQ(field.text(), "H2");
  field.key(control('z'));
  EXPECT_EQ(field.text(), "H2");
  field.key(control('y'));
  EXPECT_EQ(field.text(), "H2 + Cl2");
  type(field, U"!");
  field.key(control('z', true));  // nothing to redo after typing
  EXPECT_EQ(field.text(), "H2 + Cl2!");
}

TEST(TextField, PastesAsOneLine) {
  std::string board = "  nitrobenzene(l)\t+ 3 H2\r\n-> aniline(l)\n";
  TextField field({[&] { return board; }, [&](const std::string& text) { board = text; }});
  field.start("", false);
  field.key(control('v'));
  EXPECT_EQ(field.text(), "nitrobenzene(l) + 3 H2 -> aniline(l)");
  field.key(control('a'));
  field.key(control('x'));
  EXPECT_EQ(field.text(), "");
  EXPECT_EQ(board, "nitrobenzene(l) + 3 H2 -> aniline(l)");
}

TEST(TextField, LeavesKeysThatAreNotItsOwn) {
  TextField field;
  field.start("x", false);
  EXPECT_FALSE(field.key(press(Key::Enter)));
  EXPECT_FALSE(field.key(press(Key::Tab)));
  EXPECT_FALSE(field.key(control('s')));
}

}  // namespace
}  // namespace heatledger::window
