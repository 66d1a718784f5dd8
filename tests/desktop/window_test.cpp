// The whole window as a person uses it: real keys and clicks on a display of its own, files looked at
// afterwards.
#include <gtest/gtest.h>

#include <filesystem>
#include <nlohmann/json.hpp>

#include "../cli/run.hpp"
#include "display.hpp"

namespace heatledger::test {
namespace {

using nlohmann::json;

constexpr const char* kEquation = "nitrobenzene(l) + 3 H2 -> aniline(l) + 2 H2O(l)";

class WindowTest : public testing::Test {
 protected:
  /// The sheet as saved; null when there is none yet or it is not whole.
  json saved(const std::string& path) const {
    if (!std::filesystem::exists(path)) return nullptr;
    return json::parse(read_whole(path), nullptr, false);
  }
  std::string equation_in(const std::string& path) const {
    const json sheet = saved(path);
    if (!sheet.is_object() || !sheet.contains("reactions") || sheet["reactions"].empty()) return {};
    return sheet["reactions"][0].value("equation", "");
  }

  Display display_;
  TemporaryFolder folder_;
};

TEST_F(WindowTest, AnEquationTypedByHandIsSavedAndReopened) {
  const std::string path = folder_ / "hydrogenation.heatledger.json";
  {
    Window window(display_, {path});
    const auto places = cell_places(display_, path);
    ASSERT_TRUE(places.count("r1.equation"));
    window.click(places.at("r1.equation"));
    window.type(kEquation);
    window.keys({"Return"});
    window.keys({"ctrl+s"});
    ASSERT_TRUE(Window::wait_for([&] { return equation_in(path) == kEquation; }))
        << "saved: " << equation_in(path);
  }
  // The terminal computes what the window saved.
  const Ran work = heatledger({"work", path});
  EXPECT_EQ(work.status, 0) << work.err;
  EXPECT_NE(work.out.find("Sum of bonds"), std::string::npos);
  // Opened and saved again, the file is the same to the byte.
  const std::string before = read_whole(path);
  Window window(display_, {path});
  std::filesystem::remove(path);
  window.keys({"ctrl+s"});
  ASSERT_TRUE(Window::wait_for([&] { return equation_in(path) == kEquation; }));
  EXPECT_EQ(read_whole(path), before);
}

TEST_F(WindowTest, KeysAloneGoThroughTheSheet) {
  const std::string path = folder_ / "keys.heatledger.json";
  Window window(display_, {path});
  // Tab reaches the title first; typing starts the entry, Tab goes on to the next one.
  window.keys({"Tab"});
  window.type("Nitro group to amine");
  window.keys({"Tab"});
  window.type("first draft");
  window.keys({"Return"});
  ASSERT_TRUE(Window::wait_for([&] {
    return window.title().find("Nitro group to amine") != std::string::npos;
  })) << window.title();
  window.keys({"ctrl+s"});
  ASSERT_TRUE(Window::wait_for([&] { return saved(path).is_object(); }));
  EXPECT_NE(read_whole(path).find("first draft"), std::string::npos);
  // F2 edits what is there, Escape leaves it alone, undo takes one entry back.
  window.keys({"F2"});
  window.type("x");
  window.keys({"Escape"});
  window.keys({"ctrl+z", "ctrl+s"});
  ASSERT_TRUE(Window::wait_for([&] { return read_whole(path).find("first draft") == std::string::npos; }));
  EXPECT_NE(read_whole(path).find("Nitro group to amine"), std::string::npos);
  window.keys({"ctrl+y", "ctrl+s"});
  ASSERT_TRUE(Window::wait_for([&] { return read_whole(path).find("first draft") != std::string::npos; }));
}

TEST_F(WindowTest, FastTypingLosesNothing) {
  const std::string path = folder_ / "fast.heatledger.json";
  Window window(display_, {path});
  window.keys({"Tab"});
  const std::string text = "the quick brown fox jumps over the lazy dog 0123456789";
  // Twelve milliseconds a key is faster than a frame of software rendering.
  run({"env", "DISPLAY=" + display_.name(), "xdotool", "type", "--delay", "12", text});
  window.keys({"Return", "ctrl+s"});
  ASSERT_TRUE(Window::wait_for([&] { return saved(path).is_object(); }));
  EXPECT_NE(read_whole(path).find(text), std::string::npos) << read_whole(path);
}

TEST_F(WindowTest, PastesAnEquationOfSeveralLinesAndCopiesAFigure) {
  const std::string path = folder_ / "paste.heatledger.json";
  Window window(display_, {path});
  const auto places = cell_places(display_, path);
  window.set_clipboard("benzene(l) + Cl2\n\t-> chlorobenzene(l) + HCl\n");
  window.click(places.at("r1.equation"));
  window.keys({"ctrl+v", "Return", "ctrl+s"});
  ASSERT_TRUE(Window::wait_for([&] {
    return equation_in(path) == "benzene(l) + Cl2 -> chlorobenzene(l) + HCl";
  })) << equation_in(path);
  const auto filled = cell_places(display_, path);
  ASSERT_TRUE(filled.count("r1.as_written"));
  window.click(filled.at("r1.as_written"));
  window.keys({"ctrl+c"});
  ASSERT_TRUE(Window::wait_for([&] { return window.clipboard().find("\u2212") == 0; })) << window.clipboard();
}

TEST_F(WindowTest, AnExactFractionTypedIntoACoefficientChangesTheEquation) {
  const std::string path = folder_ / "coefficient.heatledger.json";
  Window window(display_, {path});
  window.click(cell_places(display_, path).at("r1.equation"));
  window.type("2 H2 + O2 -> 2 H2O");
  window.keys({"Return", "ctrl+s"});
  ASSERT_TRUE(Window::wait_for([&] { return equation_in(path) == "2 H2 + O2 -> 2 H2O"; }));
  const auto places = cell_places(display_, path);
  ASSERT_TRUE(places.count("r1.row.1.times"));
  window.click(places.at("r1.row.1.times"));
  window.type("1/2");
  window.keys({"Return", "ctrl+s"});
  ASSERT_TRUE(Window::wait_for([&] { return equation_in(path).find("1/2 O2") != std::string::npos; }))
      << equation_in(path);
}

TEST_F(WindowTest, UnsavedChangesAreNotLostByClosing) {
  const std::string path = folder_ / "guard.heatledger.json";
  Window window(display_, {path});
  window.keys({"Tab"});
  window.type("unsaved");
  window.keys({"Return", "ctrl+q"});
  EXPECT_FALSE(Window::wait_for([&] { return !window.running(); }) && !std::filesystem::exists(path))
      << "closed without a question";
  window.keys({"Escape"});  // back to the sheet
  ASSERT_TRUE(window.running());
  window.keys({"ctrl+q"});
  window.type("s");  // save, then close
  EXPECT_TRUE(Window::wait_for([&] { return !window.running(); }));
  EXPECT_NE(read_whole(path).find("unsaved"), std::string::npos);
}

TEST_F(WindowTest, OpensAFileThroughItsOwnPrompt) {
  const std::string first = folder_ / "first.heatledger.json", second = folder_ / "second.heatledger.json";
  {
    Window window(display_, {second});
    window.keys({"Tab"});
    window.type("The second sheet");
    window.keys({"Return", "ctrl+s"});
    ASSERT_TRUE(Window::wait_for([&] { return saved(second).is_object(); }));
  }
  Window window(display_, {first});
  window.keys({"ctrl+o"});
  window.type("sec");
  window.keys({"Tab", "Return"});
  EXPECT_TRUE(Window::wait_for([&] { return window.title().find("The second sheet") != std::string::npos; }))
      << window.title();
}

TEST_F(WindowTest, SleepsWhenNothingHappens) {
  Window window(display_, {});
  run({"sleep", "1"});
  const long before = window.processor_ticks();
  run({"sleep", "2"});
  // Two seconds at rest: drawing without end would take near 200 ticks of 10 ms.
  EXPECT_LE(window.processor_ticks() - before, 4);
}

TEST_F(WindowTest, DrawsASheetThatIsNotEmpty) {
  const std::string picture = folder_ / "sheet.png";
  const Ran ran = run({"env", "DISPLAY=" + display_.name(), "LIBGL_ALWAYS_SOFTWARE=1", HEATLEDGER_WINDOW,
                       "--screenshot", picture, "--size", "1280x900"});
  EXPECT_EQ(ran.status, 0) << ran.err;
  const std::string png = read_whole(picture);
  EXPECT_EQ(png.substr(1, 3), "PNG");
  // An even colour packs into some ten kilobytes at most; text does not.
  EXPECT_GT(png.size(), 20000u);
}

TEST(WindowUsage, WithoutADisplayItSaysSo) {
  const Ran ran = run({"env", "-u", "DISPLAY", "-u", "WAYLAND_DISPLAY", HEATLEDGER_WINDOW});
  EXPECT_EQ(ran.status, 1);
  EXPECT_NE(ran.err.find("display"), std::string::npos) << ran.err;
}

}  // namespace
}  // namespace heatledger::test
