// A sheet being worked on: history, results, folds, selection. Every face talks to a sheet through this and nothing
// else; requests.hpp gives the same as JSON text.
#pragma once

#include <map>
#include <memory>
#include <string>
#include <string_view>

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
  Status open(std::string_view file_text);
  std::string save();  ///< file text; marks the sheet as saved
  bool changed_since_save() const;

  /// The text typed into an editable cell. An unreadable text is kept and shown with its error, never lost.
  /// @errors edit.no_such_cell, edit.not_editable
  Status edit(std::string_view cell, std::string_view text);
  /// A named command ("undo", "redo", "add_reaction", "remove_reaction", "fold", …) with arguments.
  /// @errors command.unknown, command.argument
  Status command(std::string_view name, const std::map<std::string, std::string>& arguments);

  const Page& page();
  Margin margin(std::string_view cell);
  /// Completions of a half-typed species name: texts to insert with a quiet remark each.
  struct Suggestion { std::string insert, remark; };
  std::vector<Suggestion> suggest(std::string_view text, std::size_t limit);

 private:
  struct State;
  std::unique_ptr<State> state_;
};

}  // namespace heatledger::page
