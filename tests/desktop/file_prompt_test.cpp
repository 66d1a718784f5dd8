#include "desktop/window/file_prompt.hpp"

#include <gtest/gtest.h>

#include <cstdlib>
#include <filesystem>
#include <fstream>

namespace heatledger::window {
namespace {

using Outcome = FilePrompt::Outcome;
using Purpose = FilePrompt::Purpose;

class FilePromptTest : public testing::Test {
 protected:
  FilePromptTest() {
    std::string pattern = (std::filesystem::temp_directory_path() / "heatledger-prompt-XXXXXX").string();
    folder_ = ::mkdtemp(pattern.data());
    std::filesystem::create_directory(folder_ + "/archive");
    for (const char* name : {"/amide.heatledger.json", "/ester.heatledger.json", "/notes.txt"})
      std::ofstream(folder_ + name) << "x";
  }
  ~FilePromptTest() override { std::filesystem::remove_all(folder_); }

  static KeyPress press(Key key) {
    KeyPress made;
    made.key = key;
    return made;
  }
  void type(const std::string& text) {
    for (const char c : text) prompt_.character(static_cast<char32_t>(c));
  }

  std::string folder_;
  FilePrompt prompt_{TextField::Clipboard{}};
};

TEST_F(FilePromptTest, OpensTheFirstSheetOfAFolderByArrowAndEnter) {
  prompt_.start(Purpose::Open, folder_ + "/");
  prompt_.key(press(Key::Down));
  EXPECT_EQ(prompt_.key(press(Key::Enter)), Outcome::Chosen);
  EXPECT_EQ(prompt_.path(), folder_ + "/amide.heatledger.json");
  EXPECT_FALSE(prompt_.active());
}

TEST_F(FilePromptTest, TabCompletesWhatIsTyped) {
  prompt_.start(Purpose::Open, folder_ + "/");
  type("es");
  prompt_.key(press(Key::Tab));
  EXPECT_EQ(prompt_.key(press(Key::Enter)), Outcome::Chosen);
  EXPECT_EQ(prompt_.path(), folder_ + "/ester.heatledger.json");
}

TEST_F(FilePromptTest, AMissingFileIsNotOpened) {
  prompt_.start(Purpose::Open, folder_ + "/none.heatledger.json");
  EXPECT_EQ(prompt_.key(press(Key::Enter)), Outcome::Waiting);
  EXPECT_TRUE(prompt_.active());
  EXPECT_EQ(prompt_.key(press(Key::Escape)), Outcome::Cancelled);
}

TEST_F(FilePromptTest, SavingAddsTheEndingAndAsksBeforeItReplaces) {
  prompt_.start(Purpose::Save, folder_ + "/new");
  EXPECT_EQ(prompt_.key(press(Key::Enter)), Outcome::Chosen);
  EXPECT_EQ(prompt_.path(), folder_ + "/new.heatledger.json");
  prompt_.start(Purpose::Save, folder_ + "/ester.heatledger.json");
  EXPECT_EQ(prompt_.key(press(Key::Enter)), Outcome::Waiting);
  EXPECT_EQ(prompt_.key(press(Key::Enter)), Outcome::Chosen);
}

TEST_F(FilePromptTest, AgreementHoldsForOneNameOnly) {
  prompt_.start(Purpose::Save, folder_ + "/amide.heatledger.json");
  EXPECT_EQ(prompt_.key(press(Key::Enter)), Outcome::Waiting);
  for (int i = 0; i < 21; ++i) prompt_.key(press(Key::Backspace));
  type("ester.heatledger.json");
  EXPECT_EQ(prompt_.key(press(Key::Enter)), Outcome::Waiting) << "the other file must be asked about too";
}

TEST_F(FilePromptTest, AFolderIsEnteredNotChosen) {
  prompt_.start(Purpose::Open, folder_ + "/archive");
  EXPECT_EQ(prompt_.key(press(Key::Enter)), Outcome::Waiting);
  EXPECT_TRUE(prompt_.active());
}

TEST_F(FilePromptTest, AFolderThatCannotBeReadIsAnEmptyList) {
  prompt_.start(Purpose::Open, "/no/such/folder/");
  prompt_.key(press(Key::Down));
  EXPECT_EQ(prompt_.key(press(Key::Enter)), Outcome::Waiting);
}

}  // namespace
}  // namespace heatledger::window
