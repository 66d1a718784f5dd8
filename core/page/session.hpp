// A sheet being worked on: history, results, folds. Every face talks to a sheet through this and nothing
// else; requests.hpp gives the same as JSON text.
#pragma once

#include <map>
#include <memory>
#include <string>
#include <string_view>
#include <vector>

#include "core/base/result.hpp"
#include "core/page/page.hpp"

namespace heatledger::page {

class Session {
 public:
  Session();  ///< an empty sheet with one empty reaction
  ~Session();
  Session(Session&&) noexcept;
  Session& operator=(Session&&) noexcept;

  /// Replaces the sheet by the file's; on error the present sheet stays.
  /// @errors file.*; file.is_site_table: its rows are copied in by the command import_site_table instead
  Status open(std::string_view file_text);
  std::string save();             ///< file text; marks the sheet as saved
  std::string file_text() const;  ///< the same without the mark: for recovery copies
  bool changed_since_save() const;

  /// The text typed into an editable cell. An unreadable text is kept and shown with its error, never lost.
  /// Pressing a Button cell is an edit with any text.
  /// @errors edit.no_such_cell, edit.not_editable
  Status edit(std::string_view cell, std::string_view text);
  /// A named command with arguments; names and arguments: page/README.md.
  /// @errors command.unknown, command.argument, command.nothing_to_undo, command.nothing_to_redo
  Status command(std::string_view name, const std::map<std::string, std::string>& arguments);

  /// Stays valid until the next call that changes the sheet.
  const Page& page();
  /// Revision at which blocks of the page last came, went or moved.
  std::uint64_t order_changed() const;
  /// Everything about one cell. @errors edit.no_such_cell
  Result<Margin> margin(std::string_view cell);
  /// Margins of every cell that has a working, in reading order: the appendix of a report.
  std::vector<Margin> workings();

  /// Completions of the species name that a half-typed equation (or name) ends with: the whole text with the
  /// name put in, the name alone for the list, and a quiet remark each.
  struct Suggestion {
    std::string insert, name, remark;
  };
  std::vector<Suggestion> suggest(std::string_view text, std::size_t limit);

 private:
  struct State;
  std::unique_ptr<State> state_;
};

}  // namespace heatledger::page
