#include "core/document/named_quantities.hpp"

#include <algorithm>
#include <map>

#include "core/base/utf8.hpp"
#include "core/document/typed_rows.hpp"

namespace heatledger::document {
namespace {

class Table {
 public:
  explicit Table(const NamedQuantities& typed) : typed_(typed), state_(typed.size(), State::New) {
    out_.rows.resize(typed.size());
  }

  ReadQuantities read() {
    for (std::size_t i = 0; i < typed_.size(); ++i) take_name(i);
    for (std::size_t i = 0; i < typed_.size(); ++i) work_out(i);
    std::sort(out_.errors.begin(), out_.errors.end(),
              [this](const Error& a, const Error& b) { return place_.at(a.where) < place_.at(b.where); });
    return std::move(out_);
  }

 private:
  enum class State { New, Open, Done };

  void refuse(std::size_t row, const char* field, Error error) {
    error = placed(std::move(error), "quantities[" + std::to_string(row) + "]." + field);
    place_.emplace(error.where, row);
    out_.errors.push_back(std::move(error));
  }

  void take_name(std::size_t row) {
    const std::string name(utf8::trim(typed_[row].name));
    if (name.empty()) {
      if (!utf8::trim(typed_[row].value).empty())
        refuse(row, "name",
               {"quantity.no_name", "This quantity has no name.", "", "Name it, so that cells can call it."});
      return;
    }
    if (const Status usable = units::usable_name(name); !usable.ok()) {
      refuse(row, "name", usable.error());
    } else if (!rows_.emplace(name, row).second) {
      refuse(row, "name",
             {"quantity.twice", "Another quantity is already called \"" + name + "\".", "",
              "Give each a name of its own."});
    } else {
      names_[row] = name;
    }
  }

  void work_out(std::size_t row) {
    if (state_[row] != State::New) return;
    state_[row] = State::Open;
    open_.push_back(row);
    const std::string_view text = utf8::trim(typed_[row].value);
    bool circle = false;
    const auto known = [this](std::string_view name) { return rows_.find(name) != rows_.end(); };
    for (const std::string& called : units::names_called(text, known)) {
      const std::size_t other = rows_.find(called)->second;
      if (state_[other] == State::Open) {
        circle = true;
        refuse(row, "value",
               {"quantity.circle", "These quantities call each other: " + circle_from(other) + ".", "",
                "Type a figure in one of them."});
        break;
      }
      work_out(other);
    }
    if (!circle && !text.empty()) evaluate(row, text);
    open_.pop_back();
    state_[row] = State::Done;
  }

  void evaluate(std::size_t row, std::string_view text) {
    Result<units::Evaluated> figure = units::evaluate(text, out_.names, row + 1);
    if (!figure.ok()) {
      refuse(row, "value", figure.error());
      return;
    }
    if (const auto name = names_.find(row); name != names_.end())
      out_.names[name->second] = {figure->value, figure->dimension, figure->kelvin};
    if (const std::string_view unit = utf8::trim(typed_[row].unit); !unit.empty())
      show_in(row, unit, *figure);
    out_.rows[row].figure = std::move(*figure);
  }

  void show_in(std::size_t row, std::string_view text, const units::Evaluated& figure) {
    Result<units::Unit> unit = units::parse_unit(text);
    if (!unit.ok()) {
      refuse(row, "unit", unit.error());
      return;
    }
    units::Dimension dimension = unit->dimension;
    if (figure.kelvin || figure.dimension.kind == units::Kind::TemperatureDifference) {
      if (unit->offset == 0 && dimension.kind == units::Kind::Temperature) dimension = figure.dimension;
    }
    // A share may be shown in per cent.
    if (dimension == units::dimension::kNumber) {
      units::Dimension bare = figure.dimension;
      bare.kind = units::Kind::Plain;
      if (bare == dimension) dimension = figure.dimension;
    }
    if (dimension != figure.dimension) {
      refuse(row, "unit",
             {"unit.dimension",
              "\"" + unit->text + "\" is " + units::describe(unit->dimension) + ", but this comes to " +
                  units::describe(figure.dimension) + ".",
              "", "Choose a unit that measures the same, or none."});
      return;
    }
    out_.rows[row].shown_in = std::move(*unit);
  }

  /// "a → b → a"
  std::string circle_from(std::size_t row) const {
    std::string text;
    for (auto at = std::find(open_.begin(), open_.end(), row); at != open_.end(); ++at)
      text += names_.at(*at) + " \u2192 ";
    return text + names_.at(row);
  }

  const NamedQuantities& typed_;
  std::vector<State> state_;
  std::vector<std::size_t> open_;                         ///< being worked out, outermost first
  std::map<std::string, std::size_t, std::less<>> rows_;  ///< by name
  std::map<std::size_t, std::string> names_;              ///< usable ones
  std::map<std::string, std::size_t> place_;              ///< row of an error, for the order of the sheet
  ReadQuantities out_;
};

}  // namespace

ReadQuantities read_quantities(const NamedQuantities& typed) {
  return Table(typed).read();
}

}  // namespace heatledger::document
